/** A pattern as ordinary named ROIs in the overlay of an image, among the user's own elements and apart from them. */
package io.github.zonewright.imagej.overlay;
