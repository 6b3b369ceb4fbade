package io.github.zonewright.spots;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.SyntheticPattern;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.PixelPoint;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.concurrent.Callable;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.Future;
import org.junit.jupiter.api.Test;

/** Patterns drawn from formulas, so that every answer is known. */
class SpotFinderTest {

    private static final PixelPoint CENTRE = new PixelPoint(123.4, 131.7);

    /** The nodes of a net about the centre, the centre left out, well inside the frame. */
    private static List<PixelPoint> net(double spacing, double angle, int width, int height, PixelPoint centre) {
        List<PixelPoint> nodes = new ArrayList<>();
        for (int i = -12; i <= 12; i++) {
            for (int j = -12; j <= 12; j++) {
                double u = spacing * (i + 0.3 * j);
                double v = spacing * 0.9 * j;
                double x = centre.x() + u * Math.cos(angle) - v * Math.sin(angle);
                double y = centre.y() + u * Math.sin(angle) + v * Math.cos(angle);
                if ((i != 0 || j != 0) && x > 5 && y > 5 && x < width - 5 && y < height - 5) {
                    nodes.add(new PixelPoint(x, y));
                }
            }
        }
        return nodes;
    }

    private static SyntheticPattern glowing(int width, int height, PixelPoint centre) {
        return new SyntheticPattern(width, height, 20)
                .add((x, y) -> 400 / (1 + Math.pow(Math.hypot(x - centre.x(), y - centre.y()) / 25, 2)));
    }

    private static SyntheticPattern usual(double sigma, double peak) {
        SyntheticPattern pattern = glowing(256, 256, CENTRE).spot(CENTRE.x(), CENTRE.y(), sigma, 20 * peak);
        net(40, 0.4, 256, 256, CENTRE).forEach(node -> pattern.spot(node.x(), node.y(), sigma, peak));
        return pattern;
    }

    private static void assertAllFound(List<PixelPoint> truth, MeasuredPattern pattern, double within) {
        for (PixelPoint node : truth) {
            assertTrue(
                    pattern.spots().stream().anyMatch(spot -> spot.position().distanceTo(node) < within),
                    "no spot near " + node);
        }
    }

    @Test
    void find_cleanNet_allSpotsAndNoOthers() {
        List<PixelPoint> truth = net(40, 0.4, 256, 256, CENTRE);
        MeasuredPattern pattern = SpotFinder.measure(usual(1.8, 400).floats(1));
        assertAllFound(truth, pattern, 0.3);
        assertEquals(truth.size(), pattern.spots().size());
        assertEquals(1.8, pattern.spotSigma(), 0.1);
        assertTrue(pattern.directBeam().isPresent());
        PatternCentre centre = pattern.centre().orElseThrow();
        assertEquals(PatternCentre.Source.DIRECT_BEAM, centre.source());
        assertEquals(0, centre.position().distanceTo(CENTRE), 0.05);
    }

    @Test
    void find_gaussianSpots_integratedIntensityIsTheirSum() {
        MeasuredPattern pattern = SpotFinder.measure(usual(2.2, 900).floats(2));
        double expected = 900 * 2 * Math.PI * 2.2 * 2.2;
        for (MeasuredSpot spot : pattern.spots()) {
            assertEquals(expected, spot.intensity(), 0.06 * expected);
            assertFalse(spot.saturated());
        }
    }

