package io.github.zonewright.spots;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.spots.SpotNet.Net;
import io.github.zonewright.spots.SpotNet.NoNet;
import io.github.zonewright.spots.SpotNet.SystematicRow;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;

/** Nets drawn from random vectors by plain arithmetic. */
class SpotNetTest {
    private static final double ERROR = 0.15;

    private static MeasuredSpot spot(PixelPoint p, double intensity) {
        return new MeasuredSpot(p, ERROR, intensity, 20, false);
    }

    /** A reduced basis, its spots with noise, and strays. */
    private static final class Drawn {
        final Random random;
        final PixelPoint centre;
        final Vector2 a;
        final Vector2 b;
        final List<MeasuredSpot> spots = new ArrayList<>();

        Drawn(long seed) {
            random = new Random(seed);
            centre = new PixelPoint(480 + 60 * random.nextDouble(), 480 + 60 * random.nextDouble());
            double turn = 2 * Math.PI * random.nextDouble();
            double length = 40 + 50 * random.nextDouble();
            double angle = Math.toRadians(65 + 25 * random.nextDouble()) * (random.nextBoolean() ? 1 : -1);
            a = Vector2.ofPolar(length, turn);
            Vector2 second = Vector2.ofPolar(length * (1.05 + 0.7 * random.nextDouble()), turn + angle);
            // From 65° to 90° as drawn, b may still be longer than b − a.
            b = second.minus(a).norm() < second.norm() ? second.minus(a) : second;
        }

        PixelPoint noisy(PixelPoint p) {
            return p.plus(new Vector2(random.nextGaussian(), random.nextGaussian()).times(ERROR));
        }

        Drawn net(double radius, double visible) {
            for (int i = -12; i <= 12; i++) {
                for (int j = -12; j <= 12; j++) {
                    Vector2 g = a.times(i).plus(b.times(j));
                    boolean first = i > 0 || (i == 0 && j > 0);
                    if (first && g.norm() < radius) {
                        double intensity = 1000 * Math.exp(-g.norm() / 150) * Math.exp(random.nextGaussian());
                        for (int sign = -1; sign <= 1; sign += 2) {
                            if (random.nextDouble() < visible) {
                                double own = intensity * Math.exp(0.2 * random.nextGaussian());
                                spots.add(spot(noisy(centre.plus(g.times(sign))), own));
                            }
                        }
                    }
                }
            }
            Collections.shuffle(spots, random);
            return this;
        }

        Drawn strays(int count) {
            for (int i = 0; i < count; i++) {
                spots.add(spot(
                        new PixelPoint(100 + 800 * random.nextDouble(), 100 + 800 * random.nextDouble()),
                        300 * random.nextDouble() + 1));
            }
            return this;
        }

        PatternCentre beam() {
            return new PatternCentre(noisy(centre), ERROR, PatternCentre.Source.DIRECT_BEAM);
        }
    }

    private static void assertNet(Drawn drawn, SpotNet found, String what) {
        Net net = assertInstanceOf(Net.class, found, what);
        assertEquals(drawn.a.norm(), net.lengthA().value(), 0.15, what);
        assertEquals(drawn.b.norm(), net.lengthB().value(), 0.15, what);
        double angle = Math.acos(Math.abs(drawn.a.dot(drawn.b)) / drawn.a.norm() / drawn.b.norm());
        assertEquals(angle, net.angle().value(), 0.004, what);
        assertEquals(0, net.centre().position().distanceTo(drawn.centre), 0.4, what);
    }

    @Test
    void find_randomNets_haveTheirReducedBasis() {
        for (long seed = 0; seed < 60; seed++) {
            Drawn drawn = new Drawn(seed).net(300, 0.7).strays(5);
            assertNet(drawn, SpotNetFinder.find(drawn.spots, drawn.beam()), "net " + seed);
        }
    }

