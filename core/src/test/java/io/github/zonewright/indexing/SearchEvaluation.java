package io.github.zonewright.indexing;

import io.github.zonewright.TestImages;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalCif;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.io.IOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.TreeMap;
import java.util.stream.Collectors;

/**
 * Runs the orientation search over a folder of patterns with known answers and prints how it fares: {@code SearchEvaluation
 * folder [only|without name,name,…]}. The folder holds inputs.csv, truth.csv, the images and crystals/*.cif.
 */
public final class SearchEvaluation {

    private SearchEvaluation() {}

    /** One figure per level. */
    private static final class Tally {
        private int images;
        private int right;
        private int zoneAndInPlane;
        private int within01;
        private int unique;
        private int settledUnique;
        private int settledWrong;
        private int shared;
        private int tiedShared;
        private final List<Double> inPlane = new ArrayList<>();
        private final List<Double> tilt = new ArrayList<>();
        private final List<Double> centre = new ArrayList<>();
        private final List<Double> bound = new ArrayList<>();
        private final List<Double> overBound = new ArrayList<>();
        private final List<Double> leaning = new ArrayList<>();
        private final List<Double> overStated = new ArrayList<>();

        private void lean(PatternTruth truth, PatternTruth.Error error, SolutionErrors stated) {
            double off = error.tilt() / Math.toDegrees(Math.hypot(stated.leanX(), stated.leanY()));
            overStated.add(off);
            if (Math.hypot(truth.number("mistilt_x_deg"), truth.number("mistilt_y_deg")) >= 1) {
                leaning.add(error.tilt());
            }
        }

        private long statedCovers(double times) {
            return overStated.stream().filter(o -> o < times).count();
        }

        private void verdict(boolean only, boolean right, Verdict verdict) {
            unique += only ? 1 : 0;
            shared += only ? 0 : 1;
            settledUnique += only && right && verdict instanceof Verdict.Settled ? 1 : 0;
            tiedShared += !only && verdict instanceof Verdict.Tied ? 1 : 0;
            settledWrong += !right && verdict instanceof Verdict.Settled ? 1 : 0;
        }
    }

    public static void main(String[] args) throws IOException {
        Path folder = Path.of(args[0]);
        List<String> names = args.length > 2 ? Arrays.asList(args[2].split(",")) : List.of();
        Map<String, PatternTruth> truths = new TreeMap<>();
        PatternTruth.table(folder.resolve("truth.csv")).forEach(r -> truths.put(r.get("file"), new PatternTruth(r)));
        Map<String, List<Map<String, String>>> spots = PatternTruth.table(folder.resolve("spots.csv")).stream()
                .collect(Collectors.groupingBy(row -> row.get("file")));
        Map<String, Tally> tallies = new TreeMap<>();
        for (Map<String, String> input : PatternTruth.table(folder.resolve("inputs.csv"))) {
            String file = input.get("file");
            boolean named = names.contains(file.replace(".tif", ""));
            if (args.length > 2 && named != args[1].equals("only")) {
                continue;
            }
            evaluate(folder, input, truths.get(file), spots.getOrDefault(file, List.of()), tallies);
        }
        tallies.forEach((level, t) -> System.out.printf(
                Locale.ROOT,
                "%-9s %2d images: right %d, zone and in-plane within 1° %d (0.1°: %d); median in-plane %.4f°, tilt %.2f°,"
                        + " centre %.3f px; unique %d, settled of them %d; shared %d, tied of them %d; settled with a wrong"
                        + " zone or rotation %d%n",
                level,
                t.images,
                t.right,
                t.zoneAndInPlane,
                t.within01,
                median(t.inPlane),
                median(t.tilt),
                median(t.centre),
                t.unique,
                t.settledUnique,
                t.shared,
                t.tiedShared,
                t.settledWrong));
        System.out.println();
        // For a normal distribution half of the errors are below 0.67 of the standard uncertainty; in two dimensions 63
        // %
        // are within the root of the summed variances and 98 % within twice that.
        tallies.forEach((level, t) -> System.out.printf(
                Locale.ROOT,
                "%-9s in-plane: bound (one sd) median %.4f°, error over bound median %.2f, root mean square %.2f; lean of"
                        + " those that lean by 1° or more: %d, median error %.2f°; lean within its stated uncertainty %d, within"
                        + " twice %d, of %d%n",
                level,
                median(t.bound),
                median(t.overBound),
                Math.sqrt(t.overBound.stream().mapToDouble(o -> o * o).average().orElse(Double.NaN)),
                t.leaning.size(),
                median(t.leaning),
                t.statedCovers(1),
                t.statedCovers(2),
                t.overStated.size()));
    }

