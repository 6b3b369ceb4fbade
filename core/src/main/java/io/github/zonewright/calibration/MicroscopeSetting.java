package io.github.zonewright.calibration;

import io.github.zonewright.microscope.Beam;
import java.util.OptionalDouble;

/**
 * How the microscope stood when a calibration was made.
 *
 * @param instrument the user's name for it; may be blank
 * @param kilovolts accelerating voltage in kV
 * @param cameraLength nominal camera length in mm, as the microscope shows it; empty when not known
 * @param pixelSize size of an unbinned pixel of the detector in µm; empty when not known
 * @param binning pixels joined to one along each side, 1 for none
 */
public record MicroscopeSetting(
        String instrument, double kilovolts, OptionalDouble cameraLength, OptionalDouble pixelSize, int binning) {

    /**
     * Checks the values.
     *
     * @throws IllegalArgumentException if the voltage is not one of a {@link Beam}, a length or size not finite and above 0, or the
     *     binning below 1
     */
    public MicroscopeSetting {
        // The beam knows which voltages there are.
        Beam.ofKilovolts(kilovolts);
        cameraLength.ifPresent(v -> positive("nominal camera length", v, "mm"));
        pixelSize.ifPresent(v -> positive("pixel size", v, "µm"));
        if (binning < 1) {
            throw new IllegalArgumentException("binning: " + binning + ", expected 1 or more");
        }
    }

    private static void positive(String quantity, double value, String unit) {
        if (!(value > 0) || Double.isInfinite(value)) {
            throw new IllegalArgumentException(
                    quantity + ": " + value + " " + unit + ", expected a finite value above 0 " + unit);
        }
    }

    /**
     * The same setting with other binning.
     *
     * @param other pixels joined along each side
     * @return the setting
     * @throws IllegalArgumentException if the binning is below 1
     */
    public MicroscopeSetting withBinning(int other) {
        return new MicroscopeSetting(instrument, kilovolts, cameraLength, pixelSize, other);
    }
}
