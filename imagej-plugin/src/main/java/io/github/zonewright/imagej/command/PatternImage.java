package io.github.zonewright.imagej.command;

import ij.ImagePlus;
import ij.measure.Calibration;
import ij.process.FloatProcessor;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.overlay.ComputedSpots;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import java.util.List;

/** A computed pattern as an image: each spot a Gaussian, the direct beam as high as the strongest, no noise. */
final class PatternImage {
    private static final double ANGSTROMS_PER_NANOMETRE = 10;
    private static final int SMALLEST = 16;
    private static final int LARGEST = 8192;
    private static final double SHOWN = 0.1;

    private PatternImage() {}

    static ImagePlus of(Placement placement, double thickness, int side) {
        if (side < SMALLEST || side > LARGEST) {
            throw new IllegalArgumentException(
                    "side of the new image: " + side + " px, expected " + SMALLEST + " to " + LARGEST + " px");
        }
        FloatProcessor pixels = new FloatProcessor(side, side);
        double sigma = Math.max(1, side / 250.0);
        List<PlacedSpot> spots = new ComputedSpots().on(placement, side, side, thickness);
        double strongest = spots.isEmpty() ? 1 : spots.get(0).spot().intensity();
        spots.forEach(s -> add(pixels, s.position(), sigma, s.spot().intensity() / strongest));
        add(pixels, placement.camera().centre(), sigma, 1);
        pixels.setMinAndMax(0, SHOWN);
        ImagePlus image = new ImagePlus(
                placement.crystal().name() + " " + placement.setting().zone(), pixels);
        Calibration calibration = image.getLocalCalibration();
        calibration.setUnit("1/nm");
        calibration.pixelWidth = ANGSTROMS_PER_NANOMETRE / placement.camera().constant();
        calibration.pixelHeight = calibration.pixelWidth;
        return image;
    }

    private static void add(FloatProcessor pixels, PixelPoint at, double sigma, double height) {
        int reach = (int) Math.ceil(5 * sigma);
        int column = (int) Math.floor(at.x());
        int row = (int) Math.floor(at.y());
        for (int y = Math.max(0, row - reach); y <= Math.min(pixels.getHeight() - 1, row + reach); y++) {
            for (int x = Math.max(0, column - reach); x <= Math.min(pixels.getWidth() - 1, column + reach); x++) {
                double dx = (x + 0.5 - at.x()) / sigma;
                double dy = (y + 0.5 - at.y()) / sigma;
                float value = (float) (height * Math.exp(-(dx * dx + dy * dy) / 2));
                pixels.setf(x, y, pixels.getf(x, y) + value);
            }
        }
    }
}
