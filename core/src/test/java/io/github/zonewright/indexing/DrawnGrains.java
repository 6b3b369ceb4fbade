package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.Misorientation;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.OrientedLattice;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.Random;
import java.util.function.LongFunction;
import java.util.stream.Stream;

/**
 * Patterns of a drawn crystal with either stray spots anywhere or a second grain, and how often a further crystal is claimed:
 * {@code DrawnGrains cases}. Crystals, zones, leans, numbers and heights are drawn at random.
 */
public final class DrawnGrains {

    private static final Beam BEAM = Beam.ofKilovolts(200);
    private static final int SIZE = 320;
    private static final double CONSTANT = 150;
    private static final PixelPoint CENTRE = new PixelPoint(157.3, 163.8);
    private static final List<String> CRYSTALS = List.of("silicon", "copper", "magnesium", "rutile", "corundum");

    private static final List<String> UNLISTED = List.of("quartz", "anatase", "ferrite", "cementite", "graphite");

    /** A drawn image as it was measured, its first crystal refined, and the truth about the second. */
    record Case(MeasuredPattern pattern, Solution first, Optional<Orientation> second) {

        /** The angle in degrees between the second grain as drawn and as claimed, half turns that are left open allowed. */
        double off(Grain grain) {
            Solution s = grain.solution();
            return Stream.concat(Stream.of(s.placement().orientation()), s.halfTurn().stream())
                    .mapToDouble(o -> Misorientation.between(lattice(o), lattice(second.orElseThrow()))
                            .angle())
                    .map(Math::toDegrees)
                    .min()
                    .orElseThrow();
        }

        /** The grain that stands as the second was drawn, to within some degrees. */
        Optional<Grain> hit(Leftovers.Result found, double degrees) {
            return found.grains().stream().filter(g -> off(g) < degrees).findFirst();
        }

        private OrientedLattice lattice(Orientation o) {
            Crystal crystal = first.placement().crystal();
            return new OrientedLattice(crystal.lattice(), crystal.spaceGroup(), o);
        }
    }

    private DrawnGrains() {}

    /** A crystal near one of its zone axes, leaning up to 3°. */
    static Rotation orientation(Crystal crystal, Random random) {
        List<Uvw> zones = ZoneCatalogue.zones(crystal, 2);
        Uvw zone = zones.get(random.nextInt(zones.size()));
        double lean = Math.toRadians(3 * Math.sqrt(random.nextDouble()));
        double towards = 2 * Math.PI * random.nextDouble();
        return new ZoneSetting(
                        zone,
                        ZoneBasis.of(zone, crystal.lattice().reciprocal()).first(),
                        2 * Math.PI * random.nextDouble(),
                        lean * Math.cos(towards),
                        lean * Math.sin(towards))
                .orientation(crystal.lattice())
                .rotation();
    }

    private static DrawnCrystal.Setup setup(Crystal crystal, Rotation orientation) {
        return new DrawnCrystal.Setup(
                crystal, BEAM.wavelength(), orientation, CENTRE, CONSTANT, 1.006, 0.5, false, SIZE, 0.015);
    }

    /** A case with stray spots anywhere in the frame. */
    static Optional<Case> strays(long seed) {
        Random random = new Random(seed);
        Crystal crystal =
                CrystalShelf.find(CRYSTALS.get(random.nextInt(CRYSTALS.size()))).orElseThrow();
        Rotation first = orientation(crystal, random);
        List<DrawnCrystal.Spot> spots = new ArrayList<>(DrawnCrystal.spots(setup(crystal, first), seed));
        int strays = 4 + random.nextInt(27);
        for (int i = 0; i < strays; i++) {
            double x = 8 + (SIZE - 16) * random.nextDouble();
            double y = 8 + (SIZE - 16) * random.nextDouble();
            double peak = 40 * Math.exp(4 * random.nextDouble());
            spots.add(new DrawnCrystal.Spot(null, x, y, peak));
        }
        return measured(crystal, first, spots, Optional.empty(), seed);
    }

    /** A case with a second grain turned from the first by a rotation, or drawn at random, a third as strong. */
    static Optional<Case> grains(Crystal crystal, Rotation first, Rotation second, long seed) {
        return phases(crystal, first, crystal, second, seed);
    }

    /** A case with a grain of a second crystal, a third as strong. */
    static Optional<Case> phases(Crystal crystal, Rotation first, Crystal other, Rotation second, long seed) {
        return mixed(crystal, first, other, second, 0.3, seed);
    }

