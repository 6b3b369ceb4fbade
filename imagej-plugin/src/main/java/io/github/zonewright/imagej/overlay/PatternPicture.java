package io.github.zonewright.imagej.overlay;

import ij.ImagePlus;
import ij.gui.Overlay;
import ij.process.ColorProcessor;
import ij.process.ImageProcessor;
import java.awt.image.BufferedImage;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import javax.imageio.ImageIO;

/** A picture of an image with a view drawn over it, for print: the image as it is displayed now, at a size that prints well. */
public final class PatternPicture {
    private static final int SMALLEST = 700;
    private static final int LARGEST = 1200;

    /** Marks and letters are twice as large as on a screen, since a picture of this size prints at some 250 px to the inch. */
    private static final double ZOOM = 0.5;

    private PatternPicture() {}

    /**
     * Draws the picture.
     *
     * @param image the image; read for the pixels, display range and look-up table of its current slice, not changed
     * @param view what to draw over it
     * @return the bytes of a PNG file, 700 to 1200 px along the longer side
     * @throws IllegalArgumentException if the image has no pixels (it is being closed)
     */
    public static byte[] png(ImagePlus image, PatternView view) {
        ImageProcessor pixels = image.getProcessor();
        if (pixels == null) {
            throw new IllegalArgumentException("image \"" + image.getTitle() + "\" has no pixels: it has been closed");
        }
        int side = Math.max(image.getWidth(), image.getHeight());
        double scale = Math.max(SMALLEST, Math.min(LARGEST, side)) / (double) side;
        int width = Math.max(1, (int) Math.round(scale * image.getWidth()));
        int height = Math.max(1, (int) Math.round(scale * image.getHeight()));
        ImageProcessor shown = new ColorProcessor(pixels.createImage());
        shown.setInterpolationMethod(ImageProcessor.BILINEAR);
        ImagePlus copy = new ImagePlus("", scale == 1 ? shown : shown.resize(width, height, true));
        Overlay overlay = new Overlay();
        Marks.of(view.scaled(scale), width, height, ZOOM).forEach(overlay::add);
        copy.setOverlay(overlay);
        return encode(copy.flatten().getBufferedImage());
    }

    private static byte[] encode(BufferedImage picture) {
        try {
            ByteArrayOutputStream bytes = new ByteArrayOutputStream();
            ImageIO.write(picture, "png", bytes);
            return bytes.toByteArray();
        } catch (IOException e) {
            throw new IllegalStateException("a picture in memory can't be written", e);
        }
    }
}
