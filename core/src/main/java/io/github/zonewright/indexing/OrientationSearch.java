package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.CentreCandidate;
import io.github.zonewright.spots.MeasuredPattern;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.concurrent.CancellationException;
import java.util.function.BooleanSupplier;
import java.util.function.DoubleConsumer;

/**
 * Finds the orientations of one crystal that explain measured spots, without a zone being given.
 *
 * <p>Method: for every zone axis with small indices and every likely centre the spots vote for camera constant and rotation
 * (Hough transform); the best places are fitted with centre, scale and ellipse free within what is known of them, and
 * scored by positions and by the envelope of the intensities, which also tells the lean. The search is deterministic and an
 * instance may be shared between threads.
 *
 * <p>Known limits: zone axes have indices up to the largest index; crystals that lean further than 10° from the nearest of
 * them are not found. Of a lean above some 2° the direction is surer than the amount, whose stated error may be
 * too small. A single row of spots gets no answer. Kinematic strengths are compared, so a thick crystal loses confidence
 * and may lose the lean.
 */
public final class OrientationSearch {

    /** Largest zone index tried where the caller does not say. */
    public static final int DEFAULT_LARGEST_INDEX = 5;

    /** A solution with a lower score is not shown: it could be chance. */
    public static final double LEAST_SCORE = 8;

    private static final int CENTRES = 6;

    /** Centres less likely than this against the first, in nats, are left out: a direct beam that is plain to see stays. */
    private static final double LEAST_CENTRE_WEIGHT = -5;

    private static final int PEAKS_PER_CENTRE = 60;
    private static final int FITTED = 40;
    private static final double SAME_ANSWER = Math.toRadians(1.5);
    private static final int FINISHED = 8;

    /** Nats by which a candidate may lag and still be refined to the end: upper layers may make up for them. */
    private static final double FAR_BEHIND = 80;

    private static final int LEAST_SPOTS = 3;
    private static final int LEAST_MATCHES = 4;

    private final Crystal crystal;
    private final Beam beam;
    private final double constant;
    private final double tolerance;
    private final boolean mirrored;
    private final int largestIndex;
    private final List<Uvw> zones;

    private OrientationSearch(
            Crystal crystal, Beam beam, double constant, double tolerance, boolean mirrored, int largestIndex) {
        this.crystal = crystal;
        this.beam = beam;
        this.constant = constant;
        this.tolerance = tolerance;
        this.mirrored = mirrored;
        this.largestIndex = largestIndex;
        this.zones = ZoneCatalogue.zones(crystal, largestIndex);
    }

    /**
     * A search for one crystal.
     *
     * @param crystal the crystal
     * @param beam the beam
     * @param constant camera constant in px·Å, as far as it is known
     * @param tolerance how far it may be off, as a share of it, 0.001 to 0.2
     * @param mirrored whether the image is mirrored left to right
     * @return the search
     * @throws IllegalArgumentException if constant or tolerance is out of range
     */
    public static OrientationSearch of(
            Crystal crystal, Beam beam, double constant, double tolerance, boolean mirrored) {
        if (!(constant > 0 && constant < 1e9)) {
            throw new IllegalArgumentException(
                    "camera constant: " + constant + " px·Å, expected above 0 and below 1e9 px·Å");
        }
        if (!(tolerance >= 0.001 && tolerance <= 0.2)) {
            throw new IllegalArgumentException(
                    "tolerance of the camera constant: " + tolerance + ", expected a share from 0.001 to 0.2");
        }
        return new OrientationSearch(crystal, beam, constant, tolerance, mirrored, DEFAULT_LARGEST_INDEX);
    }

    /**
     * The same with another bound on the zone indices.
     *
     * @param other the largest index, 1 to 12
     * @return the changed search
     * @throws IllegalArgumentException if it is out of range
     */
    public OrientationSearch withLargestIndex(int other) {
        if (other < 1 || other > 12) {
            throw new IllegalArgumentException("largest zone index: " + other + ", expected 1 to 12");
        }
        return new OrientationSearch(crystal, beam, constant, tolerance, mirrored, other);
    }

    /**
     * Searches.
     *
     * @param pattern the measured spots
     * @return the solutions, or why there is none
     */
    public SearchResult find(MeasuredPattern pattern) {
        return find(pattern, share -> {}, () -> false);
    }

    /**
     * Searches, telling how far it is and listening for a stop.
     *
     * @param pattern the measured spots
     * @param progress gets the share done, 0 to 1
     * @param cancelled asked now and then; true stops the search
     * @return the solutions, or why there is none
     * @throws CancellationException if it was stopped
     */
    public SearchResult find(MeasuredPattern pattern, DoubleConsumer progress, BooleanSupplier cancelled) {
        int spots = pattern.spots().size();
        if (spots < LEAST_SPOTS) {
            return none("Only " + spots + " diffraction spot" + (spots == 1 ? " was" : "s were") + " found; at least "
                    + LEAST_SPOTS + " are needed for a zone axis.");
        }
        if (pattern.centres().isEmpty()) {
            return none("No centre of the pattern could be found.");
        }
        SpotCloud cloud = new SpotCloud(pattern.spots(), mirrored, (double) pattern.width() * pattern.height());
        ReflectionStrengths strengths = new ReflectionStrengths(
                crystal,
                beam,
                largestG(pattern, pattern.centres().get(0).centre().position(), constant / (1 + tolerance)));
        List<ZoneNet> nets =
                zones.stream().flatMap(z -> ZoneNet.of(z, strengths).stream()).toList();
        List<NetVote.Peak> peaks = vote(pattern, cloud, nets, progress, cancelled);
        NetRanking ranking = new NetRanking(pattern, cloud, beam, constant, tolerance);
        List<NetCandidate> candidates = ranking.rank(peaks, FITTED, p -> progress.accept(0.5 + 0.3 * p), cancelled);
        List<Solution> solutions = new ArrayList<>();
        for (int i = 0; i < Math.min(FINISHED, candidates.size()); i++) {
            stopIf(cancelled);
            NetCandidate c = candidates.get(i);
            if (i >= 2 && c.total() < candidates.get(0).total() - FAR_BEHIND) {
                break;
            }
            Refinement.finish(pattern, c, like(c), strengths, tolerance)
                    .filter(s -> s.matches().size() >= LEAST_MATCHES && s.score() >= LEAST_SCORE && !isOneRow(s))
                    .ifPresent(solutions::add);
            progress.accept(0.8 + 0.2 * (i + 1) / FINISHED);
        }
        solutions.sort(Comparator.comparingDouble(Solution::score).reversed());
        List<Solution> different = different(solutions);
        progress.accept(1);
        return different.isEmpty()
                ? none("No orientation of " + crystal.name() + " explains the " + spots
                        + " spots better than chance would.")
                : new SearchResult(
                        different,
                        different.size() + (different.size() == 1 ? " solution" : " solutions") + " for "
                                + crystal.name() + " from " + spots + " spots.");
    }

