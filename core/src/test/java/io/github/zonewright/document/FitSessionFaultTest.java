package io.github.zonewright.document;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.cif.CifException;
import io.github.zonewright.cif.CifFile;
import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Unfit values of what a record holds beside its fit: the complaint names item, line and what was expected. */
class FitSessionFaultTest {
    private static final String TEXT = FitDocument.of(FitSamples.ordinary())
            .withImage(ImageReference.of("a.tif", 20, 30))
            .withFindings(FitSamples.findings())
            .withHandling(FitSamples.handling(20, 30))
            .toCif()
            .toText();

    private static CifException faultOf(String text) {
        return assertThrows(CifException.class, () -> FitDocument.read(CifFile.parse(text)));
    }

    @ParameterizedTest
    @CsvSource({
        "_zonewright_foil_thickness, -3, above 0",
        "_zonewright_foil_thickness, thin, a number was expected",
        "_zonewright_spots_dark, perhaps, yes or no",
        "_zonewright_hidden_pixels, 3, was expected from the pieces of rows",
        "_zonewright_apart_tilt_x, north, a number was expected",
        "_zonewright_grain_misorientation_angle, 59.5, was expected from the other items",
    })
    void read_unfitItem_isRefusedAtItsLine(String tag, String value, String expected) {
        String bad = TEXT.replaceFirst("(?m)^" + tag + "\\s+\\S+$", tag + " " + value);
        assertTrue(!bad.equals(TEXT), tag);
        CifException e = faultOf(bad);
        assertEquals(tag, e.item().orElseThrow());
        assertTrue(e.line() > 0 && e.getMessage().contains(expected), e.getMessage());
    }

    @ParameterizedTest
    @CsvSource({
        "_zonewright_edit_way, remov, find_centre was expected",
        "_zonewright_edit_way, move, place to move it to is missing",
        "_zonewright_edit_x, left, a number was expected",
        "_zonewright_hidden_row, 30, from 0 to 29",
        "_zonewright_hidden_last_column, 20, to 19",
        "_zonewright_hidden_last_column, -1, from 19",
        "_zonewright_shown_mark, Legend!, lower-case letters",
        "_zonewright_telling_sight, dark, not_seen",
        "_zonewright_telling_of, third, fit or other",
        "_zonewright_refln_shared, both, yes or no",
    })
    void read_unfitCellOfALoop_isRefusedAtItsLine(String tag, String value, String expected) {
        List<String> lines = new ArrayList<>(TEXT.lines().toList());
        int head = lines.indexOf(tag);
        int first = head;
        while (lines.get(first).startsWith("_")) {
            first--;
        }
        int column = head - first - 1;
        int row = head;
        while (lines.get(row).startsWith("_")) {
            row++;
        }
        String[] cells = lines.get(row).split(" ");
        cells[column] = value;
        lines.set(row, String.join(" ", cells));
        CifException e = faultOf(String.join("\n", lines));
        assertEquals(row + 1, e.line());
        assertEquals(tag, e.item().orElseThrow());
        assertTrue(e.getMessage().contains(expected), e.getMessage());
    }

    @Test
    void read_hiddenAreaOfNoImage_isRefused() {
        CifException e = faultOf(TEXT.replaceFirst("(?m)^_zonewright_image_file_name.*\n", ""));
        assertEquals("_zonewright_hidden_pixels", e.item().orElseThrow());
        assertTrue(e.getMessage().contains("size of the image"), e.getMessage());
    }
}
