package io.github.zonewright.crystal;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStreamReader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.List;

/** Reads a comma-separated table of the jar: lines that begin with # are comments, the first other one names columns. */
final class ResourceTable {

    private ResourceTable() {}

    static List<String[]> read(String name) {
        return lines(name).stream().skip(1).map(line -> line.split(",")).toList();
    }

    /** The lines that are no comments. */
    static List<String> lines(String name) {
        try (BufferedReader lines = new BufferedReader(
                new InputStreamReader(ResourceTable.class.getResourceAsStream(name), StandardCharsets.UTF_8))) {
            return lines.lines().filter(line -> !line.startsWith("#")).toList();
        } catch (IOException e) {
            throw new UncheckedIOException("table " + name + " in the library's own jar cannot be read", e);
        }
    }
}
