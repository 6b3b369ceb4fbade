package io.github.zonewright.spots;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Stream;

/**
 * Measures spots that run into each other. Peaks nearer than {@value #LINKED} spot widths are fitted together, so that they
 * do not push on each other; and a peak whose surroundings are not round is fitted with one, two and three spots of
 * the shape that the other spots of the image have, and counts as more than one where that explains its pixels better than a
 * single spot which departs from that shape by as much as others do.
 */
final class OverlapSearch {

    /** Peaks nearer than this many spot widths are fitted together. */
    private static final double LINKED = 4.5;
    /** Spots found in one peak are at least so far apart; nearer ones look like one that is large. */
    private static final double APART = 1.15;
    /** Peaks within this many widths take part as bystanders. */
    private static final double BESIDE = 7;
    /** How far around a peak pixels take part. */
    private static final double REACH = 3.2;
    /** No more peaks than this are fitted together, and no more spots. */
    private static final int MOST = 4;
    /** Least signal to noise of a peak that may be two. */
    private static final double CLEAR = 10;
    /** By how much chi square has to fall for one spot more, over its spread. */
    private static final double GAIN = 40;
    /** Squared departure from the expected shape, in standard deviations, up to which a shape is ordinary. */
    private static final double ORDINARY = 12;
    /** The fainter of two spots in one peak has at least this part of the height of the other. */
    private static final double FAINTEST = 0.1;
    /** And its height is at least so many of its errors. */
    private static final double SURE = 6;
    /** How far a fitted spot may be from its peak, in spot widths. */
    private static final double MOVED = 0.8;
    /** Where the fit of two spots in the place of one starts: their distances from it, and their heights in parts of its. */
    private static final double PARTED = 0.8;

    private static final double PART = 0.7;
    /** Where a fit of a lone peak starts. */
    private static final double[][] HERE = {{0, 0, 0}};
    /** Distance from the frame's edge, in widths, within which peaks are left as they are. */
    private static final double MARGIN = 2.5;

    private final SpotSamples.Source source;
    private final SpotGauge gauge;
    private final double sigma;
    private final List<PeakSearch.Peak> peaks;
    private final Set<PeakSearch.Peak> drawnOut;
    private final Map<PeakSearch.Peak, List<PeakSearch.Peak>> neighbours = new LinkedHashMap<>();
    private CommonShape common;

    /**
     * @param peaks the peaks that are spots
     * @param drawnOut those that are spots only if they are more than one each
     */
    OverlapSearch(SpotSamples.Source source, List<PeakSearch.Peak> peaks, List<PeakSearch.Peak> drawnOut) {
        this.source = source;
        this.gauge = source.gauge();
        this.sigma = gauge.sigma();
        this.peaks = peaks;
        this.drawnOut = new HashSet<>(drawnOut);
        List<PeakSearch.Peak> sorted = new ArrayList<>(peaks);
        sorted.addAll(drawnOut);
        sorted.sort(Comparator.comparingDouble(PeakSearch.Peak::x));
        for (PeakSearch.Peak peak : sorted) {
            neighbours.put(peak, new ArrayList<>());
        }
        for (int i = 0; i < sorted.size(); i++) {
            PeakSearch.Peak peak = sorted.get(i);
            for (int j = i + 1; j < sorted.size() && sorted.get(j).x() - peak.x() < BESIDE * sigma; j++) {
                PeakSearch.Peak other = sorted.get(j);
                if (other.distanceTo(peak.x(), peak.y()) < BESIDE * sigma) {
                    neighbours.get(peak).add(other);
                    neighbours.get(other).add(peak);
                }
            }
        }
    }

    /** All spots: those of peaks that stand alone as the gauge has them. */
    List<MeasuredSpot> spots() {
        List<MeasuredSpot> spots = new ArrayList<>();
        Set<PeakSearch.Peak> done = new HashSet<>();
        for (PeakSearch.Peak peak : neighbours.keySet()) {
            if (done.contains(peak)) {
                continue;
            }
            List<PeakSearch.Peak> group = group(peak);
            boolean fits = group.size() <= MOST && (group.size() > 1 || drawnOut.contains(peak) || isOdd(peak));
            List<PeakSearch.Peak> together = fits ? group : List.of(peak);
            done.addAll(together);
            spots.addAll(fits ? measured(together) : single(together));
        }
        return spots;
    }

