/**
 * The instrument: the beam, and the camera that turns reciprocal lengths into pixels.
 *
 * <p>This package owns the microscope frame: right-handed, X right on the screen, Y up on the screen, Z out of the
 * screen towards the viewer and the electron source. Electrons travel along −Z.
 */
package io.github.zonewright.microscope;
