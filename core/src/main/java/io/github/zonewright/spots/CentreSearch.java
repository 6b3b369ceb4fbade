package io.github.zonewright.spots;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.spots.PatternCentre.Source;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Collectors;

/**
 * Proposes centres: the brightest spots, the points about which many spots have a partner opposite, and the centre of
 * the background, weighed by how well each agrees with the background and sharpened by the midpoints of opposite spots.
 */
final class CentreSearch {

    private static final int STRONGEST = 80;
    private static final int CLUSTERS = 6;
    private static final int BEAMS = 3;
    private static final int MOST = 9;
    /** What a bright spot is worth over a mere centre of symmetry, in nats. */
    private static final double BEAM_BONUS = 3;
    /** The same where the brightest spot is no brighter than the next. */
    private static final double LEAST_BONUS = 0.5;
    /** What it costs a centre that no spot is there, if the brightest spot elsewhere stands out. */
    private static final double NO_BEAM = -2;
    /** Scatter of a midpoint beyond that of its spots, in pixels: neighbours, unresolved doubles, pixel edges. */
    private static final double MIDPOINT_SCATTER = 0.015;

    /** A centre with a larger error, in tolerances, has too many clusters of midpoints near it to be sharpened by one. */
    private static final double BLUNT = 4;

    private static final int ROUNDS = 9;
    private static final double FREEDOM = 4;
    /** Weight of the assumed scatter of midpoints beside the one seen, in degrees of freedom. */
    private static final double PRIOR = 3;

    private final List<MeasuredSpot> spots;
    private final List<Midpoint> midpoints;
    private final Map<Cell, List<Midpoint>> byCell;
    private final Optional<GlowCentre> glow;
    private final double tolerance;

    /** A square of side twice the tolerance. */
    private record Cell(int column, int row) {}

    private record Midpoint(double x, double y, double weight, double variance) {

        double distanceTo(double otherX, double otherY) {
            return Math.sqrt((x - otherX) * (x - otherX) + (y - otherY) * (y - otherY));
        }
    }

    /** A place where a cluster may be. */
    private record Trial(double x, double y, double logWeight) {

        boolean isWithin(double reach, Cluster cluster) {
            return Math.abs(cluster.x - x) < reach && Math.hypot(cluster.x - x, cluster.y - y) < reach;
        }
    }

    /** A spot that may be the direct beam. */
    private record Beam(MeasuredSpot spot, double logWeight) {}

    /** The mean of midpoints that agree. */
    private record Cluster(double x, double y, double error, int pairs, double weight) {}

    /**
     * @param spots all spots of the pattern, the direct beam perhaps among them
     * @param sigma width of the spots in pixels
     */
    CentreSearch(List<MeasuredSpot> spots, Optional<GlowCentre> glow, double sigma) {
        this.spots = spots.stream()
                .sorted(Comparator.comparingDouble(MeasuredSpot::intensity).reversed())
                .toList();
        this.glow = glow;
        this.tolerance = Math.max(1, 0.4 * sigma);
        this.midpoints = midpoints();
        this.byCell = midpoints.stream()
                .collect(Collectors.groupingBy(midpoint -> new Cell(cell(midpoint.x), cell(midpoint.y))));
    }

    /** The candidates, best first; those that are a spot carry that spot's position. */
    List<CentreCandidate> candidates() {
        List<CentreCandidate> found = new ArrayList<>();
        double bonus = bonus();
        List<Cluster> clusters = clusters();
        double most =
                Math.max(2, clusters.stream().mapToDouble(Cluster::weight).max().orElse(1));
        for (Beam beam : beams(bonus, most)) {
            add(found, on(beam.spot), beam.logWeight);
        }
        for (Cluster cluster : clusters) {
            double weight = 0.7 * logPrior(cluster.x, cluster.y) + 2 * Math.log(cluster.weight / most);
            add(found, centre(cluster.x, cluster.y, cluster.error, Source.SPOT_PAIRS), weight);
        }
        double without = NO_BEAM * bonus / BEAM_BONUS;
        glow.ifPresent(g -> add(found, sharpened(g.x(), g.y(), g.error(), Source.BACKGROUND), without));
        return ranked(found);
    }

