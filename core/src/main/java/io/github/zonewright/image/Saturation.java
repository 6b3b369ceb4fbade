package io.github.zonewright.image;

import java.util.OptionalDouble;

/**
 * Finds the level at which a detector stopped counting. It is the greatest value of the image when that is the greatest
 * the pixel type holds, or when the image has a plateau of it: at least {@value #PLATEAU} pixels with a neighbour of
 * the same value, and well above the rest.
 */
public final class Saturation {

    private static final int PLATEAU = 5;
    private static final double SMALLEST = 30;
    private static final double LARGEST_SHARE = 0.3;

    private Saturation() {}

    /**
     * The saturation level of an image.
     *
     * @param image the image as it came, neither binned nor scaled
     * @return the value that saturated pixels have; empty when none is saturated
     */
    public static OptionalDouble level(GrayImage image) {
        ValueRange range = image.range();
        if (range.count() == 0 || range.minimum() == range.maximum()) {
            return OptionalDouble.empty();
        }
        float greatest = range.maximum();
        if (image.maximumPossible().isPresent()
                && greatest == image.maximumPossible().getAsDouble()) {
            return OptionalDouble.of(greatest);
        }
        if (image.isInteger() && greatest < SMALLEST) {
            return OptionalDouble.empty();
        }
        float[] values = image.array();
        int touching = 0;
        int count = 0;
        for (int i = 0; i < values.length; i++) {
            if (values[i] == greatest) {
                count++;
                touching += isTouching(values, image.width(), i) ? 1 : 0;
            }
        }
        boolean plateau = touching >= PLATEAU && count < LARGEST_SHARE * range.count();
        return plateau ? OptionalDouble.of(greatest) : OptionalDouble.empty();
    }

    private static boolean isTouching(float[] values, int width, int i) {
        float value = values[i];
        return i % width > 0 && values[i - 1] == value
                || i % width < width - 1 && values[i + 1] == value
                || i >= width && values[i - width] == value
                || i + width < values.length && values[i + width] == value;
    }
}
