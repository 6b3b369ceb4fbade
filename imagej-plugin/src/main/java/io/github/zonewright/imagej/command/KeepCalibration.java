package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.calibration.MicroscopeSetting;
import io.github.zonewright.imagej.session.AppliedCalibration;
import io.github.zonewright.imagej.session.KeptCalibrations;
import io.github.zonewright.imagej.session.PresentCamera;
import io.github.zonewright.spots.MeasuredValue;
import java.io.IOException;
import java.util.OptionalDouble;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/**
 * Keeps the camera of the current image as a calibration: that of the solution shown, whose crystal is the standard, or, where
 * there is none, the calibration in use.
 */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Keep Calibration...")
public final class KeepCalibration extends PatternCommand {
    private static final String LENGTH = "Nominal camera length (mm)";
    private static final String PIXEL = "Pixel size (µm)";
    private static final String ROTATION = "Image rotation (°)";

    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(label = "Keep calibration as", description = "Its name", persist = false)
    private String keepcalibration = "";

    @Parameter(label = "Instrument", description = "Your name for it", required = false)
    private String instrument = "";

    @Parameter(
            label = "Nominal camera length (mm)",
            description = "Empty where it is not known",
            required = false,
            persist = false)
    private String cameralength = "";

    @Parameter(
            label = "Pixel size (µm)",
            description = "Of an unbinned pixel; empty where it is not known",
            required = false,
            persist = false)
    private String pixelsize = "";

    @Parameter(label = "Binning", description = "Pixels joined to one along each side", min = "1", max = "64")
    private int binning = 1;

    @Parameter(
            label = "Image rotation (°)",
            description = "From the micrograph to the pattern, counter-clockwise; empty where it is not known",
            required = false,
            persist = false)
    private String imagerotation = "";

    @Parameter(label = "Uncertainty of image rotation (°)", min = "0", max = "180", persist = false)
    private double rotationerror = 0.5;

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public KeepCalibration() {}

    @Override
    protected void perform() throws IOException {
        ImagePlus pattern = image != null ? image : WindowManager.getCurrentImage();
        if (pattern == null) {
            throw new IllegalArgumentException("no image is open: open a diffraction pattern first");
        }
        PresentCamera camera = PresentCamera.of(pattern)
                .orElseThrow(() -> new IllegalArgumentException("camera: nothing is known of it but what you told;"
                        + " calibrate from rings, or find and refine an orientation of a known crystal first"));
        MicroscopeSetting setting = new MicroscopeSetting(
                instrument == null ? "" : instrument.strip(),
                camera.kilovolts(),
                Typed.positive(LENGTH, cameralength),
                Typed.positive(PIXEL, pixelsize),
                binning);
        Calibration kept = camera.calibration(KeptCalibrations.free(keepcalibration), setting);
        OptionalDouble rotation = Typed.number(ROTATION, imagerotation, "a number");
        if (rotation.isPresent()) {
            kept = kept.withImageRotation(
                    new MeasuredValue(rotation.getAsDouble(), rotationerror).times(Math.toRadians(1)));
        }
        answer = KeptCalibrations.keep(kept) + " " + AppliedCalibration.of(kept).line(binning);
        IJ.log(answer);
        IJ.showStatus(answer);
    }
}
