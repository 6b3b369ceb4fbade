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
import io.github.zonewright.spots.PatternCentre;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
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

    /** How far intensities are trusted in telling a crystal from any other with a net like it: they are kinematic. */
    static final double INTENSITY_TRUST = 0.5;

    /** Nats that intensities speak against a crystal at most: what many beams do to them has no bound. */
    private static final double MOST_AGAINST = -4;

    /** A rotation this little out of its range, in radians, is within what the fit may move it. */
    private static final double LOCK_SLACK = Math.toRadians(0.2);

    private final Sighting seen;
    private final Optional<RotationLock> lock;

    Refinement(Sighting seen, Optional<RotationLock> lock) {
        this.seen = seen;
        this.lock = lock;
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
        return refine(pattern, start, KnownCamera.of(camera.constant(), DEFAULT_TOLERANCE, camera.mirrored()));
    }

    /**
     * The same with what is known of the camera, such as a camera constant or an ellipse to be held.
     *
     * @param pattern the measured spots
     * @param start the placement to start from; its zone stays, all else is refined
     * @param known what is known of the camera; mirrored like the placement's
     * @return the refined solution, or empty when fewer than three spots lie where the placement has reflections
     * @throws IllegalArgumentException if one of the two is mirrored and the other is not
     */
    public static Optional<Solution> refine(MeasuredPattern pattern, Placement start, KnownCamera known) {
        Camera camera = start.camera();
        if (camera.mirrored() != known.mirrored()) {
            throw new IllegalArgumentException("mirrored: " + known.mirrored() + " for the known camera, expected "
                    + camera.mirrored() + " as in the placement");
        }
        ReflectionStrengths strengths = new ReflectionStrengths(
                start.crystal(), start.beam(), OrientationSearch.largestG(pattern, camera.centre(), camera.constant()));
        Sighting seen = Sighting.of(pattern, camera.mirrored(), known.centre());
        NetPose pose = pose(start, seen.cloud());
        Vector2 centre = known.centre()
                .map(c -> seen.cloud().toMicroscope(c.position()))
                .orElse(new Vector2(pose.centreX(), pose.centreY()));
        NetFit.Prior prior =
                known.prior(centre, known.centre().map(PatternCentre::error).orElse(CENTRE_ERROR));
        return ZoneNet.of(start.setting().zone(), strengths, start.setting().reference())
                .flatMap(net -> {
                    NetFit.Fit fit = new NetFit(seen.cloud(), prior, pattern.spotSigma()).fit(net, pose);
                    return new Refinement(seen, Optional.empty())
                            .finish(
                                    new NetCandidate(net, fit, prior, 0, LeanFit.of(seen, net, fit, strengths), 0),
                                    start,
                                    strengths,
                                    Double.NEGATIVE_INFINITY);
                })
                .map(s -> s.withOwnScore(OptionalDouble.empty())); // it takes a search to weigh that
    }

    static NetPose pose(Placement start, SpotCloud cloud) {
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

    /** Refines a fitted net to the end: lean, exact orientation and camera, errors, leftovers; empty below a least score. */
    Optional<Solution> finish(
            NetCandidate candidate, Placement like, ReflectionStrengths strengths, double leastScore) {
        ZoneNet net = candidate.net();
        NetFit.Fit fit = candidate.fit();
        SpotCloud cloud = seen.cloud();
        PositionScore score = seen.score();
        Map<Integer, Hkl> matched = new TreeMap<>();
        for (int i = 0; i < cloud.size(); i++) {
            if (score.isMatched(fit, i)) {
                matched.put(i, fit.nodes()[i].hkl());
            }
        }
        if (matched.size() < 3) {
            return Optional.empty();
        }
        LeanFit.Envelope envelope = candidate.lean().envelope();
        UpperLayers layers = new UpperLayers(seen, net, fit, strengths);
        boolean twofold = isTwofold(like.crystal(), net.zone());
        UpperLayers.Outcome asIs = layers.weigh(envelope, false);
        UpperLayers.Outcome turned = twofold ? asIs : layers.weigh(envelope, true);
        boolean mayStay = isAllowed(fit.pose().rotation());
        boolean mayTurn = isAllowed(fit.pose().rotation() + Math.PI);
        if (!mayStay && !mayTurn) {
            return Optional.empty();
        }
        boolean turn = mayTurn && (!mayStay || turned.evidence() > asIs.evidence());
        UpperLayers.Outcome chosen = turn ? turned : asIs;
        double intensityScore = envelope.posterior().evidence() + chosen.evidence();
        double total = score.of(fit) + intensityScore + candidate.priorScore();
        if (total < leastScore) {
            return Optional.empty();
        }
        if (turn) {
            matched.replaceAll((spot, hkl) -> hkl.negate());
        }
        matched.putAll(chosen.matches());
        boolean undecided = !twofold && mayStay && mayTurn && Math.abs(turned.evidence() - asIs.evidence()) < DECIDED;
        LeanFit.Posterior mates = turn ? asIs.lean() : turned.lean();
        LeanFit.Posterior lean = undecided ? chosen.lean().orElse(mates) : chosen.lean();
        PlacementFit exact = new PlacementFit(cloud, net, fit.pose(), turn, matched, lean, like, candidate.prior());
        Optional<Vector2> matesLean = Optional.of(
                        new Vector2(mates.x(), mates.y()).rotate(fit.pose().rotation()))
                .filter(l -> undecided);
        return Optional.of(solution(exact, matched, total, intensityScore, matesLean));
    }

    private boolean isAllowed(double rotation) {
        return lock.isEmpty() || lock.get().allows(rotation, LOCK_SLACK);
    }

    private Solution solution(
            PlacementFit exact,
            Map<Integer, Hkl> matched,
            double total,
            double intensityScore,
            Optional<Vector2> matesLean) {
        Placement placement = exact.placement();
        List<SpotMatch> matches = new ArrayList<>();
        List<MeasuredSpot> unexplained = new ArrayList<>();
        double squares = 0;
        SpotCloud cloud = seen.cloud();
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
        Optional<Orientation> mate = matesLean.map(
                lean -> new Orientation(placement.orientation().rotation().after(halfTurn(placement))));
        List<String> remarks = new ArrayList<>(exact.remarks());
        matesLean
                .flatMap(lean -> FitRemarks.ofHalfTurn(placement.setting(), lean))
                .ifPresent(remarks::add);
        return new Solution(
                placement,
                matches,
                unexplained,
                Math.sqrt(squares / matches.size()),
                total,
                exact.errors(),
                mate,
                remarks,
                OptionalDouble.of(Math.max(MOST_AGAINST, INTENSITY_TRUST * intensityScore)));
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
