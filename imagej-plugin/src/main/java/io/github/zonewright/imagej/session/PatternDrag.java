package io.github.zonewright.imagej.session;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.pattern.LaueCircle;
import io.github.zonewright.pattern.Placement;
import java.util.Locale;

/** What a drag, or an arrow key, does to a laid pattern. */
public enum PatternDrag {
    /** Moves the centre. */
    SHIFT("shifts", 1, 0.1),
    /** Turns about the centre. */
    TURN("turns", 0.5, 0.05),
    /** Stretches the scale. */
    STRETCH("stretches", 1.002, 1.0002),
    /** Tilts the crystal: the centre of the Laue circle follows. */
    TILT("tilts", 0.1, 0.01);

    /** How much of a fine drag counts. */
    private static final double FINE = 0.1;

    private final String verb;
    private final double step;
    private final double fineStep;

    PatternDrag(String verb, double step, double fineStep) {
        this.verb = verb;
        this.step = step;
        this.fineStep = fineStep;
    }

    /**
     * What it does.
     *
     * @return a verb such as "turns"
     */
    public String verb() {
        return verb;
    }

    /**
     * The change of a drag.
     *
     * @param laid the pattern
     * @param from where the mouse was, in px of the image
     * @param to where it is now
     * @param fine whether a tenth of the way counts
     * @return the change; none at the centre, where there is no direction
     */
    public PatternMove move(Placement laid, PixelPoint from, PixelPoint to, boolean fine) {
        double part = fine ? FINE : 1;
        if (this == SHIFT) {
            return PatternMove.shifting(to.minus(from).times(part));
        }
        double wavelength = laid.beam().wavelength();
        Vector2 a = laid.camera().toReciprocal(from, wavelength);
        Vector2 b = laid.camera().toReciprocal(to, wavelength);
        if (this == TILT) {
            Vector2 lean = LaueCircle.lean(b.minus(a).times(part), wavelength);
            return PatternMove.leaning(lean.times(Math.toDegrees(1)));
        }
        if (a.norm() == 0 || b.norm() == 0) {
            return PatternMove.NONE;
        }
        return this == STRETCH
                ? PatternMove.stretching(Math.pow(b.norm() / a.norm(), part))
                : PatternMove.turning(
                        part * Math.toDegrees(Math.IEEEremainder(b.azimuth() - a.azimuth(), 2 * Math.PI)));
    }

    /**
     * The change of an arrow key: 1 px, 0.5°, 0.2 % or 0.1°, finely a tenth of it.
     *
     * @param laid the pattern
     * @param right 1 for right, −1 for left, else 0
     * @param up 1 for up, −1 for down, else 0
     * @param fine whether in fine steps
     * @return the change; a turn to the left is counter-clockwise on the image, a tilt moves the Laue circle as the arrow says
     */
    public PatternMove step(Placement laid, int right, int up, boolean fine) {
        double by = fine ? fineStep : step;
        int hand = laid.camera().mirrored() ? -1 : 1;
        return switch (this) {
            case SHIFT -> PatternMove.shifting(new Vector2(by * right, -by * up));
            case TURN -> PatternMove.turning(-hand * by * right);
            case STRETCH -> PatternMove.stretching(Math.pow(by, up));
            case TILT -> PatternMove.leaning(new Vector2(-hand * by * right, -by * up));
        };
    }

    /**
     * The quantity that it changes.
     *
     * @param laid the pattern
     * @return its present value, with its unit
     */
    public String says(Placement laid) {
        PixelPoint centre = laid.camera().centre();
        return switch (this) {
            case SHIFT -> text("Centre %.2f, %.2f px", centre.x(), centre.y());
            case TURN -> text("Rotation %.2f°", Math.toDegrees(laid.setting().rotation()));
            case STRETCH -> text("Camera constant %.2f px·Å", laid.camera().constant());
            case TILT ->
                text(
                        "Lean %.3f° right, %.3f° up",
                        Math.toDegrees(laid.setting().leanX()),
                        Math.toDegrees(laid.setting().leanY()));
        };
    }

    private static String text(String format, Object... values) {
        return String.format(Locale.ROOT, format, values);
    }
}
