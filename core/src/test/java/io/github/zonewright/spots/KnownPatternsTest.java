package io.github.zonewright.spots;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.TestImages;
import io.github.zonewright.image.PixelPoint;
import java.io.IOException;
import java.nio.file.Files;
import java.util.List;
import org.junit.jupiter.api.Test;

/**
 * Two patterns simulated from physics by an independent program (testdata/patterns): quartz [2 −1 0] with sharp spots, and
 * magnesium [4 2 1], off centre, with stripes and a bloomed direct beam.
 */
class KnownPatternsTest {

    private static void assertMeasured(String file, PixelPoint centre, double centreWithin) throws IOException {
        MeasuredPattern pattern = SpotFinder.measure(TestImages.read(TestImages.testData("patterns/" + file)));
        assertEquals(0, pattern.centre().orElseThrow().position().distanceTo(centre), centreWithin);
        List<String> rows = Files.readAllLines(TestImages.testData("patterns/spots.csv")).stream()
                .filter(row -> row.startsWith(file) && row.endsWith(",1"))
                .toList();
        assertTrue(rows.size() >= 7);
        for (String row : rows) {
            String[] cells = row.split(",");
            PixelPoint truth = new PixelPoint(Double.parseDouble(cells[5]), Double.parseDouble(cells[6]));
            assertTrue(
                    pattern.spots().stream().anyMatch(spot -> spot.position().distanceTo(truth) < 2), "missed " + row);
        }
        assertTrue(pattern.spots().size() <= rows.size() + 1);
    }

    @Test
    void find_quartz_centreAndEveryVisibleSpot() throws IOException {
        assertMeasured("clean_008.tif", new PixelPoint(130.29814, 120.37717), 0.1);
    }

    @Test
    void find_bloomedMagnesium_centreAndEveryVisibleSpot() throws IOException {
        assertMeasured("typical_015.tif", new PixelPoint(151.95964, 141.86302), 0.3);
    }
}
