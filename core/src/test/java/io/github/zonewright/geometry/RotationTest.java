package io.github.zonewright.geometry;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class RotationTest {

    private static final double QUARTER = Math.PI / 2;

    private static Rotation random(Random r) {
        return Rotation.ofQuaternion(r.nextGaussian(), r.nextGaussian(), r.nextGaussian(), r.nextGaussian());
    }

    private static Vector3 direction(Random r) {
        return new Vector3(r.nextGaussian(), r.nextGaussian(), r.nextGaussian()).normalize();
    }

    private static void assertClose(Vector3 expected, Vector3 actual, double tolerance) {
        assertEquals(0, expected.minus(actual).norm(), tolerance, () -> expected + " but was " + actual);
    }

    /** Rodrigues' formula: v cos φ + (u × v) sin φ + u (u·v)(1 − cos φ). */
    private static Vector3 rodrigues(Vector3 u, double angle, Vector3 v) {
        return v.times(Math.cos(angle))
                .plus(u.cross(v).times(Math.sin(angle)))
                .plus(u.times(u.dot(v) * (1 - Math.cos(angle))));
    }

    @Test
    void apply_quarterTurnAboutZ_takesXToY() {
        Rotation r = Rotation.ofAxisAngle(Vector3.Z, QUARTER);
        assertClose(Vector3.Y, r.apply(Vector3.X), 1e-15);
        assertClose(new Vector3(-2, 1, 3), r.apply(new Vector3(1, 2, 3)), 1e-15);
    }

    @Test
    void apply_quarterTurnsAboutXAndY_areRightHanded() {
        assertClose(Vector3.Z, Rotation.ofAxisAngle(Vector3.X, QUARTER).apply(Vector3.Y), 1e-15);
        assertClose(Vector3.X, Rotation.ofAxisAngle(Vector3.Y, QUARTER).apply(Vector3.Z), 1e-15);
    }

    @Test
    void apply_randomAxes_followsRodrigues() {
        Random random = new Random(11);
        for (int i = 0; i < 500; i++) {
            Vector3 u = direction(random);
            Vector3 v = direction(random);
            double angle = random.nextDouble(-10, 10);
            assertClose(rodrigues(u, angle, v), Rotation.ofAxisAngle(u, angle).apply(v), 4e-15);
        }
    }

    @Test
    void after_turnsByItsArgumentFirst() {
        Rotation x = Rotation.ofAxisAngle(Vector3.X, QUARTER);
        Rotation z = Rotation.ofAxisAngle(Vector3.Z, QUARTER);
        assertClose(Vector3.Z, x.after(z).apply(Vector3.X), 1e-15);
        assertClose(Vector3.Y, z.after(x).apply(Vector3.X), 1e-15);
        Random random = new Random(12);
        for (int i = 0; i < 200; i++) {
            Rotation a = random(random);
            Rotation b = random(random);
            assertTrue(a.after(b).matrix().distanceTo(a.matrix().times(b.matrix())) < 1e-14);
        }
    }

    @Test
    void inverse_isTheTransposedMatrix() {
        Random random = new Random(13);
        for (int i = 0; i < 200; i++) {
            Rotation r = random(random);
            assertTrue(r.inverse().matrix().distanceTo(r.matrix().transpose()) < 1e-15);
            assertEquals(0, r.after(r.inverse()).angle(), 1e-15);
        }
    }

    /** One case for each component of the quaternion that can be the largest: three half turns and the identity. */
    @Test
    void ofMatrix_allFourBranches() {
        assertEquals(Rotation.IDENTITY, Rotation.ofMatrix(Matrix3.IDENTITY));
        assertEquals(Rotation.ofQuaternion(0, 1, 0, 0), Rotation.ofMatrix(new Matrix3(1, 0, 0, 0, -1, 0, 0, 0, -1)));
        assertEquals(Rotation.ofQuaternion(0, 0, 1, 0), Rotation.ofMatrix(new Matrix3(-1, 0, 0, 0, 1, 0, 0, 0, -1)));
        assertEquals(Rotation.ofQuaternion(0, 0, 0, 1), Rotation.ofMatrix(new Matrix3(-1, 0, 0, 0, -1, 0, 0, 0, 1)));
        Random random = new Random(14);
        int[] branches = new int[4];
        for (int i = 0; i < 1000; i++) {
            Rotation r = random(random);
            branches[largest(r.quaternion())]++;
            assertArrayEquals(r.quaternion(), Rotation.ofMatrix(r.matrix()).quaternion(), 2e-15);
        }
        for (int branch : branches) {
            assertTrue(branch > 100, "every branch is met");
        }
    }

    private static int largest(double[] q) {
        int best = 0;
        for (int i = 1; i < 4; i++) {
            best = Math.abs(q[i]) > Math.abs(q[best]) ? i : best;
        }
        return best;
    }

    /** Near half a turn the trace formula alone would lose half the digits. */
    @ParameterizedTest
    @ValueSource(doubles = {1e-3, 1e-6, 1e-9, 1e-12})
    void ofMatrix_nearHalfATurn_keepsItsDigits(double short_) {
        Random random = new Random(15);
        for (int i = 0; i < 100; i++) {
            Rotation r = Rotation.ofAxisAngle(direction(random), Math.PI - short_);
            assertEquals(0, Rotation.ofMatrix(r.matrix()).angleTo(r), 4e-15);
        }
    }

    @Test
    void ofMatrix_reflectionShearOrNaN_isRefused() {
        assertThrows(IllegalArgumentException.class, () -> Rotation.ofMatrix(new Matrix3(1, 0, 0, 0, 1, 0, 0, 0, -1)));
        assertThrows(
                IllegalArgumentException.class, () -> Rotation.ofMatrix(new Matrix3(1, 1e-5, 0, 0, 1, 0, 0, 0, 1)));
        assertThrows(IllegalArgumentException.class, () -> Rotation.ofMatrix(Matrix3.IDENTITY.times(Double.NaN)));
        String message = assertThrows(
                        IllegalArgumentException.class, () -> Rotation.ofMatrix(Matrix3.IDENTITY.times(-1)))
                .getMessage();
        assertTrue(message.contains("determinant -1.0"), message);
    }

    @Test
    void quaternion_scalarPartIsNeverNegative() {
        Random random = new Random(16);
        for (int i = 0; i < 500; i++) {
            double[] q = {random.nextGaussian(), random.nextGaussian(), random.nextGaussian(), random.nextGaussian()};
            Rotation plus = Rotation.ofQuaternion(q[0], q[1], q[2], q[3]);
            Rotation minus = Rotation.ofQuaternion(-q[0], -q[1], -q[2], -q[3]);
            assertEquals(plus, minus);
            assertEquals(plus.hashCode(), minus.hashCode());
            assertTrue(plus.quaternion()[0] >= 0);
        }
    }

    @Test
    void quaternion_workedNumber() {
        // cos 30° = ½√3, sin 30° = ½: 60° about Z, and the same turn written as 300° about −Z.
        double[] expected = {Math.sqrt(0.75), 0, 0, 0.5};
        assertArrayEquals(expected, Rotation.ofAxisAngle(Vector3.Z, Math.PI / 3).quaternion(), 1e-15);
        assertArrayEquals(
                expected,
                Rotation.ofAxisAngle(Vector3.Z.negate(), 5 * Math.PI / 3).quaternion(),
                1e-15);
    }

    @Test
    void equals_halfTurnsAndNegativeZeros_areTheSameObject() {
        Rotation halfTurn = Rotation.ofQuaternion(0, 1, 0, 0);
        assertEquals(halfTurn, Rotation.ofQuaternion(0, -1, 0, 0));
        assertEquals(halfTurn, halfTurn.inverse());
        assertEquals(halfTurn.hashCode(), halfTurn.inverse().hashCode());
        assertEquals(Rotation.ofQuaternion(0, 0, 0, 2), Rotation.ofQuaternion(-0.0, 0, -0.0, -2));
        assertEquals(Rotation.IDENTITY, Rotation.IDENTITY.inverse());
        assertEquals(Rotation.IDENTITY.hashCode(), Rotation.IDENTITY.inverse().hashCode());
        assertEquals(Rotation.IDENTITY.toString(), Rotation.IDENTITY.inverse().toString());
    }

    /** A kept orientation must be read back to the same bits. */
    @Test
    void ofQuaternion_ofItsOwnQuaternion_isTheSameToTheBit() {
        Random random = new Random(17);
        for (int i = 0; i < 20_000; i++) {
            Rotation r = random(random);
            double[] q = r.quaternion();
            assertEquals(r, Rotation.ofQuaternion(q[0], q[1], q[2], q[3]));
        }
    }

    @Test
    void ofQuaternion_withoutDirection_isRefused() {
        assertThrows(IllegalArgumentException.class, () -> Rotation.ofQuaternion(0, 0, 0, 0));
        assertThrows(IllegalArgumentException.class, () -> Rotation.ofQuaternion(Double.NaN, 0, 0, 1));
        assertThrows(IllegalArgumentException.class, () -> Rotation.ofQuaternion(Double.POSITIVE_INFINITY, 0, 0, 1));
    }

    @Test
    void ofAxisAngle_badArguments_areRefused() {
        assertThrows(ArithmeticException.class, () -> Rotation.ofAxisAngle(Vector3.ZERO, 1));
        assertThrows(IllegalArgumentException.class, () -> Rotation.ofAxisAngle(Vector3.X, Double.NaN));
        assertThrows(IllegalArgumentException.class, () -> Rotation.ofAxisAngle(Vector3.X, Double.POSITIVE_INFINITY));
    }

    @ParameterizedTest
    @ValueSource(doubles = {1e-15, 1e-9, 1e-4, 1, 2, Math.PI - 1e-4, Math.PI - 1e-9, Math.PI})
    void angle_ofAxisAngle_isRoundTrip(double angle) {
        Random random = new Random(18);
        for (int i = 0; i < 50; i++) {
            Vector3 axis = direction(random);
            Rotation r = Rotation.ofAxisAngle(axis, angle);
            assertEquals(angle, r.angle(), 1e-15 * Math.max(angle, 1) + 1e-15 * angle);
            assertClose(axis, r.axis(), 1e-15);
            Rotation v = Rotation.ofVector(axis.times(angle));
            assertEquals(0, v.angleTo(r), 1e-15);
        }
    }

    @Test
    void angle_beyondHalfATurn_isCountedTheOtherWay() {
        Rotation r = Rotation.ofAxisAngle(Vector3.Y, Math.toRadians(200));
        assertEquals(160, Math.toDegrees(r.angle()), 1e-13);
        assertClose(Vector3.Y.negate(), r.axis(), 1e-15);
    }

    @Test
    void axis_ofIdentity_isZ() {
        assertEquals(Vector3.Z, Rotation.IDENTITY.axis());
        assertEquals(0, Rotation.IDENTITY.angle());
        assertEquals(Rotation.IDENTITY, Rotation.ofVector(Vector3.ZERO));
    }

    @Test
    void angleTo_isSymmetric() {
        Rotation a = Rotation.ofAxisAngle(new Vector3(1, 1, 1), Math.toRadians(10));
        Rotation b = Rotation.ofAxisAngle(new Vector3(1, 1, 1), Math.toRadians(-60));
        assertEquals(70, Math.toDegrees(a.angleTo(b)), 1e-13);
        assertEquals(70, Math.toDegrees(b.angleTo(a)), 1e-13);
    }

    @Test
    void between_randomDirections_takesOneToTheOtherTheShortestWay() {
        Random random = new Random(19);
        for (int i = 0; i < 500; i++) {
            Vector3 a = direction(random);
            Vector3 b = direction(random);
            Rotation r = Rotation.between(a.times(3), b.times(0.2));
            assertClose(b, r.apply(a), 2e-15);
            assertEquals(a.angleTo(b), r.angle(), 2e-15);
        }
    }

    @Test
    void between_equalAndOpposite() {
        assertEquals(Rotation.IDENTITY, Rotation.between(Vector3.X, Vector3.X.times(2)));
        Random random = new Random(20);
        Stream.generate(() -> direction(random)).limit(100).forEach(a -> {
            Rotation r = Rotation.between(a, a.negate());
            assertClose(a.negate(), r.apply(a), 2e-15);
            assertEquals(Math.PI, r.angle(), 1e-15);
        });
    }

    /** Where the vector product is nearly lost in rounding. */
    @ParameterizedTest
    @ValueSource(doubles = {1e-4, 1e-8, 1e-10, 1e-12, 1e-13, 1e-14, 1e-15, 1e-16})
    void between_nearlyEqualAndNearlyOpposite_keepsItsDigits(double offset) {
        Random random = new Random(21);
        for (int i = 0; i < 200; i++) {
            Vector3 a = direction(random);
            Vector3 b = a.plus(a.anyPerpendicular().times(offset)).normalize();
            assertClose(b, Rotation.between(a, b).apply(a), 4e-15);
            assertClose(b.negate(), Rotation.between(a, b.negate()).apply(a), 4e-15);
        }
    }
}
