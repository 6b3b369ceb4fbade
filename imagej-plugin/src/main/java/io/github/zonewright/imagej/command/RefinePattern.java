package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.Measuring;
import io.github.zonewright.imagej.session.Refining;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.LockedRefinement.Lock;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.pattern.Placement;
import java.util.EnumSet;
import java.util.Map;
import java.util.Set;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Fits the pattern that lies over an image to the measured spots near it; what is held stays as it is. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Refine Pattern...")
public final class RefinePattern extends PatternCommand {
    /** The parameter that holds each part, by its name in a macro. */
    public static final Map<Lock, String> KEYS = Map.of(
            Lock.ROTATION, "rotation",
            Lock.LEAN, "lean",
            Lock.CENTRE, "centre",
            Lock.CAMERA_CONSTANT, "constant",
            Lock.ELLIPSE, "ellipse");

    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(label = "Hold rotation", persist = false)
    private boolean rotation;

    @Parameter(label = "Hold lean", persist = false)
    private boolean lean;

    @Parameter(label = "Hold centre", persist = false)
    private boolean centre;

    @Parameter(label = "Hold camera constant", persist = false)
    private boolean constant;

    @Parameter(label = "Hold ellipse", persist = false)
    private boolean ellipse;

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    @Parameter(type = ItemIO.OUTPUT, label = "Remarks")
    private String remarks;

    /** For SciJava and the launcher. */
    public RefinePattern() {}

    @Override
    protected void perform() {
        ImagePlus pattern = pattern(image);
        Sitting before = Sitting.of(pattern);
        Placement from = before.placement()
                .orElseThrow(() ->
                        new IllegalArgumentException("no pattern lies over this image: lay a computed pattern first"));
        Sitting sitting = before.measured().isPresent() ? before : Measuring.asNeeded(pattern, before);
        Solution refined = Refining.of(Instrument.of(pattern), from, locks())
                .run(sitting.measured().orElseThrow(), from)
                .orElseThrow(() -> new IllegalArgumentException(Refining.NONE));
        PatternOverlay.saveForUndo(pattern);
        sitting.withRefined(refined).show(pattern);
        answer = Answer.line(refined) + ImagePixels.note(pattern);
        remarks = Answer.lean(refined) + "\n" + String.join("\n", Answer.remarks(refined));
        IJ.showStatus(answer);
    }

    private Set<Lock> locks() {
        Set<Lock> locks = EnumSet.noneOf(Lock.class);
        add(locks, rotation, Lock.ROTATION);
        add(locks, lean, Lock.LEAN);
        add(locks, centre, Lock.CENTRE);
        add(locks, constant, Lock.CAMERA_CONSTANT);
        add(locks, ellipse, Lock.ELLIPSE);
        return locks;
    }

    private static void add(Set<Lock> locks, boolean held, Lock lock) {
        if (held) {
            locks.add(lock);
        }
    }
}
