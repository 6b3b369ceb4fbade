package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import ij.ImageStack;
import ij.WindowManager;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.document.ZoneChart;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.overlay.DoubledMarks;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Keep;
import io.github.zonewright.imagej.session.ReferenceReflection;
import io.github.zonewright.imagej.session.ScaleKind;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.PatternSimulator;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.pattern.ZonePattern;
import java.awt.GraphicsEnvironment;
import java.io.File;
import java.io.IOException;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Computes the lowest zones of a crystal at the present scale: a sheet to print, and a stack with a slice for each zone. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Zone Chart...")
public final class DrawZoneChart extends CrystalCommand {
    private static final String PRESENT = "pattern on the image";

    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(label = "Number of zones", min = "1", max = "60")
    private int zones = 9;

    @Parameter(
            label = "Scale given as",
            choices = {
                ScaleKind.PIXELS_LABEL,
                ScaleKind.MILLIMETRES_LABEL,
                ScaleKind.LENGTH_LABEL,
                ScaleKind.IMAGE_LABEL,
                PRESENT
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

    @Parameter(label = "Side of a pattern (px)", min = "16", max = "4096")
    private int patternside = 512;

    @Parameter(
            label = "Scale on paper (mm·Å)",
            description = "0: as large as the image on a screen of 96 px to the inch at 100 %",
            min = "0",
            max = "10000")
    private double paper = 20;

    @Parameter(label = "Save sheet (HTML) as", style = "save", required = false, persist = false)
    private File sheet;

    @Parameter(type = ItemIO.OUTPUT)
    private ImagePlus chart;

    /** For SciJava and the launcher. */
    public DrawZoneChart() {}

    @Override
    protected void perform() throws IOException {
        Crystal chosen = crystal();
        ImagePlus scaled = image != null ? image : WindowManager.getCurrentImage();
        double constant = scalekind.equals(PRESENT)
                ? present(scaled)
                : ScaleKind.ofLabel(scalekind).cameraConstant(scale, pixelsize, binning, beam(), scaled);
        ZoneChart drawn = ZoneChart.of(chosen, beam(), zones, paper == 0 ? ZoneChart.scaleOnScreen(constant) : paper);
        Keep.chart(drawn, sheet);
        chart = stack(drawn, constant);
        if (!GraphicsEnvironment.isHeadless()) {
            chart.show();
        }
    }

    /**
     * Shows the stack of the lowest zones with this command's own number and size of patterns.
     *
     * @param crystal the crystal
     * @param beam the beam
     * @param constant camera constant in px·Å
     */
    public static void show(Crystal crystal, Beam beam, double constant) {
        DrawZoneChart command = new DrawZoneChart();
        command.stack(ZoneChart.of(crystal, beam, command.zones, ZoneChart.scaleOnScreen(constant)), constant)
                .show();
    }

    private static double present(ImagePlus image) {
        return Optional.ofNullable(image)
                .flatMap(i -> Sitting.of(i).placement())
                .orElseThrow(() -> new IllegalArgumentException("scale: \"" + PRESENT + "\", but no pattern lies on "
                        + (image == null ? "an image, since none is open" : image.getTitle())
                        + "; find its zone axis first, or give the scale"))
                .camera()
                .constant();
    }

    /** A slice for each zone, each with its pattern laid over it, as if it had been laid there by hand. */
    private ImagePlus stack(ZoneChart drawn, double constant) {
        Camera camera = Camera.of(new PixelPoint(patternside / 2.0, patternside / 2.0), constant, false);
        List<Placement> placements = new ArrayList<>();
        List<List<PixelPoint>> doubled = new ArrayList<>();
        for (Uvw zone : drawn.zones()) {
            double wavelength = drawn.beam().wavelength();
            double largestG =
                    camera.toReciprocal(new PixelPoint(0, 0), wavelength).norm();
            Optional<ZonePattern> pattern = ZonePattern.of(drawn.crystal(), drawn.beam(), zone, largestG);
            ZoneSetting setting = pattern.map(ZonePattern::setting)
                    .orElseGet(() -> ZoneSetting.onZone(zone, ReferenceReflection.of(drawn.crystal(), zone), 0));
            placements.add(new Placement(drawn.crystal(), drawn.beam(), setting, camera));
            doubled.add(pattern.stream()
                    .flatMap(p -> p.doubled().stream())
                    .map(g -> camera.toPixel(g, wavelength))
                    .filter(this::isInside)
                    .toList());
        }
        ImagePlus stack = slices(placements);
        stack.setTitle("Zones of " + drawn.crystal().name());
        for (int slice = 1; slice <= placements.size(); slice++) {
            stack.setSliceWithoutUpdate(slice);
            Sitting.EMPTY
                    .withPlacement(placements.get(slice - 1))
                    .withLabels(true)
                    .show(stack);
            DoubledMarks.add(stack, PatternOverlay.slice(stack), doubled.get(slice - 1));
        }
        stack.setSlice(1);
        return stack;
    }

    private ImagePlus slices(List<Placement> placements) {
        ImageStack slices = new ImageStack(patternside, patternside);
        ImagePlus stack = new ImagePlus();
        for (Placement placement : placements) {
            ImagePlus one = PatternImage.of(placement, PatternSimulator.DEFAULT_THICKNESS, patternside);
            slices.addSlice("[" + placement.setting().zone() + "]", one.getProcessor());
            stack.setCalibration(one.getLocalCalibration());
            IJ.showProgress(slices.size(), placements.size());
        }
        stack.setStack(slices);
        return stack;
    }

    private boolean isInside(PixelPoint p) {
        return p.x() >= 0 && p.y() >= 0 && p.x() < patternside && p.y() < patternside;
    }
}
