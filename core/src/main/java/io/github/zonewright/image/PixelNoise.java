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
        int width = image.width();
        int height = image.height();
        float[] values = image.array();
        float[] differences = new float[values.length];
        float scale = (float) Math.sqrt(2.0 / 3);
        for (int row = 0; row < height; row++) {
            int start = row * width;
            for (int column = 1; column < width - 1; column++) {
                int i = start + column;
                differences[i] = scale * (values[i] - 0.5f * (values[i - 1] + values[i + 1]));
            }
            differences[start] = Float.NaN;
            differences[start + width - 1] = Float.NaN;
        }
        return Background.unsmoothed(GrayImage.wrap(width, height, differences), cell, excluded)
                .noise();
    }
}