    @Test
    void find_strays_areOffTheNet() {
        int wrong = 0;
        int all = 0;
        for (long seed = 100; seed < 140; seed++) {
            Drawn drawn = new Drawn(seed).net(280, 0.9);
            int own = drawn.spots.size();
            List<MeasuredSpot> good = List.copyOf(drawn.spots);
            SpotNet found = SpotNetFinder.find(drawn.strays(6).spots, drawn.beam());
            wrong += (int) found.offNet().stream().filter(good::contains).count();
            all += own;
            assertTrue(
                    found.offNet().size() >= 4,
                    "net " + seed + ": " + found.offNet().size());
        }
        assertTrue(wrong <= 0.01 * all, wrong + " of " + all);
    }

    @Test
    void find_indices_leadToTheSpots() {
        Drawn drawn = new Drawn(7).net(250, 1);
        Net net = assertInstanceOf(Net.class, SpotNetFinder.find(drawn.spots, drawn.beam()));
        assertEquals(drawn.spots.size(), net.nodes().size());
        for (SpotNet.Node node : net.nodes()) {
            double off = net.at(node.n1(), node.n2()).distanceTo(node.spot().position());
            assertEquals(node.residual(), off, 1e-9);
            assertTrue(off < 0.8);
        }
    }

    @Test
    void find_centreHidden_comesFromPairsAndNet() {
        for (long seed = 200; seed < 230; seed++) {
            Drawn drawn = new Drawn(seed).net(300, 0.85);
            assertNet(drawn, SpotNetFinder.find(drawn.spots), "net " + seed);
        }
    }

    @Test
    void find_centreOffTheFrame_isRefinedByTheNet() {
        Drawn drawn = new Drawn(11).net(420, 1);
        List<MeasuredSpot> right = drawn.spots.stream()
                .filter(s -> s.position().x() > drawn.centre.x() + 60)
                .toList();
        PatternCentre rough =
                new PatternCentre(drawn.centre.plus(new Vector2(4, -5)), 6, PatternCentre.Source.BACKGROUND);
        SpotNet found = SpotNetFinder.find(right, rough);
        assertNet(drawn, found, "half a pattern");
        assertTrue(found.refinedCentre().orElseThrow().error() < 0.3);
    }

    @Test
    void find_secondGrain_isOffTheNetOfTheFirst() {
        for (long seed = 300; seed < 320; seed++) {
            Drawn drawn = new Drawn(seed).net(300, 0.9);
            int first = drawn.spots.size();
            for (int i = -3; i <= 3; i++) {
                for (int j = -1; j <= 1; j++) {
                    Vector2 g = drawn.a.times(i).plus(drawn.b.times(j)).rotate(0.42);
                    if (g.norm() > 0 && g.norm() < 160 && drawn.spots.size() < 1.6 * first) {
                        drawn.spots.add(spot(drawn.noisy(drawn.centre.plus(g)), 500));
                    }
                }
            }
            assertNet(drawn, SpotNetFinder.find(drawn.spots, drawn.beam()), "two grains " + seed);
        }
    }

    @Test
    void find_oneRow_isARowAndNoMore() {
        for (long seed = 400; seed < 420; seed++) {
            Drawn drawn = new Drawn(seed);
            for (int n = -4; n <= 4; n++) {
                if (n != 0) {
                    drawn.spots.add(spot(drawn.noisy(drawn.centre.plus(drawn.a.times(n))), 100 + Math.abs(n)));
                }
            }
            if (seed % 2 == 0) {
                drawn.strays(1);
            }
            SystematicRow row =
                    assertInstanceOf(SystematicRow.class, SpotNetFinder.find(drawn.spots, drawn.beam()), "row " + seed);
            assertEquals(drawn.a.norm(), row.spacing().value(), 0.15);
            double azimuth = Math.atan2(-drawn.a.y(), drawn.a.x());
            assertEquals(0, Math.sin(azimuth - row.azimuth().value()), 0.005);
            assertEquals(8, row.nodes().size());
        }
    }

