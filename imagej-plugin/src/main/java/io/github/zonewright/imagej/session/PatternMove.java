package io.github.zonewright.imagej.session;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;

/**
 * A change of a laid pattern by hand.
 *
 * @param turn angle about its centre in degrees, counter-clockwise from the electron source
 * @param stretch what the camera constant is multiplied by
 * @param lean what is added to the lean to the right and upwards, in degrees
 * @param shift what is added to the place of the centre, in px of the image
 */
public record PatternMove(double turn, double stretch, Vector2 lean, Vector2 shift) {
    private static final int ROUNDS = 4;

    /** Nothing is changed. */
    public static final PatternMove NONE = new PatternMove(0, 1, Vector2.ZERO, Vector2.ZERO);

    /**
     * A turn alone.
     *
     * @param degrees the angle
     * @return the change
     */
    public static PatternMove turning(double degrees) {
        return new PatternMove(degrees, 1, Vector2.ZERO, Vector2.ZERO);
    }

    /**
     * A stretch alone.
     *
     * @param factor the factor
     * @return the change
     */
    public static PatternMove stretching(double factor) {
        return new PatternMove(0, factor, Vector2.ZERO, Vector2.ZERO);
    }

    /**
     * A lean alone.
     *
     * @param degrees to the right and upwards
     * @return the change
     */
    public static PatternMove leaning(Vector2 degrees) {
        return new PatternMove(0, 1, degrees, Vector2.ZERO);
    }

    /**
     * A shift alone.
     *
     * @param pixels along x and y of the image
     * @return the change
     */
    public static PatternMove shifting(Vector2 pixels) {
        return new PatternMove(0, 1, Vector2.ZERO, pixels);
    }

    /**
     * The turn that lets a reflection point up.
     *
     * @param laid the pattern
     * @param hkl the reflection
     * @return the change
     * @throws IllegalArgumentException if the reflection has no direction across the beam
     */
    public static PatternMove upwards(Placement laid, Hkl hkl) {
        Placement turned = laid;
        double turn = 0;
        for (int i = 0; i < ROUNDS; i++) {
            Vector3 g = turned.orientation().scatteringVector(laid.crystal().lattice(), hkl);
            Vector2 across = new Vector2(g.x(), g.y());
            if (!(across.norm() > 1e-3 * g.norm())) {
                throw new IllegalArgumentException(
                        "reflection " + hkl + ": it has no direction on the image, expected one across the beam");
            }
            double rest = Math.IEEEremainder(Math.PI / 2 - across.azimuth(), 2 * Math.PI);
            turned = turned.turnedBy(rest);
            turn += rest;
        }
        return turning(Math.toDegrees(Math.IEEEremainder(turn, 2 * Math.PI)));
    }

    /**
     * What leads from one pattern to another that differs by nothing else.
     *
     * @param before the one
     * @param after the other
     * @return the change
     */
    public static PatternMove between(Placement before, Placement after) {
        ZoneSetting a = before.setting();
        ZoneSetting b = after.setting();
        PixelPoint from = before.camera().centre();
        return new PatternMove(
                Math.toDegrees(Math.IEEEremainder(b.rotation() - a.rotation(), 2 * Math.PI)),
                after.camera().constant() / before.camera().constant(),
                new Vector2(Math.toDegrees(b.leanX() - a.leanX()), Math.toDegrees(b.leanY() - a.leanY())),
                after.camera().centre().minus(from));
    }

    /**
     * The changed pattern.
     *
     * @param laid the pattern as it lies
     * @return the same, turned, stretched, leaning and shifted
     * @throws IllegalArgumentException if camera constant or lean leave what is possible
     */
    public Placement on(Placement laid) {
        Placement changed = turn == 0 ? laid : laid.turnedBy(Math.toRadians(turn));
        changed = stretch == 1 ? changed : changed.scaledBy(stretch);
        if (lean.norm() > 0) {
            changed = changed.leanedBy(Math.toRadians(lean.x()), Math.toRadians(lean.y()));
        }
        return shift.norm() == 0
                ? changed
                : changed.centredAt(changed.camera().centre().plus(shift));
    }
}
