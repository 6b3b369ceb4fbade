package io.github.zonewright.indexing;

import io.github.zonewright.image.PixelPoint;
import java.util.List;
import java.util.Map;

/**
 * The Cramér–Rao bound of the rotation in the image plane (Cramér 1946, Rao 1945; from memory), from the true spots alone: a
 * Gaussian spot of A electrons at its peak on a background of b electrons per pixel, counted with Poisson noise, has the
 * information ∫ (∂I/∂x)²/(I + b) in each coordinate. With no background that is N/σ² for N electrons; well below it
 * N²/(8πσ⁴b). Centre, camera constant, rotation and ellipse are all unknown.
 */
final class RotationBound {

    private RotationBound() {}

    /**
     * The bound in degrees.
     *
     * @param spots rows of spots.csv of one image
     * @param centre the true centre
     * @param sigma the width of the spots in px
     */
    static double degrees(List<Map<String, String>> spots, PixelPoint centre, double sigma) {
        double[][] fisher = new double[6][6];
        for (Map<String, String> spot : spots) {
            if (!spot.get("visible").equals("1") || !spot.get("grain").equals("1")) {
                continue;
            }
            double dx = Double.parseDouble(spot.get("x")) - centre.x();
            double dy = Double.parseDouble(spot.get("y")) - centre.y();
            double information =
                    information(Double.parseDouble(spot.get("peak_e")), Double.parseDouble(spot.get("snr")), sigma);
            double[][] rows = {{1, 0, dx, -dy, dx, dy}, {0, 1, dy, dx, -dy, dx}};
            for (double[] row : rows) {
                for (int i = 0; i < 6; i++) {
                    for (int j = 0; j < 6; j++) {
                        fisher[i][j] += row[i] * row[j] * information;
                    }
                }
            }
        }
        return Math.toDegrees(Math.sqrt(inverseElement(fisher, 3)));
    }

    /**
     * The information of a spot in each coordinate, in 1/px². The background follows from the signal-to-noise ratio, which is
     * N over the root of N plus the background under 4πσ².
     */
    static double information(double peak, double signalToNoise, double sigma) {
        double counts = 2 * Math.PI * sigma * sigma * peak;
        double under = Math.max(0, counts * counts / (signalToNoise * signalToNoise) - counts);
        double background = under / (4 * Math.PI * sigma * sigma);
        double sum = 0;
        double step = sigma / 200;
        for (double r = step / 2; r < 7 * sigma; r += step) {
            double level = peak * Math.exp(-r * r / (2 * sigma * sigma));
            double slope2 = level * level * r * r / (2 * Math.pow(sigma, 4));
            sum += slope2 / (level + background + 1e-12) * 2 * Math.PI * r * step;
        }
        return sum;
    }

    /** A diagonal element of the inverse, by Gauss–Jordan elimination with pivots. */
    private static double inverseElement(double[][] matrix, int index) {
        int n = matrix.length;
        double[][] a = new double[n][n + 1];
        for (int i = 0; i < n; i++) {
            System.arraycopy(matrix[i], 0, a[i], 0, n);
            a[i][n] = i == index ? 1 : 0;
        }
        for (int column = 0; column < n; column++) {
            int pivot = column;
            for (int i = column + 1; i < n; i++) {
                pivot = Math.abs(a[i][column]) > Math.abs(a[pivot][column]) ? i : pivot;
            }
            double[] swap = a[pivot];
            a[pivot] = a[column];
            a[column] = swap;
            for (int i = 0; i < n; i++) {
                double factor = i == column ? 0 : a[i][column] / a[column][column];
                for (int j = column; j <= n && factor != 0; j++) {
                    a[i][j] -= factor * a[column][j];
                }
            }
        }
        return a[index][n] / a[index][index];
    }
}
