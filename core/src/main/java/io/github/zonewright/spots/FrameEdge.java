package io.github.zonewright.spots;

/**
 * Corrects the position of spots that the edge of the image cuts. What is beyond the edge counts as zero, so the
 * response has its maximum too far inside. The tables give its distance from the edge for true distances in steps of 0.2
 * spot widths, calculated for a Gaussian spot and for an even disc of the same width at half height. Small spots are
 * taken for the former, large ones for the latter.
 */
final class FrameEdge {

    private static final double FIRST = -0.6;
    private static final double STEP = 0.2;
    private static final double[] GAUSSIAN = {
        0.55, 0.59, 0.65, 0.71, 0.77, 0.85, 0.95, 1.05, 1.17, 1.31, 1.47, 1.63, 1.81, 2.00
    };
    private static final double[] DISC = {
        0.23, 0.33, 0.41, 0.49, 0.59, 0.69, 0.79, 0.91, 1.03, 1.19, 1.39, 1.60, 1.80, 2.00
    };
    /** Widths in pixels up to which a spot is a Gaussian, and from which it is a disc. */
    private static final double SHARP = 3;

    private static final double BLUNT = 6;
    /** Spots nearer to the edge than this many widths may as well be beyond it. */
    private static final double INSIDE = 0.15;

    private FrameEdge() {}

    /** The coordinate that a spot seen at another one truly has. */
    static double corrected(double seen, double side, double sigma) {
        if (seen > side / 2) {
            return side - corrected(side - seen, side, sigma);
        }
        double distance = seen / sigma;
        if (distance >= GAUSSIAN[GAUSSIAN.length - 1]) {
            return seen;
        }
        int k = 1;
        while (k < GAUSSIAN.length - 1 && table(k, sigma) < distance) {
            k++;
        }
        double before = table(k - 1, sigma);
        double share = Math.max(0, (distance - before) / (table(k, sigma) - before));
        return sigma * (FIRST + STEP * (k - 1 + share));
    }

    private static double table(int k, double sigma) {
        double disc = Math.max(0, Math.min(1, (sigma - SHARP) / (BLUNT - SHARP)));
        return (1 - disc) * GAUSSIAN[k] + disc * DISC[k];
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
