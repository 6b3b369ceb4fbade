package io.github.zonewright.image;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.SyntheticPattern;
import java.util.Arrays;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;

class LevelsTest {

    private static Mask none(GrayImage image) {
        return Mask.none(image.width(), image.height());
    }

    private static float[] normal(int count, double mean, double deviation, long seed) {
        Random random = new Random(seed);
        float[] values = new float[count];
        for (int i = 0; i < count; i++) {
            values[i] = (float) (mean + deviation * random.nextGaussian());
        }
        return values;
    }

    @Test
    void clippedMoments_tenthOutliers_setAside() {
        float[] values = normal(2000, 50, 4, 3);
        for (int i = 0; i < 200; i++) {
            values[i * 10] = 500;
        }
        ClippedMoments moments = ClippedMoments.of(values, values.length);
        assertEquals(50, moments.mean(), 0.4);
        assertEquals(4, moments.deviation(), 0.4);
    }

    @Test
    void clippedMoments_allAlike_noScatter() {
        assertEquals(new ClippedMoments(3, 0), ClippedMoments.of(new float[] {3, 3, 3, 3}, 4));
    }

    @Test
    void clippedMoments_mostlyZero_keepsItsScatter() {
        float[] counts = new float[100];
        for (int i = 0; i < 40; i++) {
            counts[i] = 1;
        }
        assertEquals(0.4, ClippedMoments.of(counts, 100).mean(), 1e-6);
    }

    @Test
    void background_slopeWithSpots_isFound() {
        SyntheticPattern pattern = new SyntheticPattern(240, 160, 100).add((x, y) -> 0.5 * x);
        for (int i = 0; i < 15; i++) {
            pattern.spot(10 + 15 * i, 20 + 9 * i, 2, 2000);
        }
        GrayImage image = pattern.floats(11);
        Background background = Background.of(image, 20, none(image));
        assertEquals(160, background.level().at(120, 30), 4);
        assertEquals(Math.sqrt(160), background.noise().at(120, 30), 2.5);
        assertEquals(120, background.level().at(40, 130), 4);
    }

    @Test
    void background_excludedAndMissing_areLeftOut() {
        float[] values = normal(64 * 64, 10, 1, 5);
        for (int i = 0; i < 64 * 64; i++) {
            values[i] = i % 64 < 32 ? 1000 : i / 64 < 20 ? Float.NaN : values[i];
        }
        GrayImage image = GrayImage.ofFloats(64, 64, values);
        Background background = Background.of(image, 16, Mask.of(64, 64, i -> i % 64 < 32));
        assertEquals(10, background.level().at(5, 5), 1, "filled from the cells that have data");
    }

    @Test
    void background_noDataAtAll_isZero() {
        GrayImage image = GrayImage.ofFloats(2, 1, new float[] {Float.NaN, Float.NaN});
        assertEquals(0, Background.of(image, 8, none(image)).level().at(1, 0.5));
        assertThrows(IllegalArgumentException.class, () -> Background.of(image, 3, none(image)));
    }

    @Test
    void levelMap_plane_isExactBetweenTheCentres() {
        LevelMap map = new LevelMap(30, 20, 10, 3, 2, new double[] {0, 10, 20, 100, 110, 120});
        assertEquals(10, map.at(15, 5));
        assertEquals(60, map.at(15, 10));
        assertEquals(0, map.at(-3, 0), "even beyond the outermost centres");
        assertEquals(120, map.at(30, 20));
    }

    @Test
    void levelMap_subtracted_leavesWhatIsAbove() {
        LevelMap map = new LevelMap(30, 20, 10, 3, 2, new double[] {0, 10, 20, 100, 110, 120});
        float[] values = new float[600];
        for (int i = 0; i < 600; i++) {
            values[i] = (float) map.at(i % 30 + 0.5, i / 30 + 0.5) + 3;
        }
        values[7] = Float.NaN;
        float[] rest = map.subtractedFrom(GrayImage.ofFloats(30, 20, values)).values();
        for (int i = 0; i < 600; i++) {
            assertEquals(i == 7 ? 0 : 3, rest[i], 1e-4);
        }
    }

    @Test
    void levelMap_changes_areCellByCell() {
        LevelMap map = new LevelMap(20, 10, 10, 2, 1, new double[] {1, 5});
        assertEquals(2, map.atLeast(2).level(0, 0));
        assertEquals(5, map.atLeast(2).level(1, 0));
        assertEquals(10, map.times(2).level(1, 0));
        assertEquals(3, map.atMost(map.times(0).atLeast(3)).level(1, 0));
        assertEquals(5, map.shrunk(2).at(7.5, 2), "centre of the second cell of the binned image");
    }

    @Test
    void levelMap_oneOddCell_isSmoothedAway() {
        double[] levels = {1, 1, 1, 1, 50, 1, 1, 1, 1};
        assertEquals(1, new LevelMap(30, 30, 10, 3, 3, levels).smoothed().level(1, 1));
    }