    /**
     * The spots that are the direct beam most likely. Where several are overexposed, it may be any of those: each gets its
     * share of the bonus, and what pairs of spots lie about it counts, as for a centre that is no spot.
     */
    private List<Beam> beams(double bonus, double most) {
        List<MeasuredSpot> full =
                spots.stream().limit(STRONGEST).filter(MeasuredSpot::saturated).toList();
        boolean tied = full.size() > 1 && spots.get(1).saturated();
        List<MeasuredSpot> among = tied ? full : spots.subList(0, Math.min(BEAMS, spots.size()));
        return among.stream()
                .map(spot -> {
                    PixelPoint place = spot.position();
                    double weight = logPrior(place.x(), place.y())
                            + Math.log(spot.intensity() / spots.get(0).intensity())
                            + bonus;
                    double pairs = weightWithin(place.x(), place.y());
                    return new Beam(
                            spot,
                            tied ? weight - Math.log(full.size()) + 2 * Math.log(Math.max(1, pairs) / most) : weight);
                })
                .sorted(Comparator.comparingDouble(Beam::logWeight).reversed())
                .limit(BEAMS)
                .toList();
    }

    private double weightWithin(double x, double y) {
        return within(x, y, tolerance).stream().mapToDouble(Midpoint::weight).sum();
    }

    /** The centre where a spot is known to be the direct beam. */
    PatternCentre on(MeasuredSpot beam) {
        PixelPoint place = beam.position();
        return sharpened(place.x(), place.y(), beam.positionError(), Source.DIRECT_BEAM);
    }

    /** What a bright spot is worth: more when one stands out from the rest, or when saturation hides which one does. */
    private double bonus() {
        if (spots.size() < 2 || spots.get(1).saturated()) {
            return BEAM_BONUS;
        }
        double standing = Math.log(spots.get(0).intensity() / spots.get(1).intensity());
        return Math.min(BEAM_BONUS, LEAST_BONUS + standing);
    }

    private double logPrior(double x, double y) {
        return glow.map(g -> g.logWeight(x, y)).orElse(0.0);
    }

    private void add(List<CentreCandidate> found, PatternCentre centre, double weight) {
        for (int i = 0; i < found.size(); i++) {
            PatternCentre other = found.get(i).centre();
            double apart = other.position().distanceTo(centre.position());
            if (apart < Math.max(tolerance, Math.min(3 * (other.error() + centre.error()), 3 * tolerance))) {
                if (found.get(i).logWeight() < weight) {
                    found.set(i, new CentreCandidate(other, weight));
                }
                return;
            }
        }
        found.add(new CentreCandidate(centre, weight));
    }

    private static List<CentreCandidate> ranked(List<CentreCandidate> found) {
        List<CentreCandidate> sorted = new ArrayList<>(found);
        sorted.sort(Comparator.comparingDouble(CentreCandidate::logWeight).reversed());
        double best = sorted.isEmpty() ? 0 : sorted.get(0).logWeight();
        return sorted.stream()
                .limit(MOST)
                .map(candidate -> new CentreCandidate(candidate.centre(), candidate.logWeight() - best))
                .toList();
    }

    private List<Midpoint> midpoints() {
        List<Midpoint> found = new ArrayList<>();
        int count = Math.min(STRONGEST, spots.size());
        for (int i = 0; i < count; i++) {
            for (int j = i + 1; j < count; j++) {
                MeasuredSpot a = spots.get(i);
                MeasuredSpot b = spots.get(j);
                PixelPoint middle = a.position().midpoint(b.position());
                double weight = Math.exp(-0.5 * Math.abs(Math.log(a.intensity() / b.intensity())));
                double variance = (a.positionError() * a.positionError() + b.positionError() * b.positionError()) / 4
                        + MIDPOINT_SCATTER * MIDPOINT_SCATTER;
                found.add(new Midpoint(middle.x(), middle.y(), weight, variance));
            }
        }
        return found;
    }

    private List<Midpoint> within(double x, double y, double radius) {
        List<Midpoint> found = new ArrayList<>();
        for (int row = cell(y - radius); row <= cell(y + radius); row++) {
            for (int column = cell(x - radius); column <= cell(x + radius); column++) {
                for (Midpoint midpoint : byCell.getOrDefault(new Cell(column, row), List.of())) {
                    if (midpoint.distanceTo(x, y) < radius) {
                        found.add(midpoint);
                    }
                }
            }
        }
        return found;
    }

