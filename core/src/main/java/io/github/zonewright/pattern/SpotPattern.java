package io.github.zonewright.pattern;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.Orientation;
import java.util.List;

/**
 * The computed pattern of one crystal in one orientation; the direct beam is not among its spots.
 *
 * @param crystal the crystal
 * @param orientation its orientation
 * @param beam the beam
 * @param spots the spots, strongest first; of equal ones in the order of their indices
 */
public record SpotPattern(Crystal crystal, Orientation orientation, Beam beam, List<PredictedSpot> spots) {

    /** Copies the list. */
    public SpotPattern {
        spots = List.copyOf(spots);
    }

    /**
     * The spots at their places on an image.
     *
     * @param camera the camera
     * @return the placed spots, in the same order
     */
    public List<PlacedSpot> on(Camera camera) {
        double wavelength = beam.wavelength();
        return spots.stream()
                .map(s -> new PlacedSpot(s, camera.toPixel(s.g(), wavelength)))
                .toList();
    }
}
