package io.github.zonewright.pattern;

import io.github.zonewright.crystal.AtomSite;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.Reflection;
import io.github.zonewright.crystal.ReflectionTable;
import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.ZoneSetting;
import java.util.List;
import java.util.concurrent.TimeUnit;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;

/**
 * What a pattern costs beyond its arithmetic: silicon along [011] at 200 kV out to 2 1/Å, once through
 * {@link PatternSimulator#simulate} and once by bare arithmetic over arrays of the same reflections, into arrays.
 *
 * <p>Both turn every reflection, find its excitation error, place and kinematic intensity. The library also makes a spot of
 * each and sorts them, strongest first.
 */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MICROSECONDS)
public class SimulationBenchmark {
    private static final double LARGEST_G = 2;
    private static final double THICKNESS = PatternSimulator.DEFAULT_THICKNESS;
    private static final double LARGEST_EXCITATION = PatternSimulator.DEFAULT_LARGEST_EXCITATION;

    private PatternSimulator simulator;
    private Orientation orientation;
    private double k;
    private double extinctionFactor;
    private double[] turn;
    private double[] gx;
    private double[] gy;
    private double[] gz;
    private double[] amplitude;
    private double[] found;

    /** Lays out the same reflections for the simulator and as plain numbers. */
    @Setup
    public void layOut() {
        Crystal silicon = Crystal.of("silicon", Lattice.cubic(5.4309), "F d -3 m:1", AtomSite.of("Si", 0, 0, 0));
        Beam beam = Beam.ofKilovolts(200);
        simulator = PatternSimulator.of(silicon, beam, LARGEST_G);
        orientation =
                ZoneSetting.onZone(new Uvw(0, 1, 1), new Hkl(2, 0, 0), 0.3).orientation(silicon.lattice());
        k = 1 / beam.wavelength();
        extinctionFactor = Math.PI * silicon.lattice().volume() / (beam.wavelength() * beam.gamma());
        Matrix3 r = orientation.rotation().matrix();
        turn = new double[] {r.m00(), r.m01(), r.m02(), r.m10(), r.m11(), r.m12(), r.m20(), r.m21(), r.m22()};
        double depth = LARGEST_G * LARGEST_G / (k + Math.sqrt(k * k - LARGEST_G * LARGEST_G));
        List<Reflection> reflections =
                ReflectionTable.ofLength(silicon, Math.hypot(LARGEST_G, depth) + LARGEST_EXCITATION)
                        .reflections()
                        .stream()
                        .filter(f -> f.amplitude() > 1e-6)
                        .toList();
        int n = reflections.size();
        gx = reflections.stream().mapToDouble(f -> f.g().x()).toArray();
        gy = reflections.stream().mapToDouble(f -> f.g().y()).toArray();
        gz = reflections.stream().mapToDouble(f -> f.g().z()).toArray();
        amplitude = reflections.stream().mapToDouble(Reflection::amplitude).toArray();
        found = new double[5 * n];
        if (bareArithmetic() != library().spots().size()) {
            throw new IllegalStateException("the two ways find different numbers of spots");
        }
    }

    /**
     * The library's way.
     *
     * @return the pattern
     */
    @Benchmark
    public SpotPattern library() {
        return simulator.simulate(orientation);
    }

    /**
     * The yardstick.
     *
     * @return the number of spots found
     */
    @Benchmark
    public int bareArithmetic() {
        int spots = 0;
        for (int i = 0; i < gx.length; i++) {
            double x = turn[0] * gx[i] + turn[1] * gy[i] + turn[2] * gz[i];
            double y = turn[3] * gx[i] + turn[4] * gy[i] + turn[5] * gz[i];
            double z = turn[6] * gx[i] + turn[7] * gy[i] + turn[8] * gz[i];
            double across = x * x + y * y;
            double s = z - across / (k + Math.sqrt(k * k - across));
            if (Math.abs(s) <= LARGEST_EXCITATION && across <= LARGEST_G * LARGEST_G) {
                double sine = Math.sqrt(across + z * z) / (2 * k);
                double extinction = extinctionFactor * Math.sqrt(1 - sine * sine) / amplitude[i];
                double phase = Math.PI * THICKNESS * s;
                double a = Math.PI * THICKNESS / extinction * (phase == 0 ? 1 : Math.sin(phase) / phase);
                found[5 * spots] = i;
                found[5 * spots + 1] = x;
                found[5 * spots + 2] = y;
                found[5 * spots + 3] = s;
                found[5 * spots + 4] = a * a;
                spots++;
            }
        }
        return spots;
    }
}
