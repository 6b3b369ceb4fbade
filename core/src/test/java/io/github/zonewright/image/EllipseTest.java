package io.github.zonewright.image;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import io.github.zonewright.geometry.Vector2;
import java.util.Random;
import org.junit.jupiter.api.Test;

class EllipseTest {
    private static final PixelPoint CENTRE = new PixelPoint(100, 100);

    @Test
    void radius_workedNumber_isTheGeometricMean() {
        Ellipse ellipse = new Ellipse(CENTRE, 1.21, 0);
        assertEquals(10, ellipse.radius(new PixelPoint(111, 100)), 1e-12);
        assertEquals(10, ellipse.radius(new PixelPoint(100, 100 - 10 / 1.1)), 1e-12);
    }

    @Test
    void azimuth_isCounterClockwiseOnTheScreen() {
        Ellipse ellipse = new Ellipse(CENTRE, 1.21, Math.PI / 4);
        // Up and to the right on the screen is y less.
        double half = 11 / Math.sqrt(2);
        assertEquals(10, ellipse.radius(new PixelPoint(100 + half, 100 - half)), 1e-12);
    }

    @Test
    void undistorted_andPointAt_areInverse() {
        Random random = new Random(3);
        for (int i = 0; i < 200; i++) {
            Ellipse ellipse = new Ellipse(CENTRE, 1 + random.nextDouble(), 7 * random.nextDouble());
            double radius = 50 * random.nextDouble();
            double angle = 2 * Math.PI * random.nextDouble();
            PixelPoint point = ellipse.pointAt(radius, angle);
            Vector2 back = ellipse.undistorted(point.x(), point.y());
            assertEquals(0, back.minus(Vector2.ofPolar(radius, angle)).norm(), 1e-10);
        }
    }

    @Test
    void ofStrain_ofItsOwnStrain_isTheSame() {
        Ellipse ellipse = new Ellipse(CENTRE, 1.05, -0.7);
        Ellipse again = Ellipse.ofStrain(CENTRE, ellipse.along(), ellipse.diagonal());
        assertEquals(1.05, again.ratio(), 1e-12);
        assertEquals(-0.7, again.azimuth(), 1e-12);
        assertEquals(1, Ellipse.ofStrain(CENTRE, 0, 0).ratio(), 0);
    }

    @Test
    void constructor_nonsense_isRefused() {
        assertThrows(IllegalArgumentException.class, () -> new Ellipse(CENTRE, 0.9, 0));
        assertThrows(IllegalArgumentException.class, () -> new Ellipse(CENTRE, 1.1, Double.NaN));
    }
}
