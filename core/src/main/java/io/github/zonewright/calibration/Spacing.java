package io.github.zonewright.calibration;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.spots.MeasuredValue;

/**
 * A measured spacing: what {@link SpacingRuler} reads.
 *
 * @param length distance on the image per order, in pixels
 * @param d the spacing in Å; its error counts the places' and the camera constant's
 * @param g scattering vector of the first order in 1/Å, microscope frame
 * @param placeError relative error of |g| from the places alone, which is also the error of its azimuth in radians
 */
public record Spacing(MeasuredValue length, MeasuredValue d, Vector2 g, double placeError) {

    /**
     * How this spacing stands to another read with the same ruler; the camera constant drops out.
     *
     * @param ratio |g| of this over |g| of the other
     * @param angle from 0 to π in radians
     */
    public record Relation(MeasuredValue ratio, MeasuredValue angle) {}

    /**
     * Ratio and angle to the spacing read before. The places of the two count as independent, though an error of the centre
     * is common to both.
     *
     * @param before the other spacing
     * @return the relation
     */
    public Relation to(Spacing before) {
        double ratio = g.norm() / before.g.norm();
        double angle = Math.abs(Math.atan2(before.g.cross(g), before.g.dot(g)));
        double error = Math.hypot(placeError, before.placeError);
        return new Relation(new MeasuredValue(ratio, ratio * error), new MeasuredValue(angle, error));
    }
}
