package io.github.zonewright.imagej.bridge;

import ij.measure.ResultsTable;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.indexing.Grain;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.SpotOrigin;
import io.github.zonewright.indexing.SpotOrigins;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.HashSet;
import java.util.List;
import java.util.Set;

/** The spots that a solution leaves over, as an ImageJ table: where they lie in its frame, and what they may be. */
public final class LeftoverTable {
    private static final int DECIMALS = 3;

    private LeftoverTable() {}

    /**
     * One row for each spot left over.
     *
     * @param solution the solution
     * @param grains further crystals that explain some of them
     * @return the table
     */
    public static ResultsTable of(Solution solution, List<Grain> grains) {
        Set<MeasuredSpot> left = new HashSet<>(solution.unexplained());
        ResultsTable table = new ResultsTable();
        table.setPrecision(DECIMALS);
        for (SpotOrigin origin : SpotOrigins.of(solution)) {
            if (!left.contains(origin.spot())) {
                continue;
            }
            Vector3 h = origin.indices().indices();
            Vector3 su = origin.indices().errors();
            table.addRow();
            table.addValue("x (px)", origin.spot().position().x());
            table.addValue("y (px)", origin.spot().position().y());
            add(table, "h", h.x());
            add(table, "k", h.y());
            add(table, "l", h.z());
            String further = further(origin.spot(), grains);
            table.addValue("class", further.isEmpty() ? kind(origin) : "further crystal");
            table.addValue("further crystal", further);
            add(table, "su h", su.x());
            add(table, "su k", su.y());
            add(table, "su l", su.z());
            add(table, "layer", origin.indices().layer());
            table.addValue("signal to noise", origin.spot().signalToNoise());
            table.addValue("what it may be", origin.sentence());
        }
        return table;
    }

    /** Rounded, since ImageJ would write small values with an exponent. */
    private static void add(ResultsTable table, String column, double value) {
        table.addValue(column, Math.rint(value * 1000) / 1000);
        table.setDecimalPlaces(table.getColumnIndex(column), DECIMALS);
    }

    private static String further(MeasuredSpot spot, List<Grain> grains) {
        for (int i = 0; i < grains.size(); i++) {
            if (grains.get(i).solution().matches().stream()
                    .anyMatch(m -> m.measured().equals(spot))) {
                return Integer.toString(i + 1);
            }
        }
        return "";
    }

    private static String kind(SpotOrigin origin) {
        if (origin instanceof SpotOrigin.UpperLayer) {
            return "upper layer";
        }
        if (origin instanceof SpotOrigin.DoubleDiffraction) {
            return "double diffraction";
        }
        if (origin instanceof SpotOrigin.Extinct) {
            return "extinct";
        }
        if (origin instanceof SpotOrigin.Fraction) {
            return "superlattice";
        }
        if (origin instanceof SpotOrigin.Twin) {
            return "twin or superlattice";
        }
        return origin instanceof SpotOrigin.Reflected ? "reflection" : "unknown";
    }
}
