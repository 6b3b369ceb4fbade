package io.github.zonewright.pattern;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.orientation.Orientation;
import java.util.TreeMap;

/**
 * Ewald's construction with ruler and compasses: walk from every lattice point along the foil normal and bisect until the
 * walk is on the sphere. Slow, and shares no formula with the simulator.
 */
record EwaldConstruction(
        Crystal crystal, double wavelength, Vector3 normal, double largestG, double largestExcitation) {

    /** Where a walk met the sphere, and how long it was, against the normal. */
    record Meeting(Vector2 place, double excitationError) {}

    TreeMap<Hkl, Meeting> meetings(Orientation orientation, int largestIndex) {
        TreeMap<Hkl, Meeting> found = new TreeMap<>();
        for (int h = -largestIndex; h <= largestIndex; h++) {
            for (int k = -largestIndex; k <= largestIndex; k++) {
                for (int l = -largestIndex; l <= largestIndex; l++) {
                    Hkl hkl = new Hkl(h, k, l);
                    Vector3 g = orientation.scatteringVector(crystal.lattice(), hkl);
                    if (!hkl.isZero() && outside(g, -largestExcitation) != outside(g, largestExcitation)) {
                        double s = bisect(g);
                        Vector3 on = g.minus(normal.times(s));
                        Vector2 place = new Vector2(on.x(), on.y());
                        // The upper half of the sphere is scattered back, to where no camera is.
                        if (place.norm() <= largestG && on.z() < 1 / wavelength) {
                            found.put(hkl, new Meeting(place, s));
                        }
                    }
                }
            }
        }
        return found;
    }

    private double bisect(Vector3 g) {
        double low = -largestExcitation;
        double high = largestExcitation;
        boolean lowSide = outside(g, low);
        for (int i = 0; i < 60; i++) {
            double middle = (low + high) / 2;
            if (outside(g, middle) == lowSide) {
                low = middle;
            } else {
                high = middle;
            }
        }
        return (low + high) / 2;
    }

    /** Whether the point, moved against the normal, is outside the sphere about the end of −k₀ = +Z/λ. */
    private boolean outside(Vector3 g, double walk) {
        Vector3 p = g.minus(normal.times(walk));
        Vector3 centre = Vector3.Z.times(1 / wavelength);
        return p.minus(centre).norm() > 1 / wavelength;
    }
}
