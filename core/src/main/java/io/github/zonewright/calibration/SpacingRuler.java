package io.github.zonewright.calibration;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.spots.MeasuredValue;

/**
 * Reads spacings off a pattern with no crystal in mind: d = n/|g| of the n-th spot of a row, or of a pair g and −g, with the
 * ellipse taken off and the flat detector's tangent counted. As for any spot of a zone, g is taken to lie across the beam: |g|
 * = sin 2θ/λ. (The ring of a powder has |g| = 2 sin θ/λ, which is 0.04 % more at 200 kV and d = 0.77 Å.)
 *
 * <p>Worked number: K = 500 px·Å, no ellipse, λ → 0: the third spot of a row at 600 px is 200 px per order and d = 2.5 Å.
 */
public final class SpacingRuler {

    private final Camera camera;
    private final double constantError;
    private final double centreError;
    private final double wavelength;

    private SpacingRuler(Camera camera, double constantError, double centreError, double wavelength) {
        this.camera = camera;
        this.constantError = constantError;
        this.centreError = centreError;
        this.wavelength = wavelength;
    }

    /**
     * A ruler.
     *
     * @param camera centre, constant and ellipse
     * @param constantError standard uncertainty of the camera constant in px·Å, 0 or more
     * @param centreError standard uncertainty of each coordinate of the centre in pixels, 0 or more
     * @param beam the beam
     * @return the ruler
     * @throws IllegalArgumentException if an error is negative or not finite
     */
    public static SpacingRuler of(Camera camera, double constantError, double centreError, Beam beam) {
        if (!(constantError >= 0 && centreError >= 0)
                || Double.isInfinite(constantError)
                || Double.isInfinite(centreError)) {
            throw new IllegalArgumentException("errors of camera constant and centre: " + constantError + " px·Å, "
                    + centreError + " px, expected finite and not negative");
        }
        return new SpacingRuler(camera, constantError, centreError, beam.wavelength());
    }

    /**
     * Reads the n-th spot of a row, or with n = 1 any spot.
     *
     * @param place where it is
     * @param placeError standard uncertainty of each coordinate in pixels, 0 or more
     * @param n its order from the centre, at least 1
     * @return the spacing of the first order
     * @throws IllegalArgumentException if the order is below 1 or the place is the centre
     */
    public Spacing spot(PixelPoint place, double placeError, int n) {
        return read(place.minus(camera.centre()), Math.hypot(placeError, centreError), n);
    }

    /**
     * Reads a pair g and −g, which needs no centre: half the way from one to the other counts.
     *
     * @param plus place of the spot g
     * @param minus place of the spot −g
     * @param placeError standard uncertainty of each coordinate of either in pixels, 0 or more
     * @param n their order, at least 1
     * @return the spacing of the first order
     * @throws IllegalArgumentException if the order is below 1 or the places are the same
     */
    public Spacing pair(PixelPoint plus, PixelPoint minus, double placeError, int n) {
        return read(plus.minus(minus).times(0.5), placeError / Math.sqrt(2), n);
    }

    private Spacing read(Vector2 way, double wayError, int n) {
        double length = way.norm();
        if (n < 1 || !(length > 0) || !(wayError >= 0)) {
            throw new IllegalArgumentException("order " + n + " at " + length + " ± " + wayError
                    + " px: expected an order of at least 1, a place off the centre and an error not negative");
        }
        Vector2 g = camera.toReciprocal(camera.centre().plus(way), wavelength).times(1.0 / n);
        double d = 1 / g.norm();
        double placeError = wayError / length;
        double relative = Math.hypot(placeError, constantError / camera.constant());
        return new Spacing(
                new MeasuredValue(length / n, wayError / n), new MeasuredValue(d, d * relative), g, placeError);
    }
}
