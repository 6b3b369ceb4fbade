package io.github.zonewright.imagej.bridge;

import ij.ImagePlus;
import ij.process.ImageProcessor;
import java.awt.image.IndexColorModel;
import java.util.Arrays;

/**
 * How ImageJ shows grey values: the range that its look-up table covers, and the table.
 *
 * @param table the look-up table of 256 colours
 * @param min the grey value of its first colour
 * @param max the grey value of its last colour
 */
public record DisplayCurve(IndexColorModel table, double min, double max) {
    private static final int COLOURS = 256;

    /** The logarithm spans this ratio from the dark to the bright end. */
    private static final double SPAN = 100;

    /** Parts of the pixels that are shown darkest and brightest. */
    private static final double DARKEST = 0.02;

    private static final double BRIGHTEST = 0.9995;
    private static final int MOST_SAMPLES = 200_000;

    /**
     * That of an image's current slice.
     *
     * @param image an image of grey values
     * @return its table and range
     */
    public static DisplayCurve of(ImagePlus image) {
        ImageProcessor pixels = image.getProcessor();
        return new DisplayCurve((IndexColorModel) pixels.getColorModel(), pixels.getMin(), pixels.getMax());
    }

    /**
     * The logarithm of the grey values above the ground of an image, over a range that fits it.
     *
     * @param image the image
     * @return the same colours, taken logarithmically
     */
    public DisplayCurve logarithmic(ImagePlus image) {
        float[] values = samples(image.getProcessor());
        double low = values[(int) (DARKEST * (values.length - 1))];
        double high = values[(int) (BRIGHTEST * (values.length - 1))];
        int[] order = new int[COLOURS];
        for (int i = 0; i < COLOURS; i++) {
            double part = i / (COLOURS - 1.0);
            order[i] = (int) Math.round((COLOURS - 1) * Math.log1p((SPAN - 1) * part) / Math.log(SPAN));
        }
        return new DisplayCurve(ordered(order), low, high > low ? high : low + 1);
    }

    /**
     * The last colour for the first, and so on.
     *
     * @return the inverted curve over the same range
     */
    public DisplayCurve inverted() {
        int[] order = new int[COLOURS];
        for (int i = 0; i < COLOURS; i++) {
            order[i] = COLOURS - 1 - i;
        }
        return new DisplayCurve(ordered(order), min, max);
    }

    /**
     * Shows an image with this curve; no pixel changes.
     *
     * @param image the image
     */
    public void put(ImagePlus image) {
        ImageProcessor pixels = image.getProcessor();
        pixels.setColorModel(table);
        pixels.setMinAndMax(min, max);
        image.updateAndDraw();
    }

    /**
     * Whether an image is shown with this table.
     *
     * @param image the image
     * @return false when another has been chosen since; another range does not matter
     */
    public boolean isIn(ImagePlus image) {
        return image.getProcessor().getColorModel() instanceof IndexColorModel there
                && Arrays.equals(colours(there), colours(table));
    }

    private IndexColorModel ordered(int[] order) {
        byte[][] channels = new byte[3][COLOURS];
        byte[][] own = new byte[3][Math.max(COLOURS, table.getMapSize())];
        table.getReds(own[0]);
        table.getGreens(own[1]);
        table.getBlues(own[2]);
        for (int channel = 0; channel < 3; channel++) {
            for (int i = 0; i < COLOURS; i++) {
                channels[channel][i] = own[channel][order[i]];
            }
        }
        return new IndexColorModel(8, COLOURS, channels[0], channels[1], channels[2]);
    }

    private static int[] colours(IndexColorModel model) {
        int[] colours = new int[model.getMapSize()];
        model.getRGBs(colours);
        return colours;
    }

    private static float[] samples(ImageProcessor pixels) {
        int count = pixels.getPixelCount();
        int step = Math.max(1, count / MOST_SAMPLES);
        float[] values = new float[(count + step - 1) / step];
        int n = 0;
        for (int i = 0; i < count; i += step) {
            float value = pixels.getf(i);
            if (Float.isFinite(value)) {
                values[n++] = value;
            }
        }
        float[] finite = n == 0 ? new float[] {0} : Arrays.copyOf(values, n);
        Arrays.sort(finite);
        return finite;
    }
}
