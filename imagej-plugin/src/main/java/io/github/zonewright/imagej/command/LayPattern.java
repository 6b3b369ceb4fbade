package io.github.zonewright.imagej.command;

import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Choice;
import io.github.zonewright.imagej.session.CrystalChoice;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.ReferenceReflection;
import io.github.zonewright.imagej.session.ScaleKind;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import java.io.File;
import java.io.IOException;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Computes a spot pattern and lays it over the current image, or over a new one on which its spots are drawn. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Lay Computed Pattern...")
public final class LayPattern extends PatternCommand {
    private static final String CURRENT = "current image";
    private static final String NEW = "new image";
    private static final double ANGSTROMS_PER_NANOMETRE = 10;
    private static final double DEFAULT_TOLERANCE = 3;

    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(
            label = "Lay it over",
            choices = {CURRENT, NEW},
            persist = false)
    private String target = CURRENT;

    @Parameter(
            label = "Crystal",
            description = "Name or formula of a crystal of the shelf or of your own",
            style = CrystalChoice.STYLE)
    private String crystal = "Aluminium";

    @Parameter(label = "or CIF file", description = "Takes the place of the crystal above when given", required = false)
    private File cif;

    @Parameter(label = "Accelerating voltage (kV)", min = "0.01", max = "3000")
    private double kilovolts = 200;

    @Parameter(
            label = "Scale given as",
            choices = {
                ScaleKind.PIXELS_LABEL,
                ScaleKind.MILLIMETRES_LABEL,
                ScaleKind.LENGTH_LABEL,
                ScaleKind.IMAGE_LABEL,
                ScaleKind.CALIBRATION_LABEL
            })
    private String scalekind = ScaleKind.PIXELS_LABEL;

    @Parameter(label = "Scale (px·Å, mm·Å or mm)", min = "0.001", max = "1e6")
    private double scale = 500;

    @Parameter(
            label = "Pixel size (µm)",
            description = "For the scale in mm·Å and the camera length",
            min = "0.001",
            max = "10000")
    private double pixelsize = 14;

    @Parameter(
            label = "Binning",
            description = "For the camera length: pixels joined to one along each side",
            min = "1",
            max = "64")
    private int binning = 1;

    @Parameter(label = "Zone axis u v w", persist = false)
    private String zone = "0 0 1";

    @Parameter(
            label = "Reference reflection h k l",
            description = "The rotation is counted from it; empty: the shortest of the zone",
            required = false,
            persist = false)
    private String reference = "";

    @Parameter(
            label = "Rotation (°)",
            description = "Azimuth of the reference reflection, counter-clockwise from the right",
            persist = false)
    private double rotation;

    @Parameter(label = "Lean to the right (°)", persist = false)
    private double leanx;

    @Parameter(label = "Lean upwards (°)", persist = false)
    private double leany;

    @Parameter(
            label = "Centre x, y (px)",
            description = "Empty: the middle of the image",
            required = false,
            persist = false)
    private String centre = "";

    @Parameter(label = "Image is mirrored")
    private boolean mirrored;

    @Parameter(label = "Foil thickness (nm)", min = "0.1", max = "10000")
    private double thickness = 50;

    @Parameter(label = "Show indices")
    private boolean indices;

    @Parameter(label = "Side of a new image (px)", min = "16", max = "8192", persist = false)
    private int side = 512;

    @Parameter(type = ItemIO.OUTPUT)
    private ImagePlus pattern;

    /** For SciJava and the launcher. */
    public LayPattern() {}

    @Override
    protected void perform() throws IOException {
        Crystal chosen = CrystalChoice.of(crystal, cif);
        boolean fresh = Choice.pick("Lay it over", target, java.util.List.of(CURRENT, NEW))
                .equals(NEW);
        ImagePlus over = fresh ? null : image != null ? image : WindowManager.getCurrentImage();
        if (!fresh && over == null) {
            throw new IllegalArgumentException(
                    "no image is open: open a diffraction pattern first, or choose to lay it over a new image");
        }
        Instrument said = Instrument.told(
                new Instrument(kilovolts, ScaleKind.PIXELS, scale, pixelsize, binning, DEFAULT_TOLERANCE, mirrored),
                ScaleKind.ofLabel(scalekind),
                over);
        Uvw axis = Uvw.parse(zone).reduced();
        Hkl from = reference.isBlank() ? ReferenceReflection.of(chosen, axis) : Hkl.parse(reference);
        ZoneSetting setting =
                new ZoneSetting(axis, from, Math.toRadians(rotation), Math.toRadians(leanx), Math.toRadians(leany));
        PixelPoint middle = over == null ? middle(side, side) : middle(over.getWidth(), over.getHeight());
        PixelPoint at = centre.isBlank() ? middle : point(centre);
        Placement placement = new Placement(chosen, said.beam(), setting, said.camera(at, over));
        double angstroms = thickness * ANGSTROMS_PER_NANOMETRE;
        if (over == null) {
            over = PatternImage.of(placement, angstroms, side);
            pattern = over;
        } else {
            PatternOverlay.saveForUndo(over);
        }
        Sitting.of(over)
                .withPlacement(placement)
                .withThickness(angstroms)
                .withLabels(indices)
                .show(over);
        if (fresh && !java.awt.GraphicsEnvironment.isHeadless()) {
            over.show();
        }
    }

    private static PixelPoint middle(int width, int height) {
        return new PixelPoint(width / 2.0, height / 2.0);
    }

    private static PixelPoint point(String text) {
        String[] parts = text.strip().split("[,;\\s]+");
        try {
            if (parts.length == 2) {
                return new PixelPoint(Double.parseDouble(parts[0]), Double.parseDouble(parts[1]));
            }
        } catch (NumberFormatException e) {
            throw wrongCentre(text);
        }
        throw wrongCentre(text);
    }

    private static IllegalArgumentException wrongCentre(String text) {
        return new IllegalArgumentException("centre: \"" + text + "\", expected two numbers in px such as 256.5, 250");
    }
}
