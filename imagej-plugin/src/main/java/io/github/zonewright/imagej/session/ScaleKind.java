package io.github.zonewright.imagej.session;

import ij.ImagePlus;
import io.github.zonewright.imagej.bridge.ReciprocalCalibration;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.CameraScale;
import java.util.Arrays;
import java.util.List;

/** The ways in which people know the scale of a pattern. */
public enum ScaleKind {
    /** Camera constant in px·Å. */
    PIXELS(ScaleKind.PIXELS_LABEL, "px·Å", false, false),
    /** Camera constant λL in mm·Å, with the pixel size. */
    MILLIMETRES(ScaleKind.MILLIMETRES_LABEL, "mm·Å", true, false),
    /** Camera length in mm, with pixel size and binning. */
    LENGTH(ScaleKind.LENGTH_LABEL, "mm", true, true),
    /** What the image's calibration says. */
    IMAGE(ScaleKind.IMAGE_LABEL, "", false, false),
    /** The calibration in use for the image. */
    CALIBRATION(ScaleKind.CALIBRATION_LABEL, "px·Å", false, true);

    /** Label of {@link #PIXELS}. */
    public static final String PIXELS_LABEL = "camera constant, px·Å";
    /** Label of {@link #MILLIMETRES}. */
    public static final String MILLIMETRES_LABEL = "camera constant, mm·Å";
    /** Label of {@link #LENGTH}. */
    public static final String LENGTH_LABEL = "camera length, mm";
    /** Label of {@link #IMAGE}. */
    public static final String IMAGE_LABEL = "image calibration";
    /** Label of {@link #CALIBRATION}. */
    public static final String CALIBRATION_LABEL = "kept calibration";

    private final String label;
    private final String unit;
    private final boolean needsPixelSize;
    private final boolean needsBinning;

    ScaleKind(String label, String unit, boolean needsPixelSize, boolean needsBinning) {
        this.label = label;
        this.unit = unit;
        this.needsPixelSize = needsPixelSize;
        this.needsBinning = needsBinning;
    }

    /**
     * The kind of a label.
     *
     * @param text the label or an unmistakable beginning of it
     * @return the kind
     * @throws IllegalArgumentException if there is none
     */
    public static ScaleKind ofLabel(String text) {
        List<String> labels = Arrays.stream(values()).map(ScaleKind::label).toList();
        return values()[labels.indexOf(Choice.pick("Scale given as", text, labels))];
    }

    /**
     * The label in ASCII, as the macro recorder has to write it.
     *
     * @return a text that {@link #ofLabel} reads
     */
    public String recorded() {
        return Choice.recorded(label());
    }

    /**
     * The camera constant.
     *
     * @param value the value in this kind's unit; not read for the image's calibration
     * @param pixelMicrometres pixel size in µm; as recorded for mm·Å, unbinned for the camera length
     * @param binning pixels joined to one along each side
     * @param beam the beam
     * @param image the image; read for its calibration alone
     * @return the camera constant in px·Å
     * @throws IllegalArgumentException if a value is not above 0 or the image's unit is no reciprocal length
     * @throws IllegalStateException for the calibration in use, which only an {@link Instrument} has
     */
    public double cameraConstant(double value, double pixelMicrometres, int binning, Beam beam, ImagePlus image) {
        return switch (this) {
            case PIXELS -> positive(value);
            case MILLIMETRES -> CameraScale.fromMillimetreAngstroms(value, pixelMicrometres);
            case LENGTH -> CameraScale.fromCameraLength(value, pixelMicrometres, binning, beam);
            case IMAGE -> {
                if (image == null) {
                    throw new IllegalArgumentException("scale: there is no image to take it from");
                }
                ReciprocalCalibration calibration = ReciprocalCalibration.of(image);
                yield calibration
                        .cameraConstant()
                        .orElseThrow(() -> new IllegalArgumentException(calibration.explanation()));
            }
            case CALIBRATION -> throw new IllegalStateException("an instrument knows the calibration in use");
        };
    }

    /**
     * What a person reads.
     *
     * @return the label, with the unit
     */
    public String label() {
        return label;
    }

    /**
     * The unit of the value.
     *
     * @return the unit; empty for the image's calibration
     */
    public String unit() {
        return unit;
    }

    /**
     * Whether the pixel size is needed.
     *
     * @return true for the kinds in mm
     */
    public boolean needsPixelSize() {
        return needsPixelSize;
    }

    /**
     * Whether the binning is needed.
     *
     * @return true for the camera length and the calibration in use
     */
    public boolean needsBinning() {
        return needsBinning;
    }

    private static double positive(double value) {
        if (!(value > 0) || Double.isInfinite(value)) {
            throw new IllegalArgumentException(
                    "camera constant: " + value + " px·Å, expected a finite value above 0 px·Å");
        }
        return value;
    }
}
