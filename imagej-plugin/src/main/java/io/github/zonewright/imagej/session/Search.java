package io.github.zonewright.imagej.session;

import ij.ImagePlus;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.indexing.OrientationSearch;
import io.github.zonewright.indexing.SearchResult;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotContrast;
import io.github.zonewright.spots.SpotFinder;
import java.util.function.BooleanSupplier;
import java.util.function.DoubleConsumer;

/**
 * What a person knows before the search for an orientation.
 *
 * @param crystal the crystal
 * @param beam the beam
 * @param cameraConstant camera constant in px·Å, as told
 * @param tolerance how far it may be off, as a part of it: 0.03 for 3 %
 * @param mirrored whether the image is mirrored
 */
public record Search(Crystal crystal, Beam beam, double cameraConstant, double tolerance, boolean mirrored) {
    private static final double LARGEST_TOLERANCE = 0.2;

    /**
     * Checks the numbers.
     *
     * @throws IllegalArgumentException if the camera constant is not above 0 or the tolerance not from 0 to 20 %
     */
    public Search {
        if (!(cameraConstant > 0) || Double.isInfinite(cameraConstant)) {
            throw new IllegalArgumentException(
                    "camera constant: " + cameraConstant + " px·Å, expected a finite value above 0 px·Å");
        }
        if (!(tolerance > 0 && tolerance <= LARGEST_TOLERANCE)) {
            throw new IllegalArgumentException(
                    "tolerance of the scale: " + 100 * tolerance + " %, expected above 0 and at most 20 %");
        }
    }

    /**
     * Measures the spots on an image's current slice, as bright ones.
     *
     * @param image the image; it is not changed
     * @return what was measured
     * @throws IllegalArgumentException if no pattern can be measured on such pixels; the message says why
     */
    public static MeasuredPattern measure(ImagePlus image) {
        return measure(image, Measurement.How.PLAIN);
    }

    /**
     * Measures the spots on an image's current slice.
     *
     * @param image the image; it is not changed
     * @param how its hidden area, and whether spots are dark
     * @return what was measured
     * @throws IllegalArgumentException if no pattern can be measured on such pixels; the message says why
     */
    public static MeasuredPattern measure(ImagePlus image, Measurement.How how) {
        SpotFinder finder = SpotFinder.withDefaults();
        return how.hidden().map(finder::withHidden).orElse(finder).find(pixels(image, how));
    }

    /**
     * Asks the image whether its spots are dark, unless a person said so.
     *
     * @param image the image; it is not changed
     * @param how how it is measured
     * @return the same with the judgement
     */
    public static Measurement.How judged(ImagePlus image, Measurement.How how) {
        return how.said().isPresent() ? how : how.withJudged(SpotContrast.of(ImagePixels.of(image)));
    }

    /**
     * The pixels as they are measured: bright spots on dark ground.
     *
     * @param image the image; it is not changed
     * @param how whether its spots are dark
     * @return its pixels, inverted for dark spots
     */
    public static GrayImage pixels(ImagePlus image, Measurement.How how) {
        GrayImage pixels = ImagePixels.of(image);
        return how.isDark() ? pixels.inverted() : pixels;
    }

    /**
     * Searches for orientations.
     *
     * @param measured the measured spots
     * @param progress is told how far the search is, 0 to 1
     * @param cancelled is asked whether to stop
     * @return the solutions, and a sentence
     */
    public SearchResult run(MeasuredPattern measured, DoubleConsumer progress, BooleanSupplier cancelled) {
        return OrientationSearch.of(crystal, beam, cameraConstant, tolerance, mirrored)
                .find(measured, progress, cancelled);
    }
}
