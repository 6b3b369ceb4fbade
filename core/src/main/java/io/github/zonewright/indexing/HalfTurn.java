package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.orientation.Misorientation;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.OrientedLattice;
import io.github.zonewright.pattern.Placement;
import java.util.Optional;
import java.util.stream.Stream;

/** The orientation half a turn about the zone axis away, of which the zero layer says nothing. */
final class HalfTurn {

    private static final double SAME = Math.toRadians(1);

    private HalfTurn() {}

    /** The turned orientation; empty when the Laue class makes it the same. */
    static Optional<Orientation> of(Placement placement) {
        Vector3 zone = placement.crystal().lattice().vector(placement.setting().zone());
        Orientation turned =
                new Orientation(placement.orientation().rotation().after(Rotation.ofAxisAngle(zone, Math.PI)));
        double difference = Misorientation.between(
                        lattice(placement, placement.orientation()), lattice(placement, turned))
                .angle();
        return difference < SAME ? Optional.empty() : Optional.of(turned);
    }

    /** Whether two placements of one crystal are the same orientation, perhaps after half a turn about the zone axis. */
    static boolean isSame(Placement a, Placement b, double angle) {
        OrientedLattice other = lattice(b, b.orientation());
        return Stream.concat(Stream.of(a.orientation()), of(a).stream())
                .anyMatch(o -> Misorientation.between(lattice(a, o), other).angle() < angle);
    }

    /** The crystal of a placement in some orientation. */
    static OrientedLattice lattice(Placement p, Orientation orientation) {
        return new OrientedLattice(p.crystal().lattice(), p.crystal().spaceGroup(), orientation);
    }
}
