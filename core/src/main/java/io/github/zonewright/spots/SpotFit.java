package io.github.zonewright.spots;

import io.github.zonewright.geometry.LeastSquares;
import java.util.Arrays;
import java.util.Optional;

/**
 * Fits a few spots of one shape and the tilted ground they stand on to grey values (weighted least squares, damped after
 * Levenberg and Marquardt). The shape may depart from the expected one as far as the expectation allows. Lengths are in
 * spot widths.
 */
final class SpotFit {

    /** Ground: level and two slopes; with a bent ground three bends more. */
    private static final int LEVEL_AND_SLOPES = 3;

    private static final int WITH_BENDS = 6;
    private static final int PER_SPOT = 3;
    private static final int ROUNDS = 25;
    private static final double FIRST_DAMPING = 1e-3;
    private static final double MOST_DAMPING = 1e6;
    /** A step is the last one when it gains less than this in chi square. */
    private static final double GAIN = 0.1;

    private static final double LEAST_SPREAD = 0.3;
    /** A spot may not move further than this in all. */
    private static final double ASTRAY = 2;

    private final double[] u;
    private final double[] v;
    private final double[] value;
    private final double[] weight;
    private final int count;
    private final int ground;
    private final SpotShape.Expected expected;

    /**
     * Spots fitted together.
     *
     * @param spots one row of x, y, height for each, in spot widths and grey values
     * @param error standard deviation of each coordinate of each, in spot widths
     * @param heightError standard deviation of each height
     * @param shape the shape all of them have
     * @param shapeError standard deviations of its numbers
     * @param chiSquare weighted squares of the residuals and of the shape's departure
     * @param spread chi square over the degrees of freedom, which the errors follow: the noise near strong spots is estimated
     *     too large, and no shape is exact
     */
    record Result(
            double[][] spots,
            double[] error,
            double[] heightError,
            SpotShape shape,
            double[] shapeError,
            double chiSquare,
            double spread) {

        double distance(int i, int j) {
            return Math.hypot(spots[i][0] - spots[j][0], spots[i][1] - spots[j][1]);
        }
    }

    SpotFit(SpotSamples samples, SpotShape.Expected expected, boolean bent) {
        this.u = samples.u();
        this.v = samples.v();
        this.value = samples.value();
        this.weight = samples.weight();
        this.count = u.length;
        this.ground = bent ? WITH_BENDS : LEVEL_AND_SLOPES;
        this.expected = expected;
    }

    /** The fit from a start; empty when it leads nowhere. */
    Optional<Result> from(double[]... start) {
        int unknowns = PER_SPOT * start.length + SpotShape.UNKNOWNS + ground;
        if (count < 2 * unknowns) {
            return Optional.empty();
        }
        double[] now = new double[unknowns];
        for (int k = 0; k < start.length; k++) {
            System.arraycopy(start[k], 0, now, PER_SPOT * k, PER_SPOT);
        }
        System.arraycopy(expected.shape().values(), 0, now, PER_SPOT * start.length, SpotShape.UNKNOWNS);
        double damping = FIRST_DAMPING;
        double chiSquare = chiSquare(now, start.length);
        for (int round = 0; round < ROUNDS && damping < MOST_DAMPING; round++) {
            double[] next = stepped(now, start.length, damping);
            double after = next == null ? Double.POSITIVE_INFINITY : chiSquare(next, start.length);
            if (after < chiSquare) {
                double gained = chiSquare - after;
                now = next;
                chiSquare = after;
                damping /= 10;
                if (gained < GAIN) {
                    break;
                }
            } else {
                damping = Math.max(1e-6, damping) * 10;
            }
        }
        return result(now, start, chiSquare);
    }

    private Optional<Result> result(double[] now, double[][] start, double chiSquare) {
        Optional<LeastSquares.Result> last = equations(now, start.length, 0).solve();
        if (last.isEmpty()) {
            return Optional.empty();
        }
        double spread = Math.max(LEAST_SPREAD, chiSquare / (count - now.length));
        double[][] covariance = last.get().covariance();
        double[][] spots = new double[start.length][];
        double[] error = new double[start.length];
        double[] heightError = new double[start.length];
        for (int k = 0; k < start.length; k++) {
            int at = PER_SPOT * k;
            spots[k] = Arrays.copyOfRange(now, at, at + PER_SPOT);
            error[k] = Math.sqrt(spread * (covariance[at][at] + covariance[at + 1][at + 1]) / 2);
            heightError[k] = Math.sqrt(spread * covariance[at + 2][at + 2]);
            if (!(Math.hypot(spots[k][0] - start[k][0], spots[k][1] - start[k][1]) < ASTRAY && error[k] < ASTRAY)) {
                return Optional.empty();
            }
        }
        double[] shapeError = new double[SpotShape.UNKNOWNS];
        for (int s = 0; s < SpotShape.UNKNOWNS; s++) {
            int at = PER_SPOT * start.length + s;
            shapeError[s] = Math.sqrt(spread * covariance[at][at]);
        }
        return Optional.of(
                new Result(spots, error, heightError, shape(now, start.length), shapeError, chiSquare, spread));
    }

