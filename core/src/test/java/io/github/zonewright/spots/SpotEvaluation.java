package io.github.zonewright.spots;

import io.github.zonewright.TestImages;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.PixelPoint;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.TreeMap;

/**
 * Runs the spot finder over a folder of patterns with known answers ({@code truth.csv}, {@code spots.csv}) and prints how
 * well it did. Arguments: the folder, then names of files to leave out.
 */
final class SpotEvaluation {

    private static final double KNOWN = 3;

    private final Map<String, List<Map<String, String>>> trueSpots = new HashMap<>();
    private final Map<String, Tally> tallies = new LinkedHashMap<>();

    private final Map<String, List<Double>> byKind = new TreeMap<>();

    private static final class Tally {
        int images;
        int visible;
        int found;
        int measured;
        int spurious;
        int coordinates;
        int covered;
        final List<Double> centreErrors = new ArrayList<>();
        final List<Double> centrePulls = new ArrayList<>();
        final List<Double> spotErrors = new ArrayList<>();
        final List<Double> times = new ArrayList<>();
    }

    public static void main(String[] arguments) throws IOException {
        new SpotEvaluation().run(Path.of(arguments[0]), Arrays.asList(arguments));
    }

    private void run(Path folder, List<String> leftOut) throws IOException {
        for (Map<String, String> row : table(folder.resolve("spots.csv"))) {
            trueSpots
                    .computeIfAbsent(row.get("file"), name -> new ArrayList<>())
                    .add(row);
        }
        System.out.println("file            found/visible  all  spurious  sigma(true)  centre-error (stated) [source]"
                + "  candidates  hidden%  ms");
        for (Map<String, String> truth : table(folder.resolve("truth.csv"))) {
            String file = truth.get("file");
            if (!leftOut.contains(file) && Files.exists(folder.resolve(file))) {
                evaluate(TestImages.read(folder.resolve(file)), truth);
            }
        }
        tallies.forEach(SpotEvaluation::print);
        byKind.forEach((kind, pulls) -> System.out.printf(
                Locale.ROOT,
                "%s: %d coordinates, 68 %% within %.2f stated errors%n",
                kind,
                pulls.size(),
                quantile(pulls, 0.6827)));
    }

    private void evaluate(GrayImage image, Map<String, String> truth) {
        Tally tally = tallies.computeIfAbsent(truth.get("level"), level -> new Tally());
        SpotFinder.measure(image);
        long start = System.nanoTime();
        MeasuredPattern pattern = SpotFinder.measure(image);
        double time = (System.nanoTime() - start) / 1e6;
        tally.images++;
        tally.times.add(time);
        List<Map<String, String>> known = trueSpots.getOrDefault(truth.get("file"), List.of());
        double disc = number(truth, "disc_px");
        double sigma = number(truth, "sigma_px");
        double reach = Math.max(2, Math.max(disc, 2.355 * sigma / 2));
        int visible = 0;
        int found = 0;
        List<Double> pulls = new ArrayList<>();
        StringBuilder missed = new StringBuilder();
        for (Map<String, String> row : known) {
            if (row.get("visible").equals("1") && row.get("grain").matches("[12]")) {
                visible++;
                MeasuredSpot nearest = nearest(pattern.spots(), point(row));
                if (nearest != null && nearest.position().distanceTo(point(row)) <= reach) {
                    found++;
                    double bound = nearest.positionError();
                    double dx = nearest.position().x() - number(row, "x");
                    double dy = nearest.position().y() - number(row, "y");
                    tally.coordinates += 2;
                    tally.covered += (Math.abs(dx) <= bound ? 1 : 0) + (Math.abs(dy) <= bound ? 1 : 0);
                    String kind = nearest.saturated()
                            ? "saturated"
                            : "snr < " + (int) Math.pow(10, Math.ceil(2 * Math.log10(nearest.signalToNoise())) / 2);
                    byKind.computeIfAbsent(kind, key -> new ArrayList<>()).add(Math.abs(dx) / bound);
                    byKind.get(kind).add(Math.abs(dy) / bound);
                    pulls.add(Math.abs(dx) / bound);
                    pulls.add(Math.abs(dy) / bound);
                    tally.spotErrors.add(Math.hypot(dx, dy));
                } else {
                    missed.append(String.format(
                            Locale.ROOT,
                            " -(%s,%s snr %s at %s|%s forced %.1f)",
                            row.get("grain"),
                            row.get("h") + row.get("k") + row.get("l"),
                            row.get("snr"),
                            row.get("x"),
                            row.get("y"),
                            pattern.measureAt(point(row)).signalToNoise()));
                }
            }
        }
        int spurious = 0;
        for (MeasuredSpot spot : pattern.spots()) {
            boolean matched = known.stream()
                    .anyMatch(row -> number(row, "snr") >= KNOWN && point(row).distanceTo(spot.position()) <= reach);
            if (!matched) {
                spurious++;
                missed.append(String.format(
                        Locale.ROOT,
                        " +(%.1f|%.1f snr %.1f%s)",
                        spot.position().x(),
                        spot.position().y(),
                        spot.signalToNoise(),
                        known.stream()
                                .filter(row -> point(row).distanceTo(spot.position()) <= 3 * reach)
                                .map(row -> String.format(
                                        Locale.ROOT,
                                        "; true snr %s at %.1f px",
                                        row.get("snr"),
                                        point(row).distanceTo(spot.position())))
                                .reduce("", String::concat)));
            }
        }
        tally.visible += visible;
        tally.found += found;
        tally.measured += pattern.spots().size();
        tally.spurious += spurious;
        StringBuilder centre = new StringBuilder("-");
        if (!truth.get("centre_x").isEmpty()) {
            PixelPoint real = new PixelPoint(number(truth, "centre_x"), number(truth, "centre_y"));
            if (pattern.centre().isPresent()) {
                PatternCentre best = pattern.centre().get();
                double error = best.position().distanceTo(real);
                tally.centreErrors.add(error);
                tally.centrePulls.add(error / best.error());
                int rank = 1;
                for (CentreCandidate candidate : pattern.centres()) {
                    if (candidate.centre().position().distanceTo(real) < 1.5) {
                        break;
                    }
                    rank++;
                }
                centre = new StringBuilder(String.format(
                        Locale.ROOT, "%6.3f (%.3f) [%s] rank %d of", error, best.error(), best.source(), rank));
            } else {
                tally.centreErrors.add(Double.POSITIVE_INFINITY);
            }
        }
        System.out.printf(
                Locale.ROOT,
                "%-15s %3d/%3d %4d %3d  pull68 %.2f sigma %5.2f (%.2f,%.2f)  %s %d  %.1f%%  %.0f ms%s%n",
                truth.get("file").replace(".tif", ""),
                found,
                visible,
                pattern.spots().size(),
                spurious,
                quantile(pulls, 0.6827),
                pattern.spotSigma(),
                sigma,
                disc,
                centre,
                pattern.centres().size(),
                100.0 * pattern.hidden().count() / (image.width() * image.height()),
                time,
                missed.length() > 500 ? missed.substring(0, 500) + "…" : missed);
    }

