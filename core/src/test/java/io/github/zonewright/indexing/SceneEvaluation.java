package io.github.zonewright.indexing;

import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.TreeMap;
import java.util.stream.Collectors;

/**
 * Searches patterns drawn as a microscope shows them and prints which go wrong:
 * {@code SceneEvaluation clean|typical|hard|steep count [first]}.
 */
public final class SceneEvaluation {

    private SceneEvaluation() {}

    public static void main(String[] args) {
        int first = args.length > 2 ? Integer.parseInt(args[2]) : 0;
        Map<String, Integer> counts = new TreeMap<>();
        List<Double> leanErrors = new ArrayList<>();
        List<Double> pulls = new ArrayList<>();
        for (int n = first; n < first + Integer.parseInt(args[1]); n++) {
            DrawnScene c = DrawnScene.of(args[0], n);
            MeasuredPattern pattern = SpotFinder.measure(c.image());
            SearchResult result = OrientationSearch.of(
                            List.of(c.crystal()), c.beam(), KnownCamera.of(c.told(), c.tolerance(), c.mirrored()))
                    .find(pattern);
            Verdict verdict = Verdict.of(result);
            String outcome = outcome(c, result, verdict);
            counts.merge(outcome, 1, Integer::sum);
            result.best().ifPresent(s -> {
                OffTruth off = off(c, s);
                if (off.isRight()) {
                    leanErrors.add(off.tilt());
                    pulls.add(off.tilt() / leanError(s));
                }
            });
            if (!outcome.equals("right Settled") || args.length > 3) {
                System.out.printf(
                        Locale.ROOT,
                        "%3d %-13s %s [%s] lean %.1f° K %+.1f %% e %.3f, %d+%d visible,%s: %d found; %s%n",
                        n,
                        outcome,
                        c.crystal().name(),
                        c.zone(),
                        c.lean(),
                        100 * (c.told() / c.constant() - 1),
                        c.ellipse(),
                        c.visible(),
                        c.spots().size() - c.visible(),
                        c.tags(),
                        pattern.spots().size(),
                        result.best().isEmpty()
                                ? result.explanation()
                                : result.solutions().stream()
                                        .limit(4)
                                        .map(s -> said(c, s))
                                        .collect(Collectors.joining("; ")));
            }
        }
        System.out.println(args[0] + " " + counts);
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

    private static double leanError(Solution s) {
        return Math.toDegrees(Math.hypot(s.errors().leanX(), s.errors().leanY()));
    }

    private static String outcome(DrawnScene c, SearchResult result, Verdict verdict) {
        String kind = verdict.getClass().getSimpleName();
        if (result.best().isEmpty()) {
            return "none " + kind;
        }
        OffTruth off = off(c, result.best().get());
        boolean zone = off.isRight();
        boolean among = verdict instanceof Verdict.Tied t
                && t.solutions().stream().map(s -> off(c, s)).anyMatch(OffTruth::isRight);
        return (zone ? off.total() < 1 ? "right " : "lean " : among ? "among " : "WRONG ") + kind;
    }

    private static String said(DrawnScene c, Solution s) {
        OffTruth off = off(c, s);
        return String.format(
                Locale.ROOT,
                "[%s] %.1f own %.1f, %d, off %.2f° %.2f° (lean %.1f, σ %.2f) centre %.1f rms %.2f",
                s.placement().setting().zone(),
                s.score(),
                s.ownScore().orElse(Double.NaN),
                s.matches().size(),
                off.inPlane(),
                off.tilt(),
                Math.toDegrees(s.placement().setting().lean()),
                leanError(s),
                s.placement().camera().centre().distanceTo(c.centre()),
                s.rmsResidual());
    }

    private static OffTruth off(DrawnScene c, Solution s) {
        return OffTruth.of(c.crystal(), c.orientation(), c.zone(), s.placement());
    }
}
