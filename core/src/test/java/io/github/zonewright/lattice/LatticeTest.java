package io.github.zonewright.lattice;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Vector3;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class LatticeTest {

    /** Low albite: Harlow and Brown, American Mineralogist 65 (1980) 986 (from memory). */
    private static final Lattice ALBITE = Lattice.ofDegrees(8.142, 12.785, 7.159, 94.19, 116.61, 87.68);

    private static final double DEGREE = Math.PI / 180;

    static Lattice random(Random r) {
        while (true) {
            try {
                return Lattice.ofDegrees(
                        r.nextDouble(2, 20),
                        r.nextDouble(2, 20),
                        r.nextDouble(2, 20),
                        r.nextDouble(50, 130),
                        r.nextDouble(50, 130),
                        r.nextDouble(50, 130));
            } catch (IllegalArgumentException e) {
                // These angles close no cell: draw again.
            }
        }
    }

    @Test
    void basis_cartesianFrame_hasXAlongAAndZAlongCStar() {
        Matrix3 basis = ALBITE.basis();
        assertEquals(new Vector3(8.142, 0, 0), basis.column(0));
        assertEquals(0, basis.column(1).z());
        assertTrue(basis.column(1).y() > 0);
        Vector3 cStar = ALBITE.reciprocal().vector(new Hkl(0, 0, 1));
        assertEquals(0, cStar.angleTo(Vector3.Z), 1e-15);
    }

    @Test
    void basis_monoclinic_workedNumber() {
        // a along x, b along y, c = (c cos β, 0, c sin β): β = 120°, c = 10 gives (−5, 0, 8.66025).
        Matrix3 basis = Lattice.monoclinicDegrees(6, 7, 10, 120).basis();
        Matrix3 expected = new Matrix3(6, 0, -5, 0, 7, 0, 0, 0, 10 * Math.sqrt(0.75));
        assertEquals(0, basis.distanceTo(expected), 1e-14);
    }

    @Test
    void basis_hexagonal_isExact() {
        Matrix3 basis = Lattice.hexagonal(3, 5).basis();
        assertEquals(new Matrix3(3, -1.5, 0, 0, 3 * Math.sqrt(0.75), 0, 0, 0, 5), basis);
    }

    @Test
    void metric_triclinic_holdsTheScalarProducts() {
        Matrix3 g = ALBITE.metric();
        assertEquals(8.142 * 8.142, g.m00(), 1e-12);
        assertEquals(12.785 * 7.159 * Math.cos(94.19 * DEGREE), g.m12(), 1e-12);
        assertEquals(8.142 * 7.159 * Math.cos(116.61 * DEGREE), g.m02(), 1e-12);
        assertEquals(8.142 * 12.785 * Math.cos(87.68 * DEGREE), g.m10(), 1e-12);
    }

    @Test
    void angle_betweenCellEdges_isTheCellAngle() {
        Random random = new Random(31);
        Uvw a = new Uvw(1, 0, 0);
        Uvw b = new Uvw(0, 1, 0);
        Uvw c = new Uvw(0, 0, 1);
        for (int i = 0; i < 200; i++) {
            Lattice l = random(random);
            assertEquals(l.alpha(), l.angle(b, c), 1e-13);
            assertEquals(l.beta(), l.angle(c, a), 1e-13);
            assertEquals(l.gamma(), l.angle(a, b), 1e-13);
            assertEquals(l.b(), l.vector(b).norm(), 1e-13 * l.b());
            assertEquals(l.c(), l.vector(c).norm(), 1e-12 * l.c());
            assertEquals(l.basis().determinant(), l.volume(), 1e-11 * l.volume());
        }
    }

    @Test
    void volume_ofKnownCells() {
        assertEquals(64, Lattice.cubic(4).volume());
        assertEquals(48, Lattice.tetragonal(4, 3).volume(), 1e-14);
        assertEquals(24, Lattice.orthorhombic(2, 3, 4).volume());
        assertEquals(Math.sqrt(0.75) * 45, Lattice.hexagonal(3, 5).volume(), 1e-13);
        // The primitive cell of a face-centred cube, 60° between edges a/√2, has a quarter of its volume.
        assertEquals(16, Lattice.rhombohedralDegrees(4 / Math.sqrt(2), 60).volume(), 1e-13);
    }

    @ParameterizedTest
    @CsvSource({
        "0, 1, 1, 90, 90, 90",
        "-1, 1, 1, 90, 90, 90",
        "1, NaN, 1, 90, 90, 90",
        "1, 1, Infinity, 90, 90, 90",
        "1, 1, 10001, 90, 90, 90",
        "1, 1, 1, 0, 90, 90",
        "1, 1, 1, 90, 180, 90",
        "1, 1, 1, 90, 90, NaN",
        "1, 1, 1, 120, 120, 120",
        "1, 1, 1, 30, 30, 90",
        "1, 1, 1, 130, 120, 115"
    })
    void construct_noSuchCell_isRefused(double a, double b, double c, double alpha, double beta, double gamma) {
        assertThrows(IllegalArgumentException.class, () -> Lattice.ofDegrees(a, b, c, alpha, beta, gamma));
    }

    @Test
    void construct_badEdge_namesQuantityValueAndExpectation() {
        String message = assertThrows(IllegalArgumentException.class, () -> Lattice.cubic(-4))
                .getMessage();
        assertEquals("cell edge a: -4.0 Å, expected above 0 and at most 10000.0 Å", message);
    }

    @Test
    void hasHexagonalAxes_onlyWhereFourIndicesMakeSense() {
        assertTrue(Lattice.hexagonal(3.2094, 5.2112).hasHexagonalAxes());
        assertTrue(Lattice.ofDegrees(4.9134, 4.9134, 5.4052, 90, 90, 120).hasHexagonalAxes());
        assertFalse(Lattice.ofDegrees(3, 3, 5, 90, 90, 60).hasHexagonalAxes());
        assertFalse(Lattice.ofDegrees(3, 3.01, 5, 90, 90, 120).hasHexagonalAxes());
        assertFalse(Lattice.cubic(4).hasHexagonalAxes());
    }

    @Test
    void toString_isReadInEveryLocale() {
        assertEquals("a 8.1420 b 12.7850 c 7.1590 Å, α 94.190 β 116.610 γ 87.680°", ALBITE.toString());
    }
}
