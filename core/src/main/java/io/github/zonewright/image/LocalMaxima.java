package io.github.zonewright.image;

import java.util.Arrays;

/** Finds the pixels that are greater than all eight around them. */
public final class LocalMaxima {

    private LocalMaxima() {}

    /**
     * The local maxima that may stand above a level: all that do, and others that stand above the least level near them. Of
     * neighbours of one value the first in reading order is the maximum.
     *
     * @param image the image
     * @param level a map of the same frame
     * @param factor what the level is multiplied by
     * @return index = row · width + column of each, the highest first, of equally high ones in reading order
     */
    public static int[] above(GrayImage image, LevelMap level, double factor) {
        int width = image.width();
        int height = image.height();
        float[] values = image.array();
        int[] found = new int[256];
        int count = 0;
        for (int cellRow = 0; cellRow < level.rows(); cellRow++) {
            int top = (int) (cellRow * level.cell());
            int bottom = cellRow == level.rows() - 1 ? height : (int) ((cellRow + 1) * level.cell());
            for (int cell = 0; cell < level.columns(); cell++) {
                int left = (int) (cell * level.cell());
                int right = cell == level.columns() - 1 ? width : (int) ((cell + 1) * level.cell());
                float threshold = (float) (factor * level.leastAround(cell, cellRow));
                for (int row = top; row < bottom; row++) {
                    for (int i = row * width + left; i < row * width + right; i++) {
                        if (values[i] >= threshold && isMaximum(values, width, height, i, row)) {
                            found = count == found.length ? Arrays.copyOf(found, 2 * count) : found;
                            found[count++] = i;
                        }
                    }
                }
            }
        }
        return highestFirst(values, found, count);
    }

    private static int[] highestFirst(float[] values, int[] found, int count) {
        long[] keys = new long[count];
        for (int i = 0; i < count; i++) {
            int bits = Float.floatToIntBits(values[found[i]]);
            int rising = bits < 0 ? ~bits : bits | Integer.MIN_VALUE;
            keys[i] = (~rising & 0xffff_ffffL) << 31 | found[i];
        }
        Arrays.sort(keys);
        int[] sorted = new int[count];
        for (int i = 0; i < count; i++) {
            sorted[i] = (int) keys[i] & Integer.MAX_VALUE;
        }
        return sorted;
    }

    /**
     * Whether a pixel is a local maximum.
     *
     * @param image the image
     * @param column from 0 at the left, within the image
     * @param row from 0 at the top, within the image
     * @return true if none of those around it is greater, and none before it in reading order is as great
     */
    public static boolean isAt(GrayImage image, int column, int row) {
        return isMaximum(image.array(), image.width(), image.height(), row * image.width() + column, row);
    }

    private static boolean isMaximum(float[] values, int width, int height, int index, int row) {
        int column = index - row * width;
        float value = values[index];
        if (column == 0 || row == 0 || column == width - 1 || row == height - 1) {
            return isMaximumAtEdge(values, width, height, column, row);
        }
        int above = index - width;
        int below = index + width;
        return values[index - 1] < value
                && values[index + 1] <= value
                && values[above] < value
                && values[below] <= value
                && values[above - 1] < value
                && values[above + 1] < value
                && values[below - 1] <= value
                && values[below + 1] <= value;
    }

    private static boolean isMaximumAtEdge(float[] values, int width, int height, int column, int row) {
        float value = values[row * width + column];
        for (int r = Math.max(0, row - 1); r <= Math.min(height - 1, row + 1); r++) {
            for (int c = Math.max(0, column - 1); c <= Math.min(width - 1, column + 1); c++) {
                float other = values[r * width + c];
                boolean before = r < row || r == row && c < column;
                if (before ? other >= value : other > value) {
                    return false;
                }
            }
        }
        return true;
    }
}
