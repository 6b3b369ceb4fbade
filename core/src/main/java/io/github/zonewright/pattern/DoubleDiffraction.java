package io.github.zonewright.pattern;

import io.github.zonewright.lattice.Hkl;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import java.util.TreeSet;

/**
 * Spots that a crystal forbids and that yet are seen, since a beam diffracted by one set of planes is diffracted again by
 * another: where g is the sum of two reflections that are excited.
 *
 * <p>Worked example: 002 of silicon along [110], as 1 −1 1 plus −1 1 1; along [001] no two reflections add up to 200.
 * Reflections that the centring forbids are never reached. Source: Edington, Practical Electron Microscopy in Materials
 * Science; Williams and Carter, Transmission Electron Microscopy (both named from memory).
 *
 * <p>Known limits: once scattered twice, within one crystal; nothing is said about intensities.
 */
public final class DoubleDiffraction {
    private DoubleDiffraction() {}

    /**
     * The reflections of the zero layer that two excited ones reach together.
     *
     * @param excited the reflections of the zero layer that are seen by themselves
     * @return sums of two of them that are not among them, without the direct beam, in ascending order
     */
    public static List<Hkl> reached(List<Hkl> excited) {
        Set<Hkl> seen = new HashSet<>(excited);
        Set<Hkl> sums = new TreeSet<>(Comparator.<Hkl>naturalOrder());
        for (Hkl first : excited) {
            for (Hkl second : excited) {
                Hkl sum = first.plus(second);
                if (!sum.isZero() && !seen.contains(sum)) {
                    sums.add(sum);
                }
            }
        }
        return List.copyOf(sums);
    }
}
