package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.PatternDrag;
import io.github.zonewright.imagej.session.PatternMove;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.pattern.Placement;
import java.util.Optional;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Turns, stretches, tilts and shifts the pattern that lies over the current image, or takes it back to its fit. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Move Pattern...")
public final class MovePattern extends PatternCommand {
    private static final double PERCENT = 100;

    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(label = "Back to the fit", description = "First undoes what was done by hand since", persist = false)
    private boolean back;

    @Parameter(
            label = "Solution",
            description = "First lays this one of the solutions of the search, by its place from 1; 0 for none",
            min = "0",
            max = "1000",
            persist = false)
    private int solution;

    @Parameter(
            label = "Turn upwards h k l",
            description = "The reflection that is to point up; empty for none",
            required = false,
            persist = false)
    private String upwards = "";

    @Parameter(
            label = "Turn by (°)",
            description = "Counter-clockwise, seen from the electron source",
            min = "-360",
            max = "360",
            persist = false)
    private double turn;

    @Parameter(
            label = "Stretch by (%)",
            description = "What is added to the camera constant",
            min = "-90",
            max = "1000",
            persist = false)
    private double stretch;

    @Parameter(label = "Lean right by (°)", min = "-45", max = "45", persist = false)
    private double leanright;

    @Parameter(label = "Lean up by (°)", min = "-45", max = "45", persist = false)
    private double leanup;

    @Parameter(label = "Shift right by (px)", min = "-1e5", max = "1e5", persist = false)
    private double shiftright;

    @Parameter(label = "Shift down by (px)", min = "-1e5", max = "1e5", persist = false)
    private double shiftdown;

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public MovePattern() {}

    @Override
    protected void perform() {
        ImagePlus over = image != null ? image : WindowManager.getCurrentImage();
        if (over == null) {
            throw new IllegalArgumentException("no image is open: open a diffraction pattern first");
        }
        Sitting before = solution == 0 ? Sitting.of(over) : laid(Sitting.of(over));
        if (before.placement().isEmpty()) {
            throw new IllegalArgumentException("no pattern lies on this image: find its zone axis, or lay one over it");
        }
        Sitting now = back ? fitted(before) : before;
        Placement from = now.placement().orElseThrow();
        Placement turned = upwards.isBlank()
                ? from
                : PatternMove.upwards(from, Hkl.parse(upwards)).on(from);
        Placement moved = new PatternMove(
                        turn, 1 + stretch / PERCENT, new Vector2(leanright, leanup), new Vector2(shiftright, shiftdown))
                .on(turned);
        PatternOverlay.saveForUndo(over);
        (moved.equals(from) ? now : now.withPlacement(moved)).show(over);
        answer = PatternDrag.TURN.says(moved) + ", " + PatternDrag.TILT.says(moved) + ", "
                + PatternDrag.SHIFT.says(moved) + ", " + PatternDrag.STRETCH.says(moved);
        IJ.showStatus(answer);
    }

    private Sitting laid(Sitting sitting) {
        int count = sitting.solutions().size();
        if (solution < 1 || solution > count) {
            throw new IllegalArgumentException("Solution: " + solution + ", expected one of the " + count
                    + " solutions of this image, counted from 1");
        }
        return sitting.withChosen(sitting.solutions().get(solution - 1));
    }

    private static Sitting fitted(Sitting sitting) {
        Optional<Solution> fit = sitting.fit();
        return fit.map(sitting::withChosen)
                .orElseThrow(() -> new IllegalArgumentException(
                        "there is no fit of this pattern to go back to: find its orientation, or refine it"));
    }
}
