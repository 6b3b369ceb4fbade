package io.github.zonewright.imagej.bridge;

import ij.ImagePlus;
import ij.process.ByteProcessor;
import ij.process.ColorProcessor;
import ij.process.FloatProcessor;
import ij.process.ImageProcessor;
import ij.process.ShortProcessor;
import io.github.zonewright.document.ImageReference;
import io.github.zonewright.image.GrayImage;
import java.nio.ByteBuffer;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.HexFormat;

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

    /**
     * What a record says of an image: its title as file name, its size and the digest of the current slice.
     *
     * @param image the image
     * @return the reference; characters that no file name has are replaced
     * @throws IllegalArgumentException if the image has no pixels (it is being closed)
     */
    public static ImageReference reference(ImagePlus image) {
        ImageProcessor pixels = image.getProcessor();
        if (pixels == null) {
            throw new IllegalArgumentException("image \"" + image.getTitle() + "\" has no pixels: it has been closed");
        }
        return named(image).withSha256(HexFormat.of().formatHex(digest(pixels)));
    }

    /**
     * The same without the digest.
     *
     * @param image the image
     * @return the reference; characters that no file name has are replaced
     */
    public static ImageReference named(ImagePlus image) {
        String name = image.getTitle().replaceAll("[/\\\\\\p{Cntrl}]", "_").strip();
        return ImageReference.of(name.isEmpty() ? "untitled" : name, image.getWidth(), image.getHeight());
    }

    /** The pixels as stored, row by row, most significant byte first. */
    private static byte[] digest(ImageProcessor pixels) {
        int bytesPerPixel = pixels instanceof ByteProcessor ? 1 : pixels instanceof ShortProcessor ? 2 : 4;
        ByteBuffer bytes = ByteBuffer.allocate(pixels.getPixelCount() * bytesPerPixel);
        if (pixels instanceof ByteProcessor) {
            bytes.put((byte[]) pixels.getPixels());
        } else if (pixels instanceof ShortProcessor) {
            bytes.asShortBuffer().put((short[]) pixels.getPixels());
        } else if (pixels instanceof FloatProcessor) {
            bytes.asFloatBuffer().put((float[]) pixels.getPixels());
        } else {
            bytes.asIntBuffer().put((int[]) pixels.getPixels());
        }
        return sha256(bytes.array());
    }

    private static byte[] sha256(byte[] bytes) {
        try {
            return MessageDigest.getInstance("SHA-256").digest(bytes);
        } catch (NoSuchAlgorithmException e) {
            throw new IllegalStateException("SHA-256 is missing from this Java", e);
        }
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
