package io.github.zonewright.indexing;

import io.github.zonewright.SyntheticPattern;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.crystal.ShelfEntry;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Random;
import java.util.TreeMap;
import java.util.stream.Collectors;

/**
 * Draws patterns of crystals of the shelf of every system, hard ones among them, searches them and prints which go wrong:
 * {@code StressEvaluation typical|hard|steep count [first]}. Drawn by {@link DrawnCrystal} with two-beam or bell-shaped
 * intensities, scatter, spots at random missing, a beam stop, a second grain, ellipse and a wrong camera constant.
 */
public final class StressEvaluation {

    private static final int SIZE = 512;

    private StressEvaluation() {}

    /** How hard it is made: largest lean in degrees, tolerance, largest ellipse, share of second grains. */
    record Level(double lean, double tolerance, double ellipse, double missing, double second, double stop) {
        static Level of(String name) {
            return switch (name) {
                case "typical" -> new Level(2.5, 0.03, 0.01, 0.03, 0.15, 0.2);
                case "hard" -> new Level(5.5, 0.05, 0.025, 0.06, 0.4, 0.3);
                case "steep" -> new Level(9.5, 0.05, 0.03, 0.06, 0.2, 0.2);
                default -> throw new IllegalArgumentException("level: " + name + ", expected typical, hard or steep");
            };
        }
    }

    /** A drawn pattern with its truth. */
    record Case(
            Crystal crystal, Beam beam, Uvw zone, DrawnCrystal.Setup setup, double told, double lean, String tags) {}

    public static void main(String[] args) {
        Level level = Level.of(args[0]);
        int first = args.length > 2 ? Integer.parseInt(args[2]) : 0;
        Map<String, Integer> counts = new TreeMap<>();
        List<Double> leanErrors = new ArrayList<>();
        List<Double> pulls = new ArrayList<>();
        for (int n = first; n < first + Integer.parseInt(args[1]); n++) {
            List<DrawnCrystal.Spot> spots = new ArrayList<>();
            Case c = random(level, n, spots);
            MeasuredPattern pattern = measure(c, spots, level, n);
            SearchResult result = OrientationSearch.of(
                            List.of(c.crystal), c.beam, KnownCamera.of(c.told, level.tolerance, c.setup.mirrored()))
                    .find(pattern);
            Verdict verdict = Verdict.of(result);
            String kind = verdict.getClass().getSimpleName();
            String outcome = "none " + kind;
            String said = result.explanation();
            if (result.best().isPresent()) {
                Solution best = result.best().get();
                OffTruth off = off(c, best);
                boolean zone = off.isRight();
                boolean tied = verdict instanceof Verdict.Tied t
                        && t.solutions().stream().map(s -> off(c, s)).anyMatch(OffTruth::isRight);
                outcome =
                        (zone && off.tilt() < 1 ? "right" : zone ? "lean" : tied ? "tied right" : "WRONG") + " " + kind;
                if (zone && best.halfTurn().isEmpty() || zone) {
                    leanErrors.add(off.tilt());
                    double sd = Math.hypot(best.errors().leanX(), best.errors().leanY());
                    pulls.add(off.tilt() / Math.toDegrees(sd));
                }
                said = String.format(
                        Locale.ROOT,
                        "[%s] score %.1f, own %.1f, %d of %d, off %.3f° and %.2f° (σ %.2f), next %s",
                        best.placement().setting().zone(),
                        best.score(),
                        best.ownScore().orElse(Double.NaN),
                        best.matches().size(),
                        pattern.spots().size(),
                        off.inPlane(),
                        off.tilt(),
                        Math.toDegrees(
                                Math.hypot(best.errors().leanX(), best.errors().leanY())),
                        result.solutions().stream()
                                .skip(1)
                                .limit(3)
                                .map(s -> String.format(
                                        Locale.ROOT,
                                        "[%s] %.1f, %d%s",
                                        s.placement().setting().zone(),
                                        s.score(),
                                        s.matches().size(),
                                        off(c, s).inPlane() < 1 ? " TRUE" : ""))
                                .collect(Collectors.joining("; ")));
            }
            counts.merge(outcome, 1, Integer::sum);
            if (!outcome.startsWith("right")) {
                System.out.printf(
                        Locale.ROOT,
                        "%3d %-14s %s [%s] lean %.1f° K %+.1f %% ellipse %.3f, %d spots drawn%s: %s%n",
                        n,
                        outcome,
                        c.crystal.name(),
                        c.zone,
                        c.lean,
                        100 * (c.told / c.setup.constant() - 1),
                        c.setup.ellipseRatio(),
                        spots.size(),
                        c.tags,
                        said);
            }
        }
        System.out.println(counts);
        leanErrors.sort(null);
        pulls.sort(null);
        System.out.printf(
                Locale.ROOT,
                "lean error median %.2f°, 90 %% %.2f°; over its stated error median %.2f, 68 %% %.2f, 95 %% %.2f%n",
                leanErrors.get(leanErrors.size() / 2),
                leanErrors.get(leanErrors.size() * 9 / 10),
                pulls.get(pulls.size() / 2),
                pulls.get(pulls.size() * 68 / 100),
                pulls.get(pulls.size() * 95 / 100));
    }

