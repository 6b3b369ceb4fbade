package io.github.zonewright.imagej.bridge;

import ij.measure.ResultsTable;
import io.github.zonewright.spots.MeasuredValue;
import java.util.List;
import java.util.Optional;

/** Readings of the ruler as an ImageJ table, under a title of its own so that the user's "Results" stay as they are. */
public final class SpacingTable {
    private SpacingTable() {}

    /**
     * A row of the table.
     *
     * @param order which spot of its row was read
     * @param length length per order in px
     * @param d the spacing, empty without a scale
     * @param ratio ratio to the reading before
     * @param degrees angle to the reading before in degrees
     * @param forms the {hkl} that it may be
     */
    public record Row(
            int order,
            MeasuredValue length,
            Optional<MeasuredValue> d,
            Optional<MeasuredValue> ratio,
            Optional<MeasuredValue> degrees,
            String forms) {}

    /**
     * One row for each reading.
     *
     * @param rows the readings
     * @param unit unit of the spacings
     * @return the table
     */
    public static ResultsTable of(List<Row> rows, String unit) {
        ResultsTable table = new ResultsTable();
        table.setPrecision(4);
        table.showRowNumbers(false);
        for (Row row : rows) {
            table.addRow();
            table.addValue("order", row.order());
            value(table, "length (px)", "length su (px)", Optional.of(row.length()));
            value(table, "d (" + unit + ")", "d su (" + unit + ")", row.d());
            value(table, "ratio", "ratio su", row.ratio());
            value(table, "angle (°)", "angle su (°)", row.degrees());
            table.addValue("{hkl}", row.forms());
        }
        if (!rows.isEmpty()) {
            table.setDecimalPlaces(table.getColumnIndex("order"), 0);
        }
        return table;
    }

    private static void value(ResultsTable table, String name, String error, Optional<MeasuredValue> value) {
        table.addValue(name, value.map(MeasuredValue::value).orElse(Double.NaN));
        table.addValue(error, value.map(MeasuredValue::error).orElse(Double.NaN));
    }
}
