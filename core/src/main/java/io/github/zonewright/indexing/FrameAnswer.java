package io.github.zonewright.indexing;

import io.github.zonewright.spots.MeasuredPattern;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * The answer to one frame of a series.
 *
 * @param index the frame, from 0
 * @param label what a person calls it
 * @param measured what was measured on it; empty when it could not be read or measured
 * @param result the solutions, best first, or the reason why there is none
 * @param followed whether the solutions are those of the frame before, refined on this one, and no search was made: then
 *     only those can tie
 * @param turned the smallest angle in radians between this orientation and that of the last frame before whose verdict is
 *     settled or tied: smallest over the rotations of the Laue class and over undecided half turns about the zone axis.
 *     Its error is that of both orientations, above all of their leans. Empty where the crystal is another one, where
 *     there is no frame before, or where the verdict of this one is open
 */
public record FrameAnswer(
        int index,
        String label,
        Optional<MeasuredPattern> measured,
        SearchResult result,
        boolean followed,
        OptionalDouble turned) {

    /**
     * How sure the answer is.
     *
     * @return the verdict; open, with the reason, where there is no solution
     */
    public Verdict verdict() {
        return Verdict.of(result);
    }
}
