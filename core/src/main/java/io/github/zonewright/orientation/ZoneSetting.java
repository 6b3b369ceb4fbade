package io.github.zonewright.orientation;

import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;

/**
 * An orientation as a microscopist says it: the zone axis, how the pattern is turned, and how the axis leans.
 *
 * <p>Without lean the zone axis is along Z and the reference reflection, which belongs to the zone, lies at the azimuth
 * {@code rotation}. The lean then carries the axis from Z by the shortest turn, about an axis in the screen, towards
 * (leanX, leanY). Worked number: a cubic crystal, zone [001], reference 100, rotation 90°: 100 points up on the screen and
 * 010 to the left; a lean of (1°, 0) moves the zone axis to the right, so that the reflection at the right (0 −1 0) goes
 * away from the source.
 *
 * @param zone zone axis, from the specimen to the source
 * @param reference a reflection of the zone
 * @param rotation azimuth of the reference reflection in radians, counter-clockwise from X in the microscope frame
 * @param leanX lean towards X in radians
 * @param leanY lean towards Y in radians
 */
public record ZoneSetting(Uvw zone, Hkl reference, double rotation, double leanX, double leanY) {

    /**
     * Checks the values.
     *
     * @throws IllegalArgumentException if the zone or the reference has no direction, the reference does not belong to
     *     the zone, an angle is not finite or the lean is 90° or more
     */
    public ZoneSetting {
        if (zone.isZero()) {
            throw new IllegalArgumentException("zone axis: 0 0 0, expected a direction such as 0 0 1");
        }
        if (reference.isZero() || reference.dot(zone) != 0) {
            throw new IllegalArgumentException("reference reflection " + reference + " of zone [" + zone
                    + "]: hu + kv + lw is " + reference.dot(zone) + ", expected 0 and not the direct beam");
        }
        if (!Double.isFinite(rotation) || !(Math.hypot(leanX, leanY) < Math.PI / 2)) {
            throw new IllegalArgumentException("rotation " + Math.toDegrees(rotation) + "°, lean ("
                    + Math.toDegrees(leanX) + "°, " + Math.toDegrees(leanY)
                    + "°): expected finite angles and a lean below 90°");
        }
    }

    /**
     * A setting exactly on zone.
     *
     * @param zone zone axis
     * @param reference a reflection of the zone
     * @param rotation azimuth of the reference in radians
     * @return the setting
     */
    public static ZoneSetting onZone(Uvw zone, Hkl reference, double rotation) {
        return new ZoneSetting(zone, reference, rotation, 0, 0);
    }

    /**
     * Reads an orientation against a zone axis.
     *
     * @param orientation the orientation
     * @param lattice the crystal's lattice
     * @param zone the zone axis to refer to, less than 90° from the direction to the source
     * @param reference a reflection of that zone
     * @return its rotation (−π to π) and lean
     * @throws IllegalArgumentException if the reference is not of the zone or the zone leans by 90° or more
     */
    public static ZoneSetting of(Orientation orientation, Lattice lattice, Uvw zone, Hkl reference) {
        Rotation r = orientation.rotation();
        Vector3 axis = r.apply(lattice.vector(zone)).normalize();
        double lean = axis.angleTo(Vector3.Z);
        if (!(lean < Math.PI / 2)) {
            throw new IllegalArgumentException("lean of zone axis [" + zone + "]: " + Math.toDegrees(lean)
                    + "°, expected less than 90° from the direction to the source");
        }
        Vector2 across = new Vector2(axis.x(), axis.y());
        double n = across.norm();
        Vector2 leanVector = n < 1e-15 ? Vector2.ZERO : across.times(lean / n);
        ZoneSetting check = new ZoneSetting(zone, reference, 0, leanVector.x(), leanVector.y());
        Vector3 g = check.leanRotation()
                .inverse()
                .apply(r.apply(lattice.reciprocal().vector(reference)));
        return new ZoneSetting(zone, reference, new Vector2(g.x(), g.y()).azimuth(), leanVector.x(), leanVector.y());
    }

    /**
     * The orientation of a crystal in this setting.
     *
     * @param lattice the crystal's lattice
     * @return the orientation
     */
    public Orientation orientation(Lattice lattice) {
        Vector3 z = lattice.vector(zone).normalize();
        Vector3 x = lattice.reciprocal().vector(reference).normalize();
        Rotation toAxes = Rotation.ofMatrix(Matrix3.ofRows(x, z.cross(x), z));
        return new Orientation(
                leanRotation().after(Rotation.ofAxisAngle(Vector3.Z, rotation)).after(toAxes));
    }

    /**
     * The whole lean.
     *
     * @return the angle between the zone axis and the direction to the source, in radians
     */
    public double lean() {
        return Math.hypot(leanX, leanY);
    }

    private Rotation leanRotation() {
        return Rotation.ofVector(new Vector3(-leanY, leanX, 0));
    }
}
