package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;

/**
 * Refines a placement of which some parameters are locked: they come out as they went in, bit for bit. The zone axis
 * always stays.
 *
 * <p>Known limits: as {@link Refinement}, but reflections of upper layers are not used, so that two orientations half a turn
 * about the zone axis apart are told apart by symmetry alone; and the start has to lie on its spots to within some 2 % of
 * their distance from the centre.
 */
public final class LockedRefinement {

    /** What can be locked. */
    public enum Lock {
        /** The rotation in the image plane. */
        ROTATION,
        /** How the zone axis leans, in amount and direction. */
        LEAN,
        /** Where the direct beam meets the image. */
        CENTRE,
        /** The camera constant. */
        CAMERA_CONSTANT,
        /** The elliptical distortion. */
        ELLIPSE
    }

    /** Spots are matched in rounds within these shares of their distance from the centre. */
    private static final double[] ROUNDS = {0.022, 0.016, 0.012, 0.007, 0.004, 0.004};

    private static final int LEAST_MATCHES = 3;
    private static final double CENTRE_ERROR = 5;

    private LockedRefinement() {}

    /**
     * Refines what is not locked.
     *
     * @param pattern the measured spots
     * @param start the placement to start from
     * @param locks what stays as it is; none leaves all but the zone free
     * @return the refined solution; empty when fewer than three spots lie where the placement has reflections, or they do not
     *     determine what is free
     */
    public static Optional<Solution> refine(MeasuredPattern pattern, Placement start, Set<Lock> locks) {
        ReflectionStrengths strengths = new ReflectionStrengths(
                start.crystal(),
                start.beam(),
                OrientationSearch.largestG(
                        pattern, start.camera().centre(), start.camera().constant()));
        return ZoneNet.of(start.setting().zone(), strengths, start.setting().reference())
                .flatMap(net -> refine(
                        Sighting.of(pattern, start.camera().mirrored(), Optional.empty()),
                        net,
                        start,
                        strengths,
                        locks));
    }

    private static Optional<Solution> refine(
            Sighting seen, ZoneNet net, Placement start, ReflectionStrengths strengths, Set<Lock> locks) {
        Placement at = start;
        Optional<LockedFit.Result> result = Optional.empty();
        for (double tolerance : ROUNDS) {
            Map<MeasuredSpot, Hkl> spots = matches(seen, match(seen, net, at, tolerance));
            if (spots.size() < LEAST_MATCHES) {
                return Optional.empty();
            }
            result = LockedFit.fit(at, spots, freedom(locks, 0));
            if (result.isEmpty()) {
                return Optional.empty();
            }
            at = result.get().placement();
        }
        NetFit.Fit fit = match(seen, net, at, ROUNDS[ROUNDS.length - 1]);
        LeanFit.Posterior lean =
                LeanFit.of(seen, net, fit, strengths).envelope().posterior();
        if (!locks.contains(Lock.LEAN)) {
            Vector2 mean = new Vector2(lean.x(), lean.y()).rotate(at.setting().rotation());
            ZoneSetting s = at.setting();
            at = at.withSetting(new ZoneSetting(s.zone(), s.reference(), s.rotation(), mean.x(), mean.y()));
        }
        Map<MeasuredSpot, Hkl> spots = matches(seen, fit);
        double score = seen.score().of(fit) + lean.evidence();
        double leanError = lean.spread() / Math.sqrt(2);
        return LockedFit.fit(at, spots, freedom(locks, leanError)).map(r -> solution(seen, r, spots, score));
    }

    /** The lean comes from the intensities: until they are read it stays, afterwards positions may move it within its error. */
    private static LockedFit.Freedom freedom(Set<Lock> locks, double leanError) {
        double tolerance = Refinement.DEFAULT_TOLERANCE;
        return new LockedFit.Freedom(
                locks.contains(Lock.ROTATION) ? 0 : Math.PI,
                locks.contains(Lock.LEAN) ? 0 : leanError,
                locks.contains(Lock.CENTRE) ? 0 : CENTRE_ERROR,
                locks.contains(Lock.CAMERA_CONSTANT) ? 0 : tolerance,
                locks.contains(Lock.ELLIPSE) ? 0 : 0.4 * tolerance);
    }

    private static NetFit.Fit match(Sighting seen, ZoneNet net, Placement at, double tolerance) {
        NetPose pose = Refinement.pose(at, seen.cloud());
        NetFit.Prior prior = KnownCamera.of(
                        at.camera().constant(),
                        Refinement.DEFAULT_TOLERANCE,
                        at.camera().mirrored())
                .prior(new Vector2(pose.centreX(), pose.centreY()), CENTRE_ERROR);
        return new NetFit(seen.cloud(), prior, seen.pattern().spotSigma())
                .match(net, pose, tolerance, Double.POSITIVE_INFINITY, false);
    }

    private static Map<MeasuredSpot, Hkl> matches(Sighting seen, NetFit.Fit fit) {
        Map<MeasuredSpot, Hkl> spots = new LinkedHashMap<>();
        for (int i = 0; i < seen.cloud().size(); i++) {
            if (fit.nodes()[i] != null) {
                spots.put(seen.cloud().spot(i), fit.nodes()[i].hkl());
            }
        }
        return spots;
    }

    private static Solution solution(
            Sighting seen, LockedFit.Result result, Map<MeasuredSpot, Hkl> spots, double score) {
        List<SpotMatch> matches = new ArrayList<>();
        List<MeasuredSpot> unexplained = new ArrayList<>();
        double squares = 0;
        for (MeasuredSpot spot : seen.pattern().spots()) {
            Hkl hkl = spots.get(spot);
            if (hkl == null) {
                unexplained.add(spot);
            } else {
                SpotMatch match = LockedFit.match(result.placement(), spot, hkl);
                squares += match.residual() * match.residual();
                matches.add(match);
            }
        }
        return new Solution(
                result.placement(),
                matches,
                unexplained,
                Math.sqrt(squares / matches.size()),
                score,
                result.errors(),
                HalfTurn.of(result.placement()));
    }
}
