package io.github.zonewright.symmetry;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import java.util.List;
import java.util.Random;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;

class SpaceGroupTest {

    private static final SpaceGroup DIAMOND = SpaceGroup.ofHall("F 4d 2 3 -1d");
    private static final SpaceGroup HCP = SpaceGroup.ofHall("-P 6c 2c");

    private static List<SymmetryOperation> operations(String... triplets) {
        return Stream.of(triplets).map(SymmetryOperation::parse).toList();
    }

    @Test
    void ofOperations_namesWhatIsMissing() {
        IllegalArgumentException e = assertThrows(
                IllegalArgumentException.class,
                () -> SpaceGroup.ofOperations(operations("x,y,z", "-x,y+1/2,-z", "-x,-y,-z")));
        assertTrue(e.getMessage().contains("x,-y+1/2,z is missing"), e.getMessage());
        assertThrows(IllegalArgumentException.class, () -> SpaceGroup.ofOperations(List.of()));
        assertThrows(IllegalArgumentException.class, () -> SpaceGroup.ofOperations(operations("-x,-y,-z")));
    }

    @Test
    void ofOperations_aRepeatedOperationCountsOnce() {
        assertEquals(
                2,
                SpaceGroup.ofOperations(operations("x,y,z", "-x,-y,-z", "-x+1,-y,-z"))
                        .order());
    }

    @Test
    void generatedBy_refusesWhatIsNoSpaceGroup() {
        assertThrows(IllegalArgumentException.class, () -> SpaceGroup.generatedBy(operations("x+y,y,z")));
        // two threefold axes that fit no common lattice generate a group without end
        assertThrows(
                IllegalArgumentException.class,
                () -> SpaceGroup.generatedBy(operations("-y,x-y,z", "y,z,x", "-y,x,z")));
        // a translation of 1/720 would give 720 centrings, with twofold axes 1440 and more
        assertThrows(
                IllegalArgumentException.class,
                () -> SpaceGroup.generatedBy(
                        List.of(SymmetryOperation.ofTranslation(1, 0, 0), SymmetryOperation.ofTranslation(0, 1, 0))));
    }

    @Test
    void generatedBy_noOperationIsP1() {
        assertEquals(SpaceGroup.ofHall("P 1"), SpaceGroup.generatedBy(List.of()));
    }

    /** Reflection conditions, International Tables A, No. 227 and 194. */
    @Test
    void isSystematicallyAbsent_conditionsOfInternationalTables() {
        assertTrue(DIAMOND.isSystematicallyAbsent(new Hkl(2, 0, 0)));
        assertFalse(DIAMOND.isSystematicallyAbsent(new Hkl(2, 2, 2)), "222 is absent by the atoms only");
        assertFalse(DIAMOND.isSystematicallyAbsent(new Hkl(4, 0, 0)));
        assertTrue(HCP.isSystematicallyAbsent(new Hkl(0, 0, 1)));
        assertTrue(HCP.isSystematicallyAbsent(new Hkl(1, 1, 1)));
        assertFalse(HCP.isSystematicallyAbsent(new Hkl(1, 0, 1)));
        assertFalse(HCP.isSystematicallyAbsent(new Hkl(0, 0, 0)));
    }

    /** Multiplicities of powder lines, International Tables A, table 3.2.3.2. */
    @Test
    void equivalents_multiplicities() {
        assertEquals(8, DIAMOND.equivalents(new Hkl(1, 1, 1)).size());
        assertEquals(24, DIAMOND.equivalents(new Hkl(3, 1, 1)).size());
        assertEquals(48, DIAMOND.equivalents(new Hkl(5, 3, 1)).size());
        assertEquals(
                24,
                SpaceGroup.ofHall("-P 2ac 2ab 3").equivalents(new Hkl(1, 2, 3)).size());
        assertEquals(6, HCP.equivalents(new Hkl(1, 0, 0)).size());
        assertEquals(12, HCP.equivalents(new Hkl(1, 0, 1)).size());
        assertEquals(1, DIAMOND.equivalents(new Hkl(0, 0, 0)).size());
        assertEquals(12, DIAMOND.equivalents(new Uvw(0, 1, 1)).size());
        assertEquals(6, HCP.equivalents(new Uvw(1, 0, 0)).size());
        assertTrue(HCP.equivalents(new Uvw(1, 0, 0)).contains(new Uvw(1, 1, 0)));
        assertFalse(HCP.equivalents(new Uvw(1, 0, 0)).contains(new Uvw(1, -1, 0)));
        assertTrue(HCP.equivalents(new Hkl(1, 0, 0)).contains(new Hkl(1, -1, 0)));
    }

