package io.github.zonewright.document;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.cif.CifBlock;
import io.github.zonewright.cif.CifEntry;
import io.github.zonewright.cif.CifException;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.cif.CifItem;
import io.github.zonewright.cif.CifLoop;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Files that are not what a record should be: the complaint names item, line and what was expected. */
class FitFaultTest {
    private static final String TEXT = FitDocument.of(FitSamples.ordinary())
            .withImage(ImageReference.of("a.tif", 8, 8))
            .toCif()
            .toText();

    private static CifException faultOf(String text) {
        return assertThrows(CifException.class, () -> FitDocument.read(CifFile.parse(text)));
    }

    /** The record's text with another value of one item. */
    private static String with(String tag, String value) {
        String changed = TEXT.replaceFirst("(?m)^" + tag + "\\s+\\S+$", tag + " " + value);
        assertTrue(!changed.equals(TEXT), tag);
        return changed;
    }

    private static int lineOf(String text, String start) {
        return text.substring(0, text.indexOf("\n" + start + " ") + 1).split("\n", -1).length;
    }

    @Test
    void read_noRecord_saysSo() {
        CifException e = faultOf("data_nickel\n_cell_length_a 3.524\n");
        assertEquals("_zonewright_record_type", e.item().orElseThrow());
        assertTrue(e.getMessage().contains("a record of type 'fit' was expected"), e.getMessage());
        assertEquals("_zonewright_record_type", faultOf("").item().orElseThrow());
    }

    @Test
    void read_recordOfAnotherType_namesItAndItsLine() {
        CifException e = faultOf("data_x\n_zonewright_record_type calibration\n_zonewright_record_version 1\n");
        assertEquals(2, e.line());
        assertTrue(e.getMessage().contains("calibration"), e.getMessage());
    }

    @Test
    void read_otherVersion_namesItAndItsLine() {
        CifException e = faultOf(with("_zonewright_record_version", "2"));
        assertEquals("_zonewright_record_version", e.item().orElseThrow());
        assertEquals(lineOf(TEXT, "_zonewright_record_version"), e.line());
        assertTrue(e.getMessage().contains("version 1 was expected"), e.getMessage());
        assertTrue(e.getMessage().contains("2"), e.getMessage());
    }

    @ParameterizedTest
    @CsvSource({
        "_diffrn_radiation_probe, neutron, electron was expected",
        "_diffrn_source_voltage, 0, accelerating voltage",
        "_diffrn_source_voltage, fast, a number was expected",
        "_diffrn_source_voltage, ?, accelerating voltage",
        "_diffrn_radiation_wavelength, 0.03701, was expected from the other items",
        "_diffrn_orient_matrix_UB_12, 0.9, was expected from the other items",
        "_zonewright_zone_axis_u, 0.5, a whole number was expected",
        "_zonewright_zone_axis_u, 7, hu + kv + lw",
        "_zonewright_rotation, north, a number was expected",
        "_zonewright_camera_constant, 0.0, camera constant",
        "_zonewright_camera_constant, -5, camera constant",
        "_zonewright_camera_mirrored, perhaps, yes or no was expected",
        "_zonewright_fit_state, guess, solution or placement was expected",
        "_zonewright_fit_spots_unexplained, 1, '1 rows were expected, as the record counts, but there are 2'",
        "_zonewright_fit_spots_explained, -1, a count from 0 was expected",
        "_zonewright_half_turn_quaternion_w, x, a number was expected",
        "_zonewright_image_width, 0, image size",
    })
    void read_unfitValue_namesItemLineAndWhatWasExpected(String tag, String value, String expected) {
        String text = with(tag, value);
        CifException e = faultOf(text);
        assertTrue(e.getMessage().contains(expected), e.getMessage());
        assertTrue(e.line() > 0, e.getMessage());
        boolean inLoop = tag.endsWith("spots_unexplained");
        boolean ofImage = tag.startsWith("_zonewright_image");
        if (!inLoop && !ofImage) {
            assertEquals(tag, e.item().orElseThrow());
            assertEquals(lineOf(text, tag), e.line());
        }
    }

    @Test
    void read_tooFewRows_isRefused() {
        CifException e = faultOf(with("_zonewright_fit_spots_explained", "4"));
        assertTrue(e.getMessage().contains("4 rows were expected"), e.getMessage());
    }

