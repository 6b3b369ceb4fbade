package io.github.zonewright.imagej.bridge;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.measure.Calibration;
import ij.plugin.FFT;
import ij.process.ByteProcessor;
import ij.process.FloatProcessor;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class ReciprocalCalibrationTest {
    private final ImagePlus image = new ImagePlus("pattern", new ByteProcessor(4, 4));

    @AfterEach
    void forgetGlobalCalibration() {
        image.setGlobalCalibration(null);
    }

    /** 1/nm is 0.1 1/Å; 1/µm is 1e-4 1/Å: SI prefixes. */
    @ParameterizedTest
    @CsvSource({
        "1/nm, 0.1",
        "nm⁻¹, 0.1",
        "nm^-1, 0.1",
        "1/Å, 1",
        "1/A, 1",
        "Å⁻¹, 1",
        "A^-1, 1",
        "1/µm, 1e-4",
        "1/um, 1e-4",
        "1/ nm, 0.1",
        "(1/nm), 0.1",
        "1/Ang, 1"
    })
    void of_reciprocalUnits(String unit, double expected) {
        calibrate(image.getLocalCalibration(), unit, 0.02, 0.02);
        double constant = ReciprocalCalibration.of(image).cameraConstant().orElseThrow();
        assertEquals(1 / (0.02 * expected), constant, 1e-9 * constant);
    }

    /** The two code points that print as Å, and the two that print as µ (Unicode 15, canonical equivalence). */
    @ParameterizedTest
    @ValueSource(strings = {"1/\u212b", "1/\u00c5", "1/\u03bcm", "1/\u00b5m"})
    void of_lookAlikes(String unit) {
        calibrate(image.getLocalCalibration(), unit, 0.02, 0.02);
        assertTrue(ReciprocalCalibration.of(image).cameraConstant().isPresent(), unit);
    }

    @ParameterizedTest
    @ValueSource(strings = {"nm", "pixel", "", "1/s", "1/", "inch", "mm", "nm^2", "1/furlong", "⁻¹"})
    void of_otherUnits(String unit) {
        calibrate(image.getLocalCalibration(), unit, 0.02, 0.02);
        assertTrue(ReciprocalCalibration.of(image).cameraConstant().isEmpty(), unit);
    }

    @Test
    void of_reciprocalUnit_isTenOverSize() {
        calibrate(image.getLocalCalibration(), "1/nm", 0.02, 0.02);
        assertEquals(500, ReciprocalCalibration.of(image).cameraConstant().orElseThrow(), 1e-9);
    }

    @Test
    void of_globalCalibration_isNotTheImages() {
        Calibration global = new Calibration();
        calibrate(global, "1/nm", 0.02, 0.02);
        image.setGlobalCalibration(global);
        assertTrue(ReciprocalCalibration.of(image).cameraConstant().isEmpty());
    }

    @Test
    void of_pixelsNotSquare_saysSo() {
        calibrate(image.getLocalCalibration(), "1/nm", 0.02, 0.03);
        ReciprocalCalibration read = ReciprocalCalibration.of(image);
        assertTrue(read.cameraConstant().isEmpty());
        assertTrue(read.explanation().contains("not square"), read.explanation());
    }

    @Test
    void of_zeroWidth_saysSo() {
        calibrate(image.getLocalCalibration(), "1/nm", 0, 0);
        assertTrue(ReciprocalCalibration.of(image).cameraConstant().isEmpty());
    }

    @Test
    void of_transformWindow_saysWhatItKeeps() {
        calibrate(image.getLocalCalibration(), "pixel", 1, 1);
        image.setProperty("FHT", "anything");
        assertTrue(ReciprocalCalibration.of(image).explanation().contains("FFT"));
    }

    /**
     * Fringes of 0.25 nm on 200 × 180 pixels of 0.02 nm, transformed by ImageJ itself, which fills up to 256: they are waves
     * of 12.5 px, so their spot stands 256/12.5 = 20.48 px from the middle, and there K/R = 2.5 Å must come out.
     */
    @Test
    void of_transformOfALattice_givesTheSpacing() {
        FloatProcessor fringes = new FloatProcessor(200, 180);
        for (int i = 0; i < 200 * 180; i++) {
            fringes.setf(i, (float) Math.cos(2 * Math.PI * (i % 200) / 12.5));
        }
        ImagePlus lattice = new ImagePlus("lattice", fringes);
        calibrate(lattice.getLocalCalibration(), "nm", 0.02, 0.02);
        ImagePlus transform = FFT.forward(lattice);
        assertEquals(256, transform.getWidth());
        ReciprocalCalibration read = ReciprocalCalibration.of(transform);
        assertEquals(2.5, read.cameraConstant().orElseThrow() / (256 / 12.5), 1e-9);
        assertTrue(read.explanation().contains("256 pixels of 0.02"), read.explanation());
        assertTrue(read.explanation().contains("0.195313 1/nm"), read.explanation());
        int brightest = 0;
        for (int x = 140; x < 256; x++) {
            brightest = transform.getProcessor().getf(x, 128)
                            > transform.getProcessor().getf(brightest, 128)
                    ? x
                    : brightest;
        }
        assertEquals(128 + 20.48, brightest, 0.6);
    }

    @Test
    void of_transformReopened_isKnownByItsInfo() {
        ImagePlus lattice = new ImagePlus("lattice", new FloatProcessor(200, 180));
        calibrate(lattice.getLocalCalibration(), "nm", 0.02, 0.02);
        ImagePlus transform = FFT.forward(lattice);
        transform.setProperty("FHT", null);
        assertEquals(51.2, ReciprocalCalibration.of(transform).cameraConstant().orElseThrow(), 1e-9);
        ImagePlus part = transform.crop();
        part.setProcessor(part.getProcessor().resize(100, 256));
        part.setProperty("Info", transform.getInfoProperty());
        assertTrue(ReciprocalCalibration.of(part).cameraConstant().isEmpty());
    }

    @Test
    void of_leavesTheCalibration() {
        calibrate(image.getLocalCalibration(), "1/nm", 0.02, 0.02);
        Calibration before = image.getLocalCalibration().copy();
        ReciprocalCalibration.of(image);
        assertTrue(before.equals(image.getLocalCalibration()));
    }

    private static void calibrate(Calibration calibration, String unit, double width, double height) {
        calibration.setUnit(unit);
        calibration.pixelWidth = width;
        calibration.pixelHeight = height;
    }
}
