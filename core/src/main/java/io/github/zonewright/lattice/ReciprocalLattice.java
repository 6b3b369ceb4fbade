package io.github.zonewright.lattice;

import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Vector3;

/**
 * A reciprocal lattice, in 1/Å without 2π: |g| = 1/d.
 *
 * @param basis the matrix B whose columns are a*, b*, c* in the crystal's Cartesian frame: g = B·(h, k, l)
 */
public record ReciprocalLattice(Matrix3 basis) {

    /**
     * Checks the basis.
     *
     * @throws IllegalArgumentException if a*, b*, c* are not finite or not right-handed, so span no cell
     */
    public ReciprocalLattice {
        double volume = basis.determinant();
        if (!(volume > 0) || Double.isInfinite(volume)) {
            throw new IllegalArgumentException(
                    "volume of the reciprocal cell a*·(b* × c*): " + volume + " 1/Å³, expected finite and above 0");
        }
    }

    /**
     * The reciprocal-lattice vector.
     *
     * @param hkl the indices
     * @return ha* + kb* + lc* in 1/Å, crystal Cartesian frame
     */
    public Vector3 vector(Hkl hkl) {
        return basis.times(hkl.h(), hkl.k(), hkl.l());
    }

    /**
     * The spacing of the planes.
     *
     * @param hkl the indices
     * @return d = 1/|g| in Å; infinite for 000
     */
    public double spacing(Hkl hkl) {
        return 1 / vector(hkl).norm();
    }

    /**
     * The angle between two plane normals.
     *
     * @param first one set of planes
     * @param second the other
     * @return the angle in radians, 0 to π
     */
    public double angle(Hkl first, Hkl second) {
        return vector(first).angleTo(vector(second));
    }

    /**
     * The indices, in general fractional, of a reciprocal vector.
     *
     * @param g the vector in 1/Å, crystal Cartesian frame
     * @return h, k and l as components
     */
    public Vector3 indices(Vector3 g) {
        return basis.inverse().times(g);
    }

    /**
     * The volume of the reciprocal cell.
     *
     * @return the volume in 1/Å³
     */
    public double volume() {
        return basis.determinant();
    }
}
