package io.github.zonewright.spots;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.spots.SpotNet.Net;
import io.github.zonewright.spots.SpotNet.NoNet;
import io.github.zonewright.spots.SpotNet.Node;
import io.github.zonewright.spots.SpotNet.SystematicRow;
import java.math.BigInteger;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * Finds the net of measured spots. Differences between spots that occur often are tried as the net's vectors, pair by pair,
 * and each trial is fitted and weighed; a row is tried as a net whose second vector is as long as the pattern is wide. The
 * node that is the centre is the one at the given centre, or, where that is not known, the one about which most spots have a
 * partner of like intensity opposite.
 *
 * <p>Known limits: spots nearer than 3 px make no net; of two grains that with more spots on its net is taken; a net that
 * half the spots or more are off is not sought.
 */
public final class SpotNetFinder {

    private static final int STRONGEST = 60;
    private static final int VECTORS = 16;
    private static final double CENTRE_REACH = 3;
    /** Most that pairs opposite speak against a given centre, in nats: any node amid a net has many. */
    private static final double PAIRS = 6;

    private final List<MeasuredSpot> spots;
    private final Optional<PatternCentre> given;
    private final boolean beamSeen;
    private final double reach;

    private SpotNetFinder(List<MeasuredSpot> diffracted, Optional<PatternCentre> given) {
        this.given = given;
        List<MeasuredSpot> all = new ArrayList<>(diffracted.stream()
                .sorted(Comparator.comparingDouble(MeasuredSpot::intensity).reversed())
                .toList());
        beamSeen = given.isPresent() && given.get().error() < 2;
        if (beamSeen) {
            double error = given.get().error();
            all.removeIf(s -> s.position().distanceTo(given.get().position()) < Math.max(2, 3 * error));
            all.add(0, new MeasuredSpot(given.get().position(), error, 0, 0, false));
        }
        spots = List.copyOf(all);
        double far = 1;
        for (MeasuredSpot one : spots) {
            far = Math.max(far, one.position().distanceTo(spots.get(0).position()));
        }
        reach = 2 * far;
    }

    /**
     * The net of a measured pattern, about its likeliest centre.
     *
     * @param pattern the pattern
     * @return a net, a row, or none
     */
    public static SpotNet find(MeasuredPattern pattern) {
        return new SpotNetFinder(pattern.spots(), pattern.centre()).run();
    }

    /**
     * The net of spots about a centre.
     *
     * @param spots the diffracted spots; one within 2 px of the centre counts as the direct beam
     * @param centre the centre, which may be hidden; its error says how far off it may be
     * @return a net, a row, or none
     */
    public static SpotNet find(List<MeasuredSpot> spots, PatternCentre centre) {
        return new SpotNetFinder(spots, Optional.of(centre)).run();
    }

    /**
     * The net of spots with no idea of the centre, which is found from pairs g and −g.
     *
     * @param spots the spots, the direct beam perhaps among them
     * @return a net, a row, or none
     */
    public static SpotNet find(List<MeasuredSpot> spots) {
        return new SpotNetFinder(spots, Optional.empty()).run();
    }

    private SpotNet run() {
        if (spots.size() < 2) {
            return new NoNet("Spots: " + spots.size() + ". A row needs two, the direct beam included.");
        }
        List<Vector2> vectors = vectors();
        List<NetTrial> trials = new ArrayList<>();
        for (PixelPoint origin : origins()) {
            for (int i = 0; i < vectors.size(); i++) {
                Vector2 a = vectors.get(i);
                Vector2 across = new Vector2(-a.y(), a.x()).times(reach / a.norm());
                NetTrial.fit(spots, new NetBasis(origin, a, across, true), reach)
                        .ifPresent(trials::add);
                for (int j = 0; j < i; j++) {
                    NetBasis basis = new NetBasis(origin, vectors.get(j), a, false).reduced();
                    if (basis.area() > 0.3 * basis.a().norm() * basis.b().norm() && basis.area() > 9) {
                        NetTrial.fit(spots, basis, reach).ifPresent(trials::add);
                    }
                }
            }
        }
        Optional<NetTrial> best = trials.stream()
                .filter(t -> t.count() >= 2 && 2 * t.count() >= spots.size())
                .sorted(Comparator.comparingDouble((NetTrial t) -> t.score).reversed())
                .filter(t -> t.basis.row() || isBorneOut(t))
                .findFirst();
        if (best.isEmpty()) {
            return new NoNet("No net or row explains half of the " + spots.size() + " spots.");
        }
        NetBasis reduced = best.get().basis.reduced();
        NetTrial trial = NetTrial.fit(spots, reduced, reach).orElse(best.get());
        return result(trial);
    }

