package io.github.zonewright.cif;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.cif.CifValue.Kind;
import java.util.List;
import java.util.OptionalDouble;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class CifValueTest {
    private static CifValue read(String token) {
        return CifFile.parse("data_t\n_cell_length_a " + token)
                .blocks()
                .get(0)
                .value("_cell_length_a")
                .orElseThrow();
    }

    /** The grammar of numbers and the rule for the uncertainty: International Tables G, 2.2.7, from memory. */
    @ParameterizedTest
    @CsvSource({
        "1.234(5), 1.234, 0.005",
        "1.2e-3(4), 0.0012, 0.0004",
        "34.5(12), 34.5, 1.2",
        "34(12), 34, 12",
        "12300(100), 12300, 100",
        "-.5(1), -0.5, 0.1",
        "5.(2), 5, 2",
        "1E3(1), 1000, 1000",
        "0.00000(3), 0, 0.00003",
        "'5.4310(2)', 5.4310, 0.0002"
    })
    void asNumber_withUncertainty(String token, double value, double su) {
        CifNumber number = read(token).asNumber();
        assertEquals(value, number.value());
        assertEquals(OptionalDouble.of(su), number.standardUncertainty());
    }

    @ParameterizedTest
    @CsvSource({"+3, 3", "5., 5", "-.5, -0.5", "1e5, 1e5", "1.5E-3, 0.0015", "1.e+2, 100", "007, 7", "1e-400, 0"})
    void asNumber_plain(String token, double value) {
        assertEquals(new CifNumber(value, OptionalDouble.empty()), read(token).asNumber());
    }

    @ParameterizedTest
    @ValueSource(
            strings = {
                "abc",
                "?",
                ".",
                "1,5",
                "1.2.3",
                "1e",
                "e5",
                "+",
                "1.2(",
                "1.2()",
                "1.2(3)e4",
                "(3)",
                "0x10",
                "NaN",
                "Infinity",
                "1e999",
                "1f",
                "1_000",
                "1e9999999",
                "-",
                "1.5(0.2)"
            })
    void asNumber_none(String token) {
        CifValueException e =
                assertThrows(CifValueException.class, () -> read(token).asNumber());
        assertEquals(
                "line 2, column 16, _cell_length_a: a number was expected, but the value is '" + token + "'",
                e.getMessage());
        assertEquals("_cell_length_a", e.item().orElseThrow());
    }

    @Test
    void asNumber_ofBuiltValue() {
        CifValueException e =
                assertThrows(CifValueException.class, () -> CifValue.of("x").asNumber());
        assertEquals("a number was expected, but the value is 'x'", e.getMessage());
        assertEquals(0, e.line());
        CifItem item = new CifItem("_y", CifValue.of("x"));
        e = assertThrows(CifValueException.class, () -> item.value().asNumber());
        assertEquals("_y: a number was expected, but the value is 'x'", e.getMessage());
    }

    @Test
    void asInt() {
        assertEquals(225, read("225").asInt());
        assertEquals(-3, read("-3.0").asInt());
        assertEquals(4, read("4(1)").asInt());
        assertThrows(CifValueException.class, () -> read("2.5").asInt());
        assertThrows(CifValueException.class, () -> read("3000000000").asInt());
    }

    @Test
    void place() {
        CifBlock block = CifFile.parse("data_t\nloop_\n_a _b\n1 'two'\n 3\n;four\n;\n")
                .blocks()
                .get(0);
        List<CifValue> second = block.values("_b");
        assertEquals(4, second.get(0).line());
        assertEquals(3, second.get(0).column());
        assertEquals(6, second.get(1).line());
        assertEquals(1, second.get(1).column());
        assertEquals("_b", second.get(1).item());
        assertEquals("_a", block.values("_a").get(1).item());
    }

    @Test
    void of_choosesKind() {
        assertEquals(Kind.BARE, CifValue.of("Fe2+").kind());
        assertEquals(Kind.BARE, CifValue.of("x,y,z").kind());
        assertEquals(Kind.QUOTED, CifValue.of("F m -3 m").kind());
        assertEquals(Kind.QUOTED, CifValue.of("").kind());
        assertEquals(Kind.TEXT_FIELD, CifValue.of("a\nb").kind());
        assertEquals(Kind.TEXT_FIELD, CifValue.of("it' s \"so\" x").kind());
        for (String word : List.of(
                "?", ".", "1.5", "-3", "4(2)", "_x", "#x", "$x", "'x", "\"x", ";x", "[x", "]x", "{x", "a[1]", "data_",
                "DATA_x", "loop_", "save_x", "stop_", "global_", "loop_x")) {
            assertEquals(Kind.QUOTED, CifValue.of(word).kind(), word);
        }
    }

    @Test
    void of_forbiddenCharacter() {
        IllegalArgumentException e = assertThrows(IllegalArgumentException.class, () -> CifValue.of("ab\u0000"));
        assertEquals("a CIF value cannot hold the character U+0000, found at index 2", e.getMessage());
        assertEquals("a\nb\nc", CifValue.of("a\r\nb\rc").text());
    }

    @Test
    void of_numbers() {
        assertEquals("1.0E-5", CifValue.of(1e-5).text());
        assertEquals("42", CifValue.of(42).text());
        assertThrows(IllegalArgumentException.class, () -> CifValue.of(Double.NaN));
        for (double x : new double[] {0.1, 1 / 3.0, Double.MIN_VALUE, -Double.MAX_VALUE, -0.0, 1e23}) {
            double again = CifValue.of(x).asNumber().value();
            assertEquals(Double.doubleToRawLongBits(x), Double.doubleToRawLongBits(again));
        }
    }

    @Test
    void equals_kindAndTextWithoutPlace() {
        assertEquals(read("1"), CifValue.of(1));
        assertEquals(read("1").hashCode(), CifValue.of(1).hashCode());
        assertNotEquals(read("'1'"), read("1"));
        assertNotEquals(read("?"), read("'?'"));
    }

    @Test
    void isKnown() {
        assertFalse(CifValue.UNKNOWN.isKnown());
        assertFalse(CifValue.NOT_APPLICABLE.isKnown());
        assertTrue(CifValue.of("?").isKnown());
    }

    @Test
    void number_constructor() {
        OptionalDouble none = OptionalDouble.empty();
        assertThrows(IllegalArgumentException.class, () -> new CifNumber(Double.NaN, none));
        assertThrows(IllegalArgumentException.class, () -> new CifNumber(1, OptionalDouble.of(-1)));
        assertThrows(IllegalArgumentException.class, () -> new CifNumber(1, OptionalDouble.of(Double.NaN)));
    }
}
