package io.github.zonewright.spots;

import io.github.zonewright.image.PixelPoint;
import java.util.stream.IntStream;

/**
 * How round the response around a peak is: the first three waves of its values on two circles.
 *
 * @param uneven the greatest amplitude of a wave, over the height of the peak
 * @param chance what noise makes of that
 */
record Roundness(double uneven, double chance) {

    /** Radii of the circles in spot widths. */
    private static final double[] RADII = {1.6, 2.8};

    private static final int PLACES = 16;
    private static final int WAVES = 3;
    private static final double[] COSINE = IntStream.range(0, PLACES)
            .mapToDouble(i -> Math.cos(2 * Math.PI * i / PLACES))
            .toArray();
    /** Share of the height from which on a wave is odd. */
    private static final double ODD = 0.018;
    /** The same in units of what noise makes. */
    private static final double SURE = 3.5;
    /** Amplitude that noise makes, over the noise of the response (drawn noise). */
    private static final double OF_NOISE = 0.6;

    static Roundness of(SpotGauge gauge, PeakSearch.Peak peak) {
        double most = 0;
        for (double radius : RADII) {
            most = Math.max(most, wave(gauge, peak, radius * gauge.sigma()));
        }
        return new Roundness(most / peak.height(), OF_NOISE * peak.noise() / peak.height());
    }

    private static double wave(SpotGauge gauge, PeakSearch.Peak peak, double radius) {
        double[] real = new double[WAVES];
        double[] imaginary = new double[WAVES];
        for (int i = 0; i < PLACES; i++) {
            double value = gauge.response()
                    .interpolated(new PixelPoint(peak.x() + radius * COSINE[i], peak.y() + radius * COSINE[sine(i)]));
            for (int wave = 0; wave < WAVES; wave++) {
                int turned = (wave + 1) * i % PLACES;
                real[wave] += value * COSINE[turned];
                imaginary[wave] += value * COSINE[sine(turned)];
            }
        }
        double most = 0;
        for (int wave = 0; wave < WAVES; wave++) {
            most = Math.max(most, 2 * Math.hypot(real[wave], imaginary[wave]) / PLACES);
        }
        return most;
    }

    /** Where in the table of cosines the sine stands, a quarter of a turn before. */
    private static int sine(int place) {
        return (place + PLACES - PLACES / 4) % PLACES;
    }

    boolean isOdd() {
        return uneven > ODD && uneven > SURE * chance;
    }
}
