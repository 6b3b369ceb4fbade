package io.github.zonewright.imagej.overlay;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.List;
import java.util.Optional;
import java.util.Set;

/**
 * All that is drawn over an image.
 *
 * @param placement the pattern that is laid over the image, if there is one
 * @param computed its spots on the image, strongest first
 * @param unexplained measured spots that no computed one explains
 * @param missing computed spots that ought to be seen and were not measured; drawn instead of the plain mark
 * @param labelled whether spots carry their indices
 * @param measured what was measured, if that is drawn too
 * @param ruler distances that were measured
 * @param further marks of something beside the pattern
 * @param extras what else is drawn about the pattern
 */
public record PatternView(
        Optional<Placement> placement,
        List<PlacedSpot> computed,
        List<MeasuredSpot> unexplained,
        List<PlacedSpot> missing,
        boolean labelled,
        Optional<MeasuredView> measured,
        List<RulerLine> ruler,
        List<ExtraMark> further,
        PatternExtras extras) {

    /** Copies the lists. */
    public PatternView {
        computed = List.copyOf(computed);
        unexplained = List.copyOf(unexplained);
        missing = List.copyOf(missing);
        ruler = List.copyOf(ruler);
        further = List.copyOf(further);
    }

    /**
     * A pattern alone.
     *
     * @param placement the pattern that is laid over the image, if there is one
     * @param computed its spots on the image, strongest first
     * @param unexplained measured spots that no computed one explains
     * @param missing computed spots that ought to be seen and were not measured
     * @param labelled whether spots carry their indices
     */
    public PatternView(
            Optional<Placement> placement,
            List<PlacedSpot> computed,
            List<MeasuredSpot> unexplained,
            List<PlacedSpot> missing,
            boolean labelled) {
        this(
                placement,
                computed,
                unexplained,
                missing,
                labelled,
                Optional.empty(),
                List.of(),
                List.of(),
                PatternExtras.NONE);
    }

    /**
     * What was measured, alone.
     *
     * @param measured the measured spots and their net, if there are any
     * @return the view
     */
    public static PatternView ofMeasured(Optional<MeasuredView> measured) {
        return new PatternView(
                Optional.empty(),
                List.of(),
                List.of(),
                List.of(),
                false,
                measured,
                List.of(),
                List.of(),
                PatternExtras.NONE);
    }

    /**
     * With measured distances drawn too.
     *
     * @param lines the distances
     * @return the view
     */
    public PatternView withRuler(List<RulerLine> lines) {
        return new PatternView(placement, computed, unexplained, missing, labelled, measured, lines, further, extras);
    }

    /**
     * With further crystals, which explain some of the spots that are marked as unexplained.
     *
     * @param marks their marks
     * @param explained the spots that they explain
     * @return the view
     */
    public PatternView withFurther(List<ExtraMark> marks, Set<MeasuredSpot> explained) {
        List<MeasuredSpot> left =
                unexplained.stream().filter(s -> !explained.contains(s)).toList();
        return new PatternView(placement, computed, left, missing, labelled, measured, ruler, further, extras)
                .withExtra(marks);
    }

    private PatternView withExtra(List<ExtraMark> marks) {
        return new PatternView(placement, computed, unexplained, missing, labelled, measured, ruler, marks, extras);
    }

    /**
     * With more drawn about the pattern.
     *
     * @param more what else
     * @return the view
     */
    public PatternView withExtras(PatternExtras more) {
        return new PatternView(placement, computed, unexplained, missing, labelled, measured, ruler, further, more);
    }

    /** The same on an image stretched by a factor. */
    PatternView scaled(double factor) {
        return new PatternView(
                        placement.map(p ->
                                p.centredAt(scaled(p.camera().centre(), factor)).scaledBy(factor)),
                        computed.stream().map(s -> scaled(s, factor)).toList(),
                        unexplained.stream()
                                .map(m -> new MeasuredSpot(
                                        scaled(m.position(), factor),
                                        m.positionError(),
                                        m.intensity(),
                                        m.signalToNoise(),
                                        m.saturated()))
                                .toList(),
                        missing.stream().map(s -> scaled(s, factor)).toList(),
                        labelled)
                .withExtra(further.stream().map(m -> m.scaled(factor)).toList())
                .withExtras(extras.scaled(factor));
    }

    private static PlacedSpot scaled(PlacedSpot spot, double factor) {
        return new PlacedSpot(spot.spot(), scaled(spot.position(), factor));
    }

    private static PixelPoint scaled(PixelPoint point, double factor) {
        return new PixelPoint(factor * point.x(), factor * point.y());
    }
}