    @Test
    void find_manyNoisyImages_errorsCoverTheTruth() {
        int inside = 0;
        int all = 0;
        for (int seed = 0; seed < 40; seed++) {
            double sigma = 1 + 0.05 * seed;
            PixelPoint centre = new PixelPoint(90 + 0.13 * seed, 84 - 0.17 * seed);
            List<PixelPoint> truth = net(26, 0.1 * seed, 180, 170, centre);
            SyntheticPattern drawn = glowing(180, 170, centre).spot(centre.x(), centre.y(), sigma, 5000);
            for (int i = 0; i < truth.size(); i++) {
                drawn.spot(truth.get(i).x(), truth.get(i).y(), sigma, 60 * (1 + i % 7));
            }
            for (MeasuredSpot spot : SpotFinder.measure(drawn.floats(seed)).spots()) {
                for (PixelPoint node : truth) {
                    if (spot.position().distanceTo(node) < 1.5) {
                        all += 2;
                        inside += Math.abs(spot.position().x() - node.x()) < spot.positionError() ? 1 : 0;
                        inside += Math.abs(spot.position().y() - node.y()) < spot.positionError() ? 1 : 0;
                    }
                }
            }
        }
        assertTrue(all > 1000, "coordinates: " + all);
        double covered = inside / (double) all;
        assertTrue(covered > 0.60 && covered < 0.78, "covered at one standard deviation: " + covered);
    }

    @Test
    void find_discs_oneSpotEach() {
        List<PixelPoint> truth = net(48, 0.3, 300, 260, CENTRE);
        SyntheticPattern drawn = new SyntheticPattern(300, 260, 30)
                .add((x, y) -> 60 * Math.exp(-Math.hypot(x - CENTRE.x(), y - CENTRE.y()) / 80))
                .disc(CENTRE.x(), CENTRE.y(), 10, 3000);
        truth.forEach(node -> drawn.disc(node.x(), node.y(), 10, 150));
        MeasuredPattern pattern = SpotFinder.measure(drawn.floats(4));
        List<PixelPoint> inside = truth.stream()
                .filter(node -> node.x() > 15 && node.y() > 15 && node.x() < 285 && node.y() < 245)
                .toList();
        assertAllFound(inside, pattern, 1);
        assertTrue(pattern.spots().size() <= truth.size());
        assertEquals(10 / 1.177, pattern.spotSigma(), 1);
    }

    @Test
    void find_beamStop_centreFromPairsAndShadowHidden() {
        List<PixelPoint> truth = net(40, 0.4, 256, 256, CENTRE);
        SyntheticPattern drawn =
                usual(1.8, 600).times((x, y) -> y > CENTRE.y() - 12 && Math.abs(x - CENTRE.x()) < 11 ? 0.02 : 1);
        MeasuredPattern pattern = SpotFinder.measure(drawn.shorts(5, 4));
        assertEquals(0, pattern.centre().orElseThrow().position().distanceTo(CENTRE), 0.1);
        assertTrue(pattern.isHidden(new PixelPoint(CENTRE.x(), 200)));
        assertTrue(pattern.hidden().contains((int) CENTRE.x(), 230));
        assertFalse(pattern.isHidden(new PixelPoint(40, 200)));
        assertTrue(pattern.isHidden(new PixelPoint(-1, 30)), "outside the frame");
        assertTrue(pattern.directBeam().isEmpty());
        assertAllFound(
                truth.stream()
                        .filter(node -> Math.abs(node.x() - CENTRE.x()) > 22 || node.y() < CENTRE.y() - 24)
                        .toList(),
                pattern,
                0.5);
    }

    @Test
    void find_bloomedDirectBeam_centreFromPairs() {
        float[] values = usual(1.8, 500).counted(6, 10, 2);
        short[] shorts = new short[values.length];
        for (int i = 0; i < values.length; i++) {
            boolean streak = Math.abs(i % 256 - 123) <= 2 && Math.abs(i / 256 - 136) < 30;
            shorts[i] = (short) (streak ? 16383 : Math.max(0, Math.min(16383, Math.round(values[i]))));
        }
        MeasuredPattern pattern = SpotFinder.measure(GrayImage.ofUnsignedShorts(256, 256, shorts));
        assertEquals(0, pattern.centre().orElseThrow().position().distanceTo(CENTRE), 0.1);
        assertTrue(pattern.directBeam().orElseThrow().saturated());
    }

