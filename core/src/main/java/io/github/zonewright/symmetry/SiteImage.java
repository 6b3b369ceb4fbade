package io.github.zonewright.symmetry;

import io.github.zonewright.geometry.Vector3;

/**
 * One site of an orbit.
 *
 * @param operation the operation that takes the given site here, up to a lattice translation
 * @param position fractional coordinates in [0, 1)
 */
public record SiteImage(SymmetryOperation operation, Vector3 position) {

    static SiteImage of(SymmetryOperation operation, Vector3 site) {
        Vector3 p = operation.apply(site);
        return new SiteImage(operation, new Vector3(intoCell(p.x()), intoCell(p.y()), intoCell(p.z())));
    }

    private static double intoCell(double x) {
        double inside = x - Math.floor(x);
        return inside >= 1 ? 0 : inside;
    }

    /** The largest difference of a coordinate between two sites, modulo whole cells. */
    static double separation(Vector3 first, Vector3 second) {
        return largest(nearestOffset(first, second));
    }

    static Vector3 nearestOffset(Vector3 from, Vector3 to) {
        Vector3 d = to.minus(from);
        return new Vector3(d.x() - Math.rint(d.x()), d.y() - Math.rint(d.y()), d.z() - Math.rint(d.z()));
    }

    static double largest(Vector3 v) {
        return Math.max(Math.abs(v.x()), Math.max(Math.abs(v.y()), Math.abs(v.z())));
    }
}
