package io.github.zonewright.imagej.bridge;

import ij.measure.ResultsTable;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.SpotMatch;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.pattern.Placement;

/** Solutions as ImageJ tables, under titles of their own so that the user's "Results" stay as they are. */
public final class SolutionTable {
    private SolutionTable() {}

    /**
     * One row for each explained spot: indices, interplanar spacing, measured and computed place, residual.
     *
     * @param solution the solution
     * @return the table
     */
    public static ResultsTable spots(Solution solution) {
        ResultsTable table = new ResultsTable();
        table.setPrecision(3);
        Placement placement = solution.placement();
        Lattice lattice = placement.crystal().lattice();
        double wavelength = placement.beam().wavelength();
        for (SpotMatch match : solution.matches()) {
            PixelPoint measured = match.measured().position();
            table.addRow();
            table.addValue("h", match.hkl().h());
            table.addValue("k", match.hkl().k());
            table.addValue("l", match.hkl().l());
            table.addValue("d (Å)", 1 / lattice.reciprocal().vector(match.hkl()).norm());
            table.addValue(
                    "d measured (Å)",
                    1 / placement.camera().toReciprocal(measured, wavelength).norm());
            table.addValue("x (px)", measured.x());
            table.addValue("y (px)", measured.y());
            table.addValue("x computed (px)", match.computed().x());
            table.addValue("y computed (px)", match.computed().y());
            table.addValue("residual (px)", match.residual());
        }
        for (String index : new String[] {"h", "k", "l"}) {
            if (table.columnExists(index)) {
                table.setDecimalPlaces(table.getColumnIndex(index), 0);
            }
        }
        return table;
    }
}
