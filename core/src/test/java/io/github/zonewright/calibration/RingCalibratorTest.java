package io.github.zonewright.calibration;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.calibration.RingCalibration.Fitted;
import io.github.zonewright.calibration.RingCalibration.Refused;
import io.github.zonewright.calibration.RingCalibration.StandardRank;
import io.github.zonewright.crystal.AtomSite;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.microscope.Beam;
import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * Rings drawn by {@link PowderImage} with cells from memory: aluminium 4.0495 Å, gold 4.0782 Å, silicon 5.4310 Å. Those of
 * the shelf agree within 1e-4.
 */
class RingCalibratorTest {
    private static final Beam BEAM = Beam.ofKilovolts(200);

    private static Crystal shelf(String name) {
        return CrystalShelf.find(name).orElseThrow();
    }

    private static List<Crystal> standards() {
        return List.of(
                shelf("aluminium"),
                shelf("gold"),
                shelf("silicon"),
                shelf("periclase"),
                shelf("ceria"),
                shelf("ferrite"));
    }

    private static PowderImage powder(String name) {
        PowderImage powder = new PowderImage();
        powder.a = switch (name) {
            case "gold" -> 4.0782;
            case "silicon" -> 5.4310;
            default -> 4.0495;
        };
        powder.lines = name.equals("silicon") ? PowderImage.DIAMOND : PowderImage.FACE_CENTRED;
        powder.constant = name.equals("silicon") ? 290 : 220;
        return powder;
    }

    private static MeasuredRings rings(PowderImage powder, long seed) {
        return RingFinder.withDefaults().find(powder.draw(seed));
    }

    private static Fitted fitted(RingCalibrator calibrator, MeasuredRings rings, String standard) {
        return assertInstanceOf(Fitted.class, calibrator.calibrate(rings, shelf(standard)));
    }

    @ParameterizedTest
    @CsvSource({"aluminium, 1", "gold, 2", "silicon, 3"})
    void calibrate_threeStandardsBehindStop_givesConstantAndEllipse(String name, long seed) {
        PowderImage powder = powder(name);
        Fitted fitted = fitted(RingCalibrator.of(BEAM), rings(powder, seed), name);
        assertTrue(fitted.standardFits());
        assertTrue(fitted.rings().size() >= 6, fitted.rings().size() + " rings");
        assertTrue(fitted.unexplained().isEmpty());
        assertEquals(powder.constant, fitted.camera().constant(), 1e-3 * powder.constant);
        assertEquals(powder.ratio, fitted.camera().ellipseRatio(), 0.003);
        assertEquals(33, Math.toDegrees(fitted.camera().ellipseAzimuth()), 1);
        assertEquals(powder.x, fitted.camera().centre().x(), 0.05);
        assertEquals(powder.y, fitted.camera().centre().y(), 0.05);
        for (RingAssignment ring : fitted.rings()) {
            assertEquals(0, ring.relativeResidual(), 1e-3);
            assertEquals(ring.residual() / ring.ring().radius().value(), -ring.relativeResidual(), 1e-5);
        }
    }

    @Test
    void calibrate_mirroredImage_givesAzimuthOfTheMicroscope() {
        PowderImage powder = powder("silicon");
        Fitted fitted = fitted(RingCalibrator.of(BEAM).withMirrored(true), rings(powder, 5), "silicon");
        assertTrue(fitted.camera().mirrored());
        assertEquals(180 - 33, Math.toDegrees(fitted.camera().ellipseAzimuth()), 1);
    }

    @Test
    void calibrate_lowVoltage_usesTangentOfTwiceTheta() {
        PowderImage powder = powder("silicon");
        // At 30 kV λ = 0.0698 Å (common tables: 0.06979 Å); the ring of d = 1.05 Å lies 0.33 % outside K/d.
        powder.wavelength = 0.0697907;
        Fitted fitted = fitted(RingCalibrator.of(Beam.ofKilovolts(30)), rings(powder, 6), "silicon");
        assertEquals(290, fitted.constant().value(), 0.03);
    }

    @Test
    void calibrate_unlikeStandard_doesNotFitAndNamesTheBetter() {
        MeasuredRings rings = rings(powder("silicon"), 4);
        for (String wrong : List.of("gold", "aluminium", "ferrite")) {
            Fitted fitted = fitted(RingCalibrator.of(BEAM).comparedWith(standards()), rings, wrong);
            assertFalse(fitted.standardFits(), wrong);
            StandardRank best = fitted.others().get(0);
            assertEquals("Silicon", best.standard().name());
            assertTrue(best.fits());
            assertTrue(fitted.notices().stream().anyMatch(n -> n.contains("Silicon")), fitted.notices()::toString);
        }
    }

