package io.github.zonewright.indexing;

import io.github.zonewright.pattern.PredictedSpot;
import io.github.zonewright.pattern.SpotPattern;
import java.util.HashSet;
import java.util.List;
import java.util.Set;

/**
 * How different two computed patterns look: half the sum of the differences of their intensities, spot by spot, each pattern's
 * summing to one. Roots of intensities are compared, since many scatterings level them.
 */
final class PatternDifference {

    /** Spots nearer than this, and this share of |g|, lie in one place: 1/Å. */
    private static final double NEAR = 0.008;

    private static final double NEAR_SHARE = 0.015;

    /** Spots below this share of the strongest are not looked at. */
    private static final double WEAK = 1e-3;

    private PatternDifference() {}

    /** 0 for the same pattern, 1 for nothing in common. */
    static double of(SpotPattern a, SpotPattern b) {
        List<PredictedSpot> first = strong(a);
        List<PredictedSpot> second = strong(b);
        double sumFirst = sum(first);
        double sumSecond = sum(second);
        if (sumFirst == 0 || sumSecond == 0) {
            return sumFirst == sumSecond ? 0 : 1;
        }
        Set<PredictedSpot> left = new HashSet<>(second);
        double difference = 0;
        for (PredictedSpot s : first) {
            PredictedSpot mate = null;
            double least = NEAR + NEAR_SHARE * s.g().norm();
            for (PredictedSpot t : left) {
                double d = t.g().minus(s.g()).norm();
                if (d < least) {
                    least = d;
                    mate = t;
                }
            }
            double own = Math.sqrt(s.intensity()) / sumFirst;
            difference += Math.abs(own - (mate == null ? 0 : Math.sqrt(mate.intensity()) / sumSecond));
            left.remove(mate);
        }
        return (difference + sum(List.copyOf(left)) / sumSecond) / 2;
    }

    private static List<PredictedSpot> strong(SpotPattern pattern) {
        double strongest = pattern.spots().stream()
                .mapToDouble(PredictedSpot::intensity)
                .max()
                .orElse(0);
        return pattern.spots().stream()
                .filter(s -> s.intensity() > WEAK * strongest)
                .toList();
    }

    private static double sum(List<PredictedSpot> spots) {
        return spots.stream().mapToDouble(s -> Math.sqrt(s.intensity())).sum();
    }
}
