/**
 * Direct and reciprocal lattices of the seven crystal systems.
 *
 * <p>This package owns two conventions. The crystal's Cartesian frame has x ∥ a, b in the xy plane and z ∥ c*.
 * Reciprocal lengths are in 1/Å without 2π, so |g| = 1/d: for a cubic cell of 4 Å, g(200) = (0.5, 0, 0) 1/Å.
 */
package io.github.zonewright.lattice;
