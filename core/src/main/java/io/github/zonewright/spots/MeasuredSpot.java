package io.github.zonewright.spots;

import io.github.zonewright.image.PixelPoint;

/**
 * A spot found on a pattern.
 *
 * @param position its centre
 * @param positionError standard deviation of each coordinate, in pixels
 * @param intensity sum of the grey values above the background, as for a Gaussian spot of the pattern's width
 * @param signalToNoise response of the filter matched to the spots, over the scatter of that response nearby
 * @param saturated whether a pixel of its core is at the detector's limit, so that the intensity is a lower bound
 */
public record MeasuredSpot(
        PixelPoint position, double positionError, double intensity, double signalToNoise, boolean saturated) {

    /**
     * Checks the numbers.
     *
     * @throws IllegalArgumentException if the error is not positive, or a number not finite
     */
    public MeasuredSpot {
        if (!(positionError > 0) || Double.isInfinite(positionError)) {
            throw new IllegalArgumentException("position error " + positionError + " px: expected positive and finite");
        }
        if (!Double.isFinite(intensity) || !Double.isFinite(signalToNoise)) {
            throw new IllegalArgumentException(
                    "intensity " + intensity + ", signal to noise " + signalToNoise + ": expected finite numbers");
        }
    }
}
