package io.github.zonewright.indexing;

import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.ReciprocalLattice;
import io.github.zonewright.lattice.Uvw;

/**
 * A reduced primitive basis of the reciprocal-lattice plane through the origin that belongs to a zone: the first vector is
 * a shortest one of the plane, the second a shortest one not along it (Gauss reduction of a two-dimensional lattice).
 *
 * @param first a shortest lattice vector of the zone
 * @param second a shortest one of the others, at 60° to 120° from the first
 */
record ZoneBasis(Hkl first, Hkl second) {

    static ZoneBasis of(Uvw direction, ReciprocalLattice reciprocal) {
        Uvw z = direction.reduced();
        Hkl a;
        Hkl b;
        if (z.u() == 0 && z.v() == 0) {
            a = new Hkl(1, 0, 0);
            b = new Hkl(0, 1, 0);
        } else {
            int[] bezout = bezout(z.u(), z.v());
            int g = bezout[2];
            a = new Hkl(z.v() / g, -z.u() / g, 0);
            b = new Hkl(z.w() * bezout[0], z.w() * bezout[1], -g);
        }
        return reduce(a, b, reciprocal);
    }

    private static ZoneBasis reduce(Hkl a, Hkl b, ReciprocalLattice reciprocal) {
        Hkl shorter = a;
        Hkl longer = b;
        while (true) {
            double s = squared(shorter, reciprocal);
            double l = squared(longer, reciprocal);
            if (l < s * (1 - 1e-12)) {
                Hkl swap = shorter;
                shorter = longer;
                longer = swap;
                s = l;
            }
            double projection = reciprocal.vector(shorter).dot(reciprocal.vector(longer)) / s;
            int n = (int) Math.rint(projection * (1 - 1e-12));
            if (n == 0) {
                return new ZoneBasis(shorter, longer);
            }
            longer = longer.minus(new Hkl(n * shorter.h(), n * shorter.k(), n * shorter.l()));
        }
    }

    private static double squared(Hkl hkl, ReciprocalLattice reciprocal) {
        double length = reciprocal.vector(hkl).norm();
        return length * length;
    }

    /** Numbers p, q and the positive greatest common divisor g with p·u + q·v = g. */
    private static int[] bezout(int u, int v) {
        int oldR = u;
        int r = v;
        int oldP = 1;
        int p = 0;
        int oldQ = 0;
        int q = 1;
        while (r != 0) {
            int quotient = oldR / r;
            int t = oldR - quotient * r;
            oldR = r;
            r = t;
            t = oldP - quotient * p;
            oldP = p;
            p = t;
            t = oldQ - quotient * q;
            oldQ = q;
            q = t;
        }
        int sign = oldR < 0 ? -1 : 1;
        return new int[] {sign * oldP, sign * oldQ, sign * oldR};
    }
}
