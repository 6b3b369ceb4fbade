package io.github.zonewright.imagej.command;

import ij.ImagePlus;
import ij.Prefs;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.pattern.Placement;
import java.util.Optional;

/**
 * What a person says of the instrument.
 *
 * @param kilovolts accelerating voltage in kV
 * @param kind how the scale is given
 * @param scale its value in the unit of the kind
 * @param pixelMicrometres pixel size in µm
 * @param binning pixels joined to one along each side
 * @param tolerancePercent how far the scale may be off, in %
 * @param mirrored whether the image is mirrored
 */
public record Instrument(
        double kilovolts,
        ScaleKind kind,
        double scale,
        double pixelMicrometres,
        int binning,
        double tolerancePercent,
        boolean mirrored) {
    private static final String KEY = "zonewright.";
    private static final String INSTRUMENT = "zonewright.instrument";
    private static final String CRYSTAL = "zonewright.crystal";
    private static final Instrument FIRST = new Instrument(200, ScaleKind.PIXELS, 500, 14, 1, 3, false);

    /**
     * The one used last, under the same preferences as the commands' dialogs.
     *
     * @return the instrument
     */
    public static Instrument last() {
        try {
            return new Instrument(
                    Prefs.get(KEY + "kilovolts", FIRST.kilovolts),
                    ScaleKind.ofLabel(Prefs.get(KEY + "scalekind", FIRST.kind.label())),
                    Prefs.get(KEY + "scale", FIRST.scale),
                    Prefs.get(KEY + "pixelsize", FIRST.pixelMicrometres),
                    (int) Prefs.get(KEY + "binning", FIRST.binning),
                    Prefs.get(KEY + "tolerance", FIRST.tolerancePercent),
                    Prefs.get(KEY + "mirrored", false));
        } catch (IllegalArgumentException e) {
            return FIRST;
        }
    }

    /**
     * What was said for an image before, or that of the pattern that lies on it.
     *
     * @param image the image
     * @return the instrument, or empty for an image new to us
     */
    public static Optional<Instrument> of(ImagePlus image) {
        return Optional.ofNullable((Instrument) image.getProperty(INSTRUMENT))
                .or(() -> Sitting.of(image).placement().map(Instrument::of));
    }

    /**
     * The instrument of a pattern, with what the pattern does not tell as it was used last.
     *
     * @param placement the pattern
     * @return the instrument, its scale in px·Å
     */
    public static Instrument of(Placement placement) {
        Instrument last = last();
        return new Instrument(
                placement.beam().kilovolts(),
                ScaleKind.PIXELS,
                placement.camera().constant(),
                last.pixelMicrometres,
                last.binning,
                last.tolerancePercent,
                placement.camera().mirrored());
    }

    /**
     * The crystal that was named for an image before, or that of the pattern that lies on it.
     *
     * @param image the image
     * @return the crystal, or empty for an image new to us
     */
    public static Optional<Crystal> crystalOf(ImagePlus image) {
        return Optional.ofNullable((Crystal) image.getProperty(CRYSTAL))
                .or(() -> Sitting.of(image).placement().map(Placement::crystal));
    }

    /**
     * Keeps with an image what was said for it; nothing of it is saved in the image's file.
     *
     * @param image the image
     * @param crystal the crystal named for it
     */
    public void keepWith(ImagePlus image, Crystal crystal) {
        image.setProperty(INSTRUMENT, this);
        image.setProperty(CRYSTAL, crystal);
    }

    /** Makes it the one used last. */
    public void remember() {
        Prefs.set(KEY + "kilovolts", kilovolts);
        Prefs.set(KEY + "scalekind", kind.label());
        Prefs.set(KEY + "scale", scale);
        Prefs.set(KEY + "pixelsize", pixelMicrometres);
        Prefs.set(KEY + "binning", binning);
        Prefs.set(KEY + "tolerance", tolerancePercent);
        Prefs.set(KEY + "mirrored", mirrored);
    }

    /**
     * The beam.
     *
     * @return the beam of the voltage
     */
    public Beam beam() {
        return Beam.ofKilovolts(kilovolts);
    }

    /**
     * The camera constant.
     *
     * @param image read for its calibration, if the scale is taken from it; may be null otherwise
     * @return the camera constant in px·Å
     * @throws IllegalArgumentException if it does not follow from the values; the message says why
     */
    public double cameraConstant(ImagePlus image) {
        return kind.cameraConstant(scale, pixelMicrometres, binning, beam(), image);
    }

    /**
     * The same with the scale given in another way.
     *
     * @param other the way
     * @return the changed instrument
     */
    public Instrument withKind(ScaleKind other) {
        return new Instrument(kilovolts, other, scale, pixelMicrometres, binning, tolerancePercent, mirrored);
    }
}
