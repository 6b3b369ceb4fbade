package io.github.zonewright.indexing;

/**
 * Standard uncertainties (1σ) of what a solution says, from the covariance of the fit. They hold if the model does: a
 * wrong crystal or zone is not covered by them.
 *
 * @param rotation of the rotation in the image plane, in radians
 * @param leanX of the lean towards X, in radians
 * @param leanY of the lean towards Y, in radians
 * @param centreX of the centre along x, in px
 * @param centreY of the centre along y, in px
 * @param constant of the camera constant, in px·Å
 */
public record SolutionErrors(
        double rotation, double leanX, double leanY, double centreX, double centreY, double constant) {}
