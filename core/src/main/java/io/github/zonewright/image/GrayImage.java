package io.github.zonewright.image;

import java.util.OptionalDouble;

/**
 * An immutable grid of grey values. A value that is NaN or infinite is a pixel without data and reads as NaN.
 *
 * <p>Pixel (i, j) is column i and row j; it covers [i, i+1) × [j, j+1), see {@link PixelPoint}.
 */
public final class GrayImage {

    private static final int MAXIMUM_PIXELS = 1 << 28;

    private final int width;
    private final int height;
    private final float[] values;
    private final OptionalDouble maximumPossible;
    private final boolean integers;
    private final boolean complete;

    private GrayImage(
            int width, int height, float[] values, OptionalDouble maximumPossible, boolean integers, boolean complete) {
        this.width = width;
        this.height = height;
        this.values = values;
        this.maximumPossible = maximumPossible;
        this.integers = integers;
        this.complete = complete;
    }

    /**
     * An image of floating-point values; nothing is known of its saturation.
     *
     * @param width number of columns, at least 1
     * @param height number of rows, at least 1
     * @param values row by row from the upper left; copied; NaN and infinities mean no data
     * @return the image
     * @throws IllegalArgumentException if the size is not positive, exceeds 2²⁸ pixels or is not the array's length
     */
    public static GrayImage ofFloats(int width, int height, float[] values) {
        checkSize(width, height, values.length);
        float[] copy = values.clone();
        boolean complete = true;
        for (int i = 0; i < copy.length; i++) {
            if (!Float.isFinite(copy[i])) {
                copy[i] = Float.NaN;
                complete = false;
            }
        }
        return new GrayImage(width, height, copy, OptionalDouble.empty(), false, complete);
    }

    /**
     * An image of 16-bit values, which saturate at 65535.
     *
     * @param width number of columns, at least 1
     * @param height number of rows, at least 1
     * @param values row by row from the upper left, read as unsigned; copied
     * @return the image
     * @throws IllegalArgumentException if the size is not positive, exceeds 2²⁸ pixels or is not the array's length
     */
    public static GrayImage ofUnsignedShorts(int width, int height, short[] values) {
        checkSize(width, height, values.length);
        float[] copy = new float[values.length];
        for (int i = 0; i < copy.length; i++) {
            copy[i] = values[i] & 0xffff;
        }
        return new GrayImage(width, height, copy, OptionalDouble.of(0xffff), true, true);
    }

    /**
     * An image of 8-bit values, which saturate at 255.
     *
     * @param width number of columns, at least 1
     * @param height number of rows, at least 1
     * @param values row by row from the upper left, read as unsigned; copied
     * @return the image
     * @throws IllegalArgumentException if the size is not positive, exceeds 2²⁸ pixels or is not the array's length
     */
    public static GrayImage ofUnsignedBytes(int width, int height, byte[] values) {
        checkSize(width, height, values.length);
        float[] copy = new float[values.length];
        for (int i = 0; i < copy.length; i++) {
            copy[i] = values[i] & 0xff;
        }
        return new GrayImage(width, height, copy, OptionalDouble.of(0xff), true, true);
    }

    /** Wraps an array that the caller gives away, without missing data. */
    static GrayImage wrap(int width, int height, float[] values) {
        return new GrayImage(width, height, values, OptionalDouble.empty(), false, true);
    }

    /** The same kind of image with other values, in an array that the caller gives away; no more of them missing. */
    GrayImage with(float[] others) {
        return new GrayImage(width, height, others, maximumPossible, integers, complete);
    }

    /** Whether no pixel is without data; false also where that is not known. */
    boolean isComplete() {
        return complete;
    }

    private static void checkSize(int width, int height, int length) {
        if (width < 1 || height < 1 || (long) width * height > MAXIMUM_PIXELS) {
            throw new IllegalArgumentException(
                    "image size " + width + " × " + height + ": expected 1 to 2^28 pixels, each side at least 1");
        }
        if (length != width * height) {
            throw new IllegalArgumentException("number of values " + length + ": expected " + width + " × " + height);
        }
    }

    /**
     * The number of columns.
     *
     * @return the width in pixels
     */
    public int width() {
        return width;
    }

    /**
     * The number of rows.
     *
     * @return the height in pixels
     */
    public int height() {
        return height;
    }

    /**
     * The value of a pixel.
     *
     * @param column from 0 at the left
     * @param row from 0 at the top
     * @return its grey value, NaN where there are no data
     * @throws IndexOutOfBoundsException if there is no such pixel
     */
    public float value(int column, int row) {
        if (column < 0 || column >= width || row < 0 || row >= height) {
            throw new IndexOutOfBoundsException(
                    "pixel (" + column + ", " + row + "): expected inside " + width + " × " + height);
        }
        return values[row * width + column];
    }

    /**
     * The value at a point, interpolated linearly between the centres of the four pixels around it and continued evenly
     * beyond the outermost centres.
     *
     * @param point a point of the frame, or near it
     * @return the grey value, NaN where there are no data
     */
    public double interpolated(PixelPoint point) {
        double x = clamped(point.x() - 0.5, width - 1);
        double y = clamped(point.y() - 0.5, height - 1);
        int column = Math.max(0, Math.min(width - 2, (int) x));
        int row = Math.max(0, Math.min(height - 2, (int) y));
        int right = Math.min(column + 1, width - 1);
        int below = Math.min(row + 1, height - 1);
        double u = x - column;
        double v = y - row;
        double upper = mix(values[row * width + column], values[row * width + right], u);
        double lower = mix(values[below * width + column], values[below * width + right], u);
        return mix(upper, lower, v);
    }

