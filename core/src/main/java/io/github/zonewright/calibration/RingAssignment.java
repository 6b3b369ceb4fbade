package io.github.zonewright.calibration;

import io.github.zonewright.spots.MeasuredValue;

/**
 * A ring and the line of the standard that it is taken for.
 *
 * @param ring the measured ring
 * @param line the standard's line
 * @param spacing d of the ring in Å with the fitted camera constant; its error is that of the radius alone
 * @param residual measured less computed radius in pixels
 */
public record RingAssignment(MeasuredRing ring, PowderLine line, MeasuredValue spacing, double residual) {

    /**
     * The residual as a part of d, for a plot.
     *
     * @return (d measured − d of the standard) / d of the standard
     */
    public double relativeResidual() {
        return spacing.value() / line.d() - 1;
    }
}
