package io.github.zonewright.geometry;

/**
 * A proper rotation of space, kept as a unit quaternion w + xi + yj + zk with w ≥ 0. Of the two signs of an exact half
 * turn (w = 0) the one whose first component other than zero is positive is kept, so equal rotations are equal objects.
 *
 * <p>Active and right-handed: a turn by +90° about Z takes X to Y. {@code a.after(b)} turns by b first.
 */
public final class Rotation {

    /** The rotation that leaves everything where it is. */
    public static final Rotation IDENTITY = new Rotation(1, 0, 0, 0);

    private static final double ORTHOGONALITY_TOLERANCE = 1e-6;

    /** Rounding of a squared norm: a quaternion this close to one is left as it is and so survives a round trip bit for bit. */
    private static final double NORM_ROUNDING = 2e-15;

    private final double w;
    private final double x;
    private final double y;
    private final double z;

    private Rotation(double w, double x, double y, double z) {
        double squared = w * w + x * x + y * y + z * z;
        double factor = Math.abs(squared - 1) <= NORM_ROUNDING ? 1 : 1 / Math.sqrt(squared);
        double first = w != 0 ? w : x != 0 ? x : y != 0 ? y : z;
        double signed = first < 0 ? -factor : factor;
        // Adding zero turns −0 into 0, which equals() and hashCode() would tell apart.
        this.w = w * signed + 0.0;
        this.x = x * signed + 0.0;
        this.y = y * signed + 0.0;
        this.z = z * signed + 0.0;
    }

    /**
     * The rotation of a quaternion, which need not be normalised.
     *
     * @param w scalar part
     * @param x part along x
     * @param y part along y
     * @param z part along z
     * @return the rotation
     * @throws IllegalArgumentException if the norm is zero or not finite
     */
    public static Rotation ofQuaternion(double w, double x, double y, double z) {
        double n = w * w + x * x + y * y + z * z;
        if (!(n > 0) || Double.isInfinite(n)) {
            throw new IllegalArgumentException(
                    "squared norm of the quaternion: " + n + ", expected finite and above 0");
        }
        return new Rotation(w, x, y, z);
    }

    /**
     * The rotation by an angle about an axis.
     *
     * @param axis the axis, of any length above zero
     * @param angle in radians, right-handed about the axis
     * @return the rotation
     * @throws ArithmeticException if the axis has no direction
     * @throws IllegalArgumentException if the angle is not finite
     */
    public static Rotation ofAxisAngle(Vector3 axis, double angle) {
        if (!Double.isFinite(angle)) {
            throw new IllegalArgumentException("rotation angle: " + angle + " rad, expected a finite angle");
        }
        Vector3 u = axis.normalize().times(Math.sin(angle / 2));
        return new Rotation(Math.cos(angle / 2), u.x(), u.y(), u.z());
    }

    /**
     * The rotation of a rotation vector: its direction is the axis, its length the angle in radians.
     *
     * @param v the rotation vector
     * @return the rotation; the identity for the zero vector
     */
    public static Rotation ofVector(Vector3 v) {
        double angle = v.norm();
        return angle < 1e-300 ? IDENTITY : ofAxisAngle(v, angle);
    }

    /**
     * The rotation that takes one direction to another by the shortest way.
     *
     * @param from the first direction
     * @param to the second direction
     * @return the rotation; for opposite directions half a turn about some perpendicular axis
     * @throws ArithmeticException if one of them has no direction
     */
    public static Rotation between(Vector3 from, Vector3 to) {
        Vector3 a = from.normalize();
        Vector3 b = to.normalize();
        Vector3 axis = a.cross(b);
        if (axis.norm() < 1e-15) {
            return a.dot(b) > 0 ? IDENTITY : ofAxisAngle(a.anyPerpendicular(), Math.PI);
        }
        // Near half a turn the product is all but rounding and no longer perpendicular, which the turn would double.
        Vector3 perpendicular = axis.minus(a.times(axis.dot(a)));
        return ofAxisAngle(perpendicular, a.angleTo(b));
    }