    @Test
    void calibrate_standardOfAnotherSystem_doesNotFit() {
        MeasuredRings rings = rings(powder("gold"), 4);
        for (String wrong : List.of("corundum", "magnesium", "zincite")) {
            RingCalibration answer =
                    RingCalibrator.of(BEAM).comparedWith(standards()).calibrate(rings, shelf(wrong));
            List<StandardRank> others = List.of();
            if (answer instanceof Refused refused) {
                assertTrue(refused.reason().contains("At least 3 are needed"), refused.reason());
                others = refused.others();
            } else if (answer instanceof Fitted fitted) {
                assertFalse(fitted.standardFits(), wrong);
                others = fitted.others();
            }
            List<String> fitting = others.stream()
                    .filter(StandardRank::fits)
                    .map(r -> r.standard().name())
                    .toList();
            assertTrue(fitting.contains("Gold"), fitting::toString);
            assertFalse(fitting.contains("Silicon"), fitting::toString);
        }
    }

    /** Gold, aluminium and ceria have rings of the same ratios; a camera length known to 3 % parts gold from ceria. */
    @Test
    void calibrate_standardsOfOneKind_areToldApartByTheConstantAlone() {
        MeasuredRings rings = rings(powder("gold"), 7);
        Fitted free = fitted(RingCalibrator.of(BEAM).comparedWith(standards()), rings, "gold");
        assertTrue(free.notices().stream().anyMatch(n -> n.contains("do not tell Gold from") && n.contains("Ceria")));
        RingCalibrator near = RingCalibrator.of(BEAM).comparedWith(standards()).withConstantNear(222, 0.03);
        assertTrue(fitted(near, rings, "gold").standardFits());
        assertTrue(fitted(near, rings, "gold").notices().stream().noneMatch(n -> n.contains("Ceria")));
    }

    @Test
    void calibrate_fewerThanThreeRings_isRefused() {
        PowderImage powder = powder("aluminium");
        powder.lines = new double[][] {{3, 1}, {8, 0.6}};
        Refused refused = assertInstanceOf(
                Refused.class, RingCalibrator.of(BEAM).calibrate(rings(powder, 8), shelf("aluminium")));
        assertTrue(refused.reason().startsWith("Rings found: 2."), refused.reason());
    }

    @Test
    void calibrate_thalliumStandard_warns() {
        // CsCl type, a = 3.8343 Å (from memory: thallous chloride).
        Crystal chloride = Crystal.of(
                "Thallium chloride",
                Lattice.cubic(3.8343),
                "P m -3 m",
                AtomSite.of("Tl", 0, 0, 0),
                AtomSite.of("Cl", 0.5, 0.5, 0.5));
        PowderImage powder = powder("aluminium");
        powder.a = 3.8343;
        powder.constant = 260;
        powder.lines = new double[][] {{1, 0.4}, {2, 1}, {3, 0.2}, {4, 0.4}, {5, 0.25}, {6, 0.5}};
        Fitted fitted = assertInstanceOf(Fitted.class, RingCalibrator.of(BEAM).calibrate(rings(powder, 9), chloride));
        assertTrue(fitted.standardFits());
        assertEquals(260, fitted.constant().value(), 0.26);
        assertTrue(fitted.notices().stream().anyMatch(n -> n.contains("toxic")));
        assertTrue(RingCalibrator.cautions(shelf("gold")).isEmpty());
    }

    @Test
    void withConstantNear_nonsense_isRefused() {
        RingCalibrator calibrator = RingCalibrator.of(BEAM);
        assertThrows(IllegalArgumentException.class, () -> calibrator.withConstantNear(-1, 0.1));
        assertThrows(IllegalArgumentException.class, () -> calibrator.withConstantNear(100, 1.5));
    }

    /** At 1σ 68.3 % of normal deviates; 60 to 75 % is asked for. */
    @Test
    void calibrate_manyNoisyImages_coversTheTruthAsStated() {
        List<Double> deviations = new ArrayList<>();
        int images = Integer.getInteger("zonewright.rings", 40);
        for (int k = 0; k < images; k++) {
            PowderImage powder = powder("silicon");
            powder.size = 320;
            powder.x = 160 + 5 * Math.sin(k);
            powder.y = 160 + 5 * Math.cos(3 * k);
            powder.constant = 200 + 0.3 * k;
            powder.sigma = 2;
            powder.height = 30;
            powder.azimuth = 0.1 * k;
            Fitted fitted = fitted(RingCalibrator.of(BEAM), rings(powder, 100 + k), "silicon");
            // The shelf's cell is 5.4307 Å, the image's 5.4310 Å.
            double constant = powder.constant * 5.4307 / 5.4310;
            RingShape shape = fitted.shape();
            deviations.add(
                    (fitted.constant().value() - constant) / fitted.constant().error());
            deviations.add((shape.ellipse().centre().x() - powder.x) / shape.centreErrorX());
            deviations.add((shape.ellipse().centre().y() - powder.y) / shape.centreErrorY());
            deviations.add((shape.ellipse().ratio() - powder.ratio) / shape.ratioError());
            double turn = Math.IEEEremainder(shape.ellipse().azimuth() - powder.azimuth, Math.PI);
            deviations.add(turn / shape.azimuthError());
        }
        double covered = deviations.stream().filter(d -> Math.abs(d) < 1).count() / (double) deviations.size();
        assertTrue(covered > 0.60 && covered < 0.75, "covered: " + covered);
    }
}
