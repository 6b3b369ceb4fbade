package io.github.zonewright.imagej.bridge;

import ij.ImagePlus;
import ij.measure.Calibration;
import io.github.zonewright.microscope.LengthUnit;
import java.util.Locale;

/**
 * Sets an image's own calibration to a reciprocal length when a person asks, and puts back what it was. ImageJ lends a global
 * calibration to every image in place of its own, so none is set beneath one.
 */
public final class ImageCalibration {
    private static final String BEFORE = "zonewright.calibration.before";
    private static final String UNIT = "1/nm";

    private ImageCalibration() {}

    /**
     * Sets the calibration.
     *
     * @param image the image
     * @param cameraConstant camera constant in px·Å, above 0
     * @return a sentence: what it is now, and what it was
     * @throws IllegalArgumentException if the constant is not above 0 or a global calibration is set; the image is then as it was
     */
    public static String set(ImagePlus image, double cameraConstant) {
        if (!(cameraConstant > 0) || Double.isInfinite(cameraConstant)) {
            throw new IllegalArgumentException(
                    "camera constant: " + cameraConstant + " px·Å, expected a finite value above 0 px·Å");
        }
        Calibration now = image.getLocalCalibration().copy();
        now.setUnit(UNIT);
        now.setYUnit(null);
        now.pixelWidth = LengthUnit.NANOMETRE.angstroms() / cameraConstant;
        now.pixelHeight = now.pixelWidth;
        return replace(image, now);
    }

    /**
     * Puts back the calibration that was there before {@link #set} first changed it.
     *
     * @param image the image
     * @return a sentence: what it is now, and what it was
     * @throws IllegalArgumentException if we changed nothing, or a global calibration is set
     */
    public static String putBack(ImagePlus image) {
        if (image.getProperty(BEFORE) instanceof Calibration before) {
            String said = replace(image, before.copy());
            image.setProperty(BEFORE, null);
            return said;
        }
        throw new IllegalArgumentException(
                "calibration of the image: it was not set from here, so nothing is put back");
    }

    /**
     * Whether there is something to put back.
     *
     * @param image the image
     * @return true after {@link #set}
     */
    public static boolean wasSet(ImagePlus image) {
        return image.getProperty(BEFORE) instanceof Calibration;
    }

    private static String replace(ImagePlus image, Calibration now) {
        if (image.getGlobalCalibration() != null) {
            throw new IllegalArgumentException("calibration of the image: a global one is set, "
                    + text(image.getGlobalCalibration())
                    + ", which ImageJ shows in its place; take Global off under Image > Properties... first");
        }
        Calibration before = image.getLocalCalibration().copy();
        if (!wasSet(image)) {
            image.setProperty(BEFORE, before);
        }
        image.setCalibration(now);
        image.repaintWindow();
        return "The image's calibration is " + text(now) + " now; it was " + text(before) + ".";
    }

    private static String text(Calibration c) {
        String height = c.pixelHeight == c.pixelWidth ? "" : String.format(Locale.ROOT, " × %.6g", c.pixelHeight);
        return String.format(Locale.ROOT, "%.6g%s %s per pixel", c.pixelWidth, height, c.getXUnit());
    }
}
