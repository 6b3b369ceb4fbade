package io.github.zonewright.pattern;

import io.github.zonewright.image.PixelPoint;

/**
 * A predicted spot at its place on an image.
 *
 * @param spot the spot
 * @param position where it lands
 */
public record PlacedSpot(PredictedSpot spot, PixelPoint position) {}
