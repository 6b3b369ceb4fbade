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

    private static final Samples MANY = new Samples(45, 100_000);
    /** For a first look. */
    private static final Samples FEW = new Samples(36, 40_000);

    private record Samples(int fewest, int altogether) {
        int perCell(int cells) {
            return Math.max(fewest, Math.min(ENOUGH, altogether / cells));
        }
    }

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
        Background raw = of(new CellSamples(image, excluded, false), cell, 1, FEW);
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
        return of(new CellSamples(image, excluded, false), cell, 1, MANY);
    }

    /**
     * Estimates the background in some of the cells only, for statistics over many.
     *
     * @param image the image
     * @param cell side of a cell in pixels, at least 4
     * @param excluded pixels to leave out
     * @param every of so many columns of cells, and of so many rows, the first is looked at
     * @return level and noise; the other cells take theirs from their neighbours
     * @throws IllegalArgumentException if the cell is smaller than 4 pixels
     */
    public static Background thinned(GrayImage image, int cell, Mask excluded, int every) {
        return of(new CellSamples(image, excluded, false), cell, every, MANY);
    }

    /** The noise of single pixels against their neighbours left and right instead of that about the level. */
    static LevelMap noiseOfDifferences(GrayImage image, int cell, Mask excluded, boolean rough) {
        return of(new CellSamples(image, excluded, true), cell, 1, rough ? FEW : MANY).noise;
    }

    private static Background of(CellSamples pixels, int cell, int every, Samples wanted) {
        if (cell < 4) {
            throw new IllegalArgumentException("cell " + cell + " px: expected at least 4");
        }
        int width = pixels.width();
        int height = pixels.height();
        int columns = Math.max(1, (width + cell / 2) / cell);
        int rows = Math.max(1, (height + cell / 2) / cell);
        double[] levels = new double[columns * rows];
        double[] noises = new double[columns * rows];
        Arrays.fill(levels, Double.NaN);
        Arrays.fill(noises, Double.NaN);
        int most = wanted.perCell(levels.length);
        int down = Math.max(1, (int) Math.sqrt(cell * cell / (double) most));
        int across = Math.max(1, cell * cell / (most * down));
        float[] samples = new float[4 * (cell + cell) * (cell + cell)];
        for (int row = 0; row < rows; row += every) {
            int bottom = row == rows - 1 ? height : (row + 1) * cell;
            for (int column = 0; column < columns; column += every) {
                int right = column == columns - 1 ? width : (column + 1) * cell;
                int count = 0;
                for (int y = row * cell; y < bottom; y += down) {
                    int left = column * cell + y / down % across;
                    count = pixels.alongRow(y, left, right, across, samples, count);
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
