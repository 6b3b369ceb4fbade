package io.github.zonewright.geometry;

import java.util.Optional;

/**
 * Weighted linear least squares by the normal equations and Cholesky's factors, for a few well-scaled unknowns.
 *
 * <p>With the weights 1/σ² the inverse of the normal matrix is the covariance of the unknowns. Known limit: unknowns whose
 * columns are proportional to within some 1e-6 count as not determined.
 */
public final class LeastSquares {

    private static final double SINGULAR = 1e-12;

    private final int unknowns;
    private final double[][] normal;
    private final double[] right;
    private double squares;
    private int equations;

    /**
     * A fit without equations.
     *
     * @param unknowns their number, at least 1
     * @throws IllegalArgumentException if there is none
     */
    public LeastSquares(int unknowns) {
        if (unknowns < 1) {
            throw new IllegalArgumentException("unknowns: " + unknowns + ", expected at least 1");
        }
        this.unknowns = unknowns;
        this.normal = new double[unknowns][unknowns];
        this.right = new double[unknowns];
    }

    /**
     * What came out of a fit.
     *
     * @param values the unknowns
     * @param covariance the inverse of the normal matrix
     * @param chiSquare weighted sum of the squared residuals
     * @param degreesOfFreedom equations less unknowns
     */
    public record Result(double[] values, double[][] covariance, double chiSquare, int degreesOfFreedom) {

        /**
         * The weighted variance of the residuals.
         *
         * @return χ² over the degrees of freedom; 1 when there are none
         */
        public double reducedChiSquare() {
            return degreesOfFreedom > 0 ? chiSquare / degreesOfFreedom : 1;
        }
    }

    /**
     * Adds an equation: the sum of row times unknowns is a value.
     *
     * @param row one factor for each unknown
     * @param value the value
     * @param weight its weight, not negative; 1/σ² for a standard uncertainty σ
     * @throws IllegalArgumentException if the row has another length
     */
    public void add(double[] row, double value, double weight) {
        if (row.length != unknowns) {
            throw new IllegalArgumentException("factors: " + row.length + ", expected " + unknowns);
        }
        for (int i = 0; i < unknowns; i++) {
            double scaled = weight * row[i];
            right[i] += scaled * value;
            for (int j = 0; j <= i; j++) {
                normal[i][j] += scaled * row[j];
            }
        }
        squares += weight * value * value;
        equations++;
    }

    /**
     * Solves the equations.
     *
     * @return the unknowns; empty when the equations do not determine them
     */
    public Optional<Result> solve() {
        double[][] factor = new double[unknowns][unknowns];
        for (int i = 0; i < unknowns; i++) {
            for (int j = 0; j <= i; j++) {
                double sum = normal[i][j];
                for (int k = 0; k < j; k++) {
                    sum -= factor[i][k] * factor[j][k];
                }
                if (i != j) {
                    factor[i][j] = sum / factor[j][j];
                } else if (sum > SINGULAR * normal[i][i]) {
                    factor[i][i] = Math.sqrt(sum);
                } else {
                    return Optional.empty();
                }
            }
        }
        double[] values = substitute(factor, right);
        double[][] covariance = new double[unknowns][];
        for (int i = 0; i < unknowns; i++) {
            double[] unit = new double[unknowns];
            unit[i] = 1;
            covariance[i] = substitute(factor, unit);
        }
        double chiSquare = squares;
        for (int i = 0; i < unknowns; i++) {
            chiSquare -= values[i] * right[i];
        }
        return Optional.of(new Result(values, covariance, Math.max(0, chiSquare), equations - unknowns));
    }

    private static double[] substitute(double[][] factor, double[] side) {
        int n = side.length;
        double[] x = side.clone();
        for (int i = 0; i < n; i++) {
            for (int k = 0; k < i; k++) {
                x[i] -= factor[i][k] * x[k];
            }
            x[i] /= factor[i][i];
        }
        for (int i = n - 1; i >= 0; i--) {
            for (int k = i + 1; k < n; k++) {
                x[i] -= factor[k][i] * x[k];
            }
            x[i] /= factor[i][i];
        }
        return x;
    }
}
