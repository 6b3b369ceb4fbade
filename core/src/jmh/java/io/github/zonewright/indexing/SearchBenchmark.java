package io.github.zonewright.indexing;

import io.github.zonewright.crystal.AtomSite;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.util.Random;
import java.util.concurrent.TimeUnit;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;

/**
 * What one fit costs: silicon along [011] at 200 kV on a 16-bit image of 1024 × 1024 pixels, some 60 spots with counting
 * noise on a glow. Finding the spots and searching the orientation are measured apart; together they are one fit. A
 * further crystal on the same image costs the search alone.
 */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
public class SearchBenchmark {
    private static final int SIZE = 1024;
    private static final double CELL = 5.4309;
    private static final double CONSTANT = 440;
    private static final double SIGMA = 2;

    private GrayImage image;
    private MeasuredPattern pattern;
    private OrientationSearch search;

    /** Draws the image and measures it once. */
    @Setup
    public void draw() {
        double[] electrons = new double[SIZE * SIZE];
        for (int i = 0; i < electrons.length; i++) {
            double r = Math.hypot(i % SIZE + 0.5 - 520, i / SIZE + 0.5 - 505);
            electrons[i] = 35 + 300 / (1 + r * r / 3600);
        }
        spot(electrons, 520, 505, 40_000);
        // Columns along 200, rows along 1 −1 1: the centred net of [0 1 1], each spot brighter the nearer the centre.
        for (int h = -10; h <= 10; h++) {
            for (int k = -10; k <= 10; k++) {
                boolean allowed = (h - k) % 2 == 0 && (h % 2 != 0 || (h + 2 * k) % 4 == 0);
                double gx = h / CELL;
                double gy = k * Math.sqrt(2) / CELL;
                if (allowed && (h != 0 || k != 0) && Math.hypot(gx, gy) < 1.6) {
                    double x = 520 + CONSTANT * (Math.cos(0.3) * gx - Math.sin(0.3) * gy);
                    double y = 505 - CONSTANT * (Math.sin(0.3) * gx + Math.cos(0.3) * gy);
                    spot(electrons, x, y, 9000 * Math.exp(-3.2 * Math.hypot(gx, gy)));
                }
            }
        }
        Random random = new Random(1);
        short[] values = new short[electrons.length];
        for (int i = 0; i < values.length; i++) {
            double counted = electrons[i] + Math.sqrt(electrons[i]) * random.nextGaussian();
            values[i] = (short) (int) Math.rint(Math.max(0, Math.min(65_535, counted)));
        }
        image = GrayImage.ofUnsignedShorts(SIZE, SIZE, values);
        pattern = SpotFinder.measure(image);
        Crystal silicon = Crystal.of("silicon", Lattice.cubic(CELL), "F d -3 m:1", AtomSite.of("Si", 0, 0, 0));
        search = OrientationSearch.of(silicon, Beam.ofKilovolts(200), 1.005 * CONSTANT, 0.02, false);
        String zone = search.find(pattern)
                .best()
                .map(s -> s.placement().setting().zone().toString())
                .orElse("none");
        if (pattern.spots().size() < 40 || !zone.matches("(0 1 1|1 1 0|1 0 1)")) {
            throw new IllegalStateException(pattern.spots().size() + " spots, zone " + zone);
        }
    }

    private static void spot(double[] electrons, double x, double y, double peak) {
        for (int row = Math.max(0, (int) y - 12); row < Math.min(SIZE, y + 12); row++) {
            for (int column = Math.max(0, (int) x - 12); column < Math.min(SIZE, x + 12); column++) {
                double dx = column + 0.5 - x;
                double dy = row + 0.5 - y;
                electrons[row * SIZE + column] += peak * Math.exp(-0.5 * (dx * dx + dy * dy) / (SIGMA * SIGMA));
            }
        }
    }

    /**
     * From pixels to spots.
     *
     * @return the measured pattern
     */
    @Benchmark
    public MeasuredPattern spots() {
        return SpotFinder.measure(image);
    }

    /**
     * From spots to solutions, for one crystal.
     *
     * @return the result
     */
    @Benchmark
    public SearchResult search() {
        return search.find(pattern);
    }
}
