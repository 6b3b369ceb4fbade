/**
 * A grid of pixels and what can be measured on it without knowing what it shows.
 *
 * <p>This package owns the pixel convention: x runs right, y down, pixel (i, j) covers [i, i+1) × [j, j+1) and its
 * centre is at (i + ½, j + ½). The middle of a 512 × 512 image is (256, 256), a corner shared by four pixels.
 */
package io.github.zonewright.image;
