package io.github.zonewright.cif;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** What is no CIF, and that the message says where and why. */
class CifErrorTest {
    private static void refused(String text, String message) {
        CifSyntaxException e = assertThrows(CifSyntaxException.class, () -> CifFile.parse(text));
        assertEquals(message, e.getMessage());
    }

    @Test
    void parts_ofAnException() {
        CifSyntaxException e = assertThrows(CifSyntaxException.class, () -> CifFile.parse("data_t\n  _x 'open\n"));
        assertEquals(2, e.line());
        assertEquals(6, e.column());
        assertEquals(Optional.of("_x"), e.item());
        assertEquals("the quoted string that starts here is not closed by ' on its line", e.reason());
        assertEquals("line 2, column 6, _x: " + e.reason(), e.getMessage());
    }

    @Test
    void textField_notClosed() {
        String reason = "the text field that starts here is not closed by ';' at the start of a line";
        refused("data_t\n_x\n;one\ntwo ;\n ;", "line 3, column 1, _x: " + reason);
    }

    @Test
    void textField_glued() {
        refused(
                "data_t\n_x\n;one\n;two",
                "line 4, column 2, _x: white space must follow the text field that ends here");
    }

    @Test
    void loop_shortRow() {
        refused(
                "data_t\nloop_\n_a\n_b\n1 2\n3\n_c 1\n",
                "line 6, column 1, _b: the loop of line 2 has 2 data names (_a, _b) but 3 values: "
                        + "the row that begins here has only 1, and then comes _c");
    }

    @Test
    void loop_withoutNames() {
        refused(
                "data_t\nloop_\n1 2\n",
                "line 2, column 1: loop_ must be followed by data names, but next comes the value '1'");
    }

    @Test
    void item_withoutValue() {
        refused("data_t\n_x\n_y 1\n", "line 2, column 1, _x: the item has no value; next comes _y");
        refused("data_t\n_x", "line 2, column 1, _x: the item has no value; next comes the end of the file");
        refused("data_t\n_x loop_", "line 2, column 1, _x: the item has no value; next comes loop_");
        refused("data_t\n_x data_u", "line 2, column 1, _x: the item has no value; next comes data_u");
    }

    @Test
    void value_withoutItem() {
        refused(
                "data_t\n_x 1 2\n",
                "line 2, column 6: the value '2' belongs to no item: a data name must come before it");
    }

    @Test
    void item_twice() {
        String reason = "the item stands in this block twice, first on line 2 and again on line 4";
        refused("data_t\n_x 1\n_y 2\n_X 3\n", "line 4, column 1, _X: " + reason);
        refused("data_t\n_x 1\nloop_\n_X\n3\n", "line 4, column 1, _X: " + reason);
        refused("data_t\nloop_ _x\n1\n_X 1\n", "line 4, column 1, _X: " + reason);
    }

    @Test
    void block_headingMissing() {
        refused("\n_x 1\n", "line 2, column 1: a data_ heading must come first, but here is _x");
    }

    @Test
    void frame_notClosed() {
        String reason = "the save frame save_f, opened on line 2, is not closed by save_ before ";
        refused("data_t\nsave_f\n_x 1\nsave_g\n", "line 4, column 1: " + reason + "save_g");
        refused("data_t\nsave_f\n_x 1\ndata_u\n", "line 4, column 1: " + reason + "data_u");
        refused("data_t\nsave_f\n_x 1", "line 3, column 5: " + reason + "the end of the file");
        refused("data_t\nsave_\n", "line 2, column 1: save_ closes no save frame here");
    }

    @ParameterizedTest
    @ValueSource(strings = {"global_", "stop_", "GLOBAL_", "Stop_"})
    void reservedWord(String word) {
        refused(
                "data_t\n" + word + "\n",
                "line 2, column 1: the word " + word
                        + " is reserved and has no place in a CIF; quote it if it is a value");
    }

    @Test
    void name_emptyUnderscore() {
        refused("data_t\n_ 1\n", "line 2, column 1: '_' alone is no data name");
    }

    @ParameterizedTest
    @CsvSource({"0, U+0000", "8, U+0008", "11, U+000B", "12, U+000C", "27, U+001B", "127, U+007F", "55296, U+D800"})
    void character_forbidden(int code, String name) {
        // Vertical tab and form feed are outside the CIF character set: International Tables G, 2.2.7, from memory.
        refused(
                "data_t\n_x 'a" + (char) code + "'\n",
                "line 2, column 6: the character " + name + " cannot stand in a CIF");
    }

    @Test
    void message_staysShort() {
        String endless = "x".repeat(100_000);
        CifSyntaxException e = assertThrows(CifSyntaxException.class, () -> CifFile.parse("data_t\n_" + endless));
        assertEquals(100_001, e.item().orElseThrow().length());
        assertEquals(true, e.getMessage().length() < 300);
    }
}
