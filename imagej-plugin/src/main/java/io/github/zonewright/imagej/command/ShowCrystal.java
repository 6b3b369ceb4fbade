package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.measure.ResultsTable;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.imagej.bridge.ReflectionList;
import java.awt.GraphicsEnvironment;
import java.io.IOException;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Prints what is known of a crystal, its notices in full, and shows its reflections as a table. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Show Crystal...")
public final class ShowCrystal extends CrystalCommand {
    @Parameter(label = "Smallest d (Å)", min = "0.1", max = "100")
    private double smallestd = 0.8;

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public ShowCrystal() {}

    @Override
    protected void perform() throws IOException {
        Crystal chosen = crystal();
        ResultsTable reflections = ReflectionList.of(chosen, beam(), smallestd);
        answer = chosen.name() + "\n"
                + String.join("\n", CrystalReport.of(chosen).lines());
        answer.lines().forEach(IJ::log);
        if (!GraphicsEnvironment.isHeadless()) {
            reflections.show("Reflections of " + chosen.name());
        }
    }
}