    /**
     * The rotation of a matrix with orthonormal columns and determinant +1.
     *
     * @param m the matrix
     * @return the rotation
     * @throws IllegalArgumentException if the matrix is not a proper rotation to 1e-6 in every element of mᵀm
     */
    public static Rotation ofMatrix(Matrix3 m) {
        double off = m.transpose().times(m).distanceTo(Matrix3.IDENTITY);
        if (!(off < ORTHOGONALITY_TOLERANCE) || m.determinant() < 0) {
            throw new IllegalArgumentException("rotation matrix: orthogonal to " + off + ", determinant "
                    + m.determinant() + "; expected orthogonal to " + ORTHOGONALITY_TOLERANCE + ", determinant +1");
        }
        double trace = m.m00() + m.m11() + m.m22();
        double qw = 1 + trace;
        double qx = 1 + m.m00() - m.m11() - m.m22();
        double qy = 1 - m.m00() + m.m11() - m.m22();
        double qz = 1 - m.m00() - m.m11() + m.m22();
        double largest = Math.max(Math.max(qw, qx), Math.max(qy, qz));
        if (largest == qw) {
            return new Rotation(qw, m.m21() - m.m12(), m.m02() - m.m20(), m.m10() - m.m01());
        }
        if (largest == qx) {
            return new Rotation(m.m21() - m.m12(), qx, m.m01() + m.m10(), m.m02() + m.m20());
        }
        if (largest == qy) {
            return new Rotation(m.m02() - m.m20(), m.m01() + m.m10(), qy, m.m12() + m.m21());
        }
        return new Rotation(m.m10() - m.m01(), m.m02() + m.m20(), m.m12() + m.m21(), qz);
    }

    /**
     * The quaternion.
     *
     * @return w, x, y, z with unit norm and w ≥ 0
     */
    public double[] quaternion() {
        return new double[] {w, x, y, z};
    }

    /**
     * The matrix.
     *
     * @return the orthogonal matrix that acts on column vectors
     */
    public Matrix3 matrix() {
        return new Matrix3(
                1 - 2 * (y * y + z * z),
                2 * (x * y - w * z),
                2 * (x * z + w * y),
                2 * (x * y + w * z),
                1 - 2 * (x * x + z * z),
                2 * (y * z - w * x),
                2 * (x * z - w * y),
                2 * (y * z + w * x),
                1 - 2 * (x * x + y * y));
    }

    /**
     * Turns a vector.
     *
     * @param v the vector
     * @return the turned vector
     */
    public Vector3 apply(Vector3 v) {
        return matrix().times(v);
    }

    /**
     * This rotation after another one.
     *
     * @param first the rotation that acts first
     * @return v ↦ this(first(v))
     */
    public Rotation after(Rotation first) {
        return new Rotation(
                w * first.w - x * first.x - y * first.y - z * first.z,
                w * first.x + x * first.w + y * first.z - z * first.y,
                w * first.y - x * first.z + y * first.w + z * first.x,
                w * first.z + x * first.y - y * first.x + z * first.w);
    }

    /**
     * The inverse rotation.
     *
     * @return the rotation by the opposite angle
     */
    public Rotation inverse() {
        return new Rotation(w, -x, -y, -z);
    }

    /**
     * The rotation angle.
     *
     * @return the angle in radians, 0 to π
     */
    public double angle() {
        return 2 * Math.atan2(Math.sqrt(x * x + y * y + z * z), w);
    }

    /**
     * The rotation axis.
     *
     * @return the unit axis about which {@link #angle()} is counted right-handed; Z for the identity
     */
    public Vector3 axis() {
        Vector3 v = new Vector3(x, y, z);
        return v.norm() < 1e-300 ? Vector3.Z : v.normalize();
    }

    /**
     * The angle of the rotation from this one to another.
     *
     * @param other the other rotation
     * @return the angle in radians, 0 to π
     */
    public double angleTo(Rotation other) {
        return other.after(inverse()).angle();
    }

    @Override
    public boolean equals(Object o) {
        return o instanceof Rotation r && w == r.w && x == r.x && y == r.y && z == r.z;
    }

    @Override
    public int hashCode() {
        return Double.hashCode(w) + 31 * (Double.hashCode(x) + 31 * (Double.hashCode(y) + 31 * Double.hashCode(z)));
    }

    @Override
    public String toString() {
        return "Rotation(" + w + "; " + x + ", " + y + ", " + z + ")";
    }
}
