package io.github.zonewright.image;

/**
 * The noise of single pixels, cell by cell, from the differences between each pixel and the mean of its neighbours left
 * and right. A slope does not count, a bend hardly: a Gaussian spot of σ = 2 px adds a quarter of its height at most.
 */
public final class PixelNoise {

    private PixelNoise() {}

    /**
     * Estimates the noise.
     *
     * @param image the image
     * @param cell side of a cell in pixels, at least 4
     * @param excluded pixels to leave out, such as saturated ones
     * @return standard deviation of a pixel, for noise that differs from pixel to pixel
     * @throws IllegalArgumentException if the cell is smaller than 4 pixels
     */
    public static LevelMap of(GrayImage image, int cell, Mask excluded) {
        return Background.noiseOfDifferences(image, cell, excluded, false);
    }

    /**
     * Estimates the noise from fewer samples, for a first look.
     *
     * @param image the image
     * @param cell side of a cell in pixels, at least 4
     * @param excluded pixels to leave out, such as saturated ones
     * @return standard deviation of a pixel, for noise that differs from pixel to pixel
     * @throws IllegalArgumentException if the cell is smaller than 4 pixels
     */
    public static LevelMap rough(GrayImage image, int cell, Mask excluded) {
        return Background.noiseOfDifferences(image, cell, excluded, true);
    }
}
