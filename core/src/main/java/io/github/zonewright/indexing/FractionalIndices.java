package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Vector3;
import java.util.Locale;

/**
 * The place of a spot in reciprocal space as indices that need not be whole, in the frame of a solution.
 *
 * <p>A pattern gives two of the three coordinates. The indices are those of the point of the zero layer, hu + kv + lw = 0,
 * that lies under the spot along the beam; what the spot really comes from may be off that layer by its relrod's length.
 *
 * @param indices h, k, l as components
 * @param errors their standard uncertainties, from the spot's position and from how well camera and rotation are known
 * @param layer hu + kv + lw of the point of the Ewald sphere under the spot: near 0 on the zero layer, near n where the sphere
 *     cuts the n-th upper layer
 */
public record FractionalIndices(Vector3 indices, Vector3 errors, double layer) {

    /**
     * The indices for a person.
     *
     * @return for example {@code 0.500 0.498 0.001}
     */
    public String text() {
        return String.format(Locale.ROOT, "%.3f %.3f %.3f", indices.x() + 0.0, indices.y() + 0.0, indices.z() + 0.0);
    }
}