    /** A case with a grain of a second crystal, its peaks times a share. */
    static Optional<Case> mixed(
            Crystal crystal, Rotation first, Crystal other, Rotation second, double share, long seed) {
        List<DrawnCrystal.Spot> spots = new ArrayList<>(DrawnCrystal.spots(setup(crystal, first), seed));
        DrawnCrystal.spots(setup(other, second), seed + 1)
                .forEach(s -> spots.add(new DrawnCrystal.Spot(s.hkl(), s.x(), s.y(), share * s.peak())));
        return measured(crystal, first, spots, Optional.of(new Orientation(second)), seed);
    }

    /** What a search finds on a drawn image that is told the camera constant to within 3 %. */
    static SearchResult searched(Case drawn, Crystal crystal) {
        return OrientationSearch.of(crystal, BEAM, CONSTANT, 0.03, false).find(drawn.pattern());
    }

    static Optional<Case> grains(long seed) {
        Random random = new Random(seed);
        Crystal crystal =
                CrystalShelf.find(CRYSTALS.get(random.nextInt(CRYSTALS.size()))).orElseThrow();
        return grains(crystal, orientation(crystal, random), orientation(crystal, random), seed);
    }

    private static Optional<Case> measured(
            Crystal crystal, Rotation first, List<DrawnCrystal.Spot> spots, Optional<Orientation> second, long seed) {
        MeasuredPattern pattern = SpotFinder.measure(DrawnCrystal.image(setup(crystal, first), spots, seed));
        Orientation orientation = new Orientation(first);
        Uvw zone = orientation.nearestZone(crystal.lattice(), 2);
        ZoneSetting setting = ZoneSetting.of(
                orientation,
                crystal.lattice(),
                zone,
                ZoneBasis.of(zone, crystal.lattice().reciprocal()).first());
        Placement start = new Placement(crystal, BEAM, setting, Camera.of(CENTRE, CONSTANT, false));
        return Refinement.refine(pattern, start)
                .filter(s -> s.matches().size() >= 6)
                .map(s -> new Case(pattern, s, second));
    }

    /** A case with a grain of a crystal that will not be offered. */
    static Optional<Case> unlisted(long seed) {
        Random random = new Random(seed);
        Crystal crystal =
                CrystalShelf.find(CRYSTALS.get(random.nextInt(CRYSTALS.size()))).orElseThrow();
        Crystal other =
                CrystalShelf.find(UNLISTED.get(random.nextInt(UNLISTED.size()))).orElseThrow();
        return phases(crystal, orientation(crystal, random), other, orientation(other, random), seed);
    }

    /** A case with superlattice spots halfway between those of the first crystal. */
    static Optional<Case> superlattice(long seed) {
        Random random = new Random(seed);
        Crystal crystal =
                CrystalShelf.find(CRYSTALS.get(random.nextInt(CRYSTALS.size()))).orElseThrow();
        Rotation first = orientation(crystal, random);
        List<DrawnCrystal.Spot> own = DrawnCrystal.spots(setup(crystal, first), seed);
        List<DrawnCrystal.Spot> spots = new ArrayList<>(own);
        own.forEach(s -> spots.add(new DrawnCrystal.Spot(
                null, (s.x() + CENTRE.x()) / 2, (s.y() + CENTRE.y()) / 2, Math.min(2000, 60 + 0.1 * s.peak()))));
        return measured(crystal, first, spots, Optional.empty(), seed);
    }

    /** How many of some cases, those with enough spots left over, have a further crystal claimed that is not there. */
    private static void falseClaims(String what, int cases, LongFunction<Optional<Case>> maker) {
        int claimed = 0;
        int drawn = 0;
        for (long seed = 1; drawn < cases; seed++) {
            Optional<Case> made = maker.apply(seed);
            if (made.isEmpty() || made.get().first.unexplained().size() < Leftovers.LEAST_SPOTS) {
                continue;
            }
            drawn++;
            Leftovers.Result result = search(made.get());
            if (!result.grains().isEmpty()) {
                claimed++;
                System.out.printf(Locale.ROOT, "%s, claimed, seed %d: %s%n", what, seed, result.explanation());
                result.grains()
                        .forEach(g -> System.out.printf(
                                Locale.ROOT,
                                "    evidence %.1f: %s%n",
                                g.solution().score(),
                                g.sentence()));
            }
        }
        System.out.printf("%s: %d of %d claimed%n", what, claimed, drawn);
    }

