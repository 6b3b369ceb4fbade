package io.github.zonewright.spots;

import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.PixelPoint;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Random;
import java.util.TreeMap;
import org.junit.jupiter.api.Test;

/**
 * Whether the stated errors of spots and centres cover the truth as often as they say: at one standard deviation 68 % of
 * coordinates. The images, their spots and their noise (Poisson counts, gain, Gaussian readout) are made here, by code that
 * shares nothing with the library.
 */
class StatedErrorsTest {

    private static final int IMAGES = 420;

    /** One image and what is true of it. */
    static final class Drawn {
        final Random random;
        final int side;
        final double sigma;
        final boolean discs;
        final boolean stop;
        final double gain;
        final double readout;
        final double[] mean;
        final double centreX;
        final double centreY;
        final List<double[]> spots = new ArrayList<>();

        Drawn(long seed) {
            random = new Random(seed * 7919 + 13);
            side = 180 + random.nextInt(49);
            discs = seed % 7 == 6;
            sigma = discs ? 4 + 2 * random.nextDouble() : 1.1 + 2 * random.nextDouble();
            stop = seed % 3 == 1;
            gain = Math.exp(2.5 * random.nextDouble());
            readout = 0.5 + 2.5 * random.nextDouble();
            centreX = side / 2.0 + 16 * (random.nextDouble() - 0.5);
            centreY = side / 2.0 + 16 * (random.nextDouble() - 0.5);
            mean = new double[side * side];
            double level = 3 + 60 * random.nextDouble();
            double glow = level * (1 + 9 * random.nextDouble());
            double reach = side * (0.1 + 0.2 * random.nextDouble());
            for (int i = 0; i < mean.length; i++) {
                double r = Math.hypot(i % side + 0.5 - centreX, i / side + 0.5 - centreY);
                mean[i] = level + glow * Math.exp(-r / reach);
            }
            double noise = Math.sqrt(level + readout * readout / (gain * gain));
            double length = Math.max(side / 5.2, 7 * sigma) * (1 + 0.25 * random.nextDouble());
            double turn = Math.PI * random.nextDouble();
            double ratio = 1 + 0.3 * random.nextDouble();
            for (int h = -3; h <= 3; h++) {
                for (int k = -3; k <= 3; k++) {
                    boolean first = h > 0 || h == 0 && k > 0;
                    double u = length * (h + 0.2 * k);
                    double v = length * ratio * k;
                    double dx = u * Math.cos(turn) - v * Math.sin(turn);
                    double dy = u * Math.sin(turn) + v * Math.cos(turn);
                    if (first && Math.hypot(dx, dy) < side * 0.44) {
                        double peak = noise * 3 / sigma * Math.exp(4 * random.nextDouble());
                        spot(centreX + dx, centreY + dy, peak);
                        spot(centreX - dx, centreY - dy, peak * Math.exp(0.5 * random.nextGaussian()));
                    }
                }
            }
            paint(centreX, centreY, noise * 400 / sigma);
            if (stop) {
                double half = Math.max(8, 3 * sigma);
                for (int i = 0; i < mean.length; i++) {
                    double x = i % side + 0.5 - centreX;
                    double y = i / side + 0.5 - centreY;
                    if (Math.hypot(x, y) < 1.2 * half || y > 0 && Math.abs(x) < half) {
                        mean[i] *= 0.01;
                    }
                }
            }
        }

        private void spot(double x, double y, double peak) {
            double margin = 2.5 * sigma + 2;
            if (x > margin && y > margin && x < side - margin && y < side - margin) {
                spots.add(new double[] {x, y});
                paint(x, y, peak);
            }
        }

        /** Adds a spot's mean counts, averaged over each pixel on a grid of points. */
        private void paint(double x, double y, double peak) {
            double radius = 1.1774 * sigma;
            int reach = (int) Math.ceil(5 * sigma + 1);
            for (int row = Math.max(0, (int) y - reach); row < Math.min(side, (int) y + reach + 1); row++) {
                for (int column = Math.max(0, (int) x - reach);
                        column < Math.min(side, (int) x + reach + 1);
                        column++) {
                    double sum = 0;
                    for (int k = 0; k < 16; k++) {
                        double dx = column + (k % 4 + 0.5) / 4 - x;
                        double dy = row + (k / 4 + 0.5) / 4 - y;
                        double square = dx * dx + dy * dy;
                        sum += discs ? (square < radius * radius ? 1 : 0) : Math.exp(-square / (2 * sigma * sigma));
                    }
                    mean[row * side + column] += peak * sum / 16;
                }
            }
        }

        GrayImage image() {
            short[] grey = new short[mean.length];
            for (int i = 0; i < grey.length; i++) {
                double value = 200 + gain * counts(mean[i]) + readout * random.nextGaussian();
                grey[i] = (short) (int) Math.max(0, Math.min(65535, Math.rint(value)));
            }
            return GrayImage.ofUnsignedShorts(side, side, grey);
        }

        /** A Poisson deviate: waiting times up to a mean of 40, above that a normal deviate. */
        private double counts(double expected) {
            if (expected > 40) {
                return Math.max(0, Math.rint(expected + Math.sqrt(expected) * random.nextGaussian()));
            }
            int count = -1;
            for (double time = 0; time < expected; count++) {
                time -= Math.log(1 - random.nextDouble());
            }
            return Math.max(0, count);
        }
    }

    /** Coordinates that were covered, and their number. */
    private static final class Share {
        int covered;
        int all;

        void add(PixelPoint found, double x, double y, double error) {
            for (double off : new double[] {found.x() - x, found.y() - y}) {
                covered += Math.abs(off) < error ? 1 : 0;
                all++;
            }
        }

        double value() {
            return covered / (double) all;
        }

        @Override
        public String toString() {
            return value() + " of " + all;
        }
    }

    @Test
    void measure_hundredsOfNoisyImages_errorsCoverTheTruth() {
        Map<String, Share> shares = new TreeMap<>();
        for (long seed = 0; seed < IMAGES; seed++) {
            Drawn drawn = new Drawn(seed);
            MeasuredPattern pattern = SpotFinder.measure(drawn.image());
            Share spots = shares.computeIfAbsent(drawn.discs ? "discs" : "points", key -> new Share());
            for (MeasuredSpot spot : pattern.spots()) {
                for (double[] truth : drawn.spots) {
                    double off = spot.position().distanceTo(new PixelPoint(truth[0], truth[1]));
                    if (off < Math.max(1.5, drawn.sigma)) {
                        spots.add(spot.position(), truth[0], truth[1], spot.positionError());
                    }
                }
            }
            PatternCentre centre = pattern.centre().orElseThrow();
            shares.computeIfAbsent("centres, beam " + (drawn.stop ? "behind a stop" : "seen"), key -> new Share())
                    .add(centre.position(), drawn.centreX, drawn.centreY, centre.error());
        }
        shares.forEach((kind, share) -> assertTrue(share.value() > 0.60 && share.value() < 0.75, kind + ": " + share));
        assertTrue(shares.get("points").all > 3000 && shares.get("discs").all > 800, shares.toString());
    }
}
