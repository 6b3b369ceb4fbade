package io.github.zonewright.imagej.overlay;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.pattern.PlacedSpot;
import java.util.List;

/**
 * How large marks are, in image px: so that neighbours stay apart, marks and letters can be seen at the present zoom, and
 * the area of a ring grows with the logarithm of the computed intensity over four decades.
 *
 * @param largest diameter of the strongest spot's ring
 * @param strongest the strongest intensity
 * @param letters height of the digits of the indices
 */
record MarkSize(double largest, double strongest, double letters) {
    private static final double DECADES = 4;
    private static final double SMALLEST_PART = 0.3;

    private static final double LEAST_ON_SCREEN = 9;
    private static final double LETTERS_ON_SCREEN = 8.5;

    /** For a view on an image of this size, shown with so many screen px for each of its px. */
    static MarkSize of(PatternView view, int width, int height, double zoom) {
        double side = Math.max(width, height);
        double spacing = view.placement()
                .map(p -> spacing(view.computed(), p.camera().centre()))
                .orElse(side / 12);
        double strongest = view.computed().stream()
                .mapToDouble(s -> s.spot().intensity())
                .max()
                .orElse(1);
        return new MarkSize(largest(spacing, side, zoom), strongest, letters(side, zoom));
    }

    /** Diameter of the largest mark, for marks that lie so far apart. */
    static double largest(double spacing, double side, double zoom) {
        double plain = Math.max(side / 90, Math.min(side / 22, 0.42 * spacing));
        return Math.max(plain, Math.min(LEAST_ON_SCREEN / zoom, 0.6 * spacing));
    }

    /** Height of digits. */
    static double letters(double side, double zoom) {
        return Math.max(side / 120, Math.min(side / 25, LETTERS_ON_SCREEN / zoom));
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