    /**
     * How many of some cases are settled by themselves and with what is found in their leftovers, rightly or not. An answer is
     * right when it stands as the first or the second grain does, as the crystal that is offered is the right one.
     */
    private static void wholeVerdicts(
            String what, int cases, boolean rightCrystal, LongFunction<Optional<Case>> maker) {
        int[] alone = new int[2];
        int[] whole = new int[2];
        int drawn = 0;
        for (long seed = 1; drawn < cases; seed++) {
            Optional<Case> made = maker.apply(seed);
            if (made.isEmpty() || made.get().first.unexplained().size() < Leftovers.LEAST_SPOTS) {
                continue;
            }
            drawn++;
            Crystal own = made.get().first.placement().crystal();
            int other = (CRYSTALS.indexOf(own.name().toLowerCase(Locale.ROOT)) + 1) % CRYSTALS.size();
            Crystal offered =
                    rightCrystal ? own : CrystalShelf.find(CRYSTALS.get(other)).orElseThrow();
            SearchResult result = searched(made.get(), offered);
            if (result.best().isEmpty()) {
                continue;
            }
            Solution best = result.best().get();
            int right = rightCrystal && isRight(made.get(), best) ? 1 : 0;
            List<Grain> grains = Leftovers.of(List.of(offered))
                    .search(made.get().pattern, best)
                    .grains();
            Verdict by = Verdict.of(result);
            Verdict with = Verdict.of(result, grains);
            alone[right] += by instanceof Verdict.Settled ? 1 : 0;
            whole[right] += with instanceof Verdict.Settled ? 1 : 0;
            if (right == 0 && with instanceof Verdict.Settled) {
                System.out.printf("%s, seed %d: %s -> %s%n", what, seed, by.sentence(), with.sentence());
            }
        }
        System.out.printf(
                "%s: of %d settled rightly alone %d, wrongly %d; with the leftovers rightly %d, wrongly %d%n",
                what, cases, alone[1], alone[0], whole[1], whole[0]);
    }

    private static boolean isRight(Case made, Solution best) {
        return Stream.concat(Stream.of(made.first.placement().orientation()), made.second.stream())
                .anyMatch(truth -> Stream.concat(Stream.of(best.placement().orientation()), best.halfTurn().stream())
                        .anyMatch(o -> Math.toDegrees(Misorientation.between(made.lattice(truth), made.lattice(o))
                                        .angle())
                                < 2));
    }

    private static Optional<Case> halfAsStrong(long seed) {
        Random random = new Random(seed);
        Crystal crystal =
                CrystalShelf.find(CRYSTALS.get(random.nextInt(CRYSTALS.size()))).orElseThrow();
        return mixed(crystal, orientation(crystal, random), crystal, orientation(crystal, random), 0.5, seed);
    }

    private static Leftovers.Result search(Case made) {
        return Leftovers.of(List.of(made.first.placement().crystal())).search(made.pattern, made.first);
    }

    public static void main(String[] args) {
        int cases = Integer.parseInt(args[0]);
        wholeVerdicts("a second grain of half the strength", cases, true, DrawnGrains::halfAsStrong);
        wholeVerdicts("stray spots", cases, true, DrawnGrains::strays);
        wholeVerdicts("a crystal that was not offered", cases, true, DrawnGrains::unlisted);
        wholeVerdicts("a superlattice", cases, true, DrawnGrains::superlattice);
        wholeVerdicts("two grains, another crystal offered", cases, false, DrawnGrains::halfAsStrong);
        falseClaims("stray spots", cases, DrawnGrains::strays);
        falseClaims("a crystal that was not offered", cases, DrawnGrains::unlisted);
        falseClaims("a superlattice", cases, DrawnGrains::superlattice);
        int with = 0;
        int found = 0;
        int more = 0;
        List<Double> errors = new ArrayList<>();
        List<Double> offs = new ArrayList<>();
        for (long seed = 1; with < cases; seed++) {
            Optional<Case> made = grains(seed);
            if (made.isEmpty() || made.get().first.unexplained().size() < Leftovers.LEAST_SPOTS) {
                continue;
            }
            with++;
            Leftovers.Result result = search(made.get());
            boolean hit = made.get().hit(result, 4).isPresent();
            found += hit ? 1 : 0;
            more += result.grains().size() > (hit ? 1 : 0) ? 1 : 0;
            if (!result.grains().isEmpty()) {
                Grain grain = result.grains().get(0);
                offs.add(made.get().off(grain));
                errors.add(made.get().off(grain)
                        / Math.toDegrees(grain.solution().errors().leanX()));
            }
        }
        System.out.printf("second grains: %d of %d found within 4°; %d cases with another claim%n", found, with, more);
        errors.sort(null);
        offs.sort(null);
        System.out.printf(
                Locale.ROOT,
                "angle to the truth: median %.2f°, nine in ten below %.2f°; over the stated error of a lean: median %.2f,"
                        + " nine in ten below %.2f%n",
                offs.get(offs.size() / 2),
                offs.get(9 * offs.size() / 10),
                errors.get(errors.size() / 2),
                errors.get(9 * errors.size() / 10));
    }
}
