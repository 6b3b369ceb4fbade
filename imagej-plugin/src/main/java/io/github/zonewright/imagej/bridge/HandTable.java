package io.github.zonewright.imagej.bridge;

import ij.measure.ResultsTable;
import io.github.zonewright.indexing.HandAnswer;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.orientation.ZoneSetting;
import java.util.List;
import java.util.stream.Collectors;

/** The zones that clicked spots may belong to, as an ImageJ table. */
public final class HandTable {
    private HandTable() {}

    /**
     * One row for each answer.
     *
     * @param answers the answers, best first
     * @return the table
     */
    public static ResultsTable of(List<HandAnswer> answers) {
        ResultsTable table = new ResultsTable();
        table.setPrecision(2);
        for (int i = 0; i < answers.size(); i++) {
            HandAnswer answer = answers.get(i);
            ZoneSetting setting = answer.placement().setting();
            table.addRow();
            table.addValue("answer", i + 1);
            table.addValue("crystal", answer.placement().crystal().name());
            table.addValue("zone axis", "[" + setting.zone() + "]");
            table.addValue("rotation (°)", Math.toDegrees(setting.rotation()));
            table.addValue(
                    "indices", answer.indices().stream().map(Hkl::toString).collect(Collectors.joining(", ")));
            table.addValue("d off (%)", largest(answer.spacingResiduals()));
            table.addValue("angle off (°)", largest(answer.angleResiduals()));
            table.addValue("misfit", answer.misfit());
        }
        if (!answers.isEmpty()) {
            table.setDecimalPlaces(table.getColumnIndex("answer"), 0);
        }
        return table;
    }

    /**
     * The largest of residuals, whatever its sign.
     *
     * @param residuals the residuals
     * @return it without its sign; 0 for none
     */
    public static double largest(List<Double> residuals) {
        return residuals.stream().mapToDouble(Math::abs).max().orElse(0);
    }
}
