package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Vector2;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collection;
import java.util.Collections;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.DoubleStream;
import java.util.stream.IntStream;

/**
 * The lean of the zone axis from the envelope of the intensities, where positions cannot give it: the posterior over leans,
 * summed over shapes of the envelope and scatters. The prior on the lean is the habit of people who tilt to a zone before
 * they take a picture.
 */
final class LeanFit {

    /**
     * The posterior: the likeliest lean (radians, net's frame), its standard deviations and covariance about it, the evidence
     * in nats. Where several leans are likely, {@code within} is the narrower one of the likeliest alone.
     */
    record Posterior(double x, double y, double sdX, double sdY, double covariance, Spread within, double evidence) {

        Posterior(double x, double y, double sdX, double sdY, double covariance, double evidence) {
            this(x, y, sdX, sdY, covariance, new Spread(sdX * sdX, covariance, sdY * sdY), evidence);
        }

        /** Root of the summed variances, in radians. */
        double spread() {
            return Math.hypot(sdX, sdY);
        }

        /** What other likely leans add to the variance. */
        Spread beyond() {
            return new Spread(sdX * sdX - within.xx, covariance - within.xy, sdY * sdY - within.yy);
        }
    }

    /** A covariance of the lean in rad². */
    record Spread(double xx, double xy, double yy) {

        /** The same in a frame turned so that azimuths grow by an angle. */
        Spread rotate(double angle) {
            double c = Math.cos(angle);
            double s = Math.sin(angle);
            return new Spread(
                    c * c * xx - 2 * c * s * xy + s * s * yy,
                    c * s * (xx - yy) + (c * c - s * s) * xy,
                    s * s * xx + 2 * c * s * xy + c * c * yy);
        }
    }

    /** A lean and the logarithm of its posterior density. */
    record Cell(Vector2 lean, double likelihood, double prior) {

        /** For comparing hypotheses. */
        double value() {
            return TRUST * likelihood + prior;
        }

        /** For telling how well the lean is known: more careful, since errors of neighbouring spots go together. */
        double carefulValue() {
            return LEAN_TRUST * likelihood + prior;
        }

        /** The same with more known about it, in nats. */
        Cell with(double nats) {
            return new Cell(lean, likelihood + nats / TRUST, prior);
        }
    }

    private record Hypothesis(IntensityLikelihood likelihood, EnvelopeShape shape) {}

    /** What the envelope is like: the leans that were looked at, the posterior, and the best shape with its level c. */
    record Envelope(List<Cell> cells, Posterior posterior, EnvelopeShape shape, double constant) {

        /** The leans that matter, by far the most of the probability. */
        List<Cell> likelyCells() {
            return best(cells, 6, cells.size());
        }

        /** The logarithm of the intensity expected at an excitation error; sharp asks for an envelope without tails. */
        double expectedLevel(double lnStrength, double s, double g, boolean sharp) {
            double spread2 = IntensityLikelihood.BENDING2 * g * g;
            return constant + (sharp ? shape.withoutTails() : shape).level(lnStrength, s, spread2);
        }
    }

    private static final double DEGREE = Math.toRadians(1);
    private static final double STEP = 0.15 * DEGREE;
    private static final int ROUGH = 7;
    private static final int MIDDLE = 3;

    /** How far the likelihood is trusted in comparing hypotheses: its errors are not quite independent. */
    private static final double TRUST = 0.8;

    /** The same for the lean; on drawn intensities the truth was covered too seldom with more. */
    private static final double LEAN_TRUST = 0.5;

    /**
     * What the models of the envelope leave out widens the posterior: its variance by this factor, and by a floor. Both make
     * the stated errors cover the truth on patterns with many-beam intensities about as often as they claim.
     */
    private static final double MODEL_FACTOR2 = 1.2 * 1.2;

    private static final double MODEL_FLOOR = 0.15 * DEGREE;

