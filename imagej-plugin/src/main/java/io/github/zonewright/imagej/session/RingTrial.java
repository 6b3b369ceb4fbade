package io.github.zonewright.imagej.session;

import ij.ImagePlus;
import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.calibration.MeasuredRings;
import io.github.zonewright.calibration.MicroscopeSetting;
import io.github.zonewright.calibration.RingCalibration;
import io.github.zonewright.calibration.RingCalibrator;
import io.github.zonewright.calibration.RingFinder;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.image.Ellipse;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.bridge.RingTable;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.overlay.RingMarks;
import io.github.zonewright.microscope.Beam;
import java.time.LocalDate;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.Stream;

/**
 * What a person assumes of the rings on an image.
 *
 * @param standard the powder
 * @param beam the beam
 * @param mirrored whether the image is mirrored
 * @param roughConstant about what the camera constant is, in px·Å; empty when that is not known
 * @param tolerance how far it may be off, as a part of it: 0.03 for 3 %
 */
public record RingTrial(Crystal standard, Beam beam, boolean mirrored, OptionalDouble roughConstant, double tolerance) {
    /** Powders in common use for this; the rings are compared with each. */
    public static final List<String> POWDERS = List.of("Gold", "Aluminium", "Silicon", "Ceria", "Periclase");

    /**
     * Measures the rings on an image's current slice.
     *
     * @param image the image; it is not changed
     * @return what was measured
     */
    public static MeasuredRings measure(ImagePlus image) {
        return RingFinder.withDefaults().find(ImagePixels.of(image));
    }

    /**
     * Takes the rings for those of the standard, and compares them with the powders in common use.
     *
     * @param measured the rings
     * @return a camera, or a refusal with its reason
     */
    public RingCalibration of(MeasuredRings measured) {
        List<Crystal> powders = POWDERS.stream()
                .flatMap(name -> CrystalShelf.find(name).stream())
                .toList();
        RingCalibrator free = RingCalibrator.of(beam).withMirrored(mirrored).comparedWith(powders);
        RingCalibrator asked =
                roughConstant.isPresent() ? free.withConstantNear(roughConstant.getAsDouble(), tolerance) : free;
        return asked.calibrate(measured, standard);
    }

    /**
     * Names of the powders that fit the rings.
     *
     * @param ranks how powders do
     * @return the names, the best first
     */
    public static List<String> fitting(List<RingCalibration.StandardRank> ranks) {
        return ranks.stream()
                .filter(RingCalibration.StandardRank::fits)
                .map(r -> r.standard().name())
                .toList();
    }

    /**
     * Why there is no camera.
     *
     * @param refused the refusal
     * @return its reason, and which powders would fit
     */
    public static String reason(RingCalibration.Refused refused) {
        List<String> others = fitting(refused.others());
        return refused.reason() + (others.isEmpty() ? "" : " Standards that fit: " + String.join(", ", others) + ".");
    }

    /**
     * What is to be said of a calibration beside its numbers, without the dangers of the standard, which
     * {@code CrystalReport} tells.
     *
     * @param fitted the calibration
     * @return sentences
     */
    public static List<String> notices(RingCalibration.Fitted fitted) {
        return fitted.notices().stream()
                .filter(n -> !RingCalibrator.cautions(fitted.standard()).contains(n))
                .toList();
    }

    /**
     * A calibration for images of the same setting.
     *
     * @param fitted what the rings gave; the standard must fit
     * @param name its name
     * @param setting the setting
     * @return the calibration, dated today
     * @throws IllegalArgumentException if the standard does not fit, the name is blank or the voltage is another
     */
    public static Calibration calibration(RingCalibration.Fitted fitted, String name, MicroscopeSetting setting) {
        if (!fitted.standardFits()) {
            throw new IllegalArgumentException("rings: they do not fit "
                    + fitted.standard().name() + ", expected those of the standard; nothing is taken from them");
        }
        return Calibration.of(name, setting, LocalDate.now(), fitted);
    }

    /**
     * The same in use for the image with the rings.
     *
     * @param fitted what the rings gave; the standard must fit
     * @param name its name
     * @param setting the setting
     * @return the calibration, with the centre of the rings
     * @throws IllegalArgumentException as {@link #calibration} does
     */
    public static AppliedCalibration applied(RingCalibration.Fitted fitted, String name, MicroscopeSetting setting) {
        return new AppliedCalibration(
                calibration(fitted, name, setting),
                setting.cameraLength(),
                setting.pixelSize(),
                Optional.of(fitted.camera().centre()));
    }

    /**
     * Draws the rings of the standard over the image: those found, and those that ought to show and do not.
     *
     * @param fitted the calibration
     * @param image the image
     */
    public static void draw(RingCalibration.Fitted fitted, ImagePlus image) {
        Ellipse shape = fitted.shape().ellipse();
        double wavelength = fitted.beam().wavelength();
        List<RingMarks.Ring> drawn = Stream.concat(
                        fitted.rings().stream().map(r -> r.line()), fitted.missing().stream())
                .map(line -> new RingMarks.Ring(
                        RingTable.forms(line), fitted.constant().value() * line.reducedRadius(wavelength)))
                .toList();
        PatternOverlay.saveForUndo(image);
        RingMarks.show(image, shape, drawn);
    }
}
