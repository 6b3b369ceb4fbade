package io.github.zonewright.imagej.bridge;

import ij.measure.ResultsTable;
import io.github.zonewright.indexing.FrameAnswer;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.Verdict;
import java.util.List;
import java.util.Optional;
import java.util.function.Function;

/** The answers to a series as an ImageJ table, one row for each frame. */
public final class SeriesTable {
    /** A number that is read off a solution. */
    private record Column(String name, int decimals, Function<Solution, Double> value) {}

    private static final List<Column> ANSWER = List.of(
            new Column(
                    "rotation (°)",
                    4,
                    s -> Math.toDegrees(s.placement().setting().rotation())),
            new Column("su rotation (°)", 4, s -> Math.toDegrees(s.errors().rotation())));

    private static final List<Column> DETAILS = List.of(
            new Column("explained", 0, s -> (double) s.matches().size()),
            new Column("unexplained", 0, s -> (double) s.unexplained().size()),
            new Column("residual (px)", 3, Solution::rmsResidual),
            new Column("score", 1, Solution::score),
            new Column(
                    "lean right (°)",
                    3,
                    s -> Math.toDegrees(s.placement().setting().leanX())),
            new Column("su lean right (°)", 3, s -> Math.toDegrees(s.errors().leanX())),
            new Column(
                    "lean up (°)",
                    3,
                    s -> Math.toDegrees(s.placement().setting().leanY())),
            new Column("su lean up (°)", 3, s -> Math.toDegrees(s.errors().leanY())),
            new Column("x centre (px)", 3, s -> s.placement().camera().centre().x()),
            new Column("y centre (px)", 3, s -> s.placement().camera().centre().y()),
            new Column("camera constant (px·Å)", 3, s -> s.placement().camera().constant()));

    private static final String TURNED = "turned (°)";
    private static final int DECIMALS = 3;

    private final ResultsTable table = new ResultsTable();

    /** An empty table. */
    public SeriesTable() {
        table.setPrecision(DECIMALS);
    }

    /**
     * The table.
     *
     * @return the table itself, which grows
     */
    public ResultsTable table() {
        return table;
    }

    /**
     * Adds a row. What a frame has no answer to stays empty; angles are in degrees, places and residuals in px.
     *
     * @param number the number by which a person knows the frame
     * @param answer the answer
     * @param note what else there is to say; empty for nothing
     */
    public void add(int number, FrameAnswer answer, String note) {
        Verdict verdict = answer.verdict();
        Optional<Solution> best = answer.result().best();
        table.addRow();
        table.addValue("frame", number);
        table.addValue("label", answer.label());
        table.addValue("verdict", word(verdict));
        table.addValue("crystal", best.map(s -> s.placement().crystal().name()).orElse(""));
        table.addValue(
                "zone axis",
                best.map(s -> "[" + s.placement().setting().zone() + "]").orElse(""));
        ANSWER.forEach(column -> add(column.name, column.decimals, best.map(column.value)));
        add(TURNED, DECIMALS, answer.turned().stream().mapToObj(Math::toDegrees).findFirst());
        DETAILS.forEach(column -> add(column.name, column.decimals, best.map(column.value)));
        table.addValue("followed", answer.followed() ? "yes" : "no");
        String reason = verdict instanceof Verdict.Settled ? "" : verdict.sentence();
        table.addValue("reason", (reason + " " + note).strip());
        table.setDecimalPlaces(table.getColumnIndex("frame"), 0);
    }

    /** Rounded, since ImageJ would write small values with an exponent. */
    private void add(String column, int decimals, Optional<Double> value) {
        double unit = Math.pow(10, decimals);
        value.ifPresentOrElse(
                v -> table.addValue(column, Math.rint(v * unit) / unit), () -> table.addValue(column, ""));
        table.setDecimalPlaces(table.getColumnIndex(column), decimals);
    }

    /**
     * The verdict in a word.
     *
     * @param verdict the verdict
     * @return settled, tied or open
     */
    public static String word(Verdict verdict) {
        if (verdict instanceof Verdict.Settled) {
            return "settled";
        }
        return verdict instanceof Verdict.Tied ? "tied" : "open";
    }
}
