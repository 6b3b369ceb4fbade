package io.github.zonewright.indexing;

import io.github.zonewright.TestImages;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalCif;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.crystal.ShelfEntry;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.io.IOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Random;
import java.util.TreeMap;
import java.util.stream.Collectors;
import java.util.stream.IntStream;

/**
 * Runs the search over a folder of patterns with known answers among twenty crystals, and prints which comes first: {@code
 * CandidateEvaluation folder with|missing [only|without name,name,…]}. With the right crystal there are nineteen others of the
 * shelf, drawn for each image; where it is missing, twenty others. The others are of all sizes of cell: every fifth of the
 * shelf, ordered by volume, is drawn from alike. None is the right crystal by another name.
 */
public final class CandidateEvaluation {

    private static final int CANDIDATES = 20;

    private CandidateEvaluation() {}

    public static void main(String[] args) throws IOException {
        Path folder = Path.of(args[0]);
        boolean with = args[1].equals("with");
        List<String> names = args.length > 3 ? Arrays.asList(args[3].split(",")) : List.of();
        Map<String, PatternTruth> truths = PatternTruth.table(folder.resolve("truth.csv")).stream()
                .collect(Collectors.toMap(row -> row.get("file"), PatternTruth::new));
        Map<String, Map<String, Integer>> counts = new TreeMap<>();
        for (Map<String, String> input : PatternTruth.table(folder.resolve("inputs.csv"))) {
            boolean named = names.contains(input.get("file").replace(".tif", ""));
            PatternTruth truth = truths.get(input.get("file"));
            if ((args.length > 3 && named != args[2].equals("only")) || truth.isNegative()) {
                continue;
            }
            String outcome = evaluate(folder, input, truth, with);
            counts.computeIfAbsent(truth.level(), l -> new TreeMap<>()).merge(outcome, 1, Integer::sum);
        }
        counts.forEach((level, c) -> System.out.println(level + ": " + c));
    }

    private static String evaluate(Path folder, Map<String, String> input, PatternTruth truth, boolean with)
            throws IOException {
        Crystal right = CrystalCif.read(folder.resolve("crystals").resolve(input.get("cif")))
                .get(0)
                .withName("right");
        List<Crystal> crystals = others(right, input.get("file"), with ? CANDIDATES - 1 : CANDIDATES);
        if (with) {
            crystals.add(right);
        }
        KnownCamera camera = KnownCamera.of(
                Double.parseDouble(input.get("K_told")),
                Double.parseDouble(input.get("K_tol_told")),
                input.get("mirror").equals("1"));
        MeasuredPattern pattern = SpotFinder.measure(TestImages.read(folder.resolve(input.get("file"))));
        long start = System.nanoTime();
        SearchResult result = OrientationSearch.of(
                        crystals, Beam.ofKilovolts(Double.parseDouble(input.get("kV"))), camera)
                .find(pattern);
        long time = (System.nanoTime() - start) / 1_000_000;
        Verdict verdict = Verdict.of(result);
        String outcome = with ? outcome(result, verdict, right, truth) : outcome(verdict, right, camera.tolerance());
        Map<String, Solution> best = new HashMap<>();
        result.solutions().forEach(s -> best.putIfAbsent(name(s), s));
        String list = best.values().stream()
                .sorted(Comparator.comparingDouble(Solution::score).reversed())
                .limit(5)
                .map(s -> String.format(
                        Locale.ROOT,
                        "%s [%s] %.1f (own %.1f), %d, %.2f px, K %+.1f %%",
                        name(s),
                        s.placement().setting().zone(),
                        s.score(),
                        s.ownScore().orElse(Double.NaN),
                        s.matches().size(),
                        s.rmsResidual(),
                        100 * (s.placement().camera().constant() / truth.number("K") - 1)))
                .collect(Collectors.joining("; "));
        System.out.printf(
                Locale.ROOT,
                "%-12s %-9s %2d spots %4d ms %-22s %s | %s%n",
                input.get("file").replace(".tif", ""),
                input.get("crystal"),
                pattern.spots().size(),
                time,
                outcome,
                list,
                verdict.sentence());
        return outcome;
    }

    private static String name(Solution s) {
        return s.placement().crystal().name();
    }

    private static String outcome(SearchResult result, Verdict verdict, Crystal right, PatternTruth truth) {
        if (result.best().isEmpty()) {
            return "no answer";
        }
        List<Solution> named = verdict instanceof Verdict.Tied tied
                ? tied.solutions()
                : List.of(result.best().get());
        boolean among = named.stream()
                .anyMatch(s -> name(s).equals("right")
                        && truth.errorOf(right, s.placement().orientation()).total() < 10);
        String kind = verdict.getClass().getSimpleName();
        return (among ? "first " : "BEHIND ") + kind;
    }

    /** Told by mistake: settled on a crystal that is not built like the right one with a cell within the scale's error. */
    private static String outcome(Verdict verdict, Crystal right, double tolerance) {
        if (verdict instanceof Verdict.Settled settled) {
            Crystal crystal = settled.solution().placement().crystal();
            double size = Math.cbrt(crystal.lattice().volume() / right.lattice().volume());
            boolean alike = crystal.spaceGroup().laueClass()
                            == right.spaceGroup().laueClass()
                    && crystal.spaceGroup().centring() == right.spaceGroup().centring()
                    && Math.abs(size - 1) < 1.2 * tolerance;
            return alike ? "SETTLED on one alike" : "SETTLED";
        }
        return verdict.getClass().getSimpleName();
    }

    private static List<Crystal> others(Crystal right, String seed, int count) {
        List<Crystal> shelf = CrystalShelf.entries().stream()
                .map(ShelfEntry::crystal)
                .filter(c -> !isSame(c, right))
                .sorted(Comparator.comparingDouble(c -> c.lattice().volume()))
                .collect(Collectors.toCollection(ArrayList::new));
        Random random = new Random(seed.hashCode());
        List<Crystal> drawn = new ArrayList<>();
        for (int fifth = 0; fifth < 5; fifth++) {
            List<Crystal> part =
                    new ArrayList<>(shelf.subList(fifth * shelf.size() / 5, (fifth + 1) * shelf.size() / 5));
            Collections.shuffle(part, random);
            drawn.addAll(part.subList(0, CANDIDATES / 5));
        }
        return IntStream.range(0, count).mapToObj(drawn::get).collect(Collectors.toCollection(ArrayList::new));
    }

    private static boolean isSame(Crystal other, Crystal right) {
        return other.formula().equals(right.formula())
                && other.spaceGroup().laueClass() == right.spaceGroup().laueClass()
                && Math.abs(Math.cbrt(other.lattice().volume() / right.lattice().volume()) - 1) < 0.01;
    }
}
