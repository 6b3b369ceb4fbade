package io.github.zonewright.imagej.bridge;

import ij.measure.ResultsTable;
import io.github.zonewright.calibration.MeasuredRing;
import io.github.zonewright.calibration.PowderLine;
import io.github.zonewright.calibration.RingAssignment;
import io.github.zonewright.calibration.RingCalibration;
import io.github.zonewright.lattice.Hkl;
import java.util.stream.Collectors;

/** The rings of a powder as an ImageJ table, under a title of its own so that the user's "Results" stay as they are. */
public final class RingTable {
    private static final double PERCENT = 100;

    private RingTable() {}

    /**
     * One row for each ring that a line of the standard explains, then those that none does, then the lines that ought to
     * show and do not. The residual is d measured less d of the standard, in % of the latter.
     *
     * @param fitted the calibration
     * @return the table
     */
    public static ResultsTable of(RingCalibration.Fitted fitted) {
        ResultsTable table = new ResultsTable();
        table.setPrecision(4);
        table.showRowNumbers(false);
        for (RingAssignment ring : fitted.rings()) {
            table.addRow();
            line(table, ring.line());
            table.addValue("d measured (Å)", ring.spacing().value());
            radius(table, ring.ring());
            table.addValue("residual (%)", PERCENT * ring.relativeResidual());
            table.addValue("kind", "explained");
        }
        for (MeasuredRing ring : fitted.unexplained()) {
            table.addRow();
            table.addValue("{hkl}", "");
            table.addValue("d (Å)", Double.NaN);
            table.addValue("d measured (Å)", Double.NaN);
            radius(table, ring);
            table.addValue("residual (%)", Double.NaN);
            table.addValue("kind", "unexplained");
        }
        for (PowderLine line : fitted.missing()) {
            table.addRow();
            line(table, line);
            table.addValue("d measured (Å)", Double.NaN);
            table.addValue("radius (px)", Double.NaN);
            table.addValue("measured su (px)", Double.NaN);
            table.addValue("residual (%)", Double.NaN);
            table.addValue("kind", "missing");
        }
        return table;
    }

    /**
     * The form of a line, as {1 1 1}; several where their rings can't be told apart.
     *
     * @param line the line
     * @return the forms, the strongest first
     */
    public static String forms(PowderLine line) {
        return line.families().stream().map(Hkl::toString).collect(Collectors.joining("}, {", "{", "}"));
    }

    private static void line(ResultsTable table, PowderLine line) {
        table.addValue("{hkl}", forms(line));
        table.addValue("d (Å)", line.d());
    }

    private static void radius(ResultsTable table, MeasuredRing ring) {
        table.addValue("radius (px)", ring.radius().value());
        table.addValue("measured su (px)", ring.radius().error());
    }
}
