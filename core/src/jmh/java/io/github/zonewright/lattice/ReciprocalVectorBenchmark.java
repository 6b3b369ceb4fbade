package io.github.zonewright.lattice;

import io.github.zonewright.geometry.Vector3;
import java.util.concurrent.TimeUnit;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;

/**
 * What the types of the lattice cost: the squared lengths of all reciprocal-lattice vectors up to |h|, |k|, |l| = 10,
 * summed once through {@link ReciprocalLattice} and once by bare arithmetic over arrays of the same numbers.
 */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MICROSECONDS)
public class ReciprocalVectorBenchmark {
    private static final int LARGEST = 10;

    private final ReciprocalLattice lattice =
            Lattice.ofDegrees(5.1, 5.2, 5.3, 90, 99.2, 90).reciprocal();
    private Hkl[] reflections;
    private double[] indices;
    private double[] basis;

    /** Lays out the same reflections as objects and as plain numbers. */
    @Setup
    public void layOut() {
        int side = 2 * LARGEST + 1;
        reflections = new Hkl[side * side * side];
        indices = new double[3 * reflections.length];
        for (int i = 0; i < reflections.length; i++) {
            Hkl hkl = new Hkl(i / (side * side) - LARGEST, i / side % side - LARGEST, i % side - LARGEST);
            reflections[i] = hkl;
            indices[3 * i] = hkl.h();
            indices[3 * i + 1] = hkl.k();
            indices[3 * i + 2] = hkl.l();
        }
        Vector3 a = lattice.vector(new Hkl(1, 0, 0));
        Vector3 b = lattice.vector(new Hkl(0, 1, 0));
        Vector3 c = lattice.vector(new Hkl(0, 0, 1));
        basis = new double[] {a.x(), b.x(), c.x(), a.y(), b.y(), c.y(), a.z(), b.z(), c.z()};
    }

    /**
     * The library's way.
     *
     * @return the sum of |g|², in 1/Å²
     */
    @Benchmark
    public double library() {
        double sum = 0;
        for (Hkl hkl : reflections) {
            Vector3 g = lattice.vector(hkl);
            sum += g.x() * g.x() + g.y() * g.y() + g.z() * g.z();
        }
        return sum;
    }

    /**
     * The yardstick.
     *
     * @return the sum of |g|², in 1/Å²
     */
    @Benchmark
    public double bareArithmetic() {
        double sum = 0;
        for (int i = 0; i < indices.length; i += 3) {
            double h = indices[i];
            double k = indices[i + 1];
            double l = indices[i + 2];
            double x = basis[0] * h + basis[1] * k + basis[2] * l;
            double y = basis[3] * h + basis[4] * k + basis[5] * l;
            double z = basis[6] * h + basis[7] * k + basis[8] * l;
            sum += x * x + y * y + z * z;
        }
        return sum;
    }
}
