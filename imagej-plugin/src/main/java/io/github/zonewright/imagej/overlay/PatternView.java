package io.github.zonewright.imagej.overlay;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.List;
import java.util.Optional;

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
        PatternExtras extras) {

    /** Copies the lists. */
    public PatternView {
        computed = List.copyOf(computed);
        unexplained = List.copyOf(unexplained);
        missing = List.copyOf(missing);
        ruler = List.copyOf(ruler);
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
        this(placement, computed, unexplained, missing, labelled, Optional.empty(), List.of(), PatternExtras.NONE);
    }

    /**
     * What was measured, alone.
     *
     * @param measured the measured spots and their net, if there are any
     * @return the view
     */
    public static PatternView ofMeasured(Optional<MeasuredView> measured) {
        return new PatternView(
                Optional.empty(), List.of(), List.of(), List.of(), false, measured, List.of(), PatternExtras.NONE);
    }

    /**
     * With measured distances drawn too.
     *
     * @param lines the distances
     * @return the view
     */
    public PatternView withRuler(List<RulerLine> lines) {
        return new PatternView(placement, computed, unexplained, missing, labelled, measured, lines, extras);
    }

    /**
     * With more drawn about the pattern.
     *
     * @param more what else
     * @return the view
     */
    public PatternView withExtras(PatternExtras more) {
        return new PatternView(placement, computed, unexplained, missing, labelled, measured, ruler, more);
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
                .withExtras(extras.withDoubled(
                        extras.doubled().stream().map(p -> scaled(p, factor)).toList()));
    }

    private static PlacedSpot scaled(PlacedSpot spot, double factor) {
        return new PlacedSpot(spot.spot(), scaled(spot.position(), factor));
    }

    private static PixelPoint scaled(PixelPoint point, double factor) {
        return new PixelPoint(factor * point.x(), factor * point.y());
    }
}
