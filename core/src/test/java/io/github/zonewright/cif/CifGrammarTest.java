package io.github.zonewright.cif;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.cif.CifValue.Kind;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * What a CIF 1.1 may look like: International Tables for Crystallography G (2005), ch. 2.2, section 2.2.7, rules from
 * memory.
 */
class CifGrammarTest {
    private static CifValue only(String token) {
        return CifFile.parse("data_t\n_x " + token + "\n")
                .blocks()
                .get(0)
                .value("_x")
                .orElseThrow();
    }

    private static void check(Kind kind, String text, String token) {
        CifValue value = only(token);
        assertEquals(kind, value.kind(), token);
        assertEquals(text, value.text(), token);
    }

    @Test
    void bareValues() {
        check(Kind.BARE, "Fm-3m", "Fm-3m");
        check(Kind.BARE, "1.234(5)", "1.234(5)");
        check(Kind.BARE, "x,y,-z+1/2", "x,y,-z+1/2");
        check(Kind.BARE, "a'b\"c#d;e_f", "a'b\"c#d;e_f");
        check(Kind.BARE, ".5", ".5");
        check(Kind.BARE, "??", "??");
    }

    @Test
    void specialValues_onlyBare() {
        check(Kind.UNKNOWN, "?", "?");
        check(Kind.NOT_APPLICABLE, ".", ".");
        check(Kind.QUOTED, "?", "'?'");
        check(Kind.QUOTED, ".", "\".\"");
    }

    @Test
    void quotes_closeOnlyBeforeWhiteSpace() {
        // The standard's own example is 'a dog's life'.
        check(Kind.QUOTED, "a dog's life", "'a dog's life'");
        check(Kind.QUOTED, "say \"yes\"", "\"say \"yes\"\"");
        check(Kind.QUOTED, "", "''");
        check(Kind.QUOTED, "'", "'''");
        check(Kind.QUOTED, "a # b", "'a # b'");
        check(Kind.QUOTED, "_tag", "'_tag'");
        check(Kind.QUOTED, "loop_", "'loop_'");
        check(Kind.QUOTED, "tab", "'tab'\t");
    }

    @Test
    void reservedWords_areValuesOnlyInQuotes() {
        check(Kind.QUOTED, "data_x", "'data_x'");
        check(Kind.QUOTED, "stop_", "\"stop_\"");
    }

    @Test
    void textField_keepsItsLines() {
        check(Kind.TEXT_FIELD, "one\n two \n\nthree", "\n;one\n two \n\nthree\n;");
        check(Kind.TEXT_FIELD, "\nfrom the second line", "\n;\nfrom the second line\n;");
        check(Kind.TEXT_FIELD, "", "\n;\n;");
        check(Kind.TEXT_FIELD, "\n", "\n;\n\n;");
        check(Kind.TEXT_FIELD, "data_x 'y' # z ;", "\n;data_x 'y' # z ;\n;");
        check(Kind.TEXT_FIELD, " ; indented", "\n; ; indented\n;");
        check(Kind.TEXT_FIELD, "eof", "\n;eof\n;");
    }

    @Test
    void semicolon_inMidLineIsBare() {
        CifFile file = CifFile.parse("data_t\nloop_\n_a\n_b\n1 ;2\n");
        assertEquals(";2", file.blocks().get(0).values("_b").get(0).text());
        assertEquals(Kind.QUOTED, file.blocks().get(0).values("_b").get(0).kind());
    }

    @ParameterizedTest
    @ValueSource(strings = {"\n", "\r\n", "\r"})
    void lineEnds(String end) {
        String text = String.join(end, "# head", "data_t", "_x", ";one", "two", ";", "_y 'z' # note", "_z 3");
        CifFile file = CifFile.parse(text);
        CifBlock block = file.blocks().get(0);
        assertEquals("one\ntwo", block.value("_x").orElseThrow().text());
        assertEquals("3", block.value("_z").orElseThrow().text());
        assertEquals(8, block.value("_z").orElseThrow().line());
        assertEquals(List.of(" head"), file.heading());
    }

    @Test
    void lineEnds_mixed() {
        CifFile file = CifFile.parse("data_t\r\n_x 1\r_y 2\n\r_z 3");
        assertEquals(5, file.blocks().get(0).value("_z").orElseThrow().line());
    }

