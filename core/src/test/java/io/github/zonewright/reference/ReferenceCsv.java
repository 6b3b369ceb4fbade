package io.github.zonewright.reference;

import io.github.zonewright.TestData;
import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStreamReader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.zip.GZIPInputStream;

/** Tables of facts under {@code testdata/reference}: comment lines start with #, the first other line names columns. */
public final class ReferenceCsv {

    private ReferenceCsv() {}

    public static Path folder() {
        return TestData.path("reference");
    }

    /** The rows as column name → value; {@code separator} is a comma or a semicolon, a file may be gzipped. */
    public static List<Map<String, String>> read(String name, char separator) {
        Path file = folder().resolve(name);
        List<Map<String, String>> rows = new ArrayList<>();
        try (BufferedReader lines = new BufferedReader(new InputStreamReader(
                name.endsWith(".gz") ? new GZIPInputStream(Files.newInputStream(file)) : Files.newInputStream(file),
                StandardCharsets.UTF_8))) {
            List<String> names = null;
            for (String line = lines.readLine(); line != null; line = lines.readLine()) {
                if (line.startsWith("#")) {
                    continue;
                }
                List<String> fields = split(line, separator);
                if (names == null) {
                    names = fields;
                } else {
                    Map<String, String> row = new LinkedHashMap<>();
                    for (int i = 0; i < names.size(); i++) {
                        row.put(names.get(i), fields.get(i));
                    }
                    rows.add(row);
                }
            }
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
        return rows;
    }

    private static List<String> split(String line, char separator) {
        List<String> fields = new ArrayList<>();
        StringBuilder field = new StringBuilder();
        boolean quoted = false;
        for (int i = 0; i < line.length(); i++) {
            char c = line.charAt(i);
            if (quoted && c == '"' && i + 1 < line.length() && line.charAt(i + 1) == '"') {
                field.append('"');
                i++;
            } else if (c == '"' && (quoted || field.isEmpty())) {
                quoted = !quoted;
            } else if (c == separator && !quoted) {
                fields.add(field.toString());
                field.setLength(0);
            } else {
                field.append(c);
            }
        }
        fields.add(field.toString());
        return fields;
    }
}
