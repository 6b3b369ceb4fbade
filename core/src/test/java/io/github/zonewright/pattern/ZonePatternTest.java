package io.github.zonewright.pattern;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.AtomSite;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import java.util.List;
import java.util.Set;
import java.util.TreeSet;
import java.util.stream.Collectors;
import org.junit.jupiter.api.Test;

class ZonePatternTest {
    private static final Beam BEAM = Beam.ofKilovolts(200);
    private static final Crystal COPPER = CrystalShelf.find("copper").orElseThrow();
    private static final Crystal SILICON = CrystalShelf.find("silicon").orElseThrow();
    private static final Crystal MAGNESIUM = CrystalShelf.find("magnesium").orElseThrow();

    private static Crystal primitive() {
        return Crystal.of("polonium", Lattice.cubic(3.35), "P m -3 m", AtomSite.of("Po", 0, 0, 0));
    }

    private static List<String> zones(Crystal crystal, int count) {
        return LowestZones.of(crystal, count).stream().map(Uvw::toString).toList();
    }

    private static ZonePattern pattern(Crystal crystal, int u, int v, int w) {
        return ZonePattern.of(crystal, BEAM, new Uvw(u, v, w), 1.2).orElseThrow();
    }

    private static boolean isDoubled(ZonePattern pattern, double length) {
        return pattern.doubled().stream().anyMatch(g -> Math.abs(g.norm() - length) < 1e-6);
    }

    /** On a primitive cubic lattice the repeat is a√(u² + v² + w²). */
    @Test
    void zones_primitiveCubic_goByTheSumOfSquares() {
        assertEquals(
                List.of("1 0 0", "1 1 0", "1 1 1", "2 1 0", "2 1 1", "2 2 1", "3 1 0", "3 1 1", "3 2 0", "3 2 1"),
                zones(primitive(), 10));
    }

    /** Face-centred: half of [uvw] is a lattice vector where u + v + w is even, so [211] comes before [111]. */
    @Test
    void zones_faceCentredCubic_reckonTheCentring() {
        assertEquals(List.of("1 1 0", "1 0 0", "2 1 1", "3 1 0", "1 1 1", "3 2 1"), zones(COPPER, 6));
        assertEquals(3.6149 / Math.sqrt(2), LowestZones.repeat(COPPER, new Uvw(0, 1, 1)), 0.002);
        assertEquals(3.6149 * Math.sqrt(3), LowestZones.repeat(COPPER, new Uvw(1, 1, 1)), 0.003);
    }

    /** Net cell times repeat is the volume of the reciprocal cell: densities follow from the drawn spots too. */
    @Test
    void zones_netsGrowThinner() {
        double before = 0;
        for (Uvw zone : LowestZones.of(COPPER, 8)) {
            ZonePattern p = ZonePattern.of(COPPER, BEAM, zone, 2).orElseThrow();
            Vector2 a = place(p, p.first());
            Vector2 b = place(p, p.second());
            double area = Math.abs(a.cross(b));
            assertEquals(LowestZones.repeat(COPPER, zone) * 4 / COPPER.lattice().volume(), area, 1e-9);
            assertTrue(area >= before - 1e-12);
            before = area;
        }
    }

    private static Vector2 place(ZonePattern pattern, Hkl hkl) {
        var orientation = pattern.setting().orientation(COPPER.lattice());
        var g = orientation.scatteringVector(COPPER.lattice(), hkl);
        return new Vector2(g.x(), g.y());
    }

    @Test
    void zones_noTwoAreEquivalent() {
        for (Crystal crystal : List.of(COPPER, MAGNESIUM)) {
            Set<Uvw> seen = new TreeSet<>();
            for (Uvw zone : LowestZones.of(crystal, 20)) {
                assertFalse(seen.contains(zone), zone.toString());
                seen.addAll(crystal.spaceGroup().equivalents(zone));
            }
        }
    }

    @Test
    void zones_oneLongEdge_isAmongThem() {
        Crystal layered = Crystal.of("layered", Lattice.tetragonal(3, 40), "P 4/m m m", AtomSite.of("C", 0, 0, 0));
        assertTrue(zones(layered, 12).contains("0 0 1"));
    }

    @Test
    void zones_wrongCount_isRefused() {
        String said = assertThrows(IllegalArgumentException.class, () -> LowestZones.of(COPPER, 0))
                .getMessage();
        assertTrue(said.contains("number of zones: 0"), said);
    }

    /** Silicon: 002 is dark by itself and lit along [110], not along [001] (Williams, from memory). */
    @Test
    void doubled_silicon_002LitAlong110Alone() {
        double a = SILICON.lattice().a();
        assertTrue(isDoubled(pattern(SILICON, 1, 1, 0), 2 / a));
        assertEquals(List.of(), pattern(SILICON, 0, 0, 1).doubled());
    }

    /** Close-packed hexagonal: 0001 is lit along [11−20], not along [10−10] (Edington, from memory). */
    @Test
    void doubled_magnesium_0001LitAlong1120Alone() {
        double c = MAGNESIUM.lattice().c();
        assertTrue(isDoubled(pattern(MAGNESIUM, 1, 0, 0), 1 / c), "[100] is [2 -1 -1 0]");
        assertFalse(isDoubled(pattern(MAGNESIUM, 2, 1, 0), 1 / c), "[210] is [1 0 -1 0]");
    }

    /** What the centring forbids is never reached: sums of lattice vectors are lattice vectors. */
    @Test
    void doubled_copper_none() {
        for (Uvw zone : LowestZones.of(COPPER, 12)) {
            assertEquals(
                    List.of(),
                    ZonePattern.of(COPPER, BEAM, zone, 1.5)
                            .map(ZonePattern::doubled)
                            .orElse(List.of()));
        }
    }

    /** Copper [110]: 111 at √3/a, then 002 at 2/a; the angle between 111 and 002 is 54.74° (any textbook). */
    @Test
    void basis_copper110_isWhatTextbooksShow() {
        ZonePattern p = pattern(COPPER, 1, 1, 0);
        double a = COPPER.lattice().a();
        assertEquals(Math.sqrt(3) / a, place(p, p.first()).norm(), 1e-9);
        assertEquals(Math.sqrt(3) / a, place(p, p.second()).norm(), 1e-9);
        double between = Math.toDegrees(place(p, p.second()).azimuth());
        assertEquals(70.53, between, 0.01);
        assertEquals(0, place(p, p.first()).azimuth(), 1e-12);
    }

    @Test
    void spots_areTheZeroLayer_withoutForbiddenOnes() {
        ZonePattern p = pattern(COPPER, 1, 1, 0);
        Set<String> odd = p.spots().stream()
                .map(s -> s.hkl())
                .filter(h -> (h.h() + h.k()) % 2 != 0 || (h.k() + h.l()) % 2 != 0 || h.h() + h.k() != 0)
                .map(Hkl::toString)
                .collect(Collectors.toSet());
        assertEquals(Set.of(), odd);
        // |hkl| up to 1.2 · 3.615 = 4.34: four 111, two 002, two 220, four 113, four 222, two 004.
        assertEquals(18, p.spots().size());
    }

    @Test
    void of_tooShortAReach_isEmpty() {
        assertTrue(ZonePattern.of(COPPER, BEAM, new Uvw(1, 1, 1), 0.5).isEmpty());
    }
}
