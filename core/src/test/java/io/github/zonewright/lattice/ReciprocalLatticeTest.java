package io.github.zonewright.lattice;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Vector3;
import java.util.Random;
import org.junit.jupiter.api.Test;

class ReciprocalLatticeTest {

    @Test
    void vector_cubic_hasNoTwoPi() {
        // |g| = 1/d: a cube of 4 Å has d(200) = 2 Å.
        ReciprocalLattice cube = Lattice.cubic(4).reciprocal();
        assertEquals(new Vector3(0.5, 0, 0), cube.vector(new Hkl(2, 0, 0)));
        assertEquals(2, cube.spacing(new Hkl(2, 0, 0)));
        assertEquals(Double.POSITIVE_INFINITY, cube.spacing(new Hkl(0, 0, 0)));
    }

    @Test
    void vector_hexagonal_workedNumber() {
        // b* is at right angles to a, so along y, and a* at right angles to b, 30° from x: a* = (1/a)(1, 1/√3), b* =
        // (0,
        // 2/(a√3)).
        ReciprocalLattice hexagonal = Lattice.hexagonal(2, 5).reciprocal();
        Vector3 a = hexagonal.vector(new Hkl(1, 0, 0));
        assertEquals(0, a.minus(new Vector3(0.5, 0.5 / Math.sqrt(3), 0)).norm(), 1e-16);
        Vector3 b = hexagonal.vector(new Hkl(0, 1, 0));
        assertEquals(0, b.minus(new Vector3(0, 1 / Math.sqrt(3), 0)).norm(), 1e-15);
        assertEquals(0.2, hexagonal.vector(new Hkl(0, 0, 1)).z(), 1e-16);
    }

    @Test
    void vector_dotDirectVector_isTheLaueLayer() {
        Random random = new Random(32);
        for (int i = 0; i < 300; i++) {
            Lattice l = LatticeTest.random(random);
            Hkl hkl = new Hkl(random.nextInt(-9, 10), random.nextInt(-9, 10), random.nextInt(-9, 10));
            Uvw uvw = new Uvw(random.nextInt(-9, 10), random.nextInt(-9, 10), random.nextInt(-9, 10));
            assertEquals(hkl.dot(uvw), l.reciprocal().vector(hkl).dot(l.vector(uvw)), 1e-11);
            assertEquals(1, l.volume() * l.reciprocal().volume(), 1e-11);
        }
    }

    /** 1/d² from the general formula with the squares of the cell, as in International Tables; no matrices. */
    @Test
    void spacing_triclinic_agreesWithTheGeneralFormula() {
        Random random = new Random(33);
        for (int i = 0; i < 300; i++) {
            Lattice c = LatticeTest.random(random);
            int h = random.nextInt(-6, 7);
            int k = random.nextInt(-6, 7);
            int l = random.nextInt(1, 7);
            double ca = Math.cos(c.alpha());
            double cb = Math.cos(c.beta());
            double cg = Math.cos(c.gamma());
            double top = Math.pow(h * Math.sin(c.alpha()) / c.a(), 2)
                    + Math.pow(k * Math.sin(c.beta()) / c.b(), 2)
                    + Math.pow(l * Math.sin(c.gamma()) / c.c(), 2)
                    + 2.0 * k * l / (c.b() * c.c()) * (cb * cg - ca)
                    + 2.0 * l * h / (c.c() * c.a()) * (cg * ca - cb)
                    + 2.0 * h * k / (c.a() * c.b()) * (ca * cb - cg);
            double expected = Math.sqrt((1 - ca * ca - cb * cb - cg * cg + 2 * ca * cb * cg) / top);
            assertEquals(expected, c.reciprocal().spacing(new Hkl(h, k, l)), 1e-9 * expected);
        }
    }

    @Test
    void indices_ofAVector_isRoundTrip() {
        Random random = new Random(34);
        for (int i = 0; i < 200; i++) {
            ReciprocalLattice r = LatticeTest.random(random).reciprocal();
            Hkl hkl = new Hkl(random.nextInt(-20, 21), random.nextInt(-20, 21), random.nextInt(-20, 21));
            Vector3 back = r.indices(r.vector(hkl));
            assertEquals(0, back.minus(new Vector3(hkl.h(), hkl.k(), hkl.l())).norm(), 1e-11);
        }
    }

    @Test
    void construct_leftHandedOrFlat_isRefused() {
        assertThrows(
                IllegalArgumentException.class, () -> new ReciprocalLattice(new Matrix3(1, 0, 0, 0, 1, 0, 0, 0, 0)));
        assertThrows(IllegalArgumentException.class, () -> new ReciprocalLattice(Matrix3.IDENTITY.times(Double.NaN)));
        String message = assertThrows(
                        IllegalArgumentException.class, () -> new ReciprocalLattice(Matrix3.IDENTITY.times(-1)))
                .getMessage();
        assertTrue(message.contains("-1.0 1/Å³"), message);
    }
}
