package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.bridge.NetTable;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotNet;
import io.github.zonewright.spots.SpotNetFinder;
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
        MeasuredPattern measured = Search.measure(pattern);
        SpotNet net = SpotNetFinder.find(measured);
        if (net instanceof SpotNet.NoNet none && measured.spots().isEmpty()) {
            throw new IllegalArgumentException(none.reason() + ImagePixels.note(pattern));
        }
        answer = NetAnswer.line(net) + ImagePixels.note(pattern);
        IJ.showStatus(answer);
        IJ.log(answer);
        if (table && !GraphicsEnvironment.isHeadless()) {
            NetTable.of(net, measured.spots()).show("Net of " + pattern.getTitle());
        }
    }
}
