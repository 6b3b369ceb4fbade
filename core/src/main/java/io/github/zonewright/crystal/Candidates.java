package io.github.zonewright.crystal;

import java.util.List;

/**
 * The crystals of a list of candidates, read from where they are.
 *
 * @param crystals those that are there, in the order of the list; one whose file has changed says so in its notices
 * @param missing those that are gone or cannot be read, in words for people
 */
public record Candidates(List<Crystal> crystals, List<String> missing) {

    /** Copies the lists. */
    public Candidates {
        crystals = List.copyOf(crystals);
        missing = List.copyOf(missing);
    }
}
