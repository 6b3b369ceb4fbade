package io.github.zonewright.imagej.command;

import ij.ImagePlus;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.imagej.bridge.ImageFrames;
import io.github.zonewright.imagej.session.CandidateSearch;
import io.github.zonewright.imagej.session.CrystalChoice;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.ScaleKind;
import io.github.zonewright.imagej.session.ZoneChoice;
import io.github.zonewright.indexing.PatternSeries;
import java.io.File;
import java.io.IOException;
import java.util.List;
import org.scijava.ItemIO;
import org.scijava.plugin.Parameter;

/** What the commands for many patterns in one go have in common: what is known of crystal and camera, and what is kept. */
public abstract class SeriesCommand extends PatternCommand {
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
            label = "Follow from frame to frame",
            description =
                    "For a series of one crystal by tilt or time: refines each answer on the next frame, which is faster,"
                            + " and searches only where that fails")
    private boolean follow;

    @Parameter(label = "Show table of frames", persist = false)
    private boolean table = true;

    @Parameter(
            label = "Save records (CIF) in folder",
            description = "One record for each frame whose verdict is settled or tied",
            style = CommandParameter.FOLDER_STYLE,
            required = false,
            persist = false)
    private File records;

    @Parameter(label = "Save table (CSV) as", style = "save", required = false, persist = false)
    private File rows;

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For the commands that extend it. */
    protected SeriesCommand() {}

    /** The crystals that were named. */
    final List<Crystal> crystals() throws IOException {
        return CrystalChoice.group(crystal, cif);
    }

    /** What was said of the instrument; the image, or null for a folder, may be needed for its calibration. */
    final Instrument instrument(ImagePlus image) {
        return Instrument.told(
                new Instrument(kilovolts, ScaleKind.PIXELS, scale, pixelsize, binning, tolerance, mirrored),
                ScaleKind.ofLabel(scalekind),
                image);
    }

    /** The series as it was told. */
    final PatternSeries series(List<Crystal> crystals, Instrument said, ImagePlus image) {
        CandidateSearch search = new CandidateSearch(crystals, said.beam(), said.knownCamera(image), ZoneChoice.ANY);
        return PatternSeries.of(search::run).withFollowing(follow);
    }

    /** The run as it was told. */
    final SeriesRun ready(ImageFrames frames, String name) throws IOException {
        SeriesRun run = new SeriesRun(frames, name, table);
        run.recordInto(records);
        return run;
    }

    /** Keeps what came of a run. */
    final void end(SeriesRun run, String sentence) throws IOException {
        answer = sentence;
        run.save(rows);
    }
}
