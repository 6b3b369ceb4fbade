package io.github.zonewright.image;

/**
 * Smoothing with a round Gaussian of unit sum, as two passes along rows and columns. The kernel is cut at 3.5 σ. Beyond
 * the frame, and where there are no data, the image counts as zero, so subtract its background first.
 */
public final class GaussianFilter {

    private static final double CUT = 3.5;

    private final float[] kernel;

    private GaussianFilter(float[] kernel) {
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
        if (!(sigma > 0 && sigma <= 1000)) {
            throw new IllegalArgumentException("filter width " + sigma + " px: expected above 0 and at most 1000");
        }
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
        return new GaussianFilter(kernel);
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
        float[] source = image.array();
        float[] across = new float[source.length];
        int reach = kernel.length - 1;
        float[] line = new float[width + 2 * reach];
        float[] sums = new float[width];
        for (int row = 0; row < height; row++) {
            for (int column = 0; column < width; column++) {
                float value = source[row * width + column];
                line[reach + column] = value == value ? value : 0;
            }
            smoothLine(line, reach, sums);
            System.arraycopy(sums, 0, across, row * width, width);
        }
        return GrayImage.wrap(width, height, smoothDown(across, width, height));
    }

    private void smoothLine(float[] line, int reach, float[] sums) {
        int width = sums.length;
        float centre = kernel[0];
        for (int column = 0; column < width; column++) {
            sums[column] = centre * line[reach + column];
        }
        for (int k = 1; k <= reach; k++) {
            float weight = kernel[k];
            int left = reach - k;
            int right = reach + k;
            for (int column = 0; column < width; column++) {
                sums[column] += weight * (line[left + column] + line[right + column]);
            }
        }
    }

    private float[] smoothDown(float[] across, int width, int height) {
        float[] result = new float[across.length];
        float[] sums = new float[width];
        for (int row = 0; row < height; row++) {
            java.util.Arrays.fill(sums, 0);
            for (int k = 1 - kernel.length; k < kernel.length; k++) {
                if (row + k >= 0 && row + k < height) {
                    addScaled(sums, across, (row + k) * width, kernel[Math.abs(k)]);
                }
            }
            System.arraycopy(sums, 0, result, row * width, width);
        }
        return result;
    }

    private static void addScaled(float[] sums, float[] source, int start, float weight) {
        for (int column = 0; column < sums.length; column++) {
            sums[column] += weight * source[start + column];
        }
    }
}
