package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.pattern.Placement;

/**
 * How far an orientation that was found is off the one that was drawn. A half turn about the zone axis is one answer, be it
 * about the axis that was drawn or, where the crystal leans so far that another is as near the beam, about the one found.
 */
record OffTruth(double inPlane, double tilt) {

    /** In degrees, to the nearest of the equivalents. */
    static OffTruth of(Crystal crystal, Rotation truth, Uvw zone, Placement found) {
        OffTruth best = new OffTruth(180, 180);
        Rotation own = found.orientation().rotation();
        for (Matrix3 m : crystal.spaceGroup().properLaueRotations(crystal.lattice())) {
            Rotation equivalent = truth.after(Rotation.ofMatrix(m));
            Rotation half = Rotation.ofAxisAngle(crystal.lattice().vector(zone), Math.PI);
            Rotation foundHalf = Rotation.ofAxisAngle(
                    crystal.lattice().vector(found.setting().zone()), Math.PI);
            best = best.or(own.after(equivalent.inverse()))
                    .or(own.after(truth.after(half).after(Rotation.ofMatrix(m)).inverse()))
                    .or(own.after(foundHalf).after(equivalent.inverse()));
        }
        return best;
    }

    private OffTruth or(Rotation off) {
        Vector3 v = off.axis().times(Math.toDegrees(off.angle()));
        return v.norm() < total() ? new OffTruth(Math.abs(v.z()), Math.hypot(v.x(), v.y())) : this;
    }

    double total() {
        return Math.hypot(inPlane, tilt);
    }

    /** Whether zone axis and rotation are right, with whatever lean. */
    boolean isRight() {
        return inPlane < 1 && tilt < 10;
    }
}
