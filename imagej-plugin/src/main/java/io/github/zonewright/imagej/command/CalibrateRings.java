package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.calibration.MeasuredRings;
import io.github.zonewright.calibration.MicroscopeSetting;
import io.github.zonewright.calibration.RingCalibration;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.bridge.RingPlots;
import io.github.zonewright.imagej.bridge.RingTable;
import io.github.zonewright.imagej.session.AppliedCalibration;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.KeptCalibrations;
import io.github.zonewright.imagej.session.RingTrial;
import java.awt.GraphicsEnvironment;
import java.io.IOException;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/**
 * Measures the rings of a known powder on the current image and says what they tell of the camera. The image's own
 * calibration stays as it is.
 */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Calibrate from Rings...")
public final class CalibrateRings extends CrystalCommand {
    private static final double PERCENT = 0.01;
    private static final String ROUGH_SCALE = "Rough camera constant (px·Å)";
    private static final String LENGTH = "Nominal camera length (mm)";
    private static final String PIXEL = "Pixel size (µm)";

    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(
            label = "Rough camera constant (px·Å)",
            description = "Tells powders of one structure type apart; empty where it is not known",
            required = false,
            persist = false)
    private String roughscale = "";

    @Parameter(label = "Scale is good to (%)", min = "0.1", max = "20")
    private double tolerance = 3;

    @Parameter(label = "Image is mirrored")
    private boolean mirrored;

    @Parameter(label = "Draw the rings")
    private boolean rings = true;

    @Parameter(label = "Show table of rings")
    private boolean table = true;

    @Parameter(label = "Show plots of rings")
    private boolean plots = true;

    @Parameter(label = "Use it for this image", description = "Then the scale can be given as kept calibration")
    private boolean use = true;

    @Parameter(
            label = "Keep calibration as",
            description = "Its name; empty: it is not kept",
            required = false,
            persist = false)
    private String keepcalibration = "";

    @Parameter(label = "Instrument", description = "For the kept calibration", required = false)
    private String instrument = "";

    @Parameter(
            label = "Nominal camera length (mm)",
            description = "For the kept calibration; empty where it is not known",
            required = false,
            persist = false)
    private String cameralength = "";

    @Parameter(
            label = "Pixel size (µm)",
            description = "For the kept calibration: of an unbinned pixel; empty where it is not known",
            required = false,
            persist = false)
    private String pixelsize = "";

    @Parameter(
            label = "Binning",
            description = "For the kept calibration: pixels joined to one along each side",
            min = "1",
            max = "64")
    private int binning = 1;

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public CalibrateRings() {}

    @Override
    protected void perform() throws IOException {
        ImagePlus pattern = image != null ? image : WindowManager.getCurrentImage();
        if (pattern == null) {
            throw new IllegalArgumentException("no image is open: open an image of powder rings first");
        }
        Crystal standard = crystal();
        RingTrial trial =
                new RingTrial(standard, beam(), mirrored, Typed.positive(ROUGH_SCALE, roughscale), tolerance * PERCENT);
        MicroscopeSetting setting = setting();
        boolean keep = keepcalibration != null && !keepcalibration.isBlank();
        String name = keep ? KeptCalibrations.free(keepcalibration) : "Rings of " + pattern.getTitle();
        CrystalReport report = CrystalReport.of(standard);
        report.cautions().forEach(IJ::log);
        MeasuredRings measured = RingTrial.measure(pattern);
        RingCalibration.Fitted fitted = fitted(trial.of(measured), pattern);
        List<String> said = new ArrayList<>();
        said.add(RingAnswer.line(fitted) + ImagePixels.note(pattern));
        said.addAll(RingTrial.notices(fitted));
        said.addAll(report.notices());
        if (!fitted.standardFits()) {
            said.add("No calibration was taken from the rings, since they do not fit the standard.");
        } else {
            AppliedCalibration found = RingTrial.applied(fitted, name, setting);
            if (keep) {
                said.add(KeptCalibrations.keep(found.calibration()));
            }
            if (use) {
                Instrument.last()
                        .withKilovolts(kilovolts())
                        .with(found, binning)
                        .keepWith(pattern);
            }
        }
        said.forEach(IJ::log);
        IJ.showStatus(said.get(0));
        said.addAll(report.cautions());
        answer = String.join("\n", said);
        if (rings) {
            RingTrial.draw(fitted, pattern);
        }
        if (!GraphicsEnvironment.isHeadless()) {
            show(fitted, measured, pattern.getTitle());
        }
    }

    private void show(RingCalibration.Fitted fitted, MeasuredRings measured, String title) {
        if (table) {
            RingTable.of(fitted).show("Rings of " + title);
        }
        if (plots) {
            RingPlots.profile(measured, Optional.of(fitted)).show();
            RingPlots.residuals(fitted).show();
        }
    }

    private MicroscopeSetting setting() {
        return new MicroscopeSetting(
                instrument == null ? "" : instrument.strip(),
                kilovolts(),
                Typed.positive(LENGTH, cameralength),
                Typed.positive(PIXEL, pixelsize),
                binning);
    }

    private static RingCalibration.Fitted fitted(RingCalibration calibration, ImagePlus pattern) {
        if (calibration instanceof RingCalibration.Fitted found) {
            return found;
        }
        throw new IllegalArgumentException(
                RingTrial.reason((RingCalibration.Refused) calibration) + ImagePixels.note(pattern));
    }
}
