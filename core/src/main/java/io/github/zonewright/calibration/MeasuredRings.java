package io.github.zonewright.calibration;

import io.github.zonewright.image.RadialProfile;
import java.util.List;
import java.util.Optional;

/**
 * What was measured on a powder pattern, with no crystal in mind.
 *
 * @param rings the rings, from the inside out; empty when none could be measured
 * @param shape their common centre and ellipse; empty when they do not determine it
 * @param radiusCovariance covariance of the radii in px²
 * @param ringSigma common width of the rings as the standard deviation of a Gaussian, in pixels; 0 when there are none
 * @param profile radial profile about that shape; empty when there is no shape
 */
public record MeasuredRings(
        List<MeasuredRing> rings,
        Optional<RingShape> shape,
        List<List<Double>> radiusCovariance,
        double ringSigma,
        Optional<RadialProfile> profile) {

    /** Copies the lists. */
    public MeasuredRings {
        rings = List.copyOf(rings);
        radiusCovariance = radiusCovariance.stream().map(List::copyOf).toList();
        if (radiusCovariance.size() != rings.size()) {
            throw new IllegalArgumentException(
                    "rows of the covariance: " + radiusCovariance.size() + ", expected " + rings.size());
        }
    }

    /** Nothing measured. */
    static MeasuredRings none() {
        return new MeasuredRings(List.of(), Optional.empty(), List.of(), 0, Optional.empty());
    }
}
