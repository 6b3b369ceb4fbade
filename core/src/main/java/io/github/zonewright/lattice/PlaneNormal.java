package io.github.zonewright.lattice;

import io.github.zonewright.geometry.Vector3;
import java.util.Comparator;
import java.util.List;
import java.util.function.ToDoubleFunction;
import java.util.stream.IntStream;
import java.util.stream.Stream;

/**
 * The direction of low indices nearest to the normal of a plane, and the plane whose normal is nearest to a direction.
 * The two have the same indices in a cubic lattice only.
 *
 * <p>Worked number: in a tetragonal lattice with c = 2a the normal of (1 0 2) is along [1 0 0.5], so [2 0 1] exactly.
 *
 * <p>Known limit: all indices up to the largest are tried, (2n + 1)³ of them.
 */
public final class PlaneNormal {

    private static final int MOST = 30;

    /** Angles this near, in radians, are one; the lower indices then win. */
    private static final double SAME_ANGLE = 1e-9;

    private PlaneNormal() {}

    /**
     * A direction and how far it is off the normal that was asked for.
     *
     * @param uvw the direction, without common divisor
     * @param angle the angle in radians, 0 to π/2
     */
    public record Direction(Uvw uvw, double angle) {}

    /**
     * A set of planes and how far its normal is off the direction that was asked for.
     *
     * @param hkl the planes, without common divisor
     * @param angle the angle in radians, 0 to π/2
     */
    public record Plane(Hkl hkl, double angle) {}

    /**
     * The direction nearest to the normal of a plane.
     *
     * @param lattice the lattice
     * @param plane the plane, other than 0 0 0
     * @param largestIndex the largest index to try, 1 to 30
     * @return the nearest direction; of several equally near the one of lowest indices
     * @throws IllegalArgumentException if the plane is 0 0 0 or the largest index out of range
     */
    public static Direction nearestDirection(Lattice lattice, Hkl plane, int largestIndex) {
        requireSome(plane.isZero(), "plane", plane, largestIndex);
        Vector3 normal = lattice.reciprocal().vector(plane);
        Uvw best = nearest(largestIndex, uvw -> lattice.vector(uvw).angleTo(normal));
        return new Direction(best, lattice.vector(best).angleTo(normal));
    }

    /**
     * The plane whose normal is nearest to a direction.
     *
     * @param lattice the lattice
     * @param direction the direction, other than [0 0 0]
     * @param largestIndex the largest index to try, 1 to 30
     * @return the nearest plane; of several equally near the one of lowest indices
     * @throws IllegalArgumentException if the direction is [0 0 0] or the largest index out of range
     */
    public static Plane nearestPlane(Lattice lattice, Uvw direction, int largestIndex) {
        requireSome(direction.isZero(), "direction", direction, largestIndex);
        Vector3 wanted = lattice.vector(direction);
        ReciprocalLattice reciprocal = lattice.reciprocal();
        Uvw best = nearest(
                largestIndex,
                i -> reciprocal.vector(new Hkl(i.u(), i.v(), i.w())).angleTo(wanted));
        Hkl plane = new Hkl(best.u(), best.v(), best.w());
        return new Plane(plane, reciprocal.vector(plane).angleTo(wanted));
    }

    private static void requireSome(boolean zero, String what, Object indices, int largestIndex) {
        if (zero) {
            throw new IllegalArgumentException(what + " " + indices + ": expected an index other than 0");
        }
        if (largestIndex < 1 || largestIndex > MOST) {
            throw new IllegalArgumentException("largest index " + largestIndex + ", expected 1 to " + MOST);
        }
    }

    private static Uvw nearest(int n, ToDoubleFunction<Uvw> angle) {
        List<Integer> range = IntStream.rangeClosed(-n, n).boxed().toList();
        Stream<Uvw> all = range.stream()
                .flatMap(u -> range.stream().flatMap(v -> range.stream().map(w -> new Uvw(u, v, w))));
        return all.filter(i -> !i.isZero() && i.reduced().equals(i))
                .min(Comparator.comparingDouble((Uvw i) -> Math.rint(angle.applyAsDouble(i) / SAME_ANGLE))
                        .thenComparingInt(PlaneNormal::size)
                        .thenComparing(Comparator.reverseOrder()))
                .orElseThrow();
    }

    private static int size(Uvw i) {
        return i.u() * i.u() + i.v() * i.v() + i.w() * i.w();
    }
}
