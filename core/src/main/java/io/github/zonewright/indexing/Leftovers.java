package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.orientation.Misorientation;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.CancellationException;
import java.util.function.BooleanSupplier;

/**
 * Searches what a solution leaves over for further crystals: a second grain, a twin, a second phase. The camera of the
 * first solution, its ellipse and its centre included, is held. Spots that both explain belong to both.
 *
 * <p>A crystal is claimed only where its spots speak for it by more than all the orientations that were tried let
 * expect from chance; twins of the first crystal are tried first, and since they are few, fewer spots prove them.
 *
 * <p>Known limits: a grain needs at least {@value #LEAST_SPOTS} spots of its own that do not lie on one row; one near no
 * zone axis with indices up to 4 is found as a twin only. The lean of a further grain is no better than half a degree or so,
 * since few of its spots are seen. Spots of the first crystal that its solution missed, of upper layers say, may be taken
 * for a grain's. Of 150 patterns drawn with stray spots none was claimed, and of 150 with a superlattice none, but of 150
 * with a crystal that was not offered three: offer every crystal that may be there.
 */
public final class Leftovers {

    /** Least number of spots of its own that a further crystal has to explain. */
    public static final int LEAST_SPOTS = 4;

    /** Nats beyond chance, after the number of trials, that a claim needs. */
    private static final double LEAST_EVIDENCE = 10;

    /** Nats beyond chance for each spot of its own: a lattice that is not offered may fit many spots, but poorly. */
    private static final double LEAST_EVIDENCE_PER_SPOT = 3;

    private static final int MOST_GRAINS = 3;

    /** Nearer to the first crystal than this it is the first crystal. */
    private static final double SAME_CRYSTAL = Math.toRadians(2);

    /** Nats by which the spots must favour one of two orientations half a turn apart to decide for it. */
    private static final double HALF_TURN_DECIDED = 5;

    private static final int ROUNDS = 4;
    private static final double LEAN_ERROR = Math.toRadians(0.7);

    /** A shared spot is one that the grain expects at least this share of its strongest. */
    private static final double SHARED_STRENGTH = 0.1;

    private final List<Crystal> crystals;

    private Leftovers(List<Crystal> crystals) {
        this.crystals = crystals;
    }

    /**
     * What was found.
     *
     * @param grains the further crystals, the surest first
     * @param explanation a sentence for a person
     */
    public record Result(List<Grain> grains, String explanation) {

        /** Copies the list. */
        public Result {
            grains = List.copyOf(grains);
        }

        /**
         * Says what was found.
         *
         * @param first the solution whose leftovers were searched
         * @param grains the further crystals, in the order in which they were found
         * @return the same with its sentence
         */
        public static Result of(Solution first, List<Grain> grains) {
            int spots = first.unexplained().size();
            String of = spots + (spots == 1 ? " spot is" : " spots are") + " left over";
            if (spots < LEAST_SPOTS) {
                return new Result(List.of(), of + "; a further crystal needs " + LEAST_SPOTS + ".");
            }
            if (grains.isEmpty()) {
                return new Result(grains, of + ", and no further crystal explains them better than chance would.");
            }
            int left = grains.get(grains.size() - 1).solution().unexplained().size();
            return new Result(
                    grains,
                    of + "; " + grains.size()
                            + (grains.size() == 1 ? " further crystal explains " : " further crystals explain ")
                            + (spots - left) + " of them.");
        }
    }

    /**
     * A search for some crystals.
     *
     * @param crystals what the further grains may be, the first solution's crystal among them or not
     * @return the search
     * @throws IllegalArgumentException if there is none
     */
    public static Leftovers of(List<Crystal> crystals) {
        if (crystals.isEmpty()) {
            throw new IllegalArgumentException("crystals to search for: none, expected at least one");
        }
        return new Leftovers(List.copyOf(crystals));
    }

    /**
     * Searches the spots that a solution leaves over, again and again until nothing more is found.
     *
     * @param pattern the measured spots
     * @param first the solution, whose camera is held
     * @return the further crystals
     */
    public Result search(MeasuredPattern pattern, Solution first) {
        return search(pattern, first, () -> false);
    }

