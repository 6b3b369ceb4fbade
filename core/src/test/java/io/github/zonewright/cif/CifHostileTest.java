package io.github.zonewright.cif;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Files made to hang the reader or to fill the memory. */
class CifHostileTest {
    /** In the profile fuzz files are as long as it takes to meet every limit; by default they show what grows too fast. */
    private static final boolean FULL = Integer.getInteger("zonewright.fuzz", 0) > 0;

    private static final int LENGTH = FULL ? 6_000_000 : 400_000;

    private static final String SECOND = "#\\#CIF_2.0\ndata_x _l ";

    private static String filled(String start, String unit) {
        return start + unit.repeat((LENGTH - start.length()) / unit.length());
    }

    private static void refused(String text, String reason) {
        CifSyntaxException e = assertThrows(CifSyntaxException.class, () -> CifFile.parse(text));
        assertTrue(e.reason().contains(reason), e.getMessage());
        assertTrue(e.line() > 0 && e.column() > 0);
    }

    @ParameterizedTest
    @ValueSource(strings = {"[", "[ ", "{'a':", "['a' ["})
    void nesting(String unit) {
        refused(filled(SECOND, unit), "nested deeper than 64");
    }

    @Test
    void listsWithinLists_copiesCount() {
        String inner = "[".repeat(60) + "'" + "a".repeat(200) + "'" + "]".repeat(60) + " ";
        String reason = FULL ? "more than 2000000 words" : "not closed";
        refused(filled(SECOND + "[", inner), reason);
        refused(filled(SECOND + "[", "[] "), reason);
    }

    @Test
    void values_moreThanTheMost() {
        refused("data_x loop_ _a " + "1 ".repeat(CifFile.MOST_WORDS + 1), "more than 2000000 words");
    }

    /** Half of these are merely long: whether read or refused, they come to an end. */
    @ParameterizedTest
    @ValueSource(strings = {"data_a ", "_a 1 ", "save_f save_ ", "_a ", "loop_ _a 1 "})
    void manyOfAKind(String unit) {
        String text = filled("data_x\n", unit);
        if (FULL) {
            assertThrows(CifSyntaxException.class, () -> CifFile.parse(text));
        } else {
            try {
                assertTrue(CifFile.parse(text).blocks().size() >= 1);
            } catch (CifSyntaxException e) {
                assertTrue(e.line() > 0, e.getMessage());
            }
        }
    }

    @ParameterizedTest
    @ValueSource(strings = {"data_x\n_a\n;", "data_x\n_a\n;\\\n", "data_x\n_a '", "data_x\n_a\n;> \\\n"})
    void neverClosed(String start) {
        refused(filled(start, "\\;"), "that starts here is not closed");
    }

    @Test
    void longestValues_comeBack() {
        for (String unit : new String[] {"\\", ";", "a", "'\" ", "\\\n", "\n;"}) {
            String text = unit.repeat((FULL ? 1_000_000 : 100_000) / unit.length());
            CifFile file = CifFile.of(CifBlock.builder("x").add("_a", text).build());
            CifBlock again = CifFile.parse(file.toText()).blocks().get(0);
            assertEquals(text, again.value("_a").orElseThrow().text());
        }
    }

    @Test
    void longestNumber() {
        CifValue digits = CifFile.parse(filled("data_x _a ", "1"))
                .blocks()
                .get(0)
                .value("_a")
                .orElseThrow();
        assertThrows(CifValueException.class, digits::asNumber);
        CifValue zeros = CifFile.parse(filled("data_x _a 0.", "0") + "(1)")
                .blocks()
                .get(0)
                .value("_a")
                .orElseThrow();
        assertEquals(0, zeros.asNumber().standardUncertainty().orElseThrow());
    }
}
