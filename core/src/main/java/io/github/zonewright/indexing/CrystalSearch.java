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
import java.lang.ref.SoftReference;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalInt;
import java.util.concurrent.CancellationException;
import java.util.function.BooleanSupplier;
import java.util.function.DoubleConsumer;
import java.util.stream.Collectors;
import java.util.stream.IntStream;

/** The search for the orientations of one crystal, from the vote to the refined solutions that differ from each other. */
final class CrystalSearch {

    private static final int CENTRES = 6;

    /** Centres less likely than this against the first, in nats, are left out: a direct beam that is plain to see stays. */
    private static final double LEAST_CENTRE_WEIGHT = -5;

    private static final int PEAKS_PER_CENTRE = 60;
    private static final int FITTED = 40;
    private static final double SAME_ANSWER = Math.toRadians(1.5);

    /** How many candidates are refined to the end. */
    static final int FINISHED = 8;

    /** Nats by which a candidate may lag and still be refined to the end: upper layers may make up for them. */
    static final double FAR_BEHIND = 80;

    /** The least total of any but the first two, in nats: no crystal that is not there is refined in vain many times. */
    static final double HOPELESS = -10;

    /** That many of a crystal's candidates are refined however little they promise. */
    static final int TRIED_AT_LEAST = 2;

    private static final int LEAST_MATCHES = 4;

    /** How far beyond its tolerance, as a factor and a share, a camera constant may come out. */
    private static final double TOLERANCE_SLACK = 1.05;

    private static final double LEAST_SLACK = 0.002;

    /** The largest |g| is rounded up to a power of e to this, so that frames of one camera ask for the same. */
    private static final double REACH_STEP = 0.02;

    private final Crystal crystal;
    private final Beam beam;
    private final KnownCamera camera;
    private final List<Uvw> zones;
    private final Optional<RotationLock> lock;
    private volatile SoftReference<Nets> last = new SoftReference<>(null);

    /** The nets of the zones with the reflections they are made of. */
    private record Nets(double reach, ReflectionStrengths strengths, List<ZoneNet> nets) {}

    CrystalSearch(Crystal crystal, Beam beam, KnownCamera camera, List<Uvw> zones, Optional<RotationLock> lock) {
        this.crystal = crystal;
        this.beam = beam;
        this.camera = camera;
        this.zones = zones;
        this.lock = lock;
    }

    Crystal crystal() {
        return crystal;
    }

    /** How many zone axes are tried: the more, the likelier one fits by accident. */
    int zoneCount() {
        return zones.size();
    }

    /**
     * The solutions.
     *
     * @param within those whose camera constant is as it was told, best first
     * @param beyond those that would need another
     */
    record Found(List<Solution> within, List<Solution> beyond) {}

    /**
     * The solutions.
     *
     * @throws IllegalArgumentException if the crystal's cell is too large for the reach of the pattern
     * @throws CancellationException if it was stopped
     */
    Found find(Sighting seen, double largestG, DoubleConsumer progress, BooleanSupplier cancelled) {
        Nets prepared = nets(largestG);
        ReflectionStrengths strengths = prepared.strengths;
        List<ZoneNet> nets = prepared.nets;
        List<NetVote.Peak> peaks = vote(seen, nets, progress, cancelled);
        NetRanking ranking = new NetRanking(seen, strengths, camera, lock);
        List<NetCandidate> candidates = ranking.rank(peaks, FITTED, p -> progress.accept(0.5 + 0.3 * p), cancelled);
        Refinement refinement = new Refinement(seen, lock);
        List<Solution> solutions = new ArrayList<>();
        for (int i = 0; i < Math.min(FINISHED, candidates.size()); i++) {
            stopIf(cancelled);
            NetCandidate c = candidates.get(i);
            if (i >= TRIED_AT_LEAST && c.total() < Math.max(candidates.get(0).total() - FAR_BEHIND, HOPELESS)) {
                break;
            }
            refinement
                    .finish(c, like(c), strengths, OrientationSearch.LEAST_SCORE)
                    .filter(s -> s.matches().size() >= LEAST_MATCHES && !isOneRow(s))
                    .ifPresent(solutions::add);
            progress.accept(0.8 + 0.2 * (i + 1) / FINISHED);
        }
        solutions.sort(Comparator.comparingDouble(Solution::score).reversed());
        progress.accept(1);
        Map<Boolean, List<Solution>> told =
                different(solutions).stream().collect(Collectors.partitioningBy(this::isWithinTolerance));
        NetAccident accident = new NetAccident(nets, camera, seen.cloud());
        List<Solution> within = told.get(true).stream().map(accident::weigh).toList();
        return new Found(within, told.get(false));
    }

    /** What depends on the crystal alone, out to a little more than a |g|: the frames of a series share it. */
    private Nets nets(double largestG) {
        double reach = Math.exp(REACH_STEP * Math.ceil(Math.log(largestG) / REACH_STEP));
        Nets kept = last.get();
        if (kept == null || kept.reach != reach) {
            ReflectionStrengths strengths = new ReflectionStrengths(crystal, beam, reach);
            List<ZoneNet> nets = zones.stream()
                    .flatMap(z -> lock
                            .map(l -> ZoneNet.of(z, strengths, l.reference()))
                            .orElseGet(() -> ZoneNet.of(z, strengths))
                            .stream())
                    .toList();
            kept = new Nets(reach, strengths, nets);
            last = new SoftReference<>(kept);
        }
        return kept;
    }

    private boolean isWithinTolerance(Solution s) {
        double off = Math.abs(Math.log(s.placement().camera().constant() / camera.constant()));
        return off <= TOLERANCE_SLACK * Math.log1p(camera.tolerance()) + LEAST_SLACK;
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

    private List<NetVote.Peak> vote(
            Sighting seen, List<ZoneNet> nets, DoubleConsumer progress, BooleanSupplier cancelled) {
        NetVote vote = new NetVote(seen.cloud(), camera, seen.pattern().spotSigma(), lock);
        List<CentreCandidate> centres = seen.centres().stream()
                .filter(c -> c.logWeight() > LEAST_CENTRE_WEIGHT)
                .toList();
        List<NetVote.Peak> kept = new ArrayList<>();
        int tried = Math.min(CENTRES, centres.size());
        for (int c = 0; c < tried; c++) {
            stopIf(cancelled);
            Vector2 centre = seen.cloud().toMicroscope(centres.get(c).centre().position());
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
        return new Placement(
                crystal, beam, setting, Camera.of(new PixelPoint(0, 0), camera.constant(), camera.mirrored()));
    }

    /**
     * Drops what is the same orientation again, or the same zone axis and rotation with another lean and centre, also after
     * a rotation of the Laue class or half a turn about the zone axis. What is kept says where its centre may be elsewhere.
     */
    private List<Solution> different(List<Solution> solutions) {
        List<Rotation> symmetry = crystal.spaceGroup().properLaueRotations(crystal.lattice()).stream()
                .map(Rotation::ofMatrix)
                .toList();
        List<Solution> kept = new ArrayList<>();
        for (Solution s : solutions) {
            OptionalInt again = IntStream.range(0, kept.size())
                    .filter(k -> same(kept.get(k), s, symmetry))
                    .findFirst();
            if (again.isPresent()) {
                kept.set(again.getAsInt(), OtherCentre.told(kept.get(again.getAsInt()), s));
            } else {
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
