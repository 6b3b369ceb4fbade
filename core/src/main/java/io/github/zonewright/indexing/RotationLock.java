package io.github.zonewright.indexing;

import io.github.zonewright.lattice.Hkl;

/**
 * A rotation in the image plane that is known, or known to lie in a range.
 *
 * @param reference the reflection whose azimuth the rotation is
 * @param middle the middle of the range in radians, counter-clockwise from the right
 * @param half half the width of the range in radians; 0 holds the rotation as it is
 */
record RotationLock(Hkl reference, double middle, double half) {

    private static final double HELD = 1e-6;

    /** Whether a rotation is in the range, or out of it by no more than the slack. */
    boolean allows(double rotation, double slack) {
        return Math.abs(Math.IEEEremainder(rotation - middle, 2 * Math.PI)) <= half + slack;
    }

    /** The same for rotations that are known modulo half a turn only. */
    boolean allowsModuloHalfTurn(double rotation, double slack) {
        return allows(rotation, slack) || allows(rotation + Math.PI, slack);
    }

    /** The prior with the rotation as it is known; a range counts as its standard deviation. */
    NetFit.Prior limit(NetFit.Prior prior) {
        return prior.withRotation(middle, Math.max(HELD, half / Math.sqrt(3)));
    }
}
