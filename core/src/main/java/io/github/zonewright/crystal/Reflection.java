package io.github.zonewright.crystal;

import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;

/**
 * A reflection of a crystal.
 *
 * @param hkl the indices
 * @param g the reciprocal-lattice vector in 1/Å, crystal Cartesian frame
 * @param d the spacing in Å
 * @param f the structure factor in Å, without γ
 */
public record Reflection(Hkl hkl, Vector3 g, double d, StructureFactor f) {

    /**
     * The modulus of the structure factor.
     *
     * @return |F| in Å
     */
    public double amplitude() {
        return f.amplitude();
    }
}
