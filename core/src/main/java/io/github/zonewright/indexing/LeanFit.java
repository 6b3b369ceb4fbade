package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Vector2;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;

/**
 * The lean of the zone axis from the envelope of the intensities, where positions cannot give it.
 *
 * <p>Model: ln I = c + p·(ln F² + S(s)) + scatter, with s = −g·τ − λg²/2 for a reflection of the zone leaning by τ, and S the
 * logarithm of a Lorentzian or Gaussian of width w, smeared over the node's width. The scatter has a part that a family
 * of equivalent reflections shares (dynamical diffraction changes them alike), so that it is the ratios of g and −g that
 * decide. Undetected nodes count by the chance that they stay below their limit. p, w and the shape are summed over. The
 * prior on the lean is the habit of people who tilt to a zone before they take a picture.
 */
final class LeanFit {

    /** The posterior: mean lean (towards X and Y, radians), its standard deviations, the log evidence against chance. */
    record Posterior(double x, double y, double sdX, double sdY, double covariance, double evidence) {

        /** Root of the summed variances, in radians. */
        double spread() {
            return Math.hypot(sdX, sdY);
        }
    }

    /**
     * The shape of the envelope: its half width or standard deviation in 1/Å, and how intensity follows strength: by a power
     * below 1, or in proportion up to a ceiling in ln strength, as dynamical exchange does.
     */
    record Shape(double power, double ceiling, double width, boolean gaussian) {

        /** ln intensity but for a constant; the ratio is (s/w)². */
        double level(double lnStrength, double ratio) {
            double x = lnStrength - (gaussian ? Math.min(12, ratio / 2) : Math.log1p(ratio));
            double over = x - ceiling;
            return power * (over < -20 ? x : x - Math.log1p(Math.exp(over)));
        }
    }

    private static final double FAMILY_SCATTER = 0.9;
    private static final double CLIP = 3.2;
    private static final double FREEDOM = 4;
    private static final double TRUST = 0.8;
    private static final int MODES = 3;
    private static final double FLOOR = -4.5;
    private static final double SMEAR = 0.004;
    private static final double[] POWERS = {0.5, 0.75, 1};
    private static final double[] WIDTHS = {0.0012, 0.002, 0.0033, 0.0055, 0.009, 0.015, 0.024, 0.04};
    private static final double[] COARSE_POWERS = {0.75};
    private static final double[] COARSE_WIDTHS = {0.0015, 0.0035, 0.008, 0.02};
    private static final double[] CEILINGS = {0.5, 2, 3.5};
    private static final double DEGREE = Math.toRadians(1);
    private static final double STEP = 0.15 * DEGREE;
    private static final double[] LN_PHI = lnPhiTable();

    private final int detected;
    private final int size;
    private final double[] gx;
    private final double[] gy;
    private final double[] curvature;
    private final double[] smear;
    private final double[] lnStrength;
    private final double[] level;
    private final double[] variance;
    private final int[] familyEnd;
    private final double[] constantWeight;
    private final double offset;
    private final double largestLean;
    private final List<Shape> coarse;
    final List<Shape> fine;

    LeanFit(NodeIntensities intensities, double wavelength, double largestLean) {
        List<NodeIntensities.Entry> entries = intensities.entries();
        this.largestLean = largestLean;
        size = entries.size();
        gx = new double[size];
        gy = new double[size];
        curvature = new double[size];
        smear = new double[size];
        lnStrength = new double[size];
        level = new double[size];
        variance = new double[size];
        int count = 0;
        List<Integer> ends = new ArrayList<>();
        for (int i = 0; i < size; i++) {
            NodeIntensities.Entry e = entries.get(i);
            gx[i] = e.node().x();
            gy[i] = e.node().y();
            curvature[i] = -wavelength * e.node().g() * e.node().g() / 2;
            smear[i] = SMEAR * SMEAR * e.node().g() * e.node().g();
            lnStrength[i] = Math.log(e.node().strength());
            level[i] = e.level();
            variance[i] = e.variance();
            if (e.detected()) {
                count++;
                boolean last = i + 1 == size
                        || !entries.get(i + 1).detected()
                        || entries.get(i + 1).node().family() != e.node().family();
                if (last) {
                    ends.add(i + 1);
                }
            }
        }
        detected = count;
        familyEnd = ends.stream().mapToInt(Integer::intValue).toArray();
        constantWeight = new double[detected];
        offset = weighConstant() - chance();
        double strongest = Double.NEGATIVE_INFINITY;
        for (double strength : lnStrength) {
            strongest = Math.max(strongest, strength);
        }
        coarse = shapes(strongest, COARSE_POWERS, new double[0], COARSE_WIDTHS);
        fine = shapes(strongest, POWERS, CEILINGS, WIDTHS);
    }