    /**
     * Whether a net is more than a row and one stray, which always make one: two spots must be off its longest row. Where
     * there are no more than three spots, or with the direct beam four, one will do.
     */
    private boolean isBorneOut(NetTrial trial) {
        List<int[]> nodes = new ArrayList<>();
        for (int i = 0; i < spots.size(); i++) {
            if (trial.on[i]) {
                nodes.add(trial.basis.nearest(spots.get(i).position()));
            }
        }
        int longest = 1;
        for (int[] from : nodes) {
            Map<List<Integer>, Integer> rows = new HashMap<>();
            for (int[] to : nodes) {
                BigInteger first = BigInteger.valueOf(to[0] - from[0]);
                BigInteger second = BigInteger.valueOf(to[1] - from[1]);
                int divisor = first.gcd(second).intValue();
                if (divisor > 0) {
                    boolean back = first.signum() < 0 || (first.signum() == 0 && second.signum() < 0);
                    int sign = back ? -divisor : divisor;
                    List<Integer> way = List.of(first.intValue() / sign, second.intValue() / sign);
                    longest = Math.max(longest, 1 + rows.merge(way, 1, Integer::sum));
                }
            }
        }
        int off = nodes.size() - longest;
        boolean few = nodes.size() == spots.size() && longest <= (beamSeen ? 3 : 2);
        return off >= 2 || (off == 1 && few);
    }

    /** Where to start: the spots with the most neighbours to fit outward from. */
    private List<PixelPoint> origins() {
        if (beamSeen) {
            return List.of(spots.get(0).position());
        }
        double x = spots.stream().mapToDouble(s -> s.position().x()).average().orElse(0);
        double y = spots.stream().mapToDouble(s -> s.position().y()).average().orElse(0);
        PixelPoint middle = given.map(PatternCentre::position).orElse(new PixelPoint(x, y));
        return spots.stream()
                .map(MeasuredSpot::position)
                .sorted(Comparator.comparingDouble(middle::distanceTo))
                .limit(4)
                .toList();
    }

    /** Differences between spots, the frequent and short ones first; opposite ones count as one. */
    private List<Vector2> vectors() {
        record Cluster(Vector2[] mean, int[] count) {}
        List<Cluster> clusters = new ArrayList<>();
        int used = Math.min(STRONGEST, spots.size());
        for (int i = 0; i < used; i++) {
            for (int j = 0; j < i; j++) {
                Vector2 d = spots.get(i).position().minus(spots.get(j).position());
                Vector2 half = d.x() < 0 || (d.x() == 0 && d.y() < 0) ? d.times(-1) : d;
                if (half.norm() < 3) {
                    continue;
                }
                double tolerance = 0.5 + 0.01 * half.norm();
                boolean placed = false;
                for (Cluster c : clusters) {
                    Vector2 same = c.mean[0].dot(half) < 0 ? half.times(-1) : half;
                    if (c.mean[0].minus(same).norm() < tolerance) {
                        c.mean[0] = c.mean[0].times(c.count[0]).plus(same).times(1.0 / (c.count[0] + 1));
                        c.count[0]++;
                        placed = true;
                        break;
                    }
                }
                if (!placed) {
                    clusters.add(new Cluster(new Vector2[] {half}, new int[] {1}));
                }
            }
        }
        int most = clusters.stream().mapToInt(c -> c.count[0]).max().orElse(0);
        List<Vector2> frequent = clusters.stream()
                .filter(c -> 3 * c.count[0] >= most)
                .map(c -> c.mean[0])
                .sorted(Comparator.comparingDouble(Vector2::norm))
                .limit(VECTORS)
                .toList();
        List<Vector2> result = new ArrayList<>(frequent);
        clusters.stream()
                .sorted(Comparator.comparingInt((Cluster c) -> c.count[0]).reversed())
                .map(c -> c.mean[0])
                .filter(v -> !frequent.contains(v))
                .limit(VECTORS / 2)
                .forEach(result::add);
        return result;
    }

    private SpotNet result(NetTrial trial) {
        int[] shift = centreNode(trial);
        NetBasis basis = trial.basis;
        double[][] c = trial.covariance;
        double[] g = basis.row() ? new double[] {1, shift[0]} : new double[] {1, shift[0], shift[1]};
        double variance = 0;
        for (int i = 0; i < g.length; i++) {
            for (int j = 0; j < g.length; j++) {
                variance += g[i] * g[j] * c[i][j];
            }
        }
        PatternCentre.Source source = given.isPresent() ? given.get().source() : PatternCentre.Source.SPOT_PAIRS;
        PatternCentre centre =
                new PatternCentre(basis.at(shift[0], shift[1]), Math.max(1e-6, Math.sqrt(variance)), source);
        List<Node> nodes = new ArrayList<>();
        List<MeasuredSpot> strays = new ArrayList<>();
        for (int i = beamSeen ? 1 : 0; i < spots.size(); i++) {
            MeasuredSpot spot = spots.get(i);
            int[] n = basis.nearest(spot.position());
            if (trial.on[i]) {
                double off = spot.position().distanceTo(basis.at(n[0], n[1]));
                nodes.add(new Node(spot, n[0] - shift[0], n[1] - shift[1], off));
            } else {
                strays.add(spot);
            }
        }
        if (basis.row()) {
            return new SystematicRow(centre, basis.a(), Math.sqrt(c[1][1]), nodes, strays, trial.rms);
        }
        List<List<Double>> covariance = new ArrayList<>();
        double[][] atCentre = shifted(c, g);
        for (double[] row : atCentre) {
            covariance.add(Arrays.stream(row).boxed().toList());
        }
        return new Net(centre, basis.a(), basis.b(), covariance, nodes, strays, trial.rms);
    }

