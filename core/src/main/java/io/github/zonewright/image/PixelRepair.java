package io.github.zonewright.image;

import java.util.Arrays;
import java.util.BitSet;

/**
 * Finds pixels that tell nothing of the pattern: without data, hot, or on a dead row or column, and puts a likely
 * value in their place.
 *
 * <p>A line is dead when its mean is more than 10 robust deviations off the running median of nine lines, and the
 * median of its differences to the lines four away is sure and of the same sign. A pixel is hot when it stands more than 6 deviations above the
 * background while its neighbours, the brightest left out, reach less than 0.15 of that on average: a Gaussian spot of
 * σ = 0.7 px still reaches 0.26. Known limits: hot clusters of more than two pixels, and faulty lines next to each
 * other in groups of more than four, are taken for data.
 *
 * @param image the image with the pixels mended; those that cannot be remain without data
 * @param faulty the pixels that were mended or have no data
 * @param background the image's background, in cells of {@value #CELL} pixels
 * @param flat the mended image less that background, zero where there are no data
 */
public record PixelRepair(GrayImage image, Mask faulty, Background background, GrayImage flat) {

    private static final int LINES = 9;
    private static final double DEAD = 10;
    private static final float HOT = 6;
    private static final double LONELY = 0.15;
    private static final int CELL = 24;
    /** Guards against lines that are all alike. */
    private static final double LEAST_SPREAD = 1e-6;

    /**
     * Mends an image.
     *
     * @param image the image, left as it is
     * @return the mended copy and what was mended
     */
    public static PixelRepair of(GrayImage image) {
        int width = image.width();
        int height = image.height();
        float[] values = image.values();
        BitSet faulty = new BitSet();
        for (int i = 0; i < values.length && !image.isComplete(); i++) {
            if (Float.isNaN(values[i])) {
                faulty.set(i);
            }
        }
        double[] rows = new double[height];
        double[] columns = new double[width];
        addUp(values, rows, columns);
        if (mendLines(values, faulty, rows, width, width, 1)) {
            Arrays.fill(columns, 0);
            addUp(values, rows, columns);
        }
        mendLines(values, faulty, columns, height, 1, width);
        GrayImage straight = image.with(values);
        Background background = Background.rough(straight, CELL, Mask.none(width, height));
        GrayImage flat = background.level().subtractedFrom(straight);
        mendHotPixels(values, flat, background.noise(), faulty);
        return new PixelRepair(straight, new Mask(width, height, faulty), background, flat);
    }

    private static void addUp(float[] values, double[] rows, double[] columns) {
        int i = 0;
        for (int row = 0; row < rows.length; row++) {
            double even = 0;
            double odd = 0;
            for (int column = 0; column < columns.length; column++) {
                float value = values[i++];
                value = value == value ? value : 0;
                columns[column] += value;
                even += (column & 1) == 0 ? value : 0;
                odd += (column & 1) == 0 ? 0 : value;
            }
            rows[row] = even + odd;
        }
    }

    /** Lines start at multiples of {@code stride}; {@code step} leads along one. Tells whether any was dead. */
    private static boolean mendLines(float[] values, BitSet faulty, double[] sums, int length, int stride, int step) {
        int lines = sums.length;
        if (lines < LINES || length < LINES) {
            return false;
        }
        double[] offsets = new double[lines];
        double[] sizes = new double[lines];
        for (int line = 0; line < lines; line++) {
            int from = Math.max(0, Math.min(lines - LINES, line - LINES / 2));
            double[] around = Arrays.copyOfRange(sums, from, from + LINES);
            Arrays.sort(around);
            offsets[line] = sums[line] - around[LINES / 2];
            sizes[line] = Math.abs(offsets[line]);
        }
        Arrays.sort(sizes);
        double limit = DEAD * sizes[2 * lines / 3];
        boolean[] dead = new boolean[lines];
        boolean any = false;
        for (int line = 0; line < lines; line++) {
            dead[line] = Math.abs(offsets[line]) > limit
                    && offsets[line] != 0
                    && stepAgrees(values, line, lines, length, stride, step, offsets[line]);
            any |= dead[line];
        }
        for (int line = 0; line < lines; line++) {
            if (dead[line]) {
                bridge(values, faulty, dead, line, length, stride, step);
            }
        }
        return any;
    }

