package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.bridge.RowTable;
import io.github.zonewright.imagej.bridge.SolutionTable;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.CandidateSearch;
import io.github.zonewright.imagej.session.CrystalChoice;
import io.github.zonewright.imagej.session.Ground;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.Keep;
import io.github.zonewright.imagej.session.Measurement;
import io.github.zonewright.imagej.session.Measuring;
import io.github.zonewright.imagej.session.ScaleKind;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.imagej.session.ZoneChoice;
import io.github.zonewright.indexing.SearchResult;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.spots.MeasuredPattern;
import java.awt.GraphicsEnvironment;
import java.io.File;
import java.io.IOException;
import java.util.List;
import java.util.concurrent.CancellationException;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Measures the spots of the current image, finds the zone axis and rotation of a crystal, and draws the answer. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Find Zone Axis...")
public final class FindZoneAxis extends PatternCommand {
    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(
            label = "Crystal",
            description = "Name or formula of a crystal of the shelf or of your own, or a list of candidates",
            style = CrystalChoice.GROUP_STYLE)
    private String crystal = "Aluminium";

    @Parameter(label = "or CIF file", description = "Takes the place of the crystal above when given", required = false)
    private File cif;

    @Parameter(label = "Accelerating voltage (kV)", min = "0.01", max = "3000")
    private double kilovolts = 200;

    @Parameter(
            label = "Scale given as",
            choices = {
                ScaleKind.PIXELS_LABEL,
                ScaleKind.MILLIMETRES_LABEL,
                ScaleKind.LENGTH_LABEL,
                ScaleKind.IMAGE_LABEL,
                ScaleKind.CALIBRATION_LABEL
            })
    private String scalekind = ScaleKind.PIXELS_LABEL;

    @Parameter(label = "Scale (px·Å, mm·Å or mm)", min = "0.001", max = "1e6")
    private double scale = 500;

    @Parameter(
            label = "Pixel size (µm)",
            description = "For the scale in mm·Å and the camera length",
            min = "0.001",
            max = "10000")
    private double pixelsize = 14;

    @Parameter(
            label = "Binning",
            description = "For the camera length: pixels joined to one along each side",
            min = "1",
            max = "64")
    private int binning = 1;

    @Parameter(label = "Scale is good to (%)", min = "0.1", max = "20")
    private double tolerance = 3;

    @Parameter(label = "Image is mirrored")
    private boolean mirrored;

    @Parameter(
            label = "Ground",
            description = "Of a negative on film, with dark spots on bright ground, the inverse is measured",
            choices = {Ground.JUDGED_LABEL, Ground.BRIGHT_LABEL, Ground.DARK_LABEL},
            persist = false)
    private String ground = Ground.JUDGED_LABEL;

    @Parameter(
            label = "Zone axes searched",
            description = "any, one as 1 1 0, or a family as <1 1 0>",
            required = false,
            persist = false)
    private String zones = ZoneChoice.ANY_LABEL;

    @Parameter(label = "Show indices")
    private boolean indices;

    @Parameter(label = "Show table of spots")
    private boolean table = true;

    @Parameter(label = "Save record (CIF) as", style = "save", required = false, persist = false)
    private File record;

    @Parameter(label = "Save spots (CSV) as", style = "save", required = false, persist = false)
    private File spots;

    @Parameter(label = "Save report (HTML) as", style = "save", required = false, persist = false)
    private File report;

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    @Parameter(type = ItemIO.OUTPUT, label = "Remarks")
    private String remarks;

    /** For SciJava and the launcher. */
    public FindZoneAxis() {}

    @Override
    protected void perform() throws IOException {
        ImagePlus pattern = image != null ? image : WindowManager.getCurrentImage();
        if (pattern == null) {
            throw new IllegalArgumentException("no image is open: open a diffraction pattern first");
        }
        List<Crystal> chosen = CrystalChoice.group(crystal, cif);
        Instrument said = Instrument.told(
                new Instrument(kilovolts, ScaleKind.PIXELS, scale, pixelsize, binning, tolerance, mirrored),
                ScaleKind.ofLabel(scalekind),
                pattern);
        CandidateSearch search =
                new CandidateSearch(chosen, said.beam(), said.knownCamera(pattern), ZoneChoice.parse(zones));
        Sitting before = Sitting.of(pattern);
        Measurement.How how = Ground.ofLabel(ground).said(before.measurement().how());
        Sitting sitting = Measuring.unlessEdited(
                pattern, before.withMeasurement(before.measurement().withHow(how)));
        MeasuredPattern measured = sitting.measured().orElseThrow();
        IJ.resetEscape();
        SearchResult result;
        try {
            result = search.run(measured, IJ::showProgress, IJ::escapePressed);
        } catch (CancellationException e) {
            throw new IllegalArgumentException("the search was stopped", e);
        } finally {
            IJ.showProgress(1);
        }
        if (result.row().isPresent()) {
            answer = result.explanation() + ImagePixels.note(pattern);
            IJ.showStatus(answer);
            if (table && !GraphicsEnvironment.isHeadless()) {
                RowTable.of(result.row().get()).show("Row of " + pattern.getTitle());
            }
            PatternOverlay.saveForUndo(pattern);
            sitting.withResult(result).show(pattern);
            return;
        }
        Solution best = result.best()
                .orElseThrow(() -> new IllegalArgumentException(result.explanation() + ImagePixels.note(pattern)));
        PatternOverlay.saveForUndo(pattern);
        sitting.withResult(result).withLabels(indices).show(pattern);
        said.keepWith(pattern, best.placement().crystal());
        remarks = Answer.lean(best) + "\n" + String.join("\n", Answer.remarks(result.solutions()));
        answer = Answer.line(best) + ImagePixels.note(pattern);
        IJ.showStatus(answer);
        if (table && !GraphicsEnvironment.isHeadless()) {
            SolutionTable.spots(best).show("Spots of " + pattern.getTitle());
        }
        Keep.record(best, pattern, record);
        Keep.spots(best, spots);
        Keep.report(pattern, report);
    }
}
