package io.github.zonewright.imagej;

import ij.ImagePlus;
import ij.gui.OvalRoi;
import ij.gui.Overlay;
import ij.gui.Roi;
import ij.process.ShortProcessor;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.overlay.ComputedSpots;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import java.awt.Color;
import java.util.Random;

/**
 * Patterns made here, in a fixed way, to test the plugin's own work. They are no evidence for the library's physics, which
 * they use.
 */
public final class TestPatterns {
    /** Side of the images in px. */
    public static final int SIDE = 256;
    /** Camera constant in px·Å. */
    public static final double CONSTANT = 120;
    /** Rotation in degrees. */
    public static final double ROTATION = -40;

    private TestPatterns() {}

    /** Copper along [110] at 200 kV, reference 1 −1 1. */
    public static Placement copper110() {
        Crystal copper = CrystalShelf.find("copper").orElseThrow();
        ZoneSetting setting = ZoneSetting.onZone(new Uvw(1, 1, 0), new Hkl(1, -1, 1), Math.toRadians(ROTATION));
        Camera camera = Camera.of(new PixelPoint(130.3, 125.8), CONSTANT, false);
        return new Placement(copper, Beam.ofKilovolts(200), setting, camera);
    }

    /** Its image: 16 bit, background, noise, Gaussian spots. */
    public static ImagePlus image() {
        return new ImagePlus("copper-110", pixels(copper110()));
    }

    /** The same image with a selection, a calibration and two overlay elements of the user's. */
    public static ImagePlus imageOfUser() {
        ImagePlus image = image();
        image.setRoi(new OvalRoi(20, 30, 40, 50));
        image.getLocalCalibration().setUnit("1/nm");
        image.getLocalCalibration().pixelWidth = 10 / CONSTANT;
        image.getLocalCalibration().pixelHeight = 10 / CONSTANT;
        Overlay overlay = new Overlay();
        Roi first = new Roi(5, 6, 70, 80);
        first.setName("mine");
        first.setStrokeColor(Color.RED);
        Roi second = new OvalRoi(100, 100, 9, 9);
        second.setFillColor(Color.GREEN);
        overlay.add(first);
        overlay.add(second);
        image.setOverlay(overlay);
        return image;
    }

    /** The pixels of any pattern. */
    public static ShortProcessor pixels(Placement placement) {
        double[] values = new double[SIDE * SIDE];
        java.util.Arrays.fill(values, 200);
        add(values, placement.camera().centre(), 20000);
        double strongest = 0;
        for (PlacedSpot spot : new ComputedSpots().on(placement, SIDE, SIDE, 500)) {
            strongest = Math.max(strongest, spot.spot().intensity());
            add(values, spot.position(), 6000 * Math.pow(spot.spot().intensity() / strongest, 0.6));
        }
        Random noise = new Random(110);
        short[] grey = new short[values.length];
        for (int i = 0; i < values.length; i++) {
            grey[i] = (short) Math.max(0, Math.round(values[i] + Math.sqrt(values[i]) * noise.nextGaussian()));
        }
        return new ShortProcessor(SIDE, SIDE, grey, null);
    }

    private static void add(double[] values, PixelPoint at, double height) {
        double sigma = 1.8;
        for (int y = 0; y < SIDE; y++) {
            for (int x = 0; x < SIDE; x++) {
                double r = at.distanceTo(new PixelPoint(x + 0.5, y + 0.5)) / sigma;
                if (r < 6) {
                    values[y * SIDE + x] += height * Math.exp(-r * r / 2);
                }
            }
        }
    }
}
