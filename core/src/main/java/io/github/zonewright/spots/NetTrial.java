package io.github.zonewright.spots;

import io.github.zonewright.geometry.LeastSquares;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import java.util.List;
import java.util.Optional;

/**
 * A trial net, fitted to the spots and weighed. A spot on a node counts by how unlikely that is by chance, so that a net of
 * twice as many nodes must explain more to be preferred: the score is the log-likelihood ratio of spots scattered about nodes,
 * with one in ten a stray, to spots spread evenly.
 */
final class NetTrial {

    private static final double STRAY = 0.1;
    /** Scatter of spots about a net beyond their own errors: in pixels, and as a part of the distance. */
    private static final double FLOOR = 0.08;

    private static final double DISTORTION = 0.0006;
    private static final double FAR = 4;
    /** Weight of the assumed scatter beside the one seen, in degrees of freedom. */
    private static final double PRIOR = 4;

    final NetBasis basis;
    final double[][] covariance;
    final double score;
    final boolean[] on;
    final double rms;

    private NetTrial(NetBasis basis, double[][] covariance, double score, boolean[] on, double rms) {
        this.basis = basis;
        this.covariance = covariance;
        this.score = score;
        this.on = on;
        this.rms = rms;
    }

    /** Fits outward: first spots near the origin, at last all. */
    static Optional<NetTrial> fit(List<MeasuredSpot> spots, NetBasis start, double reach) {
        NetBasis basis = start;
        double shortest = Math.min(start.a().norm(), start.b().norm());
        double[] radii = {3.5 * Math.min(start.b().norm(), 2 * start.a().norm()), reach / 2, reach, reach, reach};
        double[] tolerances = {0.15 * shortest, 0.12 * shortest, 0.1 * shortest, 0, 0};
        NetTrial trial = null;
        for (int round = 0; round < radii.length; round++) {
            LeastSquares[] fits = {new LeastSquares(basis.row() ? 2 : 3), new LeastSquares(basis.row() ? 2 : 3)};
            for (MeasuredSpot spot : spots) {
                int[] n = basis.nearest(spot.position());
                Vector2 off = spot.position().minus(basis.at(n[0], n[1]));
                double r = spot.position().distanceTo(basis.origin());
                double s = scatter(spot, r);
                double limit = Math.min(0.15 * shortest, Math.max(tolerances[round], FAR * s));
                if (off.norm() < limit && r <= Math.max(radii[round], 1.6 * shortest)) {
                    double[] row = basis.row() ? new double[] {1, n[0]} : new double[] {1, n[0], n[1]};
                    fits[0].add(row, off.x(), 1 / (s * s));
                    fits[1].add(row, off.y(), 1 / (s * s));
                }
            }
            Optional<LeastSquares.Result> x = fits[0].solve();
            Optional<LeastSquares.Result> y = fits[1].solve();
            if (x.isEmpty() || y.isEmpty()) {
                return Optional.empty();
            }
            basis = moved(basis, x.get().values(), y.get().values());
            if (basis.area() < 9 || basis.a().norm() < 3 || basis.b().norm() < 3) {
                return Optional.empty();
            }
            trial = weighed(spots, basis, x.get(), y.get());
        }
        return Optional.of(trial);
    }

    static double scatter(MeasuredSpot spot, double distance) {
        return Math.hypot(Math.hypot(spot.positionError(), FLOOR), DISTORTION * distance);
    }

    private static NetBasis moved(NetBasis basis, double[] x, double[] y) {
        PixelPoint origin = basis.origin().plus(new Vector2(x[0], y[0]));
        Vector2 a = basis.a().plus(new Vector2(x[1], y[1]));
        Vector2 b = basis.row()
                ? new Vector2(-a.y(), a.x()).times(basis.b().norm() / a.norm())
                : basis.b().plus(new Vector2(x[2], y[2]));
        return new NetBasis(origin, a, b, basis.row());
    }

    private static NetTrial weighed(
            List<MeasuredSpot> spots, NetBasis basis, LeastSquares.Result x, LeastSquares.Result y) {
        boolean[] on = new boolean[spots.size()];
        double score = 0;
        double squares = 0;
        double chi = 0;
        int count = 0;
        double area = basis.area();
        for (int i = 0; i < on.length; i++) {
            MeasuredSpot spot = spots.get(i);
            int[] n = basis.nearest(spot.position());
            double off = spot.position().distanceTo(basis.at(n[0], n[1]));
            double s = scatter(spot, spot.position().distanceTo(basis.origin()));
            score += Math.log(
                    (1 - STRAY) * Math.max(1, area / (2 * Math.PI * s * s)) * Math.exp(-off * off / (2 * s * s))
                            + STRAY);
            on[i] = off < FAR * s;
            if (on[i]) {
                squares += off * off;
                chi += off * off / (s * s);
                count++;
            }
        }
        int freedom = 2 * count - 2 * x.values().length;
        double scale = (chi + PRIOR) / (Math.max(0, freedom) + PRIOR);
        double[][] covariance = x.covariance();
        for (double[] row : covariance) {
            for (int k = 0; k < row.length; k++) {
                row[k] *= scale;
            }
        }
        return new NetTrial(basis, covariance, score, on, Math.sqrt(squares / Math.max(1, count)));
    }

    int count() {
        int count = 0;
        for (boolean each : on) {
            count += each ? 1 : 0;
        }
        return count;
    }
}
