package io.github.zonewright.calibration;

import io.github.zonewright.geometry.LeastSquares;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;

/**
 * Finds the crests of a radial profile: at each radius a Gaussian on a parabola is fitted; where the Gaussian stands out
 * most, there is a ring, which takes part in the fits around it from then on, and so forth. One width serves all rings, the one that makes them stand out most.
 */
final class RingCrests {

    private static final double[] WIDTHS = {1.2, 1.7, 2.4, 3.4, 4.8, 6.8, 9.6};
    private static final double WINDOW = 4;
    /** Least height over the error that the pixels' noise gives it, and over what the misfit of the model gives it. */
    private static final double CLEAR = 8;

    private static final double CLEAR_OF_MISFIT = 4;
    private static final int STRONGEST = 8;
    private static final int MOST = 40;
    /** Rings nearer than so many widths are taken for one. */
    private static final double APART = 2;

    /** A crest. */
    record Crest(double radius, double height, double signalToNoise) {}

    private final double[] radii;
    private final double[] means;
    private final double[] weights;
    private final double innermost;
    private final double sigma;

    private RingCrests(double[] radii, double[] means, double[] errors, double innermost) {
        this.radii = radii;
        this.means = means.clone();
        this.innermost = innermost;
        double typical = Arrays.stream(errors)
                .filter(e -> e > 0)
                .sorted()
                .skip(Arrays.stream(errors).filter(e -> e > 0).count() / 2)
                .findFirst()
                .orElse(1);
        this.weights = Arrays.stream(errors)
                .map(e -> e == e ? 1 / (e * e + 0.01 * typical * typical) : 0)
                .toArray();
        this.sigma = width();
    }

    /** The crests of a profile, given as radius, mean and error of its bins, beyond an innermost radius. */
    static RingCrests of(double[] radii, double[] means, double[] errors, double innermost) {
        return new RingCrests(radii, means, errors, innermost);
    }

    /** The common width of the rings: standard deviation in pixels. */
    double sigma() {
        return sigma;
    }

    List<Crest> crests() {
        List<Crest> found = new ArrayList<>();
        for (int round = 0; round < MOST; round++) {
            Optional<Crest> next = candidates(sigma, found).stream()
                    .filter(c -> found.stream().allMatch(f -> Math.abs(f.radius - c.radius) > APART * sigma))
                    .findFirst();
            if (next.isEmpty()) {
                break;
            }
            found.add(next.get());
        }
        found.sort(Comparator.comparingDouble(Crest::radius));
        return found;
    }

    private double width() {
        double best = WIDTHS[0];
        double most = 0;
        for (double width : WIDTHS) {
            double merit = merit(width);
            if (merit > most) {
                most = merit;
                best = width;
            }
        }
        for (double step = 1.2; step > 1.03; step = Math.sqrt(step)) {
            for (double width : new double[] {best / step, best * step}) {
                double merit = merit(width);
                if (merit > most) {
                    most = merit;
                    best = width;
                }
            }
        }
        return best;
    }

    private double merit(double width) {
        return candidates(width, List.of()).stream()
                .limit(STRONGEST)
                .mapToDouble(Crest::signalToNoise)
                .sum();
    }

    /** Maxima of the signal to noise, the clearest first. */
    private List<Crest> candidates(double width, List<Crest> found) {
        int size = radii.length;
        Crest[] at = new Crest[size];
        for (int i = 0; i < size; i++) {
            at[i] = radii[i] < innermost ? none(i) : fit(i, width, found);
        }
        List<Crest> result = new ArrayList<>();
        for (int i = 1; i + 1 < size; i++) {
            if (at[i].signalToNoise > 0
                    && at[i].signalToNoise >= at[i - 1].signalToNoise
                    && at[i].signalToNoise > at[i + 1].signalToNoise) {
                result.add(at[i]);
            }
        }
        result.sort(Comparator.comparingDouble(Crest::signalToNoise).reversed());
        return result;
    }

    private Crest none(int i) {
        return new Crest(radii[i], 0, 0);
    }

    /** A Gaussian on a parabola, beside those already found, which may be shifted a little. */
    private Crest fit(int centre, double width, List<Crest> found) {
        double[] neighbours = found.stream()
                .mapToDouble(Crest::radius)
                .filter(r -> Math.abs(r - radii[centre]) < (WINDOW + 2) * width)
                .filter(r -> Math.abs(r - radii[centre]) > APART * width)
                .toArray();
        LeastSquares fit = new LeastSquares(4 + 2 * neighbours.length);
        double reach = WINDOW * width;
        int left = 0;
        int right = 0;
        for (int i = Math.max(0, centre - (int) reach - 1); i < Math.min(means.length, centre + reach + 1); i++) {
            double u = (radii[i] - radii[centre]) / width;
            if (Math.abs(u) <= WINDOW && weights[i] > 0) {
                double[] row = new double[4 + 2 * neighbours.length];
                row[0] = Math.exp(-u * u / 2);
                row[1] = 1;
                row[2] = u / WINDOW;
                row[3] = row[2] * row[2];
                for (int k = 0; k < neighbours.length; k++) {
                    double v = (radii[i] - neighbours[k]) / width;
                    row[4 + 2 * k] = Math.exp(-v * v / 2);
                    row[5 + 2 * k] = v * row[4 + 2 * k];
                }
                fit.add(row, means[i], weights[i]);
                left += u < -2 ? 1 : 0;
                right += u > 2 ? 1 : 0;
            }
        }
        if (left < 2 || right < 2) {
            return none(centre);
        }
        return fit.solve()
                .map(result -> {
                    double noise = Math.sqrt(result.covariance()[0][0]);
                    double error = noise * Math.sqrt(Math.max(1, result.reducedChiSquare()));
                    double height = result.values()[0];
                    return height > CLEAR * noise && height > CLEAR_OF_MISFIT * error
                            ? new Crest(radii[centre], height, height / error)
                            : none(centre);
                })
                .orElse(none(centre));
    }
}
