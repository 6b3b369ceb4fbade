package io.github.zonewright.lattice;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;

/**
 * Indices of a lattice direction [uvw]: the vector ua + vb + wc. As a zone axis it points from the specimen towards the
 * electron source.
 *
 * @param u index along a
 * @param v index along b
 * @param w index along c
 */
public record Uvw(int u, int v, int w) implements Comparable<Uvw> {
    private static final Comparator<Uvw> SIMPLEST_FIRST = Comparator.comparingInt(Uvw::largestIndex)
            .thenComparingInt(z -> Math.abs(z.u) + Math.abs(z.v) + Math.abs(z.w))
            .thenComparingInt(z -> (z.u < 0 ? 1 : 0) + (z.v < 0 ? 1 : 0) + (z.w < 0 ? 1 : 0))
            .thenComparing(Comparator.reverseOrder());

    /**
     * All directions up to a largest index, in the order in which people write one of several that are alike: smallest
     * indices first, then few negative ones, then the largest index first.
     *
     * @param largestIndex the largest index without its sign, 1 or more
     * @return the directions without common divisor, each with its opposite too: [100], [010], [001], …
     */
    public static List<Uvw> upTo(int largestIndex) {
        List<Uvw> all = new ArrayList<>();
        for (int u = -largestIndex; u <= largestIndex; u++) {
            for (int v = -largestIndex; v <= largestIndex; v++) {
                for (int w = -largestIndex; w <= largestIndex; w++) {
                    Uvw zone = new Uvw(u, v, w);
                    if (!zone.isZero() && zone.reduced().equals(zone)) {
                        all.add(zone);
                    }
                }
            }
        }
        all.sort(SIMPLEST_FIRST);
        return all;
    }

    /**
     * Reads indices such as {@code 1 -1 0}, {@code [1-10]} or, for hexagonal axes, {@code 1 1 -2 0}.
     *
     * @param text three indices (or four, of which the first three add up to zero) in any usual bracket; without separators
     *     each has one digit
     * @return the indices as they stand; four are cleared of a common divisor
     * @throws IllegalArgumentException if the text does not hold such indices
     */
    public static Uvw parse(String text) {
        int[] i = IndexText.parse(text, "direction");
        return i.length == 4 ? MillerBravais.direction(i[0], i[1], i[3]) : new Uvw(i[0], i[1], i[2]);
    }

    /**
     * The opposite direction.
     *
     * @return [−u −v −w]
     */
    public Uvw negate() {
        return new Uvw(-u, -v, -w);
    }

    /**
     * The same direction without a common divisor.
     *
     * @return the reduced indices; [0 0 0] stays as it is
     */
    public Uvw reduced() {
        int g = gcd(gcd(Math.abs(u), Math.abs(v)), Math.abs(w));
        return g <= 1 ? this : new Uvw(u / g, v / g, w / g);
    }

    /**
     * The common plane of two directions (Weiss zone law).
     *
     * @param other the other direction
     * @return the Miller indices, without common divisor, of the plane that holds both
     * @throws IllegalArgumentException if the two are parallel
     */
    public Hkl planeWith(Uvw other) {
        Uvw n = new Hkl(u, v, w).zoneWith(new Hkl(other.u, other.v, other.w));
        return new Hkl(n.u(), n.v(), n.w());
    }

    /**
     * Whether all indices are zero, which is no direction.
     *
     * @return true for [0 0 0]
     */
    public boolean isZero() {
        return u == 0 && v == 0 && w == 0;
    }

    /**
     * The largest index without its sign.
     *
     * @return max(|u|, |v|, |w|)
     */
    public int largestIndex() {
        return Math.max(Math.abs(u), Math.max(Math.abs(v), Math.abs(w)));
    }

    private static int gcd(int a, int b) {
        return b == 0 ? a : gcd(b, a % b);
    }

    @Override
    public int compareTo(Uvw o) {
        int c = Integer.compare(u, o.u);
        c = c != 0 ? c : Integer.compare(v, o.v);
        return c != 0 ? c : Integer.compare(w, o.w);
    }

    /**
     * The indices in plain text.
     *
     * @return for example {@code 1 -1 0}
     */
    @Override
    public String toString() {
        return u + " " + v + " " + w;
    }
}
