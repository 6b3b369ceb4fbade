package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.AtomSite;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import org.junit.jupiter.api.Test;

/**
 * Counted by hand for indices up to 1: 26 directions, 6 of type 100, 12 of type 110 and 8 of type 111, and how the proper
 * rotations of each Laue class join them.
 */
class ZoneCatalogueTest {

    private static final Lattice CUBE = Lattice.cubic(5);
    private static final Lattice PRISM = Lattice.tetragonal(4, 6);
    private static final Lattice HEXAGON = Lattice.hexagonal(4, 6);
    private static final Lattice BRICK = Lattice.orthorhombic(4, 5, 6.3);
    private static final Lattice SLANTED = Lattice.monoclinicDegrees(5, 6, 7, 100);

    private static List<Uvw> zones(String spaceGroup, Lattice lattice, int largest) {
        return ZoneCatalogue.zones(Crystal.of("test", lattice, spaceGroup, AtomSite.of("Fe", 0.1, 0.2, 0.3)), largest);
    }

    /** How many of the zones are as long as a given one, and at the same angle to c but in a cube. */
    private static long like(List<Uvw> zones, Lattice lattice, int u, int v, int w) {
        Uvw one = new Uvw(u, v, w);
        return zones.stream()
                .filter(z ->
                        Math.abs(lattice.vector(z).norm() - lattice.vector(one).norm()) < 1e-9)
                .filter(z -> lattice.equals(CUBE) || Math.abs(z.w()) == Math.abs(w))
                .count();
    }

    /** −1: no rotation but the identity, so every direction stands for itself. */
    @Test
    void zones_triclinic_all26() {
        List<Uvw> zones = zones("P -1", Lattice.ofDegrees(5, 6, 7, 80, 95, 105), 1);
        assertEquals(26, zones.size());
        assertEquals(26, new HashSet<>(zones).size());
    }

    /** 2/m, b unique: (u v w) → (−u v −w) has two fixed points, ±[010]; (26 + 2)/2 orbits. */
    @Test
    void zones_monoclinic_14() {
        List<Uvw> zones = zones("P 1 2/m 1", SLANTED, 1);
        assertEquals(14, zones.size());
        assertTrue(zones.contains(new Uvw(0, 1, 0)) && zones.contains(new Uvw(0, -1, 0)));
        assertEquals(1, like(zones, SLANTED, 1, 0, 0));
        assertEquals(2, like(zones, SLANTED, 1, 1, 0));
    }

    /** mmm: 222 has 4 rotations, each half turn fixes two directions: (26 + 3·2)/4 = 8. */
    @Test
    void zones_orthorhombic_8() {
        List<Uvw> zones = zones("P m m m", BRICK, 1);
        assertEquals(8, zones.size());
        assertEquals(2, like(zones, BRICK, 1, 1, 1), "mirrors would join them, no rotation does");
        assertEquals(1, like(zones, BRICK, 1, 1, 0));
    }

    /** 4/m: four rotations about c. The 24 directions off c fall into 6 orbits, ±c stay: 8. */
    @Test
    void zones_4m_upAndDownApart() {
        List<Uvw> zones = zones("P 4/m", PRISM, 1);
        assertEquals(8, zones.size());
        assertEquals(2, like(zones, PRISM, 0, 0, 1));
        assertEquals(1, like(zones, PRISM, 1, 0, 0));
        assertEquals(1, like(zones, PRISM, 1, 1, 0));
        assertEquals(2, like(zones, PRISM, 1, 1, 1));
        assertEquals(4, like(zones("P 4/m", PRISM, 3), PRISM, 1, 2, 3), "16 directions, 4 rotations");
    }

    /** 4/mmm: c, a, 110, 101, 111 and no more: half turns across c join every one with its opposite. */
    @Test
    void zones_4mmm_5() {
        assertEquals(5, zones("P 4/m m m", PRISM, 1).size());
        assertEquals(2, like(zones("P 4/m m m", PRISM, 3), PRISM, 1, 2, 3), "16 directions, 8 rotations: two hands");
    }

    /** m−3: 23 has 12 rotations: 100 (6), 110 (12), 111 and −1−1−1 (4 each, tetrahedron): 4 orbits. */
    @Test
    void zones_m3_111InTwoHands() {
        List<Uvw> zones = zones("P m -3", CUBE, 1);
        assertEquals(4, zones.size());
        assertEquals(2, like(zones, CUBE, 1, 1, 1));
        assertEquals(1, like(zones, CUBE, 0, 0, 1));
        assertEquals(1, like(zones, CUBE, 1, 1, 0));
    }

