package io.github.zonewright.imagej.command;

import ij.IJ;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.KeptCrystal;
import io.github.zonewright.imagej.session.CrystalChoice;
import io.github.zonewright.imagej.session.UserFolder;
import java.io.File;
import java.io.IOException;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Keeps a crystal in the user's folder, under a name by which every command then finds it. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Keep Crystal...")
public final class KeepCrystal extends PatternCommand {
    @Parameter(
            label = "Crystal",
            description = "Name or formula of a crystal of the shelf or of your own",
            style = CrystalChoice.STYLE)
    private String crystal = "Aluminium";

    @Parameter(
            label = "or CIF file",
            description = "Takes the place of the crystal above when given",
            required = false,
            persist = false)
    private File cif;

    @Parameter(label = "Keep as", description = "Its name on your shelf; blank for the name it has", required = false)
    private String keepas = "";

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public KeepCrystal() {}

    @Override
    protected void perform() throws IOException {
        Crystal chosen = CrystalChoice.of(crystal, cif);
        String name = keepas == null || keepas.isBlank() ? chosen.name() : keepas;
        KeptCrystal kept = UserFolder.keep(chosen, name);
        answer = kept.crystal().name() + " is kept in " + kept.file();
        IJ.showStatus(answer);
    }
}
