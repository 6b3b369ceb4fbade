package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.spots.CentreCandidate;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.PatternCentre;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.CancellationException;
import java.util.function.BooleanSupplier;
import java.util.function.DoubleConsumer;

/** Sieves the peaks of the vote: a quick count of hits, then a fit and a score for those that are left. */
final class NetRanking {

    private static final double UNMATCHED = 0.3;
    private static final double ONE_ROW = 12;
    private static final double CENTRE_FLOOR = -8;
    private static final double LARGEST_ELLIPSE = 0.025;

    /** The score takes the camera constant to be known this much better than the fit does. */
    private static final double CONSTANT_SHARE = 2.0 / 3;

    private final Sighting seen;
    private final MeasuredPattern pattern;
    private final SpotCloud cloud;
    private final KnownCamera camera;
    private final double told;
    private final Optional<RotationLock> lock;
    private final PositionScore score;
    private final ReflectionStrengths strengths;

    NetRanking(Sighting seen, ReflectionStrengths strengths, KnownCamera camera, Optional<RotationLock> lock) {
        this.seen = seen;
        this.pattern = seen.pattern();
        this.cloud = seen.cloud();
        this.strengths = strengths;
        this.camera = camera;
        this.told = camera.constant();
        this.lock = lock;
        this.score = seen.score();
    }

    List<NetCandidate> rank(List<NetVote.Peak> peaks, int fitted, DoubleConsumer progress, BooleanSupplier cancelled) {
        List<Screened> screened = new ArrayList<>();
        for (NetVote.Peak peak : peaks) {
            screened.add(bestNear(peak));
        }
        screened.sort(Comparator.comparingDouble(Screened::hits).reversed());
        List<Placed> placed = new ArrayList<>();
        int count = Math.min(fitted, screened.size());
        for (int i = 0; i < count; i++) {
            stopIf(cancelled);
            Placed next = placed(screened.get(i).peak);
            if (placed.stream().noneMatch(p -> p.matchesAs(next))) {
                placed.add(next);
            }
            progress.accept(0.5 * (i + 1) / count);
        }
        List<NetCandidate> candidates = new ArrayList<>();
        weigh(placed, candidates, p -> progress.accept(0.5 + 0.25 * p), cancelled);
        List<Placed> moved = candidates.stream()
                .limit(3)
                .flatMap(c -> aboutOtherNodes(c).stream())
                .toList();
        weigh(moved, candidates, p -> progress.accept(0.75 + 0.25 * p), cancelled);
        return different(candidates);
    }

    private static void stopIf(BooleanSupplier cancelled) {
        if (cancelled.getAsBoolean()) {
            throw new CancellationException("the search was stopped");
        }
    }

    /** A net as it was fitted, before its intensities are looked at. */
    private record Placed(ZoneNet net, NetFit.Fit fit, NetFit.Prior prior, double priorScore, double position) {

        double known() {
            return priorScore + position;
        }

        /** Whether it is the same answer again, found from another place: the same nodes for the same spots. */
        boolean matchesAs(Placed other) {
            return net == other.net && Arrays.equals(fit.nodes(), other.fit.nodes());
        }
    }

    /**
     * Adds what the intensities say and keeps the list in order; what could not come among the best even if its
     * intensities were perfect is left out.
     */
    private void weigh(
            List<Placed> placed, List<NetCandidate> candidates, DoubleConsumer progress, BooleanSupplier cancelled) {
        List<Placed> sorted = placed.stream()
                .sorted(Comparator.comparingDouble(Placed::known).reversed())
                .toList();
        for (int i = 0; i < sorted.size(); i++) {
            stopIf(cancelled);
            Placed p = sorted.get(i);
            LeanFit lean = LeanFit.of(seen, p.net, p.fit, strengths);
            double least = leastTotal(candidates) - p.known();
            boolean hopeless = candidates.size() >= CrystalSearch.TRIED_AT_LEAST
                    && p.known() + lean.largestEvidence() < CrystalSearch.HOPELESS;
            if (!hopeless && lean.largestEvidence() > least) {
                double evidence = lean.evidence(least);
                if (evidence >= least) {
                    candidates.add(new NetCandidate(p.net, p.fit, p.prior, p.priorScore, lean, p.known() + evidence));
                    candidates.sort(
                            Comparator.comparingDouble(NetCandidate::total).reversed());
                }
            }
            progress.accept((i + 1.0) / sorted.size());
        }
    }

    private static double leastTotal(List<NetCandidate> candidates) {
        if (candidates.size() < CrystalSearch.TRIED_AT_LEAST) {
            return Double.NEGATIVE_INFINITY;
        }
        double least = Math.min(
                candidates.get(CrystalSearch.TRIED_AT_LEAST - 1).total(),
                Math.max(CrystalSearch.HOPELESS, candidates.get(0).total() - CrystalSearch.FAR_BEHIND));
        return candidates.size() < CrystalSearch.FINISHED
                ? least
                : Math.max(least, candidates.get(CrystalSearch.FINISHED - 1).total());
    }

    private record Screened(NetVote.Peak peak, double hits) {}

    /** The best of nine places within one cell of the vote. */
    private Screened bestNear(NetVote.Peak peak) {
        Screened best = new Screened(peak, Double.NEGATIVE_INFINITY);
        for (int k = -1; k <= 1; k++) {
            for (int r = -1; r <= 1; r++) {
                NetPose pose = peak.pose()
                        .with(
                                peak.pose().constant() * Math.exp(0.006 * k),
                                peak.pose().rotation() + Math.toRadians(0.45) * r);
                double hits = hits(peak.net(), pose);
                if (hits > best.hits) {
                    best = new Screened(new NetVote.Peak(peak.net(), pose, peak.centre(), peak.votes()), hits);
                }
            }
        }
        return best;
    }

