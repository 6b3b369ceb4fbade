package io.github.zonewright.image;

import io.github.zonewright.geometry.Vector2;

/**
 * The grey value along a straight line, averaged across a band about it: what a spot looks like along a row.
 *
 * <p>Values between pixels are interpolated linearly. Points outside the frame and without data do not count; where none of a
 * band is left, the value is NaN.
 */
public final class LineProfile {

    private static final int LONGEST = 100_000;

    private final double step;
    private final double[] values;

    private LineProfile(double step, double[] values) {
        this.step = step;
        this.values = values;
    }

    /**
     * The profile from one point to another.
     *
     * @param image the image
     * @param from where it begins
     * @param to where it ends
     * @param width width of the band in pixels, 0 or more; 0 for the line alone
     * @return values at steps of at most one pixel, both ends included
     * @throws IllegalArgumentException if the line is shorter than one pixel or longer than 100 000, or the width negative or
     *     above 1000 px
     */
    public static LineProfile of(GrayImage image, PixelPoint from, PixelPoint to, double width) {
        Vector2 way = to.minus(from);
        double length = way.norm();
        if (!(length >= 1 && length <= LONGEST) || !(width >= 0 && width <= 1000)) {
            throw new IllegalArgumentException("profile of " + length + " px, " + width
                    + " px wide: expected a length of 1 to " + LONGEST + " px and a width of 0 to 1000 px");
        }
        int steps = (int) Math.ceil(length);
        int across = (int) Math.ceil(width);
        Vector2 normal = new Vector2(-way.y(), way.x()).times(1 / length);
        double[] values = new double[steps + 1];
        for (int i = 0; i <= steps; i++) {
            PixelPoint middle = from.plus(way.times((double) i / steps));
            double sum = 0;
            int count = 0;
            for (int k = 0; k <= across; k++) {
                double off = across == 0 ? 0 : width * ((double) k / across - 0.5);
                PixelPoint point = middle.plus(normal.times(off));
                double value = image.contains(point) ? image.interpolated(point) : Double.NaN;
                if (!Double.isNaN(value)) {
                    sum += value;
                    count++;
                }
            }
            values[i] = count == 0 ? Double.NaN : sum / count;
        }
        return new LineProfile(length / steps, values);
    }

    /**
     * The distance from one value to the next.
     *
     * @return in pixels, at most 1
     */
    public double step() {
        return step;
    }

    /**
     * The number of values.
     *
     * @return at least 2
     */
    public int size() {
        return values.length;
    }

    /**
     * A value.
     *
     * @param index from 0 at the beginning of the line
     * @return mean grey value across the band, NaN where there are no data
     */
    public double value(int index) {
        return values[index];
    }
}
