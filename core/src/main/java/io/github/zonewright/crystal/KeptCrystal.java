package io.github.zonewright.crystal;

import java.nio.file.Path;

/**
 * A crystal of the user's folder.
 *
 * @param id the name of its file without {@code .cif}; with {@code #2} and so on behind it for the second structure of a
 *     file and those that follow
 * @param file the file
 * @param sha256 the SHA-256 hash of the file, in hexadecimal
 * @param crystal the crystal
 */
public record KeptCrystal(String id, Path file, String sha256, Crystal crystal) {

    /**
     * Name and formula, for a list.
     *
     * @return for example {@code Ferrite (Fe)}
     */
    @Override
    public String toString() {
        return crystal.name() + " (" + crystal.formula() + ")";
    }
}