    /** Wyckoff multiplicities, International Tables A. */
    @Test
    void orbit_wyckoffMultiplicities() {
        assertEquals(8, DIAMOND.orbit(Vector3.ZERO, 1e-4).size());
        assertEquals(16, DIAMOND.orbit(new Vector3(0.125, 0.125, 0.125), 1e-4).size());
        assertEquals(192, DIAMOND.orbit(new Vector3(0.03, 0.11, 0.27), 1e-4).size());
        Vector3 site = HCP.snap(new Vector3(0.3333, 0.6667, 0.25), 1e-3);
        assertEquals(2, HCP.orbit(site, 1e-4).size());
        assertEquals(site, HCP.orbit(site, 1e-4).get(0).position());
    }

    @Test
    void snap_putsTruncatedThirdsRight() {
        Vector3 site = HCP.snap(new Vector3(0.3333, 0.6667, 0.2501), 1e-3);
        assertEquals(1.0 / 3, site.x(), 1e-12);
        assertEquals(2.0 / 3, site.y(), 1e-12);
        assertEquals(0.25, site.z(), 1e-12);
        Vector3 general = new Vector3(0.31, 0.62, 0.2);
        assertEquals(general, SpaceGroup.ofHall("P 1").snap(general, 1e-3));
    }

    @Test
    void properLaueRotations_areRotationsOfTheCell() {
        Lattice hexagonal = Lattice.hexagonal(3.2, 5.2);
        List<Matrix3> rotations = HCP.properLaueRotations(hexagonal);
        assertEquals(12, rotations.size());
        for (Matrix3 r : rotations) {
            assertEquals(1, r.determinant(), 1e-12);
            assertTrue(r.times(r.transpose()).distanceTo(Matrix3.IDENTITY) < 1e-12);
        }
        SpaceGroup zincblende = SpaceGroup.ofHall("F -4 2 3");
        assertEquals(24, zincblende.properLaueRotations().size());
        assertEquals(12, zincblende.properRotations(Lattice.cubic(5.65)).size());
    }

    @Test
    void fits_asksForTheMetric() {
        assertTrue(HCP.fits(Lattice.hexagonal(3.2, 5.2), 1e-6));
        assertFalse(HCP.fits(Lattice.cubic(3.2), 1e-2));
        assertFalse(DIAMOND.fits(Lattice.tetragonal(5.43, 5.50), 1e-3));
        assertTrue(SpaceGroup.ofHall("-P 1").fits(Lattice.ofDegrees(3, 4, 5, 80, 95, 103), 1e-9));
    }

    /** Closure, order and absences of equivalents, for every tabulated setting with a seeded choice of operations. */
    @Test
    void operations_propertiesOfEveryGroup() {
        Random random = new Random(20261201);
        for (SpaceGroupSetting setting : SpaceGroups.settings()) {
            SpaceGroup group = setting.group();
            List<SymmetryOperation> all = group.operations();
            assertEquals(0, group.order() % group.pointGroup().order());
            assertEquals(
                    group.order(),
                    group.pointGroup().order() * group.centringVectors().size());
            for (int i = 0; i < 50; i++) {
                SymmetryOperation a = all.get(random.nextInt(all.size()));
                SymmetryOperation b = all.get(random.nextInt(all.size()));
                assertTrue(all.contains(a.after(b).reduced()), setting.toString());
                assertTrue(all.contains(a.inverse().reduced()), setting.toString());
                Hkl hkl = new Hkl(random.nextInt(13) - 6, random.nextInt(13) - 6, random.nextInt(13) - 6);
                List<Hkl> family = group.equivalents(hkl);
                assertEquals(0, 2 * group.laueClass().properOrder() % family.size());
                boolean absent = group.isSystematicallyAbsent(hkl);
                assertTrue(family.stream().allMatch(e -> group.isSystematicallyAbsent(e) == absent));
            }
            Vector3 site = new Vector3(random.nextDouble(), random.nextDouble(), random.nextDouble());
            assertEquals(group.order(), group.orbit(site, 1e-9).size(), setting.toString());
        }
    }
}
