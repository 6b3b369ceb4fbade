package io.github.zonewright.spots;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.image.PointFilter;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;

/**
 * Estimates the width of the spots of an image: the radius at which the strongest spots, averaged over the azimuth, fall
 * to half their height, taken as that of a Gaussian (1.177 σ). Spots are looked for with filters of three widths; a width
 * measured on what a filter found counts if it is near the filter's own, and the one whose spots stand out most is taken.
 */
final class SpotWidth {

    static final double SMALLEST = 0.7;
    static final double LARGEST = 16;

    /** Width used when no spot is clear enough, in pixels. */
    private static final double USUAL = 2;

    /** Width of the narrowest trial filter in pixels. */
    static final double TRIAL = 2;

    private static final int TRIALS = 3;

    private static final double NARROWEST = 0.3;
    private static final double WIDEST = 1.8;
    /** Widths that differ from the median by less than this part are alike. */
    private static final double ALIKE = 0.25;
    /** Handicap of the coarser filters, which even structures of the background please. */
    private static final double COARSENESS = 0.5;

    /** Least side, in pixels, of an image that a trial filter is applied to. */
    private static final int LEAST_SIDE = 32;

    /** Peaks looked at, and how many of them are measured. */
    private static final int LOOKED_AT = 200;

    private static final int STRONGEST = 30;
    private static final int ENOUGH = 3;
    private static final double CLEAR = 7;
    private static final double HALF_MAXIMUM = Math.sqrt(2 * Math.log(2));
    private static final int AZIMUTHS = 16;
    private static final List<Vector2> WAYS = IntStream.range(0, AZIMUTHS)
            .mapToDouble(k -> 2 * Math.PI * k / AZIMUTHS)
            .mapToObj(azimuth -> new Vector2(Math.cos(azimuth), Math.sin(azimuth)))
            .toList();
    /** What linear interpolation between pixels adds to the variance of a spot, on average: 1/6 px². */
    private static final double INTERPOLATION = 1.0 / 6;

    private final GrayImage flat;
    private final Mask saturated;

    private SpotWidth(GrayImage flat, Mask saturated) {
        this.flat = flat;
        this.saturated = saturated;
    }

    /**
     * The response to a trial filter. Its width is one pixel of the binned image or two, so that it is soon done.
     *
     * @param image the response, of the binned image
     * @param binned the binned image
     * @param binning pixels of the image per side of a pixel of the response
     * @param sigma width of the filter in pixels of the image
     */
    record Response(GrayImage image, GrayImage binned, int binning, double sigma) {

        /** The response to the narrowest of the filters. */
        static Response narrowest(GrayImage flat) {
            int binning = Math.min(flat.width(), flat.height()) < LEAST_SIDE * TRIAL ? 1 : (int) TRIAL;
            return of(flat.binned(binning), binning, TRIAL);
        }

        private static Response of(GrayImage binned, int binning, double sigma) {
            return new Response(PointFilter.ofSigma(sigma / binning).apply(binned), binned, binning, sigma);
        }

        /** The response to a filter twice as wide, empty where the image is too small for it. */
        Optional<Response> wider() {
            int factor = sigma == binning ? 1 : 2;
            GrayImage coarser =
                    Math.min(binned.width(), binned.height()) < LEAST_SIDE * factor ? null : binned.binned(factor);
            return Optional.ofNullable(coarser).map(image -> of(image, factor * binning, 2 * sigma));
        }
    }

    /** A width measured on spots that one trial filter found. */
    private record Trial(double sigma, double merit) {}

    /**
     * The width of the spots.
     *
     * @param flat the image less its background
     * @param saturated the pixels at the detector's limit
     * @param narrowest the response to the narrowest of the trial filters
     * @param noise the noise of the image
     * @return standard deviation in pixels
     */
    static double of(GrayImage flat, Mask saturated, Response narrowest, ResponseNoise noise) {
        SpotWidth width = new SpotWidth(flat, saturated);
        Trial best = new Trial(USUAL, 0);
        Optional<Response> response = Optional.of(narrowest);
        for (int i = 0; i < TRIALS && response.isPresent(); i++) {
            Optional<Trial> trial = width.trial(response.get(), noise);
            if (trial.isPresent() && trial.get().merit > best.merit) {
                best = trial.get();
            }
            response = response.get().wider();
        }
        return Math.max(SMALLEST, Math.min(LARGEST, best.sigma));
    }

    private Optional<Trial> trial(Response response, ResponseNoise noise) {
        int binning = response.binning;
        double sigma = response.sigma;
        List<PeakSearch.Peak> peaks = new PeakSearch(response.image, sigma / binning)
                .strongest(noise.of(sigma).shrunk(binning), CLEAR, LOOKED_AT);
        double[] widths = new double[STRONGEST];
        double[] strengths = new double[STRONGEST];
        int count = 0;
        for (boolean takeSaturated : new boolean[] {false, true}) {
            for (int i = 0; i < peaks.size() && count < STRONGEST; i++) {
                PeakSearch.Peak peak = peaks.get(i);
                double x = peak.x() * binning;
                double y = peak.y() * binning;
                if (peak.roundness() > 0.5 && takeSaturated == isSaturated(x, y, (int) Math.ceil(sigma))) {
                    double radius = halfRadius(x, y, 4 * sigma + 4);
                    if (radius > 0) {
                        widths[count] = radius / HALF_MAXIMUM;
                        strengths[count++] = peak.signalToNoise();
                    }
                }
            }
            if (count >= ENOUGH) {
                break;
            }
        }
        if (count < ENOUGH) {
            return Optional.empty();
        }
        Arrays.sort(widths, 0, count);
        Arrays.sort(strengths, 0, count);
        double median = Math.sqrt(Math.max(widths[count / 2] * widths[count / 2] - INTERPOLATION, 0.25));
        boolean fits = median > NARROWEST * sigma && median < WIDEST * sigma;
        int alike = 0;
        for (int i = 0; i < count; i++) {
            alike += Math.abs(widths[i] - widths[count / 2]) < ALIKE * widths[count / 2] ? 1 : 0;
        }
        double merit = strengths[count / 2] * alike / Math.sqrt(count) * Math.pow(sigma / TRIAL, -COARSENESS);
        return fits ? Optional.of(new Trial(median, merit)) : Optional.empty();
    }

    private boolean isSaturated(double x, double y, int reach) {
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
    private double halfRadius(double x, double y, double reach) {
        int samples = (int) (2 * reach);
        double[] profile = new double[samples];
        int used = 0;
        for (; used < samples; used++) {
            double radius = used / 2.0;
            if (x - radius < 0 || y - radius < 0 || x + radius > flat.width() || y + radius > flat.height()) {
                break;
            }
            for (Vector2 way : WAYS) {
                profile[used] +=
                        flat.interpolated(new PixelPoint(x + radius * way.x(), y + radius * way.y())) / AZIMUTHS;
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
