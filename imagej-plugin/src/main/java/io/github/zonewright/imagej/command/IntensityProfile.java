package io.github.zonewright.imagej.command;

import ij.ImagePlus;
import ij.WindowManager;
import ij.gui.Plot;
import ij.measure.ResultsTable;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.session.LengthUnit;
import io.github.zonewright.imagej.session.Measuring;
import io.github.zonewright.imagej.session.Ruler;
import io.github.zonewright.imagej.session.Search;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.spots.MeasuredPattern;
import java.awt.GraphicsEnvironment;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Plots the grey value along the row through the centre and a spot, or averaged about the centre. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Intensity Profile...")
public final class IntensityProfile extends PatternCommand {
    /** Along a row. */
    public static final String ROW = "along a row";
    /** About the centre. */
    public static final String CENTRE = "about the centre";

    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(
            label = "Profile",
            choices = {ROW, CENTRE})
    private String profile = ROW;

    @Parameter(label = "Spot x (px)", description = "A spot of the row", persist = false)
    private double x;

    @Parameter(label = "Spot y (px)", description = "A spot of the row", persist = false)
    private double y;

    @Parameter(
            label = "Lengths in",
            choices = {LengthUnit.ANGSTROM_LABEL, LengthUnit.NANOMETRE_LABEL})
    private String lengths = LengthUnit.ANGSTROM_LABEL;

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public IntensityProfile() {}

    @Override
    protected void perform() {
        ImagePlus pattern = image != null ? image : WindowManager.getCurrentImage();
        if (pattern == null) {
            throw new IllegalArgumentException("no image is open: open a diffraction pattern first");
        }
        LengthUnit.ofLabel(lengths).remember();
        Sitting sitting = Measuring.asNeeded(pattern, Sitting.of(pattern));
        MeasuredPattern measured = sitting.measured().orElseThrow();
        Ruler ruler = Ruler.of(pattern, sitting);
        GrayImage pixels = Search.pixels(pattern, sitting.measurement().how());
        Plot plot = profile.equals(ROW)
                ? IntensityPlot.along("Row of " + pattern.getTitle(), pixels, measured, ruler, new PixelPoint(x, y))
                : IntensityPlot.about("Profile of " + pattern.getTitle(), pixels, measured, ruler);
        ResultsTable values = plot.getResultsTable();
        answer = values.size() + " values" + ImagePixels.note(pattern);
        if (!GraphicsEnvironment.isHeadless()) {
            plot.show();
        }
    }
}
