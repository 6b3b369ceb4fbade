package io.github.zonewright.orientation;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.symmetry.SpaceGroup;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class MisorientationTest {

    private static final Lattice CUBE = Lattice.cubic(3.6);
    private static final SpaceGroup FCC = SpaceGroup.ofHall("-F 4 2 3");
    private static final SpaceGroup HCP = SpaceGroup.ofHall("-P 6c 2c");

    private static OrientedLattice cubic(Rotation r) {
        return new OrientedLattice(CUBE, FCC, new Orientation(r));
    }

    private static Rotation random(Random random) {
        return Rotation.ofQuaternion(
                random.nextGaussian(), random.nextGaussian(), random.nextGaussian(), random.nextGaussian());
    }

    private static Misorientation cubes(Rotation between) {
        Rotation first = random(new Random(5));
        return Misorientation.between(cubic(first), cubic(first.after(between)));
    }

    private static Rotation about(String axis, double degrees) {
        return Rotation.ofAxisAngle(CUBE.vector(Uvw.parse(axis)), Math.toRadians(degrees));
    }

    /** Angles and axes as tabulated by Grimmer, Bollmann & Warrington, Acta Cryst. A30 (1974) 197; from memory. */
    @ParameterizedTest
    @CsvSource({
        "Σ3, 60.00, 1 1 1", "Σ5, 36.87, 1 0 0", "Σ7, 38.21, 1 1 1", "Σ9, 38.94, 1 1 0", "Σ11, 50.48, 1 1 0",
        "Σ13a, 22.62, 1 0 0", "Σ13b, 27.80, 1 1 1", "Σ15, 48.19, 2 1 0", "Σ17a, 28.07, 1 0 0", "Σ17b, 61.93, 2 2 1",
        "Σ19a, 26.53, 1 1 0", "Σ19b, 46.83, 1 1 1", "Σ21a, 21.79, 1 1 1", "Σ21b, 44.42, 2 1 1", "Σ23, 40.46, 3 1 1",
        "Σ25a, 16.26, 1 0 0", "Σ25b, 51.68, 3 3 1", "Σ27a, 31.59, 1 1 0", "Σ27b, 35.43, 2 1 0", "Σ29a, 43.60, 1 0 0",
        "Σ29b, 46.40, 2 2 1"
    })
    void of_publishedCoincidenceLattices_named(String name, double degrees, String axis) {
        Misorientation m = cubes(about(axis, degrees));
        assertEquals(degrees, Math.toDegrees(m.angle()), 0.006);
        assertEquals(Uvw.parse(axis), m.nearestDirection().uvw());
        List<OrientationRelation> relations = OrientationRelation.of(m);
        OrientationRelation last = relations.get(relations.size() - 1);
        assertEquals(name, last.name());
        assertEquals(0, Math.toDegrees(last.deviation()), 0.01);
        CoincidenceLattice row = CoincidenceLattice.table().stream()
                .filter(c -> c.name().equals(name))
                .findFirst()
                .orElseThrow();
        assertEquals(degrees, Math.toDegrees(row.angle()), 0.006);
        assertEquals(21, CoincidenceLattice.table().size());
    }

    /** The same relation said otherwise (textbook): 70.53° about [1 1 0] and 180° about [1 1 1] or [1 1 2] are Σ3. */
    @ParameterizedTest
    @CsvSource({"1 1 0, 70.5288", "1 1 1, 180", "1 1 2, 180", "-1 1 1, -60"})
    void between_otherNamesOfTheTwin_sixtyDegrees(String axis, double degrees) {
        Misorientation m = cubes(about(axis, degrees));
        assertEquals(60, Math.toDegrees(m.angle()), 1e-4);
        assertEquals("60.00° about [1 1 1]", m.text());
        assertEquals(
                List.of("twin on (1 1 1)", "Σ3"),
                OrientationRelation.of(m).stream()
                        .map(OrientationRelation::name)
                        .toList());
    }

    /** 15°/√3 = 8.66° for Σ3 (Brandon, Acta Metallurgica 14 (1966) 1479; from memory). */
    @Test
    void of_brandonsLimit_decides() {
        assertEquals(8.66, Math.toDegrees(CoincidenceLattice.table().get(0).brandonLimit()), 0.005);
        assertTrue(OrientationRelation.of(cubes(about("1 1 1", 60 - 8.6))).stream()
                .anyMatch(r -> r.name().equals("Σ3") && Math.abs(Math.toDegrees(r.deviation()) - 8.6) < 1e-6));
        assertTrue(OrientationRelation.of(cubes(about("1 1 1", 60 - 8.7))).stream()
                .noneMatch(r -> r.name().equals("Σ3")));
    }

    @Test
    void of_sameOrientation_noRelation() {
        Misorientation m = cubes(Rotation.ofAxisAngle(Vector3.Z, Math.PI / 2));
        assertEquals(0, m.angle(), 1e-7);
        assertTrue(OrientationRelation.of(m).isEmpty());
    }

    /**
     * The largest angle between cubes is 62.80°, about [1 1 √2−1] (Mackenzie, Biometrika 45 (1958) 229; from memory), between
     * hexagonal crystals 93.84° (Grimmer, Scripta Metall. 14 (1980) 161; from memory): no random pair exceeds it, and some
     * come near.
     */
    @Test
    void between_randomPairs_neverAboveTheLargestAngle() {
        Lattice hexagonal = Lattice.hexagonal(3.2, 5.2);
        Random random = new Random(62);
        double cubes = 0;
        double hexagons = 0;
        for (int i = 0; i < 4000; i++) {
            Rotation a = random(random);
            Rotation b = random(random);
            cubes = Math.max(cubes, Misorientation.between(cubic(a), cubic(b)).angle());
            hexagons = Math.max(
                    hexagons,
                    Misorientation.between(
                                    new OrientedLattice(hexagonal, HCP, new Orientation(a)),
                                    new OrientedLattice(hexagonal, HCP, new Orientation(b)))
                            .angle());
        }
        assertTrue(Math.toDegrees(cubes) < 62.80 && Math.toDegrees(cubes) > 61, Math.toDegrees(cubes) + "°");
        assertTrue(Math.toDegrees(hexagons) < 93.85 && Math.toDegrees(hexagons) > 91, Math.toDegrees(hexagons) + "°");
        Vector3 mackenzie = new Vector3(1, 1, Math.sqrt(2) - 1);
        double largest = 2 * Math.acos((2 + Math.sqrt(2)) / 4);
        assertEquals(62.80, Math.toDegrees(largest), 0.005);
        assertEquals(largest, cubes(Rotation.ofAxisAngle(mackenzie, largest)).angle(), 1e-7);
    }

    /**
     * Half a turn about the normals of twin planes (Partridge 1967; Christian & Mahajan 1995; from memory): magnesium and titanium {1 0 −1 2} 86.3° and 85.0°
     * about ⟨1 1 −2 0⟩, titanium {1 1 −2 2} 64.4° and {1 1 −2 1} 35.0° about ⟨1 −1 0 0⟩.
     */
    @ParameterizedTest
    @CsvSource({
        "3.2094, 5.2108, 1 0 2, 86.3, 1 1 0",
        "2.951, 4.684, 1 0 2, 85.0, 1 1 0",
        "2.951, 4.684, 1 1 2, 64.4, 1 2 0",
        "2.951, 4.684, 1 1 1, 35.0, 1 2 0"
    })
    void of_twinsOfHexagonalMetals_named(double a, double c, String plane, double degrees, String family) {
        Lattice lattice = Lattice.hexagonal(a, c);
        Rotation twin = Rotation.ofAxisAngle(lattice.reciprocal().vector(Hkl.parse(plane)), Math.PI);
        Rotation first = random(new Random(8));
        Misorientation m = Misorientation.between(
                new OrientedLattice(lattice, HCP, new Orientation(first)),
                new OrientedLattice(lattice, HCP, new Orientation(first.after(twin))));
        assertEquals(degrees, Math.toDegrees(m.angle()), 0.15);
        assertTrue(
                HCP.equivalents(Uvw.parse(family)).contains(m.nearestDirection().uvw()), m.text());
        OrientationRelation relation = OrientationRelation.of(m).get(0);
        String named = relation.name().replaceAll("twin on \\((.*)\\)", "$1");
        assertTrue(HCP.equivalents(Hkl.parse(plane)).contains(Hkl.parse(named)), relation.text());
        assertEquals(0, relation.deviation(), 1e-6);
    }

    /** Half a turn about c, no symmetry of quartz but of its lattice (the Dauphiné law). */
    @Test
    void of_dauphineTwinOfQuartz_onTheBase() {
        Lattice quartz = Lattice.hexagonal(4.913, 5.405);
        SpaceGroup group = SpaceGroup.ofHall("P 32 2\"");
        Misorientation m = Misorientation.between(
                new OrientedLattice(quartz, group, new Orientation(Rotation.IDENTITY)),
                new OrientedLattice(quartz, group, new Orientation(Rotation.ofAxisAngle(Vector3.Z, Math.PI))));
        assertEquals(60, Math.toDegrees(m.angle()), 1e-6);
        assertEquals("twin on (0 0 1)", OrientationRelation.of(m).get(0).name());
    }

    /**
     * (1 1 1) of austenite on (0 1 1) of ferrite with [−1 0 1] on [−1 −1 1] (Kurdjumov & Sachs 1930): 42.85°, textbook, from memory. Two
     * different cells have no twin and no Σ.
     */
    @Test
    void between_kurdjumovSachs_publishedAngle() {
        Rotation gamma = axes(new Vector3(1, 1, 1), new Vector3(-1, 0, 1));
        Rotation alpha = axes(new Vector3(0, 1, 1), new Vector3(-1, -1, 1));
        Misorientation m = Misorientation.between(
                cubic(gamma),
                new OrientedLattice(Lattice.cubic(2.87), SpaceGroup.ofHall("-I 4 2 3"), new Orientation(alpha)));
        assertEquals(42.85, Math.toDegrees(m.angle()), 0.01);
        assertTrue(OrientationRelation.of(m).isEmpty());
    }

    private static Rotation axes(Vector3 normal, Vector3 direction) {
        Vector3 z = normal.normalize();
        Vector3 x = direction.normalize();
        return Rotation.ofMatrix(Matrix3.ofRows(x, z.cross(x), z));
    }

    /** A rotation of either crystal by its own symmetry, or of both in the microscope, changes nothing. */
    @Test
    void between_symmetricallyTurned_same() {
        Random random = new Random(9);
        for (int i = 0; i < 20; i++) {
            Rotation a = random(random);
            Rotation b = random(random);
            Rotation whole = random(random);
            Rotation quarter = Rotation.ofAxisAngle(Vector3.X, Math.PI / 2);
            Misorientation plain = Misorientation.between(cubic(a), cubic(b));
            Misorientation turned = Misorientation.between(cubic(whole.after(a).after(quarter)), cubic(whole.after(b)));
            assertEquals(plain.angle(), turned.angle(), 1e-7);
            assertEquals(0, plain.axis().minus(turned.axis()).norm(), 1e-6);
        }
    }
}
