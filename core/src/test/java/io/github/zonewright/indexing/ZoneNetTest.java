package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotNull;
import static org.junit.jupiter.api.Assertions.assertNull;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.TestData;
import io.github.zonewright.crystal.AtomSite;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.function.Predicate;
import java.util.stream.Collectors;
import org.junit.jupiter.api.Test;

class ZoneNetTest {

    private static final Beam BEAM = Beam.ofKilovolts(200);

    private static Crystal crystal(String structure) {
        return switch (structure) {
            case "fcc" -> Crystal.of("fcc", Lattice.cubic(4), "F m -3 m", AtomSite.of("Al", 0, 0, 0));
            case "bcc" -> Crystal.of("bcc", Lattice.cubic(4), "I m -3 m", AtomSite.of("Fe", 0, 0, 0));
            case "diamond" -> Crystal.of("diamond", Lattice.cubic(4), "F d -3 m:1", AtomSite.of("Si", 0, 0, 0));
            default ->
                Crystal.of(
                        structure,
                        switch (structure) {
                            case "hcp-ideal" -> Lattice.hexagonal(3, 3 * Math.sqrt(8.0 / 3));
                            case "hcp-Ti" -> Lattice.hexagonal(2.9505, 4.6826);
                            case "hcp-Mg" -> Lattice.hexagonal(3.2094, 5.2112);
                            default -> throw new IllegalArgumentException(structure);
                        },
                        "P 63/m m c",
                        AtomSite.of("Mg", 1 / 3.0, 2 / 3.0, 0.25));
        };
    }

    /** The textbook rules of absence. */
    private static Predicate<Hkl> allowed(String structure) {
        Predicate<Hkl> unmixed = g -> (g.h() - g.k()) % 2 == 0 && (g.k() - g.l()) % 2 == 0;
        return switch (structure) {
            case "fcc" -> unmixed;
            case "bcc" -> g -> (g.h() + g.k() + g.l()) % 2 == 0;
            case "diamond" -> unmixed.and(g -> g.h() % 2 != 0 || (g.h() + g.k() + g.l()) % 4 == 0);
            default -> g -> (g.h() - g.k()) % 3 != 0 || g.l() % 2 == 0;
        };
    }

    private static ZoneNet net(Crystal crystal, Uvw zone, double largestG) {
        return ZoneNet.of(zone, new ReflectionStrengths(crystal, BEAM, largestG))
                .orElseThrow();
    }

    /** Nets of the table, which a program independent of this library made by brute force. */
    @Test
    void nodes_publishedZones_shortestTwoAndTheirFigures() {
        List<Map<String, String>> rows = PatternTruth.table(TestData.path("reference/zone-patterns.csv"));
        assertEquals(66, rows.size());
        Map<String, ReflectionStrengths> strengths = new HashMap<>();
        for (Map<String, String> row : rows) {
            String structure = row.get("structure");
            ReflectionStrengths source =
                    strengths.computeIfAbsent(structure, s -> new ReflectionStrengths(crystal(s), BEAM, 2.6));
            Uvw zone = Uvw.parse(row.get("u") + " " + row.get("v") + " " + row.get("w"));
            ZoneNet net = ZoneNet.of(zone, source).orElseThrow();
            List<ZoneNet.Node> seen =
                    net.nodes().stream().filter(ZoneNet.Node::allowed).toList();
            ZoneNet.Node first = seen.get(0);
            ZoneNet.Node second = seen.stream()
                    .filter(n -> Math.abs(n.x() * first.y() - n.y() * first.x()) > 1e-9)
                    .findFirst()
                    .orElseThrow();
            String what = structure + " [" + zone + "]";
            double listed = crystal(structure)
                    .lattice()
                    .reciprocal()
                    .vector(Hkl.parse(row.get("g1")))
                    .norm();
            assertEquals(listed, first.g(), 1e-12, what);
            assertEquals(Double.parseDouble(row.get("R2_over_R1")), second.g() / first.g(), 0.6e-5, what);
            double cosine = Math.abs(first.x() * second.x() + first.y() * second.y()) / first.g() / second.g();
            // Five digits of an angle near 90° are more than its cosine can lose.
            assertEquals(Double.parseDouble(row.get("angle_deg")), Math.toDegrees(Math.acos(cosine)), 0.6e-4, what);
        }
    }

