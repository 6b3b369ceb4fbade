package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import java.util.List;
import java.util.Map;
import org.ejml.data.DMatrixRMaj;
import org.ejml.dense.row.CommonOps_DDRM;

/**
 * Iteratively reweighted least squares for the exact placement: a turn of the crystal (three angles in the microscope
 * frame), centre, camera constant and ellipse. Weights follow Student's t with four degrees of freedom, so that a stray
 * spot loses its pull.
 */
final class PlacementFit {

    private static final int PARAMETERS = 8;
    private static final int ROUNDS = 12;
    private static final double FREEDOM = 4;
    private static final double MODEL_ERROR = 0.01;

    private final SpotCloud cloud;
    private final Matrix3 toReciprocal;
    private final double wavelength;
    private final List<Integer> matched;
    private final Hkl[] indices;
    private final Placement like;
    private final Vector3 zoneAxis;
    private final NetFit.Prior prior;
    private final Vector2 leanMean;
    private final LeanFit.Spread leanWeight;
    private final LeanFit.Spread leanBeyond;
    private Rotation rotation;
    private NetPose pose;
    private DMatrixRMaj covariance = CommonOps_DDRM.identity(PARAMETERS);

    PlacementFit(
            SpotCloud cloud,
            ZoneNet net,
            NetPose start,
            boolean turned,
            Map<Integer, Hkl> matched,
            LeanFit.Posterior lean,
            Placement like,
            NetFit.Prior prior) {
        this.cloud = cloud;
        this.matched = List.copyOf(matched.keySet());
        this.like = like;
        this.prior = prior;
        this.wavelength = like.beam().wavelength();
        this.toReciprocal = like.crystal().lattice().reciprocal().basis();
        this.zoneAxis = net.axis(2);
        this.indices = this.matched.stream().map(matched::get).toArray(Hkl[]::new);
        this.pose = start;
        this.leanMean = new Vector2(lean.x(), lean.y()).rotate(pose.rotation());
        this.leanWeight = inverse(lean.within().rotate(pose.rotation()));
        this.leanBeyond = lean.beyond().rotate(pose.rotation());
        ZoneSetting setting = new ZoneSetting(
                net.zone(), net.reference(), pose.rotation() + (turned ? Math.PI : 0), leanMean.x(), leanMean.y());
        this.rotation = setting.orientation(like.crystal().lattice()).rotation();
        iterate();
    }

    private void iterate() {
        for (int round = 0; round < ROUNDS; round++) {
            DMatrixRMaj normal = new DMatrixRMaj(PARAMETERS, PARAMETERS);
            DMatrixRMaj right = new DMatrixRMaj(PARAMETERS, 1);
            double chi2 = 0;
            for (int m = 0; m < indices.length; m++) {
                chi2 += add(m, normal, right);
            }
            DMatrixRMaj data = normal.copy();
            addPriors(normal, right);
            DMatrixRMaj delta = new DMatrixRMaj(PARAMETERS, 1);
            if (!CommonOps_DDRM.solve(normal.copy(), right, delta)) {
                return;
            }
            step(delta.data);
            int freedom = Math.max(1, 2 * indices.length - 5);
            CommonOps_DDRM.scale(1 / Math.max(1, chi2 / freedom), data);
            addPriors(data, new DMatrixRMaj(PARAMETERS, 1));
            CommonOps_DDRM.invert(data, covariance);
            if (Math.abs(delta.get(0)) + Math.abs(delta.get(1)) < 1e-7 && Math.abs(delta.get(4)) < 1e-9) {
                return;
            }
        }
    }

