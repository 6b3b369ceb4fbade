package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.imagej.bridge.ImageCalibration;
import io.github.zonewright.imagej.session.Choice;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.Sitting;
import java.util.List;
import java.util.Optional;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/**
 * Sets the image's own calibration to 1/nm, from a result or a camera constant, or puts back what it was before. Nothing else
 * of ours ever changes it.
 */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Set Image Calibration...")
public final class SetImageCalibration extends PatternCommand {
    /** From the result. */
    public static final String RESULT = "result on this image";

    private static final String CONSTANT = "camera constant, px·Å";
    /** Back to what it was. */
    public static final String BEFORE = "what it was before";

    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(
            label = "Take it from",
            choices = {RESULT, CONSTANT, BEFORE},
            persist = false)
    private String takefrom = RESULT;

    @Parameter(label = "Camera constant (px·Å)", min = "0.001", max = "1e8", persist = false)
    private double constant = 500;

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public SetImageCalibration() {}

    @Override
    protected void perform() {
        ImagePlus pattern = image != null ? image : WindowManager.getCurrentImage();
        if (pattern == null) {
            throw new IllegalArgumentException("no image is open: open a diffraction pattern first");
        }
        answer = switch (Choice.pick("Take it from", takefrom, List.of(RESULT, CONSTANT, BEFORE))) {
            case RESULT -> setFromResult(pattern);
            case CONSTANT -> ImageCalibration.set(pattern, constant);
            default -> ImageCalibration.putBack(pattern);
        };
        IJ.log(answer);
        IJ.showStatus(answer);
    }

    /**
     * Sets the calibration from what was found on the image: the camera of the solution shown, else the calibration in use.
     *
     * @param image the image
     * @return a sentence: what it is now, and what it was
     * @throws IllegalArgumentException if nothing was found, or a global calibration is in the way
     */
    public static String setFromResult(ImagePlus image) {
        return ImageCalibration.set(
                image,
                found(image)
                        .orElseThrow(
                                () -> new IllegalArgumentException("scale: there is no result on this image; find an"
                                        + " orientation, calibrate from rings or apply a calibration first")));
    }

    /**
     * The camera constant that was found on an image.
     *
     * @param image the image
     * @return that of the solution shown, else of the calibration in use, in px·Å; empty when there is neither
     */
    public static Optional<Double> found(ImagePlus image) {
        return Sitting.of(image)
                .chosen()
                .map(s -> s.placement().camera().constant())
                .or(() -> Instrument.of(image)
                        .flatMap(Instrument::calibration)
                        .map(c -> c.constant().value()));
    }
}