    /** All nodes of some zones against a loop over hkl and the rules of absence. */
    @Test
    void nodes_bruteForce_sameReflectionsAndDoubleDiffraction() {
        double largest = 1.6;
        for (String structure : List.of("fcc", "bcc", "diamond", "hcp-Ti")) {
            Crystal crystal = crystal(structure);
            for (Uvw zone :
                    List.of(new Uvw(0, 0, 1), new Uvw(0, 1, 1), new Uvw(1, 2, 0), new Uvw(1, 1, 1), new Uvw(2, 1, 1))) {
                Set<Hkl> plane = new HashSet<>();
                for (int h = -12; h <= 12; h++) {
                    for (int k = -12; k <= 12; k++) {
                        for (int l = -14; l <= 14; l++) {
                            Hkl g = new Hkl(h, k, l);
                            if (!g.isZero()
                                    && g.dot(zone) == 0
                                    && crystal.lattice().reciprocal().vector(g).norm() <= largest) {
                                plane.add(g);
                            }
                        }
                    }
                }
                Set<Hkl> seen = plane.stream().filter(allowed(structure)).collect(Collectors.toSet());
                Set<Hkl> reached = plane.stream()
                        .filter(g -> seen.contains(g)
                                || seen.stream().anyMatch(a -> !a.equals(g) && seen.contains(g.minus(a))))
                        .collect(Collectors.toSet());
                ZoneNet net = net(crystal, zone, largest);
                String what = structure + " [" + zone + "]";
                assertEquals(
                        seen,
                        net.nodes().stream()
                                .filter(ZoneNet.Node::allowed)
                                .map(ZoneNet.Node::hkl)
                                .collect(Collectors.toSet()),
                        what);
                assertEquals(
                        reached, net.nodes().stream().map(ZoneNet.Node::hkl).collect(Collectors.toSet()), what);
            }
        }
    }

    /** In diamond [0 1 5] the two shortest spots, 400 and 1 −5 1, span a net twice too coarse. */
    @Test
    void nodes_diamond015_notTheNetOfItsShortestTwo() {
        ZoneNet net = net(crystal("diamond"), new Uvw(0, 1, 5), 3);
        List<ZoneNet.Node> seen =
                net.nodes().stream().filter(ZoneNet.Node::allowed).toList();
        assertEquals(1.0, seen.get(0).g(), 1e-12);
        Hkl a = new Hkl(4, 0, 0);
        Hkl b = new Hkl(1, -5, 1);
        assertTrue(seen.stream().anyMatch(n -> n.hkl().equals(a)));
        assertTrue(seen.stream().anyMatch(n -> n.hkl().equals(b)));
        long off = seen.stream()
                .filter(n -> {
                    // n = i a + j b with b alone giving l: j = l, i = (h − l)/4.
                    int j = n.hkl().l();
                    return (n.hkl().h() - j) % 4 != 0;
                })
                .count();
        assertTrue(off > 0, "spots between the nodes of the coarse net");
        for (ZoneNet.Node node : seen) {
            assertEquals(node, net.nearest(node.x() * net.flatness(node), node.y() * net.flatness(node)));
        }
    }

    /** In diamond [0 1 3] the shortest lattice vector of the plane, 200 (primitive), is itself absent. */
    @Test
    void nodes_diamond013_reducedVectorIsAbsent() {
        ZoneNet net = net(crystal("diamond"), new Uvw(0, 1, 3), 2.5);
        Hkl absent = new Hkl(2, 0, 0);
        Set<Hkl> seen = net.nodes().stream()
                .filter(ZoneNet.Node::allowed)
                .map(ZoneNet.Node::hkl)
                .collect(Collectors.toSet());
        assertFalse(seen.contains(absent));
        assertEquals(
                seen.stream().anyMatch(g -> seen.contains(absent.minus(g))),
                net.nodes().stream().anyMatch(n -> n.hkl().equals(absent)),
                "a node when two spots of the zone add up to it");
        // The spots that are seen are indexed, whatever their parity.
        assertTrue(seen.contains(new Hkl(4, 0, 0))
                && seen.contains(new Hkl(0, 6, -2))
                && seen.contains(new Hkl(1, 3, -1)));
    }

