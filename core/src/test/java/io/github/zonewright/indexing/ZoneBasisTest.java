package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.ReciprocalLattice;
import io.github.zonewright.lattice.Uvw;
import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;

class ZoneBasisTest {

    private static final List<Lattice> LATTICES = List.of(
            Lattice.cubic(4.05),
            Lattice.tetragonal(3.78, 9.51),
            Lattice.orthorhombic(4.5, 5.1, 6.7),
            Lattice.hexagonal(3.21, 5.21),
            Lattice.rhombohedralDegrees(6.37, 46.1),
            Lattice.monoclinicDegrees(9.75, 8.89, 5.25, 106),
            Lattice.ofDegrees(8.14, 12.79, 7.16, 94.3, 116.6, 87.7));

    /** Zones with indices up to 4 and some with large ones. */
    private static List<Uvw> zones() {
        List<Uvw> zones = new ArrayList<>();
        for (int n = 1; n < 9 * 9 * 9; n++) {
            Uvw zone = new Uvw(n / 81 - 4, n / 9 % 9 - 4, n % 9 - 4);
            if (!zone.isZero()) {
                zones.add(zone);
            }
        }
        Random random = new Random(3);
        for (int n = 0; n < 50; n++) {
            zones.add(new Uvw(random.nextInt(60) - 30, random.nextInt(60) - 30, 1 + random.nextInt(30)));
        }
        return zones;
    }

    @Test
    void of_everyZone_isPrimitive() {
        for (Uvw zone : zones()) {
            ZoneBasis basis = ZoneBasis.of(zone, LATTICES.get(6).reciprocal());
            assertEquals(0, basis.first().dot(zone));
            assertEquals(0, basis.second().dot(zone));
            // Two vectors of a plane span all its lattice points when their cross product has no common divisor.
            Uvw reduced = zone.reduced();
            int h = basis.first().k() * basis.second().l()
                    - basis.first().l() * basis.second().k();
            int k = basis.first().l() * basis.second().h()
                    - basis.first().h() * basis.second().l();
            int l = basis.first().h() * basis.second().k()
                    - basis.first().k() * basis.second().h();
            int sign = h * reduced.u() + k * reduced.v() + l * reduced.w() > 0 ? 1 : -1;
            assertEquals(reduced, new Uvw(sign * h, sign * k, sign * l));
        }
    }

    @Test
    void of_everyLattice_shortestByBruteForce() {
        int largest = 9;
        for (Lattice lattice : LATTICES) {
            ReciprocalLattice reciprocal = lattice.reciprocal();
            for (Uvw zone : List.of(
                    new Uvw(0, 0, 1),
                    new Uvw(1, 0, 0),
                    new Uvw(0, 1, 0),
                    new Uvw(1, 1, 0),
                    new Uvw(-1, 1, 1),
                    new Uvw(1, 2, 3),
                    new Uvw(-3, 0, 2),
                    new Uvw(4, -1, 2))) {
                double first = Double.POSITIVE_INFINITY;
                Vector3 shortest = null;
                for (Hkl hkl : plane(zone, largest)) {
                    if (reciprocal.vector(hkl).norm() < first) {
                        first = reciprocal.vector(hkl).norm();
                        shortest = reciprocal.vector(hkl);
                    }
                }
                double second = Double.POSITIVE_INFINITY;
                for (Hkl hkl : plane(zone, largest)) {
                    Vector3 g = reciprocal.vector(hkl);
                    if (g.cross(shortest).norm() > 1e-9) {
                        second = Math.min(second, g.norm());
                    }
                }
                ZoneBasis basis = ZoneBasis.of(zone, reciprocal);
                assertEquals(first, reciprocal.vector(basis.first()).norm(), 1e-12, lattice + " " + zone);
                assertEquals(second, reciprocal.vector(basis.second()).norm(), 1e-12, lattice + " " + zone);
                double angle = reciprocal.angle(basis.first(), basis.second());
                assertTrue(angle > Math.toRadians(60) - 1e-9 && angle < Math.toRadians(120) + 1e-9);
            }
        }
    }

    private static List<Hkl> plane(Uvw zone, int largest) {
        List<Hkl> plane = new ArrayList<>();
        for (int h = -largest; h <= largest; h++) {
            for (int k = -largest; k <= largest; k++) {
                for (int l = -largest; l <= largest; l++) {
                    if ((h != 0 || k != 0 || l != 0) && h * zone.u() + k * zone.v() + l * zone.w() == 0) {
                        plane.add(new Hkl(h, k, l));
                    }
                }
            }
        }
        return plane;
    }

    @Test
    void of_multipleOfAZone_sameBasis() {
        ReciprocalLattice reciprocal = LATTICES.get(5).reciprocal();
        assertEquals(ZoneBasis.of(new Uvw(1, -2, 3), reciprocal), ZoneBasis.of(new Uvw(4, -8, 12), reciprocal));
    }
}
