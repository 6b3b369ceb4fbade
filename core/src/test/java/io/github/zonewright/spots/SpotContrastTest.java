package io.github.zonewright.spots;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.SyntheticPattern;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.PixelPoint;
import org.junit.jupiter.api.Test;

class SpotContrastTest {

    private static SyntheticPattern pattern(boolean stop) {
        SyntheticPattern pattern =
                new SyntheticPattern(400, 400, 40).add((x, y) -> 200 * Math.exp(-Math.hypot(x - 200, y - 200) / 60));
        for (int i = -4; i <= 4; i++) {
            for (int j = -4; j <= 4; j++) {
                double peak = 3000 * Math.exp(-Math.hypot(i, j)) + 60;
                pattern.spot(200 + 41 * i + 7 * j, 200 + 43 * j - 5 * i, 2.2, peak);
            }
        }
        return stop ? pattern.times((x, y) -> x < 215 && Math.abs(y - 200) < 14 ? 0.02 : 1) : pattern;
    }

    private static void assertTold(GrayImage image) {
        SpotContrast bright = SpotContrast.of(image);
        assertFalse(bright.darkSpots());
        assertTrue(bright.confidence() > 0.5, "confidence " + bright.confidence());
        SpotContrast dark = SpotContrast.of(image.inverted());
        assertTrue(dark.darkSpots());
        assertEquals(bright.confidence(), dark.confidence(), 0.1);
    }

    @Test
    void of_spots_areToldInAnyPixelType() {
        assertTold(pattern(false).shorts(1, 4));
        assertTold(pattern(false).bytes(2, 0.2));
        assertTold(pattern(false).floats(3));
    }

    @Test
    void of_beamStop_isNoDarkSpot() {
        assertTold(pattern(true).shorts(4, 4));
    }

    private static SyntheticPattern faint(double glow, double reach) {
        DrawnNet net = DrawnNet.of(300, 300, new PixelPoint(150, 150), 37, 0.3);
        SyntheticPattern pattern = new SyntheticPattern(300, 300, 40)
                .add((x, y) -> glow * Math.exp(-Math.hypot(x - 150, y - 150) / reach));
        net.nodes().forEach(node -> pattern.spot(node.x(), node.y(), 2, 100));
        return pattern;
    }

    @Test
    void of_broadStopOrGlowAlone_isToldThoughNotWithConfidence() {
        for (int width = 20; width <= 60; width += 20) {
            int half = width;
            GrayImage image = faint(300, 50)
                    .times((x, y) -> x < 180 && Math.abs(y - 150) < half ? 0.02 : 1)
                    .shorts(width, 4);
            assertFalse(SpotContrast.of(image).darkSpots());
            assertTrue(SpotContrast.of(image.inverted()).darkSpots());
        }
        assertTold(faint(1000, 20).shorts(1, 4));
        assertTold(faint(1000, 60).shorts(2, 4));
    }

    @Test
    void of_cutOffAtBlack_isTold() {
        float[] values = pattern(false).counted(8, 1, 10);
        byte[] bytes = new byte[values.length];
        for (int i = 0; i < bytes.length; i++) {
            bytes[i] = (byte) Math.max(0, Math.min(255, values[i] - 50));
        }
        assertTold(GrayImage.ofUnsignedBytes(400, 400, bytes));
    }

    @Test
    void reason_namesWhatSpeaksForIt() {
        String reason = SpotContrast.of(pattern(false).shorts(1, 4).inverted()).reason();
        assertTrue(reason.startsWith("The dark end of the grey values reaches"), reason);
        assertTrue(reason.contains("the dark spots stand out more"), reason);
    }

    @Test
    void of_brightEndMuchFarther_spotsAreNotAsked() {
        SpotContrast told = SpotContrast.of(pattern(false).shorts(1, 4));
        assertTrue(told.reason().endsWith("from their median as the other."), told.reason());
        assertFalse(told.darkSpots());
    }

    @Test
    void of_noise_hasNoConfidence() {
        GrayImage noise = new SyntheticPattern(256, 256, 50).floats(5);
        assertTrue(SpotContrast.of(noise).confidence() < 0.3);
    }

    @Test
    void inverted_twice_isTheSame() {
        GrayImage image = pattern(false).shorts(6, 4);
        GrayImage again = image.inverted().inverted();
        assertEquals(65535 - image.value(17, 23), image.inverted().value(17, 23));
        for (int i = 0; i < 400; i += 7) {
            assertEquals(image.value(i, 399 - i), again.value(i, 399 - i));
        }
        assertTrue(image.inverted().isInteger());
        GrayImage floats = GrayImage.ofFloats(3, 1, new float[] {-2, Float.NaN, 5});
        assertEquals(5, floats.inverted().value(0, 0));
        assertTrue(Float.isNaN(floats.inverted().value(1, 0)));
        assertEquals(-2, floats.inverted().value(2, 0));
    }
}
