package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.measure.ResultsTable;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.imagej.bridge.ReflectionList;
import io.github.zonewright.imagej.session.CrystalChoice;
import io.github.zonewright.microscope.Beam;
import java.awt.GraphicsEnvironment;
import java.io.File;
import java.io.IOException;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Prints what is known of a crystal, its notices in full, and shows its reflections as a table. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Show Crystal...")
public final class ShowCrystal extends PatternCommand {
    @Parameter(
            label = "Crystal",
            description = "Name or formula of a crystal of the shelf or of your own",
            style = CrystalChoice.STYLE)
    private String crystal = "Aluminium";

    @Parameter(label = "or CIF file", description = "Takes the place of the crystal above when given", required = false)
    private File cif;

    @Parameter(label = "Accelerating voltage (kV)", min = "0.01", max = "3000")
    private double kilovolts = 200;

    @Parameter(label = "Smallest d (Å)", min = "0.1", max = "100")
    private double smallestd = 0.8;

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public ShowCrystal() {}

    @Override
    protected void perform() throws IOException {
        Crystal chosen = CrystalChoice.of(crystal, cif);
        ResultsTable reflections = ReflectionList.of(chosen, Beam.ofKilovolts(kilovolts), smallestd);
        answer = chosen.name() + "\n"
                + String.join("\n", CrystalReport.of(chosen).lines());
        answer.lines().forEach(IJ::log);
        if (!GraphicsEnvironment.isHeadless()) {
            reflections.show("Reflections of " + chosen.name());
        }
    }
}
