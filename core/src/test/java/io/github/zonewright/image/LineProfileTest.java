package io.github.zonewright.image;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class LineProfileTest {
    /** Linear interpolation gives back a plane, whatever the direction, and a band about the line averages to its middle. */
    @ParameterizedTest
    @CsvSource({"10, 10, 50, 10, 0", "10, 10, 50, 40, 0", "50, 40, 12.5, 9.25, 7", "20, 50, 20, 8, 4.5"})
    void of_plane_isThePlane(double x1, double y1, double x2, double y2, double width) {
        GrayImage plane = image(64, 64, (x, y) -> 3 + 2 * x - 0.5 * y);
        LineProfile profile = LineProfile.of(plane, new PixelPoint(x1, y1), new PixelPoint(x2, y2), width);
        double length = Math.hypot(x2 - x1, y2 - y1);
        assertEquals(length, profile.step() * (profile.size() - 1), 1e-12);
        assertTrue(profile.step() <= 1);
        for (int i = 0; i < profile.size(); i++) {
            double part = i * profile.step() / length;
            double expected = 3 + 2 * (x1 + part * (x2 - x1)) - 0.5 * (y1 + part * (y2 - y1));
            assertEquals(expected, profile.value(i), 1e-4);
        }
    }

    /** A ridge one pixel wide, averaged across five points of which one meets it. */
    @Test
    void of_band_averagesAcross() {
        GrayImage ridge = image(32, 32, (x, y) -> y == 16.5 ? 10 : 0);
        LineProfile profile = LineProfile.of(ridge, new PixelPoint(4.5, 16.5), new PixelPoint(24.5, 16.5), 4);
        assertEquals(2, profile.value(7), 1e-6);
        assertEquals(
                10,
                LineProfile.of(ridge, new PixelPoint(4.5, 16.5), new PixelPoint(24.5, 16.5), 0)
                        .value(7),
                1e-6);
    }

    @Test
    void of_outsideAndWithoutData_isNaN() {
        GrayImage image = image(16, 16, (x, y) -> x == 8.5 ? Double.NaN : 1);
        LineProfile profile = LineProfile.of(image, new PixelPoint(-4.5, 8.5), new PixelPoint(20.5, 8.5), 0);
        assertTrue(Double.isNaN(profile.value(0)));
        assertTrue(Double.isNaN(profile.value(13)));
        assertTrue(Double.isNaN(profile.value(25)));
        assertEquals(1, profile.value(8), 1e-6);
    }

    @Test
    void of_badInput_isNamed() {
        GrayImage image = image(8, 8, (x, y) -> 1);
        PixelPoint point = new PixelPoint(3, 3);
        String message = assertThrows(IllegalArgumentException.class, () -> LineProfile.of(image, point, point, 0))
                .getMessage();
        assertTrue(message.contains("0.0 px"), message);
        assertThrows(IllegalArgumentException.class, () -> LineProfile.of(image, point, new PixelPoint(7, 3), -1));
    }

    private interface Formula {
        double at(double x, double y);
    }

    private static GrayImage image(int width, int height, Formula formula) {
        float[] values = new float[width * height];
        for (int i = 0; i < values.length; i++) {
            values[i] = (float) formula.at(i % width + 0.5, i / width + 0.5);
        }
        return GrayImage.ofFloats(width, height, values);
    }
}