    /** The covariance when the centre is another node: J·C·Jᵀ with the first row of J the node. */
    private static double[][] shifted(double[][] c, double[] g) {
        double[][] result = new double[3][3];
        double[][] j = {g, {0, 1, 0}, {0, 0, 1}};
        for (int p = 0; p < 3; p++) {
            for (int q = 0; q < 3; q++) {
                for (int r = 0; r < 3; r++) {
                    for (int s = 0; s < 3; s++) {
                        result[p][q] += j[p][r] * c[r][s] * j[q][s];
                    }
                }
            }
        }
        return result;
    }

    /** Which node is the centre: near the given one, and with like partners opposite. */
    private int[] centreNode(NetTrial trial) {
        NetBasis basis = trial.basis;
        if (given.isPresent()) {
            PatternCentre centre = given.get();
            int[] n = basis.nearest(centre.position());
            double away = basis.at(n[0], n[1]).distanceTo(centre.position());
            boolean certain = CENTRE_REACH * centre.error() < basis.a().norm() / 2;
            if (certain && away < Math.max(1, CENTRE_REACH * centre.error())) {
                return n;
            }
        }
        int[] best = {0, 0};
        double most = Double.NEGATIVE_INFINITY;
        List<int[]> candidates = candidates(trial);
        double[] pairs = candidates.stream()
                .mapToDouble(node -> pairs(trial, basis.at(node[0], node[1])))
                .toArray();
        double scale = given.isPresent()
                ? PAIRS / Math.max(PAIRS, Arrays.stream(pairs).max().orElse(0))
                : 1;
        for (int i = 0; i < pairs.length; i++) {
            int[] node = candidates.get(i);
            PixelPoint place = basis.at(node[0], node[1]);
            double prior = given.map(c -> {
                        double u = place.distanceTo(c.position())
                                / Math.max(c.error(), 0.1 * basis.a().norm());
                        return -Math.min(20, u * u / 2);
                    })
                    .orElse(0.0);
            double merit = prior + scale * pairs[i];
            if (merit > most) {
                most = merit;
                best = node;
            }
        }
        return best;
    }

    private List<int[]> candidates(NetTrial trial) {
        NetBasis basis = trial.basis;
        int low1 = 0;
        int high1 = 0;
        int low2 = 0;
        int high2 = 0;
        for (int i = 0; i < spots.size(); i++) {
            if (trial.on[i]) {
                int[] n = basis.nearest(spots.get(i).position());
                low1 = Math.min(low1, n[0]);
                high1 = Math.max(high1, n[0]);
                low2 = Math.min(low2, n[1]);
                high2 = Math.max(high2, n[1]);
            }
        }
        List<int[]> result = new ArrayList<>();
        for (int n1 = low1 - 1; n1 <= high1 + 1; n1++) {
            for (int n2 = basis.row() ? 0 : low2 - 1; n2 <= (basis.row() ? 0 : high2 + 1); n2++) {
                result.add(new int[] {n1, n2});
            }
        }
        return result;
    }

    /** Sum over spots with a partner opposite of exp(−|ln I/I′|), less a little for those without. */
    private double pairs(NetTrial trial, PixelPoint centre) {
        double sum = 0;
        double tolerance = 0.2 * trial.basis.a().norm();
        for (int i = 0; i < spots.size(); i++) {
            if (!trial.on[i] || !(spots.get(i).intensity() > 0)) {
                continue;
            }
            MeasuredSpot spot = spots.get(i);
            PixelPoint opposite = centre.plus(centre.minus(spot.position()));
            double best = 0;
            for (MeasuredSpot other : spots) {
                if (other != spot && other.intensity() > 0 && other.position().distanceTo(opposite) < tolerance) {
                    best = Math.max(best, Math.exp(-Math.abs(Math.log(spot.intensity() / other.intensity()))));
                }
            }
            sum += best;
        }
        return sum;
    }
}
