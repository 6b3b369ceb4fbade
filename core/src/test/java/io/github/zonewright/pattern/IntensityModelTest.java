package io.github.zonewright.pattern;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.pattern.IntensityModel.Kinematic;
import io.github.zonewright.pattern.IntensityModel.Smoothed;
import io.github.zonewright.pattern.IntensityModel.TwoBeam;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Fringes: Hirsch and others, Electron Microscopy of Thin Crystals, chapters 4 and 8 (from memory). */
class IntensityModelTest {

    private static final double EXTINCTION = 556; // 111 of aluminium at 100 kV, in Å: Hirsch and others, appendix

    @Test
    void kinematic_thicknessFringes_haveThePeriodOneOverS() {
        double s = 0.01;
        for (int n = 1; n <= 5; n++) {
            assertEquals(0, new Kinematic(n / s).intensity(s, EXTINCTION), 1e-28);
            // Half way between two zeros I = 1/(ξs)².
            double top = new Kinematic((n - 0.5) / s).intensity(s, EXTINCTION);
            assertEquals(1 / Math.pow(EXTINCTION * s, 2), top, 1e-15);
        }
    }

    @Test
    void kinematic_rockingCurve_hasZerosAtMultiplesOfOneOverT() {
        Kinematic foil = new Kinematic(200);
        assertEquals(Math.pow(Math.PI * 200 / EXTINCTION, 2), foil.intensity(0, EXTINCTION), 1e-14);
        assertEquals(0, foil.intensity(1.0 / 200, EXTINCTION), 1e-28);
        assertEquals(0, foil.intensity(-2.0 / 200, EXTINCTION), 1e-28);
        // The first side maximum, at ts = 1.4303, is 4.72 % of the peak (sinc², any table).
        double side = foil.intensity(1.4303 / 200, EXTINCTION) / foil.intensity(0, EXTINCTION);
        assertEquals(0.04719, side, 1e-5);
    }

    @ParameterizedTest
    @ValueSource(doubles = {1e-16, 1e-12, 1e-10, 1e-8, 1e-7})
    void kinematic_smallExcitation_isSmooth(double s) {
        Kinematic foil = new Kinematic(500);
        double peak = foil.intensity(0, EXTINCTION);
        double x = Math.PI * 500 * s;
        assertEquals(peak * (1 - x * x / 3), foil.intensity(s, EXTINCTION), 1e-14 * peak);
        assertEquals(foil.intensity(s, EXTINCTION), foil.intensity(-s, EXTINCTION));
    }

    @Test
    void twoBeam_atBragg_exchangesIntensityWithThePeriodOfTheExtinctionDistance() {
        assertEquals(1, new TwoBeam(EXTINCTION / 2).intensity(0, EXTINCTION), 1e-15);
        assertEquals(0, new TwoBeam(EXTINCTION).intensity(0, EXTINCTION), 1e-28);
        assertEquals(0.5, new TwoBeam(EXTINCTION / 4).intensity(0, EXTINCTION), 1e-15);
    }

    @Test
    void twoBeam_offBragg_shortensTheFringes() {
        // sξ = 1: the effective distance is ξ/√2 and the top of a fringe one half.
        double s = 1 / EXTINCTION;
        double effective = EXTINCTION / Math.sqrt(2);
        assertEquals(0.5, new TwoBeam(effective / 2).intensity(s, EXTINCTION), 1e-15);
        assertEquals(0, new TwoBeam(effective).intensity(s, EXTINCTION), 1e-28);
    }

    @Test
    void twoBeam_isNeverAboveOne_andIsKinematicFarOff() {
        for (double t = 10; t < 3000; t += 7.3) {
            for (double s = -0.05; s <= 0.05; s += 0.00137) {
                double i = new TwoBeam(t).intensity(s, EXTINCTION);
                assertTrue(i >= 0 && i <= 1 + 1e-15);
            }
        }
        double thin = 5;
        assertEquals(
                new Kinematic(thin).intensity(0.01, EXTINCTION), new TwoBeam(thin).intensity(0.01, EXTINCTION), 1e-6);
    }

    @Test
    void smoothed_fallsToHalfAtItsHalfWidth() {
        Smoothed foil = new Smoothed(300, 0.004);
        double peak = new Kinematic(300).intensity(0, EXTINCTION);
        assertEquals(peak, foil.intensity(0, EXTINCTION), 1e-14);
        assertEquals(peak / 2, foil.intensity(0.004, EXTINCTION), 1e-14);
        assertEquals(peak / 2, foil.intensity(-0.004, EXTINCTION), 1e-14);
        assertEquals(peak / 101, foil.intensity(0.04, EXTINCTION), 1e-14);
    }

    @Test
    void intensity_ofAnAbsentReflection_isZero() {
        for (IntensityModel model :
                new IntensityModel[] {new Kinematic(500), new TwoBeam(500), new Smoothed(500, 0.01)}) {
            assertEquals(0, model.intensity(0, Double.POSITIVE_INFINITY));
            assertEquals(0, model.intensity(0.003, Double.POSITIVE_INFINITY));
        }
    }

    @ParameterizedTest
    @ValueSource(doubles = {0, -1, Double.NaN, Double.POSITIVE_INFINITY})
    void construct_badThicknessOrWidth_isRefused(double value) {
        assertThrows(IllegalArgumentException.class, () -> new Kinematic(value));
        assertThrows(IllegalArgumentException.class, () -> new TwoBeam(value));
        assertThrows(IllegalArgumentException.class, () -> new Smoothed(value, 0.01));
        assertThrows(IllegalArgumentException.class, () -> new Smoothed(500, value));
    }
}
