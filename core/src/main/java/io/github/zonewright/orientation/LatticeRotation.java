package io.github.zonewright.orientation;

import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.symmetry.SpaceGroup;
import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;

/**
 * Whether a rotation carries a lattice into itself, as every operation of the holohedry does, exactly or nearly.
 *
 * <p>Two crystals turned by such a rotation that is no symmetry of the crystal are merohedral twins: all their
 * reciprocal-lattice points coincide. Where the lattice has the symmetry only nearly, as an orthorhombic one with b almost
 * a√3, they are pseudo-merohedral. Source: ODC, "merohedry" and "pseudo-merohedry".
 */
public final class LatticeRotation {

    /** How far a measured rotation may be off, in radians: the leans of two solutions are hardly known better. */
    private static final double TOLERANCE = Math.toRadians(3);

    /** Elements of an operation in a centred cell are multiples of a half or a third. */
    private static final int DENOMINATOR = 6;

    private static final double LARGEST_STRAIN = 0.03;

    private LatticeRotation() {}

    /**
     * The strain that is needed for a rotation to carry a lattice into itself.
     *
     * @param rotation a rotation in the crystal's Cartesian frame, known to some 3°
     * @param lattice the cell
     * @param group the group in the setting of that cell, for its centring
     * @return 0 (but for rounding) for an operation of the holohedry, up to 0.03 where the lattice has it nearly; empty
     *     when the rotation carries the lattice elsewhere
     */
    public static OptionalDouble strain(Rotation rotation, Lattice lattice, SpaceGroup group) {
        Matrix3 a = lattice.basis();
        Matrix3 inverse = a.inverse();
        Matrix3 whole = rounded(inverse.times(rotation.matrix()).times(a));
        if (Math.abs(Math.abs(whole.determinant()) - 1) > 1e-9 || !keeps(whole, group)) {
            return OptionalDouble.empty();
        }
        // B = A·M·A⁻¹ is a rotation but for the strain: BᵀB is the unit matrix, and RᵀB a turn by the rotation's own
        // error.
        Matrix3 b = a.times(whole).times(inverse);
        double strain = b.transpose().times(b).distanceTo(Matrix3.IDENTITY) / 2;
        double off = rotation.matrix().transpose().times(b).distanceTo(Matrix3.IDENTITY);
        return strain <= LARGEST_STRAIN && off < TOLERANCE + 2 * strain
                ? OptionalDouble.of(strain)
                : OptionalDouble.empty();
    }

    private static Matrix3 rounded(Matrix3 m) {
        return Matrix3.ofRows(rounded(m.row(0)), rounded(m.row(1)), rounded(m.row(2)));
    }

    private static Vector3 rounded(Vector3 v) {
        return new Vector3(
                Math.rint(DENOMINATOR * v.x()) / DENOMINATOR,
                Math.rint(DENOMINATOR * v.y()) / DENOMINATOR,
                Math.rint(DENOMINATOR * v.z()) / DENOMINATOR);
    }

    /** Whether the edges and the centring vectors are carried to vectors of the lattice. */
    private static boolean keeps(Matrix3 m, SpaceGroup group) {
        List<Vector3> vectors = new ArrayList<>(group.centringVectors());
        vectors.addAll(List.of(Vector3.X, Vector3.Y, Vector3.Z));
        return vectors.stream().allMatch(v -> {
            Vector3 image = m.times(v);
            return group.centringVectors().stream().anyMatch(c -> isWhole(image.minus(c)));
        });
    }

    private static boolean isWhole(Vector3 v) {
        return Math.abs(v.x() - Math.rint(v.x())) < 1e-6
                && Math.abs(v.y() - Math.rint(v.y())) < 1e-6
                && Math.abs(v.z() - Math.rint(v.z())) < 1e-6;
    }
}
