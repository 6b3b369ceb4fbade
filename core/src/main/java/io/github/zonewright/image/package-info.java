/**
 * A grid of pixels: values, masks, filters and slowly varying levels.
 *
 * <p>This package owns the pixel convention: x runs to the right, y down, pixel (i, j) covers [i, i+1) × [j, j+1) and
 * has its centre at (i + ½, j + ½). A spot that fills pixel (3, 5) evenly is at the point (3.5, 5.5).
 */
package io.github.zonewright.image;
