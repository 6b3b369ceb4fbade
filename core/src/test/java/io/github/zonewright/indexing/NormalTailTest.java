package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.junit.jupiter.api.Test;

class NormalTailTest {

    /** Φ at whole numbers from Abramowitz & Stegun, Handbook of Mathematical Functions (1964), table 26.1. */
    @Test
    void lnPhi_tabulatedValues() {
        assertEquals(Math.log(0.5), NormalTail.lnPhi(0), 5e-9);
        assertEquals(Math.log(0.841344746068543), NormalTail.lnPhi(1), 5e-9);
        assertEquals(Math.log(0.977249868051821), NormalTail.lnPhi(2), 5e-9);
        assertEquals(Math.log(0.998650101968370), NormalTail.lnPhi(3), 5e-9);
        assertEquals(Math.log(1 - 0.841344746068543), NormalTail.lnPhi(-1), 5e-9);
        assertEquals(Math.log(1 - 0.977249868051821), NormalTail.lnPhi(-2), 5e-9);
    }

    /** Between the table's places the error is below h²/8 with h = 1/64, as the second derivative is at most 1. */
    @Test
    void lnPhi_inBetween_interpolated() {
        Random random = new Random(1);
        for (int n = 0; n < 2000; n++) {
            double z = -2.2 + 7 * random.nextDouble();
            assertEquals(Math.log(phi(z)), NormalTail.lnPhi(z), 1.0 / 64 / 64 / 8 + 1e-9, "at " + z);
        }
    }

    @Test
    void lnPhi_tails_flooredAndZero() {
        assertEquals(-4.5, NormalTail.lnPhi(-3.5), 0);
        assertEquals(-4.5, NormalTail.lnPhi(-1e9), 0);
        assertEquals(-4.5, NormalTail.lnPhi(Double.NEGATIVE_INFINITY), 0);
        assertEquals(0, NormalTail.lnPhi(7), 0);
        assertEquals(0, NormalTail.lnPhi(1e9), 0);
        assertEquals(0, NormalTail.lnPhi(Double.POSITIVE_INFINITY), 0);
        double last = -5;
        for (double z = -5; z < 7; z += 0.003) {
            assertTrue(NormalTail.lnPhi(z) >= last);
            last = NormalTail.lnPhi(z);
        }
    }

    /** Φ(z) = ½ + φ(z)(z + z³/3 + z⁵/15 + …) (Abramowitz & Stegun 26.2.11). */
    private static double phi(double z) {
        double term = z;
        double sum = z;
        for (int k = 1; k < 200; k++) {
            term *= z * z / (2 * k + 1);
            sum += term;
        }
        return 0.5 + sum * Math.exp(-z * z / 2) / Math.sqrt(2 * Math.PI);
    }
}
