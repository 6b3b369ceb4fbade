package io.github.zonewright.calibration;

import io.github.zonewright.geometry.LeastSquares;
import io.github.zonewright.image.Ellipse;
import io.github.zonewright.image.PixelPoint;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;

/**
 * The centre and ellipse common to rings, and the radius of each, by least squares from where the rings cross sectors.
 * Crossings that lie far from their ring are left out; the scatter of each ring about the fit, if more than its crossings
 * state, scales their errors.
 */
final class RingShapeFit {

    private static final int SHAPE = 4;
    private static final int ROUNDS = 6;
    private static final double FAR = 4;
    private static final double STEP = 1e-4;

    private final List<RingArcs.Arc> arcs;
    private final int rings;

    private RingShapeFit(List<RingArcs.Arc> arcs, int rings) {
        this.arcs = arcs;
        this.rings = rings;
    }

    /**
     * The outcome.
     *
     * @param ellipse the shape
     * @param radii of the rings
     * @param covariance of centre x, y, the strains along and diagonal, and the radii
     * @param counts crossings used, per ring
     * @param scatter of the crossings over what they state, per ring
     */
    record Result(Ellipse ellipse, double[] radii, double[][] covariance, int[] counts, double[] scatter) {}

    /** Fits; empty when the crossings do not determine the shape. */
    static Optional<Result> of(List<RingArcs.Arc> arcs, double[] radii, Ellipse start) {
        return new RingShapeFit(arcs, radii.length).run(radii, start);
    }

    private Optional<Result> run(double[] startRadii, Ellipse start) {
        double[] p = new double[SHAPE + rings];
        p[0] = start.centre().x();
        p[1] = start.centre().y();
        p[2] = start.along();
        p[3] = start.diagonal();
        System.arraycopy(startRadii, 0, p, SHAPE, rings);
        double[] scatter = new double[rings];
        Arrays.fill(scatter, 1);
        int[] counts = new int[rings];
        LeastSquares.Result last = null;
        for (int round = 0; round < ROUNDS; round++) {
            LeastSquares fit = new LeastSquares(p.length);
            double[] residuals = residuals(p);
            boolean[] used = used(residuals, round);
            scatter = round < 2 ? scatter : scatter(residuals, used);
            Arrays.fill(counts, 0);
            for (int i = 0; i < arcs.size(); i++) {
                if (used[i]) {
                    RingArcs.Arc arc = arcs.get(i);
                    double error = arc.error() * scatter[arc.ring()];
                    fit.add(row(arc, p), -residuals[i], 1 / (error * error));
                    counts[arc.ring()]++;
                }
            }
            Optional<LeastSquares.Result> solved =
                    Arrays.stream(counts).anyMatch(n -> n < 3) ? Optional.empty() : fit.solve();
            if (solved.isEmpty()) {
                return Optional.empty();
            }
            last = solved.get();
            for (int k = 0; k < p.length; k++) {
                p[k] += last.values()[k];
            }
            if (Math.hypot(p[2], p[3]) > 0.3) {
                return Optional.empty();
            }
        }
        return Optional.of(new Result(
                shape(p), Arrays.copyOfRange(p, SHAPE, p.length), last.covariance(), counts.clone(), scatter));
    }

    private static Ellipse shape(double[] p) {
        return Ellipse.ofStrain(new PixelPoint(p[0], p[1]), p[2], p[3]);
    }

    private double[] residuals(double[] p) {
        Ellipse shape = shape(p);
        return arcs.stream()
                .mapToDouble(arc -> shape.radius(arc.point()) - p[SHAPE + arc.ring()])
                .toArray();
    }

    private double[] row(RingArcs.Arc arc, double[] p) {
        double[] row = new double[p.length];
        for (int k = 0; k < SHAPE; k++) {
            double step = k < 2 ? 1e-2 : STEP;
            double[] more = p.clone();
            double[] less = p.clone();
            more[k] += step;
            less[k] -= step;
            row[k] = (shape(more).radius(arc.point()) - shape(less).radius(arc.point())) / (2 * step);
        }
        row[SHAPE + arc.ring()] = -1;
        return row;
    }

    /** Leaves out crossings whose residual, in stated errors, is far beyond the ring's middle one. */
    private boolean[] used(double[] residuals, int round) {
        boolean[] used = new boolean[residuals.length];
        for (int ring = 0; ring < rings; ring++) {
            int k = ring;
            double[] sizes = java.util.stream.IntStream.range(0, residuals.length)
                    .filter(i -> arcs.get(i).ring() == k)
                    .mapToDouble(i -> Math.abs(residuals[i]) / arcs.get(i).error())
                    .sorted()
                    .toArray();
            double limit = sizes.length == 0 ? 0 : FAR * Math.max(1, sizes[sizes.length / 2] / 0.6745);
            for (int i = 0; i < residuals.length; i++) {
                if (arcs.get(i).ring() == ring) {
                    used[i] = round == 0 || Math.abs(residuals[i]) / arcs.get(i).error() <= limit;
                }
            }
        }
        return used;
    }

    private double[] scatter(double[] residuals, boolean[] used) {
        double[] squares = new double[rings];
        int[] counts = new int[rings];
        for (int i = 0; i < residuals.length; i++) {
            if (used[i]) {
                double own = residuals[i] / arcs.get(i).error();
                squares[arcs.get(i).ring()] += own * own;
                counts[arcs.get(i).ring()]++;
            }
        }
        double[] scatter = new double[rings];
        double shared = (double) SHAPE / rings + 1;
        for (int ring = 0; ring < rings; ring++) {
            scatter[ring] = Math.max(0.5, Math.sqrt(squares[ring] / Math.max(1, counts[ring] - shared)));
        }
        return scatter;
    }
}
