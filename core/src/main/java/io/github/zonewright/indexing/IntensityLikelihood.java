package io.github.zonewright.indexing;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * How likely the intensities at the nodes of a net are for a lean, a shape of the envelope and a scatter.
 *
 * <p>Model: ln I = c + level(|F|², s) + scatter, with s = −g·τ − λg²/2 for a reflection of a zone that leans by τ. The scatter
 * has a part that a family of equivalent reflections shares (dynamical diffraction changes them alike), so that the ratios
 * of g and −g decide, and an own part with the tails of Student's t. An undetected node counts by the chance that it stays
 * below its limit. The level c is the generalised least-squares one.
 */
final class IntensityLikelihood {

    /**
     * Standard deviations of ln intensity about what is expected.
     *
     * @param own each reflection's
     * @param family what all equivalents of one share
     */
    record Scatter(double own, double family) {}

    private static final double CLIP = 3.2;
    private static final double FREEDOM = 4;

    /** A product of so many factors is turned into a logarithm before it may overflow, and while it is worth to look at it. */
    private static final double LARGEST_PRODUCT = 1e12;

    private final double familyScatter2;
    private final int detected;
    private final int size;
    private final double[] level;
    private final double[] variance;
    private final double[] inverseVariance;
    private final double inverseScatter;
    private final int[] familyEnd;
    private final double[] weight;
    private final double offset;

    IntensityLikelihood(NodeIntensities intensities, Scatter scatter) {
        familyScatter2 = scatter.family * scatter.family;
        List<NodeIntensities.Entry> entries = intensities.entries();
        size = entries.size();
        level = new double[size];
        variance = new double[size];
        List<Integer> ends = new ArrayList<>();
        for (int i = 0; i < size; i++) {
            NodeIntensities.Entry e = entries.get(i);
            level[i] = e.level();
            variance[i] = scatter.own * scatter.own + e.variance();
            boolean last = i + 1 == size
                    || !entries.get(i + 1).detected()
                    || entries.get(i + 1).node().family() != e.node().family();
            if (e.detected() && last) {
                ends.add(i + 1);
            }
        }
        inverseVariance = new double[size];
        Arrays.setAll(inverseVariance, i -> 1 / variance[i]);
        inverseScatter = 1 / Math.sqrt(familyScatter2 + scatter.own * scatter.own);
        familyEnd = ends.stream().mapToInt(Integer::intValue).toArray();
        detected = familyEnd.length == 0 ? 0 : familyEnd[familyEnd.length - 1];
        weight = new double[detected];
        offset = weigh() - chance();
    }

    /** Fills the generalised least-squares weights of c and returns the constant part of the log-likelihood. */
    private double weigh() {
        double total = 0;
        double logDeterminant = 0;
        int from = 0;
        for (int end : familyEnd) {
            double sum = 0;
            for (int i = from; i < end; i++) {
                sum += 1 / variance[i];
                logDeterminant += Math.log(variance[i]);
            }
            logDeterminant += Math.log1p(familyScatter2 * sum);
            for (int i = from; i < end; i++) {
                weight[i] = 1 / variance[i] / (1 + familyScatter2 * sum);
                total += weight[i];
            }
            from = end;
        }
        for (int i = 0; i < detected; i++) {
            weight[i] /= total;
        }
        return -0.5 * (logDeterminant + detected * Math.log(2 * Math.PI));
    }

    /** Log-likelihood of the detected intensities if they had nothing to do with the nodes. */
    private double chance() {
        double mean = 0;
        for (int i = 0; i < detected; i++) {
            mean += level[i] / detected;
        }
        double squares = 0;
        for (int i = 0; i < detected; i++) {
            squares += (level[i] - mean) * (level[i] - mean);
        }
        double s2 = Math.max(1, squares / Math.max(1, detected));
        return -0.5 * (squares / s2 + detected * Math.log(2 * Math.PI * s2));
    }

    /** The log-likelihood if every intensity were as expected. */
    double most() {
        return offset;
    }

    /** The level c for what a shape expects at a lean. */
    double constant(ExpectedLevels expected) {
        return constant(expected.first(detected));
    }

    private double constant(double[] base) {
        double c = 0;
        for (int i = 0; i < detected; i++) {
            c += weight[i] * (level[i] - base[i]);
        }
        return c;
    }

    /**
     * The log-likelihood of all intensities over chance.
     *
     * @param expected what is expected of them, but for c
     * @param least the least that matters
     * @return the log-likelihood, or −∞ when it is less than that
     */
    double of(ExpectedLevels expected, double least) {
        double[] base = expected.first(detected);
        double c = constant(base);
        double sum = offset;
        double tails = 1;
        double tooLarge = Math.exp(Math.min(600, 2 / (FREEDOM + 1) * (offset - least)));
        int from = 0;
        for (int end : familyEnd) {
            double common = common(from, end, base, c);
            sum -= 0.5 * Math.min(CLIP * CLIP, common * common / familyScatter2);
            for (int i = from; i < end; i++) {
                double r = level[i] - base[i] - c - common;
                tails *= 1 + r * r * inverseVariance[i] / FREEDOM;
                if (tails > LARGEST_PRODUCT) {
                    sum -= (FREEDOM + 1) / 2 * Math.log(tails);
                    tails = 1;
                }
            }
            if (sum < least || tails > tooLarge) {
                return Double.NEGATIVE_INFINITY;
            }
            from = end;
        }
        sum -= (FREEDOM + 1) / 2 * Math.log(tails);
        for (int i = detected; i < size && sum >= least; i++) {
            sum += NormalTail.lnPhi((level[i] - expected.first(i + 1)[i] - c) * inverseScatter);
        }
        return sum < least ? Double.NEGATIVE_INFINITY : sum;
    }

    /** What a family deviates by in common, where each has the tails of Student's t. */
    private double common(int from, int end, double[] base, double c) {
        double common = 0;
        for (int round = 0; round < 2; round++) {
            double weights = 1 / familyScatter2;
            double weighted = 0;
            for (int i = from; i < end; i++) {
                double r = level[i] - base[i] - c;
                double w = (FREEDOM + 1) / (FREEDOM * variance[i] + (r - common) * (r - common));
                weights += w;
                weighted += w * r;
            }
            common = weighted / weights;
        }
        return common;
    }
}
