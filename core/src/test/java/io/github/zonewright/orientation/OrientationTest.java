package io.github.zonewright.orientation;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class OrientationTest {

    private static final Lattice CUBE = Lattice.cubic(4);
    private static final Lattice TRICLINIC = Lattice.ofDegrees(5.2, 6.1, 7.3, 82, 97, 104);
    private static final Orientation UNTURNED = new Orientation(Rotation.IDENTITY);

    private static Orientation random(Random r) {
        return new Orientation(
                Rotation.ofQuaternion(r.nextGaussian(), r.nextGaussian(), r.nextGaussian(), r.nextGaussian()));
    }

    @Test
    void scatteringVector_untilted_isTheCrystalFrame() {
        assertEquals(new Vector3(0.25, 0, 0), UNTURNED.scatteringVector(CUBE, new Hkl(1, 0, 0)));
        assertEquals(Vector3.Z, UNTURNED.towardsSource());
        assertEquals(0, UNTURNED.lean(CUBE, new Uvw(0, 0, 1)));
        assertEquals(Math.PI, UNTURNED.lean(CUBE, new Uvw(0, 0, -1)));
    }

    /** v_microscope = R · v_crystal: a crystal turned by +90° about the beam shows 100 up on the screen. */
    @Test
    void scatteringVector_turnedAboutTheBeam_workedNumber() {
        Orientation turned = Orientation.ofMatrix(new Matrix3(0, -1, 0, 1, 0, 0, 0, 0, 1));
        assertEquals(
                0,
                turned.scatteringVector(CUBE, new Hkl(1, 0, 0))
                        .minus(new Vector3(0, 0.25, 0))
                        .norm(),
                1e-16);
        assertEquals(
                0,
                turned.scatteringVector(CUBE, new Hkl(0, 1, 0))
                        .minus(new Vector3(-0.25, 0, 0))
                        .norm(),
                1e-16);
    }

    @Test
    void ub_timesIndices_isTheScatteringVector() {
        Random random = new Random(61);
        for (int i = 0; i < 200; i++) {
            Orientation o = random(random);
            Hkl hkl = new Hkl(random.nextInt(-8, 9), random.nextInt(-8, 9), random.nextInt(-8, 9));
            Vector3 g = o.ub(TRICLINIC).times(hkl.h(), hkl.k(), hkl.l());
            assertEquals(0, g.minus(o.scatteringVector(TRICLINIC, hkl)).norm(), 1e-14);
            // A turn changes no length, and the product of B with its transpose is the reciprocal metric.
            assertEquals(TRICLINIC.reciprocal().vector(hkl).norm(), g.norm(), 1e-14);
        }
    }

    @Test
    void towardsSource_isTheCrystalDirectionAlongZ() {
        Random random = new Random(62);
        for (int i = 0; i < 200; i++) {
            Orientation o = random(random);
            Vector3 v = o.rotation().apply(o.towardsSource());
            assertEquals(0, v.minus(Vector3.Z).norm(), 4e-15);
        }
    }

    @Test
    void ofMatrix_noRotation_isRefused() {
        assertThrows(IllegalArgumentException.class, () -> Orientation.ofMatrix(Matrix3.IDENTITY.times(2)));
        assertThrows(IllegalArgumentException.class, () -> Orientation.ofMatrix(Matrix3.IDENTITY.times(-1)));
    }

    @Test
    void nearestZone_onZone_isThatZoneWithItsSense() {
        for (Uvw zone : new Uvw[] {new Uvw(0, 0, -1), new Uvw(1, 1, 2), new Uvw(-1, 0, 3), new Uvw(2, -3, 1)}) {
            Rotation r = Rotation.between(TRICLINIC.vector(zone), Vector3.Z);
            Orientation o = new Orientation(Rotation.ofAxisAngle(Vector3.Z, 1.1).after(r));
            assertEquals(zone, o.nearestZone(TRICLINIC, 3));
            assertEquals(0, o.lean(TRICLINIC, zone), 1e-15);
        }
    }

    @Test
    void nearestZone_agreesWithTryingAll() {
        Random random = new Random(63);
        for (int i = 0; i < 20; i++) {
            Orientation o = random(random);
            double least = Math.PI;
            for (int u = -4; u <= 4; u++) {
                for (int v = -4; v <= 4; v++) {
                    for (int w = -4; w <= 4; w++) {
                        Uvw zone = new Uvw(u, v, w);
                        least = zone.isZero() ? least : Math.min(least, o.lean(TRICLINIC, zone));
                    }
                }
            }
            Uvw nearest = o.nearestZone(TRICLINIC, 4);
            assertEquals(least, o.lean(TRICLINIC, nearest), 1e-9);
            assertEquals(nearest.reduced(), nearest);
        }
    }

    /** Half way between [001] and [112], where [113] and [114] are nearer than both: the largest index decides. */
    @Test
    void nearestZone_smallerIndices_whereLargerAreNotAllowed() {
        Vector3 direction = new Vector3(1, 1, 5);
        Orientation o = new Orientation(Rotation.between(direction, Vector3.Z));
        assertEquals(new Uvw(0, 0, 1), o.nearestZone(CUBE, 1));
        assertEquals(new Uvw(1, 1, 4), o.nearestZone(CUBE, 4));
        assertEquals(new Uvw(1, 1, 5), o.nearestZone(CUBE, 5));
        assertEquals(new Uvw(1, 1, 5), o.nearestZone(CUBE, 9));
    }

    @ParameterizedTest
    @ValueSource(ints = {0, -1, 21})
    void nearestZone_indexOutOfRange_isRefused(int largest) {
        String message = assertThrows(IllegalArgumentException.class, () -> UNTURNED.nearestZone(CUBE, largest))
                .getMessage();
        assertTrue(message.contains("" + largest), message);
    }
}
