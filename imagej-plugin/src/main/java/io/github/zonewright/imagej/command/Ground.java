package io.github.zonewright.imagej.command;

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

    static final String JUDGED_LABEL = "as judged";
    static final String BRIGHT_LABEL = "bright, spots dark";
    static final String DARK_LABEL = "dark, spots bright";

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

    /** The ground of a label, or of an unmistakable beginning of it. */
    static Ground ofLabel(String text) {
        List<String> labels = Arrays.stream(values()).map(g -> g.label).toList();
        return values()[labels.indexOf(Choice.pick("Ground", text, labels))];
    }

    /** A way of measuring for which this was said; what was said before stays where it is to be judged. */
    Measurement.How said(Measurement.How how) {
        return switch (this) {
            case JUDGED -> how;
            case BRIGHT -> how.withDarkSpots(Optional.of(true));
            case DARK -> how.withDarkSpots(Optional.of(false));
        };
    }
}
