package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Vector2;
import java.util.Arrays;
import java.util.Collection;
import java.util.Collections;
import java.util.Comparator;
import java.util.List;
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

        /** The same where another posterior may hold in its place; by how little they differ in evidence says how likely. */
        Posterior orElse(Posterior other) {
            double weight = 1 / (1 + Math.exp(LEAN_TRUST / TRUST * (evidence - other.evidence)));
            double dx = other.x - x;
            double dy = other.y - y;
            return new Posterior(
                    x,
                    y,
                    Math.sqrt((1 - weight) * sdX * sdX + weight * (other.sdX * other.sdX + dx * dx)),
                    Math.sqrt((1 - weight) * sdY * sdY + weight * (other.sdY * other.sdY + dy * dy)),
                    (1 - weight) * covariance + weight * (other.covariance + dx * dy),
                    within,
                    evidence);
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

    /** A shape of the envelope with a scatter. */
    record Hypothesis(IntensityLikelihood likelihood, EnvelopeShape shape) {}

    /** What the envelope is like: the leans that were looked at, the posterior, and the best shape with its level c. */
    record Envelope(List<Cell> cells, Posterior posterior, EnvelopeShape shape, double constant) {

        /** The leans that matter, by far the most of the probability. */
        List<Cell> likelyCells() {
            return best(cells, 6, cells.size());
        }

        /** The logarithm of the intensity expected at an excitation error; sharp asks for an envelope without tails. */
        double expectedLevel(double lnStrength, double s, double g, boolean sharp) {
            double spread2 = EnvelopeShape.BENDING2 * g * g;
            return constant + (sharp ? shape.withoutTails() : shape).level(lnStrength, s, spread2);
        }
    }

    private static final double DEGREE = Math.toRadians(1);

    /** Larger leans do not count when candidates are ranked. */
    private static final double LARGEST_RANKED = 8 * DEGREE;

    private static final double LARGEST_LEAN = 10 * DEGREE;
    static final double STEP = 0.15 * DEGREE;
    private static final int ROUGH = 7;
    private static final int MIDDLE = 3;

    /** How far the likelihood is trusted in comparing hypotheses: its errors are not quite independent. */
    static final double TRUST = 0.8;

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

    /** Nats below the best beyond which a lean of the coarse, the middle and the fine grid no longer counts. */
    private static final double ROUGH_DEPTH = 12;

    private static final double MIDDLE_DEPTH = 12;
    private static final double FINE_DEPTH = 24;

    /** Nats by which a hypothesis may lag behind the best, each where it is at its best, and still be looked at. */
    private static final double NEAR = 5;

    /** Leans of the coarse grid are followed to the middle one when they are within so many nats of the best. */
    private static final double ROUGH_WITHIN = 10;

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
    private final ExpectedLevels expected;
    private final double inverseExtinctionPerAmplitude;
    private final double strongest;
    private final IntensityLikelihood rough;
    private LeanGrid roughLeans;

    LeanFit(NodeIntensities intensities, double wavelength, double inverseExtinctionPerAmplitude) {
        this.intensities = intensities;
        this.expected = new ExpectedLevels(intensities, wavelength);
        this.inverseExtinctionPerAmplitude = inverseExtinctionPerAmplitude;
        this.strongest = expected.strongest();
        this.rough = new IntensityLikelihood(intensities, ROUGH_SCATTER);
    }

    /** For a net as it was fitted to the spots. */
    static LeanFit of(Sighting seen, ZoneNet net, NetFit.Fit fit, ReflectionStrengths strengths) {
        return new LeanFit(
                NodeIntensities.read(seen.pattern(), seen.cloud(), seen.score(), net, fit),
                strengths.wavelength(),
                strengths.inverseExtinctionPerAmplitude());
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
                .map(scatter -> new IntensityLikelihood(intensities, scatter))
                .toList();
        return shapes.stream()
                .flatMap(shape -> likelihoods.stream().map(likelihood -> new Hypothesis(likelihood, shape)))
                .toList();
    }

    /** The log evidence over the whole range of leans, on a coarse grid; cheap, for ranking candidates. */
    double evidence() {
        return evidence(Double.NEGATIVE_INFINITY);
    }

    /** The same where it is no less than a value; where it is less, nothing or a part of it. */
    double evidence(double least) {
        double area = 2 * Math.log(ROUGH * STEP);
        int reach = reach(LARGEST_RANKED);
        double top = least - area - Math.log(Math.PI * (reach + 1) * (reach + 1));
        List<EnvelopeShape> shapes = EnvelopeShape.bells(strongest, ROUGH_POWERS, new double[0], ROUGH_WIDTHS);
        List<Hypothesis> hypotheses =
                shapes.stream().map(shape -> new Hypothesis(rough, shape)).toList();
        roughLeans = new LeanGrid(expected, hypotheses, hypotheses.size(), ROUGH_DEPTH, top - ROUGH_WITHIN);
        addRough(reach);
        return logSum(roughLeans.cells()) + area;
    }

    /** What the evidence cannot surpass, were every intensity as expected. */
    double largestEvidence() {
        return TRUST * rough.most();
    }

    private static int reach(double largestLean) {
        return (int) (largestLean / STEP) / ROUGH;
    }

    /** Adds the leans of the coarse grid out to a reach, the smaller ones first. */
    private void addRough(int reach) {
        for (int ring = 0; ring <= reach; ring++) {
            for (int i = -ring; i <= ring; i++) {
                for (int j = -ring; j <= ring; j++) {
                    if (Math.max(Math.abs(i), Math.abs(j)) == ring && Math.hypot(i, j) <= reach + 0.5) {
                        roughLeans.add(i * ROUGH, j * ROUGH);
                    }
                }
            }
        }
    }

    /** The posterior on a fine grid, refined where the coarse one says that the lean may be. */
    Envelope envelope() {
        if (roughLeans == null) {
            evidence();
        }
        addRough(reach(LARGEST_LEAN));
        List<Cell> likely = roughLeans.best(ROUGH_WITHIN, 30);
        List<Hypothesis> all = fine();
        List<Hypothesis> hypotheses = likelyHypotheses(all, likely.subList(0, Math.min(8, likely.size())));
        LeanGrid middle = new LeanGrid(expected, hypotheses, all.size(), MIDDLE_DEPTH, Double.NEGATIVE_INFINITY);
        likely.forEach(c -> middle.addAround(c, MIDDLE));
        LeanGrid found = new LeanGrid(expected, hypotheses, all.size(), FINE_DEPTH, Double.NEGATIVE_INFINITY);
        middle.best(7, 60).forEach(c -> found.addAround(c, 1));
        Cell top = Collections.max(found.cells(), Comparator.comparingDouble(Cell::value));
        Hypothesis best = hypotheses.get(0);
        double most = Double.NEGATIVE_INFINITY;
        for (Hypothesis h : hypotheses) {
            double value = h.likelihood.of(expected.at(top.lean, h.shape), most);
            if (value > most) {
                most = value;
                best = h;
            }
        }
        double constant = best.likelihood.constant(expected.at(top.lean, best.shape));
        List<Cell> cells = List.copyOf(found.cells());
        return new Envelope(cells, moments(cells), best.shape, constant);
    }

    static List<Cell> best(Collection<Cell> cells, double within, int most) {
        double top = cells.stream().mapToDouble(Cell::value).max().orElseThrow();
        return cells.stream()
                .filter(c -> c.value() > top - within)
                .sorted(Comparator.comparingDouble(Cell::value).reversed())
                .limit(most)
                .toList();
    }

    /** The hypotheses that come near the best somewhere among the leans. */
    private List<Hypothesis> likelyHypotheses(List<Hypothesis> all, List<Cell> cells) {
        double[] best = new double[all.size()];
        Arrays.fill(best, Double.NEGATIVE_INFINITY);
        double top = Double.NEGATIVE_INFINITY;
        for (Cell cell : cells) {
            EnvelopeShape last = null;
            for (int i = 0; i < best.length; i++) {
                Hypothesis h = all.get(i);
                if (h.shape != last) {
                    expected.at(cell.lean, h.shape);
                    last = h.shape;
                }
                double least = (Math.max(top - NEAR, best[i]) - cell.prior) / TRUST;
                double value = TRUST * h.likelihood.of(expected, least) + cell.prior;
                best[i] = Math.max(best[i], value);
                top = Math.max(top, value);
            }
        }
        double lowest = top - NEAR;
        return IntStream.range(0, best.length)
                .filter(i -> best[i] > lowest)
                .mapToObj(all::get)
                .toList();
    }

    /** Log density of the habit of tilting to a zone: mostly within half a degree, at times a few degrees off. */
    static double logPrior(double lean) {
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

    private static double logSum(Collection<Cell> cells) {
        double top = cells.stream().mapToDouble(Cell::value).max().orElseThrow();
        if (top == Double.NEGATIVE_INFINITY) {
            return top;
        }
        double sum = 0;
        for (Cell cell : cells) {
            sum += Math.exp(cell.value() - top);
        }
        return top + Math.log(sum);
    }
}
