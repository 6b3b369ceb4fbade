package io.github.zonewright.spots;

import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.LevelMap;
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

    /** Two maxima nearer than this many spot widths are one. */
    private static final double SEPARATE = 1.7;

    private final float[] values;
    private final int width;
    private final int height;
    private final double sigma;
    private final int step;

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

        double distanceTo(double otherX, double otherY) {
            return Math.hypot(x - otherX, y - otherY);
        }
    }

    PeakSearch(GrayImage response, double sigma) {
        this.values = response.values();
        this.width = response.width();
        this.height = response.height();
        this.sigma = sigma;
        this.step = Math.max(1, (int) Math.round(sigma / 2));
    }

    /** The peaks above a multiple of the noise, the highest first. */
    List<Peak> find(LevelMap noise, double minimum) {
        List<Peak> peaks = new ArrayList<>();
        for (int cellRow = 0; cellRow < noise.rows(); cellRow++) {
            int top = (int) (cellRow * noise.cell());
            int bottom = cellRow == noise.rows() - 1 ? height : (int) ((cellRow + 1) * noise.cell());
            for (int cell = 0; cell < noise.columns(); cell++) {
                int left = (int) (cell * noise.cell());
                int right = cell == noise.columns() - 1 ? width : (int) ((cell + 1) * noise.cell());
                float threshold = (float) (minimum * leastAround(noise, cell, cellRow));
                for (int row = top; row < bottom; row++) {
                    for (int i = row * width + left; i < row * width + right; i++) {
                        if (values[i] >= threshold && isMaximum(i - row * width, row, values[i])) {
                            addPeak(i - row * width, row, noise, minimum, peaks);
                        }
                    }
                }
            }
        }
        return separated(peaks);
    }

    /** All maxima within a reach of a place, however low or odd their shape, the highest first. */
    List<Peak> near(LevelMap noise, double x, double y, double reach) {
        List<Peak> peaks = new ArrayList<>();
        for (int row = Math.max(0, (int) (y - reach)); row < Math.min(height, y + reach); row++) {
            for (int column = Math.max(0, (int) (x - reach)); column < Math.min(width, x + reach); column++) {
                float value = values[row * width + column];
                if (value > 0 && isMaximum(column, row, value)) {
                    Peak peak = measure(column, row, noise.at(column + 0.5, row + 0.5));
                    if (peak.noise > 0 && peak.distanceTo(x, y) <= reach) {
                        peaks.add(peak);
                    }
                }
            }
        }
        return separated(peaks);
    }

    /** A value below the noise everywhere in a cell. */
    private static double leastAround(LevelMap noise, int column, int row) {
        double least = Double.POSITIVE_INFINITY;
        for (int r = Math.max(0, row - 1); r <= Math.min(noise.rows() - 1, row + 1); r++) {
            for (int c = Math.max(0, column - 1); c <= Math.min(noise.columns() - 1, column + 1); c++) {
                least = Math.min(least, noise.level(c, r));
            }
        }
        return least;
    }

    private void addPeak(int column, int row, LevelMap noise, double minimum, List<Peak> peaks) {
        double local = noise.at(column + 0.5, row + 0.5);
        if (local > 0 && values[row * width + column] > minimum * local) {
            Peak peak = measure(column, row, local);
            if (FrameEdge.isInside(peak.x, width, sigma)
                    && FrameEdge.isInside(peak.y, height, sigma)
                    && peak.roundness >= ROUND
                    && isSharp(peak)
                    && rises(peak, minimum)) {
                peaks.add(peak);
            }
        }
    }

    private boolean isSharp(Peak peak) {
        return peak.curvature * sigma * sigma > SHARP * peak.height || peak.signalToNoise() > BRIGHT;
    }

    /** Whether a peak also stands out from the ridge it may sit on, which carries on at two opposite sides. */
    private boolean rises(Peak peak, double minimum) {
        double ridge = 0;
        double reach = Math.max(2, RIDGE * sigma);
        for (int k = 0; k < 8; k++) {
            double dx = reach * Math.cos(Math.PI * k / 8);
            double dy = reach * Math.sin(Math.PI * k / 8);
            float one = inside((int) (peak.x + dx), (int) (peak.y + dy));
            float other = inside((int) (peak.x - dx), (int) (peak.y - dy));
            ridge = Math.max(ridge, Math.min(one, other));
        }
        return ridge < 1.5 * peak.noise || peak.height - ridge > minimum * peak.noise && ridge < 0.6 * peak.height;
    }

    private boolean isMaximum(int column, int row, float value) {
        int i = row * width + column;
        if (column > 0 && values[i - 1] >= value || column < width - 1 && values[i + 1] > value) {
            return false;
        }
        for (int r = -1; r <= 1; r++) {
            for (int c = -1; c <= 1; c++) {
                if (r == 0 && c == 0) {
                    continue;
                }
                float other = value(column + c, row + r);
                boolean before = r < 0 || r == 0 && c < 0;
                if (before ? other >= value : other > value) {
                    return false;
                }
            }
        }
        return true;
    }

    private float value(int column, int row) {
        return column < 0 || row < 0 || column >= width || row >= height
                ? Float.NEGATIVE_INFINITY
                : values[row * width + column];
    }

    private float inside(int column, int row) {
        return values[Math.max(0, Math.min(height - 1, row)) * width + Math.max(0, Math.min(width - 1, column))];
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
        double half = Math.hypot((xx - yy) / 2, xy);
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

    private List<Peak> separated(List<Peak> peaks) {
        List<Peak> sorted = new ArrayList<>(peaks);
        sorted.sort(Comparator.comparingDouble(Peak::height)
                .reversed()
                .thenComparingDouble(Peak::y)
                .thenComparingDouble(Peak::x));
        List<Peak> kept = new ArrayList<>();
        double reach = Math.max(1.6, SEPARATE * sigma);
        NearbyPoints taken = new NearbyPoints(width, height, reach);
        for (Peak peak : sorted) {
            if (!taken.anyWithin(peak.x, peak.y)) {
                taken.add(peak.x, peak.y);
                kept.add(peak);
            }
        }
        return kept;
    }
}
