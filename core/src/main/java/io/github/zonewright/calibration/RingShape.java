package io.github.zonewright.calibration;

import io.github.zonewright.image.Ellipse;

/**
 * The common centre and ellipse of rings, with standard uncertainties.
 *
 * @param ellipse centre, ratio and azimuth on the screen
 * @param centreErrorX of the centre, in pixels
 * @param centreErrorY of the centre, in pixels
 * @param ratioError of the ratio; where the ratio is not told from 1 it has no other meaning than as its size
 * @param azimuthError of the azimuth in radians, π/2 at most: nothing is known then
 */
public record RingShape(
        Ellipse ellipse, double centreErrorX, double centreErrorY, double ratioError, double azimuthError) {}