    private List<MeasuredSpot> single(List<PeakSearch.Peak> group) {
        return round(group).stream().map(gauge::spot).toList();
    }

    private List<PeakSearch.Peak> round(List<PeakSearch.Peak> group) {
        return group.stream().filter(peak -> !drawnOut.contains(peak)).toList();
    }

    /** The peaks that hang together with one, itself the first; some of them where they are too many. */
    private List<PeakSearch.Peak> group(PeakSearch.Peak first) {
        List<PeakSearch.Peak> group = new ArrayList<>(List.of(first));
        for (int i = 0; i < group.size() && group.size() <= MOST; i++) {
            PeakSearch.Peak peak = group.get(i);
            for (PeakSearch.Peak other : neighbours.get(peak)) {
                if (!group.contains(other) && other.distanceTo(peak.x(), peak.y()) < LINKED * sigma) {
                    group.add(other);
                }
            }
        }
        return group;
    }

    /** Whether a peak is clear, away from edges, and not round. */
    private boolean isOdd(PeakSearch.Peak peak) {
        return peak.signalToNoise() > CLEAR
                && isWhole(peak)
                && Roundness.of(gauge, peak).isOdd();
    }

    private boolean isWhole(PeakSearch.Peak peak) {
        double margin = MARGIN * sigma;
        return peak.x() > margin
                && peak.y() > margin
                && peak.x() < gauge.response().width() - margin
                && peak.y() < gauge.response().height() - margin
                && !gauge.isSaturated(peak, MARGIN * sigma);
    }

    private List<MeasuredSpot> measured(List<PeakSearch.Peak> group) {
        if (!group.stream().allMatch(this::isWhole)) {
            return single(group);
        }
        return SpotSamples.around(source, group, bystanders(group), common(), REACH)
                .flatMap(samples -> fitted(group, samples))
                .map(result -> spots(group.get(0), result))
                .orElseGet(() -> single(group));
    }

    private List<PeakSearch.Peak> bystanders(List<PeakSearch.Peak> group) {
        return group.stream()
                .flatMap(peak -> neighbours.get(peak).stream())
                .distinct()
                .filter(peak -> !group.contains(peak))
                .toList();
    }

    /** The peaks of a group, and perhaps more, fitted together; empty when that brings nothing. */
    private Optional<SpotFit.Result> fitted(List<PeakSearch.Peak> group, SpotSamples samples) {
        SpotFit fit = new SpotFit(samples, common().expected(), true);
        Optional<SpotFit.Result> first = first(group, fit);
        if (first.isEmpty()) {
            return Optional.empty();
        }
        SpotFit.Result best = first.get();
        while (best.spots().length < MOST && !isExplained(best, samples)) {
            Optional<SpotFit.Result> more = withOneMore(fit, samples, best);
            if (more.isEmpty() || !isBetter(more.get(), best)) {
                break;
            }
            best = more.get();
        }
        boolean whole = best.spots().length > 1 || !drawnOut.contains(group.get(0)) && isBeside(HERE, best);
        return whole ? Optional.of(best) : Optional.empty();
    }

    /** Whether spots of an ordinary shape leave nothing over that a further one could explain. */
    private boolean isExplained(SpotFit.Result result, SpotSamples samples) {
        return result.chiSquare() < samples.perfect() + GAIN
                && common().expected().departure(result.shape()) < ORDINARY;
    }

