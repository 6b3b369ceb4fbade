package io.github.zonewright.orientation;

import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import java.util.ArrayList;
import java.util.List;

/**
 * The orientation of a crystal in the microscope: v_microscope = R · v_crystal, both frames Cartesian.
 *
 * @param rotation R
 */
public record Orientation(Rotation rotation) {

    /**
     * The orientation of a rotation matrix.
     *
     * @param matrix R, orthogonal with determinant +1
     * @return the orientation
     * @throws IllegalArgumentException if the matrix is no proper rotation
     */
    public static Orientation ofMatrix(Matrix3 matrix) {
        return new Orientation(Rotation.ofMatrix(matrix));
    }

    /**
     * The UB matrix of the CIF core dictionary: it takes (h, k, l) to the scattering vector in the microscope frame.
     *
     * @param lattice the crystal's lattice
     * @return R·B in 1/Å
     */
    public Matrix3 ub(Lattice lattice) {
        return rotation.matrix().times(lattice.reciprocal().basis());
    }

    /**
     * The scattering vector of a reflection.
     *
     * @param lattice the crystal's lattice
     * @param hkl the reflection
     * @return g in 1/Å, microscope frame
     */
    public Vector3 scatteringVector(Lattice lattice, Hkl hkl) {
        return rotation.apply(lattice.reciprocal().vector(hkl));
    }

    /**
     * The direction in the crystal that points to the electron source.
     *
     * @return a unit vector in the crystal's Cartesian frame
     */
    public Vector3 towardsSource() {
        return rotation.inverse().apply(Vector3.Z);
    }

    /**
     * How far a zone axis leans from the direction to the source.
     *
     * @param lattice the crystal's lattice
     * @param zone the zone axis
     * @return the angle in radians, 0 to π
     */
    public double lean(Lattice lattice, Uvw zone) {
        return rotation.apply(lattice.vector(zone)).angleTo(Vector3.Z);
    }

    /**
     * The zone axis nearest to the direction to the source, among those with small indices; of two equally near (to
     * 1e-9 rad) the one with smaller indices.
     *
     * @param lattice the crystal's lattice
     * @param largestIndex the largest index to consider, 1 to 20
     * @return the zone axis, without common divisor
     * @throws IllegalArgumentException if the largest index is out of range
     */
    public Uvw nearestZone(Lattice lattice, int largestIndex) {
        if (largestIndex < 1 || largestIndex > 20) {
            throw new IllegalArgumentException("largest zone index: " + largestIndex + ", expected 1 to 20");
        }
        Uvw best = new Uvw(0, 0, 1);
        double least = Double.POSITIVE_INFINITY;
        for (int size = 1; size <= largestIndex; size++) {
            for (Uvw zone : ofSize(size)) {
                double lean = lean(lattice, zone);
                if (lean < least - 1e-9) {
                    least = lean;
                    best = zone;
                }
            }
        }
        return best;
    }

    private static List<Uvw> ofSize(int size) {
        List<Uvw> found = new ArrayList<>();
        for (int u = -size; u <= size; u++) {
            for (int v = -size; v <= size; v++) {
                for (int w = -size; w <= size; w++) {
                    Uvw zone = new Uvw(u, v, w);
                    if (zone.largestIndex() == size && zone.reduced().equals(zone)) {
                        found.add(zone);
                    }
                }
            }
        }
        return found;
    }
}
