package io.github.zonewright.image;

import io.github.zonewright.geometry.Vector2;

/**
 * What a distortion makes of circles about a point: ellipses of one shape. A circle of radius r is stretched by √q along an
 * azimuth and by 1/√q across, which keeps its area; r is the geometric mean of the half axes.
 *
 * <p>Azimuths are those of the screen: counter-clockwise as seen, from the right. Worked number: centre (100, 100), q =
 * 1.21, azimuth 0: the point (111, 100) and the point (100, 90.909) both have radius 10.
 *
 * @param centre the common centre
 * @param ratio long axis over short axis, q ≥ 1
 * @param azimuth azimuth of the long axis on the screen in radians
 */
public record Ellipse(PixelPoint centre, double ratio, double azimuth) {

    /**
     * Checks the values.
     *
     * @throws IllegalArgumentException if the ratio is below 1 or not finite, or the azimuth not finite
     */
    public Ellipse {
        if (!(ratio >= 1) || Double.isInfinite(ratio) || !Double.isFinite(azimuth)) {
            throw new IllegalArgumentException("ellipse ratio " + ratio + ", azimuth " + azimuth
                    + " rad: expected a ratio of at least 1 and a finite azimuth");
        }
    }

    /**
     * Circles.
     *
     * @param centre their centre
     * @return an ellipse of ratio 1
     */
    public static Ellipse circle(PixelPoint centre) {
        return new Ellipse(centre, 1, 0);
    }

    /**
     * The ellipse of a strain, whose two components behave well in a fit also near the circle.
     *
     * @param centre the centre
     * @param along half the logarithm of the ratio, times the cosine of twice the azimuth
     * @param diagonal half the logarithm of the ratio, times the sine of twice the azimuth
     * @return the ellipse, with an azimuth from −π/2 to π/2
     */
    public static Ellipse ofStrain(PixelPoint centre, double along, double diagonal) {
        return new Ellipse(centre, Math.exp(2 * Math.hypot(along, diagonal)), Math.atan2(diagonal, along) / 2);
    }

    /**
     * The first component of the strain.
     *
     * @return ½ ln q · cos 2α
     */
    public double along() {
        return Math.log(ratio) / 2 * Math.cos(2 * azimuth);
    }

    /**
     * The second component of the strain.
     *
     * @return ½ ln q · sin 2α
     */
    public double diagonal() {
        return Math.log(ratio) / 2 * Math.sin(2 * azimuth);
    }

    /**
     * Takes the distortion off a point.
     *
     * @param x in pixels from the left edge
     * @param y in pixels from the upper edge
     * @return its place about the centre if circles were circles, x right, y up
     */
    public Vector2 undistorted(double x, double y) {
        Vector2 place = new Vector2(x - centre.x(), centre.y() - y);
        if (ratio == 1) {
            return place;
        }
        double half = Math.log(ratio) / 2;
        double c = Math.cosh(half);
        double s = Math.sinh(half);
        double u = s * Math.cos(2 * azimuth);
        double v = s * Math.sin(2 * azimuth);
        return new Vector2((c - u) * place.x() - v * place.y(), -v * place.x() + (c + u) * place.y());
    }

    /**
     * The radius of the circle that the distortion puts through a point.
     *
     * @param point any point
     * @return the radius in pixels
     */
    public double radius(PixelPoint point) {
        return undistorted(point.x(), point.y()).norm();
    }

    /**
     * Where the distortion puts a point of a circle.
     *
     * @param radius the circle's radius in pixels
     * @param angle azimuth on the circle before the distortion, in radians
     * @return the point on the image
     */
    public PixelPoint pointAt(double radius, double angle) {
        Vector2 own = Vector2.ofPolar(radius, angle - azimuth);
        double stretch = Math.sqrt(ratio);
        Vector2 place = new Vector2(own.x() * stretch, own.y() / stretch).rotate(azimuth);
        return new PixelPoint(centre.x() + place.x(), centre.y() - place.y());
    }
}
