package io.github.zonewright.geometry;

/**
 * A vector of the plane, in whatever unit the caller keeps.
 *
 * @param x first component
 * @param y second component
 */
public record Vector2(double x, double y) {

    /** The zero vector. */
    public static final Vector2 ZERO = new Vector2(0, 0);

    /**
     * The vector of a given length and azimuth.
     *
     * @param length its length
     * @param azimuth angle from +x towards +y, in radians
     * @return the vector
     */
    public static Vector2 ofPolar(double length, double azimuth) {
        return new Vector2(length * Math.cos(azimuth), length * Math.sin(azimuth));
    }

    /**
     * Adds a vector.
     *
     * @param other the vector to add
     * @return the sum
     */
    public Vector2 plus(Vector2 other) {
        return new Vector2(x + other.x, y + other.y);
    }

    /**
     * Subtracts a vector.
     *
     * @param other the vector to take away
     * @return the difference
     */
    public Vector2 minus(Vector2 other) {
        return new Vector2(x - other.x, y - other.y);
    }

    /**
     * Multiplies by a number.
     *
     * @param factor the number
     * @return the scaled vector
     */
    public Vector2 times(double factor) {
        return new Vector2(x * factor, y * factor);
    }

    /**
     * The scalar product.
     *
     * @param other the other vector
     * @return x·x′ + y·y′
     */
    public double dot(Vector2 other) {
        return x * other.x + y * other.y;
    }

    /**
     * The signed area of the parallelogram of two vectors.
     *
     * @param other the other vector
     * @return x·y′ − y·x′, positive when the other vector is counter-clockwise of this one
     */
    public double cross(Vector2 other) {
        return x * other.y - y * other.x;
    }

    /**
     * The length.
     *
     * @return √(x² + y²)
     */
    public double norm() {
        return Math.hypot(x, y);
    }

    /**
     * The azimuth.
     *
     * @return the angle from +x towards +y, in radians, −π to π
     */
    public double azimuth() {
        return Math.atan2(y, x);
    }

    /**
     * Turns the vector.
     *
     * @param angle from +x towards +y, in radians
     * @return the turned vector
     */
    public Vector2 rotate(double angle) {
        double c = Math.cos(angle);
        double s = Math.sin(angle);
        return new Vector2(c * x - s * y, s * x + c * y);
    }
}
