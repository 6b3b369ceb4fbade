package io.github.zonewright.lattice;

import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Vector3;

/**
 * A direct lattice: the edges a, b, c of the cell in Å and the angles α, β, γ between them in radians.
 *
 * <p>Cartesian frame: x ∥ a, b in the xy plane, z ∥ c*.
 *
 * @param a edge a in Å
 * @param b edge b in Å
 * @param c edge c in Å
 * @param alpha angle between b and c in radians
 * @param beta angle between c and a in radians
 * @param gamma angle between a and b in radians
 */
public record Lattice(double a, double b, double c, double alpha, double beta, double gamma) {

    private static final double LONGEST_EDGE = 1e4;

    /**
     * Checks the cell.
     *
     * @throws IllegalArgumentException if an edge is not above 0 and at most 10,000 Å, an angle not between 0 and 180°,
     *     or the three angles close no cell of positive volume
     */
    public Lattice {
        checkEdge("a", a);
        checkEdge("b", b);
        checkEdge("c", c);
        checkAngle("alpha", alpha);
        checkAngle("beta", beta);
        checkAngle("gamma", gamma);
        if (!(squaredUnitVolume(alpha, beta, gamma) > 1e-12)) {
            throw new IllegalArgumentException(
                    "cell angles " + Math.toDegrees(alpha) + ", " + Math.toDegrees(beta) + ", " + Math.toDegrees(gamma)
                            + " degrees: they close no cell, expected each to be less than the sum of the other two"
                            + " and their sum to be less than 360");
        }
    }

    /**
     * A lattice with its angles in degrees.
     *
     * @param a edge a in Å
     * @param b edge b in Å
     * @param c edge c in Å
     * @param alpha angle between b and c in degrees
     * @param beta angle between c and a in degrees
     * @param gamma angle between a and b in degrees
     * @return the lattice
     * @throws IllegalArgumentException if there is no such cell
     */
    public static Lattice ofDegrees(double a, double b, double c, double alpha, double beta, double gamma) {
        return new Lattice(a, b, c, Math.toRadians(alpha), Math.toRadians(beta), Math.toRadians(gamma));
    }

    /**
     * A cubic lattice.
     *
     * @param a edge in Å
     * @return the lattice
     */
    public static Lattice cubic(double a) {
        return ofDegrees(a, a, a, 90, 90, 90);
    }

    /**
     * A tetragonal lattice.
     *
     * @param a edges a and b in Å
     * @param c edge c in Å
     * @return the lattice
     */
    public static Lattice tetragonal(double a, double c) {
        return ofDegrees(a, a, c, 90, 90, 90);
    }

    /**
     * An orthorhombic lattice.
     *
     * @param a edge a in Å
     * @param b edge b in Å
     * @param c edge c in Å
     * @return the lattice
     */
    public static Lattice orthorhombic(double a, double b, double c) {
        return ofDegrees(a, b, c, 90, 90, 90);
    }

    /**
     * A hexagonal lattice, or a trigonal one on hexagonal axes.
     *
     * @param a edges a and b in Å
     * @param c edge c in Å
     * @return the lattice
     */
    public static Lattice hexagonal(double a, double c) {
        return ofDegrees(a, a, c, 90, 90, 120);
    }

    /**
     * A rhombohedral lattice on its own axes.
     *
     * @param a the three edges in Å
     * @param alpha the three angles in degrees
     * @return the lattice
     */
    public static Lattice rhombohedralDegrees(double a, double alpha) {
        return ofDegrees(a, a, a, alpha, alpha, alpha);
    }

    /**
     * A monoclinic lattice with unique axis b.
     *
     * @param a edge a in Å
     * @param b edge b in Å
     * @param c edge c in Å
     * @param beta angle between c and a in degrees
     * @return the lattice
     */
    public static Lattice monoclinicDegrees(double a, double b, double c, double beta) {
        return ofDegrees(a, b, c, 90, beta, 90);
    }

