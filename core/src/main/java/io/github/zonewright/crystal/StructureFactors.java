package io.github.zonewright.crystal;

import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.ReciprocalLattice;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.symmetry.SymmetryOperation;
import java.util.HashMap;
import java.util.List;
import java.util.Map;

/**
 * Structure factors of a crystal for electrons: F(h) = Σ o·f(s)·T(h)·exp(2πi h·x) over the atoms of the cell, with
 * occupancy o, scattering factor f and Debye–Waller factor T.
 *
 * <p>F is in Å and has no relativistic factor γ. Source: International Tables for Crystallography C, section 4.3.1.
 */
public final class StructureFactors {

    /** h²/(2π m₀ e) in V·Å²: the potential V(h) = 47.87801·F(h)/Ω (International Tables C, eq. 4.3.1.31). */
    public static final double POTENTIAL_PER_FACTOR = 47.87801;

    /**
     * The relative uncertainty of extinction distances that is stated with them: that of free-atom factors against the
     * newer published lists. Low orders of light or ionic crystals, and older lists for heavy elements, are up to 20 % off.
     */
    public static final double EXTINCTION_DISTANCE_UNCERTAINTY = 0.12;

    /** How far below the mean inner potential of independent atoms measured ones lie at most, as a fraction. */
    private static final double LARGEST_DROP_OF_POTENTIAL = 0.20;

    /**
     * Between what the true value is to be expected.
     *
     * @param low the least
     * @param high the most
     */
    public record Bounds(double low, double high) {}

    private final Lattice lattice;
    private final ReciprocalLattice reciprocal;
    private final int[] numbers;
    private final int[] numberOfAtom;
    private final double[] positions;
    private final double[] occupancies;
    private final double[] isotropic;
    private final double[][] anisotropic;

    private StructureFactors(Crystal crystal) {
        lattice = crystal.lattice();
        reciprocal = lattice.reciprocal();
        List<UnitCellAtom> atoms = crystal.unitCellAtoms();
        numbers = atoms.stream()
                .mapToInt(a -> a.site().element().number())
                .distinct()
                .toArray();
        int n = atoms.size();
        numberOfAtom = new int[n];
        positions = new double[3 * n];
        occupancies = new double[n];
        isotropic = new double[n];
        anisotropic = new double[n][];
        Map<AtomSite, double[]> tensors = new HashMap<>();
        for (int i = 0; i < n; i++) {
            UnitCellAtom atom = atoms.get(i);
            while (numbers[numberOfAtom[i]] != atom.site().element().number()) {
                numberOfAtom[i]++;
            }
            Vector3 p = atom.position();
            positions[3 * i] = 2 * Math.PI * p.x();
            positions[3 * i + 1] = 2 * Math.PI * p.y();
            positions[3 * i + 2] = 2 * Math.PI * p.z();
            occupancies[i] = atom.site().occupancy();
            if (atom.site().displacement() instanceof Displacement.Isotropic iso) {
                isotropic[i] = iso.b();
            } else if (atom.site().displacement() instanceof Displacement.Anisotropic aniso) {
                anisotropic[i] = turned(
                        tensors.computeIfAbsent(atom.site(), site -> symmetric(beta(aniso), crystal, site)),
                        atom.operation());
            }
        }
    }

    /**
     * Prepares the structure factors of a crystal.
     *
     * @param crystal the crystal
     * @return its structure factors
     */
    public static StructureFactors of(Crystal crystal) {
        return new StructureFactors(crystal);
    }

    /** β = 2π² aᵢ* aⱼ* Uᵢⱼ as β11 β22 β33 β12 β13 β23, so that T(h) = exp(−Σ βᵢⱼ hᵢ hⱼ). */
    private double[] beta(Displacement.Anisotropic u) {
        double a = reciprocal.basis().column(0).norm();
        double b = reciprocal.basis().column(1).norm();
        double c = reciprocal.basis().column(2).norm();
        double k = 2 * Math.PI * Math.PI;
        return new double[] {
            k * a * a * u.u11(), k * b * b * u.u22(), k * c * c * u.u33(),
            k * a * b * u.u12(), k * a * c * u.u13(), k * b * c * u.u23()
        };
    }

    /** The mean of the tensor over the symmetry of its place, which a file may state with too few digits or not at all. */
    private static double[] symmetric(double[] beta, Crystal crystal, AtomSite site) {
        double[] mean = new double[6];
        List<SymmetryOperation> stabiliser = crystal.stabiliser(site);
        for (SymmetryOperation operation : stabiliser) {
            double[] image = turned(beta, operation);
            for (int k = 0; k < mean.length; k++) {
                mean[k] += image[k] / stabiliser.size();
            }
        }
        return mean;
    }