    private static void print(String level, Tally tally) {
        System.out.printf(
                Locale.ROOT,
                "%n%s, %d images: visible spots found %d of %d (%.1f %%); spurious %d of %d (%.1f %%); centre error median"
                        + " %.3f p90 %.3f px, median pull %.2f; spot error median %.3f px; covered at 1 sigma %.1f %% of %d;"
                        + " time median %.0f max %.0f ms%n",
                level,
                tally.images,
                tally.found,
                tally.visible,
                100.0 * tally.found / Math.max(1, tally.visible),
                tally.spurious,
                tally.measured,
                100.0 * tally.spurious / Math.max(1, tally.measured),
                quantile(tally.centreErrors, 0.5),
                quantile(tally.centreErrors, 0.9),
                quantile(tally.centrePulls, 0.5),
                quantile(tally.spotErrors, 0.5),
                100.0 * tally.covered / Math.max(1, tally.coordinates),
                tally.coordinates,
                quantile(tally.times, 0.5),
                quantile(tally.times, 1));
    }

    private static double quantile(List<Double> values, double share) {
        double[] sorted =
                values.stream().mapToDouble(Double::doubleValue).sorted().toArray();
        return sorted.length == 0 ? Double.NaN : sorted[(int) Math.min(sorted.length - 1.0, share * sorted.length)];
    }

    private static MeasuredSpot nearest(List<MeasuredSpot> spots, PixelPoint point) {
        MeasuredSpot best = null;
        for (MeasuredSpot spot : spots) {
            if (best == null
                    || spot.position().distanceTo(point) < best.position().distanceTo(point)) {
                best = spot;
            }
        }
        return best;
    }

    private static PixelPoint point(Map<String, String> row) {
        return new PixelPoint(number(row, "x"), number(row, "y"));
    }

    private static double number(Map<String, String> row, String column) {
        String text = row.get(column);
        return text == null || text.isEmpty() ? 0 : Double.parseDouble(text);
    }

    private static List<Map<String, String>> table(Path file) throws IOException {
        List<String> lines = Files.readAllLines(file);
        String[] names = lines.get(0).split(",");
        List<Map<String, String>> rows = new ArrayList<>();
        for (String line : lines.subList(1, lines.size())) {
            String[] cells = line.split(",", -1);
            Map<String, String> row = new HashMap<>();
            for (int i = 0; i < Math.min(names.length, cells.length); i++) {
                row.put(names[i], cells[i]);
            }
            rows.add(row);
        }
        return rows;
    }
}
