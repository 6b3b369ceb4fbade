package io.github.zonewright.cif;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.TestData;
import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.Charset;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class CifFileTest {
    @TempDir
    Path folder;

    @Test
    void read_depositedFile() throws IOException {
        CifFile file = CifFile.read(TestData.path("cif/CsCl.cif"));
        CifBlock block = file.blocks().get(0);
        assertEquals("9008620", block.name());
        assertEquals(CifVersion.CIF_1_1, file.version());
        assertEquals(
                " Part of the Crystallography Open Database", file.heading().get(0));
        assertEquals(
                "Wyckoff, R. W. G.", block.values("_publ_author_name").get(0).text());
        assertTrue(block.value("_publ_section_title").orElseThrow().text().startsWith("\n Second edition."));
        assertEquals(List.of(), file.notices());
    }

    @Test
    void toText_everyDepositedFileKeepsAll() throws IOException {
        try (Stream<Path> paths = Files.list(TestData.path("cif"))) {
            for (Path path : paths.filter(p -> p.toString().endsWith(".cif")).toList()) {
                CifFile file = CifFile.read(path);
                CifFile again = CifFile.parse(file.toText());
                assertEquals(file, again, path.toString());
            }
        }
    }

    @Test
    void block_anyCase() {
        CifFile file = CifFile.parse("data_One\n_a 1\ndata_two\n_a 2\n");
        assertEquals(2, file.blocks().size());
        assertEquals(
                "2", file.block("TWO").orElseThrow().value("_A").orElseThrow().text());
        assertTrue(file.block("three").isEmpty());
    }

    @Test
    void block_namedTwice() {
        CifFile file = CifFile.parse("data_a\n_x 1\ndata_A\n_x 2\n");
        assertEquals(
                "1", file.block("a").orElseThrow().value("_x").orElseThrow().text());
        assertEquals(
                "line 3, column 1: a second data block of the name 'A'; the first is on line 1",
                file.notices().get(0).toString());
    }

    @Test
    void parse_empty() {
        // International Tables G, 2.2.7: comments and blocks are both optional.
        assertEquals(List.of(), CifFile.parse("").blocks());
        CifFile comments = CifFile.parse("# one\n   # two\n");
        assertEquals(List.of(" one", " two"), comments.heading());
        assertEquals("# one\n# two\n", comments.toText());
    }

    @Test
    void read_encodings() throws IOException {
        String text = "data_x\n_name 'Å é µ'\n";
        for (Charset charset : List.of(StandardCharsets.UTF_8, StandardCharsets.ISO_8859_1)) {
            assertEquals("Å é µ", nameIn(text.getBytes(charset)), charset.name());
        }
        for (Charset charset : List.of(StandardCharsets.UTF_8, StandardCharsets.UTF_16BE, StandardCharsets.UTF_16LE)) {
            assertEquals("Å é µ", nameIn(("\uFEFF" + text).getBytes(charset)), charset.name());
        }
    }

    private static String nameIn(byte[] bytes) throws IOException {
        CifFile file = CifFile.read(new ByteArrayInputStream(bytes));
        return file.block("x").orElseThrow().value("_name").orElseThrow().text();
    }

    @Test
    void read_brokenUtf16() {
        byte[] bytes = {(byte) 0xFE, (byte) 0xFF, 0};
        CifSyntaxException e =
                assertThrows(CifSyntaxException.class, () -> CifFile.read(new ByteArrayInputStream(bytes)));
        assertEquals("line 1, column 1: the file begins as UTF-16BE but is not valid UTF-16BE", e.getMessage());
    }

    @Test
    void read_tooLong() {
        InputStream endless = new InputStream() {
            @Override
            public int read() {
                return ' ';
            }

            @Override
            public int read(byte[] buffer, int offset, int length) {
                java.util.Arrays.fill(buffer, offset, offset + length, (byte) ' ');
                return length;
            }
        };
        CifSyntaxException e = assertThrows(CifSyntaxException.class, () -> CifFile.read(endless));
        assertTrue(e.getMessage().contains("the file is longer than 33554432"), e.getMessage());
    }

    @Test
    void parse_tooManyWords() {
        String text = "data_x\nloop_\n_a\n" + "1 ".repeat(CifFile.MOST_WORDS);
        CifSyntaxException e = assertThrows(CifSyntaxException.class, () -> CifFile.parse(text));
        assertTrue(e.getMessage().startsWith("line 4, column "), e.getMessage());
        assertTrue(e.getMessage().contains("more than 2000000 words"), e.getMessage());
    }

    @Test
    void write_replacesWholeFile() throws IOException {
        Path path = folder.resolve("kept.cif");
        Files.writeString(path, "x".repeat(10_000));
        CifFile file = CifFile.of(
                CifBlock.builder("kept").add("_cell_length_a", 4.0495).build());
        file.write(path);
        assertEquals("#\\#CIF_1.1\ndata_kept\n_cell_length_a                      4.0495\n", Files.readString(path));
        assertEquals(file, CifFile.read(path));
        assertArrayEquals(new String[] {"kept.cif"}, folder.toFile().list());
    }

    @Test
    void write_failureLeavesNothing() throws IOException {
        Path path = folder.resolve("taken");
        Files.createDirectory(path);
        CifFile file = CifFile.of();
        assertThrows(IOException.class, () -> file.write(path));
        assertThrows(IOException.class, () -> file.write(folder.resolve("none").resolve("x.cif")));
        assertArrayEquals(new String[] {"taken"}, folder.toFile().list());
    }

    @Test
    void of_listsNeedSecondVersion() {
        CifFile second = CifFile.parse("#\\#CIF_2.0\ndata_x\n_list [1 2]\n");
        CifBlock block = second.blocks().get(0);
        IllegalArgumentException e = assertThrows(IllegalArgumentException.class, () -> CifFile.of(block));
        assertEquals("lists and tables need CIF 2.0, but the file is CIF 1.1: _list", e.getMessage());
    }

    @Test
    void withHeading_belowDeclaration() {
        CifFile file = CifFile.of(CifBlock.builder("x").build()).withHeading("Crystals of the\nHarrow Quay pump works");
        assertEquals("#\\#CIF_1.1\n# Crystals of the\n# Harrow Quay pump works\ndata_x\n", file.toText());
        assertFalse(CifFile.parse(file.toText()).heading().isEmpty());
    }
}
