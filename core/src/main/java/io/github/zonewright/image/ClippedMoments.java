package io.github.zonewright.image;

import java.util.Arrays;

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

    /** Sorts the first {@code count} samples, at least one, and gives their moments. */
    static ClippedMoments of(float[] samples, int count) {
        Arrays.sort(samples, 0, count);
        double middle = samples[count / 2];
        double spread = (middle - samples[count / 4]) / 0.6745;
        if (spread <= 0) {
            ClippedMoments all = within(samples, 0, count);
            middle = all.mean;
            spread = all.deviation;
        }
        ClippedMoments moments = new ClippedMoments(middle, spread);
        for (int round = 0; round < 3 && moments.deviation > 0; round++) {
            double reach = CLIP * moments.deviation;
            int from = lowerBound(samples, count, moments.mean - reach);
            int to = lowerBound(samples, count, Math.nextUp(moments.mean + reach));
            if (to <= from) {
                break;
            }
            ClippedMoments kept = within(samples, from, to);
            moments = new ClippedMoments(kept.mean, kept.deviation / KEPT);
        }
        return moments;
    }

    private static int lowerBound(float[] sorted, int count, double value) {
        int low = 0;
        int high = count;
        while (low < high) {
            int middle = (low + high) >>> 1;
            if (sorted[middle] < value) {
                low = middle + 1;
            } else {
                high = middle;
            }
        }
        return low;
    }

    private static ClippedMoments within(float[] samples, int from, int to) {
        double sum = 0;
        for (int i = from; i < to; i++) {
            sum += samples[i];
        }
        double mean = sum / (to - from);
        double squares = 0;
        for (int i = from; i < to; i++) {
            squares += (samples[i] - mean) * (samples[i] - mean);
        }
        return new ClippedMoments(mean, Math.sqrt(squares / Math.max(1, to - from - 1)));
    }
}
