package io.github.zonewright.symmetry;

import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import java.util.Arrays;

/**
 * A symmetry operation (W, w) of a crystal: a point x of fractional coordinates goes to W·x + w. W holds integers and w
 * exact fractions, kept in units of 1/{@value #DENOMINATOR} of a cell edge (so 1/2, 1/3, 1/4, 1/5, 1/6, 1/8, 1/9, 1/16
 * and their multiples exist, 1/7 does not).
 *
 * <p>Worked number: {@code -y,x-y,z+1/3} takes (0.1, 0.2, 0.3) to (−0.2, −0.1, 0.6333…) and the reflection 1 2 3, as a
 * row vector times W, to 2 −3 3.
 */
public final class SymmetryOperation implements Comparable<SymmetryOperation> {

    /** Translations are counted in units of one over this number of a cell edge. */
    public static final int DENOMINATOR = AffineTriplet.DENOMINATOR;

    /** The operation that leaves every point where it is. */
    public static final SymmetryOperation IDENTITY =
            new SymmetryOperation(new int[] {1, 0, 0, 0, 1, 0, 0, 0, 1}, new int[3]);

    /** The inversion at the origin. */
    public static final SymmetryOperation INVERSION =
            new SymmetryOperation(new int[] {-1, 0, 0, 0, -1, 0, 0, 0, -1}, new int[3]);

    private static final int LARGEST_ELEMENT = 100;

    private final int[] rotation;
    private final int[] translation;

    private SymmetryOperation(int[] rotation, int[] translation) {
        this.rotation = rotation;
        this.translation = translation;
    }

    /**
     * An operation from its parts.
     *
     * @param rotation the nine integers of W, row by row
     * @param translation the three components of w in units of 1/{@value #DENOMINATOR}
     * @return the operation
     * @throws IllegalArgumentException if there are not nine and three numbers, or the determinant of W is not ±1
     */
    public static SymmetryOperation of(int[] rotation, int[] translation) {
        if (rotation.length != 9 || translation.length != 3) {
            throw new IllegalArgumentException("symmetry operation: " + rotation.length + " and " + translation.length
                    + " numbers, expected 9 of the rotation and 3 of the translation");
        }
        for (int element : rotation) {
            if (Math.abs((long) element) > LARGEST_ELEMENT) {
                throw new IllegalArgumentException(
                        "symmetry operation: rotation element " + element + ", expected at most " + LARGEST_ELEMENT);
            }
        }
        SymmetryOperation made = new SymmetryOperation(rotation.clone(), translation.clone());
        if (Math.abs(made.determinant()) != 1) {
            throw new IllegalArgumentException(
                    "symmetry operation \"" + made + "\": determinant " + made.determinant() + ", expected 1 or -1");
        }
        return made;
    }

    /**
     * A pure translation.
     *
     * @param x along a, in units of 1/{@value #DENOMINATOR}
     * @param y along b
     * @param z along c
     * @return the translation
     */
    public static SymmetryOperation ofTranslation(int x, int y, int z) {
        return new SymmetryOperation(IDENTITY.rotation, new int[] {x, y, z});
    }

    /**
     * Reads a triplet such as {@code -x+1/2,y,z}, {@code 1/2-X, Y, Z} or {@code x,y,z+0.3333}. A decimal stands for the
     * fraction of 24 that lies within 0.0035 of it, and otherwise for itself.
     *
     * @param triplet the three expressions
     * @return the operation
     * @throws IllegalArgumentException if the text is no triplet or its rotation part is not unimodular
     */
    public static SymmetryOperation parse(String triplet) {
        AffineTriplet map = AffineTriplet.parse(triplet);
        int[] rotation = new int[9];
        int[] translation = new int[3];
        for (int row = 0; row < 3; row++) {
            for (int column = 0; column < 3; column++) {
                long element = map.matrix()[row][column];
                if (element % DENOMINATOR != 0) {
                    throw new IllegalArgumentException("symmetry operation \"" + triplet
                            + "\": a factor of x, y or z is no integer, expected integers");
                }
                rotation[3 * row + column] = Math.toIntExact(element / DENOMINATOR);
            }
            translation[row] = Math.toIntExact(map.shift()[row]);
        }
        return of(rotation, translation);
    }