    @Test
    void find_eightBitSaturatedSpots_areFlagged() {
        MeasuredPattern pattern = SpotFinder.measure(usual(2, 1500).bytes(7, 0.3));
        assertTrue(pattern.spots().size() > 20);
        assertTrue(pattern.spots().stream().allMatch(MeasuredSpot::saturated));
        assertEquals(0, pattern.centre().orElseThrow().position().distanceTo(CENTRE), 0.1);
    }

    @Test
    void find_hotPixelsDeadRowAndMissingData_noFalseSpots() {
        float[] values = usual(1.8, 400).counted(8, 1, 0.5);
        for (int i = 0; i < 30; i++) {
            values[(i * 7919 + 1234) % values.length] = 6000;
        }
        Arrays.fill(values, 60 * 256, 61 * 256, 0);
        for (int row = 200; row < 215; row++) {
            Arrays.fill(values, row * 256 + 200, row * 256 + 215, Float.NaN);
        }
        List<PixelPoint> truth = net(40, 0.4, 256, 256, CENTRE);
        MeasuredPattern pattern = SpotFinder.measure(GrayImage.ofFloats(256, 256, values));
        for (MeasuredSpot spot : pattern.spots()) {
            assertTrue(
                    truth.stream().anyMatch(node -> node.distanceTo(spot.position()) < 2),
                    "false spot at " + spot.position());
        }
        assertTrue(pattern.spots().size() >= truth.size() - 2);
    }

    @Test
    void find_negativeValuesAndAnotherScale_sameSpots() {
        float[] values = usual(1.8, 400).counted(9, 1, 0.5);
        MeasuredPattern plain = SpotFinder.measure(GrayImage.ofFloats(256, 256, values));
        for (int i = 0; i < values.length; i++) {
            values[i] = 1e-4f * values[i] - 7;
        }
        MeasuredPattern scaled = SpotFinder.measure(GrayImage.ofFloats(256, 256, values));
        assertEquals(plain.spots().size(), scaled.spots().size());
        assertAllFound(plain.spots().stream().map(MeasuredSpot::position).toList(), scaled, 0.1);
    }

    @Test
    void find_largeImage_isBinnedAndAnswersInItsOwnPixels() {
        PixelPoint centre = new PixelPoint(1100.5, 190.25);
        SyntheticPattern drawn = glowing(2200, 400, centre).spot(centre.x(), centre.y(), 4, 5000);
        List<PixelPoint> truth = net(90, 0.2, 2200, 400, centre).stream()
                .filter(node -> node.x() > 20 && node.y() > 20 && node.x() < 2180 && node.y() < 380)
                .toList();
        truth.forEach(node -> drawn.spot(node.x(), node.y(), 4, 100));
        MeasuredPattern pattern = SpotFinder.measure(drawn.floats(10));
        assertAllFound(truth, pattern, 1);
        assertEquals(4, pattern.spotSigma(), 0.5);
        double expected = 100 * 2 * Math.PI * 16;
        assertEquals(expected, pattern.measureAt(truth.get(3)).signal(), 0.2 * expected);
        assertEquals(2200 * 400, pattern.hidden().width() * pattern.hidden().height());
    }

    @Test
    void find_nothingToSee_noSpotsAndNoException() {
        for (int[] size : new int[][] {{1, 1}, {1, 300}, {3, 2}, {17, 9}, {64, 64}, {200, 100}}) {
            int width = size[0];
            int height = size[1];
            GrayImage blank = GrayImage.ofUnsignedBytes(width, height, new byte[width * height]);
            assertTrue(SpotFinder.measure(blank).spots().isEmpty());
            float[] none = new float[width * height];
            Arrays.fill(none, Float.NaN);
            assertTrue(SpotFinder.measure(GrayImage.ofFloats(width, height, none))
                    .spots()
                    .isEmpty());
        }
    }

