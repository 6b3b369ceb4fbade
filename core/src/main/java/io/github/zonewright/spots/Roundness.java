package io.github.zonewright.spots;

import io.github.zonewright.image.PixelPoint;
import java.util.stream.IntStream;

/** Tells whether the response around a peak is round, from the first three waves of its values on two circles. */
final class Roundness {

    /** Radii of the circles in spot widths. */
    private static final double[] RADII = {1.6, 2.8};

    private static final int PLACES = 16;
    private static final int WAVES = 3;
    private static final double[] COSINE = IntStream.range(0, PLACES)
            .mapToDouble(i -> Math.cos(2 * Math.PI * i / PLACES))
            .toArray();
    /** Share of the height from which on the amplitude of a wave is odd. */
    private static final double ODD = 0.018;
    /** The same in units of what noise makes. */
    private static final double SURE = 3.5;
    /** Amplitude that noise makes, over the noise of the response (drawn noise). */
    private static final double OF_NOISE = 0.6;

    private Roundness() {}

    /** Whether a wave is higher than noise and a single spot make it. */
    static boolean isOdd(SpotGauge gauge, PeakSearch.Peak peak) {
        double limit = Math.max(ODD * peak.height(), SURE * OF_NOISE * peak.noise());
        double[] values = new double[PLACES];
        for (double radius : RADII) {
            read(gauge, peak, radius * gauge.sigma(), values);
            if (mayReach(values, limit) && reaches(values, limit)) {
                return true;
            }
        }
        return false;
    }

    private static void read(SpotGauge gauge, PeakSearch.Peak peak, double radius, double[] values) {
        for (int i = 0; i < PLACES; i++) {
            values[i] = gauge.response()
                    .interpolated(new PixelPoint(peak.x() + radius * COSINE[i], peak.y() + radius * COSINE[sine(i)]));
        }
    }

    /** Whether the values scatter so much that a wave may be higher than the limit: its square is twice its share of the variance. */
    private static boolean mayReach(double[] values, double limit) {
        double sum = 0;
        double squares = 0;
        for (double value : values) {
            double excess = value - values[0];
            sum += excess;
            squares += excess * excess;
        }
        return 2 * (squares - sum * sum / PLACES) > PLACES * limit * limit;
    }

    /** Whether the amplitude of a wave is higher than the limit. */
    private static boolean reaches(double[] values, double limit) {
        double least = limit * PLACES / 2;
        for (int wave = 1; wave <= WAVES; wave++) {
            double real = 0;
            double imaginary = 0;
            for (int i = 0; i < PLACES; i++) {
                int turned = wave * i % PLACES;
                real += values[i] * COSINE[turned];
                imaginary += values[i] * COSINE[sine(turned)];
            }
            if (real * real + imaginary * imaginary > least * least) {
                return true;
            }
        }
        return false;
    }

    /** Where in the table of cosines the sine stands, a quarter of a turn before. */
    private static int sine(int place) {
        return (place + PLACES - PLACES / 4) % PLACES;
    }
}