    @Test
    void read_negativeUncertaintyOfASpot_isRefusedAtItsLine() {
        List<String> lines = new ArrayList<>(TEXT.lines().toList());
        int row = lines.indexOf("_zonewright_unexplained_saturated") + 1;
        String[] cells = lines.get(row).split(" ");
        cells[2] = "-1";
        lines.set(row, String.join(" ", cells));
        CifException e = faultOf(String.join("\n", lines));
        assertEquals(row + 1, e.line());
        assertEquals("_zonewright_unexplained_su", e.item().orElseThrow());
    }

    @Test
    void read_badDate_isRefused() {
        CifException e = faultOf(TEXT + "_audit_creation_date yesterday\n");
        assertTrue(e.getMessage().contains("a time such as"), e.getMessage());
    }

    /** Whatever item is left out, the record is either read the same or refused for that item by name. */
    @Test
    void read_anyItemMissing_isNamed() {
        FitDocument whole = FitDocument.read(CifFile.parse(TEXT));
        CifBlock block = CifFile.parse(TEXT).blocks().get(0);
        List<String> refused = new ArrayList<>();
        for (String tag : block.tags()) {
            List<CifEntry> rest =
                    block.entries().stream().flatMap(e -> without(e, tag)).toList();
            CifFile file = CifFile.of(new CifBlock(block.name(), rest));
            try {
                FitDocument read = FitDocument.read(file);
                boolean optional = tag.startsWith("_zonewright_image_file") || tag.startsWith("_zonewright_half_turn");
                assertTrue(
                        optional
                                || read.placement()
                                        .crystal()
                                        .equals(whole.placement().crystal())
                                || isOfCrystal(tag),
                        tag);
            } catch (IllegalArgumentException e) {
                boolean named = isOfCrystal(tag) || e.getMessage().contains(tag);
                assertTrue(named, () -> tag + " is not named in: " + e.getMessage());
                refused.add(tag);
            }
        }
        for (String tag : block.tags()) {
            boolean needed = tag.startsWith("_zonewright_")
                    && !tag.startsWith("_zonewright_caution")
                    && !tag.equals("_zonewright_image_file_name")
                    && !tag.equals("_zonewright_fit_own_score")
                    && !tag.equals("_zonewright_half_turn_quaternion_w");
            assertTrue(!needed || refused.contains(tag), tag + " was not missed");
        }
    }

    private static boolean isOfCrystal(String tag) {
        return tag.matches("_(cell|chemical|space_group|atom_site|exptl)_.*");
    }

    private static Stream<CifEntry> without(CifEntry entry, String tag) {
        if (entry instanceof CifItem item) {
            return item.tag().equals(tag) ? Stream.empty() : Stream.of(entry);
        }
        if (entry instanceof CifLoop loop && loop.tags().contains(tag)) {
            int gone = loop.tags().indexOf(tag);
            List<String> tags = new ArrayList<>(loop.tags());
            tags.remove(gone);
            if (tags.isEmpty()) {
                return Stream.empty();
            }
            return Stream.of(CifLoop.of(
                    tags,
                    loop.rows().stream()
                            .map(row -> {
                                var cells = new ArrayList<>(row);
                                cells.remove(gone);
                                return List.copyOf(cells);
                            })
                            .toList()));
        }
        return Stream.of(entry);
    }

    @Test
    void read_anyPrefixOfTheText_isRefusedOrWhole() {
        FitDocument whole = FitDocument.read(CifFile.parse(TEXT));
        for (int end = 0; end < TEXT.length(); end += 37) {
            String cut = TEXT.substring(0, end);
            try {
                // Only what is not read back, the cautions, may be lost.
                assertEquals(
                        whole.solution().orElseThrow().matches(),
                        FitDocument.read(CifFile.parse(cut))
                                .solution()
                                .orElseThrow()
                                .matches());
            } catch (IllegalArgumentException e) {
                assertTrue(!e.getMessage().isBlank());
            }
        }
    }

    @Test
    void read_noFile_isAnIoException(@TempDir Path folder) throws IOException {
        assertThrows(IOException.class, () -> FitDocument.read(folder.resolve("none.cif")));
        Path noise = Files.write(folder.resolve("noise.cif"), new byte[] {(byte) 0x89, 'P', 'N', 'G', 0, 1, 2});
        assertThrows(CifException.class, () -> FitDocument.read(noise));
    }
}
