package io.github.zonewright.image;

import java.util.Arrays;

/**
 * A slowly varying quantity of an image, known at the centres of a grid of square cells and interpolated linearly
 * between them.
 */
public final class LevelMap {

    private final int width;
    private final int height;
    private final double cell;
    private final int columns;
    private final int rows;
    private final double[] levels;

    LevelMap(int width, int height, double cell, int columns, int rows, double[] levels) {
        this.width = width;
        this.height = height;
        this.cell = cell;
        this.columns = columns;
        this.rows = rows;
        this.levels = filled(levels, columns, rows);
    }

    /**
     * The side of a cell.
     *
     * @return in pixels
     */
    public double cell() {
        return cell;
    }

    /**
     * The number of cells across.
     *
     * @return columns of cells
     */
    public int columns() {
        return columns;
    }

    /**
     * The number of cells down.
     *
     * @return rows of cells
     */
    public int rows() {
        return rows;
    }

    /**
     * The level of one cell.
     *
     * @param column from 0 at the left
     * @param row from 0 at the top
     * @return its level
     */
    public double level(int column, int row) {
        return levels[row * columns + column];
    }

    /**
     * The level at a point.
     *
     * @param x in pixels from the left edge
     * @param y in pixels from the upper edge
     * @return interpolated between the cells' centres, continued evenly beyond the outermost
     */
    public double at(double x, double y) {
        double u = Math.max(0, Math.min(columns - 1.0, x / cell - 0.5));
        double v = Math.max(0, Math.min(rows - 1.0, y / cell - 0.5));
        int column = Math.min((int) u, Math.max(0, columns - 2));
        int row = Math.min((int) v, Math.max(0, rows - 2));
        int right = Math.min(column + 1, columns - 1);
        int below = Math.min(row + 1, rows - 1);
        u -= column;
        v -= row;
        return (1 - v) * ((1 - u) * level(column, row) + u * level(right, row))
                + v * ((1 - u) * level(column, below) + u * level(right, below));
    }

    /**
     * The least level of a cell and those around it, below which the map does not go anywhere in the cell.
     *
     * @param column from 0 at the left
     * @param row from 0 at the top
     * @return the least of up to nine levels
     */
    public double leastAround(int column, int row) {
        double least = Double.POSITIVE_INFINITY;
        for (int r = Math.max(0, row - 1); r <= Math.min(rows - 1, row + 1); r++) {
            for (int c = Math.max(0, column - 1); c <= Math.min(columns - 1, column + 1); c++) {
                least = Math.min(least, level(c, r));
            }
        }
        return least;
    }

    /**
     * How far the map falls below another.
     *
     * @param other another map of the same frame, above zero; its cells may differ
     * @return the least ratio of this level to the other one at the centres of the cells
     */
    public double leastRatioTo(LevelMap other) {
        double least = Double.POSITIVE_INFINITY;
        for (int row = 0; row < rows; row++) {
            for (int column = 0; column < columns; column++) {
                least = Math.min(least, level(column, row) / other.at((column + 0.5) * cell, (row + 0.5) * cell));
            }
        }
        return least;
    }

    /**
     * Each cell replaced by the median of itself and its neighbours.
     *
     * @return the smoother map
     */
    public LevelMap smoothed() {
        double[] smooth = new double[levels.length];
        double[] around = new double[9];
        for (int row = 0; row < rows; row++) {
            for (int column = 0; column < columns; column++) {
                int count = 0;
                for (int r = Math.max(0, row - 1); r <= Math.min(rows - 1, row + 1); r++) {
                    for (int c = Math.max(0, column - 1); c <= Math.min(columns - 1, column + 1); c++) {
                        around[count++] = level(c, r);
                    }
                }
                smooth[row * columns + column] = median(around, count);
            }
        }
        return new LevelMap(width, height, cell, columns, rows, smooth);
    }

    /** The median of the first few values, which are put in order; so few that inserting one by one is the fastest. */
    private static double median(double[] values, int count) {
        for (int i = 1; i < count; i++) {
            double value = values[i];
            int place = i;
            for (; place > 0 && values[place - 1] > value; place--) {
                values[place] = values[place - 1];
            }
            values[place] = value;
        }
        return (values[(count - 1) / 2] + values[count / 2]) / 2;
    }

    /**
     * Raises every level to a minimum.
     *
     * @param minimum the least level of the new map
     * @return the greater of both, cell by cell
     */
    public LevelMap atLeast(double minimum) {
        return each((column, row, level) -> Math.max(level, minimum));
    }

