package io.github.zonewright.imagej.session;

import io.github.zonewright.image.PixelPoint;
import java.util.Optional;

/**
 * Where the ruler was laid: at a spot, or at a pair g and −g.
 *
 * @param place the spot
 * @param opposite the spot −g, where a pair is read
 * @param error standard uncertainty of each coordinate in px
 * @param order which spot of its row it is, counted from the centre
 */
public record RulerPoint(PixelPoint place, Optional<PixelPoint> opposite, double error, int order) {
    /**
     * Checks the numbers.
     *
     * @throws IllegalArgumentException if the order is below 1 or the error negative
     */
    public RulerPoint {
        if (order < 1 || !(error >= 0)) {
            throw new IllegalArgumentException("order " + order + ", error " + error
                    + " px: expected an order of at least 1, an error of at least 0");
        }
    }
}
