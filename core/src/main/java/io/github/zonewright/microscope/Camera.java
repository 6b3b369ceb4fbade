package io.github.zonewright.microscope;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;

/**
 * A flat detector behind the specimen: where a beam scattered by g lands on the image, and back.
 *
 * <p>(X, Y) = K·(gX, gY)/√(1 − λ²g⊥²) in pixels, with the camera constant K in px·Å. Then the elliptical distortion: a
 * symmetric, area-preserving stretch by √q along its azimuth and 1/√q across, so that K is the geometric mean of the two
 * axes. Then x = xc + X and y = yc − Y, or x = xc − X on a mirrored image. Worked number: K = 200 px·Å, centre (256,
 * 256), g = (0.5, 0.25) 1/Å at vanishing wavelength lands at (356, 206), mirrored at (156, 206).
 *
 * @param centre where the direct beam meets the image
 * @param constant camera constant K in px·Å, the geometric mean over the ellipse
 * @param ellipseRatio ratio q ≥ 1 of the long to the short axis of what ought to be a circle
 * @param ellipseAzimuth azimuth of the long axis in radians, counter-clockwise from X in the microscope frame
 * @param mirrored whether the image is mirrored left to right, so that X points to the left on it
 */
public record Camera(PixelPoint centre, double constant, double ellipseRatio, double ellipseAzimuth, boolean mirrored) {

    private static final double LARGEST_RATIO = 2;

    /**
     * Checks the values.
     *
     * @throws IllegalArgumentException if the constant is not finite and above 0, the ratio not between 1 and 2, or the
     *     azimuth or centre not finite
     */
    public Camera {
        if (!(constant > 0 && constant < 1e9)) {
            throw new IllegalArgumentException(
                    "camera constant: " + constant + " px·Å, expected above 0 and below 1e9 px·Å");
        }
        if (!(ellipseRatio >= 1 && ellipseRatio <= LARGEST_RATIO)) {
            throw new IllegalArgumentException("ellipse ratio: " + ellipseRatio + ", expected 1 to " + LARGEST_RATIO);
        }
        if (!Double.isFinite(ellipseAzimuth)) {
            throw new IllegalArgumentException("ellipse azimuth: " + ellipseAzimuth + ", expected a finite angle");
        }
        if (!Double.isFinite(centre.x()) || !Double.isFinite(centre.y())) {
            throw new IllegalArgumentException("pattern centre: " + centre + ", expected finite pixel coordinates");
        }
    }

    /**
     * A camera without distortion.
     *
     * @param centre where the direct beam meets the image
     * @param constant camera constant in px·Å
     * @param mirrored whether the image is mirrored left to right
     * @return the camera
     * @throws IllegalArgumentException if the constant is not finite and above 0
     */
    public static Camera of(PixelPoint centre, double constant, boolean mirrored) {
        return new Camera(centre, constant, 1, 0, mirrored);
    }

    /**
     * The same camera about another centre.
     *
     * @param other the new centre
     * @return the moved camera
     */
    public Camera withCentre(PixelPoint other) {
        return new Camera(other, constant, ellipseRatio, ellipseAzimuth, mirrored);
    }

    /**
     * The same camera with another constant.
     *
     * @param other the new camera constant in px·Å
     * @return the rescaled camera
     */
    public Camera withConstant(double other) {
        return new Camera(centre, other, ellipseRatio, ellipseAzimuth, mirrored);
    }

    /**
     * The same camera with another distortion.
     *
     * @param ratio ratio of the long to the short axis
     * @param azimuth azimuth of the long axis in radians
     * @return the distorted camera
     */
    public Camera withEllipse(double ratio, double azimuth) {
        return new Camera(centre, constant, ratio, azimuth, mirrored);
    }

    /**
     * Where a scattered beam lands.
     *
     * @param g components (gX, gY) of the scattering vector across the beam, in 1/Å, microscope frame
     * @param wavelength λ in Å; 0 for the limit of a flat Ewald sphere
     * @return the place on the image
     * @throws IllegalArgumentException if λ|g| is not below 1: such a beam never reaches the camera
     */
    public PixelPoint toPixel(Vector2 g, double wavelength) {
        double sine = wavelength * g.norm();
        if (!(sine < 1)) {
            throw new IllegalArgumentException(
                    "scattering vector " + g.norm() + " 1/Å at wavelength " + wavelength + " Å: expected |g| < 1/λ");
        }
        Vector2 flat = g.times(constant / Math.sqrt(1 - sine * sine));
        Vector2 p = stretch(flat, Math.sqrt(ellipseRatio));
        return new PixelPoint(centre.x() + (mirrored ? -p.x() : p.x()), centre.y() - p.y());
    }

    /**
     * The scattering vector of a place on the image; the inverse of {@link #toPixel}.
     *
     * @param point the place
     * @param wavelength λ in Å; 0 for the limit of a flat Ewald sphere
     * @return (gX, gY) in 1/Å, microscope frame
     */
    public Vector2 toReciprocal(PixelPoint point, double wavelength) {
        double dx = point.x() - centre.x();
        Vector2 p = new Vector2(mirrored ? -dx : dx, centre.y() - point.y());
        Vector2 flat = stretch(p, 1 / Math.sqrt(ellipseRatio)).times(1 / constant);
        double tangent = wavelength * flat.norm();
        return flat.times(1 / Math.sqrt(1 + tangent * tangent));
    }

    private Vector2 stretch(Vector2 v, double along) {
        if (ellipseRatio == 1) {
            return v;
        }
        Vector2 own = v.rotate(-ellipseAzimuth);
        return new Vector2(own.x() * along, own.y() / along).rotate(ellipseAzimuth);
    }
}
