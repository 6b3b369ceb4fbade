package io.github.zonewright.spots;

import io.github.zonewright.image.PixelPoint;

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
            double azimuth = 2 * Math.PI * i / PLACES;
            double value = gauge.response()
                    .interpolated(new PixelPoint(
                            peak.x() + radius * Math.cos(azimuth), peak.y() + radius * Math.sin(azimuth)));
            for (int wave = 1; wave <= WAVES; wave++) {
                real[wave - 1] += value * Math.cos(wave * azimuth);
                imaginary[wave - 1] += value * Math.sin(wave * azimuth);
            }
        }
        double most = 0;
        for (int wave = 0; wave < WAVES; wave++) {
            most = Math.max(most, 2 * Math.hypot(real[wave], imaginary[wave]) / PLACES);
        }
        return most;
    }

    boolean isOdd() {
        return uneven > ODD && uneven > SURE * chance;
    }
}
