package io.github.zonewright.microscope;

/**
 * The scale of a pattern as people know it, turned into a camera constant in px·Å.
 *
 * <p>R·d = λL: with the camera length L and the pixel size p the camera constant is K = λL/p. Worked number: 200 kV
 * (0.025079 Å), 500 mm and 24 µm pixels give 522.5 px·Å.
 */
public final class CameraScale {

    private CameraScale() {}

    /**
     * From λL in mm·Å, as measured on a print or a plate.
     *
     * @param millimetreAngstroms λL in mm·Å
     * @param pixelMicrometres pixel size in µm, as recorded (after binning)
     * @return the camera constant in px·Å
     * @throws IllegalArgumentException if a value is not finite and above 0
     */
    public static double fromMillimetreAngstroms(double millimetreAngstroms, double pixelMicrometres) {
        return positive("camera constant", millimetreAngstroms, "mm·Å")
                / (positive("pixel size", pixelMicrometres, "µm") * 1e-3);
    }

    /**
     * From the camera length.
     *
     * @param lengthMillimetres camera length in mm
     * @param pixelMicrometres size of an unbinned pixel in µm
     * @param binning pixels joined to one along each side, 1 for none
     * @param beam the beam
     * @return the camera constant in px·Å
     * @throws IllegalArgumentException if a value is not finite and above 0, or the binning is below 1
     */
    public static double fromCameraLength(double lengthMillimetres, double pixelMicrometres, int binning, Beam beam) {
        if (binning < 1) {
            throw new IllegalArgumentException("binning: " + binning + ", expected 1 or more");
        }
        return fromMillimetreAngstroms(
                beam.wavelength() * positive("camera length", lengthMillimetres, "mm"), pixelMicrometres * binning);
    }

    /**
     * From the reciprocal size of a pixel, as an image's calibration gives it.
     *
     * @param inverseAngstromsPerPixel reciprocal length |g| = 1/d of one pixel in 1/Å
     * @return the camera constant in px·Å
     * @throws IllegalArgumentException if the value is not finite and above 0
     */
    public static double fromReciprocalPixel(double inverseAngstromsPerPixel) {
        return 1 / positive("reciprocal pixel size", inverseAngstromsPerPixel, "1/Å");
    }

    private static double positive(String quantity, double value, String unit) {
        if (!(value > 0) || Double.isInfinite(value)) {
            throw new IllegalArgumentException(
                    quantity + ": " + value + " " + unit + ", expected a finite value above 0 " + unit);
        }
        return value;
    }
}