    /** Fills the generalised least-squares weights of c and returns the constant part of the log-likelihood. */
    private double weighConstant() {
        double a2 = FAMILY_SCATTER * FAMILY_SCATTER;
        double total = 0;
        double logDeterminant = 0;
        int from = 0;
        for (int end : familyEnd) {
            double sum = 0;
            for (int i = from; i < end; i++) {
                sum += 1 / variance[i];
                logDeterminant += Math.log(variance[i]);
            }
            logDeterminant += Math.log1p(a2 * sum);
            for (int i = from; i < end; i++) {
                constantWeight[i] = 1 / variance[i] / (1 + a2 * sum);
                total += constantWeight[i];
            }
            from = end;
        }
        for (int i = 0; i < detected; i++) {
            constantWeight[i] /= total;
        }
        return -0.5 * (logDeterminant + detected * Math.log(2 * Math.PI));
    }

    /** Log-likelihood of the detected intensities if they had nothing to do with the nodes. */
    private double chance() {
        double mean = 0;
        for (int i = 0; i < detected; i++) {
            mean += level[i] / Math.max(1, detected);
        }
        double squares = 0;
        for (int i = 0; i < detected; i++) {
            squares += (level[i] - mean) * (level[i] - mean);
        }
        double s2 = Math.max(1, squares / Math.max(1, detected));
        return -0.5 * (squares / s2 + detected * Math.log(2 * Math.PI * s2));
    }

    /** The log evidence over the whole range of leans, on a coarse grid; cheap, for ranking candidates. */
    double evidence() {
        return logSum(grid(Vector2.ZERO, largestLean, DEGREE, coarse, coarse.size())) + Math.log(DEGREE * DEGREE);
    }

    /** The posterior of the lean on a fine grid about the best coarse place. The net's frame, radians. */
    Envelope envelope() {
        List<Cell> rough = grid(Vector2.ZERO, largestLean, DEGREE, coarse, coarse.size());
        rough.sort(Comparator.comparingDouble(Cell::value).reversed());
        List<Cell> modes = new ArrayList<>();
        for (Cell cell : rough) {
            if (modes.size() < MODES
                    && modes.stream().noneMatch(m -> m.lean.minus(cell.lean).norm() < 1.5 * DEGREE)) {
                modes.add(cell);
            }
        }
        List<Cell> cells = new ArrayList<>();
        for (Cell mode : modes) {
            List<Cell> middle = grid(mode.lean, 1.2 * DEGREE, 0.4 * DEGREE, likely(mode.lean), fine.size());
            Cell top =
                    middle.stream().max(Comparator.comparingDouble(Cell::value)).orElse(mode);
            for (Cell cell : grid(top.lean, 1.2 * DEGREE, STEP, likely(top.lean), fine.size())) {
                if (cells.stream().noneMatch(c -> c.lean.minus(cell.lean).norm() < 0.5 * STEP)) {
                    cells.add(cell);
                }
            }
        }
        Cell best = cells.stream().max(Comparator.comparingDouble(Cell::value)).orElseThrow();
        Shape shape = likely(best.lean).stream()
                .max(Comparator.comparingDouble(x -> logLikelihood(best.lean.x(), best.lean.y(), x)))
                .orElseThrow();
        return new Envelope(cells, moments(cells), shape, constant(best.lean, shape));
    }

