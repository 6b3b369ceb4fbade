package io.github.zonewright.spots;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.SyntheticPattern;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelPoint;
import java.util.List;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;

/** What looks like a spot and is none, and what is one though it hardly looks it; on drawn images whose truth is known. */
class FalseSpotsTest {

    private static final int SIDE = 200;

    /** A glow of the given height about the middle, with a faint spot on its flank. */
    private static SyntheticPattern glow(double height) {
        return new SyntheticPattern(SIDE, SIDE, 30).add((x, y) -> height / (1 + radius2(x, y) / 100));
    }

    private static double radius2(double x, double y) {
        return Math.pow(x - 100, 2) + Math.pow(y - 100, 2);
    }

    private static LocalGround ground(GrayImage image) {
        return new LocalGround(image, Mask.none(SIDE, SIDE), 2);
    }

    private static PeakSearch.Peak peak(double x, double y) {
        return new PeakSearch.Peak(x, y, 10, 1, 1, 1);
    }

    @Test
    void localGround_shoulderOfTheGlow_doesNotStand() {
        int stood = 0;
        for (int seed = 0; seed < 20; seed++) {
            GrayImage image = glow(3000).floats(seed);
            stood += ground(image).standing(List.of(peak(114.5, 100.5)), 5).size();
        }
        assertTrue(stood <= 1, stood + " of 20 shoulders stand out");
    }

    @Test
    void localGround_spotOnTheGlow_stands() {
        int stood = 0;
        for (int seed = 0; seed < 20; seed++) {
            // the glow is 967 + 30 there, so that a height of 120 has a signal to noise of 120 σ √π / √997 = 13
            GrayImage image = glow(3000).spot(114.5, 100.5, 2, 120).floats(seed);
            stood += ground(image).standing(List.of(peak(114.5, 100.5)), 5).size();
        }
        assertTrue(stood >= 18, "only " + stood + " of 20 spots stand out");
    }

    @Test
    void localGround_besideAHigherPeak_isBelieved() {
        GrayImage image = glow(3000).spot(50, 50, 2, 5000).floats(3);
        List<PeakSearch.Peak> both = List.of(new PeakSearch.Peak(50, 50, 900, 1, 1, 1), peak(58, 50));
        assertEquals(2, ground(image).standing(both, 5).size());
        assertEquals(
                1,
                ground(image).standing(List.of(both.get(0), peak(50, 150)), 5).size());
    }

    /** Where a noisy glow reaches the detector's limit, pixels at the limit meet by chance. */
    @Test
    void find_glowAtTheLimit_isNoSpot() {
        SyntheticPattern drawn = new SyntheticPattern(SIDE, SIDE, 20)
                .add((x, y) -> 180 * Math.exp(-0.5 * Math.pow((Math.sqrt(radius2(x, y)) - 40) / 10, 2)));
        for (int k = 0; k < 6; k++) {
            drawn.spot(100 + 80 * Math.cos(k), 100 + 80 * Math.sin(k), 1.5, 300);
        }
        GrayImage image = drawn.shorts(4, 300);
        assertTrue(IntStream.range(0, SIDE)
                .anyMatch(i -> image.value(i, 100) == 65535 && Math.abs(Math.abs(i - 100) - 40) < 12));
        List<MeasuredSpot> spots = SpotFinder.measure(image).spots();
        assertTrue(spots.stream()
                .noneMatch(spot -> radius2(spot.position().x(), spot.position().y()) < 60 * 60));
        assertEquals(6, spots.size());
    }

    /** A disc above which the streak of a bloomed beam ends in single columns is a disc all the same. */
    @Test
    void find_discBesideTheStreak_isFoundInPlace() {
        SyntheticPattern drawn = new SyntheticPattern(256, 256, 40).disc(128, 128, 8, 60_000);
        for (int h = -2; h <= 2; h++) {
            for (int k = -2; k <= 2; k++) {
                if (h != 0 || k != 0) {
                    drawn.disc(128 + 48 * h, 128 + 48 * k, 8, 300);
                }
            }
        }
        float[] values = drawn.counted(5, 1, 1);
        short[] shorts = new short[values.length];
        for (int i = 0; i < values.length; i++) {
            int column = i % 256;
            boolean streak = Math.abs(column - 128) < 6 && Math.abs(i / 256 - 128) < 43 - 5 * (column % 3);
            shorts[i] = (short) (streak ? 16383 : Math.max(0, Math.min(16383, Math.round(values[i]))));
        }
        MeasuredPattern pattern = SpotFinder.measure(GrayImage.ofUnsignedShorts(256, 256, shorts));
        for (double y : new double[] {80, 176}) {
            PixelPoint truth = new PixelPoint(128, y);
            MeasuredSpot nearest = pattern.spots().stream()
                    .filter(spot -> spot.position().distanceTo(truth) < 4)
                    .findFirst()
                    .orElseThrow();
            assertTrue(nearest.position().distanceTo(truth) < 3 * nearest.positionError());
        }
        assertEquals(24, pattern.spots().size());
        assertTrue(
                pattern.spots().stream().anyMatch(spot -> spot.position().distanceTo(new PixelPoint(80, 128)) < 0.2),
                "its neighbours are not drawn to the beam");
        assertFalse(pattern.hidden().contains(128, 100));
    }

    /** A column of the detector that always counts to its limit is mended and is neither a bloomed beam nor a spot. */
    @Test
    void find_hotColumn_isNoSpotAndHidesNone() {
        DrawnSpots drawn = new DrawnSpots(SIDE, 20).glow(104, 94, 200, 24);
        for (int k = 0; k < 49; k++) {
            drawn.spot(DrawnSpots.gaussian(1.5), 9, 20.3 + 27 * (k % 7), 12.7 + 27 * (k / 7), k == 24 ? 4000 : 200);
        }
        for (int row = 0; row < SIDE; row++) {
            drawn.mean[row * SIDE + 49] = 100_000;
        }
        List<MeasuredSpot> spots =
                SpotFinder.measure(drawn.image(5, 1.5, 2, 65535)).spots();
        assertEquals(48, spots.size());
        assertTrue(spots.stream().noneMatch(MeasuredSpot::saturated));
    }
}
