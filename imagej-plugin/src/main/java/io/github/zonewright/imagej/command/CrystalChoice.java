package io.github.zonewright.imagej.command;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalCif;
import io.github.zonewright.crystal.CrystalShelf;
import java.io.File;
import java.io.IOException;
import java.nio.file.Files;
import java.util.List;

/** The crystal that a person names: one from the shelf, or a CIF file. */
public final class CrystalChoice {
    private CrystalChoice() {}

    /**
     * Finds a crystal.
     *
     * @param shelfName a crystal of the shelf; not read when a file is given
     * @param cif a CIF file, or null for none
     * @return the crystal
     * @throws IOException if the file can't be read
     * @throws IllegalArgumentException if the shelf has no such crystal, or the file holds none
     */
    public static Crystal of(String shelfName, File cif) throws IOException {
        if (cif == null || cif.getPath().isBlank()) {
            return CrystalShelf.named(shelfName);
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
}
