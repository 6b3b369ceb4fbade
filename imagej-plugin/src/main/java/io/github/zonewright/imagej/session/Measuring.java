package io.github.zonewright.imagej.session;

import ij.ImagePlus;
import io.github.zonewright.spots.SpotEdit;

/** Measuring an image as a part of other commands. */
public final class Measuring {
    private Measuring() {}

    /**
     * A sitting with measured spots.
     *
     * @param image the image; it is not changed
     * @param sitting what is known of it
     * @return the same with the spots it has, or else with those measured now
     * @throws IllegalArgumentException if no pattern can be measured on such pixels
     */
    public static Sitting asNeeded(ImagePlus image, Sitting sitting) {
        return sitting.measured().isPresent() ? sitting : anew(image, sitting);
    }

    /**
     * A sitting with the spots that a person corrected, or else with those measured now.
     *
     * @param image the image; it is not changed
     * @param sitting what is known of it
     * @return the same with measured spots
     * @throws IllegalArgumentException if no pattern can be measured on such pixels
     */
    public static Sitting unlessEdited(ImagePlus image, Sitting sitting) {
        return sitting.measurement().edited() ? asNeeded(image, sitting) : anew(image, sitting);
    }

    private static Sitting anew(ImagePlus image, Sitting sitting) {
        Measurement.How how = Search.judged(image, sitting.measurement().how());
        Sitting measured =
                sitting.withMeasurement(sitting.measurement().withHow(how)).withMeasured(Search.measure(image, how));
        for (SpotEdit edit : sitting.measurement().edits()) {
            measured = again(measured, edit);
        }
        return measured;
    }

    /** A change that a record tells of; where another version finds other spots, it may be impossible, and is left out. */
    private static Sitting again(Sitting sitting, SpotEdit edit) {
        try {
            return sitting.withEdited(edit);
        } catch (IllegalArgumentException e) {
            return sitting;
        }
    }
}
