package io.github.zonewright.crystal;

import java.util.List;
import java.util.stream.Stream;

/**
 * One crystal of the shelf, before its file is read.
 *
 * @param id the name of its file without the ending, for example {@code gallium-arsenide}
 * @param name what people call it
 * @param formula the formula in Hill order, for example {@code As Ga}
 * @param otherNames further names it is found by
 */
public record ShelfEntry(String id, String name, String formula, List<String> otherNames) {

    /** Copies the list. */
    public ShelfEntry {
        otherNames = List.copyOf(otherNames);
    }

    /**
     * Reads the crystal.
     *
     * @return the crystal, under the name of this entry
     */
    public Crystal crystal() {
        return CrystalShelf.read(id);
    }

    /** Every name it is found by. */
    List<String> names() {
        return Stream.concat(Stream.of(name), otherNames.stream()).toList();
    }

    @Override
    public String toString() {
        return name + " (" + formula + ")";
    }
}
