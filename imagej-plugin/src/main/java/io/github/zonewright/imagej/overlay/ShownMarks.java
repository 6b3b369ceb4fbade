package io.github.zonewright.imagej.overlay;

import ij.ImagePlus;
import ij.Prefs;
import java.util.Arrays;
import java.util.EnumSet;
import java.util.Set;
import java.util.stream.Collectors;

/**
 * What is drawn about a laid pattern beyond its spots. Each image has its own choice; one that is new to us begins with the
 * last that was made, which is kept as a preference.
 */
public enum ShownMarks {
    /** A box that says what the shapes mean. */
    LEGEND(ShownMarks.LEGEND_LABEL, "A box that says what the shapes of the marks mean"),
    /** A bar of a round number of reciprocal lengths. */
    SCALE_BAR(ShownMarks.SCALE_BAR_LABEL, "A bar as long as a round number of 1/Å or 1/nm"),
    /** The Laue circle and its centre. */
    LAUE_CIRCLE(ShownMarks.LAUE_CIRCLE_LABEL, "The circle on which the zero layer is exactly excited, and its centre"),
    /** Forbidden spots that double diffraction may light. */
    DOUBLED(ShownMarks.DOUBLED_LABEL, "Squares where forbidden spots may be seen by double diffraction"),
    /** Measured minus computed at each spot, enlarged. */
    RESIDUALS(
            ShownMarks.RESIDUALS_LABEL,
            "Enlarged arrows from each computed spot of the solution shown towards the measured one"),
    /** The computed pattern as discs on dark ground, beside the measured half. */
    SPLIT(ShownMarks.SPLIT_LABEL, "The right half shows the computed pattern in place of the image");

    /** Label of the legend. */
    public static final String LEGEND_LABEL = "Legend";
    /** Label of the scale bar. */
    public static final String SCALE_BAR_LABEL = "Scale bar";
    /** Label of the Laue circle. */
    public static final String LAUE_CIRCLE_LABEL = "Laue circle";
    /** Label of the spots by double diffraction. */
    public static final String DOUBLED_LABEL = "Double diffraction";
    /** Label of the residuals. */
    public static final String RESIDUALS_LABEL = "Residuals";
    /** Label of the split view. */
    public static final String SPLIT_LABEL = "Computed half";

    /** Of the preference, and of the property of an image. */
    private static final String KEY = "zonewright.shown";

    private final String label;
    private final String help;

    ShownMarks(String label, String help) {
        this.label = label;
        this.help = help;
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
     * What it is, in a sentence.
     *
     * @return the sentence
     */
    public String help() {
        return help;
    }

    /**
     * What is shown on an image.
     *
     * @param image the image; from now on it has a choice of its own
     * @return a set of one's own
     */
    public static Set<ShownMarks> of(ImagePlus image) {
        if (!(image.getProperty(KEY) instanceof String)) {
            image.setProperty(KEY, Prefs.get(KEY, ""));
        }
        return named(Set.of(((String) image.getProperty(KEY)).split(",")));
    }

    /**
     * The marks of some names.
     *
     * @param names names of the constants, in upper case; others are passed over
     * @return a set of one's own
     */
    public static Set<ShownMarks> named(Set<String> names) {
        Set<ShownMarks> shown = EnumSet.noneOf(ShownMarks.class);
        Arrays.stream(values()).filter(m -> names.contains(m.name())).forEach(shown::add);
        return shown;
    }

    /**
     * Whether something stands at the corners of the part of an image that is seen.
     *
     * @param image the image
     * @return true for legend, scale bar or the arrow that says how large residuals are
     */
    public static boolean haveCorner(ImagePlus image) {
        Set<ShownMarks> shown = of(image);
        return shown.contains(LEGEND) || shown.contains(SCALE_BAR) || shown.contains(RESIDUALS);
    }

    /**
     * Shows these on an image from now on, and on every image that is new to us.
     *
     * @param shown the marks
     * @param image the image
     */
    public static void choose(Set<ShownMarks> shown, ImagePlus image) {
        keep(shown, image);
        Prefs.set(KEY, (String) image.getProperty(KEY));
    }

    /**
     * Shows these on an image alone.
     *
     * @param shown the marks
     * @param image the image
     */
    public static void keep(Set<ShownMarks> shown, ImagePlus image) {
        image.setProperty(KEY, shown.stream().map(Enum::name).sorted().collect(Collectors.joining(",")));
    }
}
