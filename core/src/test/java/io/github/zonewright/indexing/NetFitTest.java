package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Random;
import org.junit.jupiter.api.Test;

/** Nets laid out by formula with noise of {@link Random}, then moved off by what a vote leaves open. */
class NetFitTest {

    private static final double ERROR = 0.08;
    private static final double SIZE = 512;

    private final Map<Integer, Hkl> truth = new HashMap<>();

    private static ZoneNet net(String name, Uvw zone) {
        Crystal crystal = CrystalShelf.find(name).orElseThrow();
        return ZoneNet.of(zone, new ReflectionStrengths(crystal, Beam.ofKilovolts(200), 1.3))
                .orElseThrow();
    }

    private static NetPose truth(Random random) {
        double e = 0.008 * random.nextDouble();
        double azimuth = 2 * Math.PI * random.nextDouble();
        return new NetPose(
                SIZE / 2 + 40 * (random.nextDouble() - 0.5),
                -SIZE / 2 + 40 * (random.nextDouble() - 0.5),
                190 + 20 * random.nextDouble(),
                7 * random.nextDouble(),
                e * Math.cos(azimuth),
                e * Math.sin(azimuth));
    }

    private SpotCloud cloud(ZoneNet net, NetPose pose, int strays, Random random) {
        List<MeasuredSpot> spots = new ArrayList<>();
        for (ZoneNet.Node node : net.nodes()) {
            double f = net.flatness(node);
            double x = pose.x(node.x() * f, node.y() * f) + ERROR * random.nextGaussian();
            double y = pose.y(node.x() * f, node.y() * f) + ERROR * random.nextGaussian();
            if (node.allowed() && x > 5 && x < SIZE - 5 && y < -5 && y > 5 - SIZE && random.nextDouble() < 0.8) {
                truth.put(spots.size(), node.hkl());
                spots.add(spot(x, y));
            }
        }
        for (int n = 0; n < strays; n++) {
            spots.add(spot(SIZE * random.nextDouble(), -SIZE * random.nextDouble()));
        }
        return new SpotCloud(spots, false, SIZE * SIZE);
    }

    private static MeasuredSpot spot(double x, double y) {
        return new MeasuredSpot(new PixelPoint(x, -y), ERROR, 1000, 30, false);
    }

    private static NetFit.Prior prior(NetPose pose, Random random) {
        return NetFit.Prior.ofCamera(
                pose.centreX() + random.nextGaussian(),
                pose.centreY() + random.nextGaussian(),
                1.5,
                Math.log(pose.constant() * (1 + 0.01 * random.nextGaussian())),
                0.02,
                0,
                0,
                0.008);
    }

    private static NetPose off(NetPose pose, NetFit.Prior prior, Random random) {
        return new NetPose(
                prior.centreX(),
                prior.centreY(),
                pose.constant() * (1 + 0.005 * random.nextGaussian()),
                pose.rotation() + Math.toRadians(0.4) * random.nextGaussian(),
                0,
                0);
    }

    private void assertRecovered(String name, Uvw zone, int strays, long seed) {
        truth.clear();
        Random random = new Random(seed);
        ZoneNet net = net(name, zone);
        NetPose pose = truth(random);
        SpotCloud cloud = cloud(net, pose, strays, random);
        NetFit.Prior prior = prior(pose, random);
        NetFit.Fit fit = new NetFit(cloud, prior, 1.5).fit(net, off(pose, prior, random));
        String what = name + " [" + zone + "] seed " + seed;
        int right = 0;
        for (Map.Entry<Integer, Hkl> entry : truth.entrySet()) {
            ZoneNet.Node node = fit.nodes()[entry.getKey()];
            right += node != null && node.hkl().equals(entry.getValue()) ? 1 : 0;
        }
        // A stray that lies nearer to a node than its own spot takes it; there are few nodes for that.
        assertTrue(right >= truth.size() - Math.ceil(strays / 8.0), what + ": " + right + " of " + truth.size());
        double n = truth.size();
        assertEquals(pose.centreX(), fit.pose().centreX(), 5 * ERROR / Math.sqrt(n) + 0.02 * strays / n, what);
        assertEquals(pose.centreY(), fit.pose().centreY(), 5 * ERROR / Math.sqrt(n) + 0.02 * strays / n, what);
        double turn = Math.IEEEremainder(fit.pose().rotation() - pose.rotation(), 2 * Math.PI);
        assertEquals(0, Math.toDegrees(turn), 0.05, what);
        assertEquals(1, fit.pose().constant() / pose.constant(), 0.001, what);
        assertEquals(pose.e1(), fit.pose().e1(), 0.0015, what);
        assertEquals(pose.e2(), fit.pose().e2(), 0.0015, what);
    }

    @Test
    void fit_perturbedNet_recovered() {
        for (int seed = 0; seed < 20; seed++) {
            assertRecovered("silicon", new Uvw(0, 1, 1), 0, seed);
            assertRecovered("quartz", new Uvw(1, 0, 0), 0, seed);
            assertRecovered("rutile", new Uvw(1, 1, 1), 0, seed);
        }
    }

    @Test
    void fit_withStrays_recovered() {
        for (int seed = 0; seed < 20; seed++) {
            assertRecovered("silicon", new Uvw(0, 1, 1), 12, seed);
            assertRecovered("rutile", new Uvw(1, 1, 1), 12, seed);
        }
    }

    @Test
    void match_twoSpotsAtANode_theNearerOne() {
        ZoneNet net = net("silicon", new Uvw(0, 1, 1));
        NetPose pose = new NetPose(256, -256, 200, 0.3, 0, 0);
        ZoneNet.Node node = net.nodes().get(3);
        double f = net.flatness(node);
        double x = pose.x(node.x() * f, node.y() * f);
        double y = pose.y(node.x() * f, node.y() * f);
        SpotCloud cloud =
                new SpotCloud(List.of(spot(x + 0.5, y), spot(x, y - 0.2), spot(x, y + 0.2)), false, SIZE * SIZE);
        NetFit.Fit fit = new NetFit(cloud, prior(pose, new Random(1)), 1.5).match(net, pose, 0.01, 1e9, false);
        assertEquals(1, fit.matched());
        assertEquals(node, fit.nodes()[1], "of two equally near the first");
        assertEquals(0.2, fit.distances()[1], 1e-9);
        assertEquals(Double.POSITIVE_INFINITY, fit.distances()[0], 0);
    }

    /** Nothing to hold on to: the pose stays at the prior, finite, and matches nothing. */
    @Test
    void fit_noSpotOnTheNet_staysWhereItWas() {
        ZoneNet net = net("silicon", new Uvw(0, 1, 1));
        NetPose pose = new NetPose(256, -256, 200, 0.3, 0, 0);
        SpotCloud cloud = new SpotCloud(List.of(spot(257, -257), spot(258, -255)), false, SIZE * SIZE);
        NetFit.Fit fit = new NetFit(cloud, prior(pose, new Random(1)), 1.5).fit(net, pose);
        assertEquals(0, fit.matched());
        assertEquals(pose, fit.pose());
    }

    @Test
    void fit_sameInputs_sameBits() {
        ZoneNet net = net("quartz", new Uvw(1, 0, 0));
        NetPose pose = truth(new Random(4));
        SpotCloud cloud = cloud(net, pose, 5, new Random(5));
        NetFit fit = new NetFit(cloud, prior(pose, new Random(6)), 1.5);
        assertEquals(fit.fit(net, pose).pose(), fit.fit(net, pose).pose());
    }
}