    /**
     * One element of W.
     *
     * @param row 0 to 2
     * @param column 0 to 2
     * @return the element
     */
    public int rotation(int row, int column) {
        return rotation[3 * row + column];
    }

    /**
     * One component of w.
     *
     * @param row 0 to 2
     * @return the component in units of 1/{@value #DENOMINATOR}
     */
    public int translation(int row) {
        return translation[row];
    }

    /**
     * The matrix W.
     *
     * @return W, acting on fractional coordinates
     */
    public Matrix3 rotationMatrix() {
        int[] r = rotation;
        return new Matrix3(r[0], r[1], r[2], r[3], r[4], r[5], r[6], r[7], r[8]);
    }

    /**
     * The operation without its translation.
     *
     * @return (W, 0)
     */
    public SymmetryOperation pointPart() {
        return new SymmetryOperation(rotation, new int[3]);
    }

    /**
     * The determinant of W.
     *
     * @return 1 for a proper operation, −1 for an improper one
     */
    public int determinant() {
        int[] r = rotation;
        return r[0] * (r[4] * r[8] - r[5] * r[7])
                - r[1] * (r[3] * r[8] - r[5] * r[6])
                + r[2] * (r[3] * r[7] - r[4] * r[6]);
    }

    /**
     * The order of the rotation, negative for a rotoinversion (so −2 is a mirror or glide).
     *
     * @return one of ±1, ±2, ±3, ±4, ±6
     * @throws IllegalArgumentException if W is none of the crystallographic rotations
     */
    public int rotationType() {
        int det = determinant();
        SymmetryOperation proper = det > 0 ? pointPart() : pointPart().after(INVERSION);
        SymmetryOperation power = proper;
        for (int order = 1; order <= 6; order++) {
            if (power.equals(IDENTITY)) {
                return det * order;
            }
            power = power.after(proper);
        }
        throw new IllegalArgumentException(
                "symmetry operation \"" + this + "\": its rotation is not of order 1, 2, 3, 4 or 6");
    }

    /**
     * Whether W is the unit matrix.
     *
     * @return true for a pure translation, the identity included
     */
    public boolean isTranslation() {
        return Arrays.equals(rotation, IDENTITY.rotation);
    }

    /**
     * The product: first the other operation, then this one.
     *
     * @param first the operation applied first
     * @return (W·W′, W·w′ + w), not reduced to the cell
     */
    public SymmetryOperation after(SymmetryOperation first) {
        int[] r = new int[9];
        int[] t = new int[3];
        for (int row = 0; row < 3; row++) {
            t[row] = translation[row];
            for (int i = 0; i < 3; i++) {
                int factor = rotation[3 * row + i];
                t[row] += factor * first.translation[i];
                for (int column = 0; column < 3; column++) {
                    r[3 * row + column] += factor * first.rotation[3 * i + column];
                }
            }
        }
        return new SymmetryOperation(r, t);
    }

    /**
     * The inverse operation.
     *
     * @return (W⁻¹, −W⁻¹·w), not reduced to the cell
     */
    public SymmetryOperation inverse() {
        int[] r = rotation;
        int det = determinant();
        int[] inverse = {
            det * (r[4] * r[8] - r[5] * r[7]), det * (r[2] * r[7] - r[1] * r[8]), det * (r[1] * r[5] - r[2] * r[4]),
            det * (r[5] * r[6] - r[3] * r[8]), det * (r[0] * r[8] - r[2] * r[6]), det * (r[2] * r[3] - r[0] * r[5]),
            det * (r[3] * r[7] - r[4] * r[6]), det * (r[1] * r[6] - r[0] * r[7]), det * (r[0] * r[4] - r[1] * r[3])
        };
        SymmetryOperation turnedBack = new SymmetryOperation(inverse, new int[3]);
        return turnedBack.after(ofTranslation(-translation[0], -translation[1], -translation[2]));
    }

    /**
     * The same operation with every component of its translation in [0, 1).
     *
     * @return the operation modulo lattice translations
     */
    public SymmetryOperation reduced() {
        int[] t = new int[3];
        for (int i = 0; i < 3; i++) {
            t[i] = Math.floorMod(translation[i], DENOMINATOR);
        }
        return new SymmetryOperation(rotation, t);
    }