    /** A zone and its opposite show mirror images: what is to the left of the reference here is to its right there. */
    @Test
    void nodes_oppositeZone_mirrorImage() {
        Crystal quartz = CrystalShelf.find("quartz").orElseThrow();
        ReflectionStrengths strengths = new ReflectionStrengths(quartz, BEAM, 1);
        Uvw zone = new Uvw(1, 2, 3);
        Hkl reference = ZoneNet.of(zone, strengths).orElseThrow().reference();
        ZoneNet net = ZoneNet.of(zone, strengths, reference).orElseThrow();
        ZoneNet opposite = ZoneNet.of(zone.negate(), strengths, reference).orElseThrow();
        Map<Hkl, ZoneNet.Node> other = opposite.nodes().stream().collect(Collectors.toMap(ZoneNet.Node::hkl, n -> n));
        for (ZoneNet.Node node : net.nodes()) {
            assertEquals(node.x(), other.get(node.hkl()).x(), 1e-12);
            assertEquals(-node.y(), other.get(node.hkl()).y(), 1e-12);
        }
    }

    @Test
    void axes_anyZone_rightHandedAndTowardsTheSource() {
        Crystal crystal = CrystalShelf.find("albite")
                .or(() -> CrystalShelf.find("quartz"))
                .orElseThrow();
        ReflectionStrengths strengths = new ReflectionStrengths(crystal, BEAM, 0.8);
        Uvw zone = new Uvw(1, -1, 2);
        ZoneNet net = ZoneNet.of(zone, strengths).orElseThrow();
        Vector3 x = net.axis(0);
        Vector3 y = net.axis(1);
        Vector3 z = net.axis(2);
        assertEquals(0, x.cross(y).minus(z).norm(), 1e-12);
        assertEquals(0, z.angleTo(crystal.lattice().vector(zone)), 1e-7);
        for (ZoneNet.Node node : net.nodes()) {
            Vector3 g = crystal.lattice().reciprocal().vector(node.hkl());
            assertEquals(0, x.times(node.x()).plus(y.times(node.y())).minus(g).norm(), 1e-12);
        }
    }

    @Test
    void nearest_placesAboutNodes_sameAsALoopOverAll() {
        Crystal crystal = CrystalShelf.find("quartz").orElseThrow();
        java.util.Random random = new java.util.Random(7);
        for (Uvw zone : List.of(new Uvw(0, 0, 1), new Uvw(1, 2, 3), new Uvw(0, 1, 0))) {
            ZoneNet net = net(crystal, zone, 1.2);
            for (int n = 0; n < 2000; n++) {
                ZoneNet.Node node = net.nodes().get(random.nextInt(net.nodes().size()));
                // Within 0.4 of the spacing of a node no other lattice point is nearer.
                Vector2 off = Vector2.ofPolar(0.4 * net.spacing() * random.nextDouble(), 7 * random.nextDouble());
                double f = net.flatness(node);
                ZoneNet.Node found = net.nearest(node.x() * f + off.x(), node.y() * f + off.y());
                assertEquals(node, found, zone + " " + node.hkl());
            }
        }
    }

    @Test
    void nearest_directBeamOrFarOutside_none() {
        ZoneNet net = net(crystal("fcc"), new Uvw(0, 0, 1), 1.5);
        assertNull(net.nearest(0.001, -0.002));
        assertNull(net.nearest(3, 3));
        assertNull(net.nearest(1e6, -1e6));
        assertNotNull(net.nearest(0.5, 0));
    }

    /** A beam at sin 2θ = λ|g⊥| meets a flat detector at tan 2θ. */
    @Test
    void flatness_flatDetector_stretchesLikeTheTangent() {
        ZoneNet net = net(crystal("fcc"), new Uvw(0, 0, 1), 2);
        for (ZoneNet.Node node : net.nodes()) {
            double sine = BEAM.wavelength() * node.g();
            assertEquals(Math.tan(Math.asin(sine)) / sine, net.flatness(node), 1e-14);
        }
    }

