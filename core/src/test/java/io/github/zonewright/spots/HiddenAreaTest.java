package io.github.zonewright.spots;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.SyntheticPattern;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelPoint;
import java.util.List;
import org.junit.jupiter.api.Test;

/** Gaps, stops and masks on drawn patterns. */
class HiddenAreaTest {

    private static final int SIDE = 256;
    private static final DrawnNet NET = DrawnNet.of(SIDE, SIDE, new PixelPoint(123.4, 131.7), 34, 0.4);

    private interface Dead {
        boolean at(int column, int row);
    }

    private static GrayImage image(SyntheticPattern drawn, Dead dead, float value) {
        float[] values = drawn.counted(3, 3, 1);
        short[] shorts = new short[values.length];
        for (int i = 0; i < values.length; i++) {
            float grey = dead.at(i % SIDE, i / SIDE) ? value : Math.max(1, Math.min(65534, 100 + values[i]));
            shorts[i] = (short) Math.round(grey);
        }
        return GrayImage.ofUnsignedShorts(SIDE, SIDE, shorts);
    }

    private static void assertMeasured(Dead dead, float value, String what) {
        MeasuredPattern pattern = SpotFinder.measure(image(NET.withBeam(1.8, 300), dead, value));
        Mask hidden = pattern.hidden();
        int wrong = 0;
        for (int i = 0; i < SIDE * SIDE; i++) {
            wrong += hidden.contains(i % SIDE, i / SIDE) == dead.at(i % SIDE, i / SIDE) ? 0 : 1;
        }
        assertEquals(0, wrong, what + ": pixels masked wrongly");
        for (MeasuredSpot spot : pattern.spots()) {
            assertTrue(
                    NET.nodes().stream().anyMatch(node -> node.distanceTo(spot.position()) < 1),
                    what + ": false spot at " + spot.position());
        }
        Mask near = pattern.hidden().dilated(5);
        for (PixelPoint node : NET.nodes()) {
            if (!near.contains(node)) {
                assertTrue(
                        pattern.spots().stream()
                                .anyMatch(spot -> spot.position().distanceTo(node) < 0.5),
                        what + ": no spot at " + node);
            }
        }
        assertEquals(0, pattern.centre().orElseThrow().position().distanceTo(NET.centre()), 0.15, what);
    }

    @Test
    void measure_gapsOfATiledDetector_areHidden() {
        assertMeasured((c, r) -> Math.abs(c - 90) < 4 || Math.abs(r - 170) < 4, 0, "cross of zeros");
        assertMeasured((c, r) -> c >= 60 && c < 63, 0, "three columns");
        assertMeasured((c, r) -> r >= 40 && r < 80, 7, "broad band of one value");
        assertMeasured(
                (c, r) -> Math.abs(r - 66) < 2 || Math.abs(r - 190) < 5, 65535, "bands marked as the highest value");
        assertMeasured((c, r) -> c < 12 || r >= 240, 0, "dead border");
        assertMeasured((c, r) -> Math.abs(c - 90) < 20 || Math.abs(r - 190) < 20, 0, "broad cross");
    }

    @Test
    void measure_backgroundCutOffAtBlack_isNotHidden() {
        float[] values = NET.withBeam(1.8, 300).counted(4, 1, 1);
        byte[] bytes = new byte[values.length];
        for (int i = 0; i < values.length; i++) {
            bytes[i] = (byte) Math.max(0, Math.min(255, values[i] - 60));
        }
        MeasuredPattern pattern = SpotFinder.measure(GrayImage.ofUnsignedBytes(SIDE, SIDE, bytes));
        assertEquals(0, pattern.hidden().count());
        SyntheticPattern few = new SyntheticPattern(SIDE, SIDE, 0.02);
        NET.nodes().forEach(node -> few.spot(node.x(), node.y(), 1.8, 10));
        MeasuredPattern counted = SpotFinder.measure(image(few, (c, r) -> false, 0));
        assertEquals(0, counted.hidden().count());
        assertEquals(
                0,
                SpotFinder.measure(new SyntheticPattern(SIDE, SIDE, 0.02).bytes(1, 1))
                        .hidden()
                        .count());
    }

    @Test
    void withHidden_aPersonsMask_takesThePlaceOfTheAutomaticOne() {
        GrayImage image = image(NET.withBeam(1.8, 300), (c, r) -> r >= 40 && r < 48, 0);
        Mask corner = Mask.of(SIDE, SIDE, i -> i % SIDE < 80 && i / SIDE < 100);
        MeasuredPattern pattern = SpotFinder.withDefaults().withHidden(corner).find(image);
        assertEquals(corner.count(), pattern.hidden().count());
        assertTrue(pattern.isHidden(new PixelPoint(20, 20)) && !pattern.isHidden(new PixelPoint(200, 44)));
        assertTrue(pattern.spots().stream().noneMatch(spot -> corner.contains(spot.position())));
        MeasuredPattern open = SpotFinder.withDefaults().withNothingHidden().find(image);
        assertEquals(0, open.hidden().count());
        assertTrue(open.spots().size() >= pattern.spots().size());
    }

    @Test
    void withHidden_theStopsShadowByHand_asTheAutomaticOne() {
        SyntheticPattern drawn = NET.withBeam(1.8, 600).times((x, y) -> y > 119 && Math.abs(x - 123.4) < 11 ? 0.02 : 1);
        GrayImage image = drawn.shorts(5, 4);
        MeasuredPattern found = SpotFinder.measure(image);
        MeasuredPattern again =
                SpotFinder.withDefaults().withHidden(found.hidden()).find(image);
        assertTrue(found.hidden().count() > 0);
        assertEquals(found.hidden().count(), again.hidden().count());
        assertEquals(found.spots().size(), again.spots().size(), 2);
        assertEquals(0, again.centre().orElseThrow().position().distanceTo(NET.centre()), 0.1);
    }

    @Test
    void withHidden_anotherSize_isRefused() {
        SpotFinder finder = SpotFinder.withDefaults().withHidden(Mask.none(10, 10));
        GrayImage image = new SyntheticPattern(20, 12, 5).floats(1);
        String message = assertThrows(IllegalArgumentException.class, () -> finder.find(image))
                .getMessage();
        assertTrue(message.contains("10 × 10") && message.contains("20 × 12"), message);
    }

    @Test
    void measure_missingData_isHidden() {
        float[] values = NET.withBeam(1.8, 300).counted(8, 1, 0.5);
        for (int row = 200; row < 215; row++) {
            java.util.Arrays.fill(values, row * SIDE + 200, row * SIDE + 215, Float.NaN);
        }
        MeasuredPattern pattern = SpotFinder.measure(GrayImage.ofFloats(SIDE, SIDE, values));
        assertTrue(pattern.isHidden(new PixelPoint(207, 207)));
        assertFalse(pattern.isHidden(new PixelPoint(230, 207)));
        assertEquals(
                List.of(),
                pattern.spots().stream()
                        .filter(spot -> pattern.isHidden(spot.position()))
                        .toList());
    }
}
