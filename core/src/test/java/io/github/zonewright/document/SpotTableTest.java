package io.github.zonewright.document;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.SolutionErrors;
import io.github.zonewright.indexing.SpotMatch;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.PredictedSpot;
import io.github.zonewright.spots.MeasuredSpot;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** RFC 4180, Common Format and MIME Type for Comma-Separated Values (CSV) Files, section 2. */
class SpotTableTest {
    private static final MeasuredSpot SPOT = new MeasuredSpot(new PixelPoint(103.5, 200.25), 0.125, 5000, 40.5, false);
    private static final MeasuredSpot LEFT_OVER = new MeasuredSpot(new PixelPoint(7, 8), 0.5, 90, 6, true);
    private static final PlacedSpot COMPUTED = placed(new Hkl(2, 0, 0), 100.5, 196.25);
    private static final PlacedSpot UNMEASURED = placed(new Hkl(0, -2, 2), 300, 301);

    private static PlacedSpot placed(Hkl hkl, double x, double y) {
        return new PlacedSpot(new PredictedSpot(hkl, new Vector2(0.5, 0), -0.001, 1.25, 0.0625), new PixelPoint(x, y));
    }

    private static Solution solution() {
        SpotMatch match = new SpotMatch(SPOT, new Hkl(2, 0, 0), COMPUTED.position());
        return new Solution(
                FitSamples.placement(FitSamples.NICKEL, new Random(1)),
                List.of(match),
                List.of(LEFT_OVER),
                5,
                10,
                new SolutionErrors(0, 0, 0, 0, 0, 0),
                Optional.empty());
    }

    /** Nickel, a = 3.524 Å: d(200) = a/2 = 1.762 Å; 3-4-5 triangle between measured and computed place. */
    @Test
    void toCsv_solutionAndPrediction_isWrittenOut() {
        List<List<String>> rows =
                SpotTable.of(solution(), List.of(COMPUTED, UNMEASURED)).rows();
        String d200 = rows.get(0).get(4);
        String d220 = rows.get(2).get(4);
        assertEquals(1.762, Double.parseDouble(d200), 1e-12);
        assertEquals(3.524 / Math.sqrt(8), Double.parseDouble(d220), 1e-12);
        String[] lines =
                SpotTable.of(solution(), List.of(COMPUTED, UNMEASURED)).toCsv().split("\r\n", -1);
        assertEquals(
                "kind,h,k,l,d (Å),measured x (px),measured y (px),measured su (px),computed x (px),computed y (px),"
                        + "residual (px),measured intensity (grey values),signal to noise,saturated,"
                        + "excitation error (1/Å),structure factor (Å),computed intensity",
                lines[0]);
        assertEquals(
                "explained,2,0,0," + d200 + ",103.5,200.25,0.125,100.5,196.25,5.0,5000.0,40.5,no,-0.001,1.25,0.0625",
                lines[1]);
        assertEquals("unexplained,,,,,7.0,8.0,0.5,,,,90.0,6.0,yes,,,", lines[2]);
        assertEquals("predicted,0,-2,2," + d220 + ",,,,300.0,301.0,,,,,-0.001,1.25,0.0625", lines[3]);
        assertEquals("", lines[4]);
        assertEquals(5, lines.length);
    }

    @Test
    void toCsv_solutionAlone_leavesTheTheoryOut() {
        SpotTable table = SpotTable.of(solution());
        assertEquals(2, table.rows().size());
        assertEquals(List.of("", "", ""), table.rows().get(0).subList(14, 17));
    }

    @Test
    void toCsv_placement_hasPredictedSpotsAlone() {
        SpotTable table = SpotTable.of(solution().placement(), List.of(COMPUTED, UNMEASURED));
        assertEquals(
                List.of("predicted", "predicted"),
                table.rows().stream().map(row -> row.get(0)).toList());
        assertEquals("0", table.rows().get(1).get(1));
        assertEquals("-2", table.rows().get(1).get(2));
    }

    /** Section 2, rules 2 and 4: a line break ends every record; every line has the same number of fields. */
    @Test
    void toCsv_everyLine_hasAsManyFieldsAsTheHeader() {
        Random random = new Random(3);
        Solution big = FitSamples.solution(FitSamples.placement(FitSamples.NICKEL, random), 100, 30, random);
        String csv = SpotTable.of(big, List.of(COMPUTED, UNMEASURED)).toCsv();
        assertTrue(csv.endsWith("\r\n"));
        assertEquals(csv.length() - csv.replace("\n", "").length(), csv.split("\r\n").length);
        for (String line : csv.split("\r\n")) {
            assertEquals(SpotTable.columns().size(), line.split(",", -1).length, line);
        }
    }

    @Test
    void toCsv_numbers_haveAllTheirDigits() {
        Random random = new Random(4);
        Solution big = FitSamples.solution(FitSamples.placement(FitSamples.NICKEL, random), 200, 0, random);
        List<List<String>> rows = SpotTable.of(big).rows();
        for (int i = 0; i < rows.size(); i++) {
            SpotMatch match = big.matches().get(i);
            assertEquals(
                    match.measured().position().x(),
                    Double.parseDouble(rows.get(i).get(5)));
            assertEquals(match.computed().y(), Double.parseDouble(rows.get(i).get(9)));
            assertEquals(match.residual(), Double.parseDouble(rows.get(i).get(10)));
        }
    }

    @Test
    void toCsv_otherLocale_isTheSame() {
        String expected = SpotTable.of(solution()).toCsv();
        Locale before = Locale.getDefault();
        try {
            Locale.setDefault(Locale.GERMANY);
            assertEquals(expected, SpotTable.of(solution()).toCsv());
        } finally {
            Locale.setDefault(before);
        }
    }

    /** Section 2, rules 6 and 7. */
    @Test
    void field_needsQuotes_hasThem() {
        assertEquals("plain text", SpotTable.field("plain text"));
        assertEquals("\"a,b\"", SpotTable.field("a,b"));
        assertEquals("\"a\"\"b\"", SpotTable.field("a\"b"));
        assertEquals("\"a\r\nb\"", SpotTable.field("a\r\nb"));
        assertEquals("", SpotTable.field(""));
    }

    @Test
    void of_predictedTwice_isThereOnce() {
        assertEquals(
                3,
                SpotTable.of(solution(), List.of(COMPUTED, UNMEASURED, UNMEASURED))
                        .rows()
                        .size());
    }

    @Test
    void write_isUtf8WithoutMark(@TempDir Path folder) throws IOException {
        Path file = folder.resolve("spots.csv");
        SpotTable table = SpotTable.of(solution());
        table.write(file);
        assertEquals(table.toCsv(), new String(Files.readAllBytes(file), StandardCharsets.UTF_8));
        assertEquals('k', Files.readAllBytes(file)[0]);
        assertEquals(1, folder.toFile().list().length);
        assertThrows(IOException.class, () -> table.write(folder.resolve("none").resolve("spots.csv")));
    }
}
