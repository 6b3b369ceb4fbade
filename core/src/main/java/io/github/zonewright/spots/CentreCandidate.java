package io.github.zonewright.spots;

/**
 * A centre that the pattern may have, and how likely it is among the others.
 *
 * @param centre the centre
 * @param logWeight natural logarithm of its weight, 0 for the likeliest of a pattern
 */
public record CentreCandidate(PatternCentre centre, double logWeight) {

    /**
     * Checks the weight.
     *
     * @throws IllegalArgumentException if the weight's logarithm is not finite
     */
    public CentreCandidate {
        if (!Double.isFinite(logWeight)) {
            throw new IllegalArgumentException("logarithm of the weight " + logWeight + ": expected a finite number");
        }
    }
}
