package io.github.zonewright.imagej.session;

import static org.junit.jupiter.api.Assertions.assertEquals;

import io.github.zonewright.spots.MeasuredValue;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class FiguresTest {
    /** Two digits of the uncertainty and the value to the same decimal, as the GUM (JCGM 100, 7.2.6) has it. */
    @ParameterizedTest
    @CsvSource({
        "100.02147, 0.00035, 100.02147 ± 0.00035 g",
        "2.3381, 0.0123, 2.338 ± 0.012 g",
        "98.719, 1.53, 98.7 ± 1.5 g",
        "1234.4, 56.7, 1234 ± 57 g",
        "2, 0, 2.0000 ± 0.0000 g"
    })
    void of_twoDigitsOfTheUncertainty(double value, double error, String expected) {
        assertEquals(expected, Figures.of(new MeasuredValue(value, error), " g"));
    }

    @ParameterizedTest
    @CsvSource({"ANGSTROM, 2.338 ± 0.012 Å", "NANOMETRE, 0.2338 ± 0.0012 nm"})
    void lengths_areInTheUnit(LengthUnit unit, String expected) {
        assertEquals(expected, unit.text(new MeasuredValue(2.338, 0.012)));
    }
}
