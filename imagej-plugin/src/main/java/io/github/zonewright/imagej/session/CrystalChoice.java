package io.github.zonewright.imagej.session;

import ij.Prefs;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.crystal.Candidates;
import io.github.zonewright.crystal.CifStructure;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalCif;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.crystal.ShelfEntry;
import java.io.File;
import java.io.IOException;
import java.nio.file.Files;
import java.util.List;
import java.util.Optional;
import java.util.stream.Collectors;
import java.util.stream.Stream;

/** The crystal that a person names: one of the shelf or of the user's, or a CIF file. */
public final class CrystalChoice {
    /** Style of a {@code @Parameter} that names a crystal: the dialog of plain ImageJ then offers what there is. */
    public static final String STYLE = "crystal";

    /** Style of one that may name a list of candidates too. */
    public static final String GROUP_STYLE = "crystal or list";

    private static final int SUGGESTIONS = 5;

    private CrystalChoice() {}

    /**
     * What can be named.
     *
     * @param lists whether lists of candidates can be named too
     * @return the names: the shelf by kind of material, then the user's crystals, then the lists
     */
    public static List<String> names(boolean lists) {
        CrystalOffers now = CrystalOffers.now(List.of());
        return Stream.of(CrystalOffer.OnShelf.class, CrystalOffer.InFolder.class, CrystalOffer.Group.class)
                .filter(kind -> lists || kind != CrystalOffer.Group.class)
                .flatMap(kind -> now.offers().stream().filter(kind::isInstance))
                .map(CrystalOffer::name)
                .distinct()
                .toList();
    }

    /**
     * Makes a crystal or a list the one that the commands' dialogs offer first.
     *
     * @param named its name, or the path of its CIF file
     */
    public static void remember(String named) {
        boolean listed = names(true).contains(named);
        if (listed) {
            Prefs.set("zonewright.crystal", named);
        }
        Prefs.set("zonewright.cif", !listed && new File(named).isFile() ? named : "");
    }

    /**
     * Finds a crystal.
     *
     * @param name name or formula of a crystal of the shelf or of the user's, or the path of a CIF file; with {@code #2}
     *     behind it for the second structure of a file; not read when a file is given
     * @param cif a CIF file, or null for none
     * @return the crystal
     * @throws IOException if a file can't be read
     * @throws IllegalArgumentException if there is no such crystal, or the file holds none, or several
     */
    public static Crystal of(String name, File cif) throws IOException {
        List<Crystal> found = group(name, cif);
        if (found.size() != 1) {
            throw new IllegalArgumentException(
                    "crystal: \"" + name + "\" is a list of " + found.size() + " crystals, expected one crystal");
        }
        return found.get(0);
    }

    /**
     * Finds a crystal, or the crystals of a list of candidates.
     *
     * @param name as for {@link #of}, or the name of a list
     * @param cif a CIF file, or null for none
     * @return the crystals, at least one
     * @throws IOException if a file can't be read
     * @throws IllegalArgumentException as {@link #of} does, or if something of the list is missing
     */
    public static List<Crystal> group(String name, File cif) throws IOException {
        if (cif != null && !cif.getPath().isBlank()) {
            return List.of(ofFile(cif.getPath()));
        }
        CrystalOffers now = CrystalOffers.now(List.of());
        Optional<CrystalOffer> named = now.named(name);
        if (named.isPresent()) {
            return all(named.get());
        }
        Optional<Crystal> found = CrystalShelf.find(name)
                .or(() -> now.matching(name).stream()
                        .filter(CrystalOffer.InFolder.class::isInstance)
                        .map(o -> ((CrystalOffer.InFolder) o).kept().crystal())
                        .filter(c -> !CrystalOffers.fold(c.name()).contains(CrystalOffers.fold(name)))
                        .findFirst());
        if (found.isPresent()) {
            return List.of(found.get());
        }
        if (name.toLowerCase(java.util.Locale.ROOT).matches(".*\\.cif(#\\d{1,6})?") || new File(name).isFile()) {
            return List.of(ofFile(name));
        }
        throw unknown(name);
    }

    /**
     * The structures of a CIF file, for a person to choose from.
     *
     * @param file the file
     * @return its structures, at least one, usable or not
     * @throws IOException if it can't be read
     * @throws IllegalArgumentException if it is no CIF, or holds no structure; the message says what is missing
     */
    public static List<CifStructure> structures(File file) throws IOException {
        if (!Files.isReadable(file.toPath()) || Files.isDirectory(file.toPath())) {
            throw new IllegalArgumentException("CIF file " + file + " can't be read: is there such a file?");
        }
        CifFile cif = CifFile.read(file.toPath());
        List<CifStructure> structures = CrystalCif.structures(cif);
        if (structures.isEmpty()) {
            CrystalCif.of(cif);
        }
        return structures;
    }

    private static Crystal ofFile(String path) throws IOException {
        int mark = path.lastIndexOf('#');
        boolean numbered = mark > 0 && path.substring(mark + 1).matches("\\d{1,6}") && !new File(path).exists();
        List<CifStructure> structures = structures(new File(numbered ? path.substring(0, mark) : path));
        int number = numbered ? Integer.parseInt(path.substring(mark + 1)) : 1;
        if (number < 1 || number > structures.size() || !numbered && structures.size() > 1) {
            throw new IllegalArgumentException("CIF file " + path + ": expected #1 to #" + structures.size()
                    + " behind its name, for one of its structures: "
                    + structures.stream().map(CifStructure::name).collect(Collectors.joining(", ")));
        }
        CifStructure chosen = structures.get(number - 1);
        if (chosen instanceof CifStructure.Refused refused) {
            throw new IllegalArgumentException("CIF file " + path + ": " + refused.reason(), refused.cause());
        }
        return ((CifStructure.Usable) chosen).crystal();
    }

    private static List<Crystal> all(CrystalOffer offer) throws IOException {
        Candidates read = offer.read();
        if (!read.missing().isEmpty() || read.crystals().isEmpty()) {
            throw new IllegalArgumentException("list " + offer.name() + ": "
                    + (read.missing().isEmpty()
                            ? "empty, expected at least one crystal"
                            : String.join(" ", read.missing())));
        }
        return read.crystals();
    }

    private static IllegalArgumentException unknown(String name) {
        List<String> near = CrystalShelf.search(name).stream()
                .map(ShelfEntry::name)
                .limit(SUGGESTIONS)
                .toList();
        String hint = near.isEmpty() ? "" : " such as " + String.join(", ", near);
        return new IllegalArgumentException("crystal: \"" + name
                + "\", expected a name or formula of the shelf or of your own crystals" + hint + ", or a CIF file");
    }
}
