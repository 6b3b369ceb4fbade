package io.github.zonewright.image;

/**
 * A frame covered by square groups of pixels, with two more groups beyond each edge. Takes an image down to the groups'
 * means, and draws an image from values at the groups with cubic B-splines, which smooth by a variance of 1/3 of a
 * group's side squared. Beyond the frame the image counts as zero.
 */
final class CoarseGrid {

    private static final int MARGIN = 2;

    private final int width;
    private final int height;
    private final int factor;
    private final int columns;
    private final int rows;

    CoarseGrid(int width, int height, int factor) {
        this.width = width;
        this.height = height;
        this.factor = factor;
        this.columns = (width + factor - 1) / factor + 2 * MARGIN;
        this.rows = (height + factor - 1) / factor + 2 * MARGIN;
    }

    int columns() {
        return columns;
    }

    int rows() {
        return rows;
    }

    /** The groups' means. */
    float[] binned(float[] image) {
        float[] means = new float[columns * rows];
        float[] sums = new float[width];
        float share = 1f / (factor * factor);
        for (int row = MARGIN; row < rows - MARGIN; row++) {
            int top = (row - MARGIN) * factor;
            java.util.Arrays.fill(sums, 0);
            for (int line = top; line < Math.min(height, top + factor); line++) {
                int start = line * width;
                for (int column = 0; column < width; column++) {
                    sums[column] += image[start + column];
                }
            }
            int from = 0;
            for (int column = MARGIN; column < columns - MARGIN; column++) {
                float sum = 0;
                for (int end = Math.min(width, from + factor); from < end; from++) {
                    sum += sums[from];
                }
                means[row * columns + column] = share * sum;
            }
        }
        return means;
    }

    /** An image of the frame. */
    float[] drawn(float[] values) {
        int[] firsts = new int[width];
        float[][] weights = new float[4][width];
        for (int column = 0; column < width; column++) {
            firsts[column] = spline(column, weights, column);
        }
        float[] lines = new float[rows * width];
        for (int row = 0; row < rows; row++) {
            int start = row * columns;
            for (int column = 0; column < width; column++) {
                int first = start + firsts[column];
                lines[row * width + column] = weights[0][column] * values[first]
                        + weights[1][column] * values[first + 1]
                        + weights[2][column] * values[first + 2]
                        + weights[3][column] * values[first + 3];
            }
        }
        float[] result = new float[width * height];
        float[][] down = new float[4][1];
        for (int row = 0; row < height; row++) {
            int first = spline(row, down, 0) * width;
            mix(result, row * width, lines, first, down[0][0], down[1][0], down[2][0], down[3][0]);
        }
        return result;
    }

    private void mix(float[] result, int start, float[] lines, int first, float a, float b, float c, float d) {
        for (int column = 0; column < width; column++) {
            result[start + column] = a * lines[first + column]
                    + b * lines[first + width + column]
                    + c * lines[first + 2 * width + column]
                    + d * lines[first + 3 * width + column];
        }
    }

    /** Sets the weights of the four groups about a pixel and gives the first of them. */
    private int spline(int pixel, float[][] weights, int index) {
        double place = (pixel + 0.5) / factor - 0.5;
        int before = (int) Math.floor(place);
        double f = place - before;
        double g = 1 - f;
        weights[0][index] = (float) (g * g * g / 6);
        weights[1][index] = (float) (2.0 / 3 - f * f * (2 - f) / 2);
        weights[2][index] = (float) (2.0 / 3 - g * g * (2 - g) / 2);
        weights[3][index] = (float) (f * f * f / 6);
        return before - 1 + MARGIN;
    }
}
