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
    /** What stands in the table instead of the aliases of 15 items, whose aliases it thus lacks. */
    private static final String LOST = "_alias.deprecation_date";
    /** Aliases of such items, from memory, besides those that have '_' for '.'. */
    private static final List<String> FROM_MEMORY = List.of(
            "_symmetry_equiv_pos_as_xyz",
            "_symmetry_equiv_pos_site_id",
            "_symmetry_Int_Tables_number",
            "_symmetry_space_group_name_Hall",
            "_atom_site_thermal_displace_type",
            "_atom_site_symmetry_multiplicity",
            "_diffrn_source",
            "_diffrn_detector");

    private final Set<String> names = new HashSet<>();

    private CoreDictionary(List<String> lines) {
        FROM_MEMORY.forEach(this::add);
        for (String line : lines) {
            if (line.startsWith("_")) {
                String[] cells = line.split(",", -1);
                add(cells[0]);
                String aliases = cells[1].equals(LOST) ? cells[0].replace('.', '_') : cells[1];
                Stream.of(aliases.split(" ")).filter(alias -> !alias.isEmpty()).forEach(this::add);
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
