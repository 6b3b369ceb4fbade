package io.github.zonewright.indexing;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.spots.CentreCandidate;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.PatternCentre;
import java.util.List;
import java.util.Optional;

/**
 * What was measured, as every crystal of a search sees it.
 *
 * @param pattern the measured pattern
 * @param cloud its spots in the microscope frame
 * @param score what it is worth to explain them
 * @param centres where the direct beam may be, likeliest first; the given one alone if one is given
 * @param leastNoise a bound below the noise of an intensity anywhere on the pattern
 */
record Sighting(
        MeasuredPattern pattern,
        SpotCloud cloud,
        PositionScore score,
        List<CentreCandidate> centres,
        double leastNoise) {

    private static final int NOISE_SAMPLES = 32;

    static Sighting of(MeasuredPattern pattern, boolean mirrored, Optional<PatternCentre> centre) {
        SpotCloud cloud = new SpotCloud(pattern.spots(), mirrored, (double) pattern.width() * pattern.height());
        return new Sighting(
                pattern,
                cloud,
                new PositionScore(cloud, pattern.spotSigma()),
                centre.map(c -> List.of(new CentreCandidate(c, 0))).orElse(pattern.centres()),
                0.7 * leastNoise(pattern));
    }

    private static double leastNoise(MeasuredPattern pattern) {
        double least = Double.POSITIVE_INFINITY;
        for (int i = 0; i <= NOISE_SAMPLES; i++) {
            for (int j = 0; j <= NOISE_SAMPLES; j++) {
                PixelPoint place = new PixelPoint(
                        pattern.width() * (double) i / NOISE_SAMPLES, pattern.height() * (double) j / NOISE_SAMPLES);
                least = Math.min(least, pattern.measureAt(place).noise());
            }
        }
        return Math.max(least, 1e-12);
    }

    /** Whether the centre was given and not found. */
    boolean isGiven() {
        return centres != pattern.centres();
    }

    /** Whether there is no doubt about the centre. */
    boolean showsDirectBeam() {
        return centres.get(0).centre().source() == PatternCentre.Source.DIRECT_BEAM;
    }
}
