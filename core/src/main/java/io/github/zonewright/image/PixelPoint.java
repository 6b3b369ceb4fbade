package io.github.zonewright.image;

/**
 * A place on an image in pixels: x right, y down. Pixel (i, j) covers [i, i+1) × [j, j+1), so its centre is at
 * (i + ½, j + ½).
 *
 * @param x to the right from the left edge, in px
 * @param y down from the top edge, in px
 */
public record PixelPoint(double x, double y) {

    /**
     * The distance to another place.
     *
     * @param other the other place
     * @return the distance in px
     */
    public double distanceTo(PixelPoint other) {
        return Math.hypot(x - other.x, y - other.y);
    }
}
