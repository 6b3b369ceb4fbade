package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.Reflection;
import io.github.zonewright.crystal.ReflectionTable;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.ReciprocalLattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;

/** The structure factors of a crystal out to a largest |g|, looked up by indices, with the mean strength of each shell. */
final class ReflectionStrengths {

    /** Share of the mean strength at equal |g| that a node has at least, for double diffraction and dynamical exchange. */
    private static final double LEAST_SHARE = 0.03;

    /** |F| below this share of the largest counts as absent. */
    private static final double ABSENT = 1e-3;

    private static final int SHELLS = 24;

    private final Crystal crystal;
    private final Lattice lattice;
    private final ReciprocalLattice reciprocal;
    private final double wavelength;
    private final double inverseExtinctionPerAmplitude;
    private final double largestG;
    private final List<Reflection> allowed = new ArrayList<>();
    private final int[] reach = new int[3];
    private final Reflection[] box;
    private final double[] shellMean = new double[SHELLS];
    private final double[] x;
    private final double[] y;
    private final double[] z;
    private final double[] lnStrengths;

    ReflectionStrengths(Crystal crystal, Beam beam, double largestG) {
        this.crystal = crystal;
        this.lattice = crystal.lattice();
        this.reciprocal = lattice.reciprocal();
        this.wavelength = beam.wavelength();
        this.inverseExtinctionPerAmplitude = wavelength * beam.gamma() / (Math.PI * lattice.volume());
        this.largestG = largestG;
        ReflectionTable table = ReflectionTable.ofLength(crystal, largestG);
        double strongest = 0;
        for (Reflection r : table.reflections()) {
            strongest = Math.max(strongest, r.amplitude());
        }
        int[] counts = new int[SHELLS];
        for (Reflection r : table.reflections()) {
            if (r.amplitude() > ABSENT * strongest) {
                allowed.add(r);
                reach[0] = Math.max(reach[0], Math.abs(r.hkl().h()));
                reach[1] = Math.max(reach[1], Math.abs(r.hkl().k()));
                reach[2] = Math.max(reach[2], Math.abs(r.hkl().l()));
                int shell = shell(r.g().norm());
                shellMean[shell] += r.amplitude() * r.amplitude();
                counts[shell]++;
            }
        }
        box = new Reflection[(2 * reach[0] + 1) * (2 * reach[1] + 1) * (2 * reach[2] + 1)];
        allowed.forEach(r -> box[index(r.hkl())] = r);
        for (int i = 0; i < SHELLS; i++) {
            shellMean[i] = counts[i] > 0 ? shellMean[i] / counts[i] : i > 0 ? shellMean[i - 1] : 0;
        }
        for (int i = SHELLS - 2; i >= 0; i--) {
            shellMean[i] = shellMean[i] > 0 ? shellMean[i] : shellMean[i + 1];
        }
        x = allowed.stream().mapToDouble(r -> r.g().x()).toArray();
        y = allowed.stream().mapToDouble(r -> r.g().y()).toArray();
        z = allowed.stream().mapToDouble(r -> r.g().z()).toArray();
        lnStrengths =
                allowed.stream().mapToDouble(r -> Math.log(strength(r.hkl()))).toArray();
    }

    /** The place in the box of all indices that occur; only for those within its reach. */
    private int index(Hkl hkl) {
        return ((hkl.h() + reach[0]) * (2 * reach[1] + 1) + hkl.k() + reach[1]) * (2 * reach[2] + 1)
                + hkl.l()
                + reach[2];
    }

    private Reflection find(Hkl hkl) {
        boolean within =
                Math.abs(hkl.h()) <= reach[0] && Math.abs(hkl.k()) <= reach[1] && Math.abs(hkl.l()) <= reach[2];
        return within ? box[index(hkl)] : null;
    }

    private int shell(double g) {
        double share = g / largestG;
        return Math.min(SHELLS - 1, (int) (SHELLS * share * share));
    }

    Lattice lattice() {
        return lattice;
    }

    ReciprocalLattice reciprocal() {
        return reciprocal;
    }

    double wavelength() {
        return wavelength;
    }

    /** λγ/(πΩ): times |F| it is the inverse of the extinction distance, in 1/Å per Å. */
    double inverseExtinctionPerAmplitude() {
        return inverseExtinctionPerAmplitude;
    }

    double largestG() {
        return largestG;
    }

    /** The reflections that are not absent. */
    List<Reflection> reflections() {
        return Collections.unmodifiableList(allowed);
    }

    /** How many reflections are not absent. */
    int size() {
        return allowed.size();
    }

    /** One of them, by its number. */
    Reflection reflection(int number) {
        return allowed.get(number);
    }

    /** Its g along the crystal's Cartesian x in 1/Å, from an array of its own for those who look at all. */
    double x(int number) {
        return x[number];
    }

    /** The same along y. */
    double y(int number) {
        return y[number];
    }

    /** The same along z. */
    double z(int number) {
        return z[number];
    }

    /** The square of its |g|, in 1/Å². */
    double lengthSquared(int number) {
        return x[number] * x[number] + y[number] * y[number] + z[number] * z[number];
    }

    /** The logarithm of its {@link #strength}. */
    double lnStrength(int number) {
        return lnStrengths[number];
    }

    /** The least angle by which the crystal can be turned about a zone axis, or half a turn more, and look the same. */
    double shortestTurn(Uvw zone) {
        long order = crystal.spaceGroup().properLaueRotations().stream()
                .filter(r -> r.apply(zone).equals(zone))
                .count();
        return Math.PI / (order % 2 == 0 ? order / 2 : order);
    }

    boolean isAllowed(Hkl hkl) {
        return find(hkl) != null;
    }

    /** |F| in Å; 0 for an absent reflection. */
    double amplitude(Hkl hkl) {
        Reflection r = find(hkl);
        return r == null ? 0 : r.amplitude();
    }

    /** |F|² with the floor that double diffraction and dynamical exchange give every node, in Å². */
    double strength(Hkl hkl) {
        double f = amplitude(hkl);
        return f * f + LEAST_SHARE * shellMean[shell(reciprocal.vector(hkl).norm())];
    }
}