    /**
     * The same, listening for a stop.
     *
     * @param pattern the measured spots
     * @param first the solution, whose camera is held
     * @param cancelled asked before each crystal is tried; true stops the search
     * @return the further crystals
     * @throws CancellationException if it was stopped
     */
    public Result search(MeasuredPattern pattern, Solution first, BooleanSupplier cancelled) {
        List<Grain> grains = new ArrayList<>();
        List<MeasuredSpot> left = first.unexplained();
        List<SpotMatch> taken = new ArrayList<>(first.matches());
        while (grains.size() < MOST_GRAINS && left.size() >= LEAST_SPOTS) {
            Optional<Grain> next = next(pattern, first, left, taken, cancelled);
            if (next.isEmpty()) {
                break;
            }
            grains.add(next.get());
            taken.addAll(next.get().solution().matches());
            left = next.get().solution().unexplained();
        }
        return Result.of(first, grains);
    }

    private record Claim(Crystal crystal, GrainModel model, Orientation orientation, double evidence) {}

    private Optional<Grain> next(
            MeasuredPattern pattern,
            Solution first,
            List<MeasuredSpot> left,
            List<SpotMatch> taken,
            BooleanSupplier cancelled) {
        Placement known = first.placement();
        List<PixelPoint> places =
                taken.stream().map(m -> m.measured().position()).toList();
        LeftSpots spots = new LeftSpots(pattern, left, places, known.camera(), known.beam());
        List<Claim> claims = new ArrayList<>();
        for (Crystal crystal : crystals) {
            if (cancelled.getAsBoolean()) {
                throw new CancellationException("the search of the leftovers was stopped");
            }
            GrainModel model =
                    new GrainModel(new ReflectionStrengths(crystal, known.beam(), spots.largestG() * 1.02), spots);
            GrainSearch search = new GrainSearch(crystal, model);
            double trials = Math.log(search.trials() * crystals.size());
            search.candidates()
                    .forEach(c -> claims.add(new Claim(crystal, model, c.orientation(), c.score() - trials)));
            if (crystal.equals(known.crystal())) {
                List<Rotation> laws = TwinLaws.of(crystal);
                double few = Math.log(laws.size() * 10.0);
                for (Rotation law : laws) {
                    Orientation twin =
                            new Orientation(known.orientation().rotation().after(law));
                    GrainSearch.Candidate c = search.leaning(twin, LEAN_ERROR / 2, 2);
                    claims.add(new Claim(crystal, model, c.orientation(), c.score() - few));
                }
            }
        }
        claims.sort(Comparator.comparingDouble(Claim::evidence).reversed());
        for (Claim claim : claims) {
            if (claim.evidence < LEAST_EVIDENCE) {
                break;
            }
            Optional<Grain> grain = grain(pattern, first, taken, claim);
            if (grain.isPresent()) {
                return grain;
            }
        }
        return Optional.empty();
    }

    private Optional<Grain> grain(MeasuredPattern pattern, Solution first, List<SpotMatch> taken, Claim claim) {
        LeftSpots left = claim.model.left();
        Placement placement = placement(claim, first.placement());
        GrainLean lean = GrainLean.of(claim.model, placement);
        placement = leaning(placement, lean);
        Map<MeasuredSpot, Hkl> own = matches(claim.model, placement.orientation(), left);
        Optional<LockedFit.Result> fit = Optional.empty();
        for (int round = 0; round < ROUNDS; round++) {
            fit = LockedFit.fit(leaning(placement, lean), own, LockedFit.Freedom.ofCrystal(lean.error()));
            if (fit.isEmpty()) {
                return Optional.empty();
            }
            placement = fit.get().placement();
            own = matches(claim.model, placement.orientation(), left);
        }
        boolean poor = claim.evidence < LEAST_EVIDENCE_PER_SPOT * own.size();
        if (own.size() < LEAST_SPOTS || poor || isOneRow(own)) {
            return Optional.empty();
        }
        if (isFirst(placement, first.placement())) {
            return Optional.empty();
        }
        List<SpotMatch> shared = shared(pattern, taken, claim, placement);
        List<SpotMatch> all = new ArrayList<>();
        List<MeasuredSpot> unexplained = new ArrayList<>();
        for (int i = 0; i < left.size(); i++) {
            MeasuredSpot spot = left.spot(i);
            if (own.containsKey(spot)) {
                all.add(LockedFit.match(placement, spot, own.get(spot)));
            } else {
                unexplained.add(spot);
            }
        }
        double squares =
                all.stream().mapToDouble(m -> m.residual() * m.residual()).sum();
        double rms = Math.sqrt(squares / all.size());
        all.addAll(shared);
        // The positions under a held camera would make the lean seem surer than it is: the camera's own error acts
        // alike.
        SolutionErrors errors = new SolutionErrors(fit.get().errors().rotation(), lean.error(), lean.error(), 0, 0, 0);
        Optional<Orientation> mate = mate(claim, placement, lean);
        Solution solution = new Solution(placement, all, unexplained, rms, claim.evidence, errors, mate);
        return Optional.of(Grain.of(solution, shared, first.placement()));
    }

