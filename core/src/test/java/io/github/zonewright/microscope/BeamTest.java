package io.github.zonewright.microscope;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** The published wavelengths and interaction constants are in the table of check values. */
class BeamTest {

    /** 54 eV electrons on nickel, rows 2.15 Å apart, d sin φ = λ. Common practice, no source. */
    @Test
    void wavelength_slowElectronsOnNickel() {
        double wavelength = Beam.ofKilovolts(0.054).wavelength();
        assertEquals(1.669, wavelength, 5e-4);
        assertEquals(50.9, Math.toDegrees(Math.asin(wavelength / 2.15)), 0.05);
        // Observed at 50°, which the rows make 1.65 Å.
        assertEquals(1.65, 2.15 * Math.sin(Math.toRadians(50)), 5e-3);
    }

    /** Common practice, no source. */
    @Test
    void wavelength_thirtyKilovolts_isAboutSevenPicometres() {
        assertEquals(0.07, Beam.ofKilovolts(30).wavelength(), 5e-4);
    }

    /** The non-relativistic λ = 12.2643 Å/√V (Hirsch and others) holds at 10 V to 5 parts in a million. */
    @Test
    void wavelength_slowElectrons_meetsTheNonRelativisticLimit() {
        double limit = 12.26425966 / Math.sqrt(10);
        assertEquals(
                limit * (1 - 0.01 / (4 * 510.99895)), Beam.ofKilovolts(0.01).wavelength(), 1e-9 * limit);
    }

    @ParameterizedTest
    @ValueSource(doubles = {0.01, 0.054, 30, 80, 200, 300, 1000, 3000})
    void momentum_timesWavelength_isPlancksConstant(double kilovolts) {
        // p = γmv, λ = h/p, so λγ(v/c) is the Compton wavelength 0.0242631023867 Å (CODATA 2018).
        Beam beam = Beam.ofKilovolts(kilovolts);
        assertEquals(0.0242631023867, beam.wavelength() * beam.gamma() * beam.speed(), 1e-11);
    }

    /** γ from the speed: 1/√(1 − v²/c²). At 10 V the two differ in the fifth digit, where 1 − 1/γ² would be rounding. */
    @ParameterizedTest
    @CsvSource({"0.01, 1.957e-5", "200, 0.39139", "1000, 1.95695"})
    void gamma_lessOne_isKineticOverRestEnergy(double kilovolts, double excess) {
        Beam beam = Beam.ofKilovolts(kilovolts);
        assertEquals(excess, beam.gamma() - 1, 5e-4 * excess);
        double v = beam.speed();
        double fromSpeed = v * v / (Math.sqrt(1 - v * v) * (1 + Math.sqrt(1 - v * v)));
        assertEquals(kilovolts / 510.99895, fromSpeed, 1e-13 * excess);
    }

    @Test
    void speed_slowElectrons_keepsItsDigits() {
        // ½mv² = E with two more terms in e = E/mc²; the next is 5e-15 of it.
        double e = 0.01 / 510.99895;
        assertEquals(
                Math.sqrt(2 * e) * (1 - 0.75 * e + 23.0 / 32 * e * e),
                Beam.ofKilovolts(0.01).speed(),
                5e-17);
    }

    @Test
    void interactionConstant_isTwoPiOverWavelengthAndVoltage_relativistically() {
        // σ = (2π/λU)·(mc² + E)/(2mc² + E): Spence, High-Resolution Electron Microscopy (from memory).
        double kv = 300;
        Beam beam = Beam.ofKilovolts(kv);
        double expected = 2 * Math.PI / (beam.wavelength() * kv * 1e3) * (510.99895 + kv) / (2 * 510.99895 + kv);
        assertEquals(expected, beam.interactionConstant(), 1e-12);
    }

    @ParameterizedTest
    @ValueSource(doubles = {0, -200, 0.0099, 3001, Double.NaN, Double.POSITIVE_INFINITY})
    void construct_outOfRange_isRefused(double kilovolts) {
        String message = assertThrows(IllegalArgumentException.class, () -> Beam.ofKilovolts(kilovolts))
                .getMessage();
        assertTrue(message.startsWith("accelerating voltage: " + kilovolts + " kV, expected 0.01 to 3000"), message);
    }
}