    /** Leans within this distance are taken to be one answer. */
    private static final double MODE = 1.2 * DEGREE;

    private static final double LEAST_WEIGHT = 1e-3;

    /**
     * Scatters of ln intensity of a reflection and of its family: a thin foil follows |F|² closely, while many beams change
     * whole families, then single reflections too.
     */
    private static final List<IntensityLikelihood.Scatter> SCATTERS = List.of(
            new IntensityLikelihood.Scatter(0.12, 0.2),
            new IntensityLikelihood.Scatter(0.12, 0.9),
            new IntensityLikelihood.Scatter(0.25, 0.25),
            new IntensityLikelihood.Scatter(0.5, 0.9));

    private static final IntensityLikelihood.Scatter ROUGH_SCATTER = new IntensityLikelihood.Scatter(0.4, 0.9);
    private static final double[] POWERS = {0.5, 0.75, 1};
    private static final double[] CEILINGS = {0.5, 2, 3.5};
    private static final double[] WIDTHS = {
        0.0012, 0.0016, 0.002, 0.0026, 0.0034, 0.0045, 0.0058, 0.0075, 0.01, 0.013, 0.017, 0.022, 0.029, 0.04
    };
    private static final double[] ROUGH_POWERS = {0.75};
    private static final double[] ROUGH_WIDTHS = {0.0015, 0.0035, 0.008, 0.02};
    private static final double[] FRINGE_POWERS = {0.5, 1};
    private static final double[] THICKNESSES = {20, 29, 42, 60, 90, 130, 190, 280, 400, 580, 840, 1200};

    private final NodeIntensities intensities;
    private final double wavelength;
    private final double inverseExtinctionPerAmplitude;
    private final double largestLean;
    private final List<Hypothesis> rough = new ArrayList<>();
    private final double strongest;
    private final double[] base;

    LeanFit(NodeIntensities intensities, double wavelength, double inverseExtinctionPerAmplitude, double largestLean) {
        this.intensities = intensities;
        this.wavelength = wavelength;
        this.inverseExtinctionPerAmplitude = inverseExtinctionPerAmplitude;
        this.largestLean = largestLean;
        IntensityLikelihood first = new IntensityLikelihood(intensities, wavelength, ROUGH_SCATTER);
        base = new double[first.size()];
        strongest = first.strongest();
        for (EnvelopeShape shape : EnvelopeShape.bells(strongest, ROUGH_POWERS, new double[0], ROUGH_WIDTHS)) {
            rough.add(new Hypothesis(first, shape));
        }
    }

    /** All shapes with all scatters, those of one shape one after the other. */
    private List<Hypothesis> fine() {
        List<EnvelopeShape> shapes = EnvelopeShape.bells(strongest, POWERS, CEILINGS, WIDTHS);
        for (double thickness : THICKNESSES) {
            for (double power : FRINGE_POWERS) {
                shapes.add(new EnvelopeShape.Fringes(thickness, power, inverseExtinctionPerAmplitude));
            }
        }
        List<IntensityLikelihood> likelihoods = SCATTERS.stream()
                .map(scatter -> new IntensityLikelihood(intensities, wavelength, scatter))
                .toList();
        return shapes.stream()
                .flatMap(shape -> likelihoods.stream().map(likelihood -> new Hypothesis(likelihood, shape)))
                .toList();
    }

    /** The log-likelihoods of hypotheses at a lean, in their order. */
    private double[] logLikelihoods(List<Hypothesis> hypotheses, Vector2 lean) {
        double[] values = new double[hypotheses.size()];
        EnvelopeShape last = null;
        for (int i = 0; i < values.length; i++) {
            Hypothesis h = hypotheses.get(i);
            if (h.shape != last) {
                h.likelihood.expected(lean, h.shape, base);
                last = h.shape;
            }
            values[i] = h.likelihood.of(base);
        }
        return values;
    }

