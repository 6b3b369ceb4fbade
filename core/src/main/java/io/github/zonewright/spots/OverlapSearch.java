package io.github.zonewright.spots;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
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
    private final List<Node> nodes = new ArrayList<>();
    private final List<Node> fromLeft;
    private CommonShape common;

    /** A peak and those beside it. */
    private static final class Node {

        private final PeakSearch.Peak peak;
        private final boolean drawnOut;
        private final List<Node> neighbours = new ArrayList<>(0);
        private boolean done;

        Node(PeakSearch.Peak peak, boolean drawnOut) {
            this.peak = peak;
            this.drawnOut = drawnOut;
        }
    }

    /**
     * @param peaks the peaks that are spots
     * @param drawnOut those that are spots only if they are more than one each
     */
    OverlapSearch(SpotSamples.Source source, List<PeakSearch.Peak> peaks, List<PeakSearch.Peak> drawnOut) {
        this.source = source;
        this.gauge = source.gauge();
        this.sigma = gauge.sigma();
        peaks.forEach(peak -> nodes.add(new Node(peak, false)));
        drawnOut.forEach(peak -> nodes.add(new Node(peak, true)));
        fromLeft = new ArrayList<>(nodes);
        fromLeft.sort(Comparator.comparingDouble(node -> node.peak.x()));
        double beside = BESIDE * sigma;
        for (int i = 0; i < nodes.size(); i++) {
            Node node = fromLeft.get(i);
            double x = node.peak.x();
            double y = node.peak.y();
            for (int j = i + 1; j < nodes.size() && fromLeft.get(j).peak.x() - x < beside; j++) {
                Node other = fromLeft.get(j);
                if (Math.abs(other.peak.y() - y) < beside && other.peak.distanceTo(x, y) < beside) {
                    node.neighbours.add(other);
                    other.neighbours.add(node);
                }
            }
        }
    }

    /** All spots: those of peaks that stand alone as the gauge has them. */
    List<MeasuredSpot> spots() {
        List<MeasuredSpot> spots = new ArrayList<>();
        for (Node node : fromLeft) {
            if (node.done) {
                continue;
            }
            List<Node> group = group(node);
            if (group.size() <= MOST && (group.size() > 1 || node.drawnOut || isOdd(node.peak))) {
                group.forEach(member -> member.done = true);
                spots.addAll(measured(group));
            } else if (!node.drawnOut) {
                spots.add(gauge.spot(node.peak));
            }
        }
        return spots;
    }

    private List<MeasuredSpot> single(List<Node> group) {
        return round(group).stream().map(gauge::spot).toList();
    }

    private static List<PeakSearch.Peak> round(List<Node> group) {
        return group.stream()
                .filter(node -> !node.drawnOut)
                .map(node -> node.peak)
                .toList();
    }

    private static List<PeakSearch.Peak> peaks(List<Node> group) {
        return group.stream().map(node -> node.peak).toList();
    }

    /** The peaks that hang together with one, itself the first; some of them where they are too many. */
    private List<Node> group(Node first) {
        if (first.neighbours.isEmpty()) {
            return List.of(first);
        }
        List<Node> group = new ArrayList<>(List.of(first));
        for (int i = 0; i < group.size() && group.size() <= MOST; i++) {
            Node node = group.get(i);
            for (Node other : node.neighbours) {
                if (!group.contains(other) && other.peak.distanceTo(node.peak.x(), node.peak.y()) < LINKED * sigma) {
                    group.add(other);
                }
            }
        }
        return group;
    }

    /** Whether a peak is clear, away from edges, and not round. */
    private boolean isOdd(PeakSearch.Peak peak) {
        return peak.signalToNoise() > CLEAR && isWhole(peak) && Roundness.isOdd(gauge, peak);
    }

    private boolean isWhole(PeakSearch.Peak peak) {
        double margin = MARGIN * sigma;
        return peak.x() > margin
                && peak.y() > margin
                && peak.x() < gauge.response().width() - margin
                && peak.y() < gauge.response().height() - margin
                && !gauge.isSaturated(peak, MARGIN * sigma);
    }

    private List<MeasuredSpot> measured(List<Node> group) {
        if (!group.stream().allMatch(node -> isWhole(node.peak))) {
            return single(group);
        }
        return SpotSamples.around(source, peaks(group), bystanders(group), common(), REACH)
                .flatMap(samples -> fitted(group, samples))
                .map(result -> spots(group.get(0).peak, result))
                .orElseGet(() -> single(group));
    }

    private static List<PeakSearch.Peak> bystanders(List<Node> group) {
        return group.stream()
                .flatMap(node -> node.neighbours.stream())
                .distinct()
                .filter(node -> !group.contains(node))
                .map(node -> node.peak)
                .toList();
    }

    /** The peaks of a group, and perhaps more, fitted together; empty when that brings nothing. */
    private Optional<SpotFit.Result> fitted(List<Node> group, SpotSamples samples) {
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
        boolean whole = best.spots().length > 1 || !group.get(0).drawnOut && isBeside(HERE, best);
        return whole ? Optional.of(best) : Optional.empty();
    }

    /** Whether spots of an ordinary shape leave nothing over that a further one could explain. */
    private boolean isExplained(SpotFit.Result result, SpotSamples samples) {
        return result.chiSquare() < samples.perfect() + GAIN
                && common().expected().departure(result.shape()) < ORDINARY;
    }

    /** The fit of a group's round peaks; or of all, if the others add enough to it. */
    private Optional<SpotFit.Result> first(List<Node> group, SpotFit fit) {
        PeakSearch.Peak origin = group.get(0).peak;
        List<PeakSearch.Peak> round = round(group);
        double[][] start = start(origin, round.isEmpty() ? List.of(origin) : round);
        Optional<SpotFit.Result> fewer = fit.from(start);
        if (start.length < group.size()) {
            double[][] wholeStart = start(origin, peaks(group));
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
                    peaks(nodes.stream()
                            .filter(node -> !node.drawnOut && node.neighbours.isEmpty() && isWhole(node.peak))
                            .toList()));
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