    static Case random(Level level, int number, List<DrawnCrystal.Spot> spots) {
        Random random = new Random(7919L * number + 13);
        List<Crystal> shelf = CrystalShelf.entries().stream()
                .map(ShelfEntry::crystal)
                .filter(c -> c.lattice().volume() < 500)
                .toList();
        while (true) {
            Crystal crystal = shelf.get(random.nextInt(shelf.size()));
            // Every other pattern is of a crystal that is not cubic.
            boolean cubic = crystal.spaceGroup().laueClass().toString().contains("-3");
            if (cubic && random.nextBoolean()) {
                continue;
            }
            Beam beam = Beam.ofKilovolts(new double[] {80, 120, 200, 300}[random.nextInt(4)]);
            int most = random.nextInt(4) == 0 ? 3 : random.nextInt(3) == 0 ? 2 : 1;
            Uvw zone = new Uvw(index(random, most), index(random, most), index(random, most));
            if (zone.isZero()) {
                continue;
            }
            zone = zone.reduced();
            double lean = random.nextInt(3) == 0 ? 0.4 * random.nextDouble() : level.lean * random.nextDouble();
            double towards = 2 * Math.PI * random.nextDouble();
            Rotation tilt = Rotation.ofVector(
                    new Vector3(-Math.sin(towards), Math.cos(towards), 0).times(Math.toRadians(lean)));
            Rotation turn = Rotation.ofAxisAngle(Vector3.Z, 2 * Math.PI * random.nextDouble());
            Rotation upright = Rotation.between(crystal.lattice().vector(zone), Vector3.Z);
            double constant = 120 + 260 * random.nextDouble();
            DrawnCrystal.Setup setup = new DrawnCrystal.Setup(
                    crystal,
                    beam.wavelength(),
                    tilt.after(turn).after(upright),
                    new PixelPoint(SIZE * (0.4 + 0.2 * random.nextDouble()), SIZE * (0.4 + 0.2 * random.nextDouble())),
                    constant,
                    1 + level.ellipse * random.nextDouble(),
                    Math.PI * random.nextDouble(),
                    random.nextBoolean(),
                    SIZE,
                    0.01);
            double told = constant * (1 + 0.8 * level.tolerance * (2 * random.nextDouble() - 1));
            spots.clear();
            spots.addAll(DrawnCrystal.spots(setup, number, envelope(crystal, beam, random)));
            spots.removeIf(s -> random.nextDouble() < level.missing || s.peak() < 60);
            boolean close = spots.stream().anyMatch(s -> distance(s, setup) < 18 || tooClose(s, spots));
            if (spots.size() < 7 || spots.size() > 90 || close || isRow(spots, setup)) {
                continue;
            }
            StringBuilder tags = new StringBuilder();
            if (random.nextDouble() < level.second) {
                tags.append(" second");
                addSecond(setup, spots, random, number, crystal, beam);
            }
            if (random.nextDouble() < level.stop) {
                tags.append(" stop");
            }
            return new Case(crystal, beam, zone, setup, told, lean, tags.toString());
        }
    }

    private static int index(Random random, int most) {
        return random.nextInt(2 * most + 1) - most;
    }

