package io.github.zonewright.imagej.bridge;

import ij.ImagePlus;
import ij.measure.Calibration;
import io.github.zonewright.microscope.LengthUnit;
import io.github.zonewright.microscope.ReciprocalPixel;
import java.util.Locale;
import java.util.Optional;

/**
 * The camera constant that an image's own calibration states, when its unit is a reciprocal length. The image's local
 * calibration counts; a global one, which ImageJ lends to every image, says nothing about this pattern.
 *
 * @param cameraConstant camera constant in px·Å, where the unit is a reciprocal length
 * @param explanation a sentence for a person: what the calibration says, or why it can't be used
 */
public record ReciprocalCalibration(Optional<Double> cameraConstant, String explanation) {
    private static final double LARGEST_ASPECT = 1.001;

    /**
     * Reads an image's calibration.
     *
     * @param image the image; it is not changed
     * @return what its calibration says about the scale of a pattern
     */
    public static ReciprocalCalibration of(ImagePlus image) {
        Calibration calibration = image.getLocalCalibration();
        String unit = calibration.getXUnit();
        if (unit == null || LengthUnit.parseReciprocal(unit).isEmpty()) {
            return new ReciprocalCalibration(Optional.empty(), unusable(image, unit));
        }
        double aspect = calibration.pixelHeight / calibration.pixelWidth;
        if (!(aspect < LARGEST_ASPECT && aspect > 1 / LARGEST_ASPECT)) {
            return new ReciprocalCalibration(
                    Optional.empty(),
                    "The image's pixels are not square (height/width " + aspect + "), so give the camera constant.");
        }
        if (!(calibration.pixelWidth > 0) || Double.isInfinite(calibration.pixelWidth)) {
            return new ReciprocalCalibration(
                    Optional.empty(), "The image's pixel width is " + calibration.pixelWidth + " " + unit + ".");
        }
        return new ReciprocalCalibration(
                ReciprocalPixel.of(calibration.pixelWidth, unit).map(ReciprocalPixel::cameraConstant),
                String.format(Locale.ROOT, "From the image: %.6g %s per pixel.", calibration.pixelWidth, unit));
    }

    private static String unusable(ImagePlus image, String unit) {
        if (image.getProperty("FHT") != null) {
            return "An FFT window keeps the unit of the image it came from, so give the camera constant.";
        }
        return "The image's unit is \"" + unit + "\", which is no reciprocal length such as 1/nm.";
    }
}
