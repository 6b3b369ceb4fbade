package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.Arrays;
import java.util.List;

/**
 * Measured spots as the search sees them: places in pixels in the microscope frame (X right, Y up; a mirrored image turned
 * back), with the density of spots around each.
 */
final class SpotCloud {

    private final List<MeasuredSpot> spots;
    private final boolean mirrored;
    private final double[] x;
    private final double[] y;
    private final double[] error;
    private final double[] logIntensity;
    private final double[] density;

    SpotCloud(List<MeasuredSpot> spots, boolean mirrored, double frameArea) {
        this.spots = spots;
        this.mirrored = mirrored;
        int n = spots.size();
        x = new double[n];
        y = new double[n];
        error = new double[n];
        logIntensity = new double[n];
        for (int i = 0; i < n; i++) {
            Vector2 p = toMicroscope(spots.get(i).position());
            x[i] = p.x();
            y[i] = p.y();
            error[i] = spots.get(i).positionError();
            logIntensity[i] = Math.log(Math.max(spots.get(i).intensity(), 1e-12));
        }
        density = densities(frameArea);
    }

    /** Half the density of the nearest few spots, in 1/px²; never below that of the whole frame. */
    private double[] densities(double frameArea) {
        int n = spots.size();
        int rank = Math.min(n - 1, 6);
        double[] found = new double[n];
        for (int i = 0; i < n; i++) {
            double[] squared = new double[rank + 1];
            Arrays.fill(squared, Double.POSITIVE_INFINITY);
            for (int j = 0; j < n; j++) {
                insert(squared, (x[i] - x[j]) * (x[i] - x[j]) + (y[i] - y[j]) * (y[i] - y[j]));
            }
            double whole = Math.max(n, 4) / frameArea;
            found[i] = rank < 2 ? whole : Math.max(whole, 0.5 * rank / (Math.PI * squared[rank]));
        }
        return found;
    }

    /** Puts a value in its place among the smallest, which are in order. */
    private static void insert(double[] smallest, double value) {
        int i = smallest.length - 1;
        if (value < smallest[i]) {
            for (; i > 0 && smallest[i - 1] > value; i--) {
                smallest[i] = smallest[i - 1];
            }
            smallest[i] = value;
        }
    }

    Vector2 toMicroscope(PixelPoint p) {
        return new Vector2(mirrored ? -p.x() : p.x(), -p.y());
    }

    PixelPoint toImage(double px, double py) {
        return new PixelPoint(mirrored ? -px : px, -py);
    }

    boolean mirrored() {
        return mirrored;
    }

    int size() {
        return spots.size();
    }

    MeasuredSpot spot(int i) {
        return spots.get(i);
    }

    double x(int i) {
        return x[i];
    }

    double y(int i) {
        return y[i];
    }

    double error(int i) {
        return error[i];
    }

    double logIntensity(int i) {
        return logIntensity[i];
    }

    double density(int i) {
        return density[i];
    }
}
