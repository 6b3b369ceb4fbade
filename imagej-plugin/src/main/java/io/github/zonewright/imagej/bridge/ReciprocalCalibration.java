package io.github.zonewright.imagej.bridge;

import ij.ImagePlus;
import ij.measure.Calibration;
import ij.process.FHT;
import io.github.zonewright.microscope.LengthUnit;
import io.github.zonewright.microscope.ReciprocalPixel;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalInt;

/**
 * The camera constant that an image's own calibration states, when its unit is a reciprocal length. The image's local
 * calibration counts; a global one, which ImageJ lends to every image, says nothing about this pattern. ImageJ's FFT window
 * keeps the calibration of the image that was transformed: its pixel is 1/(N·pixel size), N being the side that was
 * transformed, which is a power of two.
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
        boolean reciprocal = unit != null && LengthUnit.parseReciprocal(unit).isPresent();
        OptionalInt side = transformedSide(image);
        Optional<LengthUnit> transformed =
                !reciprocal && unit != null && side.isPresent() ? LengthUnit.parse(unit) : Optional.empty();
        if (!reciprocal && transformed.isEmpty()) {
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
        if (transformed.isPresent()) {
            return ofTransform(side.getAsInt(), calibration.pixelWidth, unit, transformed.get());
        }
        return new ReciprocalCalibration(
                ReciprocalPixel.of(calibration.pixelWidth, unit).map(ReciprocalPixel::cameraConstant),
                String.format(Locale.ROOT, "From the image: %.6g %s per pixel.", calibration.pixelWidth, unit));
    }

    /** The side of an FFT window; one that was saved and opened again is known by its info alone. */
    private static OptionalInt transformedSide(ImagePlus image) {
        if (image.getProperty("FHT") instanceof FHT transform) {
            return OptionalInt.of(transform.getWidth());
        }
        String info = image.getInfoProperty();
        boolean whole = image.getWidth() == image.getHeight() && Integer.bitCount(image.getWidth()) == 1;
        return whole && info != null && info.startsWith("Fast Hartley Transform")
                ? OptionalInt.of(image.getWidth())
                : OptionalInt.empty();
    }

    private static ReciprocalCalibration ofTransform(int side, double pixel, String unit, LengthUnit length) {
        ReciprocalPixel size = ReciprocalPixel.ofFourierTransform(side, pixel * length.angstroms());
        return new ReciprocalCalibration(
                Optional.of(size.cameraConstant()),
                String.format(
                        Locale.ROOT,
                        "From the image, an FFT of %d pixels of %.6g %s: %.6g 1/nm per pixel.",
                        side,
                        pixel,
                        unit,
                        LengthUnit.NANOMETRE.angstroms() * size.inverseAngstroms()));
    }

    private static String unusable(ImagePlus image, String unit) {
        if (image.getProperty("FHT") != null) {
            return "The FFT window's unit, which is that of the image it came from, is \"" + unit
                    + "\" and no length such as nm, so give the camera constant.";
        }
        return "The image's unit is \"" + unit + "\", which is no reciprocal length such as 1/nm.";
    }
}
