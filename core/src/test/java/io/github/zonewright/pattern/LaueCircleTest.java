package io.github.zonewright.pattern;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import org.junit.jupiter.api.Test;

class LaueCircleTest {
    private static final Crystal COPPER = CrystalShelf.find("copper").orElseThrow();
    private static final Beam BEAM = Beam.ofKilovolts(200);
    private static final Camera CAMERA = Camera.of(new PixelPoint(500, 400), 600, false);

    private static Placement leaning(double x, double y) {
        return new Placement(
                COPPER,
                BEAM,
                new ZoneSetting(new Uvw(1, 1, 0), new Hkl(1, -1, 1), 0.4, Math.toRadians(x), Math.toRadians(y)),
                CAMERA);
    }

    @Test
    void onZone_thereIsNone() {
        assertTrue(LaueCircle.of(leaning(0, 0)).isEmpty());
    }

    /** The elementary formula: radius k·sin(lean), through the direct beam, on the side away from the lean. */
    @Test
    void leaning_centreAndRadius() {
        LaueCircle circle = LaueCircle.of(leaning(0.5, 0)).orElseThrow();
        double radius = 600 * Math.sin(Math.toRadians(0.5)) / BEAM.wavelength();
        assertEquals(500 - radius, circle.centre().x(), 0.1);
        assertEquals(400, circle.centre().y(), 1e-9);
        for (PixelPoint p : circle.outline()) {
            assertEquals(radius, p.distanceTo(circle.centre()), 0.02 * radius);
        }
        double nearest = circle.outline().stream()
                .mapToDouble(p -> p.distanceTo(CAMERA.centre()))
                .min()
                .orElseThrow();
        assertEquals(0, nearest, 1e-6);
    }

    /** Definition of the circle: a point of it has |k + g| = k, and lies in the layer through the origin. */
    @Test
    void outline_liesOnTheSphereAndInTheLayer() {
        Placement placement = leaning(0.3, -0.7);
        Vector3 axis = placement
                .orientation()
                .rotation()
                .apply(COPPER.lattice().vector(new Uvw(1, 1, 0)))
                .normalize();
        double k = 1 / BEAM.wavelength();
        for (PixelPoint p : LaueCircle.of(placement).orElseThrow().outline()) {
            Vector2 g = CAMERA.toReciprocal(p, BEAM.wavelength());
            double height = k - Math.sqrt(k * k - g.dot(g));
            assertEquals(0, g.x() * axis.x() + g.y() * axis.y() + height * axis.z(), 1e-9);
        }
    }

    /** What the lean is asked to do, it does. */
    @Test
    void lean_carriesTheCentre() {
        Vector2 by = new Vector2(0.02, -0.05);
        Vector2 lean = LaueCircle.lean(by, BEAM.wavelength());
        PixelPoint before = LaueCircle.of(leaning(0.2, 0.1)).orElseThrow().centre();
        PixelPoint after = LaueCircle.of(leaning(0.2, 0.1).leanedBy(lean.x(), lean.y()))
                .orElseThrow()
                .centre();
        assertEquals(600 * by.x(), after.x() - before.x(), 0.05);
        assertEquals(-600 * by.y(), after.y() - before.y(), 0.05);
    }
}
