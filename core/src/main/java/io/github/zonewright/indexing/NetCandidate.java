package io.github.zonewright.indexing;

/**
 * A zone's net as it was fitted to the spots, with what speaks for it.
 *
 * @param net the zone's net
 * @param fit how it lies
 * @param prior what was known before
 * @param priorScore nats from the centre hypothesis and the camera constant
 * @param lean what its intensities say of the lean
 * @param total nats in all, with a coarse look at the intensities
 */
record NetCandidate(ZoneNet net, NetFit.Fit fit, NetFit.Prior prior, double priorScore, LeanFit lean, double total) {}