    private int cell(double coordinate) {
        return (int) Math.floor(coordinate / (2 * tolerance));
    }

    private List<Cluster> clusters() {
        List<Cluster> found = new ArrayList<>();
        List<Trial> tried = new ArrayList<>();
        for (Midpoint seed : midpoints) {
            double weight = 0;
            int pairs = 0;
            for (Midpoint other : within(seed.x, seed.y, tolerance)) {
                weight += other.weight;
                pairs++;
            }
            if (pairs >= 2) {
                tried.add(new Trial(seed.x, seed.y, 0.7 * logPrior(seed.x, seed.y) + 2 * Math.log(weight)));
            }
        }
        while (found.size() < CLUSTERS && !tried.isEmpty()) {
            Trial best = heaviest(tried);
            Cluster fine = mean(best.x, best.y, tolerance);
            if (fine.pairs >= 2) {
                found.add(fine);
                tried.removeIf(trial -> trial == best || trial.isWithin(2 * tolerance, fine));
            } else {
                tried.remove(best);
            }
        }
        return found;
    }

    /** The first of those with the greatest weight; so few are asked for that sorting them all would take longer. */
    private static Trial heaviest(List<Trial> trials) {
        Trial best = trials.get(0);
        for (Trial trial : trials) {
            best = trial.logWeight > best.logWeight ? trial : best;
        }
        return best;
    }

    /**
     * The mean of the midpoints near a place, moved and narrowed until they agree. Each weighs by its variance as in a
     * Student distribution of four degrees of freedom, so that a midpoint of two spots that are no pair counts little; at
     * first with all as if they scattered over the reach.
     */
    private Cluster mean(double startX, double startY, double reach) {
        double x = startX;
        double y = startY;
        double radius = reach;
        double blur = reach / 3;
        Cluster result = new Cluster(x, y, reach, 0, 0);
        for (int round = 0; round < ROUNDS; round++) {
            double sumX = 0;
            double sumY = 0;
            double precision = 0;
            double squares = 0;
            double weight = 0;
            int pairs = 0;
            for (Midpoint midpoint : within(x, y, radius)) {
                double square = Math.pow(midpoint.distanceTo(x, y), 2);
                double variance = midpoint.variance + blur * blur;
                double p = (FREEDOM + 2) / (FREEDOM * variance + square);
                sumX += p * midpoint.x;
                sumY += p * midpoint.y;
                precision += p;
                squares += p * square / 2;
                weight += midpoint.weight;
                pairs++;
            }
            if (pairs == 0) {
                break;
            }
            x = sumX / precision;
            y = sumY / precision;
            double misfit = (squares + PRIOR) / (pairs - 1 + PRIOR);
            result = new Cluster(x, y, Math.sqrt(misfit / precision), pairs, weight);
            radius = Math.max(tolerance, radius / 2);
            blur = round < ROUNDS - 3 ? blur / 2 : 0;
        }
        return result;
    }

    /** A centre moved to where the spots' midpoints near it agree, if at least three do. */
    private PatternCentre sharpened(double x, double y, double error, Source source) {
        if (error > BLUNT * tolerance) {
            return centre(x, y, error, source);
        }
        Cluster pairs = mean(x, y, Math.max(1.5 * tolerance, 3 * error));
        if (pairs.pairs < 3 || Math.hypot(pairs.x - x, pairs.y - y) > Math.max(tolerance, 4 * error)) {
            return centre(x, y, error, source);
        }
        double own = 1 / (error * error);
        double theirs = 1 / (pairs.error * pairs.error);
        return centre(
                (own * x + theirs * pairs.x) / (own + theirs),
                (own * y + theirs * pairs.y) / (own + theirs),
                1 / Math.sqrt(own + theirs),
                source == Source.BACKGROUND ? Source.SPOT_PAIRS : source);
    }

    private static PatternCentre centre(double x, double y, double error, Source source) {
        return new PatternCentre(new PixelPoint(x, y), error, source);
    }
}
