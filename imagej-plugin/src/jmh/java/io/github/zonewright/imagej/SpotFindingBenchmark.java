package io.github.zonewright.imagej;

import ij.Prefs;
import ij.plugin.filter.GaussianBlur;
import ij.plugin.filter.MaximumFinder;
import ij.process.ImageProcessor;
import ij.process.ShortProcessor;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.awt.Polygon;
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
 * Spot finding against what ImageJ's user has without it: Gaussian blur (σ = 2) and the maximum finder (prominence five
 * times the noise), all on one thread and on the same 16-bit image of 1024 × 1024 pixels. {@code spots} over
 * {@code blurAndMaxima} is the ratio to look at.
 */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
public class SpotFindingBenchmark {
    /** Which of the drawn patterns. */
    @Param({"clean", "stopped", "dense", "discs"})
    private String pattern;

    private short[] pixels;
    private ImageProcessor processor;

    /** Draws the image. */
    @Setup
    public void draw() {
        Prefs.setThreads(1);
        pixels = DrawnPattern.pixels(pattern);
        processor = new ShortProcessor(DrawnPattern.SIZE, DrawnPattern.SIZE, pixels, null);
    }

    /**
     * ImageJ's blur, on a copy, and its maximum finder.
     *
     * @return the maxima
     */
    @Benchmark
    public Polygon blurAndMaxima() {
        ImageProcessor blurred = processor.duplicate();
        new GaussianBlur().blurGaussian(blurred, 2, 2, 0.0002);
        return new MaximumFinder().getMaxima(blurred, 5 * Math.sqrt(DrawnPattern.DARK), true);
    }

    /**
     * From ImageJ's pixels to spots.
     *
     * @return the measured pattern
     */
    @Benchmark
    public MeasuredPattern spots() {
        return SpotFinder.measure(GrayImage.ofUnsignedShorts(DrawnPattern.SIZE, DrawnPattern.SIZE, pixels));
    }
}
