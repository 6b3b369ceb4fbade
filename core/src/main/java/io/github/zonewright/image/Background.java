package io.github.zonewright.image;

import java.util.Arrays;

/**
 * The slowly varying part of an image and the scatter about it, cell by cell. In each cell, values that stand out are
 * set aside (3 deviations, repeated); where more than half a cell is bright, the median of the 3 × 3 cells around
 * mends it.
 *
 * @param level the mean level
 * @param noise the standard deviation of single pixels about it
 */
public record Background(LevelMap level, LevelMap noise) {

    /** Samples per cell: no more than enough, and fewer, though not too few, where there are many cells. */
    private static final int ENOUGH = 150;

    private static final int FEWEST = 60;
    private static final int ALTOGETHER = 100_000;
    /** What part of these is taken for a first look, or where statistics over many cells follow. */
    private static final double FEW = 0.6;

    private static final int LEAST = 8;

    /**
     * Estimates the background.
     *
     * @param image the image
     * @param cell side of a cell in pixels, at least 4; a few times the spots' width
     * @param excluded pixels to leave out
     * @return level and noise, both smoothed by a 3 × 3 median
     * @throws IllegalArgumentException if the cell is smaller than 4 pixels
     */
    public static Background of(GrayImage image, int cell, Mask excluded) {
        Background raw = unsmoothed(image, cell, excluded);
        return new Background(raw.level.smoothed(), raw.noise.smoothed());
    }

    /**
     * Estimates the background from fewer samples, for a first look.
     *
     * @param image the image
     * @param cell side of a cell in pixels, at least 4
     * @param excluded pixels to leave out
     * @return level and noise, both smoothed by a 3 × 3 median
     * @throws IllegalArgumentException if the cell is smaller than 4 pixels
     */
    static Background rough(GrayImage image, int cell, Mask excluded) {
        Background raw = thinned(image, cell, excluded, 1);
        return new Background(raw.level.smoothed(), raw.noise.smoothed());
    }

    /**
     * Estimates the background without the median over neighbouring cells.
     *
     * @param image the image
     * @param cell side of a cell in pixels, at least 4
     * @param excluded pixels to leave out
     * @return level and noise
     * @throws IllegalArgumentException if the cell is smaller than 4 pixels
     */
    public static Background unsmoothed(GrayImage image, int cell, Mask excluded) {
        return of(image, cell, excluded, 1, 1, (values, width, x, y) -> values[y * width + x]);
    }

    /**
     * Estimates the background in some of the cells only and from fewer samples, for a first look or statistics over many.
     *
     * @param image the image
     * @param cell side of a cell in pixels, at least 4
     * @param excluded pixels to leave out
     * @param every of so many columns of cells, and of so many rows, the first is looked at
     * @return level and noise; the other cells take theirs from their neighbours
     * @throws IllegalArgumentException if the cell is smaller than 4 pixels
     */
    public static Background thinned(GrayImage image, int cell, Mask excluded, int every) {
        return of(image, cell, excluded, every, FEW, (values, width, x, y) -> values[y * width + x]);
    }

    /** What is taken of an image at a pixel; NaN for nothing. */
    interface Reading {
        float at(float[] values, int width, int x, int y);
    }

    /** The noise of another quantity than the values themselves, from fewer samples. */
    static LevelMap noise(GrayImage image, int cell, Mask excluded, Reading reading) {
        return of(image, cell, excluded, 1, FEW, reading).noise;
    }

    private static Background of(GrayImage image, int cell, Mask excluded, int every, double share, Reading reading) {
        if (cell < 4) {
            throw new IllegalArgumentException("cell " + cell + " px: expected at least 4");
        }
        int width = image.width();
        int height = image.height();
        int columns = Math.max(1, (width + cell / 2) / cell);
        int rows = Math.max(1, (height + cell / 2) / cell);
        double[] levels = new double[columns * rows];
        double[] noises = new double[columns * rows];
        Arrays.fill(levels, Double.NaN);
        Arrays.fill(noises, Double.NaN);
        float[] samples = new float[4 * (cell + cell) * (cell + cell)];
        float[] values = image.array();
        int wanted = (int) (share * Math.max(FEWEST, Math.min(ENOUGH, ALTOGETHER / levels.length)));
        int down = Math.max(1, (int) Math.sqrt(cell * cell / (double) wanted));
        int across = Math.max(1, cell * cell / (wanted * down));
        boolean anyExcluded = excluded.count() > 0;
        for (int row = 0; row < rows; row += every) {
            int bottom = row == rows - 1 ? height : (row + 1) * cell;
            for (int column = 0; column < columns; column += every) {
                int right = column == columns - 1 ? width : (column + 1) * cell;
                int count = 0;
                for (int y = row * cell; y < bottom; y += down) {
                    for (int x = column * cell + y / down % across; x < right; x += across) {
                        float value = reading.at(values, width, x, y);
                        if (value == value && !(anyExcluded && excluded.contains(x, y))) {
                            samples[count++] = value;
                        }
                    }
                }
                if (count >= Math.min(LEAST, width * height)) {
                    ClippedMoments moments = ClippedMoments.of(samples, count);
                    levels[row * columns + column] = moments.mean();
                    noises[row * columns + column] = moments.deviation();
                }
            }
        }
        return new Background(
                new LevelMap(width, height, cell, columns, rows, levels),
                new LevelMap(width, height, cell, columns, rows, noises));
    }
}