    /**
     * Lowers every level to that of another map.
     *
     * @param other another map of the same frame; its cells may differ
     * @return the lesser of both, cell by cell
     */
    public LevelMap atMost(LevelMap other) {
        return each((column, row, level) -> Math.min(level, other.at((column + 0.5) * cell, (row + 0.5) * cell)));
    }

    /**
     * Raises every level to that of another map.
     *
     * @param other another map of the same frame; its cells may differ
     * @return the greater of both, cell by cell
     */
    public LevelMap atLeast(LevelMap other) {
        return each((column, row, level) -> Math.max(level, other.at((column + 0.5) * cell, (row + 0.5) * cell)));
    }

    /**
     * Multiplies every level.
     *
     * @param factor the factor
     * @return the scaled map
     */
    public LevelMap times(double factor) {
        return each((column, row, level) -> level * factor);
    }

    /**
     * The map of the binned image.
     *
     * @param factor pixels per side of a group, at least 1
     * @return the same levels on cells that many times smaller
     */
    public LevelMap shrunk(int factor) {
        return new LevelMap(width / factor, height / factor, cell / factor, columns, rows, levels);
    }

    private interface Change {
        double of(int column, int row, double level);
    }

    private LevelMap each(Change change) {
        double[] changed = new double[levels.length];
        for (int i = 0; i < levels.length; i++) {
            changed[i] = change.of(i % columns, i / columns, levels[i]);
        }
        return new LevelMap(width, height, cell, columns, rows, changed);
    }

    /**
     * Takes the map away from an image of its frame.
     *
     * @param image the image, left as it is
     * @return image minus level, zero where the image has no data
     */
    public GrayImage subtractedFrom(GrayImage image) {
        float[] source = image.array();
        float[] result = new float[source.length];
        float[] upper = new float[width];
        float[] lower = new float[width];
        int drawn = -1;
        for (int row = 0; row < height; row++) {
            double v = Math.max(0, Math.min(rows - 1.0, (row + 0.5) / cell - 0.5));
            int above = Math.min((int) v, Math.max(0, rows - 2));
            if (above != drawn) {
                drawLine(above, upper);
                drawLine(Math.min(above + 1, rows - 1), lower);
                drawn = above;
            }
            float share = (float) (v - above);
            int start = row * width;
            for (int column = 0; column < width; column++) {
                result[start + column] =
                        source[start + column] - (upper[column] + share * (lower[column] - upper[column]));
            }
        }
        if (!image.isComplete()) {
            for (int i = 0; i < result.length; i++) {
                result[i] = result[i] == result[i] ? result[i] : 0;
            }
        }
        return GrayImage.wrap(width, height, result);
    }

    /** The levels along the middle of a row of cells, pixel by pixel. */
    private void drawLine(int row, float[] line) {
        for (int column = 0; column < width; column++) {
            double u = Math.max(0, Math.min(columns - 1.0, (column + 0.5) / cell - 0.5));
            int left = (int) u;
            double next = level(Math.min(left + 1, columns - 1), row);
            line[column] = (float) (level(left, row) + (u - left) * (next - level(left, row)));
        }
    }

    /** Cells without a level (NaN) take the mean of their neighbours, ring by ring; all become 0 when none has one. */
    private static double[] filled(double[] levels, int columns, int rows) {
        double[] result = levels.clone();
        int[] missing = new int[levels.length];
        int count = 0;
        for (int i = 0; i < levels.length; i++) {
            if (Double.isNaN(levels[i])) {
                missing[count++] = i;
            }
        }
        if (count == levels.length) {
            Arrays.fill(result, 0);
            return result;
        }
        double[] means = new double[count];
        while (count > 0) {
            for (int k = 0; k < count; k++) {
                means[k] = neighbourMean(result, columns, rows, missing[k]);
            }
            int left = 0;
            for (int k = 0; k < count; k++) {
                result[missing[k]] = means[k];
                if (Double.isNaN(means[k])) {
                    missing[left++] = missing[k];
                }
            }
            count = left;
        }
        return result;
    }

    private static double neighbourMean(double[] levels, int columns, int rows, int index) {
        double sum = 0;
        int count = 0;
        int row = index / columns;
        int column = index % columns;
        for (int r = Math.max(0, row - 1); r <= Math.min(rows - 1, row + 1); r++) {
            for (int c = Math.max(0, column - 1); c <= Math.min(columns - 1, column + 1); c++) {
                double level = levels[r * columns + c];
                if (!Double.isNaN(level)) {
                    sum += level;
                    count++;
                }
            }
        }
        return count == 0 ? Double.NaN : sum / count;
    }
}
