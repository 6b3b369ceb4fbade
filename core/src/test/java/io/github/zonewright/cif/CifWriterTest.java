package io.github.zonewright.cif;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.TimeUnit;
import org.junit.jupiter.api.Assumptions;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class CifWriterTest {
    private static final List<String> AWKWARD = List.of(
            "",
            " ",
            "a",
            "a b",
            "it's",
            "a 'b' c",
            "say \"so\"",
            "'a' \"b\" c",
            "it's\"",
            "?",
            ".",
            "1.5",
            "_x",
            "#x",
            "data_",
            "loop_",
            "$f",
            ";x",
            "[1]",
            "{2}",
            "a\nb",
            "\n a",
            "a\n;b",
            "a\\",
            "\\\nx",
            "tab\there",
            "x,y,z",
            "-x",
            "trailing ",
            "a\n",
            "\n;\n;\n",
            "> \\\n> x",
            "x".repeat(3000),
            "'".repeat(3000),
            "\" '".repeat(900),
            "\\".repeat(2500));

    @TempDir
    Path folder;

    private static CifFile awkward() {
        CifBlockBuilder block = CifBlock.builder("awkward").comment("first\nsecond " + "long ".repeat(700));
        List<List<CifValue>> rows = new ArrayList<>();
        for (int i = 0; i < AWKWARD.size(); i++) {
            block.add("_zonewright_item_" + i, AWKWARD.get(i));
            rows.add(List.of(CifValue.of(i), CifValue.of(AWKWARD.get(i)), CifValue.UNKNOWN, CifValue.of(i / 3.0)));
        }
        block.add(CifLoop.of(
                List.of("_zonewright_a_id", "_zonewright_a_text", "_zonewright_a_none", "_zonewright_a_number"), rows));
        return CifFile.of(block.build());
    }

    @Test
    void everyText_comesBack() {
        CifBlock again = CifFile.parse(awkward().toText()).blocks().get(0);
        CifLoop loop = again.loop("_zonewright_a_id").orElseThrow();
        for (int i = 0; i < AWKWARD.size(); i++) {
            assertEquals(
                    AWKWARD.get(i),
                    again.value("_zonewright_item_" + i).orElseThrow().text());
            assertEquals(
                    AWKWARD.get(i),
                    loop.value(i, "_zonewright_a_text").orElseThrow().text());
            assertEquals(i, loop.value(i, "_zonewright_a_id").orElseThrow().asInt());
            assertEquals(
                    i / 3.0,
                    loop.value(i, "_zonewright_a_number")
                            .orElseThrow()
                            .asNumber()
                            .value());
            assertTrue(again.value("_zonewright_item_" + i).orElseThrow().isKnown());
        }
    }

    @Test
    void lines_notTooLong() {
        assertTrue(awkward().toText().lines().allMatch(line -> line.length() <= 2048));
        List<String> tags = new ArrayList<>();
        List<CifValue> row = new ArrayList<>();
        for (int i = 0; i < 1000; i++) {
            tags.add("_t" + i);
            row.add(CifValue.of(i / 7.0));
        }
        CifFile wide = CifFile.of(
                CifBlock.builder("wide").add(CifLoop.of(tags, List.of(row))).build());
        assertTrue(wide.toText().lines().allMatch(line -> line.length() <= 2048));
        assertEquals(wide, CifFile.parse(wide.toText()));
    }

    @Test
    void layout() {
        CifBlock block = CifBlock.builder("Al")
                .comment("a remark")
                .add("_space_group_name_H-M_alt", "F m -3 m")
                .add("_cell_length_a", 4.0495)
                .add("_space_group_IT_number", 225)
                .add("_publ_section_title", "one\ntwo")
                .add("_chemical_name_common", "x".repeat(60))
                .add("_diffrn_ambient_temperature", CifValue.UNKNOWN)
                .add(CifLoop.of(
                        List.of("_atom_site_label", "_atom_site_fract_x"),
                        List.of(
                                List.of(CifValue.of("Al1"), CifValue.of(0.0)),
                                List.of(CifValue.of("a\nb"), CifValue.NOT_APPLICABLE))))
                .build();
        assertEquals("""
                #\\#CIF_1.1
                data_Al
                # a remark
                _space_group_name_H-M_alt           'F m -3 m'
                _cell_length_a                      4.0495
                _space_group_IT_number              225
                _publ_section_title
                ;one
                two
                ;
                _chemical_name_common
                xxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxxx
                _diffrn_ambient_temperature         ?
                loop_
                _atom_site_label
                _atom_site_fract_x
                Al1 0.0
                ;a
                b
                ;
                .
                """, CifFile.of(block).toText());
    }

    @Test
    void longBareValue_isFolded() {
        String digits = "1".repeat(5000);
        CifFile file = CifFile.parse("data_t\n_x " + digits + "\n");
        assertTrue(file.toText().lines().allMatch(line -> line.length() <= 2048));
        CifBlock again = CifFile.parse(file.toText()).blocks().get(0);
        assertEquals(digits, again.value("_x").orElseThrow().text());
    }

    /** Another reader of CIF takes all that is written here; run where the Debian package cod-tools is. */
    @Test
    void otherReader_hasNoComplaint() throws IOException, InterruptedException {
        Path parser = Path.of("/usr/bin/cif_parse");
        Assumptions.assumeTrue(Files.isExecutable(parser), "the Debian package cod-tools is not installed");
        Path path = folder.resolve("awkward.cif");
        Path complaints = folder.resolve("complaints");
        awkward().write(path);
        Process process = new ProcessBuilder(parser.toString(), path.toString())
                .redirectOutput(ProcessBuilder.Redirect.DISCARD)
                .redirectError(complaints.toFile())
                .start();
        assertTrue(process.waitFor(120, TimeUnit.SECONDS), "the other reader takes too long");
        List<String> lines = Files.readAllLines(complaints).stream()
                .filter(line -> !line.contains("NOTE, 0 error(s)"))
                .toList();
        assertEquals(List.of(), lines);
        assertEquals(0, process.exitValue());
    }
}
