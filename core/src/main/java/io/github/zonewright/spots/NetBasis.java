package io.github.zonewright.spots;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;

/**
 * A trial net: origin and two vectors. A row is a net whose second vector is longer than the pattern is wide.
 *
 * @param row whether b only stands for the room across
 */
record NetBasis(PixelPoint origin, Vector2 a, Vector2 b, boolean row) {

    double area() {
        return Math.abs(a.cross(b));
    }

    /** The indices of the node nearest in oblique coordinates. */
    int[] nearest(PixelPoint p) {
        Vector2 v = p.minus(origin);
        double area = a.cross(b);
        int n1 = (int) Math.rint(v.cross(b) / area);
        int n2 = row ? 0 : (int) Math.rint(a.cross(v) / area);
        if (row) {
            n1 = (int) Math.rint(v.dot(a) / a.dot(a));
        }
        return new int[] {n1, n2};
    }

    PixelPoint at(int n1, int n2) {
        return origin.plus(a.times(n1)).plus(b.times(n2));
    }

    /** The shortest vectors by Gauss's reduction, at 60° to 90°. */
    NetBasis reduced() {
        if (row) {
            return this;
        }
        Vector2 first = a;
        Vector2 second = b;
        for (int i = 0; i < 100; i++) {
            if (second.norm() < first.norm()) {
                Vector2 swap = first;
                first = second;
                second = swap;
            }
            double n = Math.rint(first.dot(second) / first.dot(first));
            if (n == 0) {
                break;
            }
            second = second.minus(first.times(n));
        }
        if (first.dot(second) < 0) {
            second = second.times(-1);
        }
        return new NetBasis(origin, first, second, false);
    }
}
