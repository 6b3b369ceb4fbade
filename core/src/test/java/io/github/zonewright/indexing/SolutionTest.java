package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.calibration.MicroscopeSetting;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredValue;
import java.time.LocalDate;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import org.junit.jupiter.api.Test;

class SolutionTest {
    private static final LocalDate DAY = LocalDate.of(2026, 3, 1);

    private static Solution solution(double ratio) {
        Crystal silicon = CrystalShelf.find("silicon").orElseThrow();
        Camera camera = new Camera(new PixelPoint(100, 90), 400, ratio, 0.7, true);
        ZoneSetting setting = ZoneSetting.onZone(new Uvw(0, 0, 1), new Hkl(2, 2, 0), 0.2);
        Placement placement = new Placement(silicon, Beam.ofKilovolts(200), setting, camera);
        return new Solution(
                placement,
                List.of(),
                List.of(),
                0.1,
                50,
                new SolutionErrors(0.001, 0.01, 0.01, 0.1, 0.1, 0.4),
                Optional.empty());
    }

    private static MicroscopeSetting setting(double kilovolts) {
        return new MicroscopeSetting("Bench", kilovolts, OptionalDouble.of(520), OptionalDouble.empty(), 2);
    }

    @Test
    void calibration_takesTheCameraAndItsErrors() {
        Solution solution = solution(1.01);
        Calibration kept = solution.calibration("From silicon", setting(200), DAY);
        assertEquals("Silicon", kept.standard());
        assertEquals(setting(200), kept.setting());
        assertEquals(new MeasuredValue(400, 0.4), kept.constant());
        assertEquals(0.002, kept.ellipseRatio().error(), 1e-15);
        assertEquals(0.1, kept.ellipseAzimuth().error(), 1e-12);
        assertEquals(solution.placement().camera(), kept.camera(new PixelPoint(100, 90)));
        assertTrue(kept.mirrored());
    }

    @Test
    void calibration_roundRings_haveNoAzimuth() {
        Calibration kept = solution(1).calibration("From silicon", setting(200), DAY);
        assertEquals(Math.PI / 2, kept.ellipseAzimuth().error());
    }

    @Test
    void calibration_otherVoltage_isRefused() {
        Exception e = assertThrows(
                IllegalArgumentException.class, () -> solution(1).calibration("From silicon", setting(300), DAY));
        assertTrue(e.getMessage().contains("300.0 kV") && e.getMessage().contains("200.0 kV"), e.getMessage());
    }

    /** The factor of two: two axes, each drawn with √2 times the error of their geometric mean, 1e5 times. */
    @Test
    void calibration_ratioError_isThatOfTwoAxes() {
        Random random = new Random(8);
        double squares = 0;
        double ratios = 0;
        int count = 100_000;
        for (int i = 0; i < count; i++) {
            double a = 1 + Math.sqrt(2) * 1e-3 * random.nextGaussian();
            double b = 1 + Math.sqrt(2) * 1e-3 * random.nextGaussian();
            squares += Math.pow(Math.sqrt(a * b) - 1, 2);
            ratios += Math.pow(a / b - 1, 2);
        }
        assertEquals(1e-3, Math.sqrt(squares / count), 1e-5);
        assertEquals(2e-3, Math.sqrt(ratios / count), 2e-5);
    }
}
