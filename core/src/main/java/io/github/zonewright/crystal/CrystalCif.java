package io.github.zonewright.crystal;

import io.github.zonewright.cif.CifBlock;
import io.github.zonewright.cif.CifException;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.cif.CifNumber;
import io.github.zonewright.cif.CifValue;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.symmetry.SpaceGroup;
import java.io.IOException;
import java.io.InputStream;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;

/**
 * Crystals from CIF and to CIF.
 *
 * <p>What a file leaves doubtful is settled by stated rules and told in {@link Crystal#notices()}: operations that are
 * listed go before the Hall symbol, that before the Hermann–Mauguin symbol, that before the number; truncated special
 * positions are put right; sites that symmetry repeats count once. Both the names of the core dictionary of CIF (with
 * and without dots) and its older ones are read.
 */
public final class CrystalCif {

    private static final double DENSITY_TOLERANCE = 0.03;
    private static final int MOST_PASSED = 5;

    private CrystalCif() {}

    /**
     * Reads the crystals of a file.
     *
     * @param path the file
     * @return its crystals, at least one, in the order of their blocks
     * @throws IOException if the file cannot be read
     * @throws CifException if it is no CIF, or a value is not what its item asks for
     * @throws CrystalCifException if no block holds a crystal
     */
    public static List<Crystal> read(Path path) throws IOException {
        return of(CifFile.read(path));
    }

    /**
     * Reads the crystals of a stream.
     *
     * @param in the bytes of a CIF
     * @return its crystals, at least one, in the order of their blocks
     * @throws IOException if the bytes cannot be had
     * @throws CifException if they are no CIF, or a value is not what its item asks for
     * @throws CrystalCifException if no block holds a crystal
     */
    public static List<Crystal> read(InputStream in) throws IOException {
        return of(CifFile.read(in));
    }

    /**
     * The crystals of a CIF. Blocks without cell and sites are passed over; a block that has them but cannot be used is
     * told in the notices of the others, or thrown if there are no others.
     *
     * @param file the CIF
     * @return its crystals, at least one
     * @throws CifException if a value is not what its item asks for
     * @throws CrystalCifException if no block holds a crystal
     */
    public static List<Crystal> of(CifFile file) {
        List<CifStructure> structures = structures(file);
        List<CifStructure.Usable> usable = only(structures, CifStructure.Usable.class);
        List<CifStructure.Refused> refused = only(structures, CifStructure.Refused.class);
        if (usable.isEmpty()) {
            throw refused.isEmpty()
                    ? CrystalCifException.missing(
                            file.blocks().isEmpty()
                                    ? new CifBlock("", List.of())
                                    : file.blocks().get(0),
                            "_cell_length_a",
                            "has neither cell nor sites, expected a crystal")
                    : refused.get(0).cause();
        }
        List<String> failures = refused.stream()
                .map(r -> "Block " + r.block() + " of the file could not be used: " + r.reason())
                .toList();
        return usable.stream()
                .map(CifStructure.Usable::crystal)
                .map(c -> c.withNotices(failures))
                .toList();
    }

    /**
     * The structures of a CIF for a person to choose from. Blocks without cell and sites, such as the shared heading of
     * a paper, are passed over; one that cannot be used is there with the reason, and spoils no other.
     *
     * @param file the CIF
     * @return the structures in the order of their blocks, none if no block has cell or sites
     */
    public static List<CifStructure> structures(CifFile file) {
        List<CifStructure> structures = new ArrayList<>();
        List<String> passed = passed(file);
        for (CifBlock block : file.blocks()) {
            if (holdsCrystal(block)) {
                try {
                    structures.add(
                            new CifStructure.Usable(block.name(), of(block).withNotices(passed)));
                } catch (CifException | CrystalCifException e) {
                    structures.add(new CifStructure.Refused(block.name(), name(block), e));
                }
            }
        }
        return List.copyOf(structures);
    }

    /** What the reader let pass although the standard forbids it, the first few. */
    private static List<String> passed(CifFile file) {
        List<String> passed = new ArrayList<>();
        int all = file.notices().size();
        file.notices().stream()
                .limit(MOST_PASSED)
                .forEach(notice -> passed.add("The file breaks the standard: " + notice + "."));
        if (all > MOST_PASSED) {
            passed.add("The file breaks the standard in " + (all - MOST_PASSED) + " more places.");
        }
        return passed;
    }

