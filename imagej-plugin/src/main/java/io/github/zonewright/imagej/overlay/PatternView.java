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
 */
public record PatternView(
        Optional<Placement> placement,
        List<PlacedSpot> computed,
        List<MeasuredSpot> unexplained,
        List<PlacedSpot> missing,
        boolean labelled) {

    /** Copies the lists. */
    public PatternView {
        computed = List.copyOf(computed);
        unexplained = List.copyOf(unexplained);
        missing = List.copyOf(missing);
    }

    /**
     * Measured spots alone.
     *
     * @param measured the spots
     * @return the view
     */
    public static PatternView ofMeasured(List<MeasuredSpot> measured) {
        return new PatternView(Optional.empty(), List.of(), measured, List.of(), false);
    }

    /** The same on an image stretched by a factor. */
    PatternView scaled(double factor) {
        return new PatternView(
                placement.map(
                        p -> p.centredAt(scaled(p.camera().centre(), factor)).scaledBy(factor)),
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
                labelled);
    }

    private static PlacedSpot scaled(PlacedSpot spot, double factor) {
        return new PlacedSpot(spot.spot(), scaled(spot.position(), factor));
    }

    private static PixelPoint scaled(PixelPoint point, double factor) {
        return new PixelPoint(factor * point.x(), factor * point.y());
    }
}
