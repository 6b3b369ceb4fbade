package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Reflection;
import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotResponse;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.IntStream;

/**
 * What the reflections of upper layers say: which of two orientations half a turn about the zone axis apart is true, and,
 * since they pass the Ewald sphere steeply, how the crystal leans. Spots that the zero layer leaves over may be theirs;
 * a strong one that is missing speaks against the orientation that expects it.
 */
final class UpperLayers {

    /** The outcome for one of the two orientations: the log evidence and the lean with it, and the spots explained. */
    record Outcome(double evidence, LeanFit.Posterior lean, Map<Integer, Hkl> matches) {}

    /** A reflection of an upper layer: its place in the net's frame in 1/Å. */
    private record Node(Hkl hkl, Vector3 place, double lnStrength) {}

    /** Upper-layer spots were seen as far off the Ewald sphere as this, in 1/Å: in the tails of the fringes of thin foils. */
    private static final double LARGEST_EXCITATION = 0.15;

    /** Scatter of ln intensity about what the envelope expects of a single reflection. */
    private static final double DEVIATION = 1;

    /** Least log-likelihood of a missing spot: three in ten are missing for reasons that the model does not know. */
    private static final double FLOOR = -1.2;

    /** A spot shows for certain at this many times the noise above what is there; beyond so many deviations no doubt counts. */
    private static final double LIMIT = 1.7;

    private static final double CERTAIN = 6;

    private final MeasuredPattern pattern;
    private final SpotCloud cloud;
    private final PositionScore score;
    private final NetFit.Fit fit;
    private final double wavelength;
    private final ZoneNet net;
    private final ReflectionStrengths strengths;
    private final int[] left;
    private final double[] deviation;
    private final NearestSpot nearest;
    private final double faintest;
    private final NetMap map;

    UpperLayers(Sighting seen, ZoneNet net, NetFit.Fit fit, ReflectionStrengths strengths) {
        this.pattern = seen.pattern();
        this.cloud = seen.cloud();
        this.score = seen.score();
        this.fit = fit;
        this.net = net;
        this.strengths = strengths;
        this.wavelength = strengths.wavelength();
        this.left = IntStream.range(0, cloud.size())
                .filter(i -> !score.isMatched(fit, i))
                .toArray();
        // An upper-layer spot may lie a little off, since its place shifts with the lean.
        this.deviation = IntStream.of(left)
                .mapToDouble(i -> Math.hypot(score.deviation(fit, i), 0.5))
                .toArray();
        this.nearest = new NearestSpot(cloud, left, deviation, 4);
        this.faintest = Math.log(LIMIT * seen.leastNoise()) - CERTAIN * DEVIATION;
        this.map = NetMap.of(fit.pose());
    }

    /**
     * Weighs the upper layers over the likely leans. How strong they are far from the Ewald sphere, where only the tails of
     * the envelope reach, is unknown: tails as fitted and none are taken to be equally likely.
     *
     * @param turned asks for the orientation half a turn away
     */
    Outcome weigh(LeanFit.Envelope envelope, boolean turned) {
        List<LeanFit.Cell> likely = envelope.likelyCells();
        List<Node> near = within(likely, turned);
        List<LeanFit.Cell> cells = new ArrayList<>();
        LeanFit.Cell best = null;
        for (LeanFit.Cell cell : likely) {
            double[] sums = logLikelihoods(near, cell.lean(), envelope, turned, new HashMap<>());
            double top = Math.max(sums[0], sums[1]);
            LeanFit.Cell here = cell.with(top + Math.log1p(Math.exp(-Math.abs(sums[0] - sums[1]))) - Math.log(2));
            cells.add(here);
            best = best == null || here.value() > best.value() ? here : best;
        }
        Map<Integer, Hkl> matches = new HashMap<>();
        logLikelihoods(near, best.lean(), envelope, turned, matches);
        LeanFit.Posterior lean = LeanFit.moments(cells);
        return new Outcome(lean.evidence() - envelope.posterior().evidence(), lean, matches);
    }

