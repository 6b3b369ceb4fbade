package io.github.zonewright.indexing;

import io.github.zonewright.TestImages;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalCif;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.io.IOException;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.TreeMap;
import java.util.stream.Collectors;

/**
 * Searches the leftovers of a folder of patterns with known answers and prints what further grains are claimed, and which of
 * them are true: {@code LeftoverEvaluation folder [only|without name,name,…]}. A claim is true when most of the spots that it
 * explains alone are those that spots.csv gives to grain 2.
 */
public final class LeftoverEvaluation {

    private static final double NEAR = 2;

    private LeftoverEvaluation() {}

    public static void main(String[] args) throws IOException {
        Path folder = Path.of(args[0]);
        List<String> names = args.length > 2 ? Arrays.asList(args[2].split(",")) : List.of();
        Map<String, PatternTruth> truths = new TreeMap<>();
        PatternTruth.table(folder.resolve("truth.csv")).forEach(r -> truths.put(r.get("file"), new PatternTruth(r)));
        Map<String, List<Map<String, String>>> second = PatternTruth.table(folder.resolve("spots.csv")).stream()
                .filter(r -> r.get("grain").equals("2"))
                .collect(Collectors.groupingBy(r -> r.get("file")));
        int with = 0;
        int claimable = 0;
        int found = 0;
        int without = 0;
        int falseClaims = 0;
        int settledWrong = 0;
        for (Map<String, String> input : PatternTruth.table(folder.resolve("inputs.csv"))) {
            String file = input.get("file");
            boolean named = names.contains(file.replace(".tif", ""));
            if (args.length > 2 && named != args[1].equals("only")) {
                continue;
            }
            Crystal crystal = CrystalCif.read(folder.resolve("crystals").resolve(input.get("cif")))
                    .get(0);
            MeasuredPattern pattern = SpotFinder.measure(TestImages.read(folder.resolve(file)));
            SearchResult result = OrientationSearch.of(
                            crystal,
                            Beam.ofKilovolts(Double.parseDouble(input.get("kV"))),
                            Double.parseDouble(input.get("K_told")),
                            Double.parseDouble(input.get("K_tol_told")),
                            input.get("mirror").equals("1"))
                    .find(pattern);
            if (result.best().isEmpty()) {
                continue;
            }
            Solution first = result.best().get();
            long start = System.nanoTime();
            Leftovers.Result leftovers = Leftovers.of(List.of(crystal)).search(pattern, first);
            long took = (System.nanoTime() - start) / 1_000_000;
            Verdict alone = Verdict.of(result);
            Verdict whole = Verdict.of(result, leftovers.grains());
            boolean correct = !truths.get(file).isNegative()
                    && truths.get(file)
                                    .errorOf(crystal, first.placement().orientation())
                                    .inPlane()
                            < 1;
            boolean settled = whole instanceof Verdict.Settled;
            settledWrong += settled && !correct ? 1 : 0;
            if (!alone.getClass().equals(whole.getClass())) {
                System.out.printf(
                        "%-12s %s with the leftovers: %s -> %s%n",
                        file.replace(".tif", ""), correct ? "right" : "WRONG", alone.sentence(), whole.sentence());
            }
            if (truths.get(file).isNegative()) {
                continue;
            }
            List<PixelPoint> truth = second.getOrDefault(file, List.of()).stream()
                    .filter(r -> r.get("visible").equals("1"))
                    .map(r -> new PixelPoint(Double.parseDouble(r.get("x")), Double.parseDouble(r.get("y"))))
                    .toList();
            boolean right = truths.get(file)
                            .errorOf(crystal, first.placement().orientation())
                            .inPlane()
                    < 1;
            long left = first.unexplained().stream()
                    .filter(s -> truth.stream().anyMatch(t -> t.distanceTo(s.position()) < NEAR))
                    .count();
            System.out.printf(
                    Locale.ROOT,
                    "%-12s %s %5d ms, %d left over, %d of them of grain 2 (%d visible): %s%n",
                    file.replace(".tif", ""),
                    right ? "right" : "WRONG",
                    took,
                    first.unexplained().size(),
                    left,
                    truth.size(),
                    leftovers.explanation());
            boolean hit = false;
            for (Grain grain : leftovers.grains()) {
                List<SpotMatch> own = grain.solution().matches().stream()
                        .filter(m -> !grain.shared().contains(m))
                        .toList();
                long theirs = own.stream()
                        .filter(m -> truth.stream()
                                .anyMatch(t -> t.distanceTo(m.measured().position()) < NEAR))
                        .count();
                boolean isTrue = 2 * theirs > own.size();
                hit |= isTrue;
                falseClaims += isTrue ? 0 : 1;
                System.out.printf(
                        Locale.ROOT,
                        "    %s %d of its own %d, rms %.2f px, evidence %.1f: %s%n",
                        isTrue ? "true" : "FALSE",
                        theirs,
                        own.size(),
                        grain.solution().rmsResidual(),
                        grain.solution().score(),
                        grain.sentence());
            }
            with += truth.isEmpty() ? 0 : 1;
            without += truth.isEmpty() ? 1 : 0;
            claimable += left >= Leftovers.LEAST_SPOTS ? 1 : 0;
            found += hit ? 1 : 0;
        }
        System.out.printf(
                "%d images with a second grain (%d with %d of its spots left over): found %d; %d without; false claims %d;"
                        + " settled wrongly with the leftovers %d%n",
                with, claimable, Leftovers.LEAST_SPOTS, found, without, falseClaims, settledWrong);
    }
}
