package io.github.zonewright.geometry;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.Random;
import org.junit.jupiter.api.Test;

class VectorTest {

    @Test
    void cross_unitVectors_isRightHanded() {
        assertEquals(Vector3.Z, Vector3.X.cross(Vector3.Y));
        assertEquals(Vector3.X, Vector3.Y.cross(Vector3.Z));
        assertEquals(Vector3.Y, Vector3.Z.cross(Vector3.X));
    }

    @Test
    void arithmetic_workedNumbers() {
        Vector3 a = new Vector3(1, 2, 3);
        Vector3 b = new Vector3(-4, 5, 0.5);
        assertEquals(new Vector3(-3, 7, 3.5), a.plus(b));
        assertEquals(new Vector3(5, -3, 2.5), a.minus(b));
        assertEquals(new Vector3(2, 4, 6), a.times(2));
        assertEquals(new Vector3(-1, -2, -3), a.negate());
        assertEquals(7.5, a.dot(b));
        assertEquals(new Vector3(-14, -12.5, 13), a.cross(b));
        assertEquals(Math.sqrt(14), a.norm());
        assertEquals(Vector3.ZERO, a.minus(a));
    }

    @Test
    void normalize_ofZeroOrInfinite_isRefused() {
        assertThrows(ArithmeticException.class, Vector3.ZERO::normalize);
        assertThrows(ArithmeticException.class, new Vector3(Double.POSITIVE_INFINITY, 0, 0)::normalize);
        assertThrows(ArithmeticException.class, new Vector3(Double.NaN, 0, 0)::normalize);
    }

    @Test
    void angleTo_tinyAndNearlyStraight_keepsItsDigits() {
        // The arc cosine of the scalar product would give 0 for the first and π for the last.
        for (double angle : new double[] {1e-12, 1e-9, 1e-4, 1, Math.PI - 1e-4, Math.PI - 1e-9}) {
            Vector3 v = new Vector3(3 * Math.cos(angle), 0, 3 * Math.sin(angle));
            assertEquals(angle, Vector3.X.times(0.1).angleTo(v), 1e-15 * Math.max(1, angle) + 1e-15 * angle);
        }
        assertEquals(Math.PI, Vector3.X.angleTo(Vector3.X.negate()));
        assertEquals(0, Vector3.ZERO.angleTo(Vector3.X));
    }

    @Test
    void anyPerpendicular_randomVectors_isUnitAndPerpendicular() {
        Random random = new Random(41);
        for (int i = 0; i < 500; i++) {
            Vector3 v =
                    new Vector3(random.nextGaussian(), random.nextGaussian(), i % 5 == 0 ? 0 : random.nextGaussian());
            Vector3 p = v.anyPerpendicular();
            assertEquals(1, p.norm(), 1e-15);
            assertEquals(0, p.dot(v), 1e-15 * 10);
            assertEquals(p, v.anyPerpendicular());
        }
        assertEquals(0, Vector3.Z.anyPerpendicular().z());
    }

    @Test
    void plane_counterClockwise_isPositive() {
        Vector2 right = new Vector2(1, 0);
        Vector2 up = new Vector2(0, 1);
        assertEquals(1, right.cross(up));
        assertEquals(-1, up.cross(right));
        assertEquals(Math.PI / 2, up.azimuth());
        Vector2 turned = right.rotate(Math.PI / 2);
        assertEquals(0, turned.minus(up).norm(), 1e-16);
    }

    @Test
    void plane_arithmetic_workedNumbers() {
        Vector2 a = new Vector2(3, 4);
        Vector2 b = new Vector2(-1, 2);
        assertEquals(new Vector2(2, 6), a.plus(b));
        assertEquals(new Vector2(4, 2), a.minus(b));
        assertEquals(new Vector2(1.5, 2), a.times(0.5));
        assertEquals(5, a.dot(b));
        assertEquals(10, a.cross(b));
        assertEquals(5, a.norm());
        assertEquals(5, Vector2.ZERO.minus(a).norm());
    }

    @Test
    void plane_polar_isRoundTrip() {
        for (int degrees = -179; degrees <= 180; degrees++) {
            Vector2 v = Vector2.ofPolar(2.5, Math.toRadians(degrees));
            assertEquals(2.5, v.norm(), 1e-15);
            assertEquals(degrees, Math.toDegrees(v.azimuth()), 1e-13);
        }
    }
}
