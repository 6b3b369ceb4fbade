package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.symmetry.SymmetryOperation;
import java.util.ArrayList;
import java.util.Comparator;
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
        for (Uvw zone : all(largestIndex)) {
            if (!taken.contains(zone)) {
                different.add(zone);
                for (SymmetryOperation rotation : rotations) {
                    taken.add(rotation.apply(zone));
                }
            }
        }
        return different;
    }

    /** All directions with indices up to a largest one, without common divisor, smallest indices first. */
    static List<Uvw> all(int largestIndex) {
        List<Uvw> all = new ArrayList<>();
        for (int u = -largestIndex; u <= largestIndex; u++) {
            for (int v = -largestIndex; v <= largestIndex; v++) {
                for (int w = -largestIndex; w <= largestIndex; w++) {
                    Uvw zone = new Uvw(u, v, w);
                    if (!zone.isZero() && zone.reduced().equals(zone)) {
                        all.add(zone);
                    }
                }
            }
        }
        all.sort(Comparator.comparingInt(Uvw::largestIndex)
                .thenComparingInt(z -> Math.abs(z.u()) + Math.abs(z.v()) + Math.abs(z.w()))
                .thenComparingInt(ZoneCatalogue::negatives)
                .thenComparing(Comparator.<Uvw>naturalOrder().reversed()));
        return all;
    }

    private static int negatives(Uvw z) {
        return (z.u() < 0 ? 1 : 0) + (z.v() < 0 ? 1 : 0) + (z.w() < 0 ? 1 : 0);
    }
}
