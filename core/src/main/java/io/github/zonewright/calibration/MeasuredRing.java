package io.github.zonewright.calibration;

import io.github.zonewright.spots.MeasuredValue;

/**
 * A ring found on a powder pattern.
 *
 * @param radius its radius in pixels: the geometric mean of the half axes of the ellipse
 * @param height mean grey value of its crest above the background
 * @param signalToNoise height over its uncertainty
 * @param arcs part of the full turn in which it was measured, 0 to 1
 * @param scatter scatter of the radius along the ring over what the noise explains: 1 for a good ring, more for one of grains
 *     that strain or whose shape the ellipse does not meet
 */
public record MeasuredRing(MeasuredValue radius, double height, double signalToNoise, double arcs, double scatter) {}
