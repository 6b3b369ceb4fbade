package io.github.zonewright.imagej.demo;

import ij.ImagePlus;
import ij.io.FileSaver;
import ij.measure.Calibration;
import ij.process.ShortProcessor;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.IntensityModel;
import io.github.zonewright.pattern.PatternSimulator;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Random;

/**
 * Makes the example pattern. <b>The data are invented:</b> there is no Harrow Quay pump works, and no microscope took this
 * picture. The story: its materials laboratory looks at a grain of the austenitic steel of an impeller, at 200 kV, with
 * the direct beam behind a beam stop and a camera constant that was last calibrated some time ago.
 *
 * <p>The places of the spots are those of {@link #TRUTH} by the library's own geometry, and the intensities follow its
 * kinematic model, compressed and scattered to look like those of a real foil. The picture is therefore an example and no
 * evidence for the library's physics. The same source gives the same pixels every time.
 */
public final class DemoPatternMaker {
    /** Camera constant in px·Å that the file's calibration states; the true one is 1.2 % smaller. */
    public static final double TOLD_CONSTANT = 113.6;

    /** What a perfect answer is: fcc iron along [112], leaning by 0.4°, seen through slightly elliptic lenses. */
    public static final Placement TRUTH = new Placement(
            CrystalShelf.find("austenite").orElseThrow(),
            Beam.ofKilovolts(200),
            new ZoneSetting(
                    new Uvw(1, 1, 2),
                    new Hkl(1, 1, -1),
                    Math.toRadians(67.35),
                    Math.toRadians(0.33),
                    Math.toRadians(-0.22)),
            new Camera(new PixelPoint(263.4, 248.7), 112.3, 1.006, Math.toRadians(35), false));

    private static final int SIDE = 512;
    private static final long SEED = 1912;
    private static final double THICKNESS = 120;
    private static final double BENDING = 0.01;
    private static final double SPOT_SIGMA = 2.0;
    private static final double STRONGEST_SPOT = 16000;
    private static final double GLOW = 1500;
    private static final double DARK_LEVEL = 110;
    private static final double COUNTS_PER_ELECTRON = 5;
    private static final double READ_NOISE = 4;
    private static final double STOP_HALF_WIDTH = 12;
    private static final double STOP_AZIMUTH = Math.toRadians(-93);

    private final Random random = new Random(SEED);
    private final double[] light = new double[SIDE * SIDE];

    private DemoPatternMaker() {}

    /**
     * Writes the example.
     *
     * @param arguments the file to write, {@code …/harrow-quay.tif}
     * @throws IOException if it can't be written
     */
    public static void main(String[] arguments) throws IOException {
        Files.write(Path.of(arguments[0]), new FileSaver(make()).serialize());
    }

    /** The example as it is opened: 16 bit, calibrated in 1/nm, shown so that the weak spots can be seen. */
    static ImagePlus make() {
        ImagePlus image = new ImagePlus("harrow-quay.tif", new DemoPatternMaker().pixels());
        Calibration calibration = image.getLocalCalibration();
        calibration.setUnit("1/nm");
        calibration.pixelWidth = 10 / TOLD_CONSTANT;
        calibration.pixelHeight = 10 / TOLD_CONSTANT;
        image.setDisplayRange(80, 1800);
        return image;
    }

    private ShortProcessor pixels() {
        addGlow();
        addSpots();
        short[] grey = new short[light.length];
        for (int i = 0; i < light.length; i++) {
            double electrons = light[i] * stop(i % SIDE + 0.5, i / SIDE + 0.5) / COUNTS_PER_ELECTRON;
            double noisy = electrons + Math.sqrt(electrons) * random.nextGaussian();
            double value = DARK_LEVEL + COUNTS_PER_ELECTRON * noisy + READ_NOISE * random.nextGaussian();
            grey[i] = (short) Math.max(0, Math.min(65535, Math.round(value)));
        }
        return new ShortProcessor(SIDE, SIDE, grey, null);
    }

    /** Inelastic scattering about the direct beam: a sharp and a wide part. */
    private void addGlow() {
        PixelPoint centre = TRUTH.camera().centre();
        for (int i = 0; i < light.length; i++) {
            double r = centre.distanceTo(new PixelPoint(i % SIDE + 0.5, i / SIDE + 0.5));
            light[i] += GLOW * (StrictMath.exp(-r / 45) + 0.16 * StrictMath.exp(-r / 170));
        }
        add(centre, 60000, 2.6);
    }

    private void addSpots() {
        double reach = TRUTH.largestG(SIDE, SIDE);
        var spots = PatternSimulator.of(TRUTH.crystal(), TRUTH.beam(), reach)
                .withModel(new IntensityModel.Smoothed(THICKNESS, BENDING))
                .withLargestExcitation(0.06)
                .simulate(TRUTH.orientation())
                .on(TRUTH.camera());
        double strongest = spots.get(0).spot().intensity();
        for (PlacedSpot spot : spots) {
            double g = spot.spot().g().norm();
            double vibration = StrictMath.exp(-0.45 * g * g / 2);
            double compressed = StrictMath.pow(spot.spot().intensity() / strongest, 0.75);
            double scatter = StrictMath.exp(0.12 * random.nextGaussian());
            add(spot.position(), STRONGEST_SPOT * vibration * compressed * scatter, SPOT_SIGMA);
        }
    }

    /** A round spot: a Gaussian with a faint, wide foot, as detectors draw them. */
    private void add(PixelPoint at, double height, double sigma) {
        int reach = (int) (16 * sigma);
        for (int y = Math.max(0, (int) at.y() - reach); y < Math.min(SIDE, (int) at.y() + reach); y++) {
            for (int x = Math.max(0, (int) at.x() - reach); x < Math.min(SIDE, (int) at.x() + reach); x++) {
                double r = at.distanceTo(new PixelPoint(x + 0.5, y + 0.5)) / sigma;
                light[y * SIDE + x] += height * (StrictMath.exp(-r * r / 2) + 0.02 * StrictMath.exp(-r / 2.5));
            }
        }
    }

    /** What the beam stop lets through: a rod from the edge, round at its end, its rim out of focus. */
    private static double stop(double x, double y) {
        double dx = x - TRUTH.camera().centre().x();
        double dy = TRUTH.camera().centre().y() - y;
        double along = dx * StrictMath.cos(STOP_AZIMUTH) + dy * StrictMath.sin(STOP_AZIMUTH);
        double across = dy * StrictMath.cos(STOP_AZIMUTH) - dx * StrictMath.sin(STOP_AZIMUTH);
        double outside = StrictMath.hypot(StrictMath.min(0, along), across) - STOP_HALF_WIDTH;
        return 0.01 + 0.99 / (1 + StrictMath.exp(-outside / 0.9));
    }
}