    /** Two-beam intensities of a foil, averaged over a bend, or a bell with a power of |F|². */
    private static DrawnCrystal.Envelope envelope(Crystal crystal, Beam beam, Random random) {
        double thickness = 40 * Math.exp(2.3 * random.nextDouble());
        double bend = Math.toRadians(0.1 + 0.4 * random.nextDouble());
        double factor =
                beam.wavelength() * beam.gamma() / (Math.PI * crystal.lattice().volume());
        if (random.nextBoolean()) {
            double width = 0.6 / thickness;
            return (f2, s, g) -> Math.pow(f2, 0.8) * Math.exp(-s * s / (2 * (width * width + bend * bend * g * g / 4)));
        }
        return (f2, s, g) -> {
            double sum = 0;
            for (int i = -4; i <= 4; i++) {
                double bent = s + i * bend * g / 4;
                double effective = Math.sqrt(bent * bent + factor * factor * f2);
                sum += Math.pow(Math.sin(Math.PI * thickness * effective) / effective, 2);
            }
            return factor * factor * f2 * sum / 9;
        };
    }

    private static double distance(DrawnCrystal.Spot s, DrawnCrystal.Setup setup) {
        return Math.hypot(s.x() - setup.centre().x(), s.y() - setup.centre().y());
    }

    private static boolean tooClose(DrawnCrystal.Spot s, List<DrawnCrystal.Spot> spots) {
        return spots.stream().anyMatch(o -> o != s && Math.hypot(o.x() - s.x(), o.y() - s.y()) < 9);
    }

    /** Whether all spots but three lie on one line through the centre. */
    private static boolean isRow(List<DrawnCrystal.Spot> spots, DrawnCrystal.Setup setup) {
        return spots.stream().anyMatch(a -> {
            double ax = (a.x() - setup.centre().x()) / distance(a, setup);
            double ay = (a.y() - setup.centre().y()) / distance(a, setup);
            return spots.stream()
                            .filter(s -> Math.abs((s.x() - setup.centre().x()) * ay
                                            - (s.y() - setup.centre().y()) * ax)
                                    > 6)
                            .count()
                    <= 3;
        });
    }

    /** Spots of a second grain of the same crystal, weaker. */
    private static void addSecond(
            DrawnCrystal.Setup setup,
            List<DrawnCrystal.Spot> spots,
            Random random,
            int seed,
            Crystal crystal,
            Beam beam) {
        Rotation other = Rotation.ofQuaternion(
                random.nextGaussian(), random.nextGaussian(), random.nextGaussian(), random.nextGaussian());
        DrawnCrystal.Setup turned = new DrawnCrystal.Setup(
                crystal,
                setup.wavelength(),
                other,
                setup.centre(),
                setup.constant(),
                setup.ellipseRatio(),
                setup.ellipseAzimuth(),
                setup.mirrored(),
                SIZE,
                setup.width());
        List<DrawnCrystal.Spot> more = DrawnCrystal.spots(turned, seed + 1, envelope(crystal, beam, random));
        more.stream()
                .filter(s -> s.peak() > 400 && distance(s, setup) > 18)
                .limit(12)
                .forEach(s -> spots.add(new DrawnCrystal.Spot(s.hkl(), s.x(), s.y(), 0.3 * s.peak())));
    }

    static MeasuredPattern measure(Case c, List<DrawnCrystal.Spot> spots, Level level, int seed) {
        PixelPoint o = c.setup.centre();
        SyntheticPattern drawn = new SyntheticPattern(SIZE, SIZE, 25)
                .add((x, y) -> 200 / (1 + Math.pow(Math.hypot(x - o.x(), y - o.y()) / 40, 2)))
                .spot(o.x(), o.y(), DrawnCrystal.SIGMA, 50_000);
        spots.forEach(s -> drawn.spot(s.x(), s.y(), DrawnCrystal.SIGMA, s.peak()));
        if (c.tags.contains("stop")) {
            double azimuth = new Random(seed).nextDouble() * 2 * Math.PI;
            double cos = Math.cos(azimuth);
            double sin = Math.sin(azimuth);
            drawn.times((x, y) -> {
                double along = (x - o.x()) * cos + (y - o.y()) * sin;
                double across = (y - o.y()) * cos - (x - o.x()) * sin;
                return along > -12 && Math.abs(across) < 12 ? 0.01 : 1;
            });
        }
        return SpotFinder.measure(drawn.shorts(seed, 1));
    }

    static OffTruth off(Case c, Solution s) {
        return OffTruth.of(c.crystal, c.setup.orientation(), c.zone, s.placement());
    }
}
