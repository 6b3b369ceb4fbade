package io.github.zonewright.cif;

import io.github.zonewright.TestData;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.util.HashSet;
import java.util.List;
import java.util.Locale;
import java.util.Set;
import java.util.stream.Stream;

/** The names of the CIF core dictionary that a test may look up. */
public final class CoreDictionary {
    private final Set<String> names = new HashSet<>();

    private CoreDictionary(List<String> lines) {
        for (String line : lines) {
            if (line.startsWith("_")) {
                String[] cells = line.split(",", -1);
                add(cells[0]);
                Stream.of(cells[1].split(" ")).filter(alias -> !alias.isEmpty()).forEach(this::add);
            }
        }
    }

    private void add(String name) {
        names.add(name.toLowerCase(Locale.ROOT));
    }

    /**
     * Reads the table of items.
     *
     * @return the dictionary
     */
    public static CoreDictionary load() {
        try {
            return new CoreDictionary(Files.readAllLines(TestData.path("reference/cif-core-items.csv")));
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    /**
     * Whether the dictionary has an item.
     *
     * @param item a data name or an alias, in any case
     * @return true if it has
     */
    public boolean contains(String item) {
        return names.contains(item.toLowerCase(Locale.ROOT));
    }

    /**
     * How many names there are.
     *
     * @return the number of names, aliases included
     */
    public int size() {
        return names.size();
    }
}
