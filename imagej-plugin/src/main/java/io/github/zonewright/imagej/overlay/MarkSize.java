package io.github.zonewright.imagej.overlay;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.pattern.PlacedSpot;
import java.util.List;

/**
 * How large marks are, in image px: so that neighbours stay apart, and the area of a ring grows with the logarithm of the
 * computed intensity over four decades.
 *
 * @param largest diameter of the strongest spot's ring
 * @param strongest the strongest intensity
 */
record MarkSize(double largest, double strongest) {
    private static final double DECADES = 4;
    private static final double SMALLEST_PART = 0.3;

    static MarkSize of(PatternView view, int width, int height) {
        double side = Math.max(width, height);
        double spacing = view.placement()
                .map(p -> spacing(view.computed(), p.camera().centre()))
                .orElse(side / 12);
        double largest = Math.max(side / 90, Math.min(side / 22, 0.42 * spacing));
        double strongest = view.computed().stream()
                .mapToDouble(s -> s.spot().intensity())
                .max()
                .orElse(1);
        return new MarkSize(largest, strongest);
    }

    /** Distance from the centre to the nearest spot, which is the shortest row of the net. */
    private static double spacing(List<PlacedSpot> spots, PixelPoint centre) {
        return spots.stream()
                .mapToDouble(s -> s.position().distanceTo(centre))
                .min()
                .orElse(Double.POSITIVE_INFINITY);
    }

    double of(PlacedSpot spot) {
        double part = 1 + Math.log10(spot.spot().intensity() / strongest) / DECADES;
        double clipped = Math.min(1, Math.max(0, part));
        double least = SMALLEST_PART * SMALLEST_PART;
        return largest * Math.sqrt(least + (1 - least) * clipped);
    }

    double measured() {
        return 0.9 * largest;
    }

    double centre() {
        return 1.3 * largest;
    }
}
