package io.github.zonewright.spots;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.image.PixelPoint;
import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;

/** Two spots that run into each other are two, and one is one; on images drawn and made noisy by code of the tests' own. */
class OverlappingSpotsTest {

    private static final int SIDE = 300;
    private static final int IMAGES = 4;

    /** What a net of spots, of which every third is two, comes to. */
    private static final class Outcome {
        int pairs;
        int parted;
        int lone;
        int loneParted;
        int coordinates;
        int covered;

        @Override
        public String toString() {
            return parted + " of " + pairs + " pairs parted, " + loneParted + " of " + lone + " lone spots, covered "
                    + covered + " of " + coordinates;
        }
    }

    private static double distance(MeasuredSpot spot, double[] truth) {
        return spot.position().distanceTo(new PixelPoint(truth[0], truth[1]));
    }

    /** Nets of spots with pairs so many widths apart; heights scatter by a factor of 1.5, the second has a part of the first's. */
    private static Outcome measured(DrawnSpots.Form form, double sigma, double height, double apart, double part) {
        Outcome outcome = new Outcome();
        for (int seed = 0; seed < IMAGES; seed++) {
            Random random = new Random(31 * seed + 7);
            double centreX = SIDE / 2.0 + random.nextDouble();
            double centreY = SIDE / 2.0 + random.nextDouble();
            double step = Math.max(40, 8 * sigma);
            double turn = 3 * random.nextDouble();
            DrawnSpots drawn = new DrawnSpots(SIDE, 20).glow(centreX, centreY, 150, 50);
            List<double[]> lone = new ArrayList<>();
            List<double[][]> pairs = new ArrayList<>();
            double reach = 5.5 * sigma;
            drawn.spot(form, reach, centreX, centreY, 8 * height);
            for (int i = -5; i <= 5; i++) {
                for (int j = -5; j <= 5; j++) {
                    double x = centreX + step * (i * Math.cos(turn) - j * Math.sin(turn));
                    double y = centreY + step * (i * Math.sin(turn) + j * Math.cos(turn));
                    double margin = (4 + apart) * sigma + 2;
                    if (Math.min(x, y) < margin || Math.max(x, y) > SIDE - margin || i == 0 && j == 0) {
                        continue;
                    }
                    double here = height * Math.exp(0.4 * random.nextGaussian());
                    drawn.spot(form, reach, x, y, here);
                    if (apart > 0 && (i + 2 * j) % 3 == 0) {
                        double azimuth = 2 * Math.PI * random.nextDouble();
                        double[] other = {x + apart * sigma * Math.cos(azimuth), y + apart * sigma * Math.sin(azimuth)};
                        drawn.spot(form, reach, other[0], other[1], part * here);
                        pairs.add(new double[][] {{x, y}, other});
                    } else {
                        lone.add(new double[] {x, y});
                    }
                }
            }
            count(outcome, SpotFinder.measure(drawn.image(seed, 1.7, 2, 65535)).spots(), sigma, lone, pairs);
        }
        return outcome;
    }

    private static void count(
            Outcome outcome, List<MeasuredSpot> spots, double sigma, List<double[]> lone, List<double[][]> pairs) {
        for (double[] truth : lone) {
            outcome.lone++;
            outcome.loneParted += spots.stream()
                                    .filter(spot -> distance(spot, truth) < 3 * sigma)
                                    .count()
                            > 1
                    ? 1
                    : 0;
        }
        for (double[][] pair : pairs) {
            outcome.pairs++;
            List<MeasuredSpot> near = spots.stream()
                    .filter(spot -> Math.min(distance(spot, pair[0]), distance(spot, pair[1])) < sigma)
                    .toList();
            if (near.size() != 2) {
                continue;
            }
            outcome.parted++;
            boolean inOrder = distance(near.get(0), pair[0]) + distance(near.get(1), pair[1])
                    < distance(near.get(1), pair[0]) + distance(near.get(0), pair[1]);
            for (int k = 0; k < 2; k++) {
                MeasuredSpot spot = near.get(inOrder ? k : 1 - k);
                double error = spot.positionError();
                outcome.coordinates += 2;
                outcome.covered += Math.abs(spot.position().x() - pair[k][0]) < error ? 1 : 0;
                outcome.covered += Math.abs(spot.position().y() - pair[k][1]) < error ? 1 : 0;
            }
        }
    }

    private static void assertParted(
            double least, DrawnSpots.Form form, double sigma, double height, double... aparts) {
        int covered = 0;
        int coordinates = 0;
        for (double apart : aparts) {
            Outcome outcome = measured(form, sigma, height, apart, 1);
            String what = apart + " widths apart: " + outcome;
            assertTrue(outcome.parted >= least * outcome.pairs, what);
            assertEquals(0, outcome.loneParted, what);
            covered += outcome.covered;
            coordinates += outcome.coordinates;
        }
        double share = covered / (double) coordinates;
        assertTrue(share > 0.60 && share < 0.80, "covered " + share + " of " + coordinates);
    }

    @Test
    void measure_clearPairs_arePartedWithErrorsThatCoverTheTruth() {
        // the signal to noise of each spot is near 200
        assertParted(0.9, DrawnSpots.gaussian(2), 2, 500, 1.7, 2, 2.5, 3, 3.5, 4);
        assertParted(0.75, DrawnSpots.gaussian(2), 2, 500, 1.4, 1.5);
    }

