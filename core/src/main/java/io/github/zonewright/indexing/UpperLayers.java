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

    private record Node(Hkl hkl, Vector3 place, double lnStrength) {}

    /** Upper-layer spots were seen as far off the Ewald sphere as this, in 1/Å: in the tails of the fringes of thin foils. */
    private static final double LARGEST_EXCITATION = 0.15;

    /** Scatter of ln intensity about what the envelope expects of a single reflection. */
    private static final double DEVIATION = 1;

    /** Least log-likelihood of a missing spot: three in ten are missing for reasons that the model does not know. */
    private static final double FLOOR = -1.2;

    private final MeasuredPattern pattern;
    private final SpotCloud cloud;
    private final PositionScore score;
    private final NetFit.Fit fit;
    private final double wavelength;
    private final List<Node> nodes = new ArrayList<>();
    private final int[] left;
    private final double[] deviation;

    UpperLayers(
            MeasuredPattern pattern,
            SpotCloud cloud,
            PositionScore score,
            ZoneNet net,
            NetFit.Fit fit,
            ReflectionStrengths strengths) {
        this.pattern = pattern;
        this.cloud = cloud;
        this.score = score;
        this.fit = fit;
        this.wavelength = strengths.wavelength();
        this.left = IntStream.range(0, cloud.size())
                .filter(i -> !score.isMatched(fit, i))
                .toArray();
        // An upper-layer spot may lie a little off, since its place shifts with the lean.
        this.deviation = IntStream.of(left)
                .mapToDouble(i -> Math.hypot(score.deviation(fit, i), 0.5))
                .toArray();
        double reach = Math.toRadians(12) * strengths.largestG() + LARGEST_EXCITATION;
        for (Reflection r : strengths.reflections()) {
            if (r.hkl().dot(net.zone()) != 0) {
                Vector3 g = r.g();
                Vector3 p = new Vector3(g.dot(net.axis(0)), g.dot(net.axis(1)), g.dot(net.axis(2)));
                if (Math.abs(p.z() - wavelength * (p.x() * p.x() + p.y() * p.y()) / 2) < reach) {
                    nodes.add(new Node(r.hkl(), p, Math.log(strengths.strength(r.hkl()))));
                }
            }
        }
    }

    /**
     * Weighs the upper layers over the likely leans. How strong they are far from the Ewald sphere, where only the tails of
     * the envelope reach, is unknown: tails as fitted and none are taken to be equally likely.
     *
     * @param turned asks for the orientation half a turn away
     */
    Outcome weigh(LeanFit.Envelope envelope, boolean turned) {
        List<LeanFit.Cell> cells = new ArrayList<>();
        LeanFit.Cell best = null;
        for (LeanFit.Cell cell : envelope.likelyCells()) {
            double tails = logLikelihood(cell.lean(), envelope, turned, false, new HashMap<>());
            double none = logLikelihood(cell.lean(), envelope, turned, true, new HashMap<>());
            LeanFit.Cell here =
                    cell.with(Math.max(tails, none) + Math.log1p(Math.exp(-Math.abs(tails - none))) - Math.log(2));
            cells.add(here);
            best = best == null || here.value() > best.value() ? here : best;
        }
        Map<Integer, Hkl> matches = new HashMap<>();
        logLikelihood(best.lean(), envelope, turned, false, matches);
        LeanFit.Posterior lean = LeanFit.moments(cells);
        return new Outcome(lean.evidence() - envelope.posterior().evidence(), lean, matches);
    }

    private double logLikelihood(
            Vector2 lean, LeanFit.Envelope envelope, boolean turned, boolean sharp, Map<Integer, Hkl> matches) {
        Matrix3 tilt = Rotation.ofVector(new Vector3(-lean.y(), lean.x(), 0)).matrix();
        double sign = turned ? -1 : 1;
        double sum = 0;
        double k = 1 / wavelength;
        Map<Integer, Double> gains = new HashMap<>();
        for (Node node : nodes) {
            Vector3 g = tilt.times(sign * node.place.x(), sign * node.place.y(), node.place.z());
            double across = g.x() * g.x() + g.y() * g.y();
            double s = g.z() - (k - Math.sqrt(k * k - across));
            if (Math.abs(s) > LARGEST_EXCITATION) {
                continue;
            }
            double expected = envelope.expectedLevel(node.lnStrength, s, Math.sqrt(across), sharp);
            double f = 1 / Math.sqrt(1 - wavelength * wavelength * across);
            double x = fit.pose().x(g.x() * f, g.y() * f);
            double y = fit.pose().y(g.x() * f, g.y() * f);
            PixelPoint place = cloud.toImage(x, y);
            if (pattern.isHidden(place)) {
                continue;
            }
            int spot = nearest(x, y);
            double gain = spot < 0 ? Double.NEGATIVE_INFINITY : gain(spot, x, y, expected);
            double missing = missing(place, expected);
            if (gain > missing && gain > gains.getOrDefault(spot, 0.0)) {
                sum += gain - gains.getOrDefault(spot, 0.0);
                gains.put(spot, gain);
                matches.put(left[spot], node.hkl);
            } else if (spot < 0 || !gains.containsKey(spot)) {
                sum += missing;
            }
        }
        return sum;
    }

    private int nearest(double x, double y) {
        int best = -1;
        double least = Double.POSITIVE_INFINITY;
        for (int n = 0; n < left.length; n++) {
            double dx = cloud.x(left[n]) - x;
            double dy = cloud.y(left[n]) - y;
            double d2 = dx * dx + dy * dy;
            if (d2 < least && d2 < 16 * deviation[n] * deviation[n]) {
                least = d2;
                best = n;
            }
        }
        return best;
    }

    private double gain(int n, double x, double y, double expected) {
        int i = left[n];
        double s = deviation[n];
        double d = Math.hypot(cloud.x(i) - x, cloud.y(i) - y) / s;
        double off = (cloud.logIntensity(i) - expected) / DEVIATION;
        double position = -0.5 * d * d - Math.log(2 * Math.PI * s * s * cloud.density(i)) + Math.log(0.8);
        return position - score.unmatched(i) - 0.5 * Math.min(off * off, 16);
    }

    private double missing(PixelPoint place, double expected) {
        SpotResponse response = pattern.measureAt(place);
        double noise = Math.max(response.noise(), 1e-12);
        double limit = Math.log((Math.max(0, Math.min(3, response.signal() / noise)) + 1.7) * noise);
        if (response.signal() > 3 * noise) {
            return 0;
        }
        return Math.max(FLOOR, NormalTail.lnPhi((limit - expected) / DEVIATION));
    }
}
