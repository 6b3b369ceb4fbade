package io.github.zonewright.imagej.overlay;

import io.github.zonewright.image.PixelPoint;

/**
 * A measured distance on an image.
 *
 * @param from where it begins
 * @param to where it ends
 * @param orders into how many equal parts small ticks divide it, at least 1
 * @param text what stands beside it
 */
public record RulerLine(PixelPoint from, PixelPoint to, int orders, String text) {}
