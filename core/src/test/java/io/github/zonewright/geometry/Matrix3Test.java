package io.github.zonewright.geometry;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.junit.jupiter.api.Test;

class Matrix3Test {

    private static final Matrix3 M = new Matrix3(1, 2, 3, 4, 5, 6, 7, 8, 10);

    @Test
    void get_rowThenColumn() {
        assertEquals(2, M.get(0, 1));
        assertEquals(4, M.get(1, 0));
        assertEquals(10, M.get(2, 2));
        assertEquals(new Vector3(4, 5, 6), M.row(1));
        assertEquals(new Vector3(2, 5, 8), M.column(1));
    }

    @Test
    void get_outsideTheMatrix_isRefused() {
        assertThrows(IndexOutOfBoundsException.class, () -> M.get(0, 3));
        assertThrows(IndexOutOfBoundsException.class, () -> M.get(-1, 0));
        assertThrows(IndexOutOfBoundsException.class, () -> M.column(3));
    }

    @Test
    void of_rowsAndColumns_areTransposed() {
        Vector3 a = new Vector3(1, 2, 3);
        Vector3 b = new Vector3(4, 5, 6);
        Vector3 c = new Vector3(7, 8, 10);
        assertEquals(M, Matrix3.ofRows(a, b, c));
        assertEquals(M.transpose(), Matrix3.ofColumns(a, b, c));
    }

    @Test
    void times_vectorFromTheLeft_workedNumber() {
        assertEquals(new Vector3(-4, -7, -11), M.times(new Vector3(1, -1, -1)));
        assertEquals(new Vector3(2, 5, 8), M.times(0, 1, 0));
        assertEquals(new Vector3(3, 6, 10), M.times(Vector3.Z));
    }

    @Test
    void times_matrix_isAppliedRightFirst() {
        Matrix3 swap = new Matrix3(0, 1, 0, 1, 0, 0, 0, 0, 1);
        assertEquals(new Matrix3(2, 1, 3, 5, 4, 6, 8, 7, 10), M.times(swap));
        Vector3 v = new Vector3(3, -2, 5);
        assertEquals(M.times(swap.times(v)), M.times(swap).times(v));
        assertEquals(M, M.times(Matrix3.IDENTITY));
        assertEquals(new Matrix3(2, 4, 6, 8, 10, 12, 14, 16, 20), M.times(2));
    }

    @Test
    void determinant_workedNumber() {
        // 1(50 − 48) − 2(40 − 42) + 3(32 − 35) = −3
        assertEquals(-3, M.determinant());
        assertEquals(-3, M.transpose().determinant());
    }

    @Test
    void inverse_workedNumber() {
        // Adjugate of M over −3, by hand.
        Matrix3 expected = new Matrix3(2, 4, -3, 2, -11, 6, -3, 6, -3).times(-1.0 / 3);
        assertEquals(0, M.inverse().distanceTo(expected), 1e-15);
    }

    @Test
    void inverse_randomMatrices_isRoundTrip() {
        Random random = new Random(7);
        for (int i = 0; i < 500; i++) {
            double[] e = random.doubles(9, -1, 1).toArray();
            Matrix3 m = new Matrix3(e[0], e[1], e[2], e[3], e[4], e[5], e[6], e[7], e[8]);
            if (Math.abs(m.determinant()) > 1e-2) {
                assertTrue(m.inverse().times(m).distanceTo(Matrix3.IDENTITY) < 1e-12);
                assertEquals(1, m.determinant() * m.inverse().determinant(), 1e-11);
            }
        }
    }

    @Test
    void inverse_singularOrNotFinite_isRefused() {
        Matrix3 singular = new Matrix3(1, 2, 3, 2, 4, 6, 0, 0, 1);
        assertThrows(ArithmeticException.class, singular::inverse);
        assertThrows(ArithmeticException.class, Matrix3.IDENTITY.times(Double.NaN)::inverse);
        assertThrows(ArithmeticException.class, Matrix3.IDENTITY.times(1e200)::inverse);
    }

    @Test
    void distanceTo_takesTheLargestElement() {
        assertEquals(4, M.distanceTo(new Matrix3(1, 2, 3, 4, 9, 6, 7, 8, 11)));
        assertTrue(Double.isNaN(M.distanceTo(M.times(Double.NaN))));
    }
}
