package io.github.zonewright.indexing;

/**
 * A zone's net as it was fitted to the spots, with what speaks for it.
 *
 * @param net the zone's net
 * @param fit how it lies
 * @param prior what was known before
 * @param priorScore nats from the centre hypothesis and the camera constant
 * @param total nats in all, with a coarse look at the intensities
 */
record NetCandidate(ZoneNet net, NetFit.Fit fit, NetFit.Prior prior, double priorScore, double total) {

    /** Standard deviation expected of each component of the ellipse, from how well the camera is known. */
    static double ellipseError(double tolerance) {
        return Math.max(0.0025, Math.min(0.015, 0.4 * tolerance));
    }
}
