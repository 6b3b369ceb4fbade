package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.imagej.session.AppliedCalibration;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.KeptCalibrations;
import io.github.zonewright.imagej.session.Sitting;
import java.io.IOException;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/**
 * Takes camera constant, tolerance, ellipse, mirror and image rotation for the current image from a kept calibration. The
 * image's own calibration stays as it is.
 */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Apply Calibration...")
public final class ApplyCalibration extends PatternCommand {
    private static final String LENGTH = "Nominal camera length (mm)";
    private static final String PIXEL = "Pixel size (µm)";

    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(label = "Calibration", description = "Name of a kept calibration", style = KeptCalibrations.STYLE)
    private String calibration = "";

    @Parameter(
            label = "Accelerating voltage (kV)",
            description = "Of the image; you are told when the calibration is of another",
            min = "0.01",
            max = "3000")
    private double kilovolts = 200;

    @Parameter(
            label = "Binning",
            description = "Of the image: pixels joined to one along each side",
            min = "1",
            max = "64")
    private int binning = 1;

    @Parameter(
            label = "Nominal camera length (mm)",
            description = "Of the image; empty where it is not known",
            required = false,
            persist = false)
    private String cameralength = "";

    @Parameter(
            label = "Pixel size (µm)",
            description = "Of the image, unbinned; empty where it is not known",
            required = false,
            persist = false)
    private String pixelsize = "";

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public ApplyCalibration() {}

    @Override
    protected void perform() throws IOException {
        ImagePlus pattern = image != null ? image : WindowManager.getCurrentImage();
        if (pattern == null) {
            throw new IllegalArgumentException("no image is open: open a diffraction pattern first");
        }
        Calibration kept = KeptCalibrations.of(calibration == null ? "" : calibration);
        AppliedCalibration use = new AppliedCalibration(
                kept, Typed.positive(LENGTH, cameralength), Typed.positive(PIXEL, pixelsize), Optional.empty());
        Instrument now = Instrument.of(pattern)
                .orElseGet(Instrument::last)
                .withKilovolts(kilovolts)
                .with(use, binning);
        List<String> said = new ArrayList<>();
        said.add(use.line(binning));
        said.addAll(now.warnings(LocalDate.now()));
        now.keepWith(pattern);
        Sitting.tell(pattern);
        said.forEach(IJ::log);
        answer = String.join("\n", said);
        IJ.showStatus(said.get(0));
    }
}
