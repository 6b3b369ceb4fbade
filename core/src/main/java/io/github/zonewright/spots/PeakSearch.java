package io.github.zonewright.spots;

import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.LevelMap;
import io.github.zonewright.image.LocalMaxima;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;

/**
 * Finds the round maxima of a filter's response. Positions come from parabolas through the logarithms of the response,
 * which are exact for a Gaussian.
 */
final class PeakSearch {

    /** Least ratio of the two curvatures of a spot; edges, streaks and rings have less. */
    private static final double ROUND = 0.3;

    /** Least curvature of a spot, as height over squared width; 0.67 for a spot of the filter's width, 0.25 for one 2.4 times as wide. */
    private static final double SHARP = 0.25;
    /** Signal to noise from which a broad maximum is kept, since it may be the direct beam in its halo. */
    private static final double BRIGHT = 100;
    /** How far away, in spot widths, a ridge still carries on. */
    private static final double RIDGE = 2.5;

    private static final int DIRECTIONS = 8;
    private static final double[] COSINES = new double[DIRECTIONS];
    private static final double[] SINES = new double[DIRECTIONS];

    static {
        for (int k = 0; k < DIRECTIONS; k++) {
            COSINES[k] = Math.cos(Math.PI * k / DIRECTIONS);
            SINES[k] = Math.sin(Math.PI * k / DIRECTIONS);
        }
    }

    /** Two maxima nearer than this many spot widths are one. */
    private static final double SEPARATE = 1.7;

    /** What the noise may be less in a later search for its maxima to be among those noted. */
    private static final double SLACK = 0.5;

    private final GrayImage response;
    private final int width;
    private final int height;
    private final double sigma;
    private final int step;

    /** Places that were high enough once, and what they were higher than. */
    private int[] maxima = {};

    /** What has been measured at these places, without the noise, since that may change between searches. */
    private Peak[] shapes = {};

    private double[] ridges = {};
    private LevelMap noted;
    private double notedFactor;

    /**
     * A maximum of the response.
     *
     * @param x position in pixels of the response's grid, from the left edge
     * @param y from the upper edge
     * @param height response at the maximum
     * @param noise scatter of the response there
     * @param curvature mean of the two principal curvatures, positive, in response per square pixel
     * @param roundness lesser over greater curvature
     */
    record Peak(double x, double y, double height, double noise, double curvature, double roundness) {

        double signalToNoise() {
            return height / noise;
        }

        Peak times(double factor) {
            return new Peak(x, y, factor * height, noise, factor * curvature, roundness);
        }

        Peak withNoise(double other) {
            return new Peak(x, y, height, other, curvature, roundness);
        }

        double distanceTo(double otherX, double otherY) {
            return root(x - otherX, y - otherY);
        }
    }

    /** The hypotenuse, without the care that huge and tiny numbers need, for speed. */
    static double root(double a, double b) {
        return Math.sqrt(a * a + b * b);
    }

    PeakSearch(GrayImage response, double sigma) {
        this.response = response;
        this.width = response.width();
        this.height = response.height();
        this.sigma = sigma;
        this.step = Math.max(1, (int) Math.round(sigma / 2));
    }

    /** The peaks above a multiple of the noise, the highest first. */
    List<Peak> find(LevelMap noise, double minimum) {
        return strongest(noise, minimum, Integer.MAX_VALUE);
    }

    /** The first so many of these. */
    List<Peak> strongest(LevelMap noise, double minimum, int most) {
        if (noted == null || noise.leastRatioTo(noted) * minimum < notedFactor) {
            noted = noise;
            notedFactor = SLACK * minimum;
            maxima = LocalMaxima.above(response, noise, notedFactor);
            shapes = new Peak[maxima.length];
            ridges = new double[maxima.length];
        }
        List<Peak> peaks = new ArrayList<>();
        NearbyPoints taken = taken();
        for (int i = 0; i < maxima.length && peaks.size() < most; i++) {
            int column = maxima[i] % width;
            int row = maxima[i] / width;
            double local = noise.at(column + 0.5, row + 0.5);
            if (local > 0 && response.value(column, row) > minimum * local) {
                if (shapes[i] == null) {
                    shapes[i] = measure(column, row, Double.NaN);
                    ridges[i] = ridge(shapes[i]);
                }
                Peak peak = shapes[i].withNoise(local);
                if (isSpot(peak, ridges[i], minimum) && !taken.anyWithin(peak.x, peak.y)) {
                    taken.add(peak.x, peak.y);
                    peaks.add(peak);
                }
            }
        }
        return peaks;
    }