    private static SearchResult none(String why) {
        return new SearchResult(List.of(), why);
    }

    /** Whether all explained spots lie on one line through the centre: such a row fits every zone that has it. */
    private static boolean isOneRow(Solution s) {
        Hkl first = s.matches().get(0).hkl();
        return s.matches().stream()
                .map(SpotMatch::hkl)
                .allMatch(g -> g.h() * first.k() == g.k() * first.h()
                        && g.k() * first.l() == g.l() * first.k()
                        && g.h() * first.l() == g.l() * first.h());
    }

    private static void stopIf(BooleanSupplier cancelled) {
        if (cancelled.getAsBoolean()) {
            throw new CancellationException("the search was stopped");
        }
    }

    /** The largest |g| worth looking at: that of the outermost spot and a little more, however far off the centre. */
    static double largestG(MeasuredPattern pattern, PixelPoint centre, double constant) {
        double farthest = pattern.spots().stream()
                .mapToDouble(s -> s.position().distanceTo(centre))
                .max()
                .orElse(0);
        double reach = Math.min(1.1 * farthest, 2 * Math.hypot(pattern.width(), pattern.height()));
        return Math.max(reach, 0.1 * Math.min(pattern.width(), pattern.height())) / constant;
    }

    private List<NetVote.Peak> vote(
            MeasuredPattern pattern,
            SpotCloud cloud,
            List<ZoneNet> nets,
            DoubleConsumer progress,
            BooleanSupplier cancelled) {
        NetVote vote = new NetVote(cloud, constant, tolerance, pattern.spotSigma());
        List<CentreCandidate> centres = pattern.centres().stream()
                .filter(c -> c.logWeight() > LEAST_CENTRE_WEIGHT)
                .toList();
        List<NetVote.Peak> kept = new ArrayList<>();
        int tried = Math.min(CENTRES, centres.size());
        for (int c = 0; c < tried; c++) {
            stopIf(cancelled);
            Vector2 centre = cloud.toMicroscope(centres.get(c).centre().position());
            List<NetVote.Peak> all = new ArrayList<>();
            for (ZoneNet net : nets) {
                all.addAll(vote.peaks(net, centre, c));
            }
            all.sort(Comparator.comparingDouble(NetVote.Peak::votes).reversed());
            kept.addAll(all.subList(0, Math.min(PEAKS_PER_CENTRE, all.size())));
            progress.accept(0.5 * (c + 1) / tried);
        }
        return kept;
    }

    private Placement like(NetCandidate c) {
        ZoneSetting setting = ZoneSetting.onZone(c.net().zone(), c.net().reference(), 0);
        return new Placement(crystal, beam, setting, Camera.of(new PixelPoint(0, 0), constant, mirrored));
    }

    /**
     * Drops what is the same orientation again, or the same zone axis and rotation with another lean and centre, also after
     * a rotation of the Laue class or half a turn about the zone axis.
     */
    private List<Solution> different(List<Solution> solutions) {
        List<Rotation> symmetry = crystal.spaceGroup().properLaueRotations(crystal.lattice()).stream()
                .map(Rotation::ofMatrix)
                .toList();
        List<Solution> kept = new ArrayList<>();
        for (Solution s : solutions) {
            if (kept.stream().noneMatch(k -> same(k, s, symmetry))) {
                kept.add(s);
            }
        }
        return kept;
    }

    private boolean same(Solution a, Solution b, List<Rotation> symmetry) {
        Rotation half = Rotation.ofAxisAngle(
                crystal.lattice().vector(a.placement().setting().zone()), Math.PI);
        return close(rotation(a), half, rotation(b), symmetry) || close(onZone(a), half, onZone(b), symmetry);
    }

    private static boolean close(Rotation own, Rotation half, Rotation other, List<Rotation> symmetry) {
        return symmetry.stream()
                .map(other::after)
                .anyMatch(turned ->
                        own.angleTo(turned) < SAME_ANSWER || own.after(half).angleTo(turned) < SAME_ANSWER);
    }

    private static Rotation rotation(Solution s) {
        return s.placement().orientation().rotation();
    }

    private Rotation onZone(Solution s) {
        ZoneSetting setting = s.placement().setting();
        return ZoneSetting.onZone(setting.zone(), setting.reference(), setting.rotation())
                .orientation(crystal.lattice())
                .rotation();
    }
}