    /** What the envelope is like: the leans that were looked at, the posterior, and the best shape with its level c. */
    record Envelope(List<Cell> cells, Posterior posterior, Shape shape, double constant) {

        /** The leans that matter, by far the most of the probability. */
        List<Cell> likelyCells() {
            double top = cells.stream().mapToDouble(Cell::value).max().orElseThrow();
            return cells.stream().filter(c -> c.value > top - 6).toList();
        }

        /** The logarithm of the intensity expected at an excitation error. */
        double expectedLevel(double lnStrength, double s, double g) {
            double ratio = s * s / (shape.width * shape.width + SMEAR * SMEAR * g * g);
            return constant + shape.level(lnStrength, ratio);
        }
    }

    private double constant(Vector2 lean, Shape shape) {
        double c = 0;
        for (int i = 0; i < detected; i++) {
            double s = curvature[i] - gx[i] * lean.x() - gy[i] * lean.y();
            double ratio = s * s / (shape.width * shape.width + smear[i]);
            c += constantWeight[i] * (level[i] - shape.level(lnStrength[i], ratio));
        }
        return c;
    }

    /** A lean and the logarithm of its posterior density. */
    record Cell(Vector2 lean, double value) {}

    private List<Shape> likely(Vector2 lean) {
        double[] values = new double[fine.size()];
        double top = Double.NEGATIVE_INFINITY;
        for (int i = 0; i < values.length; i++) {
            values[i] = logLikelihood(lean.x(), lean.y(), fine.get(i));
            top = Math.max(top, values[i]);
        }
        List<Shape> kept = new ArrayList<>();
        for (int i = 0; i < values.length; i++) {
            if (values[i] > top - 4) {
                kept.add(fine.get(i));
            }
        }
        return kept;
    }

    private List<Cell> grid(Vector2 middle, double reach, double step, List<Shape> shapes, int count) {
        int n = (int) Math.ceil(reach / step);
        List<Cell> cells = new ArrayList<>();
        for (int i = -n; i <= n; i++) {
            for (int j = -n; j <= n; j++) {
                Vector2 lean = middle.plus(new Vector2(i * step, j * step));
                if (lean.norm() > largestLean || Math.hypot(i, j) > n + 0.5) {
                    continue;
                }
                double sum = 0;
                double top = Double.NEGATIVE_INFINITY;
                for (Shape shape : shapes) {
                    double value = logLikelihood(lean.x(), lean.y(), shape);
                    if (value > top) {
                        sum = sum * Math.exp(top - value) + 1;
                        top = value;
                    } else {
                        sum += Math.exp(value - top);
                    }
                }
                double prior = logPrior(lean.norm());
                cells.add(new Cell(lean, TRUST * (top + Math.log(sum / count)) + prior));
            }
        }
        return cells;
    }

    /** Log density of the habit of tilting to a zone: mostly within half a degree, at times a few degrees off. */
    private static double logPrior(double lean) {
        double near = 0.5 * DEGREE;
        double far = 2.5 * DEGREE;
        return Math.log(0.7 * Math.exp(-lean / near) / (2 * Math.PI * near * near)
                + 0.3 * Math.exp(-lean / far) / (2 * Math.PI * far * far));
    }

    double logLikelihood(double leanX, double leanY, Shape shape) {
        double w2 = shape.width * shape.width;
        double[] base = new double[size];
        double c = 0;
        for (int i = 0; i < size; i++) {
            double s = curvature[i] - gx[i] * leanX - gy[i] * leanY;
            double ratio = s * s / (w2 + smear[i]);
            base[i] = shape.level(lnStrength[i], ratio);
            if (i < detected) {
                c += constantWeight[i] * (level[i] - base[i]);
            }
        }
        double a2 = FAMILY_SCATTER * FAMILY_SCATTER;
        double sum = offset;
        int from = 0;
        for (int end : familyEnd) {
            sum += family(from, end, base, c, a2);
            from = end;
        }
        for (int i = detected; i < size; i++) {
            sum += lnPhi((level[i] - base[i] - c) / Math.sqrt(a2 + variance[i]));
        }
        return sum;
    }