    private double add(int m, DMatrixRMaj normal, DMatrixRMaj right) {
        double[][] rows = new double[PARAMETERS][];
        double[] here = place(indices[m], rotation, pose);
        for (int p = 0; p < PARAMETERS; p++) {
            double h = p < 2 ? 1e-3 : 1e-6;
            double[] d = new double[PARAMETERS];
            d[p] = h;
            double[] there = place(indices[m], turned(d), moved(d));
            rows[p] = new double[] {(there[0] - here[0]) / h, (there[1] - here[1]) / h};
        }
        int spot = matched.get(m);
        double error = cloud.error(spot);
        double variance = error * error + MODEL_ERROR * MODEL_ERROR;
        double dx = cloud.x(spot) - here[0];
        double dy = cloud.y(spot) - here[1];
        double t2 = (dx * dx + dy * dy) / variance;
        double weight = (FREEDOM + 2) / (FREEDOM + t2) / variance;
        for (int a = 0; a < PARAMETERS; a++) {
            right.data[a] += weight * (rows[a][0] * dx + rows[a][1] * dy);
            for (int b = 0; b < PARAMETERS; b++) {
                normal.data[a * PARAMETERS + b] += weight * (rows[a][0] * rows[b][0] + rows[a][1] * rows[b][1]);
            }
        }
        return weight * variance * t2;
    }

    private void addPriors(DMatrixRMaj normal, DMatrixRMaj right) {
        tie(normal, right, 0, prior.centreX() - pose.centreX(), 1 / Math.pow(Math.max(prior.centreError(), 5), 2));
        tie(normal, right, 1, prior.centreY() - pose.centreY(), 1 / Math.pow(Math.max(prior.centreError(), 5), 2));
        tie(
                normal,
                right,
                2,
                prior.logConstant() - Math.log(pose.constant()),
                1 / Math.pow(prior.logConstantError(), 2));
        Vector2 lean = lean();
        tieLean(normal, right, leanMean.minus(lean));
        tieRotation(normal, right);
        tie(normal, right, 6, prior.e1() - pose.e1(), 1 / Math.pow(prior.ellipseError(), 2));
        tie(normal, right, 7, prior.e2() - pose.e2(), 1 / Math.pow(prior.ellipseError(), 2));
    }

    /** The inverse of a covariance. */
    private static LeanFit.Spread inverse(LeanFit.Spread c) {
        double determinant = c.xx() * c.yy() - c.xy() * c.xy();
        return new LeanFit.Spread(c.yy() / determinant, -c.xy() / determinant, c.xx() / determinant);
    }

    /** A turn about X takes the axis down, one about Y takes it to the right. */
    private void tieLean(DMatrixRMaj normal, DMatrixRMaj right, Vector2 off) {
        normal.add(3, 3, leanWeight.yy());
        normal.add(3, 4, -leanWeight.xy());
        normal.add(4, 3, -leanWeight.xy());
        normal.add(4, 4, leanWeight.xx());
        right.add(3, 0, -(leanWeight.xy() * off.x() + leanWeight.yy() * off.y()));
        right.add(4, 0, leanWeight.xx() * off.x() + leanWeight.xy() * off.y());
    }

    /** The rotation changes with a turn about the beam and, where the axis leans, with the lean too. */
    private void tieRotation(DMatrixRMaj normal, DMatrixRMaj right) {
        double weight = 1 / Math.pow(prior.rotationError(), 2);
        double here = setting(rotation).rotation();
        double h = 1e-6;
        double[] slope = new double[PARAMETERS];
        for (int p = 3; p <= 5; p++) {
            double[] d = new double[PARAMETERS];
            d[p] = h;
            slope[p] = Math.IEEEremainder(setting(turned(d)).rotation() - here, 2 * Math.PI) / h;
        }
        for (int a = 3; a <= 5; a++) {
            right.add(a, 0, weight * slope[a] * prior.offRotation(here));
            for (int b = 3; b <= 5; b++) {
                normal.add(a, b, weight * slope[a] * slope[b]);
            }
        }
    }

    private static void tie(DMatrixRMaj normal, DMatrixRMaj right, int parameter, double off, double weight) {
        normal.add(parameter, parameter, weight);
        right.add(parameter, 0, off * weight);
    }

