package io.github.zonewright.imagej.bridge;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.ImageStack;
import ij.process.ByteProcessor;
import ij.process.ColorProcessor;
import ij.process.FloatProcessor;
import ij.process.ShortProcessor;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import org.junit.jupiter.api.Test;

class ImagePixelsTest {
    @Test
    void of_bytes_areUnsigned() {
        ImagePlus image = new ImagePlus("8", new ByteProcessor(2, 1, new byte[] {5, (byte) 200}));
        assertEquals(200, ImagePixels.of(image).value(1, 0));
    }

    @Test
    void of_shorts_areUnsigned() {
        ImagePlus image = new ImagePlus("16", new ShortProcessor(2, 1, new short[] {5, (short) 60000}, null));
        assertEquals(60000, ImagePixels.of(image).value(1, 0));
    }

    @Test
    void of_floats_areCopied() {
        float[] values = {1.5f, -2};
        GrayImage read = ImagePixels.of(new ImagePlus("32", new FloatProcessor(2, 1, values)));
        values[1] = 7;
        assertEquals(-2, read.value(1, 0));
    }

    /** ITU-R BT.601: 0.299 R + 0.587 G + 0.114 B. */
    @Test
    void of_colour_isLuminance() {
        ImagePlus image = new ImagePlus("RGB", new ColorProcessor(1, 1, new int[] {0xFF6432C8}));
        assertEquals(
                0.299f * 0x64 + 0.587f * 0x32 + 0.114f * 0xC8,
                ImagePixels.of(image).value(0, 0),
                1e-4);
        assertTrue(ImagePixels.note(image).contains("luminance"));
    }

    @Test
    void of_stack_isTheCurrentSlice() {
        ImageStack stack = new ImageStack(1, 1);
        stack.addSlice(new ByteProcessor(1, 1, new byte[] {1}));
        stack.addSlice(new ByteProcessor(1, 1, new byte[] {2}));
        ImagePlus image = new ImagePlus("stack", stack);
        image.setSlice(2);
        assertEquals(2, ImagePixels.of(image).value(0, 0));
        assertTrue(ImagePixels.note(image).contains("Slice 2 of 2"));
    }

    @Test
    void of_closedImage_saysSo() {
        ImagePlus image = new ImagePlus();
        Exception refused = assertThrows(IllegalArgumentException.class, () -> ImagePixels.of(image));
        assertTrue(refused.getMessage().contains("closed"), refused.getMessage());
    }

    @Test
    void of_leavesTheImage() {
        ImagePlus image = TestPatterns.imageOfUser();
        Fingerprint before = Fingerprint.of(image);
        ImagePixels.of(image);
        before.assertSame(image);
    }

    @Test
    void note_plainImage_isEmpty() {
        assertEquals("", ImagePixels.note(TestPatterns.image()));
    }
}
