package io.github.zonewright.lattice;

import java.util.Arrays;
import java.util.stream.Collectors;

/**
 * Four-index forms for hexagonal axes (Weber symbols for directions).
 *
 * <p>Planes: (hkl) is (h k i l) with i = −(h + k). Directions: [UVW] is [u v t w] with u = (2U − V)/3, v = (2V − U)/3,
 * t = −(u + v), w = W, cleared of fractions: [1 0 0] is [2 −1 −1 0]. Source: International Tables for Crystallography A,
 * hexagonal axes; the conversion follows from U = u − t, V = v − t.
 */
public final class MillerBravais {

    private MillerBravais() {}

    /**
     * The four indices of a plane or reflection.
     *
     * @param hkl the three indices
     * @return h, k, i, l
     */
    public static int[] of(Hkl hkl) {
        return new int[] {hkl.h(), hkl.k(), -(hkl.h() + hkl.k()), hkl.l()};
    }

    /**
     * The four indices of a direction, without common divisor.
     *
     * @param uvw the three indices
     * @return u, v, t, w
     */
    public static int[] of(Uvw uvw) {
        int u = 2 * uvw.u() - uvw.v();
        int v = 2 * uvw.v() - uvw.u();
        Uvw r = new Uvw(u, v, 3 * uvw.w()).reduced();
        return new int[] {r.u(), r.v(), -(r.u() + r.v()), r.w()};
    }

    /**
     * The three indices of a direction given by four.
     *
     * @param u first index
     * @param v second index; the third is −(u + v)
     * @param w fourth index
     * @return [2u + v, u + 2v, w] without common divisor
     */
    public static Uvw direction(int u, int v, int w) {
        return new Uvw(2 * u + v, u + 2 * v, w).reduced();
    }

    /**
     * The four indices of a plane or reflection in plain text.
     *
     * @param hkl the three indices
     * @return for example {@code 1 0 -1 0}
     */
    public static String text(Hkl hkl) {
        return text(of(hkl));
    }

    /**
     * The four indices of a direction in plain text.
     *
     * @param uvw the three indices
     * @return for example {@code 2 -1 -1 0}
     */
    public static String text(Uvw uvw) {
        return text(of(uvw));
    }

    private static String text(int[] indices) {
        return Arrays.stream(indices).mapToObj(Integer::toString).collect(Collectors.joining(" "));
    }
}
