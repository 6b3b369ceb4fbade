/**
 * How a crystal sits in the microscope.
 *
 * <p>v_microscope = R · v_crystal, so (gX, gY, gZ) = R·B·(h, k, l). A zone axis [uvw] points from the specimen towards the
 * electron source, along +Z when the crystal is exactly on zone. Worked number: a cubic crystal with R the identity has
 * [001] towards the source and 100 to the right on the screen.
 */
package io.github.zonewright.orientation;