    private static SpotShape shape(double[] unknowns, int spots) {
        int at = PER_SPOT * spots;
        return new SpotShape(unknowns[at], unknowns[at + 1], unknowns[at + 2], unknowns[at + 3]);
    }

    private double[] stepped(double[] now, int spots, double damping) {
        Optional<LeastSquares.Result> step = equations(now, spots, damping).solve();
        if (step.isEmpty()) {
            return null;
        }
        double[] next = now.clone();
        for (int i = 0; i < next.length; i++) {
            next[i] += step.get().values()[i];
        }
        return shape(next, spots).isPossible() ? next : null;
    }

    private LeastSquares equations(double[] now, int spots, double damping) {
        LeastSquares fit = new LeastSquares(now.length);
        SpotShape shape = shape(now, spots);
        int shapeAt = PER_SPOT * spots;
        int groundAt = shapeAt + SpotShape.UNKNOWNS;
        double[] row = new double[now.length];
        double[] slopes = new double[SpotShape.SLOPES];
        double[] diagonal = new double[now.length];
        for (int i = 0; i < count; i++) {
            Arrays.fill(row, 0);
            double model = 0;
            for (int k = 0; k < spots; k++) {
                int at = PER_SPOT * k;
                double height = now[at + 2];
                double form = shape.at(u[i] - now[at], v[i] - now[at + 1], slopes);
                model += height * form;
                row[at] = -height * slopes[0];
                row[at + 1] = -height * slopes[1];
                row[at + 2] = form;
                for (int s = 0; s < SpotShape.UNKNOWNS; s++) {
                    row[shapeAt + s] += height * slopes[2 + s];
                }
            }
            model += groundRow(i, row, groundAt, now);
            fit.add(row, value[i] - model, weight[i]);
            for (int k = 0; k < row.length; k++) {
                diagonal[k] += weight[i] * row[k] * row[k];
            }
        }
        for (int k = 0; k < row.length; k++) {
            Arrays.fill(row, 0);
            row[k] = 1;
            int s = k - shapeAt;
            if (s >= 0 && s < SpotShape.UNKNOWNS) {
                fit.add(row, expected.shape().values()[s] - now[k], expected.precision(s));
                diagonal[k] += expected.precision(s);
            }
            if (damping > 0) {
                fit.add(row, 0, damping * diagonal[k]);
            }
        }
        return fit;
    }

    /** Fills in the factors of the ground, and says how high it is. */
    private double groundRow(int i, double[] row, int at, double[] now) {
        row[at] = 1;
        row[at + 1] = u[i];
        row[at + 2] = v[i];
        if (ground == WITH_BENDS) {
            row[at + 3] = u[i] * u[i];
            row[at + 4] = u[i] * v[i];
            row[at + 5] = v[i] * v[i];
        }
        double sum = 0;
        for (int k = at; k < at + ground; k++) {
            sum += row[k] * now[k];
        }
        return sum;
    }

    private double chiSquare(double[] now, int spots) {
        SpotShape shape = shape(now, spots);
        double[] row = new double[now.length];
        double sum = expected.departure(shape);
        for (int i = 0; i < count; i++) {
            double rest = residual(i, now, spots, shape, row);
            sum += weight[i] * rest * rest;
        }
        return sum;
    }

    private double residual(int i, double[] now, int spots, SpotShape shape, double[] row) {
        double model = groundRow(i, row, PER_SPOT * spots + SpotShape.UNKNOWNS, now);
        for (int k = 0; k < spots; k++) {
            model += now[PER_SPOT * k + 2] * shape.at(u[i] - now[PER_SPOT * k], v[i] - now[PER_SPOT * k + 1]);
        }
        return value[i] - model;
    }
}
