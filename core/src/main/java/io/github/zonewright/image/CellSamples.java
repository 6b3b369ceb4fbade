package io.github.zonewright.image;

/**
 * Reads samples off an image: its values, or how far they are off the mean of their neighbours left and right, scaled so that
 * noise which differs from pixel to pixel keeps its standard deviation.
 *
 * @param image the image
 * @param excluded pixels to leave out, besides those without data
 * @param differences whether to read the differences
 */
record CellSamples(GrayImage image, Mask excluded, boolean differences) {

    /** Undoes what the mean of the neighbours adds to the scatter: √(2/3). */
    private static final float SCALE = (float) Math.sqrt(2.0 / 3);

    int width() {
        return image.width();
    }

    int height() {
        return image.height();
    }

    /** Reads a part of a row in steps, adds the samples to those there are, and tells how many there are then. */
    int alongRow(int row, int left, int right, int step, float[] samples, int before) {
        float[] values = image.array();
        int start = row * image.width();
        boolean anyExcluded = !excluded.isEmpty();
        int count = before;
        if (differences) {
            int end = start + Math.min(right, image.width() - 1);
            for (int i = start + (left == 0 ? step : left); i < end; i += step) {
                float value = SCALE * (values[i] - 0.5f * (values[i - 1] + values[i + 1]));
                samples[count] = value;
                count += value == value && !(anyExcluded && excluded.contains(i)) ? 1 : 0;
            }
        } else {
            for (int i = start + left; i < start + right; i += step) {
                float value = values[i];
                samples[count] = value;
                count += value == value && !(anyExcluded && excluded.contains(i)) ? 1 : 0;
            }
        }
        return count;
    }
}