    private static <T extends CifStructure> List<T> only(List<CifStructure> structures, Class<T> kind) {
        return structures.stream().filter(kind::isInstance).map(kind::cast).toList();
    }

    private static boolean holdsCrystal(CifBlock block) {
        return block.value("_cell_length_a", "_cell.length_a").isPresent()
                || !block.values("_atom_site_fract_x", "_atom_site.fract_x").isEmpty();
    }

    /**
     * The crystal of one block.
     *
     * @param block the block
     * @return the crystal
     * @throws CifException if a value is not what its item asks for
     * @throws CrystalCifException if cell or sites are missing or cannot be used
     */
    public static Crystal of(CifBlock block) {
        List<String> notices = new ArrayList<>();
        Lattice lattice = CifCell.read(block, notices);
        List<AtomSite> asWritten = CifSites.read(block, notices);
        SpaceGroup group = CifSymmetry.read(block, lattice, asWritten, notices);
        List<AtomSite> sites;
        try {
            sites = SiteTidying.tidy(asWritten, group, notices);
        } catch (IllegalArgumentException e) {
            throw CrystalCifException.missing(block, "_atom_site_label", "holds too much: " + e.getMessage());
        }
        Crystal crystal = new Crystal(name(block), lattice, group, sites, notices);
        List<String> more = new ArrayList<>();
        densityDoubt(block, crystal).ifPresent(more::add);
        block.value("_chemical_properties_biological", "_chemical.properties_biological")
                .filter(CifValue::isKnown)
                .ifPresent(v -> more.add("Of its effect on living things the file says: "
                        + v.text().trim().replaceAll("\\s+", " ")));
        return crystal.withNotices(more);
    }

    /**
     * The crystal of a block that {@link #toBlock} made, as it was: nothing is put right, and nothing is doubted.
     *
     * @param block the block
     * @return the crystal, the same in every bit, without notices; sites that shared a label have numbered ones
     * @throws CifException if a value is not what its item asks for
     * @throws CrystalCifException if cell or sites are missing or cannot be used
     */
    public static Crystal asWritten(CifBlock block) {
        List<String> passedOver = new ArrayList<>();
        Lattice lattice = CifCell.read(block, passedOver);
        List<AtomSite> sites = CifSites.read(block, passedOver);
        SpaceGroup group = CifSymmetry.read(block, lattice, sites, passedOver);
        String name = block.value("_chemical_name_common").map(CifValue::text).orElseGet(() -> name(block));
        return new Crystal(name, lattice, group, sites, List.of());
    }

    private static String name(CifBlock block) {
        for (String item : List.of("name_mineral", "name_common", "name_systematic", "formula_sum")) {
            Optional<String> name = block.value("_chemical_" + item, "_chemical." + item)
                    .filter(CifValue::isKnown)
                    .map(v -> v.text().trim().replaceAll("\\s+", " "))
                    .filter(t -> !t.isEmpty());
            if (name.isPresent()) {
                return name.get();
            }
        }
        return block.name();
    }

    private static Optional<String> densityDoubt(CifBlock block, Crystal crystal) {
        Optional<Double> stated = block.value("_exptl_crystal_density_diffrn", "_exptl_crystal.density_diffrn")
                .filter(CifValue::isKnown)
                .filter(v -> CifNumber.parse(v.text()).isPresent())
                .map(v -> v.asNumber().value());
        double computed = crystal.density();
        return stated.filter(d -> Math.abs(d - computed) > DENSITY_TOLERANCE * computed)
                .map(d -> String.format(
                        Locale.ROOT,
                        "The file gives a density of %.3f g/cm³, but cell and atoms (%s) make %.3f g/cm³.",
                        d,
                        crystal.formula(),
                        computed));
    }

    /**
     * A crystal as a block of CIF, numbers at full precision.
     *
     * @param crystal the crystal
     * @return the block, with names of the core dictionary
     */
    public static CifBlock toBlock(Crystal crystal) {
        return CrystalCifWriter.block(crystal);
    }

    /**
     * Writes a crystal, whole or not at all.
     *
     * @param crystal the crystal
     * @param path the file
     * @throws IOException if it cannot be written; an older file is then as it was
     */
    public static void write(Crystal crystal, Path path) throws IOException {
        file(crystal).write(path);
    }

    static CifFile file(Crystal crystal) {
        return CifFile.of(toBlock(crystal));
    }
}
