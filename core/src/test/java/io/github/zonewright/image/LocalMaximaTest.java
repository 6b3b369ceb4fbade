package io.github.zonewright.image;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertSame;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.Comparator;
import java.util.Random;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;

/** Local maxima and what is continued into unseen pixels, against the definitions written out. */
class LocalMaximaTest {

    private static final int WIDTH = 61;
    private static final int HEIGHT = 47;

    /** Whole numbers, so that neighbours are often alike; some below zero. */
    private static float[] numbers() {
        Random random = new Random(11);
        float[] values = new float[WIDTH * HEIGHT];
        for (int i = 0; i < values.length; i++) {
            values[i] = random.nextInt(40) - 10;
        }
        return values;
    }

    private static boolean isMaximum(float[] values, int index) {
        for (int other = 0; other < values.length; other++) {
            boolean beside =
                    Math.abs(other % WIDTH - index % WIDTH) <= 1 && Math.abs(other / WIDTH - index / WIDTH) <= 1;
            if (beside
                    && other != index
                    && (other < index ? values[other] >= values[index] : values[other] > values[index])) {
                return false;
            }
        }
        return true;
    }

    @Test
    void above_aLevel_areAllMaximaThatReachItTheHighestFirst() {
        float[] values = numbers();
        GrayImage image = GrayImage.ofFloats(WIDTH, HEIGHT, values);
        LevelMap level = new LevelMap(
                WIDTH,
                HEIGHT,
                16,
                4,
                3,
                IntStream.range(0, 12).mapToDouble(i -> i - 3).toArray());
        int[] found = LocalMaxima.above(image, level, 2);
        for (int index : found) {
            assertTrue(isMaximum(values, index));
            assertTrue(LocalMaxima.isAt(image, index % WIDTH, index / WIDTH));
        }
        int[] wanted = IntStream.range(0, values.length)
                .filter(i -> isMaximum(values, i) && values[i] >= 2 * level.at(i % WIDTH + 0.5, i / WIDTH + 0.5))
                .toArray();
        assertTrue(wanted.length > 50);
        int[] sorted = found.clone();
        Arrays.sort(sorted);
        assertTrue(Arrays.stream(wanted).allMatch(index -> Arrays.binarySearch(sorted, index) >= 0));
        int[] inOrder = Arrays.stream(sorted)
                .boxed()
                .sorted(Comparator.comparing(index -> -values[index]))
                .mapToInt(index -> index)
                .toArray();
        assertArrayEquals(inOrder, found);
        assertFalse(LocalMaxima.isAt(GrayImage.ofFloats(3, 1, new float[] {1, 2, 3}), 1, 0));
    }

    @Test
    void levelMap_leastAroundAndLeastRatio_boundTheMap() {
        double[] levels = {4, 2, 8, 6, 5, 3, 9, 1, 7, 2, 2, 2};
        LevelMap map = new LevelMap(64, 48, 16, 4, 3, levels);
        assertEquals(2, map.leastAround(0, 0));
        assertEquals(1, map.leastAround(2, 1));
        assertEquals(0.5, map.leastRatioTo(map.times(2)), 1e-12);
        assertEquals(0.25, map.leastRatioTo(map.atLeast(4)), 1e-12);
    }

    @Test
    void mask_shrunk_holdsTheGroupsWithAMember() {
        Mask mask = Mask.of(7, 5, i -> i == 0 || i == 2 * 7 + 3 || i == 6 || i == 4 * 7 + 2);
        Mask small = mask.shrunk(2);
        assertEquals(3, small.width());
        assertEquals(2, small.height());
        assertArrayEquals(new int[] {0, 4}, small.members().toArray());
        assertThrows(IllegalArgumentException.class, () -> mask.shrunk(6));
    }

    @Test
    void continuation_ofUnseenPixels_isTheMeanAroundWeighedByAGaussian() {
        float[] values = numbers();
        GrayImage image = GrayImage.ofFloats(WIDTH, HEIGHT, values);
        Mask unseen = Mask.of(WIDTH, HEIGHT, i -> Math.hypot(i % WIDTH - 50, i / WIDTH - 20) < 4 || i == 3);
        double sigma = 3;
        GrayImage continued = Continuation.of(image, unseen, sigma);
        for (int i = 0; i < values.length; i++) {
            if (!unseen.contains(i % WIDTH, i / WIDTH)) {
                assertEquals(values[i], continued.value(i % WIDTH, i / WIDTH));
                continue;
            }
            double sum = 0;
            double weights = 0;
            for (int k = 0; k < values.length; k++) {
                double dx = k % WIDTH - i % WIDTH;
                double dy = k / WIDTH - i / WIDTH;
                boolean near = Math.max(Math.abs(dx), Math.abs(dy)) <= 3.5 * sigma + 1;
                if (near && !unseen.contains(k % WIDTH, k / WIDTH)) {
                    double weight = Math.exp(-0.5 * (dx * dx + dy * dy) / (sigma * sigma));
                    sum += weight * values[k];
                    weights += weight;
                }
            }
            assertEquals(sum / weights, continued.value(i % WIDTH, i / WIDTH), 0.05);
        }
        assertSame(image, Continuation.of(image, Mask.none(WIDTH, HEIGHT), sigma));
    }

    @Test
    void pixelNoise_rough_agreesWithTheOtherWithinItsScatter() {
        Random random = new Random(4);
        float[] values = new float[320 * 320];
        for (int i = 0; i < values.length; i++) {
            values[i] = (float) (100 + 6 * random.nextGaussian());
        }
        GrayImage image = GrayImage.ofFloats(320, 320, values);
        double mean = 0;
        LevelMap rough = PixelNoise.rough(image, 16, Mask.none(320, 320));
        for (int i = 0; i < 400; i++) {
            mean += rough.level(i % 20, i / 20) / 400;
        }
        // 400 cells of at least 36 samples: 6/√(2·36·400) = 0.035 is one standard deviation.
        assertEquals(6, mean, 0.12);
    }
}