    private double hits(ZoneNet net, NetPose pose) {
        double sum = 0;
        double area = told * told * net.nodeArea();
        NetMap map = NetMap.of(pose);
        boolean[] hit = new boolean[net.nodes().size()];
        double xx = 0;
        double yy = 0;
        double xy = 0;
        for (int i = 0; i < cloud.size(); i++) {
            double qx = map.netX(cloud.x(i), cloud.y(i));
            double qy = map.netY(cloud.x(i), cloud.y(i));
            int number = net.nearestNumber(qx, qy);
            if (number < 0 || hit[number]) {
                sum -= UNMATCHED;
                continue;
            }
            double r = Math.sqrt(qx * qx + qy * qy) * pose.constant();
            double width = Math.max(Math.max(1.2, 0.5 * pattern.spotSigma()), 0.012 * r);
            double dx = (net.flatX(number) - qx) * pose.constant();
            double dy = (net.flatY(number) - qy) * pose.constant();
            double covered = Math.PI * width * width / area;
            if (dx * dx + dy * dy < 2.25 * width * width && covered < 1) {
                hit[number] = true;
                sum -= Math.log(covered);
                ZoneNet.Node node = net.nodes().get(number);
                xx += node.x() * node.x();
                yy += node.y() * node.y();
                xy += node.x() * node.y();
            } else {
                sum -= UNMATCHED;
            }
        }
        boolean oneRow = xx * yy - xy * xy < 1e-6 * (xx + yy) * (xx + yy);
        return oneRow ? sum - ONE_ROW : sum;
    }

    private Placed placed(NetVote.Peak peak) {
        CentreCandidate centre = seen.centres().get(peak.centre());
        NetPose pose = peak.pose();
        NetFit.Prior free = camera.prior(
                new Vector2(pose.centreX(), pose.centreY()),
                seen.isGiven()
                        ? centre.centre().error()
                        : Math.max(0.5, centre.centre().error()));
        NetFit.Prior prior = lock.map(l -> l.limit(free)).orElse(free);
        return placed(peak.net(), new NetFit(cloud, prior, pattern.spotSigma()).fit(peak.net(), pose), prior, centre);
    }

    private Placed placed(ZoneNet net, NetFit.Fit fit, NetFit.Prior prior, CentreCandidate centre) {
        double offConstant =
                (Math.log(fit.pose().constant()) - prior.logConstant()) / (CONSTANT_SHARE * prior.logConstantError());
        double offEllipse = Math.hypot(fit.pose().e1() - prior.e1(), fit.pose().e2() - prior.e2());
        double ellipse = offEllipse / prior.ellipseError();
        double priorScore = centre.logWeight() - 0.5 * offConstant * offConstant - 0.5 * ellipse * ellipse;
        if (offEllipse > LARGEST_ELLIPSE) {
            priorScore -= 20;
        }
        return new Placed(net, fit, prior, priorScore, score.of(fit));
    }

    /** The same net with its centre moved to a neighbouring node, unless the direct beam is plain to see. */
    private List<Placed> aboutOtherNodes(NetCandidate c) {
        if (seen.showsDirectBeam()) {
            return List.of();
        }
        List<Placed> found = new ArrayList<>();
        NetPose pose = c.fit().pose();
        for (ZoneNet.Node node :
                c.net().nodes().subList(0, Math.min(8, c.net().nodes().size()))) {
            double x = pose.x(node.x(), node.y());
            double y = pose.y(node.x(), node.y());
            PixelPoint p = cloud.toImage(x, y);
            double weight = centreLogWeight(p);
            NetFit.Prior prior = c.prior().withCentre(x, y, 3);
            NetPose moved = pose.movedBy(x - pose.centreX(), y - pose.centreY());
            NetFit.Fit fit = new NetFit(cloud, prior, pattern.spotSigma()).fit(c.net(), moved);
            PatternCentre centre = new PatternCentre(p, 3, PatternCentre.Source.SPOT_PAIRS);
            found.add(placed(c.net(), fit, prior, new CentreCandidate(centre, weight)));
        }
        return found;
    }

    /** What the centre candidates say of a place: the best of their normal densities, with a floor. */
    private double centreLogWeight(PixelPoint p) {
        double best = CENTRE_FLOOR;
        for (CentreCandidate c : seen.centres()) {
            double d =
                    c.centre().position().distanceTo(p) / Math.max(1, c.centre().error());
            best = Math.max(best, c.logWeight() - 0.5 * d * d);
        }
        return best;
    }

    private static List<NetCandidate> different(List<NetCandidate> sorted) {
        List<NetCandidate> kept = new ArrayList<>();
        for (NetCandidate c : sorted) {
            boolean again = kept.stream()
                    .anyMatch(k -> k.net().zone().equals(c.net().zone())
                            && close(k.fit().pose(), c.fit().pose()));
            if (!again) {
                kept.add(c);
            }
        }
        return kept;
    }

    private static boolean close(NetPose a, NetPose b) {
        double turn = Math.abs(Math.IEEEremainder(a.rotation() - b.rotation(), Math.PI));
        return turn < Math.toRadians(1) && Math.hypot(a.centreX() - b.centreX(), a.centreY() - b.centreY()) < 6;
    }
}
