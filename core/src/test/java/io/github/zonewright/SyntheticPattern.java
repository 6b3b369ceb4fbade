package io.github.zonewright;

import io.github.zonewright.image.GrayImage;
import java.util.Random;

/** A pattern drawn straight from formulas, sampled at 5 × 5 points per pixel: the tests' own truth. */
public final class SyntheticPattern {

    private static final int FINE = 5;

    private final int width;
    private final int height;
    private final double[] electrons;

    public SyntheticPattern(int width, int height, double background) {
        this.width = width;
        this.height = height;
        this.electrons = new double[width * height];
        java.util.Arrays.fill(electrons, background);
    }

    /** A function of the place. */
    public interface Shape {
        double at(double x, double y);
    }

    public SyntheticPattern add(Shape shape) {
        for (int row = 0; row < height; row++) {
            for (int column = 0; column < width; column++) {
                electrons[row * width + column] += shape.at(column + 0.5, row + 0.5);
            }
        }
        return this;
    }

    /** A Gaussian spot whose height is in electrons per pixel. */
    public SyntheticPattern spot(double x, double y, double sigma, double peak) {
        return fine(x, y, 6 * sigma, (u, v) -> peak * Math.exp(-0.5 * (u * u + v * v) / (sigma * sigma)));
    }

    /** An even disc. */
    public SyntheticPattern disc(double x, double y, double radius, double level) {
        return fine(x, y, radius + 1, (u, v) -> u * u + v * v < radius * radius ? level : 0);
    }

    private SyntheticPattern fine(double x, double y, double reach, Shape shape) {
        for (int row = Math.max(0, (int) (y - reach)); row < Math.min(height, y + reach); row++) {
            for (int column = Math.max(0, (int) (x - reach)); column < Math.min(width, x + reach); column++) {
                double sum = 0;
                for (int k = 0; k < FINE * FINE; k++) {
                    sum += shape.at(column + (k % FINE + 0.5) / FINE - x, row + (k / FINE + 0.5) / FINE - y);
                }
                electrons[row * width + column] += sum / (FINE * FINE);
            }
        }
        return this;
    }

    /** Multiplies the electrons, as a beam stop does. */
    public SyntheticPattern times(Shape factor) {
        for (int row = 0; row < height; row++) {
            for (int column = 0; column < width; column++) {
                electrons[row * width + column] *= factor.at(column + 0.5, row + 0.5);
            }
        }
        return this;
    }

    /** Poisson counts times a gain plus readout noise of a few grey values, as floating-point numbers. */
    public float[] counted(long seed, double gain, double readout) {
        Random random = new Random(seed);
        float[] values = new float[electrons.length];
        for (int i = 0; i < values.length; i++) {
            values[i] = (float) (gain * poisson(random, electrons[i]) + readout * random.nextGaussian());
        }
        return values;
    }

    public GrayImage floats(long seed) {
        return GrayImage.ofFloats(width, height, counted(seed, 1, 0.5));
    }

    /** A 16-bit image on a pedestal of 100. */
    public GrayImage shorts(long seed, double gain) {
        float[] values = counted(seed, gain, 1);
        short[] result = new short[values.length];
        for (int i = 0; i < result.length; i++) {
            result[i] = (short) Math.round(Math.max(0, Math.min(65535, 100 + values[i])));
        }
        return GrayImage.ofUnsignedShorts(width, height, result);
    }

    /** An 8-bit image. */
    public GrayImage bytes(long seed, double gain) {
        float[] values = counted(seed, gain, 0.5);
        byte[] result = new byte[values.length];
        for (int i = 0; i < result.length; i++) {
            result[i] = (byte) Math.round(Math.max(0, Math.min(255, values[i])));
        }
        return GrayImage.ofUnsignedBytes(width, height, result);
    }

    /** Knuth's product of uniform numbers up to a mean of 30, a rounded normal deviate above. */
    private static double poisson(Random random, double mean) {
        if (mean > 30) {
            return Math.max(0, Math.rint(mean + Math.sqrt(mean) * random.nextGaussian()));
        }
        double limit = Math.exp(-mean);
        int count = 0;
        for (double product = random.nextDouble(); product > limit; product *= random.nextDouble()) {
            count++;
        }
        return count;
    }
}
