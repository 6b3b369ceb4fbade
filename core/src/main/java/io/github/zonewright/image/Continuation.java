package io.github.zonewright.image;

/**
 * Continues an image into pixels that are not seen, with the mean of those around it weighed by a Gaussian. Works tile by
 * tile, so that a few pixels cost little.
 */
public final class Continuation {

    /** Where the Gaussian is cut, in its widths. */
    private static final double REACH = 3.5;
    /** Least side of a tile in pixels. */
    private static final int TILE = 48;

    private final GrayImage image;
    private final Mask unseen;
    private final int reach;
    private final GaussianFilter smooth;

    private Continuation(GrayImage image, Mask unseen, double sigma) {
        this.image = image;
        this.unseen = unseen;
        this.reach = (int) Math.ceil(REACH * sigma);
        this.smooth = GaussianFilter.ofSigma(sigma);
    }

    /**
     * Continues an image.
     *
     * @param image the image less its background, so that zero is a fair value where nothing is near
     * @param unseen pixels of which the values are to be replaced
     * @param sigma width of the Gaussian in pixels
     * @return this image if nothing is unseen, else a copy with those pixels replaced
     */
    public static GrayImage of(GrayImage image, Mask unseen, double sigma) {
        if (unseen.count() == 0) {
            return image;
        }
        Continuation continuation = new Continuation(image, unseen, sigma);
        float[] values = image.values();
        int tile = Math.max(TILE, 2 * continuation.reach);
        boolean[][] touched = new boolean[(image.height() - 1) / tile + 1][(image.width() - 1) / tile + 1];
        unseen.members().forEach(i -> touched[i / image.width() / tile][i % image.width() / tile] = true);
        for (int row = 0; row < touched.length; row++) {
            for (int column = 0; column < touched[row].length; column++) {
                if (touched[row][column]) {
                    continuation.fill(values, column * tile, row * tile, tile);
                }
            }
        }
        return image.with(values);
    }

    /** Replaces what is unseen in one tile. */
    private void fill(float[] values, int left, int top, int tile) {
        int fromX = Math.max(0, left - reach);
        int fromY = Math.max(0, top - reach);
        int width = Math.min(image.width(), left + tile + reach) - fromX;
        int height = Math.min(image.height(), top + tile + reach) - fromY;
        float[] seen = new float[width * height];
        float[] present = new float[width * height];
        for (int i = 0; i < seen.length; i++) {
            int column = fromX + i % width;
            int row = fromY + i / width;
            boolean isSeen = !unseen.contains(column, row);
            seen[i] = isSeen ? image.value(column, row) : 0;
            present[i] = isSeen ? 1 : 0;
        }
        float[] around = smooth.apply(GrayImage.wrap(width, height, seen)).array();
        float[] share = smooth.apply(GrayImage.wrap(width, height, present)).array();
        for (int row = top; row < Math.min(image.height(), top + tile); row++) {
            for (int column = left; column < Math.min(image.width(), left + tile); column++) {
                if (unseen.contains(column, row)) {
                    int i = (row - fromY) * width + column - fromX;
                    values[row * image.width() + column] = around[i] / Math.max(share[i], Float.MIN_NORMAL);
                }
            }
        }
    }
}
