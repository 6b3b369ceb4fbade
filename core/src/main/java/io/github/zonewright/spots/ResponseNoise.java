package io.github.zonewright.spots;

import io.github.zonewright.image.Background;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.LevelMap;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelNoise;
import io.github.zonewright.image.PointFilter;
import java.util.Arrays;

/**
 * The scatter of a filter's response where there is no spot.
 *
 * <p>The scatter measured on the response itself is too large where spots crowd or the background bends. The scatter of
 * single pixels against their neighbours, carried through the filter, is not; but it is too small where the detector
 * smears counts over neighbouring pixels. So the latter is used, scaled by the ratio of both in the quietest tenth of the
 * cells.
 *
 * @param pixel standard deviation of single pixels
 * @param smear ratio of the response's scatter to what independent pixels would give, at least 1
 */
record ResponseNoise(LevelMap pixel, double smear) {

    static final int CELL = 24;
    static final int ROUGH = 40;
    /** From so many cells on, a quarter of them is enough for the smear. */
    private static final int MANY = 1000;

    /** Makes up for the quietest tenth being quiet by chance. */
    private static final double CHANCE = 1.1;
    /** What a single cell's noise is at least, in parts of the estimate; the rest is smoothed over its neighbours. */
    private static final double CERTAIN = 0.9;
    /** Part of the image that spots may cover before the smear is no longer to be told. */
    private static final double MOSTLY = 0.8;

    /**
     * Reads the noise off an image.
     *
     * @param flat the image less its background
     * @param response its response to a filter, which may be that of the binned image
     * @param binning pixels of the image per side of a pixel of the response
     * @param leastCell least side of the cells: {@link #CELL}, or {@link #ROUGH} for a first look
     * @param sigma width of that filter in pixels of the image
     * @param rounding scatter of a pixel below which no estimate goes
     * @param excluded pixels that spots or saturation spoil
     * @param widely pixels where spots or saturation spoil the response
     */
    static ResponseNoise of(
            GrayImage flat,
            GrayImage response,
            int binning,
            int leastCell,
            double sigma,
            double rounding,
            Mask excluded,
            Mask widely) {
        int side = Math.min(flat.width(), flat.height());
        int cell = Math.max(4 * binning, Math.min((int) Math.max(leastCell, 3 * sigma), side / 4) / binning * binning);
        LevelMap raw =
                leastCell == ROUGH ? PixelNoise.rough(flat, cell, excluded) : PixelNoise.of(flat, cell, excluded);
        LevelMap single = raw.atLeast(Math.max(rounding, Float.MIN_NORMAL));
        LevelMap pixel = single.smoothed().atLeast(single.times(CERTAIN));
        if (widely.count() > MOSTLY * flat.width() * flat.height()) {
            return new ResponseNoise(pixel, 1);
        }
        int every = pixel.columns() * pixel.rows() > MANY ? 2 : 1;
        LevelMap scatter = Background.thinned(response, cell / binning, widely.shrunk(binning), every)
                .noise();
        double gain = PointFilter.ofSigma(sigma).noiseGain();
        double[] ratios = new double[scatter.columns() * scatter.rows()];
        int count = 0;
        for (int row = 0; row < scatter.rows(); row += every) {
            for (int column = 0; column < scatter.columns(); column += every) {
                double independent = gain * pixel.at((column + 0.5) * cell, (row + 0.5) * cell);
                ratios[count++] = scatter.level(column, row) / independent;
            }
        }
        Arrays.sort(ratios, 0, count);
        return new ResponseNoise(pixel, Math.max(1, CHANCE * ratios[count / 10]));
    }

    /** The same with the median of neighbouring cells, against spots that were not excluded. */
    ResponseNoise smoothed() {
        return new ResponseNoise(pixel.smoothed(), smear);
    }

    /** The scatter of the response of a filter of a given width. */
    LevelMap of(double sigma) {
        return pixel.times(smear * PointFilter.ofSigma(sigma).noiseGain());
    }
}