    /**
     * m−3 to index 2: besides those, 210 and 120 (12 each, a half turn joins each with its opposite), 211 (24 in two
     * orbits of 12, opposites apart) and 221 (the same): 4 + 2 + 2 + 2.
     */
    @Test
    void zones_m3ToTwo_10() {
        List<Uvw> zones = zones("P m -3", CUBE, 2);
        assertEquals(10, zones.size());
        assertEquals(2, like(zones, CUBE, 2, 1, 1));
        assertEquals(2, like(zones, CUBE, 2, 1, 0));
        assertEquals(4, like(zones("P m -3", CUBE, 3), CUBE, 1, 2, 3), "48 directions, 12 rotations");
    }

    /** m−3m: 432 joins 100, 110, 111 with their opposites; [123] has 48 directions and 24 rotations: two hands. */
    @Test
    void zones_m3m_oneOfEachFormButGeneralOnesTwice() {
        assertEquals(3, zones("P m -3 m", CUBE, 1).size());
        List<Uvw> zones = zones("P m -3 m", CUBE, 3);
        // 100 110 111 | 210 211 221 | 310 311 320 322 331 332 | 321 and its mirror image.
        assertEquals(14, zones.size());
        assertEquals(2, like(zones, CUBE, 1, 2, 3));
    }

    /** 6/m, six rotations about c: ±c; in the plane [100] and [1 −1 0] once; above and below [101] and [1 −1 1]. */
    @Test
    void zones_6m_upAndDownApart() {
        List<Uvw> zones = zones("P 6/m", HEXAGON, 1);
        assertEquals(8, zones.size());
        assertEquals(2, like(zones, HEXAGON, 0, 0, 1));
        assertEquals(1, like(zones, HEXAGON, 1, 0, 0), "the half turn about c");
        assertEquals(2, like(zones, HEXAGON, 1, 0, 1));
    }

    /** 6/mmm: 622 joins up and down; c, 100, 1−10, 101, 1−11. */
    @Test
    void zones_6mmm_5() {
        assertEquals(5, zones("P 6/m m m", HEXAGON, 1).size());
    }

    /**
     * −3 (hexagonal axes): 3 rotations about c. ±c; six directions like [100] in two orbits, opposite to each other; the two
     * like [1 −1 0] of these indices are opposite to each other and apart; twelve like [101] in four; [1 −1 1], four: 14.
     */
    @Test
    void zones_minus3_everyOppositeApart() {
        List<Uvw> zones = zones("P -3", HEXAGON, 1);
        assertEquals(2, like(zones, HEXAGON, 0, 0, 1));
        assertEquals(2, like(zones, HEXAGON, 1, 0, 0));
        assertEquals(2, like(zones, HEXAGON, 1, -1, 0));
        assertEquals(4, like(zones, HEXAGON, 1, 0, 1));
        assertEquals(14, zones.size());
    }

    /** −3m1: half turns along a join c with −c and [1 −1 0] with its opposite, but a itself is polar in 32. */
    @Test
    void zones_minus3m_upAndDownJoined() {
        List<Uvw> zones = zones("P -3 m 1", HEXAGON, 1);
        assertEquals(1, like(zones, HEXAGON, 0, 0, 1));
        assertEquals(2, like(zones, HEXAGON, 1, 0, 0));
        assertEquals(1, like(zones, HEXAGON, 1, -1, 0));
    }

    /** The same Laue class gives the same zones, whatever the point group. */
    @Test
    void zones_pointGroupsOfOneLaueClass_same() {
        assertEquals(zones("P m -3 m", CUBE, 4), zones("P -4 3 m", CUBE, 4));
        assertEquals(zones("P m -3 m", CUBE, 4), zones("F d -3 m:1", CUBE, 4));
        assertEquals(zones("P 6/m", HEXAGON, 3), zones("P -6", HEXAGON, 3));
    }

    @Test
    void zones_any_reducedAndSmallFirst() {
        List<Uvw> zones = zones("P m -3", CUBE, 5);
        int size = 0;
        Set<Uvw> seen = new HashSet<>();
        for (Uvw zone : zones) {
            assertEquals(zone, zone.reduced());
            assertTrue(zone.largestIndex() >= size);
            assertTrue(seen.add(zone));
            size = zone.largestIndex();
        }
    }
}
