package io.github.zonewright.orientation;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import java.util.Random;
import org.junit.jupiter.api.Test;

class ZoneSettingTest {

    private static final Lattice CUBE = Lattice.cubic(4);
    private static final Lattice TRICLINIC = Lattice.ofDegrees(5.2, 6.1, 7.3, 82, 97, 104);
    private static final Uvw C = new Uvw(0, 0, 1);
    private static final Hkl G100 = new Hkl(1, 0, 0);
    private static final double DEGREE = Math.PI / 180;

    private static void assertClose(Vector3 expected, Vector3 actual) {
        assertEquals(0, expected.minus(actual).norm(), 1e-15, actual::toString);
    }

    @Test
    void orientation_rotation90_workedNumber() {
        // 100 up on the screen, 010 to the left, [001] to the source.
        Orientation o = ZoneSetting.onZone(C, G100, Math.PI / 2).orientation(CUBE);
        assertClose(new Vector3(0, 0.25, 0), o.scatteringVector(CUBE, G100));
        assertClose(new Vector3(-0.25, 0, 0), o.scatteringVector(CUBE, new Hkl(0, 1, 0)));
        assertClose(new Vector3(0, 0, 0.25), o.scatteringVector(CUBE, C_STAR));
    }

    private static final Hkl C_STAR = new Hkl(0, 0, 1);

    @Test
    void orientation_leanToTheRight_workedNumber() {
        Orientation o = new ZoneSetting(C, G100, Math.PI / 2, DEGREE, 0).orientation(CUBE);
        Vector3 axis = o.rotation().apply(CUBE.vector(C)).normalize();
        assertClose(new Vector3(Math.sin(DEGREE), 0, Math.cos(DEGREE)), axis);
        // 0 −1 0, on the right, goes away from the source; 100, up, stays in the plane.
        Vector3 right = o.scatteringVector(CUBE, new Hkl(0, -1, 0));
        assertClose(new Vector3(0.25 * Math.cos(DEGREE), 0, -0.25 * Math.sin(DEGREE)), right);
        assertEquals(0, o.scatteringVector(CUBE, G100).z(), 1e-16);
    }

    @Test
    void orientation_leanUp_carriesTheAxisUp() {
        Orientation o = new ZoneSetting(C, G100, 0.3, 0, 2 * DEGREE).orientation(CUBE);
        Vector3 axis = o.rotation().apply(Vector3.Z);
        assertClose(new Vector3(0, Math.sin(2 * DEGREE), Math.cos(2 * DEGREE)), axis);
        assertEquals(2 * DEGREE, o.lean(CUBE, C), 1e-15);
    }

    /** On the screen: the zone axis, seen from the source, keeps its reflections right-handed about it. */
    @Test
    void orientation_ofTriclinicZone_putsAxisAndReferenceInPlace() {
        Uvw zone = new Uvw(1, -1, 2);
        Hkl reference = new Hkl(1, 1, 0);
        Orientation o = ZoneSetting.onZone(zone, reference, 0.4).orientation(TRICLINIC);
        assertEquals(0, o.lean(TRICLINIC, zone), 1e-15);
        Vector3 g = o.scatteringVector(TRICLINIC, reference);
        assertEquals(0.4, new Vector2(g.x(), g.y()).azimuth(), 1e-15);
        Hkl second = new Hkl(2, 0, -1);
        assertEquals(0, second.dot(zone));
        Vector3 h = o.scatteringVector(TRICLINIC, second);
        boolean counterClockwise = reference.zoneWith(second).equals(zone);
        assertEquals(counterClockwise, new Vector2(g.x(), g.y()).cross(new Vector2(h.x(), h.y())) > 0);
    }

    @Test
    void of_ofItsOrientation_isRoundTrip() {
        Random random = new Random(71);
        Uvw zone = new Uvw(1, -1, 2);
        Hkl reference = new Hkl(1, 1, 0);
        for (int i = 0; i < 500; i++) {
            double lean = random.nextDouble(0, 1.5);
            double azimuth = random.nextDouble(-Math.PI, Math.PI);
            double rotation = random.nextDouble(-Math.PI, Math.PI);
            ZoneSetting s =
                    new ZoneSetting(zone, reference, rotation, lean * Math.cos(azimuth), lean * Math.sin(azimuth));
            Orientation o = s.orientation(TRICLINIC);
            ZoneSetting back = ZoneSetting.of(o, TRICLINIC, zone, reference);
            assertEquals(rotation, back.rotation(), 1e-13);
            assertEquals(s.leanX(), back.leanX(), 1e-14);
            assertEquals(s.leanY(), back.leanY(), 1e-14);
            assertEquals(lean, s.lean(), 1e-15);
            assertEquals(lean, o.lean(TRICLINIC, zone), 1e-14);
        }
    }

    @Test
    void of_anyOrientation_isRoundTrip() {
        Random random = new Random(72);
        int read = 0;
        while (read < 200) {
            Orientation o = new Orientation(Rotation.ofQuaternion(
                    random.nextGaussian(), random.nextGaussian(), random.nextGaussian(), random.nextGaussian()));
            if (o.lean(TRICLINIC, C) < 1.57) {
                ZoneSetting s = ZoneSetting.of(o, TRICLINIC, C, new Hkl(2, 1, 0));
                assertEquals(0, s.orientation(TRICLINIC).rotation().angleTo(o.rotation()), 2e-14);
                read++;
            }
        }
    }

    @Test
    void of_tinyLean_keepsItsDigits() {
        for (double lean : new double[] {1e-3, 1e-6, 1e-9, 1e-12}) {
            Orientation o = new ZoneSetting(C, G100, 1, 0.6 * lean, -0.8 * lean).orientation(CUBE);
            ZoneSetting back = ZoneSetting.of(o, CUBE, C, G100);
            assertEquals(0.6 * lean, back.leanX(), 1e-16);
            assertEquals(-0.8 * lean, back.leanY(), 1e-16);
            assertEquals(1, back.rotation(), 1e-15);
        }
    }

    @Test
    void of_axisAwayFromTheSource_isRefused() {
        Orientation o = ZoneSetting.onZone(C, G100, 0).orientation(CUBE);
        String message = assertThrows(
                        IllegalArgumentException.class, () -> ZoneSetting.of(o, CUBE, new Uvw(0, 0, -1), G100))
                .getMessage();
        assertTrue(message.contains("lean of zone axis [0 0 -1]: 180.0°, expected less than 90°"), message);
    }

    @Test
    void construct_badValues_areRefused() {
        assertThrows(IllegalArgumentException.class, () -> ZoneSetting.onZone(new Uvw(0, 0, 0), G100, 0));
        assertThrows(IllegalArgumentException.class, () -> ZoneSetting.onZone(C, new Hkl(0, 0, 0), 0));
        assertThrows(IllegalArgumentException.class, () -> ZoneSetting.onZone(C, new Hkl(1, 0, 1), 0));
        assertThrows(IllegalArgumentException.class, () -> ZoneSetting.onZone(C, G100, Double.NaN));
        assertThrows(IllegalArgumentException.class, () -> new ZoneSetting(C, G100, 0, 1.2, 1.2));
        assertThrows(IllegalArgumentException.class, () -> new ZoneSetting(C, G100, 0, Double.NaN, 0));
    }
}
