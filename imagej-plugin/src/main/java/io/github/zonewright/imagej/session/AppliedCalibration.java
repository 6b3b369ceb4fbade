package io.github.zonewright.imagej.session;

import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.calibration.MicroscopeSetting;
import io.github.zonewright.image.PixelPoint;
import java.time.LocalDate;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * A calibration as it is used for an image, with what a person says of the setting at which the image was taken. Voltage and
 * binning of the image belong to the {@link Instrument}.
 *
 * @param calibration the calibration, at the binning for which it was made
 * @param cameraLength nominal camera length of the image in mm; empty when not told
 * @param pixelSize unbinned pixel of the image in µm; empty when not told
 * @param centre where the direct beam meets this image, if its own rings told
 */
public record AppliedCalibration(
        Calibration calibration, OptionalDouble cameraLength, OptionalDouble pixelSize, Optional<PixelPoint> centre) {
    private static final double PERCENT = 100;

    /**
     * A calibration for an image of whose setting nothing is told but voltage and binning.
     *
     * @param calibration the calibration
     * @return the calibration in use
     */
    public static AppliedCalibration of(Calibration calibration) {
        return new AppliedCalibration(calibration, OptionalDouble.empty(), OptionalDouble.empty(), Optional.empty());
    }

    /**
     * What speaks against it.
     *
     * @param kilovolts accelerating voltage of the image in kV
     * @param binning binning of the image
     * @param today the day of use
     * @return sentences for a person; empty when nothing does
     */
    public List<String> warnings(double kilovolts, int binning, LocalDate today) {
        return calibration.warnings(
                new MicroscopeSetting("", kilovolts, cameraLength, pixelSize, binning),
                today,
                Calibration.OLD_AFTER_DAYS);
    }

    /**
     * What it says for an image, in one line.
     *
     * @param binning binning of the image
     * @return name, camera constant, ellipse, mirror, rotation and where all this comes from
     */
    public String line(int binning) {
        Calibration here = calibration.forBinning(binning);
        StringBuilder line = new StringBuilder(here.name())
                .append(": camera constant ")
                .append(Figures.of(here.constant(), " px·Å"));
        if (binning != calibration.setting().binning()) {
            line.append(" at binning ")
                    .append(binning)
                    .append(" (made at ")
                    .append(calibration.setting().binning())
                    .append(')');
        }
        line.append(String.format(Locale.ROOT, ", good to %.2g %%", PERCENT * here.tolerance()));
        line.append(", ellipse ").append(Figures.of(here.ellipseRatio(), ""));
        if (here.ellipseAzimuth().error() < Math.PI / 4) {
            line.append(" at ").append(Figures.degrees(here.ellipseAzimuth()));
        }
        line.append(here.mirrored() ? ", mirrored" : ", not mirrored");
        here.imageRotation().ifPresent(r -> line.append(", image rotation ").append(Figures.degrees(r)));
        line.append("; ");
        if (!here.standard().isBlank()) {
            line.append(here.standard()).append(", ");
        }
        return line.append(here.date()).append('.').toString();
    }
}
