package io.github.zonewright.lattice;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class PlaneNormalTest {

    private static final Lattice TITANIUM = Lattice.hexagonal(2.951, 4.684);

    /** In a cubic lattice plane normals and directions have the same indices (any textbook). */
    @ParameterizedTest
    @CsvSource({"1 1 1", "2 -1 0", "3 1 1", "-1 2 3"})
    void nearestDirection_cubicHasTheSameIndices(String indices) {
        PlaneNormal.Direction direction = PlaneNormal.nearestDirection(Lattice.cubic(4.05), Hkl.parse(indices), 4);
        assertEquals(Uvw.parse(indices), direction.uvw());
        assertEquals(0, direction.angle(), 1e-7);
        PlaneNormal.Plane plane = PlaneNormal.nearestPlane(Lattice.cubic(4.05), Uvw.parse(indices), 4);
        assertEquals(Hkl.parse(indices), plane.hkl());
        assertEquals(0, plane.angle(), 1e-7);
    }

    /** The worked number of the class: c = 2a, the normal of (1 0 2) is [2 0 1]. */
    @Test
    void nearestDirection_tetragonal() {
        PlaneNormal.Direction direction = PlaneNormal.nearestDirection(Lattice.tetragonal(1, 2), new Hkl(1, 0, 2), 3);
        assertEquals(new Uvw(2, 0, 1), direction.uvw());
        assertEquals(0, direction.angle(), 1e-7);
    }

    /** Hexagonal: (hki0) and [uvt0] of the same four indices are normal to each other, and so are (0001) and [0001]. */
    @ParameterizedTest
    @CsvSource({"1 0 -1 0,2 1 0", "1 1 -2 0,1 1 0", "0 0 0 1,0 0 1", "2 -1 -1 0,1 0 0"})
    void nearestDirection_hexagonalPrisms(String plane, String direction) {
        PlaneNormal.Direction found = PlaneNormal.nearestDirection(TITANIUM, Hkl.parse(plane), 4);
        assertEquals(Uvw.parse(direction), found.uvw());
        assertEquals(0, found.angle(), 1e-7);
    }

    /** A pyramid of titanium, (1 0 -1 1): the normal is [u v t w] with w/u = (3/2)(a/c)², an irrational number. */
    @Test
    void nearestDirection_isTheNearestOfAll() {
        Hkl plane = new Hkl(1, 0, 1);
        PlaneNormal.Direction found = PlaneNormal.nearestDirection(TITANIUM, plane, 6);
        for (int u = -6; u <= 6; u++) {
            for (int v = -6; v <= 6; v++) {
                for (int w = -6; w <= 6; w++) {
                    if (u != 0 || v != 0 || w != 0) {
                        double angle = TITANIUM.reciprocal().vector(plane).angleTo(TITANIUM.vector(new Uvw(u, v, w)));
                        assertEquals(true, angle > found.angle() - 1e-9, u + " " + v + " " + w);
                    }
                }
            }
        }
        assertEquals(2.0 * found.uvw().v(), found.uvw().u());
    }

    /** Monoclinic with β = 100°: the normal of (0 0 1) leans 10° off [0 0 1], towards −x. */
    @Test
    void nearestDirection_monoclinic() {
        Lattice lattice = Lattice.monoclinicDegrees(5, 6, 7, 100);
        PlaneNormal.Direction one = PlaneNormal.nearestDirection(lattice, new Hkl(0, 0, 1), 1);
        assertEquals(new Uvw(0, 0, 1), one.uvw());
        assertEquals(10, Math.toDegrees(one.angle()), 1e-9);
        PlaneNormal.Plane plane = PlaneNormal.nearestPlane(lattice, new Uvw(0, 1, 0), 3);
        assertEquals(new Hkl(0, 1, 0), plane.hkl());
        assertEquals(0, plane.angle(), 1e-7);
    }

    @Test
    void nearest_refusesWhatHasNoNormal() {
        Lattice cubic = Lattice.cubic(4);
        Hkl plane = new Hkl(1, 0, 0);
        assertThrows(IllegalArgumentException.class, () -> PlaneNormal.nearestDirection(cubic, new Hkl(0, 0, 0), 3));
        assertThrows(IllegalArgumentException.class, () -> PlaneNormal.nearestPlane(cubic, new Uvw(0, 0, 0), 3));
        assertThrows(IllegalArgumentException.class, () -> PlaneNormal.nearestDirection(cubic, plane, 0));
        assertThrows(IllegalArgumentException.class, () -> PlaneNormal.nearestDirection(cubic, plane, 31));
    }

    @ParameterizedTest
    @CsvSource({"1 0 0,1 0 -1 0,2 -1 -1 0", "0 0 1,0 0 0 1,0 0 0 1", "1 1 0,1 1 -2 0,1 1 -2 0"})
    void millerBravais_text(String three, String plane, String direction) {
        assertEquals(plane, MillerBravais.text(Hkl.parse(three)));
        assertEquals(direction, MillerBravais.text(Uvw.parse(three)));
    }
}
