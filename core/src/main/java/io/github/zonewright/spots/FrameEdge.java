package io.github.zonewright.spots;

/**
 * Corrects the position of spots that the edge of the image cuts. What is beyond the edge counts as zero, so the
 * response has its maximum too far inside. The table gives its distance from the edge for true distances in steps of 0.2
 * spot widths, calculated as the mean of a Gaussian spot and an even disc of the same width at half height; the two
 * differ by up to 0.2 widths.
 */
final class FrameEdge {

    private static final double FIRST = -0.6;
    private static final double STEP = 0.2;
    private static final double[] SEEN = {
        0.39, 0.46, 0.53, 0.60, 0.68, 0.77, 0.87, 0.98, 1.10, 1.25, 1.43, 1.61, 1.80, 2.00
    };
    /** Spots nearer to the edge than this many widths may as well be beyond it. */
    private static final double INSIDE = 0.15;

    private FrameEdge() {}

    /** The coordinate that a spot seen at another one truly has. */
    static double corrected(double seen, double side, double sigma) {
        if (seen > side / 2) {
            return side - corrected(side - seen, side, sigma);
        }
        double distance = seen / sigma;
        if (distance >= SEEN[SEEN.length - 1]) {
            return seen;
        }
        int k = 1;
        while (k < SEEN.length - 1 && SEEN[k] < distance) {
            k++;
        }
        double share = Math.max(0, (distance - SEEN[k - 1]) / (SEEN[k] - SEEN[k - 1]));
        return sigma * (FIRST + STEP * (k - 1 + share));
    }

    static boolean isInside(double coordinate, double side, double sigma) {
        return Math.min(coordinate, side - coordinate) > INSIDE * sigma;
    }

    /** The standard deviation that the correction leaves, in pixels. */
    static double error(double coordinate, double side, double sigma) {
        double distance = Math.max(0, Math.min(coordinate, side - coordinate));
        return Math.max(0, 0.15 * (1.8 * sigma - distance));
    }
}
