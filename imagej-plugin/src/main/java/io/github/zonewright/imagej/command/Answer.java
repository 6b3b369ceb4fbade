package io.github.zonewright.imagej.command;

import io.github.zonewright.imagej.bridge.SeriesTable;
import io.github.zonewright.imagej.overlay.IndexLabel;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.Leftovers;
import io.github.zonewright.indexing.SearchResult;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.SolutionErrors;
import io.github.zonewright.indexing.Verdict;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;

/** Solutions in words and numbers for a person: degrees, px, px·Å. */
public final class Answer {
    /** A lean known to less than this is called uncertain. */
    private static final double UNCERTAIN_LEAN = Math.toRadians(0.5);

    private Answer() {}

    /**
     * A solution in one line.
     *
     * @param solution the solution
     * @return crystal, zone axis, rotation, spots explained, residual
     */
    public static String line(Solution solution) {
        Placement placement = solution.placement();
        ZoneSetting setting = placement.setting();
        return String.format(
                Locale.ROOT,
                "%s, zone axis %s, rotation %.2f° (%s), %d of %d spots explained, residual %.2f px",
                placement.crystal().name(),
                IndexLabel.of(setting.zone()),
                Math.toDegrees(setting.rotation()),
                IndexLabel.of(setting.reference()),
                solution.matches().size(),
                measured(solution),
                solution.rmsResidual());
    }

    /**
     * A solution's name.
     *
     * @param solution the solution
     * @return crystal and zone axis
     */
    public static String name(Solution solution) {
        Placement p = solution.placement();
        return p.crystal().name() + " " + IndexLabel.of(p.setting().zone());
    }

    /**
     * Where a solution stands in the verdict, in a word.
     *
     * @param solution one of them
     * @param solutions all solutions, best first, at least one
     * @param verdict the verdict on them
     * @return settled, tied or open for those that the verdict speaks of; behind for the others
     */
    public static String verdict(Solution solution, List<Solution> solutions, Verdict verdict) {
        boolean named = solution.equals(solutions.get(0))
                || verdict instanceof Verdict.Tied tied && tied.solutions().contains(solution)
                || verdict instanceof Verdict.Open
                        && solution.score() > solutions.get(0).score() - Verdict.LEAD;
        return named ? SeriesTable.word(verdict) : "behind";
    }

    /**
     * What there is to say of solutions beside their numbers: the verdict, what the first one's spots do not tell apart, and
     * the half turn that they leave open.
     *
     * @param solutions the solutions, best first, at least one
     * @return sentences, the verdict first
     */
    public static List<String> remarks(List<Solution> solutions) {
        List<String> said = new ArrayList<>();
        said.add(Verdict.of(new SearchResult(solutions, "")).sentence());
        said.addAll(remarks(solutions.get(0)));
        return said;
    }

    /**
     * What there is to say of one solution.
     *
     * @param solution the solution
     * @return sentences; none when there is nothing to mind
     */
    public static List<String> remarks(Solution solution) {
        List<String> said = new ArrayList<>(solution.remarks());
        solution.halfTurn().ifPresent(orientation -> {
            ZoneSetting own = solution.placement().setting();
            ZoneSetting turned =
                    ZoneSetting.of(orientation, solution.placement().crystal().lattice(), own.zone(), own.reference());
            said.add(String.format(
                    Locale.ROOT,
                    "Half a turn about the zone axis (rotation %.2f°) explains these spots as well.",
                    Math.toDegrees(turned.rotation())));
        });
        return said;
    }

    /**
     * A lean with its uncertainty.
     *
     * @param solution the solution
     * @return for example {@code lean 1.20° ± 0.30° right, 0.10° ± 0.30° up}; with a word where it is known poorly
     */
    public static String lean(Solution solution) {
        ZoneSetting setting = solution.placement().setting();
        SolutionErrors errors = solution.errors();
        String lean = String.format(
                Locale.ROOT,
                "lean %.2f° ± %.2f° right, %.2f° ± %.2f° up",
                Math.toDegrees(setting.leanX()) + 0.0,
                Math.toDegrees(errors.leanX()),
                Math.toDegrees(setting.leanY()) + 0.0,
                Math.toDegrees(errors.leanY()));
        return isLeanUncertain(solution) ? lean + " (uncertain)" : lean;
    }

    /**
     * Whether the lean is known poorly.
     *
     * @param solution the solution
     * @return true if a standard uncertainty of its parts exceeds 0.5°
     */
    public static boolean isLeanUncertain(Solution solution) {
        return Math.max(solution.errors().leanX(), solution.errors().leanY()) > UNCERTAIN_LEAN;
    }

    /**
     * What a search of the spots left over has found.
     *
     * @param sitting a sitting with a solution shown, and the further crystals in what it leaves over
     * @return sentences: how many, what is to be said of the whole, then each with how it stands to the first
     */
    public static List<String> leftovers(Sitting sitting) {
        Leftovers.Result found = Leftovers.Result.of(
                sitting.chosen().orElseThrow(), sitting.findings().grains());
        List<String> said = new ArrayList<>();
        said.add(found.explanation());
        if (!found.grains().isEmpty()
                && sitting.solutions().stream().findFirst().equals(sitting.chosen())) {
            said.add(sitting.verdict().sentence());
        }
        for (int i = 0; i < found.grains().size(); i++) {
            said.add((i + 1) + ": " + found.grains().get(i).sentence());
        }
        return said;
    }

    /**
     * How many spots were measured.
     *
     * @param solution a solution
     * @return explained and unexplained ones
     */
    public static int measured(Solution solution) {
        return solution.matches().size() + solution.unexplained().size();
    }
}
