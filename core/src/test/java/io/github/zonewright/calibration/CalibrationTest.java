package io.github.zonewright.calibration;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.spots.MeasuredValue;
import java.time.LocalDate;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.junit.jupiter.api.Test;

class CalibrationTest {
    private static final LocalDate DAY = LocalDate.of(2026, 3, 1);
    private static final MicroscopeSetting SETTING =
            new MicroscopeSetting("Workshop 200", 200, OptionalDouble.of(520), OptionalDouble.of(14), 2);

    private static Calibration calibration() {
        return new Calibration(
                "Gold, 520 mm",
                SETTING,
                DAY,
                "Gold",
                new MeasuredValue(900, 0.6),
                new MeasuredValue(1.02, 1e-3),
                new MeasuredValue(0.5, 0.02),
                false,
                Optional.empty());
    }

    @Test
    void forBinning_scalesTheConstantAlone() {
        Calibration fine = calibration().forBinning(1);
        assertEquals(new MeasuredValue(1800, 1.2), fine.constant());
        assertEquals(1, fine.setting().binning());
        assertEquals(calibration().ellipseRatio(), fine.ellipseRatio());
        assertEquals(calibration(), calibration().forBinning(2));
        assertEquals(450, calibration().forBinning(4).constant().value(), 1e-12);
        assertThrows(IllegalArgumentException.class, () -> calibration().forBinning(0));
    }

    @Test
    void camera_putsABeamWhereTheRecordSays() {
        Camera camera =
                calibration().withImageRotation(new MeasuredValue(1, 0.1)).camera(new PixelPoint(10, 20));
        PixelPoint along = camera.toPixel(Vector2.ofPolar(0.5, 0.5), 0);
        assertEquals(450 * Math.sqrt(1.02), along.distanceTo(new PixelPoint(10, 20)), 1e-9);
    }

    @Test
    void warnings_sameSettingAndYoung_areNone() {
        assertTrue(calibration()
                .warnings(SETTING.withBinning(4), DAY.plusDays(90), 180)
                .isEmpty());
    }

    @Test
    void warnings_old_saysHowOld() {
        assertEquals(
                List.of("The calibration 'Gold, 520 mm' is 181 days old; 180 days are taken as the limit."),
                calibration().warnings(SETTING, DAY.plusDays(181), 180));
        assertTrue(calibration().warnings(SETTING, DAY.minusDays(1), 180).get(0).contains("after the day of use"));
    }

    @Test
    void tolerance_isOfTheUncertaintyButHalfAPerCentAtLeast() {
        assertEquals(0.005, calibration().tolerance());
        Calibration rough = new Calibration(
                "rough",
                SETTING,
                DAY,
                "",
                new MeasuredValue(900, 9),
                new MeasuredValue(1, 0),
                new MeasuredValue(0, 0),
                false,
                Optional.empty());
        assertEquals(0.025, rough.tolerance(), 1e-15);
    }

    @Test
    void azimuthInImage_isLessTheRotation() {
        Calibration turned = calibration().withImageRotation(new MeasuredValue(Math.toRadians(30), 0.01));
        assertEquals(
                15, Math.toDegrees(turned.azimuthInImage(Math.toRadians(45)).orElseThrow()), 1e-9);
        assertEquals(
                160, Math.toDegrees(turned.azimuthInImage(Math.toRadians(-170)).orElseThrow()), 1e-9);
        assertTrue(calibration().azimuthInImage(1).isEmpty());
    }

    @Test
    void withName_changesTheNameAlone() {
        Calibration other = calibration().withName("Evening");
        assertEquals("Evening", other.name());
        assertEquals(calibration(), other.withName("Gold, 520 mm"));
        assertThrows(IllegalArgumentException.class, () -> other.withName(" "));
    }

    @Test
    void warnings_otherSetting_namesBoth() {
        MicroscopeSetting other =
                new MicroscopeSetting("Workshop 300", 300, OptionalDouble.of(800), OptionalDouble.of(15), 2);
        assertEquals(
                List.of(
                        "It is for 200 kV, the image is of 300 kV.",
                        "It is for the camera length 520 mm, the image is of 800 mm.",
                        "It is for pixels of 14 µm, the image has pixels of 15 µm.",
                        "It is for the instrument 'Workshop 200', the image is of 'Workshop 300'."),
                calibration().warnings(other, DAY, 180));
        MicroscopeSetting unknown = new MicroscopeSetting("", 200, OptionalDouble.empty(), OptionalDouble.empty(), 1);
        assertTrue(calibration().warnings(unknown, DAY, 180).isEmpty());
    }

    @Test
    void of_fit_takesWhatRingsGave() {
        PowderImage powder = new PowderImage();
        MeasuredRings rings = RingFinder.withDefaults().find(powder.draw(21));
        RingCalibration.Fitted fitted = (RingCalibration.Fitted) RingCalibrator.of(Beam.ofKilovolts(200))
                .calibrate(rings, CrystalShelf.find("aluminium").orElseThrow());
        Calibration kept = Calibration.of("Al", SETTING, DAY, fitted);
        assertEquals("Aluminium", kept.standard());
        assertEquals(fitted.constant(), kept.constant());
        assertEquals(fitted.camera(), kept.camera(fitted.camera().centre()));
        MicroscopeSetting other = new MicroscopeSetting("", 120, OptionalDouble.empty(), OptionalDouble.empty(), 1);
        assertThrows(IllegalArgumentException.class, () -> Calibration.of("Al", other, DAY, fitted));
    }

    @Test
    void constructor_nonsense_isRefused() {
        MeasuredValue one = new MeasuredValue(1, 0);
        assertThrows(
                IllegalArgumentException.class,
                () -> new Calibration(" ", SETTING, DAY, "", one, one, one, false, Optional.empty()));
        assertThrows(
                IllegalArgumentException.class,
                () -> new Calibration(
                        "x", SETTING, DAY, "", new MeasuredValue(-1, 0), one, one, false, Optional.empty()));
        assertThrows(
                IllegalArgumentException.class,
                () -> new MicroscopeSetting("", 0, OptionalDouble.empty(), OptionalDouble.empty(), 1));
        assertThrows(IllegalArgumentException.class, () -> new MeasuredValue(1, -1));
        assertThrows(IllegalArgumentException.class, () -> new MeasuredValue(Double.NaN, 1));
    }
}
