package io.github.zonewright.imagej.session;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.Reflection;
import io.github.zonewright.crystal.ReflectionTable;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import java.util.Comparator;
import java.util.Optional;

/** The reflection from which the rotation of a pattern is counted when nobody names one. */
public final class ReferenceReflection {
    private static final double FIRST_REACH = 0.5;
    private static final double LAST_REACH = 4;

    private ReferenceReflection() {}

    /**
     * The shortest present reflection of a zone; of equally short ones that with the largest indices, h before k before
     * l.
     *
     * @param crystal the crystal
     * @param zone the zone axis
     * @return the reflection
     * @throws IllegalArgumentException if the zone has no reflection up to 4 1/Å
     */
    public static Hkl of(Crystal crystal, Uvw zone) {
        if (zone.isZero()) {
            throw new IllegalArgumentException("zone axis: 0 0 0, expected a direction such as 0 0 1");
        }
        for (double reach = FIRST_REACH; reach <= LAST_REACH; reach *= 2) {
            Optional<Hkl> shortest = ReflectionTable.ofLength(crystal, reach).reflections().stream()
                    .filter(r -> r.hkl().dot(zone) == 0)
                    .min(Comparator.<Reflection>comparingDouble(r -> Math.rint(1e9 * r.g().norm()))
                            .thenComparing(Reflection::hkl, Comparator.reverseOrder()))
                    .map(Reflection::hkl);
            if (shortest.isPresent()) {
                return shortest.get();
            }
        }
        throw new IllegalArgumentException("zone axis " + zone + " of " + crystal.name() + ": no reflection up to "
                + LAST_REACH + " 1/Å, expected smaller indices");
    }
}
