package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.calibration.MeasuredRings;
import io.github.zonewright.calibration.MicroscopeSetting;
import io.github.zonewright.calibration.RingCalibration;
import io.github.zonewright.calibration.RingCalibrator;
import io.github.zonewright.calibration.RingFinder;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.image.Ellipse;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.bridge.RingTable;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.overlay.RingMarks;
import io.github.zonewright.microscope.Beam;
import java.awt.GraphicsEnvironment;
import java.io.File;
import java.io.IOException;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.Stream;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/**
 * Measures the rings of a known powder on the current image and says what they tell of the camera. The image's own
 * calibration stays as it is.
 */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Calibrate from Rings...")
public final class CalibrateRings extends PatternCommand {
    private static final double PERCENT = 0.01;
    private static final String ROUGH_SCALE = "Rough camera constant (px·Å)";
    private static final String LENGTH = "Nominal camera length (mm)";
    private static final String PIXEL = "Pixel size (µm)";

    /** Powders in common use for this; the rings are compared with each. */
    private static final List<String> STANDARDS = List.of("gold", "aluminium", "silicon", "ceria", "periclase");

    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(
            label = "Crystal",
            description = "Name or formula of the powder: a crystal of the shelf or of your own",
            style = CrystalChoice.STYLE)
    private String crystal = "Aluminium";

    @Parameter(label = "or CIF file", description = "Takes the place of the crystal above when given", required = false)
    private File cif;

    @Parameter(label = "Accelerating voltage (kV)", min = "0.01", max = "3000")
    private double kilovolts = 200;

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
        Crystal standard = CrystalChoice.of(crystal, cif);
        RingCalibrator calibrator = calibrator();
        Optional<KeepCalibration> keep = KeepCalibration.as(keepcalibration, setting());
        CrystalReport report = CrystalReport.of(standard);
        report.cautions().forEach(IJ::log);
        MeasuredRings measured = RingFinder.withDefaults().find(ImagePixels.of(pattern));
        RingCalibration.Fitted fitted = fitted(calibrator.calibrate(measured, standard), pattern);
        List<String> said = new ArrayList<>();
        said.add(RingAnswer.line(fitted) + ImagePixels.note(pattern));
        fitted.notices().stream()
                .filter(n -> !RingCalibrator.cautions(standard).contains(n))
                .forEach(said::add);
        said.addAll(report.notices());
        if (keep.isPresent()) {
            said.add(keep.get().keep(fitted));
        }
        said.forEach(IJ::log);
        IJ.showStatus(said.get(0));
        said.addAll(report.cautions());
        answer = String.join("\n", said);
        if (rings) {
            draw(fitted, pattern);
        }
        if (table && !GraphicsEnvironment.isHeadless()) {
            RingTable.of(fitted).show("Rings of " + pattern.getTitle());
        }
    }

    private RingCalibrator calibrator() {
        List<Crystal> standards = STANDARDS.stream()
                .flatMap(name -> CrystalShelf.find(name).stream())
                .toList();
        RingCalibrator free = RingCalibrator.of(Beam.ofKilovolts(kilovolts))
                .withMirrored(mirrored)
                .comparedWith(standards);
        OptionalDouble rough = KeepCalibration.optional(ROUGH_SCALE, roughscale);
        return rough.isPresent() ? free.withConstantNear(rough.getAsDouble(), tolerance * PERCENT) : free;
    }

    private MicroscopeSetting setting() {
        return new MicroscopeSetting(
                instrument == null ? "" : instrument.strip(),
                kilovolts,
                KeepCalibration.optional(LENGTH, cameralength),
                KeepCalibration.optional(PIXEL, pixelsize),
                binning);
    }

    private static RingCalibration.Fitted fitted(RingCalibration calibration, ImagePlus pattern) {
        if (calibration instanceof RingCalibration.Fitted found) {
            return found;
        }
        RingCalibration.Refused refused = (RingCalibration.Refused) calibration;
        List<String> others =
                refused.others().stream().map(r -> r.standard().name()).toList();
        throw new IllegalArgumentException(refused.reason()
                + (others.isEmpty() ? "" : " Standards that fit: " + String.join(", ", others) + ".")
                + ImagePixels.note(pattern));
    }

    private static void draw(RingCalibration.Fitted fitted, ImagePlus pattern) {
        Ellipse shape = fitted.shape().ellipse();
        double wavelength = fitted.beam().wavelength();
        List<RingMarks.Ring> drawn = Stream.concat(
                        fitted.rings().stream().map(r -> r.line()), fitted.missing().stream())
                .map(line -> new RingMarks.Ring(
                        RingTable.forms(line), fitted.constant().value() * line.reducedRadius(wavelength)))
                .toList();
        PatternOverlay.saveForUndo(pattern);
        RingMarks.show(pattern, shape, drawn);
    }
}
