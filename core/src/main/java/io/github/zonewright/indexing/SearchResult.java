package io.github.zonewright.indexing;

import java.util.List;
import java.util.Optional;

/**
 * What a search has found.
 *
 * @param solutions the solutions, best first; empty when nothing explains the spots
 * @param explanation a sentence or two for a person: how many solutions there are, or why there is none
 * @param row what the spots tell when they are a single row or pair, which has no solution; empty otherwise
 */
public record SearchResult(List<Solution> solutions, String explanation, Optional<RowAnswer> row) {

    /** Copies the list. */
    public SearchResult {
        solutions = List.copyOf(solutions);
    }

    /**
     * A result of spots that are no row.
     *
     * @param solutions the solutions, best first
     * @param explanation a sentence for a person
     */
    public SearchResult(List<Solution> solutions, String explanation) {
        this(solutions, explanation, Optional.empty());
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
