package io.github.zonewright.indexing;

import java.util.List;
import java.util.Optional;

/**
 * What a search has found.
 *
 * @param solutions the solutions, best first; empty when nothing explains the spots
 * @param explanation a sentence for a person: how many solutions there are, or why there is none
 */
public record SearchResult(List<Solution> solutions, String explanation) {

    /** Copies the list. */
    public SearchResult {
        solutions = List.copyOf(solutions);
    }

    /**
     * The first-ranked solution.
     *
     * @return the best solution, or empty when there is no answer
     */
    public Optional<Solution> best() {
        return solutions.stream().findFirst();
    }
}
