package io.github.zonewright.image;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.Arrays;
import java.util.Random;
import org.junit.jupiter.api.Test;

class FiltersTest {

    @Test
    void gaussian_onePixel_spreadsByTheFormula() {
        float[] values = new float[41 * 31];
        values[15 * 41 + 20] = 1;
        GrayImage smooth = GaussianFilter.ofSigma(2).apply(GrayImage.ofFloats(41, 31, values));
        for (int[] shift : new int[][] {{0, 0}, {1, 0}, {0, -3}, {4, 2}, {-5, 5}}) {
            double square = shift[0] * shift[0] + shift[1] * shift[1];
            double expected = Math.exp(-square / 8) / (8 * Math.PI);
            assertEquals(expected, smooth.value(20 + shift[0], 15 + shift[1]), 3e-5);
        }
    }

    /**
     * Two Gaussians one after the other are one whose variance is the sum: the formula is the outside check. Cutting the
     * kernel at 3.5 σ takes 0.6 % off its variance, hence the tolerance.
     */
    @Test
    void gaussian_wideOnASpot_addsTheVariances() {
        for (double sigma : new double[] {8, 11.7, 23}) {
            assertSpread(3, sigma, GaussianFilter.ofSigma(sigma));
            assertSpread(sigma / 2, sigma, GaussianFilter.onSmooth(sigma));
        }
        assertSpread(2, 3.92, GaussianFilter.onSmooth(3.92));
    }

    private static void assertSpread(double own, double sigma, GaussianFilter filter) {
        float[] values = new float[300 * 211];
        for (int i = 0; i < values.length; i++) {
            double dx = i % 300 + 0.5 - 130.3;
            double dy = i / 300 + 0.5 - 99.1;
            values[i] = (float) (1000 * Math.exp(-0.5 * (dx * dx + dy * dy) / (own * own)));
        }
        GrayImage smooth = filter.apply(GrayImage.ofFloats(300, 211, values));
        double variance = own * own + sigma * sigma;
        double top = 1000 * own * own / variance;
        for (int[] place : new int[][] {{130, 99}, {138, 99}, {130, 83}, {117, 120}, {150, 90}}) {
            double dx = place[0] + 0.5 - 130.3;
            double dy = place[1] + 0.5 - 99.1;
            double expected = top * Math.exp(-0.5 * (dx * dx + dy * dy) / variance);
            assertEquals(expected, smooth.value(place[0], place[1]), 0.006 * top, "σ " + sigma + " on " + own);
        }
    }

    /** Beyond the frame the image counts as zero: at the edge of an even image a half is left, in the corner a quarter. */
    @Test
    void gaussian_wideAtTheEdge_countsTheOutsideAsZero() {
        float[] values = new float[203 * 197];
        Arrays.fill(values, 100);
        GrayImage smooth = GaussianFilter.ofSigma(12).apply(GrayImage.ofFloats(203, 197, values));
        assertEquals(100, smooth.value(100, 100), 0.1);
        double half = 100 * 0.5 * (1 + 0.5 / 12 * Math.sqrt(2 / Math.PI));
        assertEquals(half, smooth.value(0, 100), 0.5);
        assertEquals(half, smooth.value(202, 100), 0.5);
        assertEquals(half, smooth.value(100, 196), 0.5);
        assertEquals(half * half / 100, smooth.value(202, 196), 0.5);
    }

    @Test
    void gaussian_inside_keepsTheSum() {
        float[] values = new float[60 * 60];
        values[30 * 60 + 30] = 100;
        GrayImage smooth = GaussianFilter.ofSigma(3).apply(GrayImage.ofFloats(60, 60, values));
        double sum = 0;
        for (float value : smooth.values()) {
            sum += value;
        }
        assertEquals(100, sum, 1e-3);
    }

    @Test
    void gaussian_missingData_countAsZero() {
        float[] values = new float[9];
        values[4] = Float.NaN;
        for (float value : GaussianFilter.ofSigma(1)
                .apply(GrayImage.ofFloats(3, 3, values))
                .values()) {
            assertEquals(0, value);
        }
    }

    @Test
    void gaussian_badWidth_isRefused() {
        assertThrows(IllegalArgumentException.class, () -> GaussianFilter.ofSigma(0));
        assertThrows(IllegalArgumentException.class, () -> GaussianFilter.ofSigma(Double.NaN));
        assertThrows(IllegalArgumentException.class, () -> PointFilter.ofSigma(-1));
    }

    @Test
    void point_spotOfItsWidth_answersAsPromised() {
        double sigma = 2.5;
        GrayImage exact = exactSpot(81, sigma, 1000);
        double sum = 1000 * 2 * Math.PI * sigma * sigma;
        PointFilter filter = PointFilter.ofSigma(sigma);
        assertEquals(filter.responsePerSum() * sum, filter.apply(exact).value(40, 40), 0.004 * 1000);
    }

    @Test
    void point_spotLeftOutOfTheSurround_answersMore() {
        PointFilter filter = PointFilter.ofSigma(2.5);
        GrayImage spot = exactSpot(81, 2.5, 1000);
        Mask around = Mask.of(81, 81, i -> Math.hypot(i % 81 - 40, i / 81 - 40) < 12);
        double ratio =
                filter.apply(spot, around).value(40, 40) / filter.apply(spot).value(40, 40);
        assertEquals(PointFilter.alone(), ratio, 0.01);
    }

    @Test
    void point_slope_isNotAnswered() {
        float[] slope = new float[121 * 121];
        for (int i = 0; i < slope.length; i++) {
            slope[i] = (i % 121 - 60) * 3 + (i / 121 - 60) * 2;
        }
        assertEquals(
                0,
                PointFilter.ofSigma(2)
                        .apply(GrayImage.ofFloats(121, 121, slope))
                        .value(60, 60),
                1e-3);
    }

    @Test
    void point_whiteNoise_scattersByTheGain() {
        Random random = new Random(7);
        float[] values = new float[300 * 300];
        for (int i = 0; i < values.length; i++) {
            values[i] = (float) random.nextGaussian();
        }
        PointFilter filter = PointFilter.ofSigma(2);
        GrayImage answer = filter.apply(GrayImage.ofFloats(300, 300, values));
        double squares = 0;
        int count = 0;
        for (int row = 20; row < 280; row++) {
            for (int column = 20; column < 280; column++) {
                squares += answer.value(column, row) * answer.value(column, row);
                count++;
            }
        }
        assertEquals(filter.noiseGain(), Math.sqrt(squares / count), 0.04 * filter.noiseGain());
    }

    private static GrayImage exactSpot(int side, double sigma, double peak) {
        float[] values = new float[side * side];
        for (int i = 0; i < values.length; i++) {
            double dx = i % side - side / 2;
            double dy = i / side - side / 2;
            values[i] = (float) (peak * Math.exp(-0.5 * (dx * dx + dy * dy) / (sigma * sigma)));
        }
        return GrayImage.ofFloats(side, side, values);
    }
}
