package io.github.zonewright.calibration;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.ReflectionFamily;
import io.github.zonewright.crystal.ReflectionTable;
import io.github.zonewright.lattice.Hkl;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;

/**
 * The spacings of some crystals, made once and then asked often: which {hkl} have a measured d? Reflections that the space
 * group forbids are in it and marked, since many-beam diffraction may show them.
 */
public final class SpacingList {

    private final List<Candidate> all;

    private SpacingList(List<Candidate> all) {
        this.all = all;
    }

    /**
     * A family of planes that a measured spacing may be.
     *
     * @param crystal the crystal
     * @param hkl the member with the largest h, then k, then l
     * @param multiplicity number of equivalent reflections
     * @param d its spacing in Å
     * @param amplitude |F| in Å, without γ
     * @param absent whether the space group forbids it
     */
    public record Candidate(Crystal crystal, Hkl hkl, int multiplicity, double d, double amplitude, boolean absent) {

        /**
         * How far a measured spacing is off.
         *
         * @param measured the measured d in Å
         * @return (measured − d)/d
         */
        public double deviation(double measured) {
            return measured / d - 1;
        }
    }

    /**
     * The spacings of crystals.
     *
     * @param crystals the crystals
     * @param dMin smallest spacing in Å
     * @return the list
     * @throws IllegalArgumentException if dMin is not above 0 or there are more than some two million reflections
     */
    public static SpacingList of(List<Crystal> crystals, double dMin) {
        List<Candidate> all = new ArrayList<>();
        for (Crystal crystal : crystals) {
            for (ReflectionFamily family :
                    ReflectionTable.withAbsent(crystal, 1 / dMin).families()) {
                all.add(new Candidate(
                        crystal,
                        family.representative(),
                        family.multiplicity(),
                        family.d(),
                        family.amplitude(),
                        family.absent()));
            }
        }
        all.sort(Comparator.comparingDouble(Candidate::d));
        return new SpacingList(List.copyOf(all));
    }

    /**
     * The candidates for a spacing.
     *
     * @param d the measured spacing in Å
     * @param relativeTolerance how far off a candidate may be, as a part of its d, such as 0.02
     * @return the nearest first, allowed ones before forbidden ones
     * @throws IllegalArgumentException if the spacing is not above 0 or the tolerance negative
     */
    public List<Candidate> within(double d, double relativeTolerance) {
        if (!(d > 0) || !(relativeTolerance >= 0)) {
            throw new IllegalArgumentException("spacing " + d + " Å ± part " + relativeTolerance
                    + ": expected a spacing above 0 and a tolerance not negative");
        }
        return all.stream()
                .filter(c -> Math.abs(c.deviation(d)) <= relativeTolerance)
                .sorted(Comparator.comparing(Candidate::absent).thenComparing(c -> Math.abs(c.deviation(d))))
                .toList();
    }
}
