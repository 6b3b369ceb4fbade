package io.github.zonewright.imagej.overlay;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.pattern.DoubleDiffraction;
import io.github.zonewright.pattern.Placement;
import java.util.List;

/** Forbidden spots of the zero layer that double diffraction may light; keeps the reflections of the zone it was last asked for. */
final class ForbiddenSpots {
    private record Key(Crystal crystal, Beam beam, Uvw zone, double largestG) {}

    private Key key;
    private List<Hkl> reflections = List.of();

    /** Their places on an image of this size. */
    synchronized List<PixelPoint> on(Placement laid, int width, int height) {
        double wanted = Math.min(laid.largestG(width, height), 0.9 / laid.beam().wavelength());
        boolean same = key != null
                && key.crystal == laid.crystal()
                && key.beam.equals(laid.beam())
                && key.zone.equals(laid.setting().zone())
                && key.largestG >= wanted
                && key.largestG <= 1.5 * wanted;
        if (!same) {
            double largestG = Math.min(1.15 * wanted, 0.95 / laid.beam().wavelength());
            key = new Key(laid.crystal(), laid.beam(), laid.setting().zone(), largestG);
            reflections = DoubleDiffraction.forbidden(laid.crystal(), laid.beam(), key.zone, largestG);
        }
        return DoubleDiffraction.places(laid, reflections).stream()
                .filter(p -> p.x() >= 0 && p.y() >= 0 && p.x() < width && p.y() < height)
                .toList();
    }
}
