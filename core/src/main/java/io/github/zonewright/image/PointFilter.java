package io.github.zonewright.image;

import java.util.Arrays;

/**
 * The filter that answers to round spots of one width and neither to a level nor to a slope: a Gaussian of the spot's
 * width less one {@value #SURROUND} times as wide.
 */
public final class PointFilter {

    /** Width of the surround over that of the centre. */
    public static final double SURROUND = 2.2;

    /** Where less than this share of the surround is left, it counts for less. */
    private static final float LEAST_SHARE = 0.05f;

    private final double sigma;

    private PointFilter(double sigma) {
        this.sigma = sigma;
    }

    /**
     * The filter for spots of a given width.
     *
     * @param sigma standard deviation of the spot in pixels, above 0 and at most 400
     * @return the filter
     * @throws IllegalArgumentException if the width is out of range
     */
    public static PointFilter ofSigma(double sigma) {
        if (!(sigma > 0 && sigma <= 400)) {
            throw new IllegalArgumentException("spot width " + sigma + " px: expected above 0 and at most 400");
        }
        return new PointFilter(sigma);
    }

    /**
     * Filters an image.
     *
     * @param image the image less its background; left as it is
     * @return the response, in grey values
     */
    public GrayImage apply(GrayImage image) {
        GrayImage narrow = GaussianFilter.ofSigma(sigma).apply(image);
        return difference(narrow, widened(narrow));
    }

    /**
     * Filters an image against a surround from which some pixels are left out, such as those of its spots, so that spots do
     * not push on their neighbours. A spot so left out answers {@link #alone()} times as much.
     *
     * @param image the image less its background; left as it is
     * @param leftOut pixels that do not take part in the surround
     * @return the response, in grey values
     */
    public GrayImage apply(GrayImage image, Mask leftOut) {
        float[] rest = image.values();
        float[] share = new float[rest.length];
        Arrays.fill(share, 1);
        leftOut.members().forEach(i -> {
            rest[i] = 0;
            share[i] = 0;
        });
        GaussianFilter wide = GaussianFilter.ofSigma(SURROUND * sigma);
        GrayImage surround = wide.apply(image.with(rest));
        float[] weights =
                wide.apply(GrayImage.wrap(image.width(), image.height(), share)).array();
        float[] levels = surround.array();
        for (int i = 0; i < levels.length; i++) {
            levels[i] /= Math.max(weights[i], LEAST_SHARE);
        }
        return difference(GaussianFilter.ofSigma(sigma).apply(image), surround);
    }

    /**
     * How much more a spot answers when it does not take part in its own surround.
     *
     * @return the ratio for a Gaussian spot of the filter's width, 1/2 over (1/2 − 1/(1 + 2.2²))
     */
    public static double alone() {
        return 0.5 / (0.5 - 1 / (1 + SURROUND * SURROUND));
    }

    private GrayImage widened(GrayImage narrow) {
        return GaussianFilter.onSmooth(sigma * Math.sqrt(SURROUND * SURROUND - 1))
                .apply(narrow);
    }

    /** Centre minus surround, written over the surround. */
    private static GrayImage difference(GrayImage centre, GrayImage surround) {
        float[] difference = surround.array();
        float[] values = centre.array();
        for (int i = 0; i < difference.length; i++) {
            difference[i] = values[i] - difference[i];
        }
        return GrayImage.wrap(centre.width(), centre.height(), difference);
    }

    /**
     * The response at the centre of a Gaussian spot of the filter's own width.
     *
     * @return the response over the spot's sum: (1/2 − 1/(1 + 2.2²)) / 2πσ², in 1/px²
     */
    public double responsePerSum() {
        return (0.5 - 1 / (1 + SURROUND * SURROUND)) / (2 * Math.PI * sigma * sigma);
    }

    /**
     * The scatter of the response to noise that differs from pixel to pixel with a standard deviation of 1.
     *
     * @return the standard deviation of the response
     */
    public double noiseGain() {
        double s2 = SURROUND * SURROUND;
        return Math.sqrt((1 + 1 / s2 - 4 / (1 + s2)) / (4 * Math.PI)) / sigma;
    }
}
