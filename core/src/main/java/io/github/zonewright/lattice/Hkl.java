package io.github.zonewright.lattice;

/**
 * Miller indices of a reflection, or of a set of planes when they have no common divisor.
 *
 * @param h index along a*
 * @param k index along b*
 * @param l index along c*
 */
public record Hkl(int h, int k, int l) implements Comparable<Hkl> {

    /**
     * Reads indices such as {@code 1 -1 0}, {@code (1-10)}, {@code 1,-1,0} or, for hexagonal axes, {@code 1 0 -1 1}.
     *
     * @param text three indices (or four, of which the first three add up to zero) in any usual bracket; without separators
     *     each has one digit
     * @return the indices
     * @throws IllegalArgumentException if the text does not hold such indices
     */
    public static Hkl parse(String text) {
        int[] i = IndexText.parse(text, "reflection");
        return new Hkl(i[0], i[1], i[i.length - 1]);
    }

    /**
     * The opposite reflection, Friedel's mate.
     *
     * @return (−h, −k, −l)
     */
    public Hkl negate() {
        return new Hkl(-h, -k, -l);
    }

    /**
     * Adds indices.
     *
     * @param other the other reflection
     * @return the sum
     */
    public Hkl plus(Hkl other) {
        return new Hkl(h + other.h, k + other.k, l + other.l);
    }

    /**
     * Subtracts indices.
     *
     * @param other the other reflection
     * @return the difference
     */
    public Hkl minus(Hkl other) {
        return new Hkl(h - other.h, k - other.k, l - other.l);
    }

    /**
     * The Laue layer of a direction: hu + kv + lw, zero when the direction lies in the planes (Weiss zone law).
     *
     * @param zone the direction
     * @return hu + kv + lw
     */
    public int dot(Uvw zone) {
        return h * zone.u() + k * zone.v() + l * zone.w();
    }

    /**
     * The common direction of two sets of planes (Weiss zone law).
     *
     * @param other the other reflection
     * @return the zone axis without common divisor, along g₁ × g₂
     * @throws IllegalArgumentException if the two are parallel
     */
    public Uvw zoneWith(Hkl other) {
        int u = k * other.l - l * other.k;
        int v = l * other.h - h * other.l;
        int w = h * other.k - k * other.h;
        if (u == 0 && v == 0 && w == 0) {
            throw new IllegalArgumentException(
                    "zone of " + this + " and " + other + ": they are parallel, expected two different directions");
        }
        return new Uvw(u, v, w).reduced();
    }

    /**
     * Whether all indices are zero, which is the direct beam.
     *
     * @return true for 000
     */
    public boolean isZero() {
        return h == 0 && k == 0 && l == 0;
    }

    @Override
    public int compareTo(Hkl o) {
        int c = Integer.compare(h, o.h);
        c = c != 0 ? c : Integer.compare(k, o.k);
        return c != 0 ? c : Integer.compare(l, o.l);
    }

    /**
     * The indices in plain text.
     *
     * @return for example {@code 1 -1 0}
     */
    @Override
    public String toString() {
        return h + " " + k + " " + l;
    }
}
