/**
 * From what is measured to a scale: rings of a known powder to a camera constant, a spot's place to a spacing, and the
 * calibrations that are kept.
 *
 * <p>A ring of spacing d has the radius R = (K/λ)·tan 2θ with λ = 2d sin θ and the camera constant K in px·Å; at small
 * angles R·d = K. Worked number: at 200 kV and K = 1000 px·Å the ring of d = 1 Å has R = 1000.236 px.
 */
package io.github.zonewright.calibration;
