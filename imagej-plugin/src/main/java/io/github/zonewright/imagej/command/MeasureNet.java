package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.bridge.NetTable;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Ground;
import io.github.zonewright.imagej.session.LengthUnit;
import io.github.zonewright.imagej.session.Measurement;
import io.github.zonewright.imagej.session.Ruler;
import io.github.zonewright.imagej.session.Search;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotNet;
import java.awt.GraphicsEnvironment;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Measures the spots of the current image and the net or row that they stand on, with no crystal in mind. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Measure Net...")
public final class MeasureNet extends PatternCommand {
    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(
            label = "Ground",
            description = "Of a negative on film, with dark spots on bright ground, the inverse is measured",
            choices = {Ground.JUDGED_LABEL, Ground.BRIGHT_LABEL, Ground.DARK_LABEL},
            persist = false)
    private String ground = Ground.JUDGED_LABEL;

    @Parameter(
            label = "Lengths in",
            choices = {LengthUnit.ANGSTROM_LABEL, LengthUnit.NANOMETRE_LABEL})
    private String lengths = LengthUnit.ANGSTROM_LABEL;

    @Parameter(label = "Draw spots and net", persist = false)
    private boolean draw;

    @Parameter(label = "Show table of spots")
    private boolean table = true;

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public MeasureNet() {}

    @Override
    protected void perform() {
        ImagePlus pattern = image != null ? image : WindowManager.getCurrentImage();
        if (pattern == null) {
            throw new IllegalArgumentException("no image is open: open a diffraction pattern first");
        }
        LengthUnit.ofLabel(lengths).remember();
        Sitting before = Sitting.of(pattern);
        Measurement.How how = Search.judged(
                pattern, Ground.ofLabel(ground).said(before.measurement().how()));
        Sitting sitting =
                before.withMeasurement(before.measurement().withHow(how)).withMeasured(Search.measure(pattern, how));
        MeasuredPattern measured = sitting.measured().orElseThrow();
        SpotNet net = sitting.measurement().net().orElseThrow();
        if (net instanceof SpotNet.NoNet none && measured.spots().isEmpty()) {
            throw new IllegalArgumentException(none.reason() + ImagePixels.note(pattern));
        }
        Ruler ruler = Ruler.of(pattern, sitting);
        answer = String.join(" ", MeasurementAnswer.lines(measured, net, ruler)) + ImagePixels.note(pattern);
        IJ.showStatus(answer);
        IJ.log(answer);
        if (draw) {
            PatternOverlay.saveForUndo(pattern);
            sitting.withMeasurement(sitting.measurement().withShown(true)).show(pattern);
        }
        if (table && !GraphicsEnvironment.isHeadless()) {
            NetTable.of(net, measured.spots(), measured::isByHand, ruler.spacings())
                    .show("Net of " + pattern.getTitle());
        }
    }
}