    /**
     * The image of a point.
     *
     * @param fractional fractional coordinates
     * @return W·x + w, not reduced to the cell
     */
    public Vector3 apply(Vector3 fractional) {
        return new Vector3(image(0, fractional), image(1, fractional), image(2, fractional));
    }

    private double image(int row, Vector3 p) {
        int i = 3 * row;
        return rotation[i] * p.x()
                + rotation[i + 1] * p.y()
                + rotation[i + 2] * p.z()
                + translation[row] / (double) DENOMINATOR;
    }

    /**
     * The image of a direction.
     *
     * @param direction the direction
     * @return W·u
     */
    public Uvw apply(Uvw direction) {
        int u = direction.u();
        int v = direction.v();
        int w = direction.w();
        int[] r = rotation;
        return new Uvw(r[0] * u + r[1] * v + r[2] * w, r[3] * u + r[4] * v + r[5] * w, r[6] * u + r[7] * v + r[8] * w);
    }

    /**
     * The reflection h·W, whose structure factor is F(h·W) = F(h)·exp(−2πi h·w).
     *
     * @param hkl the reflection, a row vector
     * @return h·W
     */
    public Hkl apply(Hkl hkl) {
        int h = hkl.h();
        int k = hkl.k();
        int l = hkl.l();
        int[] r = rotation;
        return new Hkl(h * r[0] + k * r[3] + l * r[6], h * r[1] + k * r[4] + l * r[7], h * r[2] + k * r[5] + l * r[8]);
    }

    /**
     * The phase 2π h·w, reduced to [0, 2π).
     *
     * @param hkl the reflection
     * @return the phase in radians
     */
    public double phaseShift(Hkl hkl) {
        return 2 * Math.PI * phaseUnits(hkl) / DENOMINATOR;
    }

    /** The exact phase h·w modulo 1, in units of 1/720. */
    int phaseUnits(Hkl hkl) {
        long sum = (long) hkl.h() * translation[0] + (long) hkl.k() * translation[1] + (long) hkl.l() * translation[2];
        return (int) Math.floorMod(sum, (long) DENOMINATOR);
    }

    /** Rotation first, then translation, element by element; an order for lists, without geometric meaning. */
    @Override
    public int compareTo(SymmetryOperation other) {
        int byRotation = Arrays.compare(other.rotation, rotation);
        return byRotation != 0 ? byRotation : Arrays.compare(translation, other.translation);
    }

    @Override
    public boolean equals(Object other) {
        return other instanceof SymmetryOperation that
                && Arrays.equals(rotation, that.rotation)
                && Arrays.equals(translation, that.translation);
    }

    @Override
    public int hashCode() {
        return 31 * Arrays.hashCode(rotation) + Arrays.hashCode(translation);
    }

    /**
     * The operation as a triplet.
     *
     * @return for example {@code -x+1/2,y,z}
     */
    @Override
    public String toString() {
        StringBuilder text = new StringBuilder();
        for (int row = 0; row < 3; row++) {
            text.append(row == 0 ? "" : ",");
            int start = text.length();
            for (int column = 0; column < 3; column++) {
                int factor = rotation(row, column);
                if (factor != 0) {
                    text.append(factor < 0 ? "-" : text.length() == start ? "" : "+");
                    text.append(Math.abs(factor) == 1 ? "" : Math.abs(factor) + "*")
                            .append("xyz".charAt(column));
                }
            }
            int shift = translation[row];
            if (shift != 0 || text.length() == start) {
                text.append(shift < 0 ? "-" : text.length() == start ? "" : "+").append(fraction(Math.abs(shift)));
            }
        }
        return text.toString();
    }

    private static String fraction(int units) {
        int divisor = gcd(units, DENOMINATOR);
        return divisor == DENOMINATOR ? "" + units / DENOMINATOR : units / divisor + "/" + DENOMINATOR / divisor;
    }

    private static int gcd(int a, int b) {
        return b == 0 ? a : gcd(b, a % b);
    }
}
