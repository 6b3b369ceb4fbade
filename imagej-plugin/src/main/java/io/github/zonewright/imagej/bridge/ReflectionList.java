package io.github.zonewright.imagej.bridge;

import ij.measure.ResultsTable;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.ReflectionFamily;
import io.github.zonewright.crystal.ReflectionTable;
import io.github.zonewright.crystal.StructureFactors;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.microscope.Beam;

/** The reflections of a crystal as an ImageJ table, under a title of its own so that the user's "Results" stay as they are. */
public final class ReflectionList {
    private static final double ANGSTROMS_PER_NANOMETRE = 10;
    private static final int MOST_ROWS = 20_000;

    private ReflectionList() {}

    /**
     * One row for each family of equivalent reflections, by falling d.
     *
     * @param crystal the crystal
     * @param beam the beam, for the extinction distance
     * @param dMin the smallest d in Å
     * @return the table
     * @throws IllegalArgumentException if that is not above 0, or makes more than 20,000 rows
     */
    public static ResultsTable of(Crystal crystal, Beam beam, double dMin) {
        ReflectionTable reflections = ReflectionTable.ofSpacing(crystal, dMin);
        if (reflections.families().size() > MOST_ROWS) {
            throw new IllegalArgumentException("reflections down to d = " + dMin + " Å: "
                    + reflections.families().size() + " families, expected at most " + MOST_ROWS);
        }
        StructureFactors factors = StructureFactors.of(crystal);
        ResultsTable table = new ResultsTable();
        table.setPrecision(4);
        for (ReflectionFamily family : reflections.families()) {
            Hkl hkl = family.representative();
            table.addRow();
            table.addValue("h", hkl.h());
            table.addValue("k", hkl.k());
            table.addValue("l", hkl.l());
            table.addValue("d (Å)", family.d());
            table.addValue("multiplicity", family.multiplicity());
            table.addValue("structure factor (Å)", family.amplitude());
            table.addValue("extinction distance (nm)", distance(factors, family, beam));
        }
        for (String whole : new String[] {"h", "k", "l", "multiplicity"}) {
            if (table.columnExists(whole)) {
                table.setDecimalPlaces(table.getColumnIndex(whole), 0);
            }
        }
        if (table.columnExists("extinction distance (nm)")) {
            table.setDecimalPlaces(table.getColumnIndex("extinction distance (nm)"), 1);
        }
        return table;
    }

    /** In nm; not a number where the beam can't meet the Bragg condition, infinite where F vanishes. */
    private static double distance(StructureFactors factors, ReflectionFamily family, Beam beam) {
        if (beam.wavelength() > 2 * family.d()) {
            return Double.NaN;
        }
        double nanometres = factors.extinctionDistance(family.representative(), beam) / ANGSTROMS_PER_NANOMETRE;
        return nanometres > 1e9 ? Double.POSITIVE_INFINITY : nanometres;
    }
}
