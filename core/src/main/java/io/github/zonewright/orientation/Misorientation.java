package io.github.zonewright.orientation;

import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.PlaneNormal;
import io.github.zonewright.lattice.Uvw;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;

/**
 * How two crystals stand to each other: of all rotations from the first to the second that symmetry cannot tell apart, the
 * one by the smallest angle (the disorientation). The crystals need not be of one kind.
 *
 * <p>With v_microscope = R·v_crystal it is Δ = S₁⁻¹·R₁⁻¹·R₂·S₂ over the proper rotations S of both Laue classes: those that
 * kinematic diffraction cannot see. It is written in the first crystal's Cartesian frame. Of equal angles the one whose axis
 * has the fewest negative indices, then the largest first index, is kept. Worked number: cubic crystals that differ by half a
 * turn about [1 1 1] have 60° about [1 1 1].
 *
 * <p>Its error is that of both orientations together; a lean known to half a degree leaves the axis of a small rotation
 * all but open. Source: Mackenzie, Biometrika 45 (1958) 229, from memory, who gives 62.80° as the largest angle of cubes.
 *
 * @param first the crystal the rotation starts from
 * @param second the crystal it leads to
 * @param rotation the rotation in the first crystal's Cartesian frame
 */
public record Misorientation(OrientedLattice first, OrientedLattice second, Rotation rotation) {

    private static final double SAME_ANGLE = 1e-7;
    private static final int LARGEST_INDEX = 5;

    /** Cells of one kind agree to this share of their edges. */
    private static final double SAME_CELL = 0.01;

    /**
     * Compares two crystals.
     *
     * @param first the crystal to start from
     * @param second the crystal to lead to
     * @return the rotation by the smallest angle
     */
    public static Misorientation between(OrientedLattice first, OrientedLattice second) {
        List<Rotation> all = equivalents(first, second);
        double least = all.stream().mapToDouble(Rotation::angle).min().orElseThrow();
        Rotation chosen = all.stream()
                .filter(r -> r.angle() <= least + SAME_ANGLE)
                .min(Comparator.comparingInt((Rotation r) -> negatives(indices(first, r)))
                        .thenComparing(r -> indices(first, r), Misorientation::largestFirst))
                .orElseThrow();
        return new Misorientation(first, second, chosen);
    }

    private static List<Rotation> equivalents(OrientedLattice first, OrientedLattice second) {
        Rotation raw = first.orientation()
                .rotation()
                .inverse()
                .after(second.orientation().rotation());
        List<Rotation> own = first.symmetry();
        return second.symmetry().stream()
                .map(raw::after)
                .flatMap(r -> own.stream().map(s -> s.inverse().after(r)))
                .toList();
    }

    /** Every rotation from the first crystal to the second that symmetry cannot tell from this one. */
    List<Rotation> equivalents() {
        return equivalents(first, second);
    }

    /** The axis in fractional coordinates, of unit length as the crystal's edges count it, rounded so that ties are ties. */
    private static Vector3 indices(OrientedLattice crystal, Rotation r) {
        Vector3 v = crystal.lattice().basis().inverse().times(r.axis()).normalize();
        return new Vector3(Math.rint(1e6 * v.x()), Math.rint(1e6 * v.y()), Math.rint(1e6 * v.z()));
    }

    private static int negatives(Vector3 v) {
        return (v.x() < 0 ? 1 : 0) + (v.y() < 0 ? 1 : 0) + (v.z() < 0 ? 1 : 0);
    }

    private static int largestFirst(Vector3 a, Vector3 b) {
        int c = Double.compare(b.x(), a.x());
        c = c != 0 ? c : Double.compare(b.y(), a.y());
        return c != 0 ? c : Double.compare(b.z(), a.z());
    }

    /**
     * Whether the two are crystals of one kind.
     *
     * @return true if their Laue classes are the same and their cells nearly
     */
    public boolean isOfOneKind() {
        return first.isAlike(second, SAME_CELL);
    }

    /**
     * The angle.
     *
     * @return in radians, 0 to π
     */
    public double angle() {
        return rotation.angle();
    }

    /**
     * The axis about which the angle is counted right-handed.
     *
     * @return a unit vector in the first crystal's Cartesian frame; Z when the angle is 0
     */
    public Vector3 axis() {
        return rotation.axis();
    }

    /**
     * The lattice direction of the first crystal nearest to the axis, with indices up to 5.
     *
     * @return the direction and how far the axis is off it
     */
    public PlaneNormal.Direction nearestDirection() {
        Orientation axisUp = new Orientation(Rotation.between(axis(), Vector3.Z));
        Uvw uvw = axisUp.nearestZone(first.lattice(), LARGEST_INDEX);
        return new PlaneNormal.Direction(uvw, axisUp.lean(first.lattice(), uvw));
    }

    /**
     * Angle and axis for a person.
     *
     * @return for example {@code 60.00° about [1 1 1]}, with how far the axis is off where that is 0.1° or more
     */
    public String text() {
        PlaneNormal.Direction direction = nearestDirection();
        double off = Math.toDegrees(direction.angle());
        return String.format(Locale.ROOT, "%.2f° about [%s]", Math.toDegrees(angle()), direction.uvw())
                + (off < 0.1 ? "" : String.format(Locale.ROOT, ", %.1f° off", off));
    }
}
