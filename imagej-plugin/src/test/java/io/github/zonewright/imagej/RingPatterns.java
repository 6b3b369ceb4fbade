package io.github.zonewright.imagej;

import ij.ImagePlus;
import ij.process.FloatProcessor;
import java.util.Random;

/**
 * Powder rings drawn by plain arithmetic, with nothing of the library in it: Gaussian rings of a face-centred cubic powder
 * about a centre, stretched to an ellipse, on a glow, with noise.
 */
public final class RingPatterns {
    /** Side in px. */
    public static final int SIDE = 400;
    /** Camera constant in px·Å. */
    public static final double CONSTANT = 180;
    /** Long axis over short axis. */
    public static final double RATIO = 1.02;
    /** Azimuth of the long axis on the screen in degrees, counter-clockwise from the right. */
    public static final double AZIMUTH = 33;
    /** Centre in px from the left edge. */
    public static final double X = 196.3;
    /** Centre in px from the upper edge. */
    public static final double Y = 203.8;

    /** λ at 200 kV: 0.0250793 Å, a value of the common tables. */
    private static final double WAVELENGTH = 0.0250793;
    /** Cell edge of aluminium in Å (ICDD 4-787: 4.0494), from memory. */
    private static final double EDGE = 4.0494;
    /** h² + k² + l² of the lines of a face-centred lattice, and a made-up strength of each. */
    private static final double[][] LINES = {{3, 1}, {4, 0.5}, {8, 0.4}, {11, 0.45}, {12, 0.15}, {19, 0.18}, {20, 0.16}
    };

    private RingPatterns() {}

    /** The rings of aluminium. */
    public static ImagePlus aluminium() {
        return image(LINES.length);
    }

    /** The first rings of it alone. */
    public static ImagePlus image(int rings) {
        Random noise = new Random(33);
        double azimuth = Math.toRadians(AZIMUTH);
        FloatProcessor pixels = new FloatProcessor(SIDE, SIDE);
        for (int row = 0; row < SIDE; row++) {
            for (int column = 0; column < SIDE; column++) {
                double right = column + 0.5 - X;
                double up = Y - (row + 0.5);
                double along = (right * Math.cos(azimuth) + up * Math.sin(azimuth)) / Math.sqrt(RATIO);
                double across = (up * Math.cos(azimuth) - right * Math.sin(azimuth)) * Math.sqrt(RATIO);
                double r = Math.hypot(along, across);
                double mean = 50 + 600 * Math.exp(-r / 70);
                for (int k = 0; k < rings; k++) {
                    double theta = Math.asin(WAVELENGTH * Math.sqrt(LINES[k][0]) / (2 * EDGE));
                    double off = (r - CONSTANT / WAVELENGTH * Math.tan(2 * theta)) / 2.2;
                    mean += 400 * LINES[k][1] * Math.exp(-off * off / 2);
                }
                pixels.setf(column, row, (float) (mean + Math.sqrt(mean) * noise.nextGaussian()));
            }
        }
        return new ImagePlus("aluminium rings", pixels);
    }
}
