package io.github.zonewright.imagej.command;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.imagej.session.CrystalChoice;
import io.github.zonewright.microscope.Beam;
import java.io.File;
import java.io.IOException;
import org.scijava.plugin.Parameter;

/**
 * What the commands that begin with one crystal and a voltage have in common. Its parameters come before those of the commands
 * that extend it, here and in SciJava.
 */
public abstract class CrystalCommand extends PatternCommand {
    @Parameter(
            label = "Crystal",
            description = "Name or formula of a crystal of the shelf or of your own",
            style = CrystalChoice.STYLE)
    private String crystal = "Aluminium";

    @Parameter(label = "or CIF file", description = "Takes the place of the crystal above when given", required = false)
    private File cif;

    @Parameter(label = "Accelerating voltage (kV)", min = "0.01", max = "3000")
    private double kilovolts = 200;

    /** For the commands that extend it. */
    protected CrystalCommand() {}

    /** The crystal that was named. */
    final Crystal crystal() throws IOException {
        return CrystalChoice.of(crystal, cif);
    }

    /** The accelerating voltage in kV. */
    final double kilovolts() {
        return kilovolts;
    }

    /** The beam of that voltage. */
    final Beam beam() {
        return Beam.ofKilovolts(kilovolts);
    }
}
