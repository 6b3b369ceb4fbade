package io.github.zonewright.image;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;

class RadialProfileTest {
    private static final PixelPoint CENTRE = new PixelPoint(50, 40);

    private static GrayImage image(java.util.function.DoubleBinaryOperator value) {
        float[] values = new float[100 * 80];
        for (int i = 0; i < values.length; i++) {
            values[i] = (float) value.applyAsDouble(i % 100 + 0.5, i / 100 + 0.5);
        }
        return GrayImage.ofFloats(100, 80, values);
    }

    @Test
    void of_valueIsTheRadius_meanIsTheMeanRadius() {
        GrayImage image = image((x, y) -> Math.hypot(x - 50, y - 40));
        RadialProfile profile = RadialProfile.of(image, Ellipse.circle(CENTRE), Mask.none(100, 80), 1);
        for (int bin = 0; bin < 40; bin++) {
            assertEquals(profile.radius(bin), profile.mean(bin), 1e-4);
            assertTrue(profile.radius(bin) >= bin && profile.radius(bin) < bin + 1);
        }
        // The four pixels around the centre.
        assertEquals(4, profile.count(0));
        assertEquals(Math.sqrt(0.5), profile.radius(0), 1e-12);
    }

    @Test
    void of_ellipse_takesTheDistortionOff() {
        Ellipse shape = new Ellipse(CENTRE, 1.3, 0.4);
        GrayImage image = image((x, y) -> shape.radius(new PixelPoint(x, y)));
        RadialProfile profile = RadialProfile.of(image, shape, Mask.none(100, 80), 0.5);
        for (int bin = 4; bin < 60; bin++) {
            assertEquals(profile.radius(bin), profile.mean(bin), 1e-4);
        }
    }

    @Test
    void of_maskAndMissingData_doNotCount() {
        GrayImage image = image((x, y) -> x < 50 ? 1 : y < 40 ? 2 : Double.NaN);
        Mask left = Mask.of(100, 80, i -> i % 100 < 50);
        RadialProfile profile = RadialProfile.of(image, Ellipse.circle(CENTRE), left, 1);
        assertEquals(2, profile.mean(10), 0);
        RadialProfile all = RadialProfile.of(image, Ellipse.circle(CENTRE), Mask.none(100, 80), 1);
        assertEquals(all.count(10), 3 * profile.count(10));
    }

    @Test
    void error_gaussianNoise_isTheScatterOverTheRootOfTheCount() {
        Random random = new Random(1);
        GrayImage image = image((x, y) -> 100 + 5 * random.nextGaussian());
        RadialProfile profile = RadialProfile.of(image, Ellipse.circle(CENTRE), Mask.none(100, 80), 4);
        for (int bin = 3; bin < 9; bin++) {
            assertEquals(5 / Math.sqrt(profile.count(bin)), profile.error(bin), 0.15 * profile.error(bin));
        }
    }

    @Test
    void sectors_together_holdEveryPixelOnce() {
        GrayImage image = image((x, y) -> x > 50 ? 1 : 0);
        List<RadialProfile> quarters = RadialProfile.sectors(image, Ellipse.circle(CENTRE), Mask.none(100, 80), 1, 4);
        int count = 0;
        for (RadialProfile quarter : quarters) {
            for (int bin = 0; bin < quarter.size(); bin++) {
                count += quarter.count(bin);
            }
        }
        assertEquals(100 * 80, count);
        // Counter-clockwise from the right: the first and the last quarter are on the right.
        assertEquals(1, quarters.get(0).mean(20), 0);
        assertEquals(0, quarters.get(1).mean(20), 0);
        assertEquals(0, quarters.get(2).mean(20), 0);
        assertEquals(1, quarters.get(3).mean(20), 0);
    }

    @Test
    void of_nonsense_isRefused() {
        GrayImage image = image((x, y) -> 0);
        Ellipse circle = Ellipse.circle(CENTRE);
        assertThrows(IllegalArgumentException.class, () -> RadialProfile.of(image, circle, Mask.none(9, 9), 1));
        assertThrows(IllegalArgumentException.class, () -> RadialProfile.of(image, circle, Mask.none(100, 80), 0));
    }
}
