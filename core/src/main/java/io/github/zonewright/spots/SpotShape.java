package io.github.zonewright.spots;

/**
 * The shape of a spot, from a Gaussian to a disc: 2^−(q/q₀)ⁿ with q the squared distance in spot widths, stretched, and q₀
 * that of half the height of a Gaussian.
 *
 * @param size how much larger than the spot width, as a part of its square
 * @param along how much longer along x than along y, the same
 * @param across how much longer along the diagonal down to the right than across it, the same
 * @param sharpness logarithm of the exponent n: 0 for a Gaussian, more for a disc
 */
record SpotShape(double size, double along, double across, double sharpness) {

    static final int UNKNOWNS = 4;
    /** Slopes along x and y, and with each number of the shape. */
    static final int SLOPES = 2 + UNKNOWNS;

    private static final double HALF = 2 * Math.log(2);
    private static final double LEAST = 1e-9;
    /** Departures beyond these leave what may be called a spot. */
    private static final double MOST_STRETCH = 0.85;

    private static final double MOST_SHARPNESS = 2;

    /**
     * A shape that is expected, and how far a spot may depart from it.
     *
     * @param shape the shape
     * @param size standard deviation of the size
     * @param stretch that of each of the two stretches
     * @param sharpness that of the sharpness
     */
    record Expected(SpotShape shape, double size, double stretch, double sharpness) {

        double precision(int which) {
            double deviation = which == 0 ? size : which == 3 ? sharpness : stretch;
            return 1 / (deviation * deviation);
        }

        double departure(SpotShape other) {
            double sum = 0;
            for (int i = 0; i < UNKNOWNS; i++) {
                double off = other.values()[i] - shape.values()[i];
                sum += precision(i) * off * off;
            }
            return sum;
        }
    }

    double[] values() {
        return new double[] {size, along, across, sharpness};
    }

    boolean isPossible() {
        return size + Math.hypot(along, across) < MOST_STRETCH && Math.abs(sharpness) < MOST_SHARPNESS;
    }

    /** The direction in which this shape is longer than another, in radians from x towards y. */
    double azimuth(SpotShape other) {
        return 0.5 * Math.atan2(across - other.across, along - other.along);
    }

    /** Height at a place, 1 at the centre. */
    double at(double dx, double dy) {
        double q = Math.max(LEAST, square(dx, dy)) / HALF;
        return Math.exp(-Math.log(2) * (sharpness == 0 ? q : Math.pow(q, Math.exp(sharpness))));
    }

    /** The same, with the slopes along dx and dy and with each number of the shape. */
    double at(double dx, double dy, double[] slopes) {
        double q = Math.max(LEAST, square(dx, dy)) / HALF;
        double n = Math.exp(sharpness);
        double power = Math.log(2) * (sharpness == 0 ? q : Math.pow(q, n));
        double height = Math.exp(-power);
        double withSquare = -height * power * n / (q * HALF);
        slopes[0] = 2 * withSquare * ((1 - size - along) * dx - across * dy);
        slopes[1] = 2 * withSquare * ((1 - size + along) * dy - across * dx);
        slopes[2] = -withSquare * (dx * dx + dy * dy);
        slopes[3] = -withSquare * (dx * dx - dy * dy);
        slopes[4] = -withSquare * 2 * dx * dy;
        slopes[5] = -height * power * n * Math.log(q);
        return height;
    }

    private double square(double dx, double dy) {
        return (1 - size) * (dx * dx + dy * dy) - along * (dx * dx - dy * dy) - 2 * across * dx * dy;
    }
}
