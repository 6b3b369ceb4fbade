package io.github.zonewright.cif;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Line folding (International Tables G, 2.2.7) and text prefix (Bernstein et al. 2016); rules from memory. */
class CifTextFieldTest {
    private static void roundTrip(String text) {
        String field = CifTextField.encode(text);
        assertEquals(0, field.indexOf(';'));
        int close = field.indexOf("\n;");
        assertEquals(field.length() - 2, close, "the field must close at its end and not before");
        assertEquals(text, CifTextField.decode(field.substring(1, close)));
        assertTrue(field.lines().allMatch(line -> line.length() <= CifTextField.LONGEST_LINE));
    }

    @Test
    void decode_foldedLines() {
        assertEquals("one two\nthree", CifTextField.decode("\\\none \\\ntwo\nthree"));
        assertEquals("blanks after", CifTextField.decode("\\  \t\nblanks \\ \t\nafter"));
        assertEquals("a\nb", CifTextField.decode("\\\na\nb"));
        assertEquals("", CifTextField.decode("\\"));
        assertEquals("x", CifTextField.decode("\\\nx\\"));
    }

    @Test
    void decode_protectedBackslash() {
        assertEquals("C:\\\nD", CifTextField.decode("\\\nC:\\\\\n\nD"));
    }

    @Test
    void decode_backslashesElsewhereStay() {
        assertEquals("a \\\nb", CifTextField.decode("a \\\nb"));
        assertEquals("\\a\nb\\\nc", CifTextField.decode("\\a\nb\\\nc"));
        assertEquals("\n\\alpha", CifTextField.decode("\n\\alpha"));
        assertEquals("\\\\\nb", CifTextField.decode("\\\\\nb"));
    }

    @Test
    void decode_prefix() {
        assertEquals("one\n;two\n", CifTextField.decode("> \\\n> one\n> ;two\n> "));
        assertEquals("one two\n;x", CifTextField.decode("CIF>\\\\\nCIF>one \\\nCIF>two\nCIF>;x"));
    }

    @Test
    void decode_prefixMissingOnALine() {
        assertEquals("> \\\n> one\ntwo", CifTextField.decode("> \\\n> one\ntwo"));
        assertEquals("lone \\", CifTextField.decode("lone \\"));
    }

    @Test
    void encode_plainWherePossible() {
        assertEquals(";one\ntwo\n;", CifTextField.encode("one\ntwo"));
        assertEquals(";\n text\n;", CifTextField.encode("\n text"));
    }

    @ParameterizedTest
    @ValueSource(
            strings = {
                "",
                "\n",
                "\n\n",
                "a",
                "\\",
                "\\\\",
                "\\\n",
                "a\\\nb",
                "a\\ \nb\\\t",
                "x\n;y",
                ";",
                ";;\n;;",
                "> \\\n> a",
                "\\\n;",
                "a\\\n;b",
                "trailing  \n  ",
                "\\  ",
                ">\\\\\n>x\\\n>y",
                "\n\\\nx"
            })
    void encode_roundTrip(String text) {
        roundTrip(text);
    }

    @Test
    void encode_longLines() {
        roundTrip("word ".repeat(2000));
        roundTrip(";".repeat(10_000));
        roundTrip("x".repeat(2001) + ";".repeat(3000) + "\\");
        roundTrip(("x".repeat(1999) + ";").repeat(4));
        roundTrip(";" + "a".repeat(5000) + "\n;" + "b".repeat(5000) + "\\\n\\");
        roundTrip("\uD835\uDC00".repeat(3000));
        roundTrip("x" + "\uD835\uDC00".repeat(3000));
        for (int length = 2030; length < 2060; length++) {
            roundTrip("\\".repeat(length));
            roundTrip("a\n" + "b ".repeat(length / 2) + "\\ \n;");
        }
    }

    @Test
    void encode_randomRoundTrip() {
        Random random = new Random(20261201);
        String alphabet = "\\\\\n\n;; \t>a";
        for (int i = 0; i < 20_000; i++) {
            StringBuilder text = new StringBuilder();
            int length = random.nextInt(14);
            for (int k = 0; k < length; k++) {
                String piece = String.valueOf(alphabet.charAt(random.nextInt(alphabet.length())));
                text.append(random.nextInt(50) == 0 ? piece.repeat(2100) : piece);
            }
            roundTrip(text.toString());
        }
    }
}
