package io.github.zonewright.imagej.command;

import io.github.zonewright.indexing.Solution;
import io.github.zonewright.spots.MeasuredPattern;

/** What must be on an image before more can be asked about it. */
final class Shown {
    private Shown() {}

    /** The solution that an image shows. */
    static Solution solution(Sitting sitting) {
        return sitting.chosen()
                .orElseThrow(() -> new IllegalArgumentException(
                        "no solution is shown on this image: find its zone axis first, or choose a solution"));
    }

    /** Its measured spots. */
    static MeasuredPattern spots(Sitting sitting) {
        return sitting.measured()
                .orElseThrow(() -> new IllegalArgumentException(
                        "the spots of this image are not measured: find its zone axis first"));
    }
}
