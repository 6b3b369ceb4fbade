package io.github.zonewright.cif;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.cif.CifValue.Kind;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** CIF 2.0: Bernstein et al., J. Appl. Cryst. 49 (2016) 277; rules from memory. */
class CifSecondVersionTest {
    private static final String MAGIC = "#\\#CIF_2.0\n";

    private static CifValue only(String token) {
        CifFile file = CifFile.parse(MAGIC + "data_t\n_x " + token + "\n_y 1\n");
        assertEquals(CifVersion.CIF_2_0, file.version());
        assertEquals("1", file.blocks().get(0).value("_y").orElseThrow().text());
        assertEquals(file, CifFile.parse(file.toText()), "read, written and read again");
        return file.blocks().get(0).value("_x").orElseThrow();
    }

    private static List<String> texts(CifValue list) {
        return list.elements().stream().map(CifValue::text).toList();
    }

    @Test
    void version_fromFirstComment() {
        assertEquals(CifVersion.CIF_2_0, CifFile.parse(MAGIC).version());
        assertEquals(CifVersion.CIF_2_0, CifFile.parse("#\\#CIF_2.0 \t\n").version());
        assertEquals(CifVersion.CIF_1_1, CifFile.parse("#\\#CIF_1.1\n").version());
        assertEquals(CifVersion.CIF_1_1, CifFile.parse("# x\n" + MAGIC).version());
        assertEquals(CifVersion.CIF_1_1, CifFile.parse("data_t\n" + MAGIC).version());
    }

    @Test
    void list() {
        CifValue list = only("[1 2.5(1) 'a b' ?\n# comment ]\n\n;text\n; [x [y]] ]");
        assertEquals(Kind.LIST, list.kind());
        assertEquals(List.of("1", "2.5(1)", "a b", "?", "text", "[x [y]]"), texts(list));
        assertEquals(
                0.1, list.elements().get(1).asNumber().standardUncertainty().orElseThrow());
        assertEquals(Kind.UNKNOWN, list.elements().get(3).kind());
        assertEquals(6, list.elements().get(4).line());
        assertEquals(
                "y", list.elements().get(5).elements().get(1).elements().get(0).text());
        assertEquals(List.of(), only("[]").elements());
        assertEquals("_x", list.elements().get(0).item());
    }

    @Test
    void table() {
        CifValue table = only("{'a':1 \"b c\":[2 3] '''d''':{'e':.} }");
        assertEquals(Kind.TABLE, table.kind());
        assertEquals(List.of("a", "b c", "d"), List.copyOf(table.table().keySet()));
        assertEquals("[2 3]", table.table().get("b c").text());
        assertEquals(
                Kind.NOT_APPLICABLE, table.table().get("d").table().get("e").kind());
        assertEquals(0, only("{}").table().size());
    }

    @Test
    void quotes_closeAtOnce() {
        assertEquals("a \"b\"", only("'a \"b\"'").text());
        assertEquals("it's", only("\"it's\"").text());
        CifSyntaxException e = assertThrows(CifSyntaxException.class, () -> only("'it's'"));
        assertEquals(
                "line 3, column 8, _x: white space must follow the quoted string, list or table that ends here",
                e.getMessage());
    }

    @Test
    void tripleQuotes() {
        CifFile file = CifFile.parse(MAGIC + "data_t\n_x '''it's\n\"so\" '' here'''\n_y \"\"\"a\"\"\"\n_z ''\n");
        CifBlock block = file.blocks().get(0);
        assertEquals("it's\n\"so\" '' here", block.value("_x").orElseThrow().text());
        assertEquals("a", block.value("_y").orElseThrow().text());
        assertEquals(5, block.value("_y").orElseThrow().line());
        assertEquals("", block.value("_z").orElseThrow().text());
        CifBlock again = CifFile.parse(file.toText()).blocks().get(0);
        for (String tag : block.tags()) {
            assertEquals(
                    block.value(tag).orElseThrow().text(),
                    again.value(tag).orElseThrow().text());
        }
    }

    @Test
    void firstVersion_hasNoneOfThese() {
        CifBlock block =
                CifFile.parse("data_t\nloop_\n_x\n[1 2]\n'''a'''\n").blocks().get(0);
        assertEquals(
                List.of("[1", "2]", "''a''"),
                block.values("_x").stream().map(CifValue::text).toList());
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            quoteCharacter = '`',
            value = {
                "[1 2 | 4 | the list or table that starts here is not closed",
                "{'a':1 | 4 | the list or table that starts here is not closed",
                "[1 } ] | 7 | '}' closes no list or table here",
                "{a:1} | 5 | a key of a table is a quoted string",
                "{'a' 1} | 8 | a key of a table is followed by ':'",
                "{'a':} | 9 | '}' closes no list or table here",
                "{'a':1 'a':2} | 11 | the table has the key 'a' twice",
                "['a'b] | 8 | white space must follow the quoted string, list or table that ends here",
                "[1]2 | 7 | white space must follow the quoted string, list or table that ends here",
                "a[1] | 4 | this is no bare value in CIF 2.0 and must be quoted: 'a[1]'",
                "] | 4 | this is no bare value in CIF 2.0 and must be quoted: ']'",
                "[_y] | 5 | this is no bare value in CIF 2.0 and must be quoted: '_y'",
                "[data_y] | 5 | this is no bare value in CIF 2.0 and must be quoted: 'data_y'",
                "\"\"\"a\"\" | 4 | the quoted string that starts here is not closed by \"\"\""
            })
    void faults(String token, int column, String reason) {
        CifSyntaxException e =
                assertThrows(CifSyntaxException.class, () -> CifFile.parse(MAGIC + "data_t\n_x " + token));
        assertEquals("line 3, column " + column + ", _x: " + reason, e.getMessage());
    }

    @Test
    void nesting_limited() {
        String deep = "[".repeat(64) + "1" + "]".repeat(64);
        CifValue value = only(deep);
        for (int i = 0; i < 64; i++) {
            value = value.elements().get(0);
        }
        assertEquals("1", value.text());
        CifSyntaxException e = assertThrows(CifSyntaxException.class, () -> only("[" + deep + "]"));
        assertTrue(e.getMessage().contains("nested deeper than 64"), e.getMessage());
    }
}
