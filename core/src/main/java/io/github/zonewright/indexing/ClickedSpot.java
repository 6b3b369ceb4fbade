package io.github.zonewright.indexing;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import java.util.Optional;

/**
 * A spot that a person points at.
 *
 * @param position its place on the image
 * @param hkl which reflection it is, if the person says so
 */
public record ClickedSpot(PixelPoint position, Optional<Hkl> hkl) {

    /**
     * A spot of which nothing is said.
     *
     * @param position its place on the image
     * @return the spot
     */
    public static ClickedSpot at(PixelPoint position) {
        return new ClickedSpot(position, Optional.empty());
    }
}
