package io.github.zonewright.imagej.bridge;

import ij.measure.ResultsTable;
import io.github.zonewright.spots.MeasuredSpot;
import io.github.zonewright.spots.MeasuredValue;
import io.github.zonewright.spots.SpotNet;
import java.util.List;
import java.util.Optional;
import java.util.function.Function;
import java.util.function.Predicate;

/** The spots of a net or row as an ImageJ table, under a title of its own so that the user's "Results" stay as they are. */
public final class NetTable {
    private NetTable() {}

    /**
     * How spacings are written into the table.
     *
     * @param unit unit of the spacings
     * @param of the spacing of a spot in that unit; empty where it has none
     */
    public record Spacings(String unit, Function<MeasuredSpot, Optional<MeasuredValue>> of) {}

    /**
     * One row for each spot, without spacings.
     *
     * @param net the net, row or neither
     * @param spots every measured spot
     * @return the table
     */
    public static ResultsTable of(SpotNet net, List<MeasuredSpot> spots) {
        return of(net, spots, spot -> false, Optional.empty());
    }

    /**
     * One row for each spot: its place and intensity, on the net its node and its distance from it, and its spacing.
     *
     * @param net the net, row or neither
     * @param spots every measured spot; where there is no net they are listed without nodes
     * @param byHand tells whether a person added or moved a spot
     * @param spacings the spacings, where the scale is known
     * @return the table: first the spots on the net, by the order in which the net has them, then those off it
     */
    public static ResultsTable of(
            SpotNet net, List<MeasuredSpot> spots, Predicate<MeasuredSpot> byHand, Optional<Spacings> spacings) {
        ResultsTable table = new ResultsTable();
        table.setPrecision(3);
        table.showRowNumbers(false);
        for (SpotNet.Node node : nodes(net)) {
            add(table, node.spot(), node.n1(), node.n2(), node.residual(), "no", byHand, spacings);
        }
        for (MeasuredSpot spot : net instanceof SpotNet.NoNet ? spots : net.offNet()) {
            add(table, spot, Double.NaN, Double.NaN, Double.NaN, "yes", byHand, spacings);
        }
        for (String whole : new String[] {"spot", "n1", "n2"}) {
            if (table.columnExists(whole)) {
                table.setDecimalPlaces(table.getColumnIndex(whole), 0);
            }
        }
        return table;
    }

    private static List<SpotNet.Node> nodes(SpotNet net) {
        if (net instanceof SpotNet.Net found) {
            return found.nodes();
        }
        return net instanceof SpotNet.SystematicRow row ? row.nodes() : List.of();
    }

    private static void add(
            ResultsTable table,
            MeasuredSpot spot,
            double n1,
            double n2,
            double residual,
            String offNet,
            Predicate<MeasuredSpot> byHand,
            Optional<Spacings> spacings) {
        table.addRow();
        table.addValue("spot", table.size());
        table.addValue("x (px)", spot.position().x());
        table.addValue("y (px)", spot.position().y());
        table.addValue("measured su (px)", spot.positionError());
        table.addValue("measured intensity (grey values)", spot.intensity());
        table.addValue("signal to noise", spot.signalToNoise());
        table.addValue("saturated", spot.saturated() ? "yes" : "no");
        table.addValue("by hand", byHand.test(spot) ? "yes" : "no");
        table.addValue("n1", n1);
        table.addValue("n2", n2);
        table.addValue("residual (px)", residual);
        table.addValue("off net", offNet);
        spacings.ifPresent(known -> {
            Optional<MeasuredValue> d = known.of().apply(spot);
            table.addValue(
                    "d (" + known.unit() + ")", d.map(MeasuredValue::value).orElse(Double.NaN));
            table.addValue(
                    "d su (" + known.unit() + ")", d.map(MeasuredValue::error).orElse(Double.NaN));
        });
    }
}