    /** Whether the median difference to the lines four away is sure and of the sign of the mean's offset. */
    private static boolean stepAgrees(
            float[] values, int line, int lines, int length, int stride, int step, double offset) {
        int before = line >= 4 ? line - 4 : line + 4;
        int after = line + 4 < lines ? line + 4 : line - 4;
        float[] differences = new float[length];
        int count = 0;
        for (int i = 0; i < length; i++) {
            int at = i * step;
            float difference =
                    values[line * stride + at] - 0.5f * (values[before * stride + at] + values[after * stride + at]);
            if (difference == difference) {
                differences[count++] = difference;
            }
        }
        if (count == 0) {
            return false;
        }
        double median = Quantile.select(differences, 0, count, count / 2);
        double lower = Quantile.select(differences, 0, count / 2 + 1, count / 4);
        double upper = Quantile.select(differences, count / 2, count, 3 * count / 4);
        double spread = Math.max((upper - lower) / 1.349, LEAST_SPREAD);
        double errorOfMedian = 1.2533 * spread / Math.sqrt(count);
        return Math.abs(median) > DEAD * errorOfMedian && Math.signum(median) == Math.signum(offset);
    }

    private static void bridge(
            float[] values, BitSet faulty, boolean[] dead, int line, int length, int stride, int step) {
        int before = line - 1;
        while (before >= 0 && dead[before]) {
            before--;
        }
        int after = line + 1;
        while (after < dead.length && dead[after]) {
            after++;
        }
        for (int i = 0; i < length; i++) {
            float lower = before >= 0 ? values[before * stride + i * step] : Float.NaN;
            float upper = after < dead.length ? values[after * stride + i * step] : Float.NaN;
            float share = (line - before) / (float) (after - before);
            float value = Float.isNaN(lower) ? upper : Float.isNaN(upper) ? lower : lower + share * (upper - lower);
            values[line * stride + i * step] = value;
            faulty.set(line * stride + i * step);
        }
    }

    /** Mends hot pixels in the values and in {@code flat}, the image less its background. */
    private static void mendHotPixels(float[] values, GrayImage flat, LevelMap noise, BitSet faulty) {
        int width = flat.width();
        int height = flat.height();
        if (width < 3 || height < 3) {
            return;
        }
        float[] above = flat.array();
        double[] around = new double[8];
        BitSet hot = new BitSet();
        float[] limits = new float[width];
        for (int row = 0; row < height; row++) {
            if (row % CELL == 0) {
                for (int column = 0; column < width; column++) {
                    limits[column] = HOT
                            * (float) noise.level(
                                    Math.min(column / CELL, noise.columns() - 1),
                                    Math.min(row / CELL, noise.rows() - 1));
                }
            }
            for (int column = 0; column < width; column++) {
                int index = row * width + column;
                if (above[index] > limits[column] && !faulty.get(index)) {
                    int count = neighbours(above, width, height, column, row, around);
                    if (isLonely(above[index], around, count)
                            && above[index] - median(around, count) > limits[column]) {
                        hot.set(index);
                    }
                }
            }
        }
        for (int index = hot.nextSetBit(0); index >= 0; index = hot.nextSetBit(index + 1)) {
            int count = neighbours(above, width, height, index % width, index / width, around);
            float median = (float) median(around, count);
            values[index] -= above[index] - median;
            above[index] = median;
        }
        faulty.or(hot);
    }

    private static boolean isLonely(double value, double[] around, int count) {
        double sum = 0;
        double brightest = around[0];
        for (int i = 0; i < count; i++) {
            sum += around[i];
            brightest = Math.max(brightest, around[i]);
        }
        return sum - brightest < (count - 1) * LONELY * value;
    }

    private static double median(double[] values, int count) {
        Arrays.sort(values, 0, count);
        return values[count / 2];
    }

    private static int neighbours(float[] values, int width, int height, int column, int row, double[] around) {
        int at = row * width + column;
        if (column > 0 && row > 0 && column < width - 1 && row < height - 1) {
            around[0] = values[at - width - 1];
            around[1] = values[at - width];
            around[2] = values[at - width + 1];
            around[3] = values[at - 1];
            around[4] = values[at + 1];
            around[5] = values[at + width - 1];
            around[6] = values[at + width];
            around[7] = values[at + width + 1];
            return 8;
        }
        int count = 0;
        for (int r = Math.max(0, row - 1); r <= Math.min(height - 1, row + 1); r++) {
            for (int c = Math.max(0, column - 1); c <= Math.min(width - 1, column + 1); c++) {
                if (r != row || c != column) {
                    around[count++] = values[r * width + c];
                }
            }
        }
        return count;
    }
}
