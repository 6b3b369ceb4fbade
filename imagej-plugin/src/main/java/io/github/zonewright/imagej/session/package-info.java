/**
 * What the commands work with: what is known of an image and is kept with it, the instrument, the user's shelf and
 * calibrations, and how images are measured, searched and recorded. Needs no window.
 */
package io.github.zonewright.imagej.session;
