package io.github.zonewright.imagej.session;

import ij.Executer;
import ij.ImagePlus;
import ij.WindowManager;
import ij.process.ImageProcessor;
import io.github.zonewright.imagej.bridge.DisplayCurve;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Set;

/**
 * How an image is looked at: as it is, logarithmically, inverted, or both. Only the look-up table and the display range change,
 * never a pixel, and both are put back exactly when the view ends. They are put back too before one of ImageJ's commands that
 * save, duplicate or change the image, so that the view does not get into a file or a copy.
 */
public enum ImageView {
    /** As the user has it. */
    AS_IT_IS(ImageView.AS_IT_IS_LABEL),
    /** The logarithm of the grey values. */
    LOGARITHMIC(ImageView.LOGARITHMIC_LABEL),
    /** Dark for bright. */
    INVERTED(ImageView.INVERTED_LABEL),
    /** Both. */
    LOGARITHMIC_INVERTED(ImageView.LOGARITHMIC_INVERTED_LABEL);

    /** Label of {@link #AS_IT_IS}. */
    public static final String AS_IT_IS_LABEL = "as it is";
    /** Label of {@link #LOGARITHMIC}. */
    public static final String LOGARITHMIC_LABEL = "logarithmic";
    /** Label of {@link #INVERTED}. */
    public static final String INVERTED_LABEL = "inverted";
    /** Label of {@link #LOGARITHMIC_INVERTED}. */
    public static final String LOGARITHMIC_INVERTED_LABEL = "inverted logarithmic";

    private static final String KEY = "zonewright.view";
    private static final Set<String> ENDING = Set.of("duplicate...", "revert", "apply lut", "brightness/contrast...");
    private static final Set<String> FORMATS = Set.of(
            "tiff...",
            "ome-tiff...",
            "gif...",
            "jpeg...",
            "png...",
            "bmp...",
            "pgm...",
            "fits...",
            "zip...",
            "raw data...",
            "image sequence...",
            "avi... ",
            "text image...");

    private final String label;

    /** What is looked at, and how it was before. */
    private record Seen(ImageView view, DisplayCurve before, DisplayCurve now) {}

    static {
        Executer.addCommandListener(ImageView::executing);
    }

    ImageView(String label) {
        this.label = label;
    }

    /**
     * What a person reads.
     *
     * @return the label
     */
    public String label() {
        return label;
    }

    /**
     * The view of a label.
     *
     * @param text the label
     * @return the view
     * @throws IllegalArgumentException if there is none
     */
    public static ImageView ofLabel(String text) {
        List<String> labels = Arrays.stream(values()).map(ImageView::label).toList();
        return values()[labels.indexOf(Choice.pick("View", text, labels))];
    }

    /**
     * How an image is looked at now.
     *
     * @param image the image
     * @return the view; as it is too when the user has chosen another look-up table meanwhile
     */
    public static ImageView of(ImagePlus image) {
        return image.getProperty(KEY) instanceof Seen seen && isStill(image, seen) ? seen.view : AS_IT_IS;
    }

    /**
     * Looks at an image in this way.
     *
     * @param image the image
     * @throws IllegalArgumentException if the image has colours of its own, or a threshold is set, which a look-up table would
     *     take away
     */
    public void show(ImagePlus image) {
        if (this == of(image)) {
            return;
        }
        if (image.getProperty(KEY) instanceof Seen seen) {
            image.setProperty(KEY, null);
            if (isStill(image, seen)) {
                seen.before.put(image);
            }
        }
        if (this == AS_IT_IS) {
            return;
        }
        check(image);
        DisplayCurve before = DisplayCurve.of(image);
        DisplayCurve curve = before;
        if (this != LOGARITHMIC) {
            curve = curve.inverted();
        }
        if (this != INVERTED) {
            curve = curve.logarithmic(image);
        }
        curve.put(image);
        image.setProperty(KEY, new Seen(this, before, curve));
    }

    private static boolean isStill(ImagePlus image, Seen seen) {
        return image.getProcessor() != null && seen.now.isIn(image);
    }

    private static void check(ImagePlus image) {
        if (image.getBitDepth() == 24 || image.isComposite()) {
            throw new IllegalArgumentException("image \"" + image.getTitle()
                    + "\" is in colour: expected an image of 8, 16 or 32 bit grey values for another view");
        }
        if (image.getProcessor().getMinThreshold() != ImageProcessor.NO_THRESHOLD) {
            throw new IllegalArgumentException("image \"" + image.getTitle()
                    + "\" has a threshold set, which another view would take away: expected none");
        }
    }

    /** ImageJ is about to run a command. */
    private static String executing(String command) {
        String name = command.toLowerCase(Locale.ROOT);
        ImagePlus image = WindowManager.getCurrentImage();
        if (image != null && (name.startsWith("save") || FORMATS.contains(name) || ENDING.contains(name))) {
            AS_IT_IS.show(image);
        }
        return command;
    }
}