    /** Log-likelihood of one family: a common offset, and own deviations with the tails of Student's t. */
    private double family(int from, int end, double[] base, double c, double a2) {
        double common = 0;
        double value = 0;
        for (int round = 0; round < 3; round++) {
            double weights = 1 / a2;
            double weighted = 0;
            value = -0.5 * Math.min(CLIP * CLIP, common * common / a2);
            for (int i = from; i < end; i++) {
                double r = level[i] - base[i] - c;
                double t = (r - common) * (r - common) / variance[i] / FREEDOM;
                double w = (FREEDOM + 1) / FREEDOM / (1 + t) / variance[i];
                weights += w;
                weighted += w * r;
                if (round == 2) {
                    value -= (FREEDOM + 1) / 2 * Math.log1p(t);
                }
            }
            if (round < 2) {
                common = weighted / weights;
            }
        }
        return value;
    }

    static Posterior moments(List<Cell> cells) {
        double evidence = logSum(cells) + 2 * Math.log(STEP);
        double top = cells.stream().mapToDouble(Cell::value).max().orElse(0);
        double w = 0;
        double mx = 0;
        double my = 0;
        double xx = 0;
        double yy = 0;
        double xy = 0;
        for (Cell cell : cells) {
            double p = Math.exp(cell.value - top);
            w += p;
            mx += p * cell.lean.x();
            my += p * cell.lean.y();
            xx += p * cell.lean.x() * cell.lean.x();
            yy += p * cell.lean.y() * cell.lean.y();
            xy += p * cell.lean.x() * cell.lean.y();
        }
        if (w == 0) {
            return new Posterior(0, 0, DEGREE, DEGREE, 0, evidence);
        }
        mx /= w;
        my /= w;
        double cell = STEP * STEP / 12;
        return new Posterior(
                mx,
                my,
                Math.sqrt(Math.max(0, xx / w - mx * mx) + cell),
                Math.sqrt(Math.max(0, yy / w - my * my) + cell),
                xy / w - mx * my,
                evidence);
    }

    private static double logSum(List<Cell> cells) {
        double top = cells.stream().mapToDouble(Cell::value).max().orElse(Double.NEGATIVE_INFINITY);
        double sum = 0;
        for (Cell cell : cells) {
            sum += Math.exp(cell.value - top);
        }
        return top + Math.log(sum);
    }

    private static List<Shape> shapes(double strongest, double[] powers, double[] ceilings, double[] widths) {
        List<Shape> all = new ArrayList<>();
        for (double width : widths) {
            for (boolean gaussian : new boolean[] {false, true}) {
                for (double power : powers) {
                    all.add(new Shape(power, 1e3, width, gaussian));
                }
                for (double ceiling : ceilings) {
                    all.add(new Shape(1, strongest - ceiling, width, gaussian));
                }
            }
        }
        return List.copyOf(all);
    }

    /** ln Φ(z) from a table over −4 … 6, floored. */
    static double lnPhi(double z) {
        double t = (z + 4) * 64;
        if (t <= 0) {
            return FLOOR;
        }
        int i = (int) t;
        if (i >= LN_PHI.length - 1) {
            return 0;
        }
        return LN_PHI[i] + (t - i) * (LN_PHI[i + 1] - LN_PHI[i]);
    }

    private static double[] lnPhiTable() {
        double[] table = new double[641];
        for (int i = 0; i < table.length; i++) {
            table[i] = Math.max(FLOOR, Math.log(normalTail(-(i / 64.0 - 4))));
        }
        return table;
    }

    /** The upper tail of the normal distribution, by Simpson's rule. */
    private static double normalTail(double z) {
        int n = 400;
        double upper = Math.max(z + 1, 9);
        double h = (upper - z) / n;
        double sum = 0;
        for (int i = 0; i <= n; i++) {
            double x = z + i * h;
            double weight = i == 0 || i == n ? 1 : i % 2 == 1 ? 4 : 2;
            sum += weight * Math.exp(-x * x / 2);
        }
        return sum * h / 3 / Math.sqrt(2 * Math.PI);
    }
}
