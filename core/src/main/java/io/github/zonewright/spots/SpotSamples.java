package io.github.zonewright.spots;

import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.Mask;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;

/**
 * Grey values around one or more peaks, for a fit; large spots are read in square groups of pixels, which say as much.
 *
 * @param u places along x from the first peak, in spot widths
 * @param v along y
 * @param value grey values above the background, less what spots farther off contribute
 * @param weight inverse variances
 */
record SpotSamples(double[] u, double[] v, double[] value, double[] weight) {

    /** Of the places wanted, so many must be seen. */
    private static final double SEEN = 0.85;
    /** A group of pixels has a side of this part of the spot width, and no more. */
    private static final double GROUP = 0.4;

    /** A further spot is sought at one of so many samples. */
    private static final int TRIED = 4;

    /**
     * What is read.
     *
     * @param flat the image less its background
     * @param unseen pixels that do not take part
     * @param gauge width, noise and gain
     */
    record Source(GrayImage flat, Mask unseen, SpotGauge gauge) {}

    /**
     * Reads the values.
     *
     * @param peaks whose surroundings are read, the first of them the origin
     * @param bystanders peaks farther off, whose share is taken away and whose own surroundings are left out
     * @param common their shape
     * @param widths how far from the nearest peak, in spot widths
     * @return empty when too much is not seen
     */
    static Optional<SpotSamples> around(
            Source source,
            List<PeakSearch.Peak> peaks,
            List<PeakSearch.Peak> bystanders,
            CommonShape common,
            double widths) {
        double sigma = source.gauge.sigma();
        int side = Math.max(1, (int) (GROUP * sigma));
        PeakSearch.Peak origin = peaks.get(0);
        double reach = widths * sigma;
        int left = (int) (least(peaks, true) - reach);
        int top = (int) (least(peaks, false) - reach);
        int columns = (int) Math.ceil((-least(mirrored(peaks), true) + reach - left) / side);
        int rows = (int) Math.ceil((-least(mirrored(peaks), false) + reach - top) / side);
        double[][] samples = new double[4][columns * rows];
        int wanted = 0;
        int count = 0;
        for (int row = 0; row < rows; row++) {
            for (int column = 0; column < columns; column++) {
                double x = left + column * side + side / 2.0;
                double y = top + row * side + side / 2.0;
                double nearest = nearest(peaks, x, y);
                if (nearest > reach || nearest > nearest(bystanders, x, y)) {
                    continue;
                }
                wanted++;
                double mean = mean(source, left + column * side, top + row * side, side);
                if (!Double.isNaN(mean)) {
                    samples[0][count] = (x - origin.x()) / sigma;
                    samples[1][count] = (y - origin.y()) / sigma;
                    samples[2][count] = mean - contribution(bystanders, common, x, y, sigma);
                    samples[3][count++] = side * side / source.gauge.errors().pixelVariance(origin.noise(), mean);
                }
            }
        }
        if (count < SEEN * wanted) {
            return Optional.empty();
        }
        return Optional.of(new SpotSamples(
                Arrays.copyOf(samples[0], count),
                Arrays.copyOf(samples[1], count),
                Arrays.copyOf(samples[2], count),
                Arrays.copyOf(samples[3], count)));
    }

    /** The least chi square that may be had by explaining all there is. */
    double perfect() {
        return u.length - 2 * Math.sqrt(2.0 * u.length);
    }

    /** Where a spot more would take away most of what spots leave over, with its height; a row as a fit starts from. */
    double[] mostLeftOver(double[][] spots, SpotShape shape) {
        double[] rest = rest(spots, shape);
        double[] most = {0, 0, 0};
        double best = 0;
        for (int at = 0; at < rest.length; at += TRIED) {
            double match = 0;
            double norm = 0;
            for (int i = 0; i < rest.length; i++) {
                double form = shape.at(u[i] - u[at], v[i] - v[at]);
                match += weight[i] * form * rest[i];
                norm += weight[i] * form * form;
            }
            if (match / Math.sqrt(norm) > best) {
                best = match / Math.sqrt(norm);
                most = new double[] {u[at], v[at], match / norm};
            }
        }
        return most;
    }

    /** The values less some spots, and less what is then the mean. */
    private double[] rest(double[][] spots, SpotShape shape) {
        double[] rest = value.clone();
        double sum = 0;
        double weights = 0;
        for (int i = 0; i < rest.length; i++) {
            for (double[] spot : spots) {
                rest[i] -= spot[2] * shape.at(u[i] - spot[0], v[i] - spot[1]);
            }
            sum += weight[i] * rest[i];
            weights += weight[i];
        }
        for (int i = 0; i < rest.length; i++) {
            rest[i] -= sum / weights;
        }
        return rest;
    }

    private static List<PeakSearch.Peak> mirrored(List<PeakSearch.Peak> peaks) {
        return peaks.stream()
                .map(p -> new PeakSearch.Peak(-p.x(), -p.y(), p.height(), p.noise(), p.curvature(), p.roundness()))
                .toList();
    }

    private static double least(List<PeakSearch.Peak> peaks, boolean x) {
        return peaks.stream().mapToDouble(p -> x ? p.x() : p.y()).min().orElseThrow();
    }

    private static double nearest(List<PeakSearch.Peak> peaks, double x, double y) {
        double least = Double.POSITIVE_INFINITY;
        for (PeakSearch.Peak peak : peaks) {
            least = Math.min(least, peak.distanceTo(x, y));
        }
        return least;
    }

    private static double contribution(
            List<PeakSearch.Peak> peaks, CommonShape common, double x, double y, double sigma) {
        double sum = 0;
        for (PeakSearch.Peak peak : peaks) {
            double form = common.expected().shape().at((x - peak.x()) / sigma, (y - peak.y()) / sigma);
            sum += peak.height() / common.responseOfHeight() * form;
        }
        return sum;
    }

    /** Mean of a square of pixels; NaN when one of them is not seen. */
    private static double mean(Source source, int left, int top, int side) {
        double sum = 0;
        for (int row = top; row < top + side; row++) {
            for (int column = left; column < left + side; column++) {
                if (column < 0
                        || row < 0
                        || column >= source.flat.width()
                        || row >= source.flat.height()
                        || source.unseen.contains(column, row)) {
                    return Double.NaN;
                }
                sum += source.flat.value(column, row);
            }
        }
        return sum / (side * side);
    }
}