    /** The fit of a group's round peaks; or of all, if the others add enough to it. */
    private Optional<SpotFit.Result> first(List<PeakSearch.Peak> group, SpotFit fit) {
        PeakSearch.Peak origin = group.get(0);
        List<PeakSearch.Peak> round = round(group);
        double[][] start = start(origin, round.isEmpty() ? List.of(origin) : round);
        Optional<SpotFit.Result> fewer = fit.from(start);
        if (start.length < group.size()) {
            double[][] wholeStart = start(origin, group);
            Optional<SpotFit.Result> whole = fit.from(wholeStart).filter(result -> isBeside(wholeStart, result));
            if (whole.isPresent() && (fewer.isEmpty() || isBetter(whole.get(), fewer.get()))) {
                return whole;
            }
        }
        return fewer.filter(result -> start.length == 1 || isBeside(start, result));
    }

    private double[][] start(PeakSearch.Peak origin, List<PeakSearch.Peak> peaks) {
        return peaks.stream()
                .map(peak -> new double[] {
                    (peak.x() - origin.x()) / sigma,
                    (peak.y() - origin.y()) / sigma,
                    peak.height() / common().responseOfHeight()
                })
                .toArray(double[][]::new);
    }

    private static boolean isBeside(double[][] start, SpotFit.Result result) {
        for (int k = 0; k < start.length; k++) {
            double[] spot = result.spots()[k];
            if (Math.hypot(spot[0] - start[k][0], spot[1] - start[k][1]) > MOVED
                    || spot[2] < SURE / 2 * result.heightError()[k]) {
                return false;
            }
        }
        return true;
    }

    private static boolean isBetter(SpotFit.Result more, SpotFit.Result fewer) {
        double highest =
                Arrays.stream(more.spots()).mapToDouble(spot -> spot[2]).max().orElse(0);
        for (int i = 0; i < more.spots().length; i++) {
            double height = more.spots()[i][2];
            if (height < FAINTEST * highest || height < SURE * more.heightError()[i]) {
                return false;
            }
            for (int j = 0; j < i; j++) {
                double error = Math.hypot(more.error()[i], more.error()[j]);
                if (more.distance(i, j) < Math.max(APART, 3 * error)) {
                    return false;
                }
            }
        }
        return fewer.chiSquare() - more.chiSquare() > GAIN * Math.max(1, more.spread());
    }

    /** The spots of a fit and one more, where most is left over; or two in the place of one that is drawn out. */
    private Optional<SpotFit.Result> withOneMore(SpotFit fit, SpotSamples samples, SpotFit.Result result) {
        double[][] start = Arrays.copyOf(result.spots(), result.spots().length + 1);
        start[start.length - 1] =
                samples.mostLeftOver(result.spots(), common().expected().shape());
        Optional<SpotFit.Result> more = fit.from(start);
        if (result.spots().length > 1) {
            return more;
        }
        double azimuth = result.shape().azimuth(common().expected().shape());
        double dx = PARTED * Math.cos(azimuth);
        double dy = PARTED * Math.sin(azimuth);
        double[] one = result.spots()[0];
        double height = PART * one[2];
        Optional<SpotFit.Result> parted = fit.from(
                new double[] {one[0] - dx, one[1] - dy, height}, new double[] {one[0] + dx, one[1] + dy, height});
        return Stream.concat(more.stream(), parted.stream()).min(Comparator.comparingDouble(SpotFit.Result::chiSquare));
    }

    private CommonShape common() {
        if (common == null) {
            common = CommonShape.of(
                    source,
                    peaks.stream()
                            .filter(peak -> neighbours.get(peak).isEmpty() && isWhole(peak))
                            .toList());
        }
        return common;
    }

    private List<MeasuredSpot> spots(PeakSearch.Peak origin, SpotFit.Result result) {
        List<MeasuredSpot> spots = new ArrayList<>();
        for (int k = 0; k < result.spots().length; k++) {
            double[] spot = result.spots()[k];
            PeakSearch.Peak peak = new PeakSearch.Peak(
                    origin.x() + sigma * spot[0],
                    origin.y() + sigma * spot[1],
                    common().responseOfHeight() * spot[2],
                    origin.noise(),
                    origin.curvature(),
                    1);
            spots.add(gauge.spot(
                    peak, Math.hypot(sigma * result.error()[k], gauge.errors().floor())));
        }
        return spots;
    }
}
