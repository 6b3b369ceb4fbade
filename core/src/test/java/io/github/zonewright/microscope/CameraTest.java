package io.github.zonewright.microscope;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class CameraTest {

    private static final PixelPoint CENTRE = new PixelPoint(256, 256);

    private static void assertPixel(double x, double y, PixelPoint actual, double tolerance) {
        assertEquals(0, actual.distanceTo(new PixelPoint(x, y)), tolerance, actual::toString);
    }

    @Test
    void toPixel_yPointsDownOnTheImage_workedNumber() {
        Camera camera = Camera.of(CENTRE, 200, false);
        assertPixel(356, 206, camera.toPixel(new Vector2(0.5, 0.25), 0), 1e-12);
        assertPixel(256, 256, camera.toPixel(Vector2.ZERO, 0.025), 0);
    }

    @Test
    void toPixel_mirrored_workedNumber() {
        Camera camera = Camera.of(CENTRE, 200, true);
        assertPixel(156, 206, camera.toPixel(new Vector2(0.5, 0.25), 0), 1e-12);
    }

    /** A flat film: R = (K/λ) tan 2θ with λ = 2d sin θ, where |g⊥| = sin 2θ/λ. */
    @Test
    void toPixel_flatDetector_isTheTangentOfTwiceTheBraggAngle() {
        double wavelength = Beam.ofKilovolts(200).wavelength();
        Camera camera = Camera.of(CENTRE, 500, false);
        for (double d : new double[] {5, 2, 1, 0.7}) {
            double theta = Math.asin(wavelength / (2 * d));
            PixelPoint p = camera.toPixel(new Vector2(Math.sin(2 * theta) / wavelength, 0), wavelength);
            assertPixel(256 + 500 / wavelength * Math.tan(2 * theta), 256, p, 1e-10);
        }
    }

    /** A ring at K/d would be 0.04 % too small at 200 kV and 1.3 1/Å; 1/d taken for g⊥ makes it 0.013 % too large. */
    @Test
    void toPixel_ring_isNeitherAtKOverDNorAtThatOfAFlatVector() {
        double wavelength = Beam.ofKilovolts(200).wavelength();
        double ring = Math.tan(2 * Math.asin(wavelength * 1.3 / 2)) / wavelength;
        assertEquals(4.0e-4, ring / 1.3 - 1, 5e-6);
        Camera unit = Camera.of(new PixelPoint(0, 0), 1, false);
        assertEquals(1.3e-4, unit.toPixel(new Vector2(1.3, 0), wavelength).x() / ring - 1, 5e-6);
    }

    @Test
    void toPixel_ellipse_stretchesAlongItsAzimuthCounterClockwiseFromX() {
        // q = 1.21: 1.1 along, 1/1.1 across. Azimuth 90° is up on the screen, which is towards smaller y.
        Camera up = Camera.of(CENTRE, 100, false).withEllipse(1.21, Math.PI / 2);
        assertPixel(256 + 100 / 1.1, 256, up.toPixel(new Vector2(1, 0), 0), 1e-12);
        assertPixel(256, 256 - 110, up.toPixel(new Vector2(0, 1), 0), 1e-12);
        // Azimuth 45°: a g of 45° is up and right, one of 135° up and left.
        Camera slanted = Camera.of(CENTRE, 100, false).withEllipse(1.21, Math.PI / 4);
        double s = Math.sqrt(0.5);
        assertPixel(256 + 110 * s, 256 - 110 * s, slanted.toPixel(new Vector2(s, s), 0), 1e-12);
        assertPixel(256 - 100 / 1.1 * s, 256 - 100 / 1.1 * s, slanted.toPixel(new Vector2(-s, s), 0), 1e-12);
    }

    @Test
    void toPixel_mirroredEllipse_isStretchedFirstAndMirroredThen() {
        // Azimuth 45° in the microscope frame appears at 135° on a mirrored screen.
        Camera camera = Camera.of(CENTRE, 100, true).withEllipse(1.21, Math.PI / 4);
        double s = Math.sqrt(0.5);
        assertPixel(256 - 110 * s, 256 - 110 * s, camera.toPixel(new Vector2(s, s), 0), 1e-12);
        assertPixel(256 + 100 / 1.1 * s, 256 - 100 / 1.1 * s, camera.toPixel(new Vector2(-s, s), 0), 1e-12);
    }

    @Test
    void toPixel_ellipse_keepsTheArea() {
        Camera camera = Camera.of(CENTRE, 321, false).withEllipse(1.07, 0.7);
        PixelPoint a = camera.toPixel(new Vector2(1, 0), 0);
        PixelPoint b = camera.toPixel(new Vector2(0, 1), 0);
        double area = (a.x() - 256) * (256 - b.y()) - (256 - a.y()) * (b.x() - 256);
        assertEquals(321.0 * 321, area, 1e-8);
    }

    @ParameterizedTest
    @ValueSource(doubles = {0, 0.0087, 0.0251, 0.37})
    void toReciprocal_ofToPixel_isRoundTrip(double wavelength) {
        Random random = new Random(51);
        for (int i = 0; i < 500; i++) {
            Camera camera = new Camera(
                    new PixelPoint(random.nextDouble(0, 2048), random.nextDouble(0, 2048)),
                    random.nextDouble(50, 5000),
                    random.nextDouble(1, 1.3),
                    random.nextDouble(-4, 4),
                    random.nextBoolean());
            Vector2 g = Vector2.ofPolar(random.nextDouble(0, 2.5), random.nextDouble(-4, 4));
            Vector2 back = camera.toReciprocal(camera.toPixel(g, wavelength), wavelength);
            assertEquals(0, back.minus(g).norm(), 1e-12);
        }
    }

    @Test
    void toPixel_beyondTheSphere_isRefused() {
        Camera camera = Camera.of(CENTRE, 200, false);
        assertThrows(IllegalArgumentException.class, () -> camera.toPixel(new Vector2(2, 0), 0.5));
        assertThrows(IllegalArgumentException.class, () -> camera.toPixel(new Vector2(Double.NaN, 0), 0.5));
        // However far out a place is, g stays below 1/λ.
        assertTrue(camera.toReciprocal(new PixelPoint(1e9, 0), 0.5).norm() <= 2);
    }

    @Test
    void with_changesOneThingAlone() {
        Camera camera = new Camera(CENTRE, 200, 1.02, 0.3, true);
        PixelPoint other = new PixelPoint(10, 20);
        assertEquals(new Camera(other, 200, 1.02, 0.3, true), camera.withCentre(other));
        assertEquals(new Camera(CENTRE, 300, 1.02, 0.3, true), camera.withConstant(300));
        assertEquals(new Camera(CENTRE, 200, 1.5, 1, true), camera.withEllipse(1.5, 1));
    }

    @ParameterizedTest
    @CsvSource({
        "0, 0, 0, 1, 0",
        "0, 0, -5, 1, 0",
        "0, 0, NaN, 1, 0",
        "0, 0, Infinity, 1, 0",
        "0, 0, 100, 0.99, 0",
        "0, 0, 100, 2.01, 0",
        "0, 0, 100, NaN, 0",
        "0, 0, 100, 1, NaN",
        "NaN, 0, 100, 1, 0",
        "0, Infinity, 100, 1, 0"
    })
    void construct_badValues_areRefused(double x, double y, double constant, double ratio, double azimuth) {
        assertThrows(
                IllegalArgumentException.class,
                () -> new Camera(new PixelPoint(x, y), constant, ratio, azimuth, false));
    }

    @Test
    void scale_cameraLength_workedNumber() {
        // λL/p: 0.0250793 Å · 500 mm / 24 µm = 522.5 px·Å; binned by two, half of it.
        Beam beam = Beam.ofKilovolts(200);
        assertEquals(522.486, CameraScale.fromCameraLength(500, 24, 1, beam), 1e-3);
        assertEquals(261.243, CameraScale.fromCameraLength(500, 24, 2, beam), 1e-3);
        assertEquals(522.486, CameraScale.fromMillimetreAngstroms(12.53967, 24), 1e-3);
    }

    @Test
    void scale_reciprocalPixel_isItsInverse() {
        assertEquals(200, CameraScale.fromReciprocalPixel(0.005), 1e-12);
    }

    @Test
    void scale_badValues_areRefused() {
        Beam beam = Beam.ofKilovolts(200);
        assertThrows(IllegalArgumentException.class, () -> CameraScale.fromCameraLength(0, 24, 1, beam));
        assertThrows(IllegalArgumentException.class, () -> CameraScale.fromCameraLength(500, -24, 1, beam));
        assertThrows(IllegalArgumentException.class, () -> CameraScale.fromCameraLength(500, 24, 0, beam));
        assertThrows(IllegalArgumentException.class, () -> CameraScale.fromMillimetreAngstroms(Double.NaN, 24));
        assertThrows(IllegalArgumentException.class, () -> CameraScale.fromReciprocalPixel(0));
        assertThrows(IllegalArgumentException.class, () -> CameraScale.fromReciprocalPixel(Double.POSITIVE_INFINITY));
    }
}