    @Test
    void find_noiseAlone_hardlyAnySpot() {
        int found = 0;
        for (int seed = 0; seed < 10; seed++) {
            found += SpotFinder.measure(new SyntheticPattern(256, 256, 3).floats(seed))
                    .spots()
                    .size();
        }
        assertTrue(found <= 5, "spots in ten images of noise: " + found);
    }

    @Test
    void find_twiceAndInThreads_theSame() throws Exception {
        SpotFinder finder = SpotFinder.withDefaults();
        GrayImage image = usual(1.8, 100).floats(11);
        List<MeasuredSpot> once = finder.find(image).spots();
        ExecutorService threads = Executors.newFixedThreadPool(2);
        try {
            Callable<List<MeasuredSpot>> task = () -> finder.find(image).spots();
            for (Future<List<MeasuredSpot>> again : threads.invokeAll(List.of(task, task, task))) {
                assertEquals(once, again.get());
            }
        } finally {
            threads.shutdown();
        }
    }

    @Test
    void measureAt_faintSpotAndEmptyPlace_signalAndNone() {
        PixelPoint faint = new PixelPoint(60.2, 200.9);
        SyntheticPattern drawn = usual(1.8, 400).spot(faint.x(), faint.y(), 1.8, 25);
        MeasuredPattern pattern = SpotFinder.measure(drawn.floats(12));
        double expected = 25 * 2 * Math.PI * 1.8 * 1.8;
        SpotResponse answer = pattern.measureAt(faint);
        assertEquals(expected, answer.signal(), 4 * answer.noise());
        assertTrue(answer.signalToNoise() > 3);
        assertTrue(answer.noise() > 0);
        SpotResponse empty = pattern.measureAt(new PixelPoint(30, 30));
        assertEquals(0, empty.signal(), 4 * empty.noise());
        assertEquals(20, pattern.backgroundAt(new PixelPoint(10, 10)), 20);
    }

    @Test
    void withMinimumSignalToNoise_higher_fewerSpots() {
        GrayImage image = usual(1.8, 40).floats(13);
        int many = SpotFinder.measure(image).spots().size();
        List<MeasuredSpot> few = SpotFinder.withDefaults()
                .withMinimumSignalToNoise(15)
                .find(image)
                .spots();
        assertTrue(few.size() < many);
        assertTrue(few.stream().allMatch(spot -> spot.signalToNoise() > 15));
    }

    @Test
    void withSpotSigma_given_isUsed() {
        assertEquals(
                3,
                SpotFinder.withDefaults()
                        .withSpotSigma(3)
                        .find(usual(1.8, 400).floats(14))
                        .spotSigma());
    }

    @Test
    void settings_outOfRange_areRefused() {
        SpotFinder finder = SpotFinder.withDefaults();
        assertThrows(IllegalArgumentException.class, () -> finder.withMinimumSignalToNoise(1));
        assertThrows(IllegalArgumentException.class, () -> finder.withMinimumSignalToNoise(Double.NaN));
        assertThrows(IllegalArgumentException.class, () -> finder.withSpotSigma(0.1));
        assertThrows(IllegalArgumentException.class, () -> finder.withSpotSigma(100));
    }

    @Test
    void results_badNumbers_areRefused() {
        PixelPoint place = new PixelPoint(1, 2);
        assertThrows(IllegalArgumentException.class, () -> new MeasuredSpot(place, 0, 1, 1, false));
        assertThrows(IllegalArgumentException.class, () -> new MeasuredSpot(place, 1, Double.NaN, 1, false));
        assertThrows(
                IllegalArgumentException.class, () -> new PatternCentre(place, -1, PatternCentre.Source.BACKGROUND));
        PatternCentre centre = new PatternCentre(place, 1, PatternCentre.Source.BACKGROUND);
        assertThrows(IllegalArgumentException.class, () -> new CentreCandidate(centre, Double.NaN));
        assertEquals(0, new SpotResponse(0, 0).signalToNoise());
    }
}
