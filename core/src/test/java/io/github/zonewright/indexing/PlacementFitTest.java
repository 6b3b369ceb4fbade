package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Random;
import java.util.TreeMap;
import org.junit.jupiter.api.Test;

/**
 * Many noisy copies of one pattern: what the fit says of its own errors, and how near it comes to the least error that any
 * fit could have (Cramér–Rao), worked out here from the formulas of the pattern.
 */
class PlacementFitTest {

    private static final double NOISE = 0.1;
    private static final double LEAN_SD = Math.toRadians(0.2);
    private static final double CENTRE_SD = 5;
    private static final double CONSTANT_SD = 0.01;
    private static final double ELLIPSE_SD = 0.004;
    private static final Beam BEAM = Beam.ofKilovolts(200);
    private static final Crystal CRYSTAL = CrystalShelf.find("rutile").orElseThrow();
    private static final Uvw ZONE = new Uvw(1, 1, 1);
    private static final ZoneNet NET =
            ZoneNet.of(ZONE, new ReflectionStrengths(CRYSTAL, BEAM, 1.1)).orElseThrow();

    /** The truth of one trial: rotation, lean, centre, constant, ellipse. */
    private record Truth(double[] p) {
        /** Turn, lean x, lean y, centre x, centre y, ln K, e1, e2. */
        static Truth random(Random r) {
            return new Truth(new double[] {
                0.7 + 0.1 * r.nextGaussian(),
                Math.toRadians(0.6) + LEAN_SD * r.nextGaussian(),
                Math.toRadians(-0.4) + LEAN_SD * r.nextGaussian(),
                250 + r.nextGaussian(),
                -260 + r.nextGaussian(),
                Math.log(200) + CONSTANT_SD * r.nextGaussian(),
                ELLIPSE_SD * r.nextGaussian(),
                ELLIPSE_SD * r.nextGaussian()
            });
        }

        /** Where a node of the net lands, written out: turned in the plane, leaned, projected, stretched. */
        double[] place(ZoneNet.Node n) {
            double x = Math.cos(p[0]) * n.x() - Math.sin(p[0]) * n.y();
            double y = Math.sin(p[0]) * n.x() + Math.cos(p[0]) * n.y();
            double lean = Math.hypot(p[1], p[2]);
            double along = (x * p[1] + y * p[2]) / lean;
            double shrink = (Math.cos(lean) - 1) * along / lean;
            x += shrink * p[1];
            y += shrink * p[2];
            double k = Math.exp(p[5]) / Math.sqrt(1 - BEAM.wavelength() * BEAM.wavelength() * (x * x + y * y));
            return new double[] {p[3] + k * ((1 + p[6]) * x + p[7] * y), p[4] + k * (p[7] * x + (1 - p[6]) * y)};
        }
    }

    private static List<ZoneNet.Node> nodes() {
        return NET.nodes().stream().filter(ZoneNet.Node::allowed).toList();
    }

    private static PlacementFit fit(Truth truth, Random random, int strays, double strayOff) {
        List<MeasuredSpot> spots = new ArrayList<>();
        Map<Integer, Hkl> matched = new TreeMap<>();
        for (ZoneNet.Node node : nodes()) {
            double[] at = truth.place(node);
            double off = spots.size() < strays ? strayOff : 0;
            matched.put(spots.size(), node.hkl());
            spots.add(new MeasuredSpot(
                    new PixelPoint(at[0] + off + NOISE * random.nextGaussian(), -at[1] + NOISE * random.nextGaussian()),
                    NOISE,
                    1000,
                    30,
                    false));
        }
        SpotCloud cloud = new SpotCloud(spots, false, 512 * 512);
        double[] p = truth.p;
        NetPose start = new NetPose(p[3] + 0.2, p[4] - 0.2, Math.exp(p[5]) * 1.002, p[0] + 0.003, 0, 0);
        double meanX = Math.toRadians(0.6);
        double meanY = Math.toRadians(-0.4);
        double c = Math.cos(start.rotation());
        double s = Math.sin(start.rotation());
        LeanFit.Posterior lean =
                new LeanFit.Posterior(c * meanX + s * meanY, c * meanY - s * meanX, LEAN_SD, LEAN_SD, 0, 0);
        NetFit.Prior prior = NetFit.Prior.ofCamera(250, -260, CENTRE_SD, Math.log(200), CONSTANT_SD, 0, 0, ELLIPSE_SD);
        Placement like = new Placement(
                CRYSTAL,
                BEAM,
                ZoneSetting.onZone(ZONE, NET.reference(), 0),
                Camera.of(new PixelPoint(0, 0), 200, false));
        return new PlacementFit(cloud, NET, start, false, matched, lean, like, prior);
    }

    /** Errors of turn, lean x, lean y (of the rotation vector), centre x, y and constant. */
    private static double[] errors(PlacementFit fit, Truth truth) {
        double[] p = truth.p;
        Placement found = fit.placement();
        Rotation own = new ZoneSetting(ZONE, NET.reference(), p[0], p[1], p[2])
                .orientation(CRYSTAL.lattice())
                .rotation();
        Rotation off = found.orientation().rotation().after(own.inverse());
        Vector3 v = off.axis().times(off.angle());
        double e2 = p[6] * p[6] + p[7] * p[7];
        return new double[] {
            v.z(),
            v.y(),
            -v.x(),
            found.camera().centre().x() - p[3],
            found.camera().centre().y() + p[4],
            found.camera().constant() - Math.exp(p[5]) * Math.sqrt(1 - e2)
        };
    }

    private static double[] stated(PlacementFit fit) {
        SolutionErrors e = fit.errors();
        return new double[] {e.rotation(), e.leanX(), e.leanY(), e.centreX(), e.centreY(), e.constant()};
    }

