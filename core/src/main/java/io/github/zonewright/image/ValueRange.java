package io.github.zonewright.image;

/**
 * The extremes of an image's data.
 *
 * @param minimum smallest value; NaN when the image has no data
 * @param maximum largest value; NaN when the image has no data
 * @param count number of pixels that have data
 */
public record ValueRange(float minimum, float maximum, int count) {}
