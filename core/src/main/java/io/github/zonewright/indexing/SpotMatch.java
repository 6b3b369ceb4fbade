package io.github.zonewright.indexing;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.spots.MeasuredSpot;

/**
 * A measured spot and the reflection that explains it.
 *
 * @param measured the measured spot
 * @param hkl the reflection
 * @param computed where the reflection is computed to land
 */
public record SpotMatch(MeasuredSpot measured, Hkl hkl, PixelPoint computed) {

    /**
     * The distance between measured and computed place.
     *
     * @return the residual in px
     */
    public double residual() {
        return measured.position().distanceTo(computed);
    }
}