    private static final String[] NAMES = {"rotation", "lean X", "lean Y", "centre x", "centre y", "constant"};

    @Test
    void errors_manyNoisyPatterns_coverTheTruth() {
        int trials = 400;
        Random random = new Random(11);
        int[] inside = new int[6];
        int[] twice = new int[6];
        for (int t = 0; t < trials; t++) {
            Truth truth = Truth.random(random);
            PlacementFit fit = fit(truth, random, 0, 0);
            double[] e = errors(fit, truth);
            double[] s = stated(fit);
            for (int i = 0; i < 6; i++) {
                inside[i] += Math.abs(e[i]) < s[i] ? 1 : 0;
                twice[i] += Math.abs(e[i]) < 2 * s[i] ? 1 : 0;
            }
        }
        for (int i = 0; i < 6; i++) {
            // 68.3 % and 95.4 % of a normal distribution, four standard errors of the counts either way.
            assertEquals(0.683, inside[i] / (double) trials, 4 * Math.sqrt(0.683 * 0.317 / trials), NAMES[i] + " 1σ");
            assertEquals(0.954, twice[i] / (double) trials, 4 * Math.sqrt(0.954 * 0.046 / trials), NAMES[i] + " 2σ");
        }
    }

    @Test
    void rotation_manyNoisyPatterns_nearTheCramerRaoBound() {
        int trials = 400;
        Random random = new Random(11);
        double squares = 0;
        double bound = 0;
        for (int t = 0; t < trials; t++) {
            Truth truth = Truth.random(random);
            double e = errors(fit(truth, random, 0, 0), truth)[0];
            squares += e * e;
            bound += cramerRao(truth);
        }
        double ratio = Math.sqrt(squares / bound);
        // Student weights at four degrees of freedom cost a few per cent on normal noise; the count is good to 4 %.
        assertTrue(ratio > 0.88 && ratio < 1.15, "rotation error over its bound: " + ratio);
    }

    /** Variance of the turn from the Fisher information of positions and priors. */
    private static double cramerRao(Truth truth) {
        double[][] information = new double[8][8];
        for (ZoneNet.Node node : nodes()) {
            double[][] slope = new double[8][2];
            for (int i = 0; i < 8; i++) {
                double h = 1e-5;
                double[] up = truth.p.clone();
                double[] down = truth.p.clone();
                up[i] += h;
                down[i] -= h;
                double[] a = new Truth(up).place(node);
                double[] b = new Truth(down).place(node);
                slope[i] = new double[] {(a[0] - b[0]) / (2 * h), (a[1] - b[1]) / (2 * h)};
            }
            for (int i = 0; i < 8; i++) {
                for (int j = 0; j < 8; j++) {
                    information[i][j] += (slope[i][0] * slope[j][0] + slope[i][1] * slope[j][1]) / (NOISE * NOISE);
                }
            }
        }
        double[] sd = {1e9, LEAN_SD, LEAN_SD, CENTRE_SD, CENTRE_SD, CONSTANT_SD, ELLIPSE_SD, ELLIPSE_SD};
        for (int i = 0; i < 8; i++) {
            information[i][i] += 1 / (sd[i] * sd[i]);
        }
        // The first element of the inverse, by Schur's complement: eliminate all other unknowns.
        for (int k = 7; k > 0; k--) {
            for (int i = 0; i < k; i++) {
                double f = information[i][k] / information[k][k];
                for (int j = 0; j < k; j++) {
                    information[i][j] -= f * information[k][j];
                }
            }
        }
        return 1 / information[0][0];
    }

    /** Two spots of some forty, 3 px off: a plain mean would move the centre by 0.15 px. */
    @Test
    void fit_straySpots_losePull() {
        double shift = 0;
        int trials = 50;
        Random random = new Random(12);
        for (int t = 0; t < trials; t++) {
            Truth truth = Truth.random(random);
            shift += errors(fit(truth, random, 2, 3), truth)[3] / trials;
        }
        assertTrue(Math.abs(shift) < 0.2 * 3 * 2 / nodes().size(), "centre moved by " + shift + " px");
    }

    @Test
    void fit_noNoise_exact() {
        double[] p = {0.7, Math.toRadians(0.6), Math.toRadians(-0.4), 250, -260, Math.log(200), 0, 0};
        Truth truth = new Truth(p);
        Random still = new Random() {
            private static final long serialVersionUID = 1;

            @Override
            public double nextGaussian() {
                return 0;
            }
        };
        PlacementFit fit = fit(truth, still, 0, 0);
        double[] e = errors(fit, truth);
        for (int i = 0; i < 6; i++) {
            assertEquals(0, e[i], i == 5 || i == 1 || i == 2 ? 1e-4 : 1e-5, NAMES[i]);
        }
        for (ZoneNet.Node node : nodes()) {
            double[] at = truth.place(node);
            assertEquals(0, fit.computed(node.hkl()).distanceTo(new PixelPoint(at[0], -at[1])), 1e-3);
        }
    }

    /** Pixels computed by the fit are those of the placement that it hands out. */
    @Test
    void computed_everyReflection_asThePlacementSays() {
        Random random = new Random(17);
        PlacementFit fit = fit(Truth.random(random), random, 0, 0);
        Placement placement = fit.placement();
        Matrix3 ub = placement.orientation().ub(CRYSTAL.lattice());
        for (ZoneNet.Node node : nodes()) {
            Hkl n = node.hkl();
            Vector3 g = ub.times(n.h(), n.k(), n.l());
            PixelPoint expected = placement
                    .camera()
                    .toPixel(new io.github.zonewright.geometry.Vector2(g.x(), g.y()), BEAM.wavelength());
            assertEquals(0, fit.computed(n).distanceTo(expected), 1e-9);
        }
    }
}
