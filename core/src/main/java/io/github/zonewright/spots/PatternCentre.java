package io.github.zonewright.spots;

import io.github.zonewright.image.PixelPoint;

/**
 * Where the direct beam meets the pattern.
 *
 * @param position the place, perhaps hidden by a stop or outside the frame
 * @param error standard deviation of each coordinate, in pixels
 * @param source what it was found from
 */
public record PatternCentre(PixelPoint position, double error, Source source) {

    /** What a centre was found from. */
    public enum Source {
        /** The direct beam itself. */
        DIRECT_BEAM,
        /** The midpoints of spots g and −g. */
        SPOT_PAIRS,
        /** The round falling off of the background. */
        BACKGROUND,
        /** A person, who said where it is. */
        BY_HAND
    }

    /**
     * Checks the error.
     *
     * @throws IllegalArgumentException if the error is not positive and finite
     */
    public PatternCentre {
        if (!(error > 0) || Double.isInfinite(error)) {
            throw new IllegalArgumentException("centre error " + error + " px: expected positive and finite");
        }
    }
}
