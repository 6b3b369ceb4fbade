package io.github.zonewright.spots;

import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.image.PixelPoint;
import java.util.Random;
import org.junit.jupiter.api.Test;

/**
 * The direct beam among spots as overexposed as itself, off the middle of the frame and of the brighter region, on patterns
 * drawn by code of the tests' own: faint glow and pairs of spots tell which it is.
 */
class BeamAmongOverexposedTest {

    private static final int SIDE = 256;
    private static final int IMAGES = 16;
    /** The limit, on a pedestal of 100. */
    private static final int LIMIT = 355;

    private static int right(double glow) {
        int right = 0;
        for (int seed = 0; seed < IMAGES; seed++) {
            Random random = new Random(17 * seed + 3);
            boolean discs = seed % 2 == 0;
            DrawnSpots.Form form = discs ? DrawnSpots.disc(6, 2) : DrawnSpots.gaussian(2.2);
            PixelPoint centre =
                    new PixelPoint(128 + 60 * (random.nextDouble() - 0.5), 128 + 60 * (random.nextDouble() - 0.5));
            double fall = 60 + 60 * random.nextDouble();
            DrawnSpots drawn = new DrawnSpots(SIDE, 8).glow(centre.x(), centre.y(), glow, fall / 1.5);
            double length = 30 + 10 * random.nextDouble();
            double turn = 3 * random.nextDouble();
            double brightX = centre.x() + 40 * (random.nextDouble() - 0.5);
            double brightY = centre.y() + 40 * (random.nextDouble() - 0.5);
            for (int i = -8; i <= 8; i++) {
                for (int j = -8; j <= 8; j++) {
                    double u = length * (i + 0.2 * j);
                    double v = 0.95 * length * j;
                    double x = centre.x() + u * Math.cos(turn) - v * Math.sin(turn);
                    double y = centre.y() + u * Math.sin(turn) + v * Math.cos(turn);
                    double square = Math.pow(x - brightX, 2) + Math.pow(y - brightY, 2);
                    double height = 1500 * Math.exp(-1.1 * square / (fall * fall) + 0.8 * random.nextGaussian());
                    drawn.spot(form, 12, x, y, i == 0 && j == 0 ? 4000 : height);
                }
            }
            MeasuredPattern pattern = SpotFinder.measure(drawn.image(seed, 1, 1, LIMIT));
            assertTrue(pattern.spots().stream().filter(MeasuredSpot::saturated).count() > 5);
            right += pattern.centre().orElseThrow().position().distanceTo(centre) < 1.5 ? 1 : 0;
        }
        return right;
    }

    @Test
    void measure_faintGlow_tellsTheBeam() {
        for (double glow : new double[] {5, 15, 60}) {
            int right = right(glow);
            assertTrue(right >= IMAGES - 1, "glow of " + glow + " counts: " + right + " of " + IMAGES);
        }
    }
}
