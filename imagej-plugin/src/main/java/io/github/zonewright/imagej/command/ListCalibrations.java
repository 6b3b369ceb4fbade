package io.github.zonewright.imagej.command;

import ij.IJ;
import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.document.CalibrationFolder;
import io.github.zonewright.imagej.bridge.CalibrationTable;
import io.github.zonewright.imagej.session.AppliedCalibration;
import io.github.zonewright.imagej.session.KeptCalibrations;
import io.github.zonewright.imagej.session.UserFolder;
import java.awt.GraphicsEnvironment;
import java.io.IOException;
import java.util.ArrayList;
import java.util.List;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Lists the kept calibrations in a table, and says which files of the folder can't be read. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>List Calibrations")
public final class ListCalibrations extends PatternCommand {
    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public ListCalibrations() {}

    @Override
    protected void perform() throws IOException {
        CalibrationFolder.Contents contents = KeptCalibrations.list();
        List<Calibration> kept = contents.calibrations().stream()
                .map(CalibrationFolder.Kept::calibration)
                .toList();
        List<String> said = new ArrayList<>();
        kept.forEach(c -> said.add(AppliedCalibration.of(c).line(c.setting().binning())));
        contents.unreadable().forEach(u -> said.add(u.file() + ": " + u.reason()));
        if (said.isEmpty()) {
            said.add("No calibration is kept in " + UserFolder.calibrations().path() + ".");
        }
        said.forEach(IJ::log);
        answer = String.join("\n", said);
        if (!kept.isEmpty() && !GraphicsEnvironment.isHeadless()) {
            CalibrationTable.of(kept).show("Calibrations");
        }
    }
}
