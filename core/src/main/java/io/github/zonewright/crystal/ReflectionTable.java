package io.github.zonewright.crystal;

import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.ReciprocalLattice;
import io.github.zonewright.symmetry.SpaceGroup;
import io.github.zonewright.symmetry.SymmetryOperation;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;

/**
 * The reflections of a crystal up to some |g|, 0 0 0 left out, by ascending |g|, members of a family together.
 *
 * <p>Reflections that the space group forbids are left out unless asked for. Those that vanish by the atoms alone, such
 * as 222 of diamond, are there with |F| = 0.
 */
public final class ReflectionTable {

    private static final int MOST_REFLECTIONS = 2_000_000;

    private final double gMax;
    private final List<ReflectionFamily> families;
    private final List<Reflection> reflections;

    private ReflectionTable(double gMax, List<ReflectionFamily> families) {
        this.gMax = gMax;
        this.families = List.copyOf(families);
        reflections = families.stream().flatMap(f -> f.reflections().stream()).toList();
    }

    /**
     * The allowed reflections up to a length.
     *
     * @param crystal the crystal
     * @param gMax the largest |g| in 1/Å, above 0
     * @return the table
     * @throws IllegalArgumentException if gMax is not above 0 or holds more than some two million reflections
     */
    public static ReflectionTable ofLength(Crystal crystal, double gMax) {
        return make(crystal, gMax, false);
    }

    /**
     * The allowed reflections down to a spacing.
     *
     * @param crystal the crystal
     * @param dMin the smallest d in Å, above 0
     * @return the table
     * @throws IllegalArgumentException if dMin is not above 0 or holds more than some two million reflections
     */
    public static ReflectionTable ofSpacing(Crystal crystal, double dMin) {
        return make(crystal, 1 / dMin, false);
    }

    /**
     * All reflections up to a length, those that the space group forbids too.
     *
     * @param crystal the crystal
     * @param gMax the largest |g| in 1/Å, above 0
     * @return the table
     * @throws IllegalArgumentException if gMax is not above 0 or holds more than some two million reflections
     */
    public static ReflectionTable withAbsent(Crystal crystal, double gMax) {
        return make(crystal, gMax, true);
    }

    private static ReflectionTable make(Crystal crystal, double gMax, boolean absentToo) {
        double expected =
                4.0 / 3 * Math.PI * gMax * gMax * gMax * crystal.lattice().volume();
        if (!(gMax > 0 && expected <= MOST_REFLECTIONS)) {
            throw new IllegalArgumentException("reflections of " + crystal.name() + " up to |g| = " + gMax
                    + " 1/Å: some " + Math.round(expected) + ", expected |g| above 0 and at most " + MOST_REFLECTIONS);
        }
        SpaceGroup group = crystal.spaceGroup();
        ReciprocalLattice reciprocal = crystal.lattice().reciprocal();
        StructureFactors factors = StructureFactors.of(crystal);
        List<ReflectionFamily> families = new ArrayList<>();
        double limit = gMax * (1 + 1e-12);
        int hMax = (int) Math.floor(limit * crystal.lattice().a());
        int kMax = (int) Math.floor(limit * crystal.lattice().b());
        int lMax = (int) Math.floor(limit * crystal.lattice().c());
        Set<Hkl> done = new HashSet<>();
        for (int h = hMax; h >= -hMax; h--) {
            for (int k = kMax; k >= -kMax; k--) {
                for (int l = lMax; l >= -lMax; l--) {
                    Hkl hkl = new Hkl(h, k, l);
                    if (hkl.isZero()
                            || done.contains(hkl)
                            || reciprocal.vector(hkl).norm() > limit) {
                        continue;
                    }
                    boolean absent = group.isSystematicallyAbsent(hkl);
                    Map<Hkl, StructureFactor> members = members(hkl, absent, group, factors);
                    done.addAll(members.keySet());
                    if (!absent || absentToo) {
                        families.add(family(members, absent, reciprocal));
                    }
                }
            }
        }
        families.sort(Comparator.comparingDouble(ReflectionFamily::d)
                .reversed()
                .thenComparing(ReflectionFamily::representative, Comparator.reverseOrder()));
        return new ReflectionTable(gMax, families);
    }

    /** Every equivalent, from F(h·W) = F(h)·exp(−2πi h·w) and F(−h) its conjugate. */
    private static Map<Hkl, StructureFactor> members(
            Hkl first, boolean absent, SpaceGroup group, StructureFactors factors) {
        StructureFactor f = absent ? new StructureFactor(0, 0) : factors.at(first);
        Map<Hkl, StructureFactor> members = new HashMap<>();
        for (SymmetryOperation operation : group.operations()) {
            Hkl image = operation.apply(first);
            if (!members.containsKey(image)) {
                StructureFactor turned = f.turned(-operation.phaseShift(first));
                members.put(image, turned);
                members.putIfAbsent(image.negate(), turned.conjugate());
            }
        }
        return members;
    }

    private static ReflectionFamily family(
            Map<Hkl, StructureFactor> members, boolean absent, ReciprocalLattice reciprocal) {
        List<Reflection> reflections = new ArrayList<>();
        members.forEach((hkl, factor) -> {
            Vector3 g = reciprocal.vector(hkl);
            reflections.add(new Reflection(hkl, g, 1 / g.norm(), factor));
        });
        reflections.sort(Comparator.comparing(Reflection::hkl).reversed());
        Reflection first = reflections.get(0);
        return new ReflectionFamily(first.hkl(), first.d(), first.amplitude(), absent, reflections);
    }

    /**
     * The largest |g| of the table.
     *
     * @return the limit in 1/Å
     */
    public double gMax() {
        return gMax;
    }

    /**
     * Every reflection, family by family.
     *
     * @return the reflections by ascending |g|
     */
    public List<Reflection> reflections() {
        return reflections;
    }

    /**
     * The families of equivalent reflections.
     *
     * @return the families by ascending |g|
     */
    public List<ReflectionFamily> families() {
        return families;
    }
}
