package io.github.zonewright.microscope;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class ReciprocalPixelTest {

    @ParameterizedTest
    @ValueSource(
            strings = {
                "1/nm",
                "nm⁻¹",
                "nm^-1",
                "nm^−1",
                "nm-1",
                "1 / nm",
                "(1/nm)",
                "nm^(-1)",
                "nm**-1",
                "/nm",
                "1/nanometer"
            })
    void of_reciprocalNanometres_inEverySpelling(String unit) {
        assertEquals(0.005, ReciprocalPixel.of(0.05, unit).orElseThrow().inverseAngstroms(), 1e-15);
    }

    @ParameterizedTest
    @ValueSource(strings = {"1/Å", "Å⁻¹", "1/A", "A^-1", "Å-1", "1/\u212b", "1/A\u030a", "1/Angstrom"})
    void of_reciprocalAngstroms_inEverySpelling(String unit) {
        assertEquals(0.05, ReciprocalPixel.of(0.05, unit).orElseThrow().inverseAngstroms(), 1e-15);
    }

    @Test
    void of_otherUnits_areScaled() {
        assertEquals(1e-4, ReciprocalPixel.of(1, "1/µm").orElseThrow().inverseAngstroms(), 1e-18);
        assertEquals(1e-4, ReciprocalPixel.of(1, "1/\u03bcm").orElseThrow().inverseAngstroms(), 1e-18);
        assertEquals(100, ReciprocalPixel.of(1, "1/pm").orElseThrow().inverseAngstroms(), 1e-12);
        assertEquals(1e-10, ReciprocalPixel.of(1, "m-1").orElseThrow().inverseAngstroms(), 1e-24);
    }

    @ParameterizedTest
    @ValueSource(strings = {"nm", "pixel", "", "1/", "1/s", "-1", "1/pixel", "mrad", "Å"})
    void of_noReciprocalLength_isEmpty(String unit) {
        assertTrue(ReciprocalPixel.of(1, unit).isEmpty());
    }

    @Test
    void parse_lengths_areKnown() {
        assertEquals(Optional.of(LengthUnit.NANOMETRE), LengthUnit.parse("nm"));
        assertEquals(Optional.of(LengthUnit.MICROMETRE), LengthUnit.parse("um"));
        assertEquals(Optional.of(LengthUnit.ANGSTROM), LengthUnit.parse("Å"));
        assertEquals(Optional.empty(), LengthUnit.parse("1/nm"));
    }

    /** A lattice of 2 Å sampled at 0.2 Å has 0.1 periods to a sample: pixel 102.4 of 1024. */
    @Test
    void ofFourierTransform_lattice_liesWhereItShould() {
        ReciprocalPixel pixel = ReciprocalPixel.ofFourierTransform(1024, 0.2);
        assertEquals(0.5 / 102.4, pixel.inverseAngstroms(), 1e-15);
        assertEquals(204.8, pixel.cameraConstant(), 1e-9);
        assertThrows(IllegalArgumentException.class, () -> ReciprocalPixel.ofFourierTransform(1, 0.2));
        assertThrows(IllegalArgumentException.class, () -> ReciprocalPixel.ofFourierTransform(8, 0));
        assertThrows(IllegalArgumentException.class, () -> ReciprocalPixel.of(Double.NaN, "1/nm"));
    }
}
