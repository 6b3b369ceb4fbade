package io.github.zonewright.spots;

/**
 * A number and how well it is known.
 *
 * @param value the number, finite
 * @param error its standard uncertainty (1σ), in the same unit, not negative
 */
public record MeasuredValue(double value, double error) {

    /**
     * Checks the numbers.
     *
     * @throws IllegalArgumentException if the value is not finite, or the error is negative or not finite
     */
    public MeasuredValue {
        if (!Double.isFinite(value) || !(error >= 0) || Double.isInfinite(error)) {
            throw new IllegalArgumentException(
                    "value " + value + " ± " + error + ": expected finite numbers and an error that is not negative");
        }
    }

    /**
     * The error in units of the value.
     *
     * @return error over the value's modulus
     */
    public double relativeError() {
        return error / Math.abs(value);
    }

    /**
     * The value and its error multiplied by an exact number.
     *
     * @param factor the number
     * @return the product
     */
    public MeasuredValue times(double factor) {
        return new MeasuredValue(value * factor, error * Math.abs(factor));
    }
}