    @Test
    void pixelNoise_spotsAndSlope_hardlyCount() {
        SyntheticPattern pattern = new SyntheticPattern(128, 128, 400).add((x, y) -> 2 * x);
        for (int i = 0; i < 16; i++) {
            pattern.spot(16 + 32 * (i % 4), 16 + 32 * (i / 4), 3, 300);
        }
        LevelMap noise =
                PixelNoise.of(pattern.floats(2), 32, Mask.none(128, 128)).smoothed();
        assertEquals(Math.sqrt(528), noise.at(64, 64), 3.5);
    }

    @Test
    void mask_dilated_isASquareAndStaysInside() {
        Mask mask = Mask.of(10, 8, i -> i == 8 + 10 * 3);
        Mask wide = mask.dilated(2);
        assertEquals(4 * 5, wide.count());
        assertTrue(wide.contains(6, 1) && wide.contains(9, 5) && !wide.contains(5, 3) && !wide.contains(10, 3));
        assertEquals(79, mask.inverted().count());
        assertEquals(20, mask.union(wide).count());
        assertTrue(mask.contains(new PixelPoint(8.99, 3)));
        assertThrows(IllegalArgumentException.class, () -> mask.dilated(-1));
        assertThrows(IllegalArgumentException.class, () -> mask.union(Mask.none(8, 10)));
        assertThrows(IllegalArgumentException.class, () -> Mask.none(0, 1));
    }

    @Test
    void mask_around_isTheDiscsCutAtTheFrame() {
        List<PixelPoint> points = List.of(new PixelPoint(3.2, 4.9), new PixelPoint(19.6, 0.3), new PixelPoint(-1, 14));
        for (double reach : new double[] {0.4, 1, 2.7, 6}) {
            Mask around = Mask.around(20, 15, points, reach);
            Mask direct = Mask.of(
                    20,
                    15,
                    i -> points.stream()
                            .anyMatch(p -> p.distanceTo(new PixelPoint(i % 20 + 0.5, i / 20 + 0.5)) <= reach));
            assertArrayEquals(direct.members().toArray(), around.members().toArray());
        }
    }

    @Test
    void mask_enlarged_lastGroupTakesWhatIsLeftOver() {
        Mask mask = Mask.of(3, 2, i -> i == 1 || i == 5);
        Mask large = mask.enlarged(4, 14, 9);
        assertEquals(16 + 6 * 5, large.count());
        assertTrue(large.contains(4, 0) && large.contains(7, 3) && large.contains(13, 8));
        assertFalse(large.contains(8, 0) || large.contains(7, 4));
        assertThrows(IllegalArgumentException.class, () -> mask.enlarged(0, 14, 9));
    }

    @Test
    void mask_atLeast_leavesMissingDataOut() {
        GrayImage image = GrayImage.ofFloats(4, 1, new float[] {1, 5, Float.NaN, 7});
        assertArrayEquals(new int[] {1, 3}, Mask.atLeast(image, 5).members().toArray());
    }

    @Test
    void quantile_anyRank_isThatOfTheSortedSample() {
        Random random = new Random(5);
        for (int round = 0; round < 200; round++) {
            float[] values = new float[1 + random.nextInt(90)];
            for (int i = 0; i < values.length; i++) {
                values[i] = round % 2 == 0 ? (float) random.nextGaussian() : random.nextInt(5) - 2;
            }
            float[] sorted = values.clone();
            Arrays.sort(sorted);
            int rank = random.nextInt(values.length);
            assertEquals(sorted[rank], Quantile.select(values, 0, values.length, rank));
            for (int i = 0; i < values.length; i++) {
                assertTrue(i < rank ? values[i] <= sorted[rank] : values[i] >= sorted[rank]);
            }
        }
    }

    @Test
    void background_thinned_seesTheSameNoise() {
        GrayImage image = GrayImage.ofFloats(320, 320, normal(320 * 320, 10, 2, 9));
        Background all = Background.unsmoothed(image, 16, none(image));
        Background some = Background.thinned(image, 16, none(image), 2);
        assertEquals(all.noise().level(4, 6), some.noise().level(4, 6));
        assertEquals(2, some.noise().level(5, 7), 0.5);
    }

    @Test
    void pixelPoint_arithmetic_inPixels() {
        PixelPoint point = new PixelPoint(3, 4);
        assertEquals(5, point.distanceTo(new PixelPoint(0, 0)));
        assertEquals(new PixelPoint(2, 2.5), point.midpoint(new PixelPoint(1, 1)));
        assertEquals(point, new PixelPoint(1, 1).plus(point.minus(new PixelPoint(1, 1))));
        assertThrows(IllegalArgumentException.class, () -> new PixelPoint(Double.NaN, 0));
    }
}
