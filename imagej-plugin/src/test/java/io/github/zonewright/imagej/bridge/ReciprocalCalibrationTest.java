package io.github.zonewright.imagej.bridge;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.measure.Calibration;
import ij.process.ByteProcessor;
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
        calibrate(image.getLocalCalibration(), "nm", 0.02, 0.02);
        image.setProperty("FHT", "anything");
        assertTrue(ReciprocalCalibration.of(image).explanation().contains("FFT"));
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
