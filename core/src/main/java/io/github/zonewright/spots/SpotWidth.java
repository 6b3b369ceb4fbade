package io.github.zonewright.spots;

import io.github.zonewright.image.Background;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.image.PointFilter;
import java.util.Arrays;
import java.util.List;
import java.util.OptionalDouble;

/**
 * Estimates the width of the spots of an image: the radius at which the strongest spots, averaged over the azimuth, fall
 * to half their height, taken as that of a Gaussian (1.177 σ). The spots are found with a trial width, and again with
 * the width so found, until it stays.
 */
final class SpotWidth {

    static final double SMALLEST = 0.7;
    static final double LARGEST = 14;
    private static final double TRIAL = 2;
    private static final double STEADY = 1.35;
    private static final int ROUNDS = 4;
    private static final int STRONGEST = 30;
    private static final double CLEAR = 8;
    private static final double HALF_MAXIMUM = Math.sqrt(2 * Math.log(2));
    private static final int AZIMUTHS = 16;

    private SpotWidth() {}

    /**
     * The width of the spots.
     *
     * @param flat the image less its background
     * @param isSaturated tells which pixels are at the limit
     * @return standard deviation in pixels, the trial width when no spot is clear enough
     */
    static double of(GrayImage flat, Mask saturated) {
        double sigma = TRIAL;
        for (int round = 0; round < ROUNDS; round++) {
            OptionalDouble found = measuredWith(flat, saturated, sigma);
            if (found.isEmpty()) {
                return sigma;
            }
            double next = Math.max(SMALLEST, Math.min(LARGEST, found.getAsDouble()));
            boolean steady = next < sigma * STEADY;
            sigma = next;
            if (steady) {
                break;
            }
        }
        return sigma;
    }

    private static OptionalDouble measuredWith(GrayImage flat, Mask saturated, double sigma) {
        GrayImage response = PointFilter.ofSigma(sigma).apply(flat);
        Background scatter =
                Background.of(response, Math.max(16, (int) (6 * sigma)), Mask.none(flat.width(), flat.height()));
        List<PeakSearch.Peak> peaks = new PeakSearch(response, sigma).find(scatter.noise(), CLEAR);
        double[] widths = new double[STRONGEST];
        int count = 0;
        for (PeakSearch.Peak peak : peaks) {
            if (count < STRONGEST
                    && peak.roundness() > 0.5
                    && !isSaturated(saturated, peak.x(), peak.y(), (int) Math.ceil(sigma))) {
                double radius = halfRadius(flat, peak.x(), peak.y(), 4 * sigma + 4);
                if (radius > 0) {
                    widths[count++] = radius / HALF_MAXIMUM;
                }
            }
        }
        if (count < 3) {
            return OptionalDouble.empty();
        }
        Arrays.sort(widths, 0, count);
        return OptionalDouble.of(widths[count / 2]);
    }

    private static boolean isSaturated(Mask saturated, double x, double y, int reach) {
        for (int row = (int) y - reach; row <= y + reach; row++) {
            for (int column = (int) x - reach; column <= x + reach; column++) {
                if (saturated.contains(column, row)) {
                    return true;
                }
            }
        }
        return false;
    }

    /** The radius of half height, 0 when the profile does not fall that far. */
    private static double halfRadius(GrayImage flat, double x, double y, double reach) {
        int samples = (int) (2 * reach);
        double[] profile = new double[samples];
        int used = 0;
        for (; used < samples; used++) {
            double radius = used / 2.0;
            if (x - radius < 0 || y - radius < 0 || x + radius > flat.width() || y + radius > flat.height()) {
                break;
            }
            for (int k = 0; k < AZIMUTHS; k++) {
                double azimuth = 2 * Math.PI * k / AZIMUTHS;
                profile[used] += flat.interpolated(
                                new PixelPoint(x + radius * Math.cos(azimuth), y + radius * Math.sin(azimuth)))
                        / AZIMUTHS;
            }
        }
        if (used < 6) {
            return 0;
        }
        double base = Double.POSITIVE_INFINITY;
        for (int i = 0; i + 2 < used; i++) {
            base = Math.min(base, (profile[i] + profile[i + 1] + profile[i + 2]) / 3);
        }
        double top = (profile[0] + profile[1] + profile[2]) / 3;
        double half = (Math.max(profile[0], top) + base) / 2;
        for (int i = 1; i < used; i++) {
            if (profile[i] < half) {
                double share = (profile[i - 1] - half) / (profile[i - 1] - profile[i]);
                return Math.max(0, i - 1 + share) / 2;
            }
        }
        return 0;
    }
}
