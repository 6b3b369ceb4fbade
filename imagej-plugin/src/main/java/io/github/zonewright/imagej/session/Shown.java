package io.github.zonewright.imagej.session;

import io.github.zonewright.indexing.Solution;
import io.github.zonewright.spots.MeasuredPattern;

/** What must be on an image before more can be asked about it. */
public final class Shown {
    private Shown() {}

    /**
     * The solution that an image shows.
     *
     * @param sitting what is known of the image
     * @return its solution
     * @throws IllegalArgumentException if it shows none
     */
    public static Solution solution(Sitting sitting) {
        return sitting.chosen()
                .orElseThrow(() -> new IllegalArgumentException(
                        "no solution is shown on this image: find its zone axis first, or choose a solution"));
    }

    /**
     * Its measured spots.
     *
     * @param sitting what is known of the image
     * @return the spots
     * @throws IllegalArgumentException if they are not measured
     */
    public static MeasuredPattern spots(Sitting sitting) {
        return sitting.measured()
                .orElseThrow(() -> new IllegalArgumentException(
                        "the spots of this image are not measured: find its zone axis first"));
    }
}