    /** The tensor of the image of an atom: T′(h) = T(h·W). */
    private static double[] turned(double[] beta, SymmetryOperation operation) {
        double[] image = new double[6];
        int[][] pairs = {{0, 0}, {1, 1}, {2, 2}, {0, 1}, {0, 2}, {1, 2}};
        double[][] full = {{beta[0], beta[3], beta[4]}, {beta[3], beta[1], beta[5]}, {beta[4], beta[5], beta[2]}};
        for (int p = 0; p < 6; p++) {
            for (int a = 0; a < 3; a++) {
                for (int b = 0; b < 3; b++) {
                    image[p] += operation.rotation(pairs[p][0], a) * operation.rotation(pairs[p][1], b) * full[a][b];
                }
            }
        }
        return image;
    }

    /**
     * The structure factor of a reflection.
     *
     * @param hkl the reflection
     * @return F in Å
     */
    public StructureFactor at(Hkl hkl) {
        double s = reciprocal.vector(hkl).norm() / 2;
        double[] f = new double[numbers.length];
        for (int i = 0; i < f.length; i++) {
            f[i] = ElectronScattering.factor(numbers[i], s * s);
        }
        int h = hkl.h();
        int k = hkl.k();
        int l = hkl.l();
        double re = 0;
        double im = 0;
        for (int i = 0; i < occupancies.length; i++) {
            double[] b = anisotropic[i];
            double exponent = b == null
                    ? isotropic[i] * s * s
                    : b[0] * h * h + b[1] * k * k + b[2] * l * l + 2 * (b[3] * h * k + b[4] * h * l + b[5] * k * l);
            double weight = occupancies[i] * f[numberOfAtom[i]] * (exponent == 0 ? 1 : Math.exp(-exponent));
            double phase = h * positions[3 * i] + k * positions[3 * i + 1] + l * positions[3 * i + 2];
            re += weight * Math.cos(phase);
            im += weight * Math.sin(phase);
        }
        return new StructureFactor(re, im);
    }

    /**
     * The two-beam extinction distance ξ = πΩ·cosθ/(λγ|F|), θ the Bragg angle.
     *
     * <p>Free-atom factors leave it uncertain: it agrees with the newer published lists within some 12 %, and older
     * lists lie up to 20 % off for heavy elements. Low orders and light or ionic crystals suffer most from bonding.
     *
     * @param hkl the reflection
     * @param beam the beam
     * @return ξ in Å; infinite where F vanishes
     * @throws IllegalArgumentException if hkl is 0 0 0 or the beam cannot meet the Bragg condition (λ &gt; 2d)
     */
    public double extinctionDistance(Hkl hkl, Beam beam) {
        double sine = beam.wavelength() * reciprocal.vector(hkl).norm() / 2;
        if (hkl.isZero() || sine > 1) {
            throw new IllegalArgumentException("extinction distance of " + hkl + " at " + beam.kilovolts()
                    + " kV: expected a reflection other than 0 0 0 with 2d of at least the wavelength");
        }
        double amplitude = at(hkl).amplitude();
        double cosine = Math.sqrt(1 - sine * sine);
        return Math.PI * lattice.volume() * cosine / (beam.wavelength() * beam.gamma() * amplitude);
    }

    /**
     * Between what the extinction distance is to be expected: {@value #EXTINCTION_DISTANCE_UNCERTAINTY} of it to either
     * side.
     *
     * @param hkl the reflection
     * @param beam the beam
     * @return the bounds in Å; both infinite where F vanishes
     * @throws IllegalArgumentException as {@link #extinctionDistance} does
     */
    public Bounds extinctionDistanceBounds(Hkl hkl, Beam beam) {
        double distance = extinctionDistance(hkl, beam);
        return new Bounds(
                distance * (1 - EXTINCTION_DISTANCE_UNCERTAINTY), distance * (1 + EXTINCTION_DISTANCE_UNCERTAINTY));
    }

    /**
     * Between what a measured mean inner potential is to be expected: from 20 % below that of independent atoms, as bonds
     * draw the outer electrons in, to that itself.
     *
     * @return the bounds in V
     */
    public Bounds meanInnerPotentialBounds() {
        double potential = meanInnerPotential();
        return new Bounds(potential * (1 - LARGEST_DROP_OF_POTENTIAL), potential);
    }

    /**
     * The mean inner potential V₀ = 47.878·F(000)/Ω of independent atoms.
     *
     * <p>This is an upper bound: bonding draws the outer electrons in, and measured values lie 5 to 20 % below it
     * (silicon: 13.9 V here, 12.1 to 12.6 V measured).
     *
     * @return V₀ in V
     */
    public double meanInnerPotential() {
        return POTENTIAL_PER_FACTOR * at(new Hkl(0, 0, 0)).re() / lattice.volume();
    }
}
