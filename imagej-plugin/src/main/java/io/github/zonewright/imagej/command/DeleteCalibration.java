package io.github.zonewright.imagej.command;

import ij.IJ;
import io.github.zonewright.imagej.session.KeptCalibrations;
import java.io.IOException;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Deletes the file of a kept calibration. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Delete Calibration...")
public final class DeleteCalibration extends PatternCommand {
    @Parameter(
            label = "Calibration",
            description = "Name of a kept calibration; its file is deleted",
            style = KeptCalibrations.STYLE,
            persist = false)
    private String calibration = "";

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public DeleteCalibration() {}

    @Override
    protected void perform() throws IOException {
        answer = KeptCalibrations.delete(calibration);
        IJ.showStatus(answer);
    }
}
