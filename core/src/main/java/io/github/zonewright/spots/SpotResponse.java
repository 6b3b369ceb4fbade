package io.github.zonewright.spots;

/**
 * What a pattern shows at a place where a spot may or may not be.
 *
 * @param signal intensity that a spot there would have, on the scale of {@link MeasuredSpot#intensity()}; may be negative
 * @param noise its standard deviation where there is no spot
 */
public record SpotResponse(double signal, double noise) {

    /**
     * The signal in units of its noise.
     *
     * @return signal over noise, 0 where both are 0
     */
    public double signalToNoise() {
        return signal == 0 ? 0 : signal / noise;
    }
}