    @Test
    void find_rowAndOneStrayWithoutACentre_isARowWithAStray() {
        for (long seed = 500; seed < 520; seed++) {
            Drawn drawn = new Drawn(seed);
            for (int n = 0; n < 3 + seed % 3; n++) {
                drawn.spots.add(spot(drawn.noisy(drawn.centre.plus(drawn.a.times(n))), 100 + n));
            }
            MeasuredSpot stray = spot(drawn.centre.plus(drawn.a.times(0.63)).plus(drawn.b.times(0.8)), 90);
            drawn.spots.add((int) (seed % 4), stray);
            SystematicRow row = assertInstanceOf(SystematicRow.class, SpotNetFinder.find(drawn.spots), "row " + seed);
            assertEquals(drawn.a.norm(), row.spacing().value(), 0.6);
            assertEquals(List.of(stray), row.strays());
        }
    }

    @Test
    void find_lonePair_isARow() {
        PixelPoint centre = new PixelPoint(100, 100);
        List<MeasuredSpot> pair = List.of(spot(new PixelPoint(160, 100), 5), spot(new PixelPoint(40, 100), 5));
        SystematicRow row = assertInstanceOf(
                SystematicRow.class,
                SpotNetFinder.find(pair, new PatternCentre(centre, 0.2, PatternCentre.Source.DIRECT_BEAM)));
        assertEquals(60, row.spacing().value(), 1e-6);
        assertEquals(0, row.azimuth().value(), 1e-9);
        SystematicRow alone = assertInstanceOf(SystematicRow.class, SpotNetFinder.find(pair));
        assertEquals(120, alone.spacing().value(), 1e-6);
    }

    @Test
    void find_twoSpotsAndTheBeam_areANet() {
        List<MeasuredSpot> two = List.of(spot(new PixelPoint(160, 100), 5), spot(new PixelPoint(100, 180), 5));
        PatternCentre beam = new PatternCentre(new PixelPoint(100, 100), 0.2, PatternCentre.Source.DIRECT_BEAM);
        Net net = assertInstanceOf(Net.class, SpotNetFinder.find(two, beam));
        assertEquals(60, net.lengthA().value(), 1e-6);
        assertEquals(80.0 / 60, net.ratio().value(), 1e-6);
        assertEquals(Math.PI / 2, net.angle().value(), 1e-9);
    }

    @Test
    void find_nothing_givesTheReason() {
        assertInstanceOf(NoNet.class, SpotNetFinder.find(List.of()));
        NoNet lone = assertInstanceOf(NoNet.class, SpotNetFinder.find(List.of(spot(new PixelPoint(5, 5), 1))));
        assertTrue(lone.reason().startsWith("Spots: 1."), lone.reason());
    }

    /** At 1σ 68.3 % of normal deviates. */
    @Test
    void uncertainties_manyNets_coverTheTruth() {
        int covered = 0;
        int all = 0;
        for (long seed = 1000; seed < 1120; seed++) {
            Drawn drawn = new Drawn(seed).net(250, 0.8);
            if (!(SpotNetFinder.find(drawn.spots, drawn.beam()) instanceof Net net)) {
                continue;
            }
            double ratio = drawn.b.norm() / drawn.a.norm();
            double angle = Math.acos(Math.abs(drawn.a.dot(drawn.b)) / drawn.a.norm() / drawn.b.norm());
            double[] deviations = {
                (net.lengthA().value() - drawn.a.norm()) / net.lengthA().error(),
                (net.lengthB().value() - drawn.b.norm()) / net.lengthB().error(),
                (net.ratio().value() - ratio) / net.ratio().error(),
                (net.angle().value() - angle) / net.angle().error(),
                (net.centre().position().x() - drawn.centre.x()) / net.centre().error(),
                (net.centre().position().y() - drawn.centre.y()) / net.centre().error()
            };
            for (double deviation : deviations) {
                covered += Math.abs(deviation) < 1 ? 1 : 0;
                all++;
            }
        }
        double share = covered / (double) all;
        assertTrue(share > 0.60 && share < 0.75, share + " of " + all);
    }
}
