package io.github.zonewright.imagej;

import ij.ImagePlus;
import ij.ImageStack;
import ij.VirtualStack;
import ij.process.ImageProcessor;
import ij.process.ShortProcessor;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.pattern.Placement;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.util.concurrent.atomic.AtomicInteger;

/** Stacks of {@link TestPatterns}: copper along [110] that turns and drifts from slice to slice, with a blank slice. */
public final class SeriesPatterns {
    /** Slices of the stacks. */
    public static final int SLICES = 6;

    /** The slice, from 1, on which there is nothing. */
    public static final int BLANK = 4;

    /** By how much the pattern turns from slice to slice, in degrees. */
    public static final double STEP = 0.5;

    private SeriesPatterns() {}

    /** What is on a slice, from 1. */
    public static Placement placement(int slice) {
        Placement first = TestPatterns.copper110();
        PixelPoint c = first.camera().centre();
        return first.turnedBy(Math.toRadians(STEP * (slice - 1)))
                .centredAt(new PixelPoint(c.x() + 1.5 * (slice - 1), c.y() - 0.7 * (slice - 1)));
    }

    /** The pixels of a slice, from 1. */
    public static ImageProcessor pixels(int slice) {
        if (slice == BLANK) {
            ShortProcessor blank = new ShortProcessor(TestPatterns.SIDE, TestPatterns.SIDE);
            blank.add(200);
            return blank;
        }
        return TestPatterns.pixels(placement(slice));
    }

    /** A stack in memory. */
    public static ImagePlus stack() {
        ImageStack stack = new ImageStack(TestPatterns.SIDE, TestPatterns.SIDE);
        for (int slice = 1; slice <= SLICES; slice++) {
            stack.addSlice("t = " + (slice - 1) + " s", pixels(slice));
        }
        return new ImagePlus("drifting", stack);
    }

    /** A virtual stack that makes its slices when it is asked, counts how many are asked for at once, and fails for one. */
    public static class Counting extends VirtualStack {
        private final AtomicInteger reading = new AtomicInteger();
        private final AtomicInteger most = new AtomicInteger();
        private final AtomicInteger all = new AtomicInteger();
        private final int failing;

        /** With a slice that can't be read, or 0 for none. */
        public Counting(int failing) {
            super(TestPatterns.SIDE, TestPatterns.SIDE, SLICES);
            this.failing = failing;
        }

        /** The most slices that were read at one time. */
        public int most() {
            return most.get();
        }

        /** How often a slice was read. */
        public int all() {
            return all.get();
        }

        @Override
        public ImageProcessor getProcessor(int n) {
            most.accumulateAndGet(reading.incrementAndGet(), Math::max);
            try {
                all.incrementAndGet();
                if (n == failing) {
                    throw new UncheckedIOException(new IOException("no such sector"));
                }
                return pixels(n);
            } finally {
                reading.decrementAndGet();
            }
        }

        @Override
        public int getBitDepth() {
            return 16;
        }
    }
}
