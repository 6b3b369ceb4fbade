package io.github.zonewright.imagej.session;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.Comparator;
import java.util.Optional;

/** Which measured spot a person means who points near it. */
public final class SpotPick {
    /** How far off a spot may be pointed at, in widths of the spots. */
    private static final double REACH_IN_WIDTHS = 3;

    private static final double LEAST_REACH = 3;

    /** Standard uncertainty in px of a place that is no measured spot. */
    private static final double POINTED = 1;

    private SpotPick() {}

    /**
     * How far from a spot a place may be and still mean it.
     *
     * @param measured the measured spots
     * @return in px of the image
     */
    public static double reach(MeasuredPattern measured) {
        return Math.max(LEAST_REACH, REACH_IN_WIDTHS * measured.spotSigma());
    }

    /**
     * The spot that is meant.
     *
     * @param measured the measured spots
     * @param place where a person points
     * @param reach how far off in px
     * @return the nearest spot within reach
     */
    public static Optional<MeasuredSpot> near(MeasuredPattern measured, PixelPoint place, double reach) {
        return measured.spots().stream()
                .filter(s -> s.position().distanceTo(place) <= reach)
                .min(Comparator.comparingDouble(s -> s.position().distanceTo(place)));
    }

    /**
     * Where the ruler is laid by a person who points at one place, or at two.
     *
     * @param measured the measured spots
     * @param place the first place
     * @param opposite the second, for a pair g and −g
     * @param order which spot of its row it is
     * @param reach how far off a spot a place may be in px
     * @return the places of the spots that are meant; where there is none the place itself, known to 1 px
     */
    public static RulerPoint ruler(
            MeasuredPattern measured, PixelPoint place, Optional<PixelPoint> opposite, int order, double reach) {
        Optional<MeasuredSpot> spot = near(measured, place, reach);
        Optional<MeasuredSpot> other = opposite.flatMap(p -> near(measured, p, reach));
        double error = error(spot);
        if (opposite.isPresent()) {
            error = Math.hypot(error, error(other)) / Math.sqrt(2);
        }
        return new RulerPoint(
                spot.map(MeasuredSpot::position).orElse(place),
                opposite.map(p -> other.map(MeasuredSpot::position).orElse(p)),
                error,
                order);
    }

    private static double error(Optional<MeasuredSpot> spot) {
        return spot.map(MeasuredSpot::positionError).orElse(POINTED);
    }
}
