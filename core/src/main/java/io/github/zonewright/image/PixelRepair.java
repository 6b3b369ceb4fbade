package io.github.zonewright.image;

import java.util.Arrays;

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
 */
public record PixelRepair(GrayImage image, Mask faulty) {

    private static final int LINES = 9;
    private static final double DEAD = 10;
    private static final double HOT = 6;
    private static final double LONELY = 0.15;
    private static final int CELL = 32;
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
        boolean[] faulty = new boolean[values.length];
        for (int i = 0; i < values.length; i++) {
            faulty[i] = Float.isNaN(values[i]);
        }
        mendLines(values, faulty, height, width, width, 1);
        mendLines(values, faulty, width, height, 1, width);
        GrayImage straight = GrayImage.wrap(width, height, values);
        mendHotPixels(straight, faulty);
        return new PixelRepair(straight, Mask.of(width, height, i -> faulty[i]));
    }

    /** Lines start at multiples of {@code stride}; {@code step} leads along one. */
    private static void mendLines(float[] values, boolean[] faulty, int lines, int length, int stride, int step) {
        if (lines < LINES || length < LINES) {
            return;
        }
        double[] means = new double[lines];
        if (step == 1) {
            for (int line = 0; line < lines; line++) {
                means[line] = sum(values, line * stride, length) / length;
            }
        } else {
            for (int i = 0; i < length; i++) {
                for (int line = 0; line < lines; line++) {
                    float value = values[i * step + line];
                    means[line] += value == value ? value / length : 0;
                }
            }
        }
        double[] offsets = new double[lines];
        double[] sizes = new double[lines];
        for (int line = 0; line < lines; line++) {
            int from = Math.max(0, Math.min(lines - LINES, line - LINES / 2));
            double[] around = Arrays.copyOfRange(means, from, from + LINES);
            Arrays.sort(around);
            offsets[line] = means[line] - around[LINES / 2];
            sizes[line] = Math.abs(offsets[line]);
        }
        Arrays.sort(sizes);
        double limit = DEAD * sizes[2 * lines / 3];
        boolean[] dead = new boolean[lines];
        for (int line = 0; line < lines; line++) {
            dead[line] = Math.abs(offsets[line]) > limit
                    && offsets[line] != 0
                    && stepAgrees(values, line, lines, length, stride, step, offsets[line]);
        }
        for (int line = 0; line < lines; line++) {
            if (dead[line]) {
                bridge(values, faulty, dead, line, length, stride, step);
            }
        }
    }

    private static double sum(float[] values, int start, int length) {
        double sum = 0;
        for (int i = start; i < start + length; i++) {
            sum += values[i] == values[i] ? values[i] : 0;
        }
        return sum;
    }

    /** Whether the median difference to the lines four away is sure and of the sign of the mean's offset. */
    private static boolean stepAgrees(
            float[] values, int line, int lines, int length, int stride, int step, double offset) {
        int before = line >= 4 ? line - 4 : line + 4;
        int after = line + 4 < lines ? line + 4 : line - 4;
        double[] differences = new double[length];
        int count = 0;
        for (int i = 0; i < length; i++) {
            int at = i * step;
            double difference =
                    values[line * stride + at] - 0.5 * (values[before * stride + at] + values[after * stride + at]);
            if (!Double.isNaN(difference)) {
                differences[count++] = difference;
            }
        }
        if (count == 0) {
            return false;
        }
        Arrays.sort(differences, 0, count);
        double median = differences[count / 2];
        double spread = Math.max((differences[3 * count / 4] - differences[count / 4]) / 1.349, LEAST_SPREAD);
        double errorOfMedian = 1.2533 * spread / Math.sqrt(count);
        return Math.abs(median) > DEAD * errorOfMedian && Math.signum(median) == Math.signum(offset);
    }

    private static void bridge(
            float[] values, boolean[] faulty, boolean[] dead, int line, int length, int stride, int step) {
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
            faulty[line * stride + i * step] = true;
        }
    }

    private static void mendHotPixels(GrayImage image, boolean[] faulty) {
        int width = image.width();
        int height = image.height();
        if (width < 3 || height < 3) {
            return;
        }
        Background background = Background.of(image, CELL, Mask.none(width, height));
        float[] above = background.level().subtractedFrom(image).array();
        float[] values = image.array();
        double[] around = new double[8];
        for (int row = 0; row < height; row++) {
            for (int column = 0; column < width; column++) {
                int index = row * width + column;
                double noise = background
                        .noise()
                        .level(
                                Math.min(column / CELL, background.noise().columns() - 1),
                                Math.min(row / CELL, background.noise().rows() - 1));
                if (above[index] > HOT * noise && !faulty[index]) {
                    int count = neighbours(above, width, height, column, row, around);
                    Arrays.sort(around, 0, count);
                    double rest = 0;
                    for (int i = 0; i < count - 1; i++) {
                        rest += around[i] / (count - 1);
                    }
                    double median = around[count / 2];
                    if (rest < LONELY * above[index] && above[index] - median > HOT * noise) {
                        faulty[index] = true;
                        values[index] -= (float) (above[index] - median);
                    }
                }
            }
        }
    }

    private static int neighbours(float[] values, int width, int height, int column, int row, double[] around) {
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
