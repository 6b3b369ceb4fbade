package io.github.zonewright.pattern;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/**
 * Where the Ewald sphere cuts the zero layer of a zone: a circle through the direct beam, on which the reflections are exactly
 * excited. With the zone axis along the unit vector n, its centre is k(Z − (Z·n)n) and its radius k·sin(lean), k = 1/λ, so that
 * it lies opposite to the side to which the axis leans. Source: Hirsch et al., Electron Microscopy of Thin Crystals; Williams
 * and Carter, Transmission Electron Microscopy (both named from memory).
 *
 * <p>Worked number: at λ = 0.025 Å an axis that leans by 1° to the right has its circle's centre 0.698 1/Å to the left.
 *
 * @param centre the centre on the image, in px
 * @param outline corners of the circle on the image, one after the other
 */
public record LaueCircle(PixelPoint centre, List<PixelPoint> outline) {
    private static final int CORNERS = 180;

    /** Copies the list. */
    public LaueCircle {
        outline = List.copyOf(outline);
    }

    /**
     * The Laue circle of a pattern.
     *
     * @param placement the pattern
     * @return its circle; empty when the crystal is exactly on the zone axis, or leans so far that the circle leaves the sphere
     *     that the camera sees
     */
    public static Optional<LaueCircle> of(Placement placement) {
        double wavelength = placement.beam().wavelength();
        double k = 1 / wavelength;
        Vector3 n = placement
                .orientation()
                .rotation()
                .apply(placement.crystal().lattice().vector(placement.setting().zone()))
                .normalize();
        Vector3 centre = Vector3.Z.minus(n.times(n.z())).times(k);
        double radius = centre.norm();
        if (!(radius > 1e-9 * k) || 2 * radius >= k) {
            return Optional.empty();
        }
        Vector3 first = centre.times(1 / radius);
        Vector3 second = n.cross(first);
        List<PixelPoint> outline = new ArrayList<>();
        for (int i = 0; i < CORNERS; i++) {
            double t = 2 * Math.PI * i / CORNERS;
            Vector3 p = centre.plus(first.times(radius * Math.cos(t))).plus(second.times(radius * Math.sin(t)));
            outline.add(placement.camera().toPixel(new Vector2(p.x(), p.y()), wavelength));
        }
        PixelPoint middle = placement.camera().toPixel(new Vector2(centre.x(), centre.y()), wavelength);
        return Optional.of(new LaueCircle(middle, outline));
    }

    /**
     * The lean that carries the circle's centre, by the smallest angles: for small leans the centre follows exactly.
     *
     * @param by how far the centre is to move, in 1/Å, microscope frame
     * @param wavelength λ in Å
     * @return what has to be added to the lean towards X and Y, in radians
     */
    public static Vector2 lean(Vector2 by, double wavelength) {
        return by.times(-wavelength);
    }
}
