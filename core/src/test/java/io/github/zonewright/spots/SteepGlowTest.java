package io.github.zonewright.spots;

import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.image.PixelPoint;
import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;

/** Discs on the flank of a steep glow about a strong direct beam, drawn by code of the tests' own, are where they are. */
class SteepGlowTest {

    private static final int SIDE = 400;
    private static final int IMAGES = 12;
    private static final double[] DISTANCES = {6.5, 9, 12, 15};

    private static void assertUnbiased(double radius, double height, double glow, double reach) {
        double width = radius / 1.1774;
        DrawnSpots.Form disc = DrawnSpots.disc(radius, 2);
        double[] outwards = new double[DISTANCES.length];
        int covered = 0;
        int found = 0;
        for (int seed = 0; seed < IMAGES; seed++) {
            Random random = new Random(seed);
            double x0 = SIDE / 2.0 + random.nextDouble();
            double y0 = SIDE / 2.0 + random.nextDouble();
            DrawnSpots drawn =
                    new DrawnSpots(SIDE, 20).glow(x0, y0, glow, reach).spot(disc, radius + 3, x0, y0, 20 * height);
            double first = 2 * Math.PI * random.nextDouble();
            List<double[]> truth = new ArrayList<>();
            for (int k = 0; k < 2 * DISTANCES.length; k++) {
                double azimuth = first + 2.2 * (k / 2) + Math.PI * (k % 2);
                double x = x0 + DISTANCES[k / 2] * width * Math.cos(azimuth);
                double y = y0 + DISTANCES[k / 2] * width * Math.sin(azimuth);
                drawn.spot(disc, radius + 3, x, y, height);
                truth.add(new double[] {x, y, azimuth});
            }
            MeasuredPattern pattern = SpotFinder.measure(drawn.image(seed, 1.5, 2, 65535));
            for (int k = 0; k < truth.size(); k++) {
                double[] disc0 = truth.get(k);
                for (MeasuredSpot spot : pattern.spots()) {
                    double dx = spot.position().x() - disc0[0];
                    double dy = spot.position().y() - disc0[1];
                    if (spot.position().distanceTo(new PixelPoint(disc0[0], disc0[1])) < width) {
                        outwards[k / 2] += (dx * Math.cos(disc0[2]) + dy * Math.sin(disc0[2])) / (2 * IMAGES * width);
                        covered += Math.abs(dx) < spot.positionError() ? 1 : 0;
                        covered += Math.abs(dy) < spot.positionError() ? 1 : 0;
                        found++;
                    }
                }
            }
        }
        assertTrue(found == 2 * DISTANCES.length * IMAGES, "found " + found);
        for (int k = 0; k < DISTANCES.length; k++) {
            assertTrue(
                    Math.abs(outwards[k]) < 0.02,
                    "at " + DISTANCES[k] + " widths from the centre, drawn outwards by widths: " + outwards[k]);
        }
        double share = covered / (2.0 * found);
        assertTrue(share > 0.55 && share < 0.85, "covered: " + share);
    }

    @Test
    void measure_discsOnAGlow_areNotDrawnAlongIt() {
        assertUnbiased(8, 100, 1000, 30);
        assertUnbiased(8, 60, 1000, 15);
        assertUnbiased(10, 200, 3000, 20);
    }
}