    @Test
    void families_cubic001_oneForEachForm() {
        ZoneNet net = net(crystal("fcc"), new Uvw(0, 0, 1), 1.2);
        Map<Integer, List<Hkl>> families = net.nodes().stream()
                .collect(Collectors.groupingBy(
                        ZoneNet.Node::family, Collectors.mapping(ZoneNet.Node::hkl, Collectors.toList())));
        // 200, 220, 400 and 420 to 1.2 1/Å at 4 Å.
        assertEquals(
                List.of(4, 4, 4, 8),
                families.values().stream().map(List::size).sorted().toList());
        for (List<Hkl> family : families.values()) {
            for (Hkl hkl : family) {
                assertTrue(family.contains(hkl.negate()));
            }
        }
    }

    @Test
    void nodeArea_primitiveNet_areaOfItsMesh() {
        // bcc [001]: the net of 110 and 1 −1 0, of area 2/a²; fcc [001]: 4/a². It is counted in a disc, to its rim.
        ZoneNet bcc = net(crystal("bcc"), new Uvw(0, 0, 1), 3);
        assertEquals(2 / 16.0, bcc.nodeArea(), 2 / 16.0 / Math.sqrt(bcc.nodes().size()));
        ZoneNet fcc = net(crystal("fcc"), new Uvw(0, 0, 1), 3);
        assertEquals(4 / 16.0, fcc.nodeArea(), 4 / 16.0 / Math.sqrt(fcc.nodes().size()));
    }

    /** fcc [001]: neighbouring nodes are 2/a apart, lattice points of the plane half as far: spacing is a lower bound. */
    @Test
    void spacing_centredNet_notAboveTheDistanceOfNodes() {
        ZoneNet net = net(crystal("fcc"), new Uvw(0, 0, 1), 3);
        assertEquals(0.5, net.shortest(), 1e-12);
        assertTrue(net.spacing() > 0 && net.spacing() <= net.shortest() + 1e-12);
    }

    @Test
    void of_tooFewReflectionsOrOneRow_empty() {
        assertTrue(ZoneNet.of(new Uvw(0, 0, 1), new ReflectionStrengths(crystal("fcc"), BEAM, 0.4))
                .isEmpty());
        // [5 3 1] of fcc to 0.9 1/Å: a brute-force list shows only one row.
        Crystal fcc = crystal("fcc");
        Uvw zone = new Uvw(5, 3, 1);
        ReflectionStrengths strengths = new ReflectionStrengths(fcc, BEAM, 0.9);
        List<Vector3> seen = strengths.reflections().stream()
                .filter(r -> r.hkl().dot(zone) == 0)
                .map(r -> r.g())
                .toList();
        boolean oneRow = seen.stream().allMatch(g -> g.cross(seen.get(0)).norm() < 1e-9);
        assertTrue(seen.size() < 4 || oneRow);
        assertTrue(ZoneNet.of(zone, strengths).isEmpty());
    }

    @Test
    void reference_given_isTheX() {
        ReflectionStrengths strengths = new ReflectionStrengths(crystal("bcc"), BEAM, 1.5);
        Hkl reference = new Hkl(1, -2, 1);
        ZoneNet net = ZoneNet.of(new Uvw(1, 1, 1), strengths, reference).orElseThrow();
        ZoneNet.Node node = net.nodes().stream()
                .filter(n -> n.hkl().equals(reference))
                .findFirst()
                .orElseThrow();
        assertEquals(0, node.y(), 1e-12);
        assertTrue(node.x() > 0);
        assertEquals(reference, net.reference());
    }

    /** Of face-centred cubic [001] the reflections 400, 440 and 800 span a square net of 400 and 040; a row spans none. */
    @Test
    void basisOf_someReflections_theirOwnNet() {
        Crystal fcc = crystal("fcc");
        ZoneNet net = net(fcc, new Uvw(0, 0, 1), 2.6);
        double edge = fcc.lattice().reciprocal().vector(new Hkl(4, 0, 0)).norm();
        List<Vector2> basis = net.basisOf(List.of(new Hkl(8, 0, 0), new Hkl(4, 4, 0), new Hkl(4, 0, 0)));
        assertEquals(edge, basis.get(0).norm(), 1e-9);
        assertEquals(edge, basis.get(1).norm(), 1e-9);
        assertEquals(0, basis.get(0).dot(basis.get(1)), 1e-9);
        assertTrue(net.basisOf(List.of(new Hkl(2, 2, 0), new Hkl(-4, -4, 0))).isEmpty());
    }
}
