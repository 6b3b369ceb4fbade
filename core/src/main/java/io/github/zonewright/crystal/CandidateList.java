package io.github.zonewright.crystal;

import java.util.ArrayList;
import java.util.List;
import java.util.stream.Stream;

/**
 * A named list of crystals that a pattern may come from, such as the phases of one steel.
 *
 * @param name what the user calls it
 * @param candidates its entries, none twice
 */
public record CandidateList(String name, List<Candidate> candidates) {

    /**
     * Copies the entries and checks them.
     *
     * @throws IllegalArgumentException if the name is blank, or a crystal is there twice
     */
    public CandidateList {
        if (name.isBlank()) {
            throw new IllegalArgumentException(
                    "name of the list of candidates: blank, expected at least one character");
        }
        candidates = List.copyOf(candidates);
        for (int i = 0; i < candidates.size(); i++) {
            Candidate candidate = candidates.get(i);
            if (candidates.subList(0, i).stream().anyMatch(candidate::isAt)) {
                throw new IllegalArgumentException(
                        "list of candidates " + name + ": " + candidate.name() + " twice, expected each crystal once");
            }
        }
    }

    /**
     * A list with nothing on it.
     *
     * @param name what the user calls it
     * @return the list
     * @throws IllegalArgumentException if the name is blank
     */
    public static CandidateList named(String name) {
        return new CandidateList(name, List.of());
    }

    /**
     * The list with one more crystal at its end, or with the new hash of one that it has.
     *
     * @param candidate the crystal
     * @return the list
     */
    public CandidateList with(Candidate candidate) {
        boolean known = candidates.stream().anyMatch(candidate::isAt);
        return new CandidateList(
                name,
                known
                        ? candidates.stream()
                                .map(c -> c.isAt(candidate) ? candidate : c)
                                .toList()
                        : Stream.concat(candidates.stream(), Stream.of(candidate))
                                .toList());
    }

    /**
     * The list without a crystal.
     *
     * @param candidate the crystal; nothing happens if it is not on the list
     * @return the list
     */
    public CandidateList without(Candidate candidate) {
        List<Candidate> others = new ArrayList<>(candidates);
        others.removeIf(candidate::isAt);
        return new CandidateList(name, others);
    }

    /**
     * The list under another name.
     *
     * @param other the name
     * @return the list
     * @throws IllegalArgumentException if the name is blank
     */
    public CandidateList withName(String other) {
        return new CandidateList(other, candidates);
    }
}
