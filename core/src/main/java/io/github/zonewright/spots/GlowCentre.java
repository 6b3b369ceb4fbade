package io.github.zonewright.spots;

import io.github.zonewright.image.LevelMap;
import io.github.zonewright.image.Quantile;
import java.util.Arrays;
import java.util.Optional;
import java.util.function.BiPredicate;

/**
 * The point about which the background is round: the sum of the deviations of log(level) from the median of its ring is
 * least. Works with part of the background hidden. Precise to some 0.3 % of the side.
 *
 * @param x in pixels from the left edge
 * @param y in pixels from the upper edge
 * @param error standard deviation of each coordinate, in pixels
 * @param floor natural logarithm of the weight that a centre far from here keeps
 */
record GlowCentre(double x, double y, double error, double floor) {

    /** Cost rise on moving by 4 % of the side, and what error and floor it stands for (measured on simulated patterns). */
    private static final double[][] QUALITY = {
        {1.3, 0.002, -12}, {0.65, 0.0025, -9}, {0.2, 0.004, -7}, {0.05, 0.006, -5}, {Double.NEGATIVE_INFINITY, 0.03, -1}
    };

    /** By how much more than itself the error grows for a centre on the edge (drawn glows), and how far in that begins. */
    private static final double ONE_SIDED = 1.5;

    private static final double EDGE = 0.1;

    /** Deviations beyond this many typical ones count no more. */
    private static final double CAP = 4;

    /** Steps, in cells, down to which the coarse search goes, and at which the fine one ends. */
    private static final double ROUGH = 0.5;

    private static final double FINE = 0.04;

    /** A ring of fewer cells has no median worth its name. */
    private static final int LEAST_RING = 4;

    /** Of so many cells one takes part in the coarse search. */
    private static final int THIN = 3;

    /** The logarithm of the weight of a centre elsewhere, 0 at the best. */
    double logWeight(double otherX, double otherY) {
        double u = (otherX - x) / error;
        double v = (otherY - y) / error;
        return Math.log(Math.exp(-0.5 * (u * u + v * v)) + Math.exp(floor)) - Math.log1p(Math.exp(floor));
    }

    /** Fits the centre to the cells of a background that are not left out; empty when there is no fall to fit. */
    static Optional<GlowCentre> of(LevelMap level, double noise, BiPredicate<Integer, Integer> leftOut) {
        int cells = level.columns() * level.rows();
        double[] column = new double[cells];
        double[] row = new double[cells];
        float[] height = new float[cells];
        int count = 0;
        for (int r = 0; r < level.rows(); r++) {
            for (int c = 0; c < level.columns(); c++) {
                if (!leftOut.test(c, r)) {
                    column[count] = c + 0.5;
                    row[count] = r + 0.5;
                    height[count++] = (float) level.level(c, r);
                }
            }
        }
        if (count < 40) {
            return Optional.empty();
        }
        float[] sorted = Arrays.copyOf(height, count);
        Arrays.sort(sorted);
        double low = sorted[count / 100];
        double span = sorted[count - 1 - count / 100] - low;
        if (!(span > 0)) {
            return Optional.empty();
        }
        double soft = Math.max(noise, 0.02 * span);
        for (int i = 0; i < count; i++) {
            height[i] = (float) Math.log(Math.max(0, height[i] - low) + soft);
        }
        Fit fit = new Fit(column, row, height, count, level.columns(), level.rows());
        Fit thinned = fit.thinned();
        double[] rough = thinned.descended(thinned.start(), Math.max(level.columns(), level.rows()) / 20.0, ROUGH);
        return fit.best(rough, level.cell());
    }

    private static final class Fit {

        private final double[] column;
        private final double[] row;
        private final float[] height;
        private final int count;
        private final int columns;
        private final int rows;
        private final int[] ring;
        private final int[] start;
        private final float[] byRing;
        private final int[] next;
        private double cap = Double.POSITIVE_INFINITY;

        Fit(double[] column, double[] row, float[] height, int count, int columns, int rows) {
            this.column = column;
            this.row = row;
            this.height = height;
            this.count = count;
            this.columns = columns;
            this.rows = rows;
            this.ring = new int[count];
            this.start = new int[4 * (columns + rows)];
            this.byRing = new float[count];
            this.next = new int[start.length];
        }

        /** The same with one in {@value #THIN} cells. */
        Fit thinned() {
            int kept = (count + THIN - 1) / THIN;
            double[] someColumns = new double[kept];
            double[] someRows = new double[kept];
            float[] someHeights = new float[kept];
            for (int i = 0; i < kept; i++) {
                someColumns[i] = column[THIN * i];
                someRows[i] = row[THIN * i];
                someHeights[i] = height[THIN * i];
            }
            return new Fit(someColumns, someRows, someHeights, kept, columns, rows);
        }