    /** The log evidence over the whole range of leans, on a coarse grid; cheap, for ranking candidates. */
    double evidence() {
        return logSum(roughCells()) + 2 * Math.log(ROUGH * STEP);
    }

    /** What the evidence cannot surpass, were every intensity as expected. */
    double largestEvidence() {
        return TRUST * rough.get(0).likelihood.most();
    }

    private List<Cell> roughCells() {
        List<Cell> cells = new ArrayList<>();
        int reach = (int) (largestLean / STEP) / ROUGH;
        for (int i = -reach; i <= reach; i++) {
            for (int j = -reach; j <= reach; j++) {
                if (Math.hypot(i, j) <= reach + 0.5) {
                    cells.add(cell(i * ROUGH, j * ROUGH, rough, rough.size()));
                }
            }
        }
        return cells;
    }

    /** The posterior on a fine grid, refined where the coarse one says that the lean may be. */
    Envelope envelope() {
        List<Cell> likely = best(roughCells(), 10, 30);
        List<Hypothesis> all = fine();
        List<Hypothesis> hypotheses = likelyHypotheses(all, likely.subList(0, Math.min(8, likely.size())));
        Map<Long, Cell> middle = new LinkedHashMap<>();
        likely.forEach(c -> around(c, MIDDLE, hypotheses, all.size(), middle));
        Map<Long, Cell> found = new LinkedHashMap<>();
        best(middle.values(), 7, 60).forEach(c -> around(c, 1, hypotheses, all.size(), found));
        Cell top = Collections.max(found.values(), Comparator.comparingDouble(Cell::value));
        double[] values = logLikelihoods(hypotheses, top.lean);
        int best = 0;
        for (int i = 1; i < values.length; i++) {
            best = values[i] > values[best] ? i : best;
        }
        Hypothesis h = hypotheses.get(best);
        List<Cell> cells = List.copyOf(found.values());
        return new Envelope(cells, moments(cells), h.shape, h.likelihood.constant(top.lean, h.shape));
    }

    private static List<Cell> best(Collection<Cell> cells, double within, int most) {
        double top = cells.stream().mapToDouble(Cell::value).max().orElseThrow();
        return cells.stream()
                .filter(c -> c.value() > top - within)
                .sorted(Comparator.comparingDouble(Cell::value).reversed())
                .limit(most)
                .toList();
    }

    private void around(Cell cell, int step, List<Hypothesis> hypotheses, int count, Map<Long, Cell> found) {
        int i = (int) Math.rint(cell.lean.x() / STEP);
        int j = (int) Math.rint(cell.lean.y() / STEP);
        for (int di = -step; di <= step; di += step) {
            for (int dj = -step; dj <= step; dj += step) {
                int row = i + di;
                int column = j + dj;
                found.computeIfAbsent(row * 100_000L + column, k -> cell(row, column, hypotheses, count));
            }
        }
    }

    /** The hypotheses that come near the best somewhere among the leans. */
    private List<Hypothesis> likelyHypotheses(List<Hypothesis> all, List<Cell> cells) {
        double[] best = new double[all.size()];
        Arrays.fill(best, Double.NEGATIVE_INFINITY);
        for (Cell cell : cells) {
            double prior = logPrior(cell.lean.norm());
            double[] values = logLikelihoods(all, cell.lean);
            Arrays.setAll(best, i -> Math.max(best[i], TRUST * values[i] + prior));
        }
        double top = DoubleStream.of(best).max().orElseThrow();
        return IntStream.range(0, best.length)
                .filter(i -> best[i] > top - 5)
                .mapToObj(all::get)
                .toList();
    }

    private Cell cell(int row, int column, List<Hypothesis> hypotheses, int count) {
        Vector2 lean = new Vector2(row * STEP, column * STEP);
        double sum = 0;
        double top = Double.NEGATIVE_INFINITY;
        for (double value : logLikelihoods(hypotheses, lean)) {
            if (value > top) {
                sum = sum * Math.exp(top - value) + 1;
                top = value;
            } else {
                sum += Math.exp(value - top);
            }
        }
        return new Cell(lean, top + Math.log(sum / count), logPrior(lean.norm()));
    }

