package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.orientation.Misorientation;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.OrientedLattice;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;

/** The orientation half a turn about the zone axis away, of which the zero layer says nothing. */
final class HalfTurn {

    private static final double SAME = Math.toRadians(1);

    private HalfTurn() {}

    /**
     * The smallest angle in radians between two solutions for one crystal, over the rotations of its Laue class and the
     * undecided half turns of both.
     */
    static double angleBetween(Solution a, Solution b) {
        return orientations(a)
                .flatMap(own -> orientations(b)
                        .map(other -> angleBetween(own, other, a.placement().crystal())))
                .min(Double::compare)
                .orElseThrow();
    }

    /** A solution with the one of its two orientations first that is nearer to either of another solution's. */
    static Solution near(Solution solution, Solution before) {
        Crystal crystal = before.placement().crystal();
        if (solution.halfTurn().isEmpty() || !solution.placement().crystal().equals(crystal)) {
            return solution;
        }
        Orientation shown = before.placement().orientation();
        double own = angleBetween(shown, solution.placement().orientation(), crystal);
        double turned = angleBetween(shown, solution.halfTurn().get(), crystal);
        return turned < own ? turned(solution, solution.halfTurn().get()) : solution;
    }

    private static Stream<Orientation> orientations(Solution s) {
        return Stream.concat(Stream.of(s.placement().orientation()), s.halfTurn().stream());
    }

    private static double angleBetween(Orientation a, Orientation b, Crystal crystal) {
        return Misorientation.between(lattice(crystal, a), lattice(crystal, b)).angle();
    }

    /**
     * The solution with its other orientation first: reflections of the zero layer are their Friedel mates and stay where
     * they are, those of upper layers are no longer explained.
     */
    private static Solution turned(Solution s, Orientation other) {
        Placement placement = s.placement();
        Uvw zone = placement.setting().zone();
        ZoneSetting setting = ZoneSetting.of(
                other, placement.crystal().lattice(), zone, placement.setting().reference());
        List<SpotMatch> matches = new ArrayList<>();
        List<MeasuredSpot> unexplained = new ArrayList<>(s.unexplained());
        double squares = 0;
        for (SpotMatch m : s.matches()) {
            if (m.hkl().dot(zone) == 0) {
                matches.add(new SpotMatch(m.measured(), m.hkl().negate(), m.computed()));
                squares += m.residual() * m.residual();
            } else {
                unexplained.add(m.measured());
            }
        }
        return new Solution(
                placement.withSetting(setting),
                matches,
                unexplained,
                Math.sqrt(squares / matches.size()),
                s.score(),
                s.errors(),
                Optional.of(placement.orientation()),
                s.remarks(),
                s.ownScore());
    }

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
        return lattice(p.crystal(), orientation);
    }

    private static OrientedLattice lattice(Crystal crystal, Orientation orientation) {
        return new OrientedLattice(crystal.lattice(), crystal.spaceGroup(), orientation);
    }
}
