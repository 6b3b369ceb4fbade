package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.bridge.LeftoverTable;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.CrystalChoice;
import io.github.zonewright.imagej.session.Shown;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.Leftovers;
import io.github.zonewright.indexing.Solution;
import java.awt.GraphicsEnvironment;
import java.io.IOException;
import java.util.List;
import java.util.concurrent.CancellationException;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Searches the spots that the solution shown leaves over for further crystals, and says what each of them may be. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>What Is Left Over...")
public final class SearchLeftovers extends PatternCommand {
    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(
            label = "Further crystals",
            description = "Name of a crystal or of a list of candidates; empty for the crystal of the solution",
            required = false,
            persist = false)
    private String crystals = "";

    @Parameter(label = "Show table of spots left over")
    private boolean table = true;

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public SearchLeftovers() {}

    @Override
    protected void perform() throws IOException {
        ImagePlus pattern = pattern(image);
        Sitting sitting = Sitting.of(pattern);
        Solution shown = Shown.solution(sitting);
        List<Crystal> offered = crystals == null || crystals.isBlank()
                ? List.of(shown.placement().crystal())
                : CrystalChoice.group(crystals, null);
        IJ.resetEscape();
        Leftovers.Result found;
        try {
            found = Leftovers.of(offered).search(Shown.spots(sitting), shown, IJ::escapePressed);
        } catch (CancellationException e) {
            throw new IllegalArgumentException("the search was stopped", e);
        }
        PatternOverlay.saveForUndo(pattern);
        Sitting after = sitting.withFindings(sitting.findings().withGrains(found.grains()));
        after.show(pattern);
        answer = String.join("\n", Answer.leftovers(after)) + ImagePixels.note(pattern);
        IJ.showStatus(found.explanation());
        if (table && !GraphicsEnvironment.isHeadless()) {
            LeftoverTable.of(shown, found.grains()).show("Left over of " + pattern.getTitle());
        }
    }
}
