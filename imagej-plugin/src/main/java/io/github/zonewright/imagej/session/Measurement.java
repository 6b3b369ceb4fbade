package io.github.zonewright.imagej.session;

import io.github.zonewright.image.Mask;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotContrast;
import io.github.zonewright.spots.SpotEdit;
import io.github.zonewright.spots.SpotNet;
import io.github.zonewright.spots.SpotNetFinder;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/**
 * What is measured on one image, how it is to be measured, and what the ruler was laid to.
 *
 * @param pattern spots and centre, once they are measured
 * @param net their net, row or neither; there as soon as the spots are
 * @param edits what a person changed of the spots and the centre, in order; where there is no pattern, it is to be done again
 *     when they are measured
 * @param how how it is measured
 * @param ruler where the ruler was laid, in the order of the readings
 * @param shown whether this is drawn in place of a pattern that is laid over the image
 */
public record Measurement(
        Optional<MeasuredPattern> pattern,
        Optional<SpotNet> net,
        List<SpotEdit> edits,
        How how,
        List<RulerPoint> ruler,
        boolean shown) {

    /**
     * How an image is measured.
     *
     * @param said whether spots are dark on bright ground, if a person said so
     * @param judged what the image itself tells of that, once it was asked
     * @param hidden the hidden area, if a person set it
     */
    public record How(Optional<Boolean> said, Optional<SpotContrast> judged, Optional<Mask> hidden) {
        private static final double WORTH_ASKING = 0.1;

        /** Nothing is said or judged. */
        public static final How PLAIN = new How(Optional.empty(), Optional.empty(), Optional.empty());

        /**
         * Whether the inverse of the image is measured.
         *
         * @return as a person said; else whether the image is surely one of dark spots
         */
        public boolean isDark() {
            return said.orElse(judgedDark(SpotContrast.SURE));
        }

        /**
         * Whether a person ought to be asked if the spots are dark.
         *
         * @return true when they may be and nobody said
         */
        public boolean isDoubtful() {
            return said.isEmpty() && judgedDark(WORTH_ASKING) && !judgedDark(SpotContrast.SURE);
        }

        private boolean judgedDark(double confidence) {
            return judged.filter(c -> c.darkSpots() && c.confidence() >= confidence)
                    .isPresent();
        }

        /**
         * With spots said to be dark or bright.
         *
         * @param dark whether they are dark on bright ground; empty for what the image itself tells
         * @return the changed way
         */
        public How withDarkSpots(Optional<Boolean> dark) {
            return new How(dark, judged, hidden);
        }

        /**
         * With what the image itself tells.
         *
         * @param contrast the judgement
         * @return the changed way
         */
        How withJudged(SpotContrast contrast) {
            return new How(said, Optional.of(contrast), hidden);
        }

        /**
         * With another hidden area.
         *
         * @param area the area, or empty for the one that is found by itself
         * @return the changed way
         */
        public How withHidden(Optional<Mask> area) {
            return new How(said, judged, area);
        }
    }

    /** Nothing is measured, and nothing said. */
    public static final Measurement NONE =
            new Measurement(Optional.empty(), Optional.empty(), List.of(), How.PLAIN, List.of(), false);

    /** Copies the lists. */
    public Measurement {
        edits = List.copyOf(edits);
        ruler = List.copyOf(ruler);
    }

    /**
     * With other spots, as they were found, whose net is sought.
     *
     * @param measured the spots
     * @return the changed measurement
     */
    public Measurement withPattern(MeasuredPattern measured) {
        return with(measured, List.of());
    }

    /**
     * With the spots that are there changed by a person.
     *
     * @param edit the change
     * @return the changed measurement
     * @throws IllegalArgumentException if it can't be done; the message says why
     */
    public Measurement withEdit(SpotEdit edit) {
        List<SpotEdit> more = new ArrayList<>(edits);
        more.add(edit);
        return with(edit.on(pattern.orElseThrow()), more);
    }

    private Measurement with(MeasuredPattern measured, List<SpotEdit> made) {
        SpotNet found = SpotNetFinder.find(measured);
        return new Measurement(Optional.of(measured), Optional.of(found), made, how, ruler, shown);
    }

    /**
     * Not measured yet, and to be measured and changed as a person did it before.
     *
     * @param before how it was measured
     * @param made what was changed, in order
     * @return the changed measurement
     */
    Measurement asBefore(How before, List<SpotEdit> made) {
        return new Measurement(Optional.empty(), Optional.empty(), made, before, ruler, shown);
    }

    /**
     * Whether a person changed the spots or the centre.
     *
     * @return true if there are such changes
     */
    public boolean edited() {
        return !edits.isEmpty();
    }

    /**
     * Measured in another way from now on.
     *
     * @param other the way
     * @return the changed measurement, with the spots as they are
     */
    public Measurement withHow(How other) {
        return new Measurement(pattern, net, edits, other, ruler, shown);
    }

    /**
     * With one more reading.
     *
     * @param point where the ruler is laid
     * @return the changed measurement
     */
    public Measurement withRuler(RulerPoint point) {
        List<RulerPoint> more = new ArrayList<>(ruler);
        more.add(point);
        return new Measurement(pattern, net, edits, how, more, shown);
    }

    /**
     * Without readings.
     *
     * @return the changed measurement
     */
    public Measurement withoutRuler() {
        return new Measurement(pattern, net, edits, how, List.of(), shown);
    }

    /**
     * Drawn in place of a pattern, or not.
     *
     * @param drawn whether it is
     * @return the changed measurement
     */
    public Measurement withShown(boolean drawn) {
        return new Measurement(pattern, net, edits, how, ruler, drawn);
    }
}
