package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import ij.Prefs;
import io.github.zonewright.imagej.command.ScaleKind;
import io.github.zonewright.microscope.Beam;

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
record Instrument(
        double kilovolts,
        ScaleKind kind,
        double scale,
        double pixelMicrometres,
        int binning,
        double tolerancePercent,
        boolean mirrored) {
    private static final String KEY = "zonewright.";
    private static final Instrument FIRST = new Instrument(200, ScaleKind.PIXELS, 500, 14, 1, 3, false);

    /** The one used last, under the same preferences as the commands' dialogs. */
    static Instrument last() {
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

    void remember() {
        Prefs.set(KEY + "kilovolts", kilovolts);
        Prefs.set(KEY + "scalekind", kind.label());
        Prefs.set(KEY + "scale", scale);
        Prefs.set(KEY + "pixelsize", pixelMicrometres);
        Prefs.set(KEY + "binning", binning);
        Prefs.set(KEY + "tolerance", tolerancePercent);
        Prefs.set(KEY + "mirrored", mirrored);
    }

    Beam beam() {
        return Beam.ofKilovolts(kilovolts);
    }

    /** The camera constant in px·Å; throws an IllegalArgumentException that says what is wrong. */
    double cameraConstant(ImagePlus image) {
        return kind.cameraConstant(scale, pixelMicrometres, binning, beam(), image);
    }

    Instrument withKind(ScaleKind other) {
        return new Instrument(kilovolts, other, scale, pixelMicrometres, binning, tolerancePercent, mirrored);
    }
}
