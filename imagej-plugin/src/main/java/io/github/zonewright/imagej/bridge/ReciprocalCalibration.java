package io.github.zonewright.imagej.bridge;

import ij.ImagePlus;
import ij.measure.Calibration;
import io.github.zonewright.microscope.CameraScale;
import java.util.Locale;
import java.util.Map;
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

    /** 1/Å per unit; the keys are the unit without spaces, micro sign and angstrom sign written one way. */
    private static final Map<String, Double> PER_ANGSTROM = Map.of("nm", 0.1, "Å", 1.0, "µm", 1e-4, "pm", 100.0);

    /**
     * Reads an image's calibration.
     *
     * @param image the image; it is not changed
     * @return what its calibration says about the scale of a pattern
     */
    public static ReciprocalCalibration of(ImagePlus image) {
        Calibration calibration = image.getLocalCalibration();
        String unit = calibration.getXUnit();
        Optional<Double> perPixel = inverseAngstroms(unit).map(size -> size * calibration.pixelWidth);
        if (perPixel.isEmpty()) {
            return new ReciprocalCalibration(Optional.empty(), unusable(image, unit));
        }
        double aspect = calibration.pixelHeight / calibration.pixelWidth;
        if (!(aspect < LARGEST_ASPECT && aspect > 1 / LARGEST_ASPECT)) {
            return new ReciprocalCalibration(
                    Optional.empty(),
                    "The image's pixels are not square (height/width " + aspect + "), so give the camera constant.");
        }
        if (!(perPixel.get() > 0) || Double.isInfinite(perPixel.get())) {
            return new ReciprocalCalibration(
                    Optional.empty(), "The image's pixel width is " + calibration.pixelWidth + " " + unit + ".");
        }
        double constant = CameraScale.fromReciprocalPixel(perPixel.get());
        return new ReciprocalCalibration(
                Optional.of(constant),
                String.format(Locale.ROOT, "From the image: %.6g %s per pixel.", calibration.pixelWidth, unit));
    }

    private static String unusable(ImagePlus image, String unit) {
        if (image.getProperty("FHT") != null) {
            return "An FFT window keeps the unit of the image it came from, so give the camera constant.";
        }
        return "The image's unit is \"" + unit + "\", which is no reciprocal length such as 1/nm.";
    }

    /**
     * How many 1/Å a unit of reciprocal length is.
     *
     * @param unit for example {@code 1/nm}, {@code nm⁻¹}, {@code nm^-1}, {@code 1/Å}, {@code 1/A}, {@code 1/µm}
     * @return its size in 1/Å, or empty if it is no reciprocal length
     */
    static Optional<Double> inverseAngstroms(String unit) {
        if (unit == null) {
            return Optional.empty();
        }
        String u = unit.replaceAll("[\\s()]", "").replace('\u212b', 'Å').replace('\u03bc', 'µ');
        String length;
        if (u.startsWith("1/")) {
            length = u.substring(2);
        } else if (u.matches(".+(⁻¹|\\^-1|\\^−1|-1)")) {
            length = u.replaceAll("(⁻¹|\\^-1|\\^−1|-1)$", "");
        } else {
            return Optional.empty();
        }
        String symbol = switch (length) {
            case "A", "Ang", "Angstrom", "angstrom", "Ångström" -> "Å";
            case "um", "micron" -> "µm";
            default -> length;
        };
        return Optional.ofNullable(PER_ANGSTROM.get(symbol));
    }
}
