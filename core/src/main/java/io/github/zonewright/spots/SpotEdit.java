package io.github.zonewright.spots;

import io.github.zonewright.image.PixelPoint;
import java.util.Optional;

/**
 * A change of the measured spots by hand. The same changes in the same order, on the same image measured in the same way, make
 * the same spots, so that a list of them is all it takes to keep what a person did.
 *
 * @param way what is done
 * @param place where
 * @param to where to, for a spot that is moved
 */
public record SpotEdit(Way way, PixelPoint place, Optional<PixelPoint> to) {
    /** What a person can do. */
    public enum Way {
        /** A spot is added at the peak near the place. */
        ADD(Way.ADD_LABEL),
        /** The spot near the place is moved to the peak near another place. */
        MOVE(Way.MOVE_LABEL),
        /** The spot near the place is removed. */
        REMOVE(Way.REMOVE_LABEL),
        /** The direct beam near the place is the centre, or, where there is none, the place itself. */
        CENTRE(Way.CENTRE_LABEL),
        /** The centre is found from the spots again. */
        FIND_CENTRE(Way.FIND_CENTRE_LABEL);

        /** Label of {@link #ADD}. */
        public static final String ADD_LABEL = "add a spot";
        /** Label of {@link #MOVE}. */
        public static final String MOVE_LABEL = "move a spot";
        /** Label of {@link #REMOVE}. */
        public static final String REMOVE_LABEL = "remove a spot";
        /** Label of {@link #CENTRE}. */
        public static final String CENTRE_LABEL = "set the centre";
        /** Label of {@link #FIND_CENTRE}. */
        public static final String FIND_CENTRE_LABEL = "find the centre again";

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

    /** Standard uncertainty in px of a centre that a person puts where no direct beam is to be seen. */
    private static final double CENTRE_ERROR = 1;

    /**
     * Checks the places.
     *
     * @throws IllegalArgumentException if a spot is to be moved nowhere
     */
    public SpotEdit {
        if (way == Way.MOVE && to.isEmpty()) {
            throw new IllegalArgumentException("move a spot: the place to move it to is missing");
        }
    }

    /**
     * Does it.
     *
     * @param measured the spots before
     * @return the spots after
     * @throws IllegalArgumentException if no spot is at the place, or none can be put there; the message says why
     */
    public MeasuredPattern on(MeasuredPattern measured) {
        return switch (way) {
            case ADD -> measured.withSpotNear(place);
            case MOVE -> measured.withSpotMoved(place, to.orElseThrow());
            case REMOVE -> measured.withoutSpotNear(place);
            case CENTRE -> centred(measured);
            case FIND_CENTRE -> measured.withFoundCentre();
        };
    }

    private MeasuredPattern centred(MeasuredPattern measured) {
        try {
            return measured.withDirectBeamNear(place);
        } catch (IllegalArgumentException e) {
            return measured.withCentre(place, CENTRE_ERROR);
        }
    }
}
