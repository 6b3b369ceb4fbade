package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.lattice.Uvw;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import java.util.function.Function;

/** Which zone axes of a crystal a search looks at. */
final class ZoneLimit {

    private final Function<Crystal, List<Uvw>> zones;

    private ZoneLimit(Function<Crystal, List<Uvw>> zones) {
        this.zones = zones;
    }

    /** All that differ, with indices up to the largest. */
    static ZoneLimit ofIndex(int largest) {
        return new ZoneLimit(crystal -> ZoneCatalogue.zones(crystal, largest));
    }

    /** One alone. */
    static ZoneLimit ofZone(Uvw zone) {
        List<Uvw> one = List.of(checked(zone));
        return new ZoneLimit(crystal -> one);
    }

    /** Those equivalent to one by the Laue class that differ: one, or it and its opposite. */
    static ZoneLimit ofFamily(Uvw zone) {
        Uvw given = checked(zone);
        return new ZoneLimit(crystal -> {
            Set<Uvw> turned = new HashSet<>();
            crystal.spaceGroup().properLaueRotations().forEach(r -> turned.add(r.apply(given)));
            return turned.contains(given.negate()) ? List.of(given) : List.of(given, given.negate());
        });
    }

    private static Uvw checked(Uvw zone) {
        if (zone.isZero()) {
            throw new IllegalArgumentException("zone axis: [0 0 0], expected indices that are not all 0");
        }
        return zone.reduced();
    }

    List<Uvw> zones(Crystal crystal) {
        return zones.apply(crystal);
    }
}
