package io.github.zonewright.imagej.command;

import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.imagej.bridge.SolutionTable;
import io.github.zonewright.imagej.session.Keep;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.Solution;
import java.awt.GraphicsEnvironment;
import java.io.File;
import java.io.IOException;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/**
 * Keeps the chosen solution of the current image: as record, table, page, or several of them; of a pattern laid by hand, record
 * and page.
 */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Keep Solution...")
public final class KeepSolution extends PatternCommand {
    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(label = "Show table of spots", persist = false)
    private boolean table;

    @Parameter(label = "Save record (CIF) as", style = "save", required = false, persist = false)
    private File record;

    @Parameter(label = "Save spots (CSV) as", style = "save", required = false, persist = false)
    private File spots;

    @Parameter(label = "Save report (HTML) as", style = "save", required = false, persist = false)
    private File report;

    /** For SciJava and the launcher. */
    public KeepSolution() {}

    @Override
    protected void perform() throws IOException {
        ImagePlus pattern = image != null ? image : WindowManager.getCurrentImage();
        if (pattern == null) {
            throw new IllegalArgumentException("no image is open: open a diffraction pattern first");
        }
        Sitting now = Sitting.of(pattern);
        if (now.placement().isEmpty()) {
            throw new IllegalArgumentException(
                    "this image has no solution to keep and no pattern laid over it: call Find"
                            + " Zone Axis... or Lay Computed Pattern... first");
        }
        boolean listed = table || spots != null && !spots.getPath().isBlank();
        if (listed && now.chosen().isEmpty()) {
            throw new IllegalArgumentException(
                    "this image has no solution whose spots could be listed, its pattern was laid by"
                            + " hand: call Find Zone Axis... or Refine Pattern... first");
        }
        if (now.chosen().isPresent()) {
            Solution solution = now.chosen().get();
            if (table && !GraphicsEnvironment.isHeadless()) {
                SolutionTable.spots(solution).show("Spots of " + pattern.getTitle());
            }
            Keep.spots(solution, spots);
        }
        Keep.record(pattern, record);
        Keep.report(pattern, report);
    }
}
