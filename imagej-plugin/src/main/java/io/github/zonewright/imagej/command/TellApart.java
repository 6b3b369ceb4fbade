package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.overlay.TiltPicture;
import io.github.zonewright.imagej.session.Comparison;
import io.github.zonewright.imagej.session.Shown;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.Discrimination;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Says what tells two solutions of an image apart: why they are alike, which spot to look for, and how to tilt. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>What Tells Apart...")
public final class TellApart extends PatternCommand {
    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(
            label = "Solution",
            description = "Its place in the list of solutions, 1 for the first",
            min = "1",
            max = "999",
            persist = false)
    private int solution = 1;

    @Parameter(
            label = "From solution",
            description = "Another one's place, or half a turn; empty for the first that it is tied with",
            required = false,
            persist = false)
    private String other = "";

    @Parameter(label = "Draw patterns after the tilt")
    private boolean draw;

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    @Parameter(type = ItemIO.OUTPUT)
    private ImagePlus patterns;

    /** For SciJava and the launcher. */
    public TellApart() {}

    @Override
    protected void perform() {
        ImagePlus pattern = pattern(image);
        Sitting sitting = Sitting.of(pattern);
        Comparison pair = Comparison.named(sitting, solution, other);
        Discrimination found = pair.discrimination(Shown.spots(sitting));
        PatternOverlay.saveForUndo(pattern);
        Sitting chosen =
                sitting.chosen().filter(pair.first()::equals).isPresent() ? sitting : sitting.withChosen(pair.first());
        chosen.withFindings(chosen.findings().withApart(pair.told(found))).show(pattern);
        answer = String.join("\n", found.sentences());
        IJ.showStatus(found.sentences().get(0));
        if (draw && found.tilt().isPresent()) {
            patterns = new ImagePlus(
                    "Patterns after the tilt",
                    TiltPicture.of(
                            found.tilt().get(),
                            pair.first().placement().camera().mirrored()));
            if (!java.awt.GraphicsEnvironment.isHeadless()) {
                patterns.show();
            }
        }
    }
}
