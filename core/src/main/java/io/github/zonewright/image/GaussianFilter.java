package io.github.zonewright.image;

/**
 * Smoothing with a round Gaussian of unit sum, as two passes along rows and columns. The kernel is cut at 3.5 σ. Beyond
 * the frame, and where there are no data, the image counts as zero, so subtract its background first.
 *
 * <p>A Gaussian of {@value #COARSE} px and more is applied to the image binned by a factor, and the result drawn anew
 * with cubic B-splines; what binning and splines smooth is left out of the Gaussian, so that the variances add up to σ².
 */
public final class GaussianFilter {

    private static final double CUT = 3.5;
    /** Least σ in pixels of a binned image. */
    private static final double FINE = 4;

    /** The same where the image is smooth already. */
    private static final double FINE_ON_SMOOTH = 1.9;

    private static final double COARSE = 2 * FINE;

    private final int factor;
    private final float[] kernel;

    private GaussianFilter(int factor, float[] kernel) {
        this.factor = factor;
        this.kernel = kernel;
    }

    /**
     * A filter of a given width.
     *
     * @param sigma standard deviation in pixels, above 0 and at most 1000
     * @return the filter
     * @throws IllegalArgumentException if the width is out of range
     */
    public static GaussianFilter ofSigma(double sigma) {
        return ofSigma(sigma, FINE);
    }

    /**
     * A filter of a given width for an image that a Gaussian at least half as wide has smoothed. It is applied to the image
     * binned more, which loses nothing there.
     *
     * @param sigma standard deviation in pixels, above 0 and at most 1000
     * @return the filter
     * @throws IllegalArgumentException if the width is out of range
     */
    public static GaussianFilter onSmooth(double sigma) {
        return ofSigma(sigma, FINE_ON_SMOOTH);
    }

    private static GaussianFilter ofSigma(double sigma, double fine) {
        if (!(sigma > 0 && sigma <= 1000)) {
            throw new IllegalArgumentException("filter width " + sigma + " px: expected above 0 and at most 1000");
        }
        int factor = Math.max(1, (int) (sigma / fine));
        if (factor == 1) {
            return new GaussianFilter(1, kernel(sigma));
        }
        // Variances in pixels of the binned image: 1/3 of the spline, (1 − 1/k²)/12 of the bins.
        double variance = sigma * sigma / (factor * factor);
        double others = 1.0 / 3 + (1 - 1.0 / (factor * factor)) / 12;
        return new GaussianFilter(factor, kernel(Math.sqrt(variance - others)));
    }

    private static float[] kernel(double sigma) {
        int reach = Math.max(1, (int) Math.ceil(CUT * sigma));
        double[] weights = new double[reach + 1];
        double sum = 0;
        for (int i = 0; i <= reach; i++) {
            weights[i] = Math.exp(-0.5 * i * i / (sigma * sigma));
            sum += i == 0 ? weights[i] : 2 * weights[i];
        }
        float[] kernel = new float[reach + 1];
        for (int i = 0; i <= reach; i++) {
            kernel[i] = (float) (weights[i] / sum);
        }
        return kernel;
    }

    /**
     * Smooths an image.
     *
     * @param image the image, left as it is
     * @return the smoothed image
     */
    public GrayImage apply(GrayImage image) {
        int width = image.width();
        int height = image.height();
        float[] source = image.isComplete() ? image.array() : withoutGaps(image);
        if (factor == 1) {
            return GrayImage.wrap(width, height, smoothed(source, width, height));
        }
        CoarseGrid grid = new CoarseGrid(width, height, factor);
        float[] coarse = smoothed(grid.binned(source), grid.columns(), grid.rows());
        return GrayImage.wrap(width, height, grid.drawn(coarse));
    }

    private static float[] withoutGaps(GrayImage image) {
        float[] values = image.values();
        for (int i = 0; i < values.length; i++) {
            values[i] = values[i] == values[i] ? values[i] : 0;
        }
        return values;
    }

    /** Rows are smoothed along as the pass down needs them, so that they stay in the processor's cache. */
    private float[] smoothed(float[] source, int width, int height) {
        int reach = kernel.length - 1;
        float[] result = new float[source.length];
        float[] line = new float[width + 2 * reach];
        float[] sums = new float[width];
        float[] nothing = new float[width];
        float[][] ring = new float[2 * reach + 1][width];
        float[][] around = new float[2 * reach + 1][width];
        float[][] rows = new float[2 * reach + 1][];
        int ready = 0;
        for (int row = 0; row < height; row++) {
            for (; ready <= Math.min(height - 1, row + reach); ready++) {
                System.arraycopy(source, ready * width, line, reach, width);
                for (int k = 0; k < around.length; k++) {
                    System.arraycopy(line, k, around[k], 0, width);
                }
                weigh(around, ring[ready % ring.length]);
            }
            for (int k = 0; k < rows.length; k++) {
                int other = row + k - reach;
                rows[k] = other >= 0 && other < height ? ring[other % ring.length] : nothing;
            }
            weigh(rows, sums);
            System.arraycopy(sums, 0, result, row * width, width);
        }
        return result;
    }

    /** The sum of as many lines as the kernel is long, weighed by it; loops over arrays of one length run the fastest. */
    private void weigh(float[][] lines, float[] sums) {
        int reach = kernel.length - 1;
        start(sums, lines[reach], kernel[0], lines[reach - 1], lines[reach + 1], kernel[1]);
        for (int k = 2; k <= reach; k += 2) {
            if (k == reach) {
                add(sums, lines[0], lines[2 * reach], kernel[k]);
            } else {
                add(
                        sums,
                        lines[reach - k],
                        lines[reach + k],
                        kernel[k],
                        lines[reach - k - 1],
                        lines[reach + k + 1],
                        kernel[k + 1]);
            }
        }
    }

    private static void start(float[] sums, float[] middle, float most, float[] one, float[] other, float weight) {
        for (int i = 0; i < sums.length; i++) {
            sums[i] = most * middle[i] + weight * (one[i] + other[i]);
        }
    }

    private static void add(float[] sums, float[] one, float[] other, float weight) {
        for (int i = 0; i < sums.length; i++) {
            sums[i] += weight * (one[i] + other[i]);
        }
    }

    private static void add(
            float[] sums, float[] one, float[] other, float weight, float[] third, float[] fourth, float less) {
        for (int i = 0; i < sums.length; i++) {
            sums[i] += weight * (one[i] + other[i]) + less * (third[i] + fourth[i]);
        }
    }
}
