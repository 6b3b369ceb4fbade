/**
 * From a crystal, its orientation and a beam to the spots of a diffraction pattern.
 *
 * <p>This package owns the sign of the excitation error: s = gZ − (1/λ − √(1/λ² − g⊥²)), measured along Z, is positive
 * when the reciprocal-lattice point lies inside the Ewald sphere. Worked number: at 200 kV a reflection of the zero layer
 * with |g| = 1 1/Å, exactly on zone, has s = −0.01254 1/Å: the sphere curves towards +Z and leaves it outside.
 */
package io.github.zonewright.pattern;
