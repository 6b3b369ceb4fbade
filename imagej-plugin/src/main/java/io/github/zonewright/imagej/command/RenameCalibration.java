package io.github.zonewright.imagej.command;

import ij.IJ;
import io.github.zonewright.imagej.session.KeptCalibrations;
import java.io.IOException;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Gives a kept calibration another name. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Rename Calibration...")
public final class RenameCalibration extends PatternCommand {
    @Parameter(
            label = "Calibration",
            description = "Name of a kept calibration",
            style = KeptCalibrations.STYLE,
            persist = false)
    private String calibration = "";

    @Parameter(label = "New name", persist = false)
    private String newname = "";

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public RenameCalibration() {}

    @Override
    protected void perform() throws IOException {
        answer = "The calibration is called \""
                + KeptCalibrations.rename(calibration, newname).name() + "\" now.";
        IJ.showStatus(answer);
    }
}
