package io.github.zonewright.crystal;

/**
 * Mean-square displacements of an atom, which damp its scattering (Debye–Waller factor).
 *
 * <p>Source: International Tables for Crystallography D, section 1.9.2; Trueblood et al., Acta Cryst. A52 (1996) 770.
 */
public sealed interface Displacement {

    /** An atom at rest. */
    Displacement NONE = new Isotropic(0);

    /**
     * The isotropic displacement of a B value.
     *
     * @param b B = 8π²U in Å²
     * @return the displacement
     * @throws IllegalArgumentException if the value is not finite
     */
    static Displacement ofB(double b) {
        return new Isotropic(b / (8 * Math.PI * Math.PI));
    }

    /**
     * The isotropic displacement of a U value.
     *
     * @param u U = ⟨u²⟩ in Å²
     * @return the displacement
     * @throws IllegalArgumentException if the value is not finite
     */
    static Displacement ofU(double u) {
        return new Isotropic(u);
    }

    /**
     * The same displacement in every direction: exp(−8π²U s²).
     *
     * @param u U = ⟨u²⟩ in Å²; a refinement may leave it slightly negative
     */
    record Isotropic(double u) implements Displacement {

        /**
         * Checks the value.
         *
         * @throws IllegalArgumentException if it is not finite
         */
        public Isotropic {
            requireFinite(u);
        }

        /**
         * The B value.
         *
         * @return B = 8π²U in Å²
         */
        public double b() {
            return 8 * Math.PI * Math.PI * u;
        }
    }

    /**
     * The displacement tensor U of the core dictionary of CIF: exp(−2π² Σ hᵢ hⱼ aᵢ* aⱼ* Uᵢⱼ).
     *
     * @param u11 component along a*, a* in Å²
     * @param u22 component along b*, b* in Å²
     * @param u33 component along c*, c* in Å²
     * @param u12 component along a*, b* in Å²
     * @param u13 component along a*, c* in Å²
     * @param u23 component along b*, c* in Å²
     */
    record Anisotropic(double u11, double u22, double u33, double u12, double u13, double u23) implements Displacement {

        /**
         * Checks the values.
         *
         * @throws IllegalArgumentException if one is not finite
         */
        public Anisotropic {
            for (double u : new double[] {u11, u22, u33, u12, u13, u23}) {
                requireFinite(u);
            }
        }
    }

    private static void requireFinite(double u) {
        if (!Double.isFinite(u)) {
            throw new IllegalArgumentException("mean-square displacement: " + u + " Å², expected a finite number");
        }
    }
}
