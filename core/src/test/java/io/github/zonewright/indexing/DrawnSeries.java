package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import java.io.IOException;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.concurrent.atomic.AtomicInteger;

/** A series drawn by {@link DrawnCrystal} whose truth is known, with bad frames where wanted; it counts how it is read. */
final class DrawnSeries implements FrameSource {

    static final int SIZE = 280;
    static final double CONSTANT = 125;
    static final Beam BEAM = Beam.ofKilovolts(200);
    static final Crystal ALUMINIUM = CrystalShelf.find("aluminium").orElseThrow();

    /** A frame: what is drawn, or null for a blank one; or why it cannot be read. */
    private record Frame(DrawnCrystal.Setup setup, String broken) {}

    private final List<Frame> frames = new ArrayList<>();
    private final AtomicInteger reading = new AtomicInteger();
    private final AtomicInteger mostReading = new AtomicInteger();
    private final AtomicInteger read = new AtomicInteger();

    /** A zone turned in the image plane and leaning to the right, its centre anywhere. */
    DrawnSeries add(Uvw zone, double rotationDegrees, double leanDegrees, double x, double y) {
        Rotation upright = Rotation.between(ALUMINIUM.lattice().vector(zone), Vector3.Z);
        Rotation turn = Rotation.ofAxisAngle(Vector3.Z, Math.toRadians(rotationDegrees));
        Rotation tilt = Rotation.ofVector(new Vector3(0, Math.toRadians(leanDegrees), 0));
        frames.add(new Frame(
                new DrawnCrystal.Setup(
                        ALUMINIUM,
                        BEAM.wavelength(),
                        tilt.after(turn).after(upright),
                        new PixelPoint(x, y),
                        CONSTANT,
                        1.003,
                        0.4,
                        false,
                        SIZE,
                        0.012),
                null));
        return this;
    }

    DrawnSeries addBlank() {
        frames.add(new Frame(null, null));
        return this;
    }

    DrawnSeries addBroken(String why) {
        frames.add(new Frame(null, why));
        return this;
    }

    /** The orientation that was drawn. */
    Rotation truth(int index) {
        return frames.get(index).setup.orientation();
    }

    PixelPoint centre(int index) {
        return frames.get(index).setup.centre();
    }

    int mostReading() {
        return mostReading.get();
    }

    int read() {
        return read.get();
    }

    static OrientationSearch search() {
        return OrientationSearch.of(ALUMINIUM, BEAM, 1.01 * CONSTANT, 0.02, false);
    }

    @Override
    public int size() {
        return frames.size();
    }

    @Override
    public String label(int index) {
        return "frame " + (index + 1);
    }

    @Override
    public GrayImage read(int index) throws IOException {
        mostReading.accumulateAndGet(reading.incrementAndGet(), Math::max);
        try {
            read.incrementAndGet();
            Frame frame = frames.get(index);
            if (frame.broken != null) {
                throw new IOException(frame.broken);
            }
            if (frame.setup == null) {
                float[] grey = new float[SIZE * SIZE];
                Arrays.fill(grey, 7);
                return GrayImage.ofFloats(SIZE, SIZE, grey);
            }
            return DrawnCrystal.image(frame.setup, DrawnCrystal.spots(frame.setup, 5), 100 + index);
        } finally {
            reading.decrementAndGet();
        }
    }
}