    private static void evaluate(
            Path folder,
            Map<String, String> input,
            PatternTruth truth,
            List<Map<String, String>> spots,
            Map<String, Tally> tallies)
            throws IOException {
        Crystal crystal = CrystalCif.read(folder.resolve("crystals").resolve(input.get("cif")))
                .get(0);
        OrientationSearch search = OrientationSearch.of(
                crystal,
                Beam.ofKilovolts(Double.parseDouble(input.get("kV"))),
                Double.parseDouble(input.get("K_told")),
                Double.parseDouble(input.get("K_tol_told")),
                input.get("mirror").equals("1"));
        long start = System.nanoTime();
        MeasuredPattern pattern = SpotFinder.measure(TestImages.read(folder.resolve(input.get("file"))));
        long middle = System.nanoTime();
        SearchResult result = search.find(pattern);
        long end = System.nanoTime();
        Tally tally = tallies.computeIfAbsent(truth.level(), l -> new Tally());
        tally.images++;
        System.out.printf(
                Locale.ROOT,
                "%-12s %4d+%4d ms %3d spots ",
                input.get("file").replace(".tif", ""),
                (middle - start) / 1_000_000,
                (end - middle) / 1_000_000,
                pattern.spots().size());
        if (result.best().isEmpty()) {
            System.out.println(result.explanation());
            if (truth.isNegative()) {
                tally.right++;
            }
            return;
        }
        Solution best = result.best().get();
        String more = result.solutions().stream()
                .skip(1)
                .limit(3)
                .map(s -> String.format(
                        Locale.ROOT, "[%s] %.1f", s.placement().setting().zone(), s.score()))
                .toList()
                .toString();
        String said = String.format(
                Locale.ROOT,
                "%s (unique %s) [%s] score %.1f, own %.1f, %d of %d, rms %.2f px, next %s",
                Verdict.of(result).sentence(),
                truth.row().get("unique"),
                best.placement().setting().zone(),
                best.score(),
                best.ownScore().orElse(Double.NaN),
                best.matches().size(),
                pattern.spots().size(),
                best.rmsResidual(),
                more);
        if (truth.isNegative()) {
            System.out.println("CLAIMED " + said);
            return;
        }
        PatternTruth.Error error = truth.errorOf(crystal, best.placement().orientation());
        double centre = best.placement().camera().centre().distanceTo(truth.centre());
        boolean right = error.total() < 1;
        boolean inPlane = error.inPlane() < 1 && error.tilt() < 10;
        tally.right += right ? 1 : 0;
        tally.verdict(truth.row().get("unique").equals("1"), inPlane, Verdict.of(result));
        tally.zoneAndInPlane += inPlane ? 1 : 0;
        tally.within01 += inPlane && error.inPlane() < 0.1 ? 1 : 0;
        if (inPlane) {
            tally.lean(truth, error, best.errors());
            // The bound is that of Gaussian spots.
            boolean discs = truth.number("disc_px") > 0;
            double bound = RotationBound.degrees(spots, truth.centre(), truth.number("sigma_px"));
            if (!discs) {
                tally.bound.add(bound);
                tally.overBound.add(error.inPlane() / bound);
            }
        }
        if (right) {
            tally.inPlane.add(error.inPlane());
            tally.tilt.add(error.tilt());
            tally.centre.add(centre);
        }
        System.out.printf(
                Locale.ROOT,
                "%s truth [%s] in-plane %.4f° (σ %.4f) tilt %.2f° (σ %.2f, %.2f) centre %.2f px K %.2f%% %s; %s%n",
                right ? "right" : inPlane ? "lean " : "WRONG",
                truth.zone(),
                error.inPlane(),
                Math.toDegrees(best.errors().rotation()),
                error.tilt(),
                Math.toDegrees(best.errors().leanX()),
                Math.toDegrees(best.errors().leanY()),
                centre,
                100 * (best.placement().camera().constant() / truth.number("K") - 1),
                error.against(),
                said);
    }

    private static double median(List<Double> values) {
        if (values.isEmpty()) {
            return Double.NaN;
        }
        List<Double> sorted = values.stream().sorted().toList();
        return sorted.get(sorted.size() / 2);
    }
}
