package io.github.zonewright.pattern;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Uvw;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Set;

/**
 * The zone axes along which a crystal shows its densest nets, one of each set that the Laue class makes equivalent, opposite
 * ones included: the pattern along −[uvw] is the mirror image of that along [uvw].
 *
 * <p>The area of a net's cell is the repeat of the lattice along the zone axis times the volume of the reciprocal cell, so
 * zones are ordered by that repeat, with the centring reckoned in. Worked number: face-centred cubic gives [110], [100],
 * [211], with repeats a/√2, a and a√6/2.
 */
public final class LowestZones {
    private static final int LARGEST_INDEX = 6;
    private static final int LARGEST_FRACTION = 6;
    private static final double SAME = 1e-6;

    private LowestZones() {}

    /**
     * The lowest zones.
     *
     * @param crystal the crystal
     * @param count how many at most, 1 to 60
     * @return the zones, the densest net first. Those with no index above 1 have precedence, so that a crystal with one long
     *     edge shows the zone along that edge too
     * @throws IllegalArgumentException if the count is not from 1 to 60
     */
    public static List<Uvw> of(Crystal crystal, int count) {
        if (count < 1 || count > 60) {
            throw new IllegalArgumentException("number of zones: " + count + ", expected 1 to 60");
        }
        Comparator<Uvw> byDensity = Comparator.comparingDouble(z -> Math.rint(repeat(crystal, z) / SAME));
        return different(crystal).stream()
                .sorted(Comparator.comparing((Uvw z) -> z.largestIndex() > 1).thenComparing(byDensity))
                .limit(count)
                .sorted(byDensity)
                .toList();
    }

    /**
     * The distance after which the lattice repeats along a zone axis.
     *
     * @param crystal the crystal
     * @param zone the zone axis
     * @return the length of the shortest lattice vector along it, in Å
     */
    public static double repeat(Crystal crystal, Uvw zone) {
        Uvw z = zone.reduced();
        double whole = crystal.lattice().vector(z).norm();
        for (int n = LARGEST_FRACTION; n > 1; n--) {
            Vector3 part = new Vector3(z.u(), z.v(), z.w()).times(1.0 / n);
            if (crystal.spaceGroup().centringVectors().stream().anyMatch(c -> isWhole(part.minus(c)))) {
                return whole / n;
            }
        }
        return whole;
    }

    private static boolean isWhole(Vector3 v) {
        return Math.abs(v.x() - Math.rint(v.x())) < SAME
                && Math.abs(v.y() - Math.rint(v.y())) < SAME
                && Math.abs(v.z() - Math.rint(v.z())) < SAME;
    }

    /** Of equivalent zones the one that people write, in the order of {@link Uvw#upTo}, which sorting keeps for equal nets. */
    private static List<Uvw> different(Crystal crystal) {
        Set<Uvw> taken = new HashSet<>();
        List<Uvw> different = new ArrayList<>();
        for (Uvw zone : Uvw.upTo(LARGEST_INDEX)) {
            if (taken.add(zone)) {
                different.add(zone);
                taken.addAll(crystal.spaceGroup().equivalents(zone));
            }
        }
        return different;
    }
}
