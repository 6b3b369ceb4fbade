package io.github.zonewright.imagej.bridge;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.measure.ResultsTable;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.microscope.Beam;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** The reflections of a crystal as a table. */
class ReflectionListTest {
    private static final Beam BEAM = Beam.ofKilovolts(100);

    private static Crystal shelf(String name) {
        return CrystalShelf.find(name).orElseThrow();
    }

    /** Rules of a face-centred cubic lattice: 111, 200, 220, 311, 222 with 8, 6, 12, 24, 8 members. */
    @Test
    void of_copper_isFaceCentred() {
        ResultsTable table = ReflectionList.of(shelf("copper"), BEAM, 1.0);
        int[][] expected = {{1, 1, 1, 8}, {2, 0, 0, 6}, {2, 2, 0, 12}, {3, 1, 1, 24}, {2, 2, 2, 8}};
        assertEquals(expected.length, table.size());
        for (int row = 0; row < expected.length; row++) {
            assertEquals(expected[row][0], table.getValue("h", row));
            assertEquals(expected[row][1], table.getValue("k", row));
            assertEquals(expected[row][2], table.getValue("l", row));
            assertEquals(expected[row][3], table.getValue("multiplicity", row));
        }
        assertEquals(shelf("copper").lattice().a() / Math.sqrt(3), table.getValue("d (Å)", 0), 1e-9);
    }

    /** Extinction distance of copper 111 at 100 kV: 24.2 nm (Hirsch et al., table of extinction distances; from memory). */
    @Test
    void of_copper_extinctionDistance() {
        ResultsTable table = ReflectionList.of(shelf("copper"), BEAM, 1.0);
        assertEquals(24.2, table.getValue("extinction distance (nm)", 0), 0.2 * 24.2);
    }

    @Test
    void of_silicon_222_vanishesByTheAtoms() {
        ResultsTable table = ReflectionList.of(shelf("silicon"), BEAM, 1.5);
        int row = 0;
        while (table.getValue("h", row) != 2 || table.getValue("l", row) != 2) {
            row++;
        }
        assertEquals(0, table.getValue("structure factor (Å)", row), 1e-9);
        assertTrue(Double.isInfinite(table.getValue("extinction distance (nm)", row)));
    }

    @Test
    void of_slowBeam_hasNoBraggCondition() {
        ResultsTable table = ReflectionList.of(shelf("copper"), Beam.ofKilovolts(0.01), 1.0);
        assertTrue(Double.isNaN(table.getValue("extinction distance (nm)", table.size() - 1)));
    }

    @ParameterizedTest
    @ValueSource(doubles = {0, -1, Double.NaN, 0.01})
    void of_badSpacing_isRefused(double d) {
        assertThrows(IllegalArgumentException.class, () -> ReflectionList.of(shelf("gypsum"), BEAM, d));
    }

    @Test
    void of_nothingThatLarge_isEmpty() {
        assertEquals(0, ReflectionList.of(shelf("copper"), BEAM, 50).size());
    }
}
