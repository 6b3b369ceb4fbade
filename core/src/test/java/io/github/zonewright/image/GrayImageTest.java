package io.github.zonewright.image;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertSame;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;

class GrayImageTest {

    private static final float NONE = Float.NaN;

    @Test
    void ofUnsignedBytes_highBit_isNotNegative() {
        GrayImage image = GrayImage.ofUnsignedBytes(2, 1, new byte[] {(byte) 200, 3});
        assertEquals(200, image.value(0, 0));
        assertEquals(255, image.maximumPossible().orElseThrow());
        assertTrue(image.isInteger());
    }

    @Test
    void ofUnsignedShorts_highBit_isNotNegative() {
        GrayImage image = GrayImage.ofUnsignedShorts(1, 2, new short[] {(short) 60000, 3});
        assertEquals(60000, image.value(0, 0));
        assertEquals(3, image.value(0, 1));
        assertEquals(65535, image.maximumPossible().orElseThrow());
    }

    @Test
    void ofFloats_arrayChangedLater_imageIsNot() {
        float[] values = {1, 2, 3, 4};
        GrayImage image = GrayImage.ofFloats(2, 2, values);
        values[3] = 9;
        image.values()[3] = 9;
        assertEquals(4, image.value(1, 1));
        assertTrue(image.maximumPossible().isEmpty());
        assertFalse(image.isInteger());
    }

    @Test
    void ofFloats_infinity_isNoData() {
        GrayImage image = GrayImage.ofFloats(2, 1, new float[] {Float.POSITIVE_INFINITY, -2});
        assertTrue(Float.isNaN(image.value(0, 0)));
        assertEquals(new ValueRange(-2, -2, 1), image.range());
    }

    @Test
    void ofFloats_badSize_isRefusedWithTheNumbers() {
        assertTrue(assertThrows(IllegalArgumentException.class, () -> GrayImage.ofFloats(0, 3, new float[0]))
                .getMessage()
                .contains("0 × 3"));
        assertTrue(assertThrows(IllegalArgumentException.class, () -> GrayImage.ofFloats(2, 2, new float[5]))
                .getMessage()
                .contains("5"));
        assertThrows(IllegalArgumentException.class, () -> GrayImage.ofUnsignedBytes(1 << 15, 1 << 15, new byte[0]));
    }

    @Test
    void value_outside_isRefused() {
        GrayImage image = GrayImage.ofFloats(2, 1, new float[2]);
        assertThrows(IndexOutOfBoundsException.class, () -> image.value(2, 0));
        assertThrows(IndexOutOfBoundsException.class, () -> image.value(0, -1));
    }

    @Test
    void interpolated_pixelCentres_giveTheValues() {
        GrayImage image = GrayImage.ofFloats(3, 2, new float[] {0, 1, 2, 10, 11, 12});
        assertEquals(11, image.interpolated(new PixelPoint(1.5, 1.5)));
        assertEquals(5.5, image.interpolated(new PixelPoint(1, 1)));
        assertEquals(0, image.interpolated(new PixelPoint(0, 0)), "even beyond the outermost centres");
        assertEquals(12, image.interpolated(new PixelPoint(3, 2)));
    }

    @Test
    void interpolated_onePixel_isItsValue() {
        assertEquals(7, GrayImage.ofFloats(1, 1, new float[] {7}).interpolated(new PixelPoint(0.2, 0.9)));
    }

    @Test
    void interpolated_besideMissingData_isMissing() {
        GrayImage image = GrayImage.ofFloats(2, 1, new float[] {5, NONE});
        assertEquals(5, image.interpolated(new PixelPoint(0.5, 0.5)));
        assertTrue(Double.isNaN(image.interpolated(new PixelPoint(1, 0.5))));
    }

    @Test
    void contains_edges_leftInRightOut() {
        GrayImage image = GrayImage.ofFloats(2, 1, new float[2]);
        assertTrue(image.contains(new PixelPoint(0, 0)));
        assertFalse(image.contains(new PixelPoint(2, 0.5)));
        assertFalse(image.contains(new PixelPoint(1, 1)));
    }

    @Test
    void range_noData_isNotANumber() {
        ValueRange range = GrayImage.ofFloats(1, 1, new float[] {NONE}).range();
        assertEquals(0, range.count());
        assertTrue(Float.isNaN(range.minimum()) && Float.isNaN(range.maximum()));
    }

    @Test
    void binned_oddSize_dropsTheRestAndSkipsMissingData() {
        GrayImage image = GrayImage.ofFloats(3, 2, new float[] {1, 3, 99, NONE, 5, 99});
        GrayImage half = image.binned(2);
        assertEquals(1, half.width());
        assertEquals(3, half.value(0, 0));
        assertSame(image, image.binned(1));
    }

    @Test
    void binned_allMissing_isMissing() {
        GrayImage image = GrayImage.ofFloats(2, 2, new float[] {NONE, NONE, NONE, NONE});
        assertTrue(Float.isNaN(image.binned(2).value(0, 0)));
    }

    @Test
    void binned_factorBeyondTheSide_isRefused() {
        GrayImage image = GrayImage.ofFloats(3, 2, new float[6]);
        assertThrows(IllegalArgumentException.class, () -> image.binned(3));
        assertThrows(IllegalArgumentException.class, () -> image.binned(0));
    }
}
