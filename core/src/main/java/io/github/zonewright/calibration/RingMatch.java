package io.github.zonewright.calibration;

import io.github.zonewright.crystal.Crystal;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;

/**
 * The camera constant with which the lines of a standard explain rings best. Every bright ring is tried as every line of the
 * first few. A ring near a line counts the more the wider the lines stand, so that a crystal of many lines gains nothing by
 * them; a strong line without a ring counts against.
 */
final class RingMatch {

    private static final int RINGS = 8;
    private static final int LINES = 14;
    /** What a radius may be off for reasons other than noise, as a part of it. */
    private static final double SYSTEMATIC = 0.0015;

    private static final double FAR = 3;
    private static final double STRAY = 0.1;
    private static final double MISSING = 3;
    /** A line is missed when it should be so many times as high as the faintest ring about there. */
    private static final double SURELY_SEEN = 3;

    private final Crystal standard;
    private final List<MeasuredRing> rings;
    private final double ringSigma;
    private final double wavelength;
    private final List<PowderLine> lines;

    private RingMatch(Crystal standard, MeasuredRings measured, double wavelength) {
        this.standard = standard;
        this.rings = measured.rings();
        this.ringSigma = measured.ringSigma();
        this.wavelength = wavelength;
        double span = rings.get(rings.size() - 1).radius().value()
                / rings.get(0).radius().value();
        List<PowderLine> first = reaching(PowderLines.of(standard, 3));
        double last = first.isEmpty()
                ? 1
                : 1 / first.get(Math.min(LINES, first.size()) - 1).d();
        this.lines = reaching(PowderLines.of(standard, Math.max(1.1 * last * span, 1)));
    }

    private List<PowderLine> reaching(List<PowderLine> all) {
        return all.stream().filter(l -> wavelength < 1.2 * l.d()).toList();
    }

    /**
     * The outcome.
     *
     * @param constant camera constant in px·Å
     * @param lines index of each ring's line, −1 for none
     * @param table the lines, joined where this constant cannot part them
     * @param missing lines that ought to show
     * @param score in nats
     */
    record Result(
            Crystal standard,
            double constant,
            int[] lines,
            List<PowderLine> table,
            List<PowderLine> missing,
            double score) {
        int explained() {
            return (int) Arrays.stream(lines).filter(l -> l >= 0).count();
        }
    }

    /** The best match with a constant in a range; empty when the standard has no lines or none can be tried. */
    static Optional<Result> of(
            Crystal standard, MeasuredRings measured, double wavelength, double smallest, double largest) {
        return new RingMatch(standard, measured, wavelength).best(smallest, largest);
    }

    private Optional<Result> best(double smallest, double largest) {
        List<MeasuredRing> bright = rings.stream()
                .sorted(Comparator.comparingDouble((MeasuredRing r) -> r.height() * r.arcs())
                        .reversed())
                .limit(RINGS)
                .toList();
        List<Result> tried = new ArrayList<>();
        for (MeasuredRing ring : bright) {
            for (PowderLine line : lines.subList(0, Math.min(LINES, lines.size()))) {
                double constant = ring.radius().value() / line.reducedRadius(wavelength);
                if (constant >= smallest && constant <= largest) {
                    tried.add(refined(constant));
                }
            }
        }
        return tried.stream()
                .filter(r -> r.constant >= smallest && r.constant <= largest)
                .max(Comparator.comparingDouble(Result::score));
    }

    private Result refined(double start) {
        Result result = at(start, 4);
        for (double wide : new double[] {2, 1, 1}) {
            double over = 0;
            double under = 0;
            for (int i = 0; i < rings.size(); i++) {
                if (result.lines[i] >= 0) {
                    double t = result.table.get(result.lines[i]).reducedRadius(wavelength);
                    double s = tolerance(rings.get(i));
                    over += t * rings.get(i).radius().value() / (s * s);
                    under += t * t / (s * s);
                }
            }
            result = at(under > 0 ? over / under : result.constant, wide);
        }
        return result;
    }

    private static double tolerance(MeasuredRing ring) {
        return Math.hypot(ring.radius().error(), SYSTEMATIC * ring.radius().value());
    }

    private Result at(double constant, double wide) {
        List<PowderLine> table = PowderLines.joined(
                lines, 1.5 * ringSigma / rings.get(rings.size() / 2).radius().value());
        double[] radii = table.stream()
                .mapToDouble(l -> constant * l.reducedRadius(wavelength))
                .toArray();
        int[] match = new int[rings.size()];
        double score = 0;
        for (int i = 0; i < match.length; i++) {
            MeasuredRing ring = rings.get(i);
            double r = ring.radius().value();
            int nearest = nearest(radii, r);
            double s = tolerance(ring);
            double off = (r - radii[nearest]) / s;
            match[i] = Math.abs(off) < FAR * wide ? nearest : -1;
            score += Math.log((1 - STRAY) * gap(radii, nearest) / (2.507 * s) * Math.exp(-off * off / 2) + STRAY);
        }
        List<PowderLine> missing = missing(table, radii, match);
        return new Result(standard, constant, match, table, missing, score - MISSING * missing.size());
    }

    private static int nearest(double[] radii, double r) {
        int at = Arrays.binarySearch(radii, r);
        int above = at >= 0 ? at : -at - 1;
        if (above == 0) {
            return 0;
        }
        return above == radii.length || r - radii[above - 1] < radii[above] - r ? above - 1 : above;
    }

    private static double gap(double[] radii, int at) {
        double below = at > 0 ? radii[at] - radii[at - 1] : radii[at];
        double above = at + 1 < radii.length ? radii[at + 1] - radii[at] : below;
        return (below + above) / 2;
    }

    /** Lines between the innermost and outermost ring that should be well above the faintest ring, and have no ring. */
    private List<PowderLine> missing(List<PowderLine> table, double[] radii, int[] match) {
        double[] scales = new double[match.length];
        int count = 0;
        Set<Integer> taken = new HashSet<>();
        for (int i = 0; i < match.length; i++) {
            if (match[i] >= 0) {
                scales[count++] = rings.get(i).height() / table.get(match[i]).strength();
                taken.add(match[i]);
            }
        }
        if (count == 0) {
            return List.of();
        }
        Arrays.sort(scales, 0, count);
        double scale = scales[count / 2];
        double inner = rings.get(0).radius().value() - ringSigma;
        double outer = rings.get(rings.size() - 1).radius().value() + ringSigma;
        double faintest = rings.stream().mapToDouble(MeasuredRing::height).min().orElse(0);
        List<PowderLine> missing = new ArrayList<>();
        for (int k = 0; k < radii.length; k++) {
            int line = k;
            boolean inside = radii[k] > inner && radii[k] < outer;
            boolean near = rings.stream().anyMatch(r -> Math.abs(r.radius().value() - radii[line]) < 3 * ringSigma);
            if (inside && !near && !taken.contains(k) && table.get(k).strength() * scale > SURELY_SEEN * faintest) {
                missing.add(table.get(k));
            }
        }
        return missing;
    }
}
