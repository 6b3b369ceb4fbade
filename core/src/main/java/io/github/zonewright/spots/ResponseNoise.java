package io.github.zonewright.spots;

import io.github.zonewright.image.Background;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.LevelMap;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelNoise;
import io.github.zonewright.image.PointFilter;

/**
 * The scatter of a filter's response where there is no spot.
 *
 * <p>The scatter measured on the response itself is too large where spots crowd or the background bends. The scatter of
 * single pixels against their neighbours, carried through the filter, is not; but it is too small where the detector
 * smears counts over neighbouring pixels. So the latter is scaled by the ratio of both in the quietest tenth of the
 * cells of a narrow filter's response, and the lesser of the two estimates is taken.
 */
final class ResponseNoise {

    private static final int CELL = 32;
    /** Allowance for the error of the estimate from single pixels. */
    private static final double ALLOWANCE = 1.1;

    private final GrayImage flat;
    private final LevelMap pixel;
    private final double smear;
    private final double floor;

    private ResponseNoise(GrayImage flat, LevelMap pixel, double smear, double floor) {
        this.flat = flat;
        this.pixel = pixel;
        this.smear = smear;
        this.floor = floor;
    }

    /**
     * Reads the noise off an image.
     *
     * @param flat the image less its background
     * @param narrow its response to a filter
     * @param narrowSigma width of that filter, near 2 pixels
     * @param rounding scatter of a pixel below which no estimate goes
     * @param saturated pixels at the detector's limit, whose scatter means nothing
     */
    static ResponseNoise of(GrayImage flat, GrayImage narrow, double narrowSigma, double rounding, Mask saturated) {
        int cell = cell(flat, narrowSigma);
        LevelMap pixel = PixelNoise.of(flat, cell, saturated).smoothed().atLeast(Math.max(rounding, Float.MIN_NORMAL));
        int fine = Math.max(4, cell / 2);
        LevelMap scatter = Background.unsmoothed(narrow, fine, saturated).noise();
        double gain = PointFilter.ofSigma(narrowSigma).noiseGain();
        double[] ratios = new double[scatter.columns() * scatter.rows()];
        for (int i = 0; i < ratios.length; i++) {
            int column = i % scatter.columns();
            int row = i / scatter.columns();
            ratios[i] = scatter.level(column, row) / (gain * pixel.at((column + 0.5) * fine, (row + 0.5) * fine));
        }
        java.util.Arrays.sort(ratios);
        return new ResponseNoise(flat, pixel, Math.max(1, 1.1 * ratios[ratios.length / 10]), rounding);
    }

    /** The same noise read only off pixels that no spot covers. */
    ResponseNoise without(Mask covered) {
        LevelMap rest =
                PixelNoise.of(flat, cell(flat, 1), covered).smoothed().atLeast(Math.max(floor, Float.MIN_NORMAL));
        return new ResponseNoise(flat, pixel.atMost(rest), smear, floor);
    }

    private static int cell(GrayImage image, double sigma) {
        int wanted = (int) Math.max(CELL, Math.round(6 * sigma));
        return Math.max(4, Math.min(wanted, Math.min(image.width(), image.height()) / 4));
    }

    /** The scatter of a response from the pixels' own noise alone. */
    LevelMap fromPixels(double sigma) {
        return pixel.times(smear * PointFilter.ofSigma(sigma).noiseGain());
    }

    /** The scatter of a response, given which pixels spots cover. */
    LevelMap of(GrayImage response, double sigma, Mask covered) {
        double gain = PointFilter.ofSigma(sigma).noiseGain();
        LevelMap measured =
                Background.of(response, cell(flat, sigma), covered).noise().atLeast(floor * gain);
        return measured.atMost(fromPixels(sigma).times(ALLOWANCE));
    }
}
