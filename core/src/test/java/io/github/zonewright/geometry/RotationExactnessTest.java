package io.github.zonewright.geometry;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.Random;
import org.junit.jupiter.api.Test;

/** A rotation is its quaternion and nothing more, so that it can be kept in a file and had back. */
class RotationExactnessTest {

    @Test
    void ofQuaternion_ownQuaternion_isTheSameRotationInEveryBit() {
        Random random = new Random(5);
        for (int i = 0; i < 100_000; i++) {
            Rotation r = Rotation.ofQuaternion(
                    random.nextGaussian(), random.nextGaussian(), random.nextGaussian(), random.nextGaussian());
            assertKept(r);
            assertKept(r.after(Rotation.ofAxisAngle(new Vector3(1, random.nextDouble(), 0.3), random.nextDouble())));
        }
    }

    @Test
    void ofQuaternion_chainOfThousandTurns_staysOfUnitNorm() {
        Rotation step = Rotation.ofAxisAngle(new Vector3(1, 2, 3), 0.1);
        Rotation turned = Rotation.IDENTITY;
        for (int i = 0; i < 100_000; i++) {
            turned = turned.after(step);
        }
        double norm = 0;
        for (double part : turned.quaternion()) {
            norm += part * part;
        }
        assertEquals(1, norm, 3e-15);
    }

    private static void assertKept(Rotation r) {
        double[] q = r.quaternion();
        assertEquals(r, Rotation.ofQuaternion(q[0], q[1], q[2], q[3]));
    }
}