    private Vector2 lean() {
        Vector3 axis = rotation.apply(zoneAxis);
        Vector2 across = new Vector2(axis.x(), axis.y());
        double n = across.norm();
        return n < 1e-12 ? Vector2.ZERO : across.times(axis.angleTo(Vector3.Z) / n);
    }

    private Rotation turned(double[] d) {
        return d[3] == 0 && d[4] == 0 && d[5] == 0
                ? rotation
                : Rotation.ofVector(new Vector3(d[3], d[4], d[5])).after(rotation);
    }

    private NetPose moved(double[] d) {
        return new NetPose(
                pose.centreX() + d[0],
                pose.centreY() + d[1],
                pose.constant() * Math.exp(d[2]),
                pose.rotation(),
                pose.e1() + d[6],
                pose.e2() + d[7]);
    }

    private void step(double[] d) {
        rotation = turned(d);
        pose = moved(d);
    }

    /** Where a reflection lands: microscope frame, px. */
    private double[] place(Hkl hkl, Rotation r, NetPose p) {
        Vector3 g = r.apply(toReciprocal.times(hkl.h(), hkl.k(), hkl.l()));
        double sine2 = wavelength * wavelength * (g.x() * g.x() + g.y() * g.y());
        double k = p.constant() / Math.sqrt(Math.max(1e-6, 1 - sine2));
        return new double[] {
            p.centreX() + k * ((1 + p.e1()) * g.x() + p.e2() * g.y()),
            p.centreY() + k * (p.e2() * g.x() + (1 - p.e1()) * g.y())
        };
    }

    /** The refined placement. */
    Placement placement() {
        double e = Math.hypot(pose.e1(), pose.e2());
        Camera camera = new Camera(
                cloud.toImage(pose.centreX(), pose.centreY()),
                pose.constant() * Math.sqrt(1 - e * e),
                pose.ellipseRatio(),
                pose.ellipseAzimuth(),
                cloud.mirrored());
        return new Placement(like.crystal(), like.beam(), setting(rotation), camera);
    }

    private ZoneSetting setting(Rotation turn) {
        return ZoneSetting.of(
                new Orientation(turn),
                like.crystal().lattice(),
                like.setting().zone(),
                like.setting().reference());
    }

    /** Where a reflection is computed to land on the image. */
    PixelPoint computed(Hkl hkl) {
        double[] p = place(hkl, rotation, pose);
        return cloud.toImage(p[0], p[1]);
    }

    /** The standard uncertainties; other leans that are likely too add to that of the lean. */
    SolutionErrors errors() {
        return new SolutionErrors(
                sd(5),
                Math.sqrt(covariance.get(4, 4) + Math.max(0, leanBeyond.xx())),
                Math.sqrt(covariance.get(3, 3) + Math.max(0, leanBeyond.yy())),
                sd(0),
                sd(1),
                pose.constant() * sd(2));
    }

    /** What is to be said of the uncertainties, in words. */
    List<String> remarks() {
        double azimuth = lean().azimuth();
        double cos2 = Math.cos(2 * azimuth);
        double sin2 = Math.sin(2 * azimuth);
        double[] along = {0, 0, 0, -Math.sin(azimuth), Math.cos(azimuth), 0, 0, 0};
        double[] ellipse = {0, 0, 0, 0, 0, 0, cos2, sin2};
        double both = covariance(along, ellipse);
        double ellipseVariance = covariance(ellipse, ellipse);
        return FitRemarks.of(
                prior,
                errors(),
                pose.constant(),
                lean(),
                both / Math.sqrt(covariance(along, along) * ellipseVariance),
                2 * Math.sqrt(ellipseVariance));
    }

    /** The covariance of two linear combinations of the parameters. */
    private double covariance(double[] a, double[] b) {
        double sum = 0;
        for (int i = 0; i < PARAMETERS; i++) {
            for (int j = 0; j < PARAMETERS; j++) {
                sum += a[i] * covariance.get(i, j) * b[j];
            }
        }
        return sum;
    }

    private double sd(int i) {
        return Math.sqrt(Math.max(0, covariance.get(i, i)));
    }
}
