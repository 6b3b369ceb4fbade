/**
 * How a crystal sits in the microscope, and how two crystals stand to each other.
 *
 * <p>v_microscope = R · v_crystal, so (gX, gY, gZ) = R·B·(h, k, l). A zone axis [uvw] points from the specimen towards the
 * electron source, along +Z when the crystal is exactly on zone. Worked number: a cubic crystal with R the identity has
 * [001] towards the source and 100 to the right on the screen.
 *
 * <p>{@code Misorientation} is the smallest rotation from one crystal to another that symmetry allows; {@code
 * OrientationRelation} gives it a name, as a twin or a {@code CoincidenceLattice}; {@code LatticeRotation} tells merohedral twins.
 */
package io.github.zonewright.orientation;
