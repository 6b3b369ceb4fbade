package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.symmetry.SymmetryOperation;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Set;

/**
 * The zone axes of a crystal that differ from each other: one of each set that the proper rotations of the Laue class
 * carry into each other. A zone and its opposite stay apart unless such a rotation joins them, since their nets are mirror
 * images of each other.
 */
final class ZoneCatalogue {

    private ZoneCatalogue() {}

    /** All different zones with indices up to a largest one, smallest indices first. */
    static List<Uvw> zones(Crystal crystal, int largestIndex) {
        List<SymmetryOperation> rotations = crystal.spaceGroup().properLaueRotations();
        Set<Uvw> taken = new HashSet<>();
        List<Uvw> different = new ArrayList<>();
        for (Uvw zone : Uvw.upTo(largestIndex)) {
            if (!taken.contains(zone)) {
                different.add(zone);
                for (SymmetryOperation rotation : rotations) {
                    taken.add(rotation.apply(zone));
                }
            }
        }
        return different;
    }
}
