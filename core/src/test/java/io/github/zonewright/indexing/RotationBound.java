package io.github.zonewright.indexing;

import io.github.zonewright.image.PixelPoint;
import java.util.List;
import java.util.Map;

/**
 * The Cramér–Rao bound of the rotation in the image plane (Cramér 1946, Rao 1945; from memory), from the true spots alone: a
 * Gaussian spot of width σ and N counts is placed no better than σ/√N in each coordinate, that is σ over its signal-to-noise
 * ratio; centre, camera constant, rotation and ellipse are all unknown.
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
            double sd = sigma / Double.parseDouble(spot.get("snr"));
            double[][] rows = {{1, 0, dx, -dy, dx, dy}, {0, 1, dy, dx, -dy, dx}};
            for (double[] row : rows) {
                for (int i = 0; i < 6; i++) {
                    for (int j = 0; j < 6; j++) {
                        fisher[i][j] += row[i] * row[j] / (sd * sd);
                    }
                }
            }
        }
        return Math.toDegrees(Math.sqrt(inverseElement(fisher, 3)));
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
