package io.github.zonewright.imagej.bridge;

import ij.ImagePlus;
import ij.process.ByteProcessor;
import ij.process.ColorProcessor;
import ij.process.FloatProcessor;
import ij.process.ImageProcessor;
import ij.process.ShortProcessor;
import io.github.zonewright.image.GrayImage;

/**
 * The pixels of an image's current slice as the library wants them. Values are raw: no display range, no value
 * calibration. A colour image is read by its luminance, since a pattern is grey whatever the file says.
 */
public final class ImagePixels {
    private ImagePixels() {}

    /**
     * Reads the current slice.
     *
     * @param image the image; neither it nor its selection is changed
     * @return a copy of its pixels; of a colour image the luminance 0.299 R + 0.587 G + 0.114 B (ITU-R BT.601)
     * @throws IllegalArgumentException if the image has no pixels (it is being closed)
     */
    public static GrayImage of(ImagePlus image) {
        ImageProcessor pixels = image.getProcessor();
        if (pixels == null) {
            throw new IllegalArgumentException("image \"" + image.getTitle() + "\" has no pixels: it has been closed");
        }
        int width = pixels.getWidth();
        int height = pixels.getHeight();
        if (pixels instanceof ByteProcessor bytes) {
            return GrayImage.ofUnsignedBytes(width, height, (byte[]) bytes.getPixels());
        }
        if (pixels instanceof ShortProcessor shorts) {
            return GrayImage.ofUnsignedShorts(width, height, (short[]) shorts.getPixels());
        }
        if (pixels instanceof FloatProcessor floats) {
            return GrayImage.ofFloats(width, height, (float[]) floats.getPixels());
        }
        return GrayImage.ofFloats(width, height, luminance((ColorProcessor) pixels));
    }

    /**
     * What a person ought to know about how the pixels are read.
     *
     * @param image the image
     * @return a sentence with a leading space, or nothing for a single grey image
     */
    public static String note(ImagePlus image) {
        StringBuilder note = new StringBuilder();
        if (image.getType() == ImagePlus.COLOR_RGB) {
            note.append(" The colour image was read by its luminance.");
        }
        if (image.getStackSize() > 1) {
            note.append(" Slice ")
                    .append(image.getCurrentSlice())
                    .append(" of ")
                    .append(image.getStackSize())
                    .append(" was read.");
        }
        return note.toString();
    }

    private static float[] luminance(ColorProcessor colour) {
        int[] rgb = (int[]) colour.getPixels();
        float[] grey = new float[rgb.length];
        for (int i = 0; i < rgb.length; i++) {
            int p = rgb[i];
            grey[i] = 0.299f * (p >> 16 & 0xff) + 0.587f * (p >> 8 & 0xff) + 0.114f * (p & 0xff);
        }
        return grey;
    }
}
