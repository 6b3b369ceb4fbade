package io.github.zonewright.symmetry;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStream;
import java.io.InputStreamReader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.TreeMap;

/** Reads the table of settings and gives each its code of axes, which follows from its place in the table. */
final class SettingsTable {

    private static final String RESOURCE = "space-group-settings.txt";
    private static final int IN_TABLES_ORDER = 530;

    private static final List<String> MONOCLINIC_3 = List.of("b", "c", "a");
    private static final List<String> MONOCLINIC_9 = List.of("b1", "b2", "b3", "c1", "c2", "c3", "a1", "a2", "a3");
    private static final List<String> MONOCLINIC_18 = List.of(
            "b1", "b2", "b3", "-b1", "-b2", "-b3", "c1", "c2", "c3", "-c1", "-c2", "-c3", "a1", "a2", "a3", "-a1",
            "-a2", "-a3");
    private static final List<String> ORTHORHOMBIC_2 = List.of("abc", "ba-c");
    private static final List<String> ORTHORHOMBIC_3 = List.of("abc", "cab", "bca");
    private static final List<String> ORTHORHOMBIC_6 = List.of("abc", "ba-c", "cab", "-cba", "bca", "a-cb");

    private SettingsTable() {}

    static List<SpaceGroupSetting> read() {
        List<String[]> rows = rows();
        Map<Integer, Integer> sizes = new TreeMap<>();
        rows.subList(0, IN_TABLES_ORDER).forEach(r -> sizes.merge(Integer.valueOf(r[0]), 1, Integer::sum));
        Map<Integer, Integer> seen = new TreeMap<>();
        List<SpaceGroupSetting> settings = new ArrayList<>();
        for (String[] row : rows) {
            int number = Integer.parseInt(row[0]);
            boolean coded = settings.size() < IN_TABLES_ORDER;
            int place = coded ? seen.merge(number, 1, Integer::sum) - 1 : 0;
            int colon = row[1].indexOf(':');
            String qualifier = colon < 0 ? "" : row[1].substring(colon + 1).toLowerCase(Locale.ROOT);
            String code = coded ? code(number, place, sizes.get(number), qualifier) : "";
            settings.add(new SpaceGroupSetting(number, row[1], row[2], code));
        }
        return List.copyOf(settings);
    }

    private static String code(int number, int place, int size, String qualifier) {
        if (size == 1) {
            return "";
        }
        if (number < 16) {
            return (size == 3 ? MONOCLINIC_3 : size == 9 ? MONOCLINIC_9 : MONOCLINIC_18).get(place);
        }
        if (number < 75) {
            boolean twoOrigins = !qualifier.isEmpty();
            int axes = twoOrigins ? size / 2 : size;
            int at = twoOrigins ? place / 2 : place;
            return qualifier
                    + switch (axes) {
                        case 1 -> "";
                        case 2 -> ORTHORHOMBIC_2.get(at);
                        case 3 -> ORTHORHOMBIC_3.get(at);
                        default -> ORTHORHOMBIC_6.get(at);
                    };
        }
        return qualifier;
    }

    private static List<String[]> rows() {
        List<String[]> rows = new ArrayList<>();
        try (InputStream in = SettingsTable.class.getResourceAsStream(RESOURCE);
                BufferedReader lines = new BufferedReader(new InputStreamReader(in, StandardCharsets.UTF_8))) {
            for (String line = lines.readLine(); line != null; line = lines.readLine()) {
                if (!line.startsWith("#")) {
                    rows.add(line.split("\t"));
                }
            }
        } catch (IOException e) {
            throw new UncheckedIOException("space-group table in the library's own jar cannot be read", e);
        }
        return rows;
    }
}
