package io.github.zonewright.geometry;

/**
 * A vector of space, in whatever unit and frame the caller keeps.
 *
 * @param x first component
 * @param y second component
 * @param z third component
 */
public record Vector3(double x, double y, double z) {

    /** The zero vector. */
    public static final Vector3 ZERO = new Vector3(0, 0, 0);

    /** The unit vector along x. */
    public static final Vector3 X = new Vector3(1, 0, 0);

    /** The unit vector along y. */
    public static final Vector3 Y = new Vector3(0, 1, 0);

    /** The unit vector along z. */
    public static final Vector3 Z = new Vector3(0, 0, 1);

    /**
     * Adds a vector.
     *
     * @param other the vector to add
     * @return the sum
     */
    public Vector3 plus(Vector3 other) {
        return new Vector3(x + other.x, y + other.y, z + other.z);
    }

    /**
     * Subtracts a vector.
     *
     * @param other the vector to take away
     * @return the difference
     */
    public Vector3 minus(Vector3 other) {
        return new Vector3(x - other.x, y - other.y, z - other.z);
    }

    /**
     * Multiplies by a number.
     *
     * @param factor the number
     * @return the scaled vector
     */
    public Vector3 times(double factor) {
        return new Vector3(x * factor, y * factor, z * factor);
    }

    /**
     * The opposite vector.
     *
     * @return this vector times −1
     */
    public Vector3 negate() {
        return new Vector3(-x, -y, -z);
    }

    /**
     * The scalar product.
     *
     * @param other the other vector
     * @return x·x′ + y·y′ + z·z′
     */
    public double dot(Vector3 other) {
        return x * other.x + y * other.y + z * other.z;
    }

    /**
     * The vector product, right-handed: X × Y = Z.
     *
     * @param other the other vector
     * @return this × other
     */
    public Vector3 cross(Vector3 other) {
        return new Vector3(y * other.z - z * other.y, z * other.x - x * other.z, x * other.y - y * other.x);
    }

    /**
     * The length.
     *
     * @return √(x² + y² + z²)
     */
    public double norm() {
        return Math.sqrt(x * x + y * y + z * z);
    }

    /**
     * The unit vector of this direction.
     *
     * @return this vector divided by its length
     * @throws ArithmeticException if the length is zero or not finite
     */
    public Vector3 normalize() {
        double n = norm();
        if (!(n > 0) || Double.isInfinite(n)) {
            throw new ArithmeticException(
                    "direction of the vector (" + x + ", " + y + ", " + z + "): expected a finite length above 0");
        }
        return times(1 / n);
    }

    /**
     * The angle between two vectors, accurate for small and for nearly straight angles too.
     *
     * @param other the other vector
     * @return the angle in radians, 0 to π; 0 if one of them is the zero vector, which has no direction
     */
    public double angleTo(Vector3 other) {
        return Math.atan2(cross(other).norm(), dot(other));
    }

    /**
     * A unit vector at right angles to this one; which one is settled by the vector alone.
     *
     * @return a unit vector perpendicular to this one
     * @throws ArithmeticException if the length is zero or not finite
     */
    public Vector3 anyPerpendicular() {
        Vector3 axis =
                Math.abs(x) <= Math.abs(y) && Math.abs(x) <= Math.abs(z) ? X : Math.abs(y) <= Math.abs(z) ? Y : Z;
        return normalize().cross(axis).normalize();
    }
}
