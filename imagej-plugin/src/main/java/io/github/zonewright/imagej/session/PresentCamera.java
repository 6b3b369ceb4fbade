package io.github.zonewright.imagej.session;

import ij.ImagePlus;
import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.calibration.MicroscopeSetting;
import io.github.zonewright.calibration.RingCalibration;
import io.github.zonewright.indexing.Solution;
import java.time.LocalDate;
import java.util.Optional;
import java.util.function.BiFunction;

/**
 * What is known of an image's camera and may be kept as a calibration.
 *
 * @param kilovolts accelerating voltage in kV
 * @param origin where it comes from, in words
 * @param maker makes the calibration of a name and a setting
 */
public record PresentCamera(double kilovolts, String origin, BiFunction<String, MicroscopeSetting, Calibration> maker) {

    /**
     * The camera of the solution shown, else the calibration in use.
     *
     * @param image the image
     * @return the camera; empty when there is neither
     */
    public static Optional<PresentCamera> of(ImagePlus image) {
        return Sitting.of(image)
                .chosen()
                .map(PresentCamera::of)
                .or(() -> Instrument.of(image).flatMap(Instrument::calibration).map(PresentCamera::of));
    }

    /**
     * The camera that rings gave.
     *
     * @param fitted what the rings gave; the standard must fit
     * @return the camera
     */
    public static PresentCamera of(RingCalibration.Fitted fitted) {
        return new PresentCamera(
                fitted.beam().kilovolts(),
                "these rings",
                (name, setting) -> RingTrial.calibration(fitted, name, setting));
    }

    private static PresentCamera of(Solution solution) {
        return new PresentCamera(
                solution.placement().beam().kilovolts(),
                "the solution shown, " + solution.placement().crystal().name() + " taken as the standard",
                (name, setting) -> solution.calibration(name, setting, LocalDate.now()));
    }

    /** What was made at one setting holds for another binning; where the user tells more of the setting, that is kept. */
    private static PresentCamera of(Calibration inUse) {
        return new PresentCamera(
                inUse.setting().kilovolts(),
                "the calibration in use, " + inUse.name(),
                (name, setting) -> new Calibration(
                        name,
                        setting,
                        inUse.date(),
                        inUse.standard(),
                        inUse.forBinning(setting.binning()).constant(),
                        inUse.ellipseRatio(),
                        inUse.ellipseAzimuth(),
                        inUse.mirrored(),
                        inUse.imageRotation()));
    }

    /**
     * A calibration of this camera.
     *
     * @param name its name
     * @param setting the setting of the image
     * @return the calibration
     * @throws IllegalArgumentException if the name is blank or the voltage is another
     */
    public Calibration calibration(String name, MicroscopeSetting setting) {
        return maker.apply(name, setting);
    }
}
