package io.github.zonewright.image;

/**
 * Mean and standard deviation of a sample of which some belong to something else: values more than 3 deviations from
 * the middle are set aside, three times over. The start is the median and the distance from it to the lower quartile.
 *
 * @param mean mean of what remains
 * @param deviation its standard deviation, corrected for the cut tails of a normal distribution
 */
record ClippedMoments(double mean, double deviation) {

    private static final double CLIP = 3;
    /** Standard deviation of a unit normal distribution cut at ±3 (calculated). */
    private static final double KEPT = 0.98658;

    /** The moments of the first {@code count} samples, at least one; rearranges them. */
    static ClippedMoments of(float[] samples, int count) {
        double middle = Quantile.select(samples, 0, count, count / 2);
        double spread = (middle - Quantile.select(samples, 0, count / 2 + 1, count / 4)) / 0.6745;
        ClippedMoments moments = new ClippedMoments(middle, spread);
        if (spread <= 0) {
            moments = new ClippedMoments(middle, Double.POSITIVE_INFINITY).clipped(samples, count);
        }
        for (int round = 0; round < 3 && moments.deviation > 0; round++) {
            ClippedMoments before = moments;
            moments = before.clipped(samples, count);
            if (moments.equals(before)) {
                break;
            }
        }
        return moments;
    }

    /** The moments of the samples within the reach of these; these if there are none. */
    private ClippedMoments clipped(float[] samples, int count) {
        double least = mean - CLIP * deviation;
        double greatest = mean + CLIP * deviation;
        double sum = 0;
        double squares = 0;
        int kept = 0;
        for (int i = 0; i < count; i++) {
            float sample = samples[i];
            if (sample >= least && sample <= greatest) {
                double excess = sample - mean;
                sum += excess;
                squares += excess * excess;
                kept++;
            }
        }
        if (kept == 0) {
            return this;
        }
        double variance = Math.max(0, squares - sum * sum / kept) / Math.max(1, kept - 1);
        return new ClippedMoments(mean + sum / kept, Math.sqrt(variance) / KEPT);
    }
}