    private static boolean isFirst(Placement grain, Placement first) {
        return grain.crystal().equals(first.crystal())
                && Misorientation.between(
                                        HalfTurn.lattice(first, first.orientation()),
                                        HalfTurn.lattice(grain, grain.orientation()))
                                .angle()
                        < SAME_CRYSTAL;
    }

    /** The orientation said by its nearest zone axis, under the camera that is held. */
    private static Placement placement(Claim claim, Placement known) {
        Uvw zone = claim.orientation.nearestZone(claim.crystal.lattice(), OrientationSearch.DEFAULT_LARGEST_INDEX);
        Hkl reference = ZoneNet.of(zone, claim.model.strengths())
                .map(ZoneNet::reference)
                .orElseGet(() ->
                        ZoneBasis.of(zone, claim.crystal.lattice().reciprocal()).first());
        ZoneSetting setting = ZoneSetting.of(claim.orientation, claim.crystal.lattice(), zone, reference);
        return new Placement(claim.crystal, known.beam(), setting, known.camera());
    }

    private static Placement leaning(Placement p, GrainLean lean) {
        ZoneSetting s = p.setting();
        return p.withSetting(new ZoneSetting(
                s.zone(),
                s.reference(),
                s.rotation(),
                lean.mean().x(),
                lean.mean().y()));
    }

    /** The orientation after half a turn about the zone axis, when that is no symmetry and the spots leave it open. */
    private static Optional<Orientation> mate(Claim claim, Placement placement, GrainLean lean) {
        Optional<Orientation> turned = HalfTurn.of(placement);
        if (turned.isEmpty()) {
            return turned;
        }
        ZoneSetting s = placement.setting();
        double other = GrainLean.of(
                        claim.model,
                        placement.withSetting(ZoneSetting.onZone(s.zone(), s.reference(), s.rotation() + Math.PI)))
                .score();
        return other > lean.score() - HALF_TURN_DECIDED ? turned : Optional.empty();
    }

    /** The spots near reflections, each reflection taking the nearest only. */
    private static Map<MeasuredSpot, Hkl> matches(GrainModel model, Orientation orientation, LeftSpots spots) {
        List<GrainModel.Node> nodes = model.nodes(orientation.rotation(), GrainSearch.WIDTH);
        Map<GrainModel.Node, Integer> nearest = new LinkedHashMap<>();
        for (int i = 0; i < spots.size(); i++) {
            GrainModel.Node node = model.nearest(nodes, i);
            if (node != null) {
                Integer other = nearest.get(node);
                if (other == null
                        || node.place().minus(spots.place(i)).norm()
                                < node.place().minus(spots.place(other)).norm()) {
                    nearest.put(node, i);
                }
            }
        }
        Map<MeasuredSpot, Hkl> found = new LinkedHashMap<>();
        nearest.forEach((node, i) -> found.put(spots.spot(i), node.hkl()));
        return found;
    }

    private List<SpotMatch> shared(MeasuredPattern pattern, List<SpotMatch> taken, Claim claim, Placement placement) {
        List<MeasuredSpot> spots =
                taken.stream().map(SpotMatch::measured).distinct().toList();
        LeftSpots all = new LeftSpots(pattern, spots, List.of(), placement.camera(), placement.beam());
        GrainModel model = new GrainModel(claim.model.strengths(), all);
        List<GrainModel.Node> nodes = model.nodes(placement.orientation().rotation(), GrainSearch.WIDTH);
        double strongest =
                nodes.stream().mapToDouble(GrainModel.Node::share).max().orElse(0);
        List<SpotMatch> found = new ArrayList<>();
        for (int i = 0; i < all.size(); i++) {
            GrainModel.Node node = model.nearest(nodes, i);
            if (node != null && node.share() > SHARED_STRENGTH * strongest) {
                found.add(LockedFit.match(placement, all.spot(i), node.hkl()));
            }
        }
        return found;
    }

    private static boolean isOneRow(Map<MeasuredSpot, Hkl> spots) {
        List<Vector3> g = spots.values().stream()
                .map(h -> new Vector3(h.h(), h.k(), h.l()))
                .toList();
        return g.stream().allMatch(v -> v.cross(g.get(0)).norm() < 1e-9);
    }
}
