package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;

import io.github.zonewright.image.PixelPoint;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.Test;

class RotationBoundTest {

    /** Without background σ/√N, as for the mean of N photons; faint on a background √2·σ over the matched filter's ratio. */
    @Test
    void information_limits_ofTheTextbooks() {
        double sigma = 2;
        double counts = 2 * Math.PI * sigma * sigma * 1000;
        assertEquals(counts / 4, RotationBound.information(1000, Math.sqrt(counts), sigma), counts / 4 * 1e-4);
        double faint = 5;
        assertEquals(
                faint * faint / (2 * sigma * sigma), RotationBound.information(0.1, faint * 0.05, sigma) * 400, 0.05);
    }

    /** Spots of one information w on a circle of radius r about a known centre of gravity: 1/(r·√(n·w)). */
    @Test
    void degrees_ring_byHand() {
        List<Map<String, String>> spots = new ArrayList<>();
        double counts = 2 * Math.PI * 4 * 1000;
        for (int i = 0; i < 24; i++) {
            spots.add(Map.of(
                    "visible",
                    "1",
                    "grain",
                    "1",
                    "x",
                    "" + (250 + 100 * Math.cos(i * Math.PI / 12)),
                    "y",
                    "" + (250 + 100 * Math.sin(i * Math.PI / 12)),
                    "peak_e",
                    "1000",
                    "snr",
                    "" + Math.sqrt(counts)));
        }
        double expected = Math.toDegrees(1 / (100 * Math.sqrt(24 * counts / 4)));
        assertEquals(expected, RotationBound.degrees(spots, new PixelPoint(250, 250), 2), expected * 1e-3);
    }
}
