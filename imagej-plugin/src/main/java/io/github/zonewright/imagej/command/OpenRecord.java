package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.document.FitDocument;
import io.github.zonewright.imagej.bridge.SolutionTable;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Instrument;
import java.awt.GraphicsEnvironment;
import java.io.File;
import java.io.IOException;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Restores what a record says on its image, or lays its pattern over another. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Open Record...")
public final class OpenRecord extends PatternCommand {
    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(
            label = "Record (CIF)",
            description = "With no image open, its image is looked for beside it",
            style = "open",
            persist = false)
    private File record;

    @Parameter(label = "Show indices")
    private boolean indices;

    @Parameter(label = "Show table of spots")
    private boolean table = true;

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public OpenRecord() {}

    @Override
    protected void perform() throws IOException {
        CifFile file = RecordSession.read(record);
        FitDocument document = FitDocument.read(file);
        ImagePlus current = image != null ? image : WindowManager.getCurrentImage();
        ImagePlus over = current != null ? current : RecordSession.imageBeside(record, document);
        RecordSession session = RecordSession.of(file, over);
        PatternOverlay.saveForUndo(over);
        session.mark(over);
        session.sitting().withLabels(indices || session.sitting().labelled()).show(over);
        Instrument.of(document.placement()).keepWith(over, document.placement().crystal());
        answer = session.sentence();
        if (GraphicsEnvironment.isHeadless()) {
            return;
        }
        if (current == null) {
            over.show();
        }
        IJ.showStatus(answer);
        if (table) {
            session.sitting().chosen().ifPresent(s -> SolutionTable.spots(s).show("Spots of " + over.getTitle()));
        }
    }
}
