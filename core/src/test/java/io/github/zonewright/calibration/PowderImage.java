package io.github.zonewright.calibration;

import io.github.zonewright.image.GrayImage;
import java.util.Random;

/**
 * A powder pattern drawn by plain arithmetic, with nothing of the library in it but the image type: rings of spacings d about
 * a centre, each a Gaussian in the undistorted radius, on a background that falls off, with a beam stop and Poisson noise.
 */
final class PowderImage {

    /** h² + k² + l² of the lines of a cubic face-centred lattice, and a made-up, plausible strength of each. */
    static final double[][] FACE_CENTRED = {
        {3, 1}, {4, 0.5}, {8, 0.4}, {11, 0.45}, {12, 0.15}, {16, 0.07}, {19, 0.18}, {20, 0.16}, {24, 0.12}
    };

    /** The same of the diamond structure. */
    static final double[][] DIAMOND = {{3, 1}, {8, 0.8}, {11, 0.5}, {16, 0.15}, {19, 0.2}, {24, 0.25}, {27, 0.12}};

    int size = 512;
    double x = 251.3;
    double y = 262.8;
    double constant = 220;
    double ratio = 1.02;
    double azimuth = Math.toRadians(33);
    double sigma = 2.5;
    double height = 120;
    double background = 60;
    boolean stop = true;
    boolean spotty;
    double texture;
    double[][] lines = FACE_CENTRED;
    double a = 4.0495;
    /** λ at 200 kV: 0.0250793 Å, a value of the common tables. */
    double wavelength = 0.0250793;

    double radius(double d) {
        double theta = Math.asin(wavelength / (2 * d));
        return constant / wavelength * Math.tan(2 * theta);
    }

    GrayImage draw(long seed) {
        Random random = new Random(seed);
        double[][] rings = new double[lines.length][];
        for (int k = 0; k < lines.length; k++) {
            rings[k] = new double[] {radius(a / Math.sqrt(lines[k][0])), height * lines[k][1]};
        }
        double[][] grains = new double[rings.length][360];
        for (double[] ring : grains) {
            for (int i = 0; i < ring.length; i++) {
                ring[i] = spotty ? (random.nextDouble() < 0.25 ? 4 * random.nextDouble() : 0.2) : 1;
            }
        }
        float[] values = new float[size * size];
        double root = Math.sqrt(ratio);
        for (int row = 0; row < size; row++) {
            for (int column = 0; column < size; column++) {
                double right = column + 0.5 - x;
                double up = y - (row + 0.5);
                double along = (right * Math.cos(azimuth) + up * Math.sin(azimuth)) / root;
                double across = (up * Math.cos(azimuth) - right * Math.sin(azimuth)) * root;
                double r = Math.sqrt(along * along + across * across);
                double turn = Math.atan2(across, along) + azimuth;
                double mean = 5 + background * Math.exp(-r / 90) + 2000 * Math.exp(-r * r / 200);
                int degree = (int) Math.floorMod((long) Math.floor(Math.toDegrees(turn)), 360L);
                for (int k = 0; k < rings.length; k++) {
                    double u = (r - rings[k][0]) / sigma;
                    if (Math.abs(u) < 6) {
                        double strength = rings[k][1] * (1 + texture * Math.cos(2 * turn + k));
                        mean += grains[k][degree] * strength * Math.exp(-u * u / 2);
                    }
                }
                if (stop && (Math.hypot(right, up) < 28 || (right < 0 && Math.abs(up + 0.2 * right) < 11))) {
                    mean *= 0.02;
                }
                values[row * size + column] = poisson(random, mean);
            }
        }
        return GrayImage.ofFloats(size, size, values);
    }

    /** A product of uniform numbers up to a mean of 40 (Knuth), a rounded normal deviate above. */
    private static float poisson(Random random, double mean) {
        if (mean > 40) {
            return (float) Math.max(0, Math.rint(mean + Math.sqrt(mean) * random.nextGaussian()));
        }
        double limit = Math.exp(-mean);
        int count = 0;
        for (double product = random.nextDouble(); product > limit; product *= random.nextDouble()) {
            count++;
        }
        return count;
    }
}