    @Test
    void keywords_anyCase() {
        CifFile file = CifFile.parse("DATA_t\nLooP_ _a\n1 2\nSAVE_f\n_b 1\nSave_\n");
        CifBlock block = file.blocks().get(0);
        assertEquals(2, block.loop("_a").orElseThrow().size());
        assertEquals("f", block.frames().get(0).name());
    }

    @Test
    void loop_endsAtEveryKeyword() {
        CifFile file = CifFile.parse("data_a loop_ _x _y 1 2 3 4 loop_ _z 5 save_f loop_ _x 6 save_ _w 7 data_b _x 8");
        CifBlock block = file.blocks().get(0);
        assertEquals(2, block.loop("_x").orElseThrow().size());
        assertEquals(1, block.loop("_z").orElseThrow().size());
        assertEquals("7", block.value("_w").orElseThrow().text());
        assertEquals("6", block.frames().get(0).value("_x").orElseThrow().text());
        assertEquals(List.of("_x", "_y", "_z", "_w"), block.tags());
    }

    @Test
    void comments_areKept() {
        String text = "#1\ndata_a\n#2\n_x #3\n1 #4\nloop_ #5\n_y #6\n1 #7\n2 #8\ndata_b\n_z 1\n#END";
        String expected =
                "#1\ndata_a\n#2\n#3\n_x                                  1\n#4\n#5\n#6\n#7\nloop_\n_y\n1\n2\n#8\n"
                        + "data_b\n_z                                  1\n#END\n";
        CifFile file = CifFile.parse(text);
        assertEquals(expected, file.toText());
        assertEquals(file, CifFile.parse(expected));
    }

    @Test
    void comments_aroundFrame() {
        String text = "data_a\n#1\nsave_f\n#2\n_x                                  1\n#3\nsave_\n#4\n";
        assertEquals(text, CifFile.parse(text).toText());
    }

    @Test
    void comment_needsWhiteSpaceBefore() {
        CifFile file = CifFile.parse("data_t\n_x a#b #c\n");
        assertEquals("a#b", file.blocks().get(0).value("_x").orElseThrow().text());
    }

    @Test
    void names_withBrackets() {
        CifFile file = CifFile.parse("data_t\n_[local]_cod_text 1\n");
        assertEquals(
                "1",
                file.blocks().get(0).value("_[LOCAL]_cod_text").orElseThrow().text());
    }

    @Test
    void frameReference_isKept() {
        check(Kind.BARE, "$frame", "$frame");
        String text = "data_t\n_x                                  $frame\n";
        assertEquals(text, CifFile.parse(text).toText());
    }

    @Test
    void tolerance_bareValueToBeQuoted() {
        CifFile file = CifFile.parse("data_t\n_x [Ar]3d5\n");
        CifValue value = file.blocks().get(0).value("_x").orElseThrow();
        assertEquals(Kind.QUOTED, value.kind());
        assertEquals(
                "line 2, column 4: read as if quoted: '[Ar]3d5'",
                file.notices().get(0).toString());
        assertTrue(file.toText().contains("'[Ar]3d5'"));
    }

    @Test
    void tolerance_sameItemWithSameValue() {
        CifFile file = CifFile.parse("data_t\n_x 1\n_y 2\n_X 1\n");
        assertEquals(List.of("_x", "_y"), file.blocks().get(0).tags());
        assertEquals(
                "line 4, column 1: the item _X stands here again with the value of line 2; it is kept once",
                file.notices().get(0).toString());
    }

    @Test
    void tolerance_emptyLoopAndNamelessBlock() {
        CifFile file = CifFile.parse("data_\nloop_\n_x\n_y\nloop_\n_z\n1\n");
        assertEquals(0, file.blocks().get(0).loop("_x").orElseThrow().size());
        assertEquals(
                List.of(
                        "line 1, column 1: a data block without a name",
                        "line 2, column 1: a loop without values: _x, _y"),
                file.notices().stream().map(CifNotice::toString).toList());
        assertEquals(file.blocks(), CifFile.parse(file.toText()).blocks());
    }

    @Test
    void tolerance_controlZAndByteOrderMark() {
        CifFile file = CifFile.parse("\uFEFFdata_t\n_x 1\n\u001A");
        assertEquals("1", file.blocks().get(0).value("_x").orElseThrow().text());
    }
}
