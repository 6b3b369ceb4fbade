package io.github.zonewright.imagej.bridge;

import ij.measure.ResultsTable;
import io.github.zonewright.indexing.RowAnswer;
import java.util.stream.Collectors;

/** What one row of spots may be, as an ImageJ table. */
public final class RowTable {
    private static final int LARGEST_INDEX = 2;
    private static final int MOST_ZONES = 12;

    private RowTable() {}

    /**
     * One row for each family of planes that has the row's spacing.
     *
     * @param row the row of spots
     * @return the table
     */
    public static ResultsTable of(RowAnswer row) {
        ResultsTable table = new ResultsTable();
        table.setPrecision(4);
        for (RowAnswer.Candidate candidate : row.candidates()) {
            table.addRow();
            table.addValue("crystal", candidate.crystal().name());
            table.addValue("{hkl}", "{" + candidate.hkl() + "}");
            table.addValue("d (Å)", candidate.d());
            table.addValue("d measured (Å)", row.d().value());
            table.addValue("su d (Å)", row.d().error());
            table.addValue("forbidden", candidate.absent() ? "yes" : "no");
            table.addValue(
                    "circle of zones",
                    candidate.zones(LARGEST_INDEX).stream()
                            .limit(MOST_ZONES)
                            .map(z -> "[" + z + "]")
                            .collect(Collectors.joining(" ")));
        }
        return table;
    }
}