    private static void checkEdge(String name, double value) {
        if (!(value > 0 && value <= LONGEST_EDGE)) {
            throw new IllegalArgumentException(
                    "cell edge " + name + ": " + value + " Å, expected above 0 and at most " + LONGEST_EDGE + " Å");
        }
    }

    private static void checkAngle(String name, double radians) {
        if (!(radians > 0 && radians < Math.PI)) {
            throw new IllegalArgumentException("cell angle " + name + ": " + Math.toDegrees(radians)
                    + " degrees, expected between 0 and 180 degrees");
        }
    }

    private static double squaredUnitVolume(double alpha, double beta, double gamma) {
        double ca = cosine(alpha);
        double cb = cosine(beta);
        double cg = cosine(gamma);
        return 1 - ca * ca - cb * cb - cg * cg + 2 * ca * cb * cg;
    }

    /** The cosine, exact for a right angle and for 60° and 120°, so that a hexagonal cell is exactly that. */
    private static double cosine(double angle) {
        double c = Math.cos(angle);
        double doubled = Math.rint(2 * c);
        return Math.abs(2 * c - doubled) < 1e-14 ? doubled / 2 : c;
    }

    /**
     * The matrix A whose columns are a, b, c in the Cartesian frame: v = A·(u, v, w).
     *
     * @return the basis in Å
     */
    public Matrix3 basis() {
        double ca = cosine(alpha);
        double cb = cosine(beta);
        double cg = cosine(gamma);
        double sg = Math.sqrt(1 - cg * cg);
        double cx = cb;
        double cy = (ca - cb * cg) / sg;
        double cz = Math.sqrt(squaredUnitVolume(alpha, beta, gamma)) / sg;
        return new Matrix3(a, b * cg, c * cx, 0, b * sg, c * cy, 0, 0, c * cz);
    }

    /**
     * The metric tensor AᵀA.
     *
     * @return the scalar products of the edges in Å²
     */
    public Matrix3 metric() {
        Matrix3 m = basis();
        return m.transpose().times(m);
    }

    /**
     * The volume of the cell.
     *
     * @return the volume in Å³
     */
    public double volume() {
        return a * b * c * Math.sqrt(squaredUnitVolume(alpha, beta, gamma));
    }

    /**
     * The reciprocal lattice.
     *
     * @return the lattice of g vectors, without 2π
     */
    public ReciprocalLattice reciprocal() {
        return new ReciprocalLattice(basis().inverse().transpose());
    }

    /**
     * The direction [uvw] in the Cartesian frame.
     *
     * @param uvw the indices
     * @return ua + vb + wc in Å
     */
    public Vector3 vector(Uvw uvw) {
        return basis().times(uvw.u(), uvw.v(), uvw.w());
    }

    /**
     * The angle between two directions or zone axes.
     *
     * @param first one direction
     * @param second the other
     * @return the angle in radians, 0 to π
     */
    public double angle(Uvw first, Uvw second) {
        return vector(first).angleTo(vector(second));
    }

    /**
     * Whether the axes are hexagonal (a = b, α = β = 90°, γ = 120°, to 1e-4 relative or 0.01°), so that four-index forms
     * make sense.
     *
     * @return true for hexagonal axes
     */
    public boolean hasHexagonalAxes() {
        double tolerance = Math.toRadians(0.01);
        return Math.abs(a - b) <= 1e-4 * a
                && Math.abs(alpha - Math.PI / 2) < tolerance
                && Math.abs(beta - Math.PI / 2) < tolerance
                && Math.abs(gamma - 2 * Math.PI / 3) < tolerance;
    }

    /**
     * The edges and angles for a person to read.
     *
     * @return edges in Å and angles in degrees
     */
    @Override
    public String toString() {
        return String.format(
                java.util.Locale.ROOT,
                "a %.4f b %.4f c %.4f Å, α %.3f β %.3f γ %.3f°",
                a,
                b,
                c,
                Math.toDegrees(alpha),
                Math.toDegrees(beta),
                Math.toDegrees(gamma));
    }
}
