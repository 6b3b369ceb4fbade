package io.github.zonewright.imagej;

import io.github.zonewright.crystal.AtomSite;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.indexing.OrientationSearch;
import io.github.zonewright.indexing.SearchResult;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.util.concurrent.TimeUnit;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Param;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;

/**
 * What one fit of a face-centred cubic crystal along [001] costs from ImageJ's pixels to solutions, and what each further
 * crystal adds. The rows of {@link SpotFindingBenchmark} for the same patterns, run with these, are the measure.
 */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
public class FitBenchmark {
    private static final double EDGE = 4.0495;

    /** Which of the drawn patterns. */
    @Param({"clean", "stopped"})
    private String pattern;

    private short[] pixels;
    private MeasuredPattern measured;
    private OrientationSearch right;
    private OrientationSearch wrong;

    /** Draws the image, and measures it once. */
    @Setup
    public void draw() {
        pixels = DrawnPattern.pixels(pattern);
        measured = measure();
        Crystal aluminium = Crystal.of("aluminium", Lattice.cubic(EDGE), "F m -3 m", AtomSite.of("Al", 0, 0, 0));
        Crystal silicon = Crystal.of("silicon", Lattice.cubic(5.4309), "F d -3 m:1", AtomSite.of("Si", 0, 0, 0));
        double constant = 1.005 * DrawnPattern.spacing(pattern) * EDGE / 2;
        right = OrientationSearch.of(aluminium, Beam.ofKilovolts(200), constant, 0.02, false);
        wrong = OrientationSearch.of(silicon, Beam.ofKilovolts(200), constant, 0.02, false);
        if (measured.spots().size() < 40 || right.find(measured).best().isEmpty()) {
            throw new IllegalStateException(pattern + ": " + measured.spots().size() + " spots and no orientation");
        }
    }

    private MeasuredPattern measure() {
        return SpotFinder.measure(GrayImage.ofUnsignedShorts(DrawnPattern.SIZE, DrawnPattern.SIZE, pixels));
    }

    /**
     * From pixels to solutions, for the crystal that the pattern comes from.
     *
     * @return the result
     */
    @Benchmark
    public SearchResult fit() {
        return right.find(measure());
    }

    /**
     * What another crystal adds on the same image.
     *
     * @return the result, most likely without a solution
     */
    @Benchmark
    public SearchResult furtherCrystal() {
        return wrong.find(measured);
    }
}
