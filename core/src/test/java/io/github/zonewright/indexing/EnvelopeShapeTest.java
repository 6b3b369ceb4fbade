package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.pattern.IntensityModel;
import java.util.Random;
import org.junit.jupiter.api.Test;

class EnvelopeShapeTest {

    private static final double NO_CEILING = 1e3;

    @Test
    void bell_lorentzian_halfAtItsWidth() {
        EnvelopeShape bell = new EnvelopeShape.Bell(1, NO_CEILING, 0.01, false);
        assertEquals(Math.log(0.5), bell.level(3, 0.01, 0) - bell.level(3, 0, 0), 1e-12);
    }

    @Test
    void bell_gaussian_standardDeviationIsItsWidth() {
        EnvelopeShape bell = new EnvelopeShape.Bell(1, NO_CEILING, 0.01, true);
        assertEquals(-0.5, bell.level(3, 0.01, 0) - bell.level(3, 0, 0), 1e-12);
    }

    @Test
    void bell_bending_addsToTheSquareOfTheWidth() {
        EnvelopeShape bell = new EnvelopeShape.Bell(1, NO_CEILING, 0.003, false);
        EnvelopeShape wider = new EnvelopeShape.Bell(1, NO_CEILING, 0.005, false);
        assertEquals(wider.level(1, 0.007, 0), bell.level(1, 0.007, 0.004 * 0.004), 1e-12);
    }

    @Test
    void bell_power_flattensAllDifferences() {
        EnvelopeShape bell = new EnvelopeShape.Bell(0.5, NO_CEILING, 0.01, false);
        assertEquals(1, bell.level(4, 0, 0) - bell.level(2, 0, 0), 1e-12);
    }

    @Test
    void bell_ceiling_holdsTheStrongAndLeavesTheWeak() {
        EnvelopeShape bell = new EnvelopeShape.Bell(1, 0, 0.01, false);
        assertEquals(0, bell.level(30, 0, 0), 1e-9);
        assertEquals(-30, bell.level(-30, 0, 0), 1e-9);
        assertEquals(Math.log(0.5), bell.level(0, 0, 0), 1e-12);
    }

    @Test
    void bell_withoutTails_fallsFasterFarOff() {
        EnvelopeShape bell = new EnvelopeShape.Bell(1, NO_CEILING, 0.005, false);
        assertTrue(bell.withoutTails().level(3, 0.03, 0) < bell.level(3, 0.03, 0) - 5);
    }

    /** Without bending it is the two-beam formula, which pattern.IntensityModel states with its source. */
    @Test
    void fringes_noBending_twoBeamFormula() {
        double volume = 160;
        double factor = 0.0251 * 1.39 / (Math.PI * volume);
        Random random = new Random(4);
        for (int n = 0; n < 200; n++) {
            double amplitude = 2 + 20 * random.nextDouble();
            double s = 0.02 * random.nextDouble();
            double thickness = 100 + 600 * random.nextDouble();
            double expected = new IntensityModel.TwoBeam(thickness).intensity(s, 1 / (factor * amplitude));
            double floor = 0.02 / (1 + s * s / Math.pow(factor * amplitude, 2));
            double level = new EnvelopeShape.Fringes(thickness, 1, factor).level(2 * Math.log(amplitude), s, 0);
            assertEquals(expected + floor, Math.exp(level), 1e-9, "at s " + s);
        }
    }

    /** Strong bending washes the fringes out: half of the envelope 1/(1 + s²ξ²) is left. */
    @Test
    void fringes_strongBending_halfTheEnvelope() {
        double inverse = 0.004;
        double s = 0.01;
        double level = new EnvelopeShape.Fringes(800, 1, inverse).level(0, s, 0.01 * 0.01);
        double envelope = inverse * inverse / (inverse * inverse + s * s);
        assertEquals(0.52 * envelope, Math.exp(level), 1e-6);
    }

    @Test
    void fringes_powerOfAHalf_rootOfTheIntensity() {
        double whole = new EnvelopeShape.Fringes(120, 1, 2e-4).level(2.5, 0.004, 0);
        assertEquals(whole / 2, new EnvelopeShape.Fringes(120, 0.5, 2e-4).level(2.5, 0.004, 0), 1e-12);
    }

    /** sin²(πts)/(πts)² is half at s = 0.443/t; far off nothing is left. */
    @Test
    void fringes_withoutTails_centralFringeOfTheSameHeightAndWidth() {
        EnvelopeShape fringes = new EnvelopeShape.Fringes(100, 1, 1e-5);
        EnvelopeShape bell = fringes.withoutTails();
        assertEquals(fringes.level(0, 0, 0), bell.level(0, 0, 0), 1e-12);
        assertEquals(Math.log(0.5), bell.level(0, 0.00443, 0) - bell.level(0, 0, 0), 0.005);
        assertEquals(-12, bell.level(0, 0.05, 0) - bell.level(0, 0, 0), 1e-9);
    }

    /** No power may leave something to be seen far from the sphere where there are no tails. */
    @Test
    void bell_withoutTails_fallsOffAsFarForEachPower() {
        for (double power : new double[] {0.5, 0.75, 1}) {
            EnvelopeShape bell = new EnvelopeShape.Bell(power, 1e3, 0.005, false).withoutTails();
            assertEquals(-12, bell.level(0, 0.1, 0), 1e-9);
        }
    }
}
