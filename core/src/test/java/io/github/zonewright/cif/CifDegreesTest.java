package io.github.zonewright.cif;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import java.util.stream.DoubleStream;
import org.junit.jupiter.api.Test;

/** π to 50 digits: sequence A000796 of the On-Line Encyclopedia of Integer Sequences. */
class CifDegreesTest {
    private static final int TRIALS = 10_000;

    private static double throughFile(double radians) {
        CifBlock block =
                CifBlock.builder("x").add("_a", CifDegrees.ofRadians(radians)).build();
        CifValue read = CifFile.parse(CifFile.of(block).toText())
                .blocks()
                .get(0)
                .value("_a")
                .orElseThrow();
        assertEquals(CifValue.Kind.BARE, read.kind());
        return CifDegrees.radians(read);
    }

    private static void assertKept(DoubleStream angles) {
        angles.forEach(a -> assertEquals(
                Double.doubleToRawLongBits(a), Double.doubleToRawLongBits(throughFile(a)), () -> "rad " + a));
    }

    private static CifValue value(String number) {
        return CifFile.parse("data_x _a " + number).blocks().get(0).value("_a").orElseThrow();
    }

    @Test
    void ofRadians_tenThousandAnglesOfATurn_areReadBackBitForBit() {
        assertKept(new Random(1).doubles(TRIALS, -Math.PI, Math.PI));
    }

    @Test
    void ofRadians_tenThousandFiniteBitPatterns_areReadBackBitForBit() {
        assertKept(new Random(2)
                .longs()
                .mapToDouble(Double::longBitsToDouble)
                .filter(r -> Math.abs(r) < Double.MAX_VALUE / 60)
                .limit(TRIALS));
    }

    @Test
    void ofRadians_edgeValues_areReadBackBitForBit() {
        assertKept(DoubleStream.of(
                0, -0.0, Double.MIN_VALUE, -Double.MIN_VALUE, Double.MIN_NORMAL, Math.PI, Math.PI / 2, Math.nextUp(1)));
    }

    @Test
    void ofRadians_someAnglesHaveNoDegreesAsDouble_soTheLongFormIsNeeded() {
        long without = new Random(3)
                .doubles(TRIALS, -Math.PI, Math.PI)
                .filter(r -> CifDegrees.ofRadians(r).text().length() > 22)
                .count();
        assertTrue(without > TRIALS / 100 && without < TRIALS / 4, "long forms: " + without);
    }

    @Test
    void ofRadians_whatWasTypedInDegrees_standsAsTyped() {
        for (int tenths = -3600; tenths <= 3600; tenths++) {
            double typed = tenths / 10.0;
            assertEquals(
                    Double.toString(typed),
                    CifDegrees.ofRadians(Math.toRadians(typed)).text());
        }
    }

    @Test
    void radians_manyDigits_roundsTheProductOnce() {
        assertEquals(Math.PI, CifDegrees.radians(value("180.0000000000000000000")));
        assertEquals(1.0, CifDegrees.radians(value("57.295779513082320876798154814105170332405472466564")));
    }

    @Test
    void radians_fewDigits_isTheOrdinaryConversion() {
        assertEquals(Math.toRadians(101.23), CifDegrees.radians(value("101.23")));
        assertEquals(Math.toRadians(101.23), CifDegrees.radians(value("101.23(4)")));
        assertEquals(Math.toRadians(1e-3), CifDegrees.radians(value("1e-3")));
    }

    @Test
    void ofRadians_notFinite_isRefused() {
        assertTrue(assertThrows(IllegalArgumentException.class, () -> CifDegrees.ofRadians(Double.NaN))
                .getMessage()
                .contains("NaN"));
        assertThrows(IllegalArgumentException.class, () -> CifDegrees.ofRadians(Double.POSITIVE_INFINITY));
    }

    @Test
    void radians_noNumber_namesItemAndLine() {
        CifValueException e = assertThrows(CifValueException.class, () -> CifDegrees.radians(value("\n\nsteep")));
        assertEquals("_a", e.item().orElseThrow());
        assertEquals(3, e.line());
    }
}
