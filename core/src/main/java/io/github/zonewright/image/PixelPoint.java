package io.github.zonewright.image;

import io.github.zonewright.geometry.Vector2;

/**
 * A place on an image, in pixels: x to the right, y down, (0, 0) the outer corner of the first pixel, whose centre is
 * (½, ½). It may lie outside the frame.
 *
 * @param x distance from the left edge, in pixels
 * @param y distance from the upper edge, in pixels
 */
public record PixelPoint(double x, double y) {

    /**
     * Checks the coordinates.
     *
     * @throws IllegalArgumentException if a coordinate is not finite
     */
    public PixelPoint {
        if (!Double.isFinite(x) || !Double.isFinite(y)) {
            throw new IllegalArgumentException("pixel point (" + x + ", " + y + "): expected finite coordinates");
        }
    }

    /**
     * The distance to another point.
     *
     * @param other the other point
     * @return the distance in pixels
     */
    public double distanceTo(PixelPoint other) {
        return Math.hypot(x - other.x, y - other.y);
    }

    /**
     * The way from another point to this one.
     *
     * @param origin where the way starts
     * @return this minus the origin, in pixels, y still pointing down
     */
    public Vector2 minus(PixelPoint origin) {
        return new Vector2(x - origin.x, y - origin.y);
    }

    /**
     * The point reached by a shift.
     *
     * @param shift in pixels, y down
     * @return the shifted point
     */
    public PixelPoint plus(Vector2 shift) {
        return new PixelPoint(x + shift.x(), y + shift.y());
    }

    /**
     * The point half-way to another.
     *
     * @param other the other point
     * @return the midpoint
     */
    public PixelPoint midpoint(PixelPoint other) {
        return new PixelPoint((x + other.x) / 2, (y + other.y) / 2);
    }
}
