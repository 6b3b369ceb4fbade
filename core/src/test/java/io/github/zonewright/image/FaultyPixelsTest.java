package io.github.zonewright.image;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.SyntheticPattern;
import org.junit.jupiter.api.Test;

class FaultyPixelsTest {

    private static final int SIDE = 128;

    private static float[] pattern(long seed) {
        SyntheticPattern pattern = new SyntheticPattern(SIDE, SIDE, 100);
        for (int i = 0; i < 9; i++) {
            pattern.spot(20.3 + 40 * (i % 3), 22.8 + 40 * (i / 3), 0.9, 3000);
        }
        return pattern.counted(seed, 1, 0.5);
    }

    @Test
    void of_hotPixels_areMended() {
        float[] values = pattern(1);
        int[] hot = {40 * SIDE + 40, 77 * SIDE + 90, 3, 100 * SIDE};
        for (int index : hot) {
            values[index] = 5000;
        }
        PixelRepair repair = PixelRepair.of(GrayImage.ofFloats(SIDE, SIDE, values));
        for (int index : hot) {
            assertTrue(repair.faulty().contains(index % SIDE, index / SIDE));
            assertEquals(100, repair.image().value(index % SIDE, index / SIDE), 40);
        }
        assertTrue(
                repair.faulty().count() <= hot.length + 1,
                "faulty: " + repair.faulty().count());
    }

    @Test
    void of_sharpSpots_areKept() {
        float[] values = pattern(2);
        PixelRepair repair = PixelRepair.of(GrayImage.ofFloats(SIDE, SIDE, values));
        for (int i = 0; i < 9; i++) {
            assertFalse(repair.faulty().contains(20 + 40 * (i % 3), 22 + 40 * (i / 3)));
        }
    }

    @Test
    void of_deadRowAndColumn_areBridged() {
        float[] values = pattern(3);
        for (int i = 0; i < SIDE; i++) {
            values[50 * SIDE + i] = 0;
            values[i * SIDE + 70] = 0;
            values[i * SIDE + 71] = 0;
        }
        PixelRepair repair = PixelRepair.of(GrayImage.ofFloats(SIDE, SIDE, values));
        assertEquals(100, repair.image().value(10, 50), 40);
        assertEquals(100, repair.image().value(70, 90), 40);
        assertTrue(repair.faulty().contains(71, 5));
        assertTrue(repair.faulty().count() < 4 * SIDE);
    }

    @Test
    void of_missingData_staysMissingAndIsCounted() {
        float[] values = pattern(4);
        values[5 * SIDE + 5] = Float.NaN;
        PixelRepair repair = PixelRepair.of(GrayImage.ofFloats(SIDE, SIDE, values));
        assertTrue(repair.faulty().contains(5, 5));
        assertTrue(Float.isNaN(repair.image().value(5, 5)));
    }

    @Test
    void of_tinyImages_passThrough() {
        assertEquals(
                0,
                PixelRepair.of(GrayImage.ofFloats(1, 1, new float[] {4}))
                        .faulty()
                        .count());
        assertEquals(
                0,
                PixelRepair.of(GrayImage.ofFloats(2, 9, new float[18])).faulty().count());
    }

    @Test
    void saturation_typeAtItsLimit_isFound() {
        assertEquals(
                255,
                Saturation.level(GrayImage.ofUnsignedBytes(3, 1, new byte[] {1, (byte) 255, 7}))
                        .orElseThrow());
    }

    @Test
    void saturation_plateauOfATwelveBitCamera_isFound() {
        short[] values = new short[400];
        for (int i = 0; i < 400; i++) {
            values[i] = (short) (50 + i % 13);
        }
        for (int i = 100; i < 106; i++) {
            values[i] = 4095;
        }
        assertEquals(
                4095,
                Saturation.level(GrayImage.ofUnsignedShorts(20, 20, values)).orElseThrow());
    }

    @Test
    void saturation_onePeakOrNone_isNot() {
        short[] values = new short[400];
        values[7] = 4000;
        assertTrue(Saturation.level(GrayImage.ofUnsignedShorts(20, 20, values)).isEmpty());
        assertTrue(Saturation.level(GrayImage.ofFloats(2, 2, new float[4])).isEmpty());
        assertTrue(Saturation.level(GrayImage.ofFloats(1, 1, new float[] {Float.NaN}))
                .isEmpty());
    }
}