    @Test
    void measure_strongPairs_arePartedDownToOnePointThreeWidths() {
        assertParted(0.9, DrawnSpots.gaussian(2.5), 2.5, 4000, 1.3, 1.5);
    }

    @Test
    void measure_overlappingDiscs_areParted() {
        assertParted(0.9, DrawnSpots.disc(7, 2), 7 / 1.1774, 100, 1.3, 1.7, 2, 2.5, 3, 4);
    }

    @Test
    void measure_unequalPairs_areParted() {
        for (double apart : new double[] {1.7, 2, 2.5, 3, 3.5}) {
            Outcome outcome = measured(DrawnSpots.gaussian(2), 2, 1000, apart, 0.3);
            assertTrue(outcome.parted >= 0.85 * outcome.pairs, apart + " widths apart: " + outcome);
            assertEquals(0, outcome.loneParted, outcome.toString());
        }
    }

    @Test
    void measure_faintPairs_areNotPartedByGuess() {
        for (double apart : new double[] {0.8, 1.2}) {
            Outcome outcome = measured(DrawnSpots.gaussian(2), 2, 60, apart, 1);
            assertTrue(outcome.parted <= 0.02 * outcome.pairs, outcome.toString());
        }
    }

    @Test
    void measure_intensitiesOfAPair_areTheirSums() {
        DrawnSpots drawn = new DrawnSpots(SIDE, 20);
        for (int i = 0; i < 25; i++) {
            drawn.spot(DrawnSpots.gaussian(2), 12, 50.3 + 50 * (i % 5), 50.7 + 50 * (i / 5), 600);
        }
        drawn.spot(DrawnSpots.gaussian(2), 12, 150.3, 150.7, 5000);
        drawn.spot(DrawnSpots.gaussian(2), 12, 103.3, 100.7, 400);
        List<MeasuredSpot> pair = SpotFinder.measure(drawn.image(3, 1, 1, 65535)).spots().stream()
                .filter(spot -> distance(spot, new double[] {102, 100.7}) < 5)
                .toList();
        assertEquals(2, pair.size());
        assertEquals(600 * 2 * Math.PI * 4, pair.get(0).intensity(), 0.12 * 600 * 2 * Math.PI * 4);
        assertEquals(400 * 2 * Math.PI * 4, pair.get(1).intensity(), 0.15 * 400 * 2 * Math.PI * 4);
    }

    @Test
    void measure_loneSpotsOfManyShapes_stayOne() {
        DrawnSpots.Form longer = (dx, dy) -> Math.exp(-(dx * dx / 9 + dy * dy / 4) / 2);
        DrawnSpots.Form tailed = (dx, dy) -> 1 / Math.pow(1 + (dx * dx + dy * dy) / 8, 2);
        DrawnSpots.Form ring = (dx, dy) -> {
            double r = Math.hypot(dx, dy);
            return Math.max(0, Math.min(1, 0.5 + (7 - r) / 2)) * (0.6 + 0.4 * r * r / 49);
        };
        for (double height : new double[] {100, 3000}) {
            assertEquals(0, measured(DrawnSpots.gaussian(1), 1, height, 0, 0).loneParted);
            assertEquals(0, measured(DrawnSpots.gaussian(3), 3, height, 0, 0).loneParted);
            assertEquals(0, measured(DrawnSpots.disc(5, 1), 4.2, height, 0, 0).loneParted);
            assertEquals(0, measured(DrawnSpots.disc(10, 2), 8.5, height, 0, 0).loneParted);
            assertEquals(0, measured(longer, 2.5, height, 0, 0).loneParted, "longer along x");
            assertEquals(0, measured(tailed, 2, height, 0, 0).loneParted, "with tails");
            assertEquals(0, measured(ring, 6, height, 0, 0).loneParted, "darker in the middle");
        }
    }

    /** Overexposed spots have flat tops, and some bloom into their columns. */
    @Test
    void measure_overexposedSpots_stayOne() {
        for (int seed = 0; seed < IMAGES; seed++) {
            Random random = new Random(seed);
            DrawnSpots drawn = new DrawnSpots(SIDE, 20).glow(150, 150, 300, 60);
            for (int i = 0; i < 36; i++) {
                double x = 25.3 + 50 * (i % 6) + random.nextDouble();
                double y = 25.7 + 50 * (i / 6) + random.nextDouble();
                double height = 500 * Math.exp(2.5 * random.nextGaussian());
                drawn.spot(DrawnSpots.gaussian(2.2), 16, x, y, height);
                for (int row = (int) y - 12; row < y + 12 && height > 8000; row++) {
                    drawn.mean[row * SIDE + (int) x] += 20_000;
                }
            }
            List<MeasuredSpot> spots =
                    SpotFinder.measure(drawn.image(seed, 1.5, 2, 4095)).spots();
            for (MeasuredSpot spot : spots) {
                assertTrue(
                        spots.stream()
                                .allMatch(other ->
                                        other == spot || other.position().distanceTo(spot.position()) > 20),
                        "image " + seed + ": " + spot);
            }
        }
    }
}
