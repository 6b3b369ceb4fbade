package io.github.zonewright.indexing;

import io.github.zonewright.geometry.LeastSquares;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.Arrays;
import java.util.Map;
import java.util.Optional;
import java.util.stream.IntStream;

/**
 * Least squares on positions for those parameters of a placement that are free; what is locked stays as it is, bit for bit.
 * Weights follow Student's t with four degrees of freedom, so that a stray spot loses its pull.
 */
final class LockedFit {

    /**
     * How far the parameters may go: standard deviations about where they start, 0 for a locked one.
     *
     * @param rotation in radians
     * @param lean of either part of the lean, in radians
     * @param centre of either coordinate, in px
     * @param constant as a share of the camera constant
     * @param ellipse of either component of the ellipse
     */
    record Freedom(double rotation, double lean, double centre, double constant, double ellipse) {

        /** The camera is held, the crystal turns freely and leans by this much. */
        static Freedom ofCrystal(double lean) {
            return new Freedom(Math.PI, lean, 0, 0, 0);
        }

        double[] all() {
            return new double[] {rotation, lean, lean, centre, centre, constant, ellipse, ellipse};
        }
    }

    /** A fitted placement and the standard uncertainties of its parameters, 0 where locked. */
    record Result(Placement placement, SolutionErrors errors) {}

    private static final int PARAMETERS = 8;
    private static final int ROUNDS = 15;
    private static final double STEP = 1e-6;
    private static final double DEGREES_OF_FREEDOM = 4;
    private static final double MODEL_ERROR = 0.02;

    private LockedFit() {}

    /** The fit; empty when the spots do not determine what is free, or a step leaves what a placement can be. */
    static Optional<Result> fit(Placement start, Map<MeasuredSpot, Hkl> spots, Freedom freedom) {
        double[] sd = freedom.all();
        int[] free = IntStream.range(0, PARAMETERS).filter(p -> sd[p] > 0).toArray();
        double[] at = new double[PARAMETERS];
        double[][] covariance = new double[0][];
        for (int round = 0; round < ROUNDS && free.length > 0; round++) {
            LeastSquares squares = new LeastSquares(free.length);
            double chi2 = addSpots(squares, start, at, spots, free);
            addPriors(squares, at, sd, free);
            Optional<LeastSquares.Result> step = squares.solve();
            if (step.isEmpty()) {
                return Optional.empty();
            }
            double moved = 0;
            for (int f = 0; f < free.length; f++) {
                at[free[f]] += step.get().values()[f];
                moved = Math.max(moved, Math.abs(step.get().values()[f]));
            }
            if (!(Math.hypot(at[1], at[2]) < 0.5 && Math.hypot(at[6], at[7]) < 0.2 && Math.abs(at[5]) < 0.5)) {
                return Optional.empty();
            }
            double inflation = Math.max(1, chi2 / Math.max(1, 2 * spots.size() - free.length));
            covariance = scaled(step.get().covariance(), inflation);
            if (moved < 1e-9) {
                break;
            }
        }
        return Optional.of(new Result(moved(start, at), errors(covariance, free, start)));
    }

    private static double addSpots(
            LeastSquares squares, Placement start, double[] at, Map<MeasuredSpot, Hkl> spots, int[] free) {
        Placement here = moved(start, at);
        Orientation orientation = here.orientation();
        Placement[] there = new Placement[free.length];
        Orientation[] turned = new Orientation[free.length];
        for (int f = 0; f < free.length; f++) {
            double[] changed = at.clone();
            changed[free[f]] += STEP;
            there[f] = moved(start, changed);
            turned[f] = there[f].orientation();
        }
        double chi2 = 0;
        for (Map.Entry<MeasuredSpot, Hkl> entry : spots.entrySet()) {
            MeasuredSpot spot = entry.getKey();
            PixelPoint p = place(here, orientation, entry.getValue());
            double dx = spot.position().x() - p.x();
            double dy = spot.position().y() - p.y();
            double variance = spot.positionError() * spot.positionError() + MODEL_ERROR * MODEL_ERROR;
            double t2 = (dx * dx + dy * dy) / variance;
            double weight = (DEGREES_OF_FREEDOM + 2) / (DEGREES_OF_FREEDOM + t2) / variance;
            chi2 += weight * variance * t2;
            double[] x = new double[free.length];
            double[] y = new double[free.length];
            for (int f = 0; f < free.length; f++) {
                PixelPoint q = place(there[f], turned[f], entry.getValue());
                x[f] = (q.x() - p.x()) / STEP;
                y[f] = (q.y() - p.y()) / STEP;
            }
            squares.add(x, dx, weight);
            squares.add(y, dy, weight);
        }
        return chi2;
    }

    private static void addPriors(LeastSquares squares, double[] at, double[] sd, int[] free) {
        for (int f = 0; f < free.length; f++) {
            double[] row = new double[free.length];
            row[f] = 1;
            squares.add(row, -at[free[f]], 1 / (sd[free[f]] * sd[free[f]]));
        }
    }

    /** Where a reflection lands. */
    static PixelPoint place(Placement placement, Orientation orientation, Hkl hkl) {
        Vector3 g = orientation.scatteringVector(placement.crystal().lattice(), hkl);
        return placement
                .camera()
                .toPixel(new Vector2(g.x(), g.y()), placement.beam().wavelength());
    }

    /** A spot with the reflection that explains it, and where that lands. */
    static SpotMatch match(Placement placement, MeasuredSpot spot, Hkl hkl) {
        return new SpotMatch(spot, hkl, place(placement, placement.orientation(), hkl));
    }

    private static Placement moved(Placement start, double[] d) {
        ZoneSetting s = start.setting();
        Camera c = start.camera();
        double e = (c.ellipseRatio() - 1) / (c.ellipseRatio() + 1);
        ZoneSetting setting =
                new ZoneSetting(s.zone(), s.reference(), s.rotation() + d[0], s.leanX() + d[1], s.leanY() + d[2]);
        Camera camera = c.withCentre(
                        new PixelPoint(c.centre().x() + d[3], c.centre().y() + d[4]))
                .withConstant(c.constant() * Math.exp(d[5]));
        if (d[6] != 0 || d[7] != 0) {
            double e1 = e * Math.cos(2 * c.ellipseAzimuth()) + d[6];
            double e2 = e * Math.sin(2 * c.ellipseAzimuth()) + d[7];
            double whole = Math.hypot(e1, e2);
            camera = camera.withEllipse((1 + whole) / (1 - whole), Math.atan2(e2, e1) / 2);
        }
        return start.withSetting(setting).withCamera(camera);
    }

    private static double[][] scaled(double[][] covariance, double factor) {
        return Arrays.stream(covariance)
                .map(row -> Arrays.stream(row).map(v -> v * factor).toArray())
                .toArray(double[][]::new);
    }

    private static SolutionErrors errors(double[][] covariance, int[] free, Placement start) {
        double[] sd = new double[PARAMETERS];
        for (int f = 0; f < free.length; f++) {
            sd[free[f]] = Math.sqrt(covariance[f][f]);
        }
        return new SolutionErrors(
                sd[0], sd[1], sd[2], sd[3], sd[4], sd[5] * start.camera().constant());
    }
}