    /** All maxima within a reach of a place, however low or odd their shape, the highest first. */
    List<Peak> near(LevelMap noise, double x, double y, double reach) {
        List<Peak> peaks = new ArrayList<>();
        for (int row = Math.max(0, (int) (y - reach)); row < Math.min(height, y + reach); row++) {
            for (int column = Math.max(0, (int) (x - reach)); column < Math.min(width, x + reach); column++) {
                if (response.value(column, row) > 0 && LocalMaxima.isAt(response, column, row)) {
                    Peak peak = measure(column, row, noise.at(column + 0.5, row + 0.5));
                    if (peak.noise > 0 && peak.distanceTo(x, y) <= reach) {
                        peaks.add(peak);
                    }
                }
            }
        }
        return separated(peaks);
    }

    /** Whether a peak has the shape of a spot, and stands out from the ridge too. */
    private boolean isSpot(Peak peak, double ridge, double minimum) {
        return FrameEdge.isInside(peak.x, width, sigma)
                && FrameEdge.isInside(peak.y, height, sigma)
                && peak.roundness >= ROUND
                && isSharp(peak)
                && (ridge < 1.5 * peak.noise
                        || peak.height - ridge > minimum * peak.noise && ridge < 0.6 * peak.height);
    }

    private boolean isSharp(Peak peak) {
        return peak.curvature * sigma * sigma > SHARP * peak.height || peak.signalToNoise() > BRIGHT;
    }

    /** The height of the ridge a peak may sit on, which carries on at two opposite sides. */
    private double ridge(Peak peak) {
        double ridge = 0;
        double reach = Math.max(2, RIDGE * sigma);
        for (int k = 0; k < DIRECTIONS; k++) {
            double dx = reach * COSINES[k];
            double dy = reach * SINES[k];
            float one = inside((int) (peak.x + dx), (int) (peak.y + dy));
            float other = inside((int) (peak.x - dx), (int) (peak.y - dy));
            ridge = Math.max(ridge, Math.min(one, other));
        }
        return ridge;
    }

    private float inside(int column, int row) {
        return response.value(Math.max(0, Math.min(width - 1, column)), Math.max(0, Math.min(height - 1, row)));
    }

    private Peak measure(int column, int row, double noise) {
        boolean nearEdge = column < step || row < step || column >= width - step || row >= height - step;
        return measure(column, row, noise, nearEdge ? 1 : step);
    }

    private Peak measure(int column, int row, double noise, int step) {
        double centre = inside(column, row);
        double left = inside(column - step, row);
        double right = inside(column + step, row);
        double above = inside(column, row - step);
        double below = inside(column, row + step);
        double xx = (left + right - 2 * centre) / (step * step);
        double yy = (above + below - 2 * centre) / (step * step);
        double xy = (inside(column - step, row - step)
                        + inside(column + step, row + step)
                        - inside(column - step, row + step)
                        - inside(column + step, row - step))
                / (4.0 * step * step);
        double mean = -(xx + yy) / 2;
        double half = root((xx - yy) / 2, xy);
        double roundness = mean + half > 0 ? (mean - half) / (mean + half) : 0;
        double x = FrameEdge.corrected(column + 0.5 + step * offset(left, centre, right), width, sigma);
        double y = FrameEdge.corrected(row + 0.5 + step * offset(above, centre, below), height, sigma);
        return new Peak(x, y, centre, noise, Math.max(mean, 0.02 * centre / (sigma * sigma)), roundness);
    }

    /** Where between −1 and 1 the parabola through the logarithms of three values has its top. */
    private static double offset(double before, double middle, double after) {
        double floor = 0.02 * middle;
        double a = Math.log(Math.max(before, floor));
        double b = Math.log(middle);
        double c = Math.log(Math.max(after, floor));
        double bend = 2 * b - a - c;
        return bend <= 0 ? 0 : Math.max(-1, Math.min(1, 0.5 * (c - a) / bend));
    }

    private NearbyPoints taken() {
        return new NearbyPoints(width, height, Math.max(1.6, SEPARATE * sigma));
    }

    private List<Peak> separated(List<Peak> peaks) {
        List<Peak> sorted = new ArrayList<>(peaks);
        sorted.sort(Comparator.comparingDouble(Peak::height)
                .reversed()
                .thenComparingDouble(Peak::y)
                .thenComparingDouble(Peak::x));
        List<Peak> kept = new ArrayList<>();
        NearbyPoints taken = taken();
        for (Peak peak : sorted) {
            if (!taken.anyWithin(peak.x, peak.y)) {
                taken.add(peak.x, peak.y);
                kept.add(peak);
            }
        }
        return kept;
    }
}