        /** The best place of a coarse grid, in cells. */
        double[] start() {
            double[] best = {columns / 2.0, rows / 2.0};
            double least = Double.POSITIVE_INFINITY;
            for (int i = -1; i <= 11; i++) {
                for (int j = -1; j <= 11; j++) {
                    double cost = cost(columns * i / 10.0, rows * j / 10.0, least);
                    if (cost < least) {
                        least = cost;
                        best = new double[] {columns * i / 10.0, rows * j / 10.0};
                    }
                }
            }
            return best;
        }

        /** Goes down from a place, in cells, with steps that are halved where no neighbour is better. */
        double[] descended(double[] from, double largest, double smallest) {
            double[] best = from.clone();
            double least = exactCost(best[0], best[1]);
            for (double step = largest; step > smallest; step /= 2) {
                double[] before = {Double.NaN, Double.NaN};
                for (int round = 0; round < 3; round++) {
                    double[] middle = best;
                    for (int k = 0; k < 9; k++) {
                        double x = middle[0] + step * (k % 3 - 1);
                        double y = middle[1] + step * (k / 3 - 1);
                        boolean seen = Math.abs(x - before[0]) < 1.5 * step && Math.abs(y - before[1]) < 1.5 * step;
                        double cost = seen || k == 4 ? least : cost(x, y, least);
                        if (cost < least) {
                            least = cost;
                            best = new double[] {x, y};
                        }
                    }
                    if (best == middle) {
                        break;
                    }
                    before = middle;
                }
            }
            return best;
        }

        Optional<GlowCentre> best(double[] from, double cell) {
            double side = Math.max(columns, rows);
            cap = CAP * exactCost(from[0], from[1]);
            double[] found = descended(from, 2 * ROUGH, FINE);
            double x = found[0];
            double y = found[1];
            double least = exactCost(x, y);
            double move = 0.04 * side;
            double around =
                    (exactCost(x + move, y) + exactCost(x - move, y) + exactCost(x, y + move) + exactCost(x, y - move))
                            / 4;
            double quality = least > 0 ? around / least - 1 : 0;
            for (double[] grade : QUALITY) {
                if (quality > grade[0]) {
                    double error = grade[1] * side * cell * oneSided(x / columns) * oneSided(y / rows);
                    return Optional.of(new GlowCentre(x * cell, y * cell, error, grade[2]));
                }
            }
            return Optional.empty();
        }

        /** How much less is known of a coordinate, as a part of the side, when the glow shows on one side of it only. */
        private static double oneSided(double part) {
            return 1 + Math.max(0, Math.min(ONE_SIDED, ONE_SIDED * (1 - Math.min(part, 1 - part) / EDGE)));
        }

        private static double distance(double x, double y) {
            return Math.sqrt(x * x + y * y);
        }

        /** Mean capped deviation from the ring medians, rings one cell wide and interpolated between. */
        private double exactCost(double x, double y) {
            return cost(x, y, Double.POSITIVE_INFINITY);
        }

        /** The same; infinite as soon as it is seen to be more than a limit. */
        private double cost(double x, double y, double limit) {
            Arrays.fill(start, 0);
            int rings = 0;
            for (int i = 0; i < count; i++) {
                ring[i] = Math.min(start.length - 2, (int) distance(column[i] - x, row[i] - y));
                start[ring[i] + 1]++;
                rings = Math.max(rings, ring[i] + 1);
            }
            for (int k = 1; k <= rings; k++) {
                start[k] += start[k - 1];
            }
            int used = 0;
            for (int k = 0; k < rings; k++) {
                int members = start[k + 1] - start[k];
                used += members >= LEAST_RING ? members - 1 : 0;
            }
            if (used < count / 2) {
                return Double.POSITIVE_INFINITY;
            }
            System.arraycopy(start, 0, next, 0, rings);
            for (int i = 0; i < count; i++) {
                byRing[next[ring[i]]++] = height[i];
            }
            double sum = 0;
            for (int k = rings - 1; k >= 0; k--) {
                int from = start[k];
                int to = start[k + 1];
                if (to - from >= LEAST_RING) {
                    int middle = (from + to) / 2;
                    double median = Quantile.select(byRing, from, to, middle);
                    if ((to - from) % 2 == 0) {
                        median = (median + Quantile.select(byRing, from, middle, middle - 1)) / 2;
                    }
                    for (int i = from; i < to; i++) {
                        sum += Math.min(cap, Math.abs(byRing[i] - median));
                    }
                    if (sum > limit * used) {
                        return Double.POSITIVE_INFINITY;
                    }
                }
            }
            return sum / used;
        }
    }
}
