package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;

/**
 * Refines a placement against measured spots: weighted least squares on positions for orientation, centre, camera constant
 * and ellipse, the lean held by what the intensities say of it.
 *
 * <p>Known limits: positions alone hardly give the lean (it acts like an ellipse), so the lean is no better than the
 * envelope of the intensities. The camera constant and the crystal's cell cannot both be fitted; the cell is taken as true.
 */
public final class Refinement {

    /** How far the camera constant may be off where the caller does not say, as a share of it. */
    public static final double DEFAULT_TOLERANCE = 0.02;

    private static final double CENTRE_ERROR = 3;

    /** Nats by which upper layers must favour one of two orientations half a turn apart to decide for it. */
    private static final double DECIDED = 5;

    private static final double LARGEST_LEAN = Math.toRadians(10);

    private final MeasuredPattern pattern;
    private final SpotCloud cloud;
    private final PositionScore score;
    private final double tolerance;

    private Refinement(MeasuredPattern pattern, boolean mirrored, double tolerance) {
        this.pattern = pattern;
        this.cloud = new SpotCloud(pattern.spots(), mirrored, (double) pattern.width() * pattern.height());
        this.score = new PositionScore(cloud, pattern.spotSigma());
        this.tolerance = tolerance;
    }

    /**
     * Refines a placement, for example one laid by hand.
     *
     * @param pattern the measured spots
     * @param start the placement to start from; its zone stays, all else is refined
     * @return the refined solution, or empty when fewer than three spots lie where the placement has reflections
     */
    public static Optional<Solution> refine(MeasuredPattern pattern, Placement start) {
        Camera camera = start.camera();
        ReflectionStrengths strengths = new ReflectionStrengths(
                start.crystal(), start.beam(), OrientationSearch.largestG(pattern, camera.centre(), camera.constant()));
        Refinement refinement = new Refinement(pattern, camera.mirrored(), DEFAULT_TOLERANCE);
        NetPose pose = pose(start, refinement.cloud);
        return ZoneNet.of(start.setting().zone(), strengths, start.setting().reference())
                .flatMap(net -> refinement.refine(net, pose, start, strengths));
    }

    private static NetPose pose(Placement start, SpotCloud cloud) {
        Camera camera = start.camera();
        Vector2 centre = cloud.toMicroscope(camera.centre());
        double e = (camera.ellipseRatio() - 1) / (camera.ellipseRatio() + 1);
        return new NetPose(
                centre.x(),
                centre.y(),
                camera.constant() / Math.sqrt(1 - e * e),
                start.setting().rotation(),
                e * Math.cos(2 * camera.ellipseAzimuth()),
                e * Math.sin(2 * camera.ellipseAzimuth()));
    }

    private Optional<Solution> refine(ZoneNet net, NetPose pose, Placement start, ReflectionStrengths strengths) {
        NetFit.Prior prior = new NetFit.Prior(
                pose.centreX(),
                pose.centreY(),
                CENTRE_ERROR,
                Math.log(pose.constant()),
                0.6 * tolerance,
                NetCandidate.ellipseError(tolerance));
        NetFit.Fit fit = new NetFit(cloud, prior, pattern.spotSigma()).fit(net, pose);
        return finish(new NetCandidate(net, fit, prior, 0, 0), start, strengths);
    }

    /** Refines a fitted net to the end: lean, exact orientation and camera, errors, leftovers. */
    static Optional<Solution> finish(
            MeasuredPattern pattern,
            NetCandidate candidate,
            Placement like,
            ReflectionStrengths strengths,
            double tolerance) {
        return new Refinement(pattern, like.camera().mirrored(), tolerance).finish(candidate, like, strengths);
    }

    private Optional<Solution> finish(NetCandidate candidate, Placement like, ReflectionStrengths strengths) {
        ZoneNet net = candidate.net();
        NetFit.Fit fit = candidate.fit();
        Map<Integer, Hkl> matched = new TreeMap<>();
        for (int i = 0; i < cloud.size(); i++) {
            if (score.isMatched(fit, i)) {
                matched.put(i, fit.nodes()[i].hkl());
            }
        }
        if (matched.size() < 3) {
            return Optional.empty();
        }
        NodeIntensities intensities = NodeIntensities.read(pattern, cloud, score, net, fit);
        LeanFit.Envelope envelope = new LeanFit(
                        intensities, like.beam().wavelength(), strengths.inverseExtinctionPerAmplitude(), LARGEST_LEAN)
                .envelope();
        UpperLayers layers = new UpperLayers(pattern, cloud, score, net, fit, strengths);
        boolean twofold = isTwofold(like.crystal(), net.zone());
        UpperLayers.Outcome asIs = layers.weigh(envelope, false);
        UpperLayers.Outcome turned = twofold ? asIs : layers.weigh(envelope, true);
        boolean turn = turned.evidence() > asIs.evidence();
        UpperLayers.Outcome chosen = turn ? turned : asIs;
        if (turn) {
            matched.replaceAll((spot, hkl) -> hkl.negate());
        }
        matched.putAll(chosen.matches());
        PlacementFit exact =
                new PlacementFit(cloud, net, fit.pose(), turn, matched, chosen.lean(), like, candidate.prior());
        boolean undecided = !twofold && Math.abs(turned.evidence() - asIs.evidence()) < DECIDED;
        return Optional.of(solution(
                exact,
                matched,
                score.of(fit) + envelope.posterior().evidence() + chosen.evidence() + candidate.priorScore(),
                undecided));
    }

    private Solution solution(PlacementFit exact, Map<Integer, Hkl> matched, double total, boolean undecided) {
        Placement placement = exact.placement();
        List<SpotMatch> matches = new ArrayList<>();
        List<MeasuredSpot> unexplained = new ArrayList<>();
        double squares = 0;
        for (int i = 0; i < cloud.size(); i++) {
            Hkl hkl = matched.get(i);
            if (hkl != null) {
                SpotMatch match = new SpotMatch(cloud.spot(i), hkl, exact.computed(hkl));
                squares += match.residual() * match.residual();
                matches.add(match);
            } else {
                unexplained.add(cloud.spot(i));
            }
        }
        Optional<Orientation> mate = undecided
                ? Optional.of(new Orientation(placement.orientation().rotation().after(halfTurn(placement))))
                : Optional.empty();
        return new Solution(
                placement, matches, unexplained, Math.sqrt(squares / matches.size()), total, exact.errors(), mate);
    }

    private static Rotation halfTurn(Placement placement) {
        Vector3 zone = placement.crystal().lattice().vector(placement.setting().zone());
        return Rotation.ofAxisAngle(zone, Math.PI);
    }

    private static boolean isTwofold(Crystal crystal, Uvw zone) {
        Rotation half = Rotation.ofAxisAngle(crystal.lattice().vector(zone), Math.PI);
        return crystal.spaceGroup().properLaueRotations(crystal.lattice()).stream()
                .anyMatch(m -> m.distanceTo(half.matrix()) < 1e-3);
    }
}