    private static double clamped(double value, int greatest) {
        return value < 0 ? 0 : value > greatest ? greatest : value;
    }

    private static double mix(double first, double second, double share) {
        return share == 0 ? first : first + share * (second - first);
    }

    /**
     * All values.
     *
     * @return a copy, row by row from the upper left
     */
    public float[] values() {
        return values.clone();
    }

    /** The array itself, for the operations of this package, which only read it. */
    float[] array() {
        return values;
    }

    /**
     * The largest value that the pixel type can hold.
     *
     * @return 255 or 65535; empty for floating-point images
     */
    public OptionalDouble maximumPossible() {
        return maximumPossible;
    }

    /**
     * Whether the pixel type holds whole numbers only.
     *
     * @return true for 8 and 16 bit images
     */
    public boolean isInteger() {
        return integers;
    }

    /**
     * Whether a point lies in the frame.
     *
     * @param point any point
     * @return true from the left and upper edge up to, but not on, the right and lower edge
     */
    public boolean contains(PixelPoint point) {
        return point.x() >= 0 && point.y() >= 0 && point.x() < width && point.y() < height;
    }

    /**
     * The extremes of the data.
     *
     * @return least and greatest value and the number of pixels with data
     */
    public ValueRange range() {
        float least = Float.POSITIVE_INFINITY;
        float greatest = Float.NEGATIVE_INFINITY;
        int count = 0;
        for (float value : values) {
            // Comparisons with NaN are false, so that what is missing counts for nothing.
            least = value < least ? value : least;
            greatest = value > greatest ? value : greatest;
            count += value == value ? 1 : 0;
        }
        return count == 0 ? new ValueRange(Float.NaN, Float.NaN, 0) : new ValueRange(least, greatest, count);
    }

    /**
     * The image with square groups of pixels put together. A group's value is the mean of its data; columns and rows left
     * over at the right and the bottom are dropped.
     *
     * @param factor pixels per side of a group, from 1 to the shorter side
     * @return the smaller image, with the same saturation level
     * @throws IllegalArgumentException if the factor is out of range
     */
    public GrayImage binned(int factor) {
        if (factor < 1 || factor > Math.min(width, height)) {
            throw new IllegalArgumentException(
                    "binning factor " + factor + ": expected 1 to " + Math.min(width, height) + ", the shorter side");
        }
        if (factor == 1) {
            return this;
        }
        int columns = width / factor;
        int rows = height / factor;
        float[] means = new float[columns * rows];
        if (complete) {
            binComplete(factor, columns, rows, means);
            return new GrayImage(columns, rows, means, maximumPossible, false, true);
        }
        for (int row = 0; row < rows; row++) {
            for (int column = 0; column < columns; column++) {
                means[row * columns + column] = meanOf(column * factor, row * factor, factor);
            }
        }
        return new GrayImage(columns, rows, means, maximumPossible, false, false);
    }

    /**
     * The image with no data in some of its pixels.
     *
     * @param pixels the pixels to leave out
     * @return this image if there are none to leave out, else a copy
     * @throws IllegalArgumentException if the mask is of another size
     */
    public GrayImage without(Mask pixels) {
        if (pixels.width() != width || pixels.height() != height) {
            throw new IllegalArgumentException("mask size " + pixels.width() + " × " + pixels.height() + ": expected "
                    + width + " × " + height + ", as the image");
        }
        if (pixels.count() == 0) {
            return this;
        }
        float[] rest = values.clone();
        for (int i = 0; i < rest.length; i++) {
            rest[i] = pixels.contains(i % width, i / width) ? Float.NaN : rest[i];
        }
        return new GrayImage(width, height, rest, maximumPossible, integers, false);
    }

    /**
     * The negative of the image, for scans on which the spots are dark. A value v becomes m − v, where m is the greatest
     * value of the pixel type, or for floating-point images the sum of the extremes.
     *
     * @return the inverted image; pixels without data stay so
     */
    public GrayImage inverted() {
        ValueRange range = range();
        float top =
                maximumPossible.isPresent() ? (float) maximumPossible.getAsDouble() : range.minimum() + range.maximum();
        float[] result = new float[values.length];
        for (int i = 0; i < result.length; i++) {
            result[i] = top - values[i];
        }
        return with(result);
    }

    private void binComplete(int factor, int columns, int rows, float[] means) {
        double[] sums = new double[width];
        double share = 1.0 / (factor * factor);
        for (int row = 0; row < rows; row++) {
            java.util.Arrays.fill(sums, 0);
            for (int line = row * factor; line < (row + 1) * factor; line++) {
                int start = line * width;
                for (int column = 0; column < width; column++) {
                    sums[column] += values[start + column];
                }
            }
            int from = 0;
            for (int column = 0; column < columns; column++) {
                double sum = 0;
                for (int end = from + factor; from < end; from++) {
                    sum += sums[from];
                }
                means[row * columns + column] = (float) (sum * share);
            }
        }
    }

    private float meanOf(int left, int top, int size) {
        double sum = 0;
        int count = 0;
        for (int row = top; row < top + size; row++) {
            for (int i = row * width + left; i < row * width + left + size; i++) {
                if (!Float.isNaN(values[i])) {
                    sum += values[i];
                    count++;
                }
            }
        }
        return count == 0 ? Float.NaN : (float) (sum / count);
    }
}
