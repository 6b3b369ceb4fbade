package io.github.zonewright.pattern;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.lattice.Hkl;

/**
 * A spot that the theory expects.
 *
 * @param hkl the reflection
 * @param g (gX, gY) of the place where its relrod meets the Ewald sphere, in 1/Å, microscope frame
 * @param excitationError s in 1/Å, positive inside the Ewald sphere
 * @param amplitude |F| in Å
 * @param intensity relative to the incident beam, by the simulator's intensity model
 */
public record PredictedSpot(Hkl hkl, Vector2 g, double excitationError, double amplitude, double intensity) {}
