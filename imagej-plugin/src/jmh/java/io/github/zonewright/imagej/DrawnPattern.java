package io.github.zonewright.imagej;

import java.util.Random;

/**
 * Invented 16-bit patterns of 1024 × 1024 pixels for the benchmarks: a square net with counting noise on a glow, and
 * by name "clean", "stopped" (a strong glow and a beam stop), "dense" (some 3600 small spots) or "discs" (wide spots).
 */
final class DrawnPattern {
    static final int SIZE = 1024;
    /** Counts in the dark parts; the noise is the root. */
    static final double DARK = 35;

    private static final double CENTRE_X = 520;
    private static final double CENTRE_Y = 505;
    private static final double TURN = 0.3;

    private DrawnPattern() {}

    /** Distance of the net's nodes in pixels. */
    static double spacing(String name) {
        return name.equals("dense") ? 17 : 62;
    }

    static short[] pixels(String name) {
        double spacing = spacing(name);
        double sigma = name.equals("dense") ? 1.5 : name.equals("discs") ? 6 : 2;
        double glow = name.equals("clean") ? 60 : 1500;
        double[] electrons = new double[SIZE * SIZE];
        for (int i = 0; i < electrons.length; i++) {
            double r = Math.hypot(i % SIZE + 0.5 - CENTRE_X, i / SIZE + 0.5 - CENTRE_Y);
            electrons[i] = DARK + glow / (1 + r * r / 6400);
        }
        for (int h = -40; h <= 40; h++) {
            for (int k = -40; k <= 40; k++) {
                double u = spacing * h;
                double v = spacing * k;
                double x = CENTRE_X + Math.cos(TURN) * u - Math.sin(TURN) * v;
                double y = CENTRE_Y - Math.sin(TURN) * u - Math.cos(TURN) * v;
                double height = h == 0 && k == 0 ? 40_000 : 6000 * Math.exp(-Math.hypot(u, v) / 160) + 30;
                spot(electrons, x, y, sigma, height);
            }
        }
        if (name.equals("stopped")) {
            shade(electrons);
        }
        return counted(electrons);
    }

    private static void spot(double[] electrons, double x, double y, double sigma, double peak) {
        double reach = 6 * sigma;
        for (int row = Math.max(0, (int) (y - reach)); row < Math.min(SIZE, y + reach); row++) {
            for (int column = Math.max(0, (int) (x - reach)); column < Math.min(SIZE, x + reach); column++) {
                double dx = column + 0.5 - x;
                double dy = row + 0.5 - y;
                electrons[row * SIZE + column] += peak * Math.exp(-0.5 * (dx * dx + dy * dy) / (sigma * sigma));
            }
        }
    }

    /** A stop from the right edge to the centre. */
    private static void shade(double[] electrons) {
        for (int i = 0; i < electrons.length; i++) {
            double x = i % SIZE - CENTRE_X;
            if (x > -20 && Math.abs(i / SIZE - CENTRE_Y) < 22 + 0.03 * x) {
                electrons[i] = 0.02 * electrons[i] + 2;
            }
        }
    }

    private static short[] counted(double[] electrons) {
        Random random = new Random(1);
        short[] values = new short[electrons.length];
        for (int i = 0; i < values.length; i++) {
            double counted = electrons[i] + Math.sqrt(electrons[i]) * random.nextGaussian();
            values[i] = (short) (int) Math.rint(Math.max(0, Math.min(65_535, counted)));
        }
        return values;
    }
}
