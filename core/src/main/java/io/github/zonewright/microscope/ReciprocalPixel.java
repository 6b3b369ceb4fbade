package io.github.zonewright.microscope;

import java.util.Optional;

/**
 * The size of a pixel of a diffraction pattern as |g| = 1/d, which an image's own calibration states.
 *
 * @param inverseAngstroms in 1/Å, finite and above 0
 */
public record ReciprocalPixel(double inverseAngstroms) {

    /**
     * Checks the value.
     *
     * @throws IllegalArgumentException if it is not finite and above 0
     */
    public ReciprocalPixel {
        if (!(inverseAngstroms > 0) || Double.isInfinite(inverseAngstroms)) {
            throw new IllegalArgumentException(
                    "reciprocal pixel size: " + inverseAngstroms + " 1/Å, expected a finite value above 0");
        }
    }

    /**
     * A size in a unit. Worked number: 0.05 {@code 1/nm} is 0.005 1/Å.
     *
     * @param size size of a pixel in that unit
     * @param unit a reciprocal length, as {@link LengthUnit#parseReciprocal} reads it
     * @return the size; empty if the unit is no reciprocal length
     * @throws IllegalArgumentException if the size is not finite and above 0
     */
    public static Optional<ReciprocalPixel> of(double size, String unit) {
        return LengthUnit.parseReciprocal(unit).map(u -> new ReciprocalPixel(size / u.angstroms()));
    }

    /**
     * A pixel of the Fourier transform of an image: 1/(N·pixel). Worked number: 1024 pixels of 0.02 nm give 0.0488 1/nm.
     *
     * @param samples number of samples along the side that was transformed, after padding, at least 2
     * @param pixelAngstroms size of a pixel of the image in Å, finite and above 0
     * @return the size
     * @throws IllegalArgumentException if a value is out of range
     */
    public static ReciprocalPixel ofFourierTransform(int samples, double pixelAngstroms) {
        if (samples < 2 || !(pixelAngstroms > 0) || Double.isInfinite(pixelAngstroms)) {
            throw new IllegalArgumentException("Fourier transform of " + samples + " pixels of " + pixelAngstroms
                    + " Å: expected at least 2 pixels of a finite size above 0");
        }
        return new ReciprocalPixel(1 / (samples * pixelAngstroms));
    }

    /**
     * The camera constant of this scale.
     *
     * @return K in px·Å
     */
    public double cameraConstant() {
        return CameraScale.fromReciprocalPixel(inverseAngstroms);
    }
}
