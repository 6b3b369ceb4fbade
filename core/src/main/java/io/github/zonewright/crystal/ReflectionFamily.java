package io.github.zonewright.crystal;

import io.github.zonewright.lattice.Hkl;
import java.util.List;

/**
 * The reflections that the Laue class makes equivalent: one d and one |F|.
 *
 * @param representative the member with the largest h, then k, then l
 * @param d the spacing in Å
 * @param amplitude |F| in Å, without γ
 * @param absent whether the space group forbids it
 * @param reflections every member, Friedel mates included
 */
public record ReflectionFamily(
        Hkl representative, double d, double amplitude, boolean absent, List<Reflection> reflections) {

    /** Copies the list. */
    public ReflectionFamily {
        reflections = List.copyOf(reflections);
    }

    /**
     * The number of members, as for a powder line.
     *
     * @return the multiplicity
     */
    public int multiplicity() {
        return reflections.size();
    }
}
