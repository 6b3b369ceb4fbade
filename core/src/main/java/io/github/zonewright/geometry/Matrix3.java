package io.github.zonewright.geometry;

/**
 * A real 3 × 3 matrix, mᵣ꜀ in row r and column c. It acts on column vectors from the left.
 *
 * @param m00 row 0, column 0
 * @param m01 row 0, column 1
 * @param m02 row 0, column 2
 * @param m10 row 1, column 0
 * @param m11 row 1, column 1
 * @param m12 row 1, column 2
 * @param m20 row 2, column 0
 * @param m21 row 2, column 1
 * @param m22 row 2, column 2
 */
public record Matrix3(
        double m00, double m01, double m02, double m10, double m11, double m12, double m20, double m21, double m22) {

    /** The unit matrix. */
    public static final Matrix3 IDENTITY = new Matrix3(1, 0, 0, 0, 1, 0, 0, 0, 1);

    /**
     * A matrix from its columns.
     *
     * @param a column 0
     * @param b column 1
     * @param c column 2
     * @return the matrix (a b c)
     */
    public static Matrix3 ofColumns(Vector3 a, Vector3 b, Vector3 c) {
        return new Matrix3(a.x(), b.x(), c.x(), a.y(), b.y(), c.y(), a.z(), b.z(), c.z());
    }

    /**
     * A matrix from its rows.
     *
     * @param a row 0
     * @param b row 1
     * @param c row 2
     * @return the matrix with these rows
     */
    public static Matrix3 ofRows(Vector3 a, Vector3 b, Vector3 c) {
        return new Matrix3(a.x(), a.y(), a.z(), b.x(), b.y(), b.z(), c.x(), c.y(), c.z());
    }

    /**
     * One element.
     *
     * @param row 0 to 2
     * @param column 0 to 2
     * @return the element
     * @throws IndexOutOfBoundsException if row or column is not 0, 1 or 2
     */
    public double get(int row, int column) {
        Vector3 r = row(row);
        return switch (column) {
            case 0 -> r.x();
            case 1 -> r.y();
            case 2 -> r.z();
            default -> throw new IndexOutOfBoundsException("matrix column " + column + ": expected 0, 1 or 2");
        };
    }

    /**
     * One row.
     *
     * @param row 0 to 2
     * @return the row as a vector
     * @throws IndexOutOfBoundsException if row is not 0, 1 or 2
     */
    public Vector3 row(int row) {
        return switch (row) {
            case 0 -> new Vector3(m00, m01, m02);
            case 1 -> new Vector3(m10, m11, m12);
            case 2 -> new Vector3(m20, m21, m22);
            default -> throw new IndexOutOfBoundsException("matrix row " + row + ": expected 0, 1 or 2");
        };
    }

    /**
     * One column.
     *
     * @param column 0 to 2
     * @return the column as a vector
     * @throws IndexOutOfBoundsException if column is not 0, 1 or 2
     */
    public Vector3 column(int column) {
        return transpose().row(column);
    }

    /**
     * The product with a column vector.
     *
     * @param v the vector
     * @return this · v
     */
    public Vector3 times(Vector3 v) {
        return times(v.x(), v.y(), v.z());
    }

    /**
     * The product with a column vector given by its components.
     *
     * @param x first component
     * @param y second component
     * @param z third component
     * @return this · (x, y, z)
     */
    public Vector3 times(double x, double y, double z) {
        return new Vector3(m00 * x + m01 * y + m02 * z, m10 * x + m11 * y + m12 * z, m20 * x + m21 * y + m22 * z);
    }

    /**
     * The matrix product.
     *
     * @param n the right factor
     * @return this · n
     */
    public Matrix3 times(Matrix3 n) {
        return ofColumns(times(n.column(0)), times(n.column(1)), times(n.column(2)));
    }

    /**
     * Multiplies every element by a number.
     *
     * @param factor the number
     * @return the scaled matrix
     */
    public Matrix3 times(double factor) {
        return ofRows(row(0).times(factor), row(1).times(factor), row(2).times(factor));
    }

    /**
     * The transpose.
     *
     * @return the matrix with rows and columns exchanged
     */
    public Matrix3 transpose() {
        return new Matrix3(m00, m10, m20, m01, m11, m21, m02, m12, m22);
    }

    /**
     * The determinant.
     *
     * @return det(this)
     */
    public double determinant() {
        return row(0).dot(row(1).cross(row(2)));
    }

    /**
     * The inverse.
     *
     * @return the inverse matrix
     * @throws ArithmeticException if the determinant is zero or not finite
     */
    public Matrix3 inverse() {
        double det = determinant();
        if (!(Math.abs(det) > 0) || Double.isInfinite(det)) {
            throw new ArithmeticException("determinant of a matrix to invert: " + det + ", expected finite and not 0");
        }
        Vector3 a = row(0);
        Vector3 b = row(1);
        Vector3 c = row(2);
        return ofColumns(b.cross(c), c.cross(a), a.cross(b)).times(1 / det);
    }

    /**
     * The largest difference between an element of this matrix and the same of another.
     *
     * @param other the other matrix
     * @return the largest |mᵣ꜀ − m′ᵣ꜀|
     */
    public double distanceTo(Matrix3 other) {
        double largest = 0;
        for (int r = 0; r < 3; r++) {
            Vector3 d = row(r).minus(other.row(r));
            largest = Math.max(largest, Math.max(Math.abs(d.x()), Math.max(Math.abs(d.y()), Math.abs(d.z()))));
        }
        return largest;
    }
}
