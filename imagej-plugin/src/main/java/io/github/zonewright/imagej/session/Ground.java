package io.github.zonewright.imagej.session;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;

/** Which way the grey values of a pattern run. */
public enum Ground {
    /** As the image itself tells. */
    JUDGED(Ground.JUDGED_LABEL),
    /** Dark spots on bright ground, as on a negative. */
    BRIGHT(Ground.BRIGHT_LABEL),
    /** Bright spots on dark ground. */
    DARK(Ground.DARK_LABEL);

    /** Label of {@link #JUDGED}. */
    public static final String JUDGED_LABEL = "as judged";
    /** Label of {@link #BRIGHT}. */
    public static final String BRIGHT_LABEL = "bright, spots dark";
    /** Label of {@link #DARK}. */
    public static final String DARK_LABEL = "dark, spots bright";

    private final String label;

    Ground(String label) {
        this.label = label;
    }

    /**
     * The ground on which an image is measured.
     *
     * @param how how it is measured
     * @return bright or dark
     */
    public static Ground of(Measurement.How how) {
        return how.isDark() ? BRIGHT : DARK;
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
     * The ground of a label.
     *
     * @param text the label, or an unmistakable beginning of it
     * @return the ground
     * @throws IllegalArgumentException if no label fits, or more than one
     */
    public static Ground ofLabel(String text) {
        List<String> labels = Arrays.stream(values()).map(g -> g.label).toList();
        return values()[labels.indexOf(Choice.pick("Ground", text, labels))];
    }

    /**
     * A way of measuring for which this was said.
     *
     * @param how the way before
     * @return the same with this ground; what was said before stays where it is to be judged
     */
    public Measurement.How said(Measurement.How how) {
        return switch (this) {
            case JUDGED -> how;
            case BRIGHT -> how.withDarkSpots(Optional.of(true));
            case DARK -> how.withDarkSpots(Optional.of(false));
        };
    }
}