    /** The nodes that come near the Ewald sphere at any of the leans: their s differs by no more than |g| times the lean. */
    private List<Node> within(List<LeanFit.Cell> cells, boolean turned) {
        Vector2 middle = cells.get(0).lean();
        double spread = cells.stream()
                .mapToDouble(c -> c.lean().minus(middle).norm())
                .max()
                .orElse(0);
        double sign = turned ? -1 : 1;
        Matrix3 toNet = Matrix3.ofRows(net.axis(0), net.axis(1), net.axis(2));
        Matrix3 tilt = tilt(middle);
        Vector3 down = new Vector3(sign * tilt.get(2, 0), sign * tilt.get(2, 1), tilt.get(2, 2));
        Vector3 beam = toNet.transpose().times(down);
        List<Node> near = new ArrayList<>();
        for (int i = 0; i < strengths.size(); i++) {
            double z = strengths.x(i) * beam.x() + strengths.y(i) * beam.y() + strengths.z(i) * beam.z();
            double s = excitation(z, strengths.lengthSquared(i) - z * z);
            double reach = LARGEST_EXCITATION + 1.1 * spread * Math.sqrt(strengths.lengthSquared(i));
            if (Math.abs(s) < reach && strengths.reflection(i).hkl().dot(net.zone()) != 0) {
                Reflection r = strengths.reflection(i);
                near.add(new Node(r.hkl(), toNet.times(r.g()), strengths.lnStrength(i)));
            }
        }
        return near;
    }

    private static Matrix3 tilt(Vector2 lean) {
        return Rotation.ofVector(new Vector3(-lean.y(), lean.x(), 0)).matrix();
    }

    private static Vector3 placed(Node node, Matrix3 tilt, boolean turned) {
        double sign = turned ? -1 : 1;
        return tilt.times(sign * node.place.x(), sign * node.place.y(), node.place.z());
    }

    /** The excitation error of a reflection at a height above the zero layer, whose part across the beam has this square. */
    private double excitation(double z, double across) {
        double k = 1 / wavelength;
        return z - (k - Math.sqrt(k * k - across));
    }

    /** With the tails of the envelope as fitted, whose matches are given, and without. */
    private double[] logLikelihoods(
            List<Node> near, Vector2 lean, LeanFit.Envelope envelope, boolean turned, Map<Integer, Hkl> matches) {
        Matrix3 tilt = tilt(lean);
        double[] sums = new double[2];
        double[][] gains = new double[2][left.length];
        for (Node node : near) {
            Vector3 g = placed(node, tilt, turned);
            double across = g.x() * g.x() + g.y() * g.y();
            double s = excitation(g.z(), across);
            if (Math.abs(s) > LARGEST_EXCITATION) {
                continue;
            }
            double f = 1 / Math.sqrt(1 - wavelength * wavelength * across);
            double x = map.x(g.x() * f, g.y() * f);
            double y = map.y(g.x() * f, g.y() * f);
            PixelPoint place = cloud.toImage(x, y);
            if (place.x() < 0 || place.y() < 0 || place.x() >= pattern.width() || place.y() >= pattern.height()) {
                continue;
            }
            int spot = nearest.of(x, y);
            double length = Math.sqrt(across);
            double tails = envelope.expectedLevel(node.lnStrength, s, length, false);
            if (spot < 0 && tails < faintest) {
                continue;
            }
            if (pattern.isHidden(place)) {
                continue;
            }
            double limit = limit(place);
            for (int kind = 0; kind < 2; kind++) {
                double expected = kind == 0 ? tails : envelope.expectedLevel(node.lnStrength, s, length, true);
                double missing = missing(limit, expected);
                double before = spot < 0 ? 0 : gains[kind][spot];
                double gain = spot < 0 ? Double.NEGATIVE_INFINITY : gain(spot, x, y, expected);
                if (gain > missing && gain > before) {
                    sums[kind] += gain - before;
                    gains[kind][spot] = gain;
                    if (kind == 0) {
                        matches.put(left[spot], node.hkl);
                    }
                } else if (before == 0) {
                    sums[kind] += missing;
                }
            }
        }
        return sums;
    }

    private double gain(int n, double x, double y, double expected) {
        int i = left[n];
        double s = deviation[n];
        double dx = (cloud.x(i) - x) / s;
        double dy = (cloud.y(i) - y) / s;
        double off = (cloud.logIntensity(i) - expected) / DEVIATION;
        double position = -0.5 * (dx * dx + dy * dy) - Math.log(2 * Math.PI * s * s * cloud.density(i)) + Math.log(0.8);
        return position - score.unmatched(i) - 0.5 * Math.min(off * off, 16);
    }

    /** The logarithm of the intensity below which a spot would not show; infinite where there is one. */
    private double limit(PixelPoint place) {
        SpotResponse response = pattern.measureAt(place);
        double noise = Math.max(response.noise(), 1e-12);
        return response.signal() > 3 * noise
                ? Double.POSITIVE_INFINITY
                : Math.log((Math.max(0, response.signal() / noise) + LIMIT) * noise);
    }

    private static double missing(double limit, double expected) {
        return Math.max(FLOOR, NormalTail.lnPhi((limit - expected) / DEVIATION));
    }
}