    /** Log density of the habit of tilting to a zone: mostly within half a degree, at times a few degrees off. */
    private static double logPrior(double lean) {
        double near = 0.5 * DEGREE;
        double far = 2.5 * DEGREE;
        return Math.log(0.7 * Math.exp(-lean / near) / (2 * Math.PI * near * near)
                + 0.3 * Math.exp(-lean / far) / (2 * Math.PI * far * far));
    }

    /** The likeliest lean, covariances and evidence of cells of the fine grid. */
    static Posterior moments(List<Cell> cells) {
        double top = cells.stream().mapToDouble(Cell::carefulValue).max().orElseThrow();
        double[] weights = cells.stream()
                .mapToDouble(cell -> Math.exp(cell.carefulValue() - top))
                .toArray();
        Vector2 mode = mean(cells, weights, densest(cells, weights), MODE);
        Spread within = covariance(cells, weights, mode, MODE);
        Spread all = covariance(cells, weights, mode, Double.POSITIVE_INFINITY);
        return new Posterior(
                mode.x(),
                mode.y(),
                Math.sqrt(all.xx),
                Math.sqrt(all.yy),
                all.xy,
                within,
                logSum(cells) + 2 * Math.log(STEP));
    }

    /** The lean about which most of the probability lies, within the distance that makes an answer right. */
    private static Vector2 densest(List<Cell> cells, double[] weights) {
        Vector2 best = cells.get(0).lean;
        double most = 0;
        for (int i = 0; i < weights.length; i++) {
            if (weights[i] < LEAST_WEIGHT) {
                continue;
            }
            double sum = 0;
            for (int j = 0; j < weights.length; j++) {
                double dx = (cells.get(j).lean.x() - cells.get(i).lean.x()) / DEGREE;
                double dy = (cells.get(j).lean.y() - cells.get(i).lean.y()) / DEGREE;
                sum += weights[j] < LEAST_WEIGHT ? 0 : weights[j] * Math.exp(-2 * (dx * dx + dy * dy));
            }
            if (sum > most) {
                most = sum;
                best = cells.get(i).lean;
            }
        }
        return best;
    }

    private static Vector2 mean(List<Cell> cells, double[] weights, Vector2 about, double reach) {
        Vector2 sum = Vector2.ZERO;
        double w = 0;
        for (int i = 0; i < weights.length; i++) {
            if (cells.get(i).lean.minus(about).norm() < reach) {
                sum = sum.plus(cells.get(i).lean.times(weights[i]));
                w += weights[i];
            }
        }
        return sum.times(1 / w);
    }

    /** The covariance about a lean, widened by what the models leave out. */
    private static Spread covariance(List<Cell> cells, double[] weights, Vector2 about, double reach) {
        double w = 0;
        double xx = 0;
        double xy = 0;
        double yy = 0;
        for (int i = 0; i < weights.length; i++) {
            Vector2 off = cells.get(i).lean.minus(about);
            if (off.norm() < reach) {
                w += weights[i];
                xx += weights[i] * off.x() * off.x();
                xy += weights[i] * off.x() * off.y();
                yy += weights[i] * off.y() * off.y();
            }
        }
        double floor = STEP * STEP / 12 + MODEL_FLOOR * MODEL_FLOOR;
        return new Spread(MODEL_FACTOR2 * xx / w + floor, MODEL_FACTOR2 * xy / w, MODEL_FACTOR2 * yy / w + floor);
    }

    private static double logSum(List<Cell> cells) {
        double top = cells.stream().mapToDouble(Cell::value).max().orElseThrow();
        double sum = 0;
        for (Cell cell : cells) {
            sum += Math.exp(cell.value() - top);
        }
        return top + Math.log(sum);
    }
}
