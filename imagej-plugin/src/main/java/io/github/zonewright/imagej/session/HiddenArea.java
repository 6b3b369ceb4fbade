package io.github.zonewright.imagej.session;

import ij.ImagePlus;
import io.github.zonewright.image.Mask;
import io.github.zonewright.imagej.bridge.MaskSelection;
import io.github.zonewright.spots.MeasuredPattern;
import java.util.Optional;

/** The area behind the beam stop as a person corrects it, with ordinary selections of ImageJ. */
public final class HiddenArea {
    private HiddenArea() {}

    /** A way of changing it. */
    public enum Way {
        /** The selection becomes the hidden area. */
        SELECTION(Way.SELECTION_LABEL),
        /** The selection is hidden too. */
        ADD(Way.ADD_LABEL),
        /** The selection is hidden no longer. */
        TAKE_AWAY(Way.TAKE_AWAY_LABEL),
        /** The area is found by itself again. */
        AUTOMATIC(Way.AUTOMATIC_LABEL),
        /** The hidden area becomes the selection; the area stays. */
        TO_SELECTION(Way.TO_SELECTION_LABEL);

        /** Label of {@link #SELECTION}. */
        public static final String SELECTION_LABEL = "Hide the selection alone";
        /** Label of {@link #ADD}. */
        public static final String ADD_LABEL = "Hide the selection too";
        /** Label of {@link #TAKE_AWAY}. */
        public static final String TAKE_AWAY_LABEL = "Uncover the selection";
        /** Label of {@link #AUTOMATIC}. */
        public static final String AUTOMATIC_LABEL = "As found by itself";
        /** Label of {@link #TO_SELECTION}. */
        public static final String TO_SELECTION_LABEL = "Select the hidden area";

        private final String label;

        Way(String label) {
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
    }

    /**
     * The area after a change.
     *
     * @param image the image; its selection is read and stays as it is
     * @param way how it is changed
     * @return the area; empty for the one that is found by itself
     * @throws IllegalArgumentException if the selection encloses nothing
     */
    public static Optional<Mask> area(ImagePlus image, Way way) {
        int width = image.getWidth();
        int height = image.getHeight();
        return switch (way) {
            case SELECTION -> Optional.of(MaskSelection.of(image.getRoi(), width, height));
            case ADD -> Optional.of(present(image).union(MaskSelection.of(image.getRoi(), width, height)));
            case TAKE_AWAY -> {
                Mask taken = MaskSelection.of(image.getRoi(), width, height);
                yield Optional.of(present(image).inverted().union(taken).inverted());
            }
            case AUTOMATIC -> Optional.empty();
            case TO_SELECTION -> Sitting.of(image).measurement().how().hidden();
        };
    }

    /**
     * Makes the hidden area the selection, so that it can be changed with ImageJ's own tools.
     *
     * @param image the image, whose selection is set
     * @throws IllegalArgumentException if nothing is hidden; the selection then stays as it is
     */
    public static void select(ImagePlus image) {
        image.setRoi(MaskSelection.of(present(image))
                .orElseThrow(
                        () -> new IllegalArgumentException("hidden area: it is empty, so there is nothing to select")));
    }

    /** What is hidden now: as a person said, or as it was found. */
    private static Mask present(ImagePlus image) {
        Measurement measurement = Sitting.of(image).measurement();
        return measurement
                .how()
                .hidden()
                .or(() -> measurement.pattern().map(MeasuredPattern::hidden))
                .orElseGet(() -> Mask.none(image.getWidth(), image.getHeight()));
    }
}
