package io.github.zonewright.spots;

import io.github.zonewright.image.GrayImage;
import java.util.Random;

/**
 * Counts on a detector, drawn by code that shares nothing with the library: means added up point by point, then Poisson
 * deviates, a gain and readout noise.
 */
final class DrawnSpots {

    final int side;
    final double[] mean;

    /** What a spot looks like: height at a distance in pixels, 1 in the middle. */
    interface Form {
        double at(double dx, double dy);
    }

    static Form gaussian(double sigma) {
        return (dx, dy) -> Math.exp(-(dx * dx + dy * dy) / (2 * sigma * sigma));
    }

    /** An even disc whose edge is blurred linearly. */
    static Form disc(double radius, double blur) {
        return (dx, dy) -> Math.max(0, Math.min(1, 0.5 + (radius - Math.hypot(dx, dy)) / (2 * blur)));
    }

    DrawnSpots(int side, double level) {
        this.side = side;
        this.mean = new double[side * side];
        java.util.Arrays.fill(mean, level);
    }

    DrawnSpots spot(Form form, double reach, double x, double y, double height) {
        for (int row = (int) Math.max(0, y - reach); row < Math.min(side, y + reach + 1); row++) {
            for (int column = (int) Math.max(0, x - reach); column < Math.min(side, x + reach + 1); column++) {
                double sum = 0;
                for (int k = 0; k < 25; k++) {
                    sum += form.at(column + (k % 5 + 0.5) / 5 - x, row + (k / 5 + 0.5) / 5 - y);
                }
                mean[row * side + column] += height * sum / 25;
            }
        }
        return this;
    }

    DrawnSpots glow(double x, double y, double height, double reach) {
        for (int i = 0; i < mean.length; i++) {
            double r = Math.hypot(i % side + 0.5 - x, i / side + 0.5 - y);
            mean[i] += height * Math.exp(-r / reach);
        }
        return this;
    }

    GrayImage image(long seed, double gain, double readout, int limit) {
        Random random = new Random(seed);
        short[] grey = new short[mean.length];
        for (int i = 0; i < grey.length; i++) {
            double value = 100 + gain * counts(random, mean[i]) + readout * random.nextGaussian();
            grey[i] = (short) (int) Math.max(0, Math.min(limit, Math.rint(value)));
        }
        return GrayImage.ofUnsignedShorts(side, side, grey);
    }

    /** Waiting times up to a mean of 40, above that a normal deviate. */
    private static double counts(Random random, double expected) {
        if (expected > 40) {
            return Math.max(0, Math.rint(expected + Math.sqrt(expected) * random.nextGaussian()));
        }
        int count = -1;
        for (double time = 0; time < expected; count++) {
            time -= Math.log(1 - random.nextDouble());
        }
        return Math.max(0, count);
    }
}
