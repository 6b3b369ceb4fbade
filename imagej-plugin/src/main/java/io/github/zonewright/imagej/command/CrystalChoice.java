package io.github.zonewright.imagej.command;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalCif;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.crystal.ShelfEntry;
import java.io.File;
import java.io.IOException;
import java.nio.file.Files;
import java.util.List;

/** The crystal that a person names: one from the shelf, or a CIF file. */
public final class CrystalChoice {
    /** Style of a {@code @Parameter} that names a crystal: the dialog of plain ImageJ then offers the shelf. */
    static final String STYLE = "crystal";

    private static final int SUGGESTIONS = 5;

    private CrystalChoice() {}

    /**
     * What is on the shelf.
     *
     * @return the names, by kind of material
     */
    public static List<String> shelfNames() {
        return CrystalShelf.entries().stream().map(ShelfEntry::name).toList();
    }

    /**
     * Finds a crystal.
     *
     * @param shelfName name or formula of a crystal on the shelf; not read when a file is given
     * @param cif a CIF file, or null for none
     * @return the crystal
     * @throws IOException if the file can't be read
     * @throws IllegalArgumentException if the shelf has no such crystal, or the file holds none
     */
    public static Crystal of(String shelfName, File cif) throws IOException {
        if (cif == null || cif.getPath().isBlank()) {
            return CrystalShelf.find(shelfName).orElseThrow(() -> unknown(shelfName));
        }
        if (!Files.isReadable(cif.toPath()) || Files.isDirectory(cif.toPath())) {
            throw new IllegalArgumentException("CIF file " + cif + " can't be read: is there such a file?");
        }
        List<Crystal> read = CrystalCif.read(cif.toPath());
        if (read.isEmpty()) {
            throw new IllegalArgumentException("CIF file " + cif + " holds no crystal: expected a cell and atom sites");
        }
        return read.get(0);
    }

    private static IllegalArgumentException unknown(String name) {
        List<String> near = CrystalShelf.search(name).stream()
                .map(ShelfEntry::name)
                .limit(SUGGESTIONS)
                .toList();
        String hint = near.isEmpty() ? "" : " such as " + String.join(", ", near);
        return new IllegalArgumentException(
                "crystal: \"" + name + "\", expected a name or formula of the shelf" + hint + ", or a CIF file");
    }
}
