package io.github.zonewright.reference;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.ReciprocalLattice;
import io.github.zonewright.lattice.Uvw;
import java.util.List;
import java.util.Map;
import java.util.stream.Stream;
import org.junit.jupiter.api.DynamicTest;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.TestFactory;

/** The nets of 66 zone axes against {@code zone-patterns.csv}, which gives five digits. */
class ZonePatternTest {

    private static final double LAST_DIGIT = 0.6e-5;

    private static List<Map<String, String>> rows() {
        return ReferenceCsv.read("zone-patterns.csv", ',');
    }

    private static double number(Map<String, String> row, String column) {
        return Double.parseDouble(row.get(column));
    }

    private static Uvw zone(Map<String, String> row) {
        return Uvw.parse(row.get("u") + " " + row.get("v") + " " + row.get("w"));
    }

    @Test
    void table_isWhole() {
        assertEquals(66, rows().size());
    }

    @TestFactory
    Stream<DynamicTest> net_ofTheListedSpots() {
        return rows().stream()
                .map(row -> DynamicTest.dynamicTest(row.get("structure") + " [" + zone(row) + "]", () -> {
                    Hkl g1 = Hkl.parse(row.get("g1"));
                    Hkl g2 = Hkl.parse(row.get("g2"));
                    assertEquals(0, g1.dot(zone(row)));
                    assertEquals(0, g2.dot(zone(row)));
                    Uvw axis = g1.zoneWith(g2);
                    assertTrue(axis.equals(zone(row)) || axis.equals(zone(row).negate()));
                    assertFigures(row, ZoneNet.of(row.get("structure"), g1, g2));
                }));
    }

    @TestFactory
    Stream<DynamicTest> net_ofTheShortestSpotsFound() {
        return rows().stream()
                .map(row -> DynamicTest.dynamicTest(row.get("structure") + " [" + zone(row) + "]", () -> {
                    ZoneNet found = ZoneNet.of(row.get("structure"), zone(row));
                    assertFigures(row, found);
                    ReciprocalLattice lattice =
                            ZoneNet.lattice(row.get("structure")).reciprocal();
                    double listed = lattice.vector(Hkl.parse(row.get("g1"))).norm();
                    assertEquals(listed, lattice.vector(found.first()).norm(), 1e-14);
                }));
    }

    private static void assertFigures(Map<String, String> row, ZoneNet net) {
        assertEquals(number(row, "R2_over_R1"), net.ratio(), LAST_DIGIT);
        assertEquals(number(row, "R3short_over_R1"), net.shortDiagonal(), LAST_DIGIT);
        assertEquals(number(row, "R3long_over_R1"), net.longDiagonal(), LAST_DIGIT);
        assertEquals(number(row, "angle_deg"), net.degrees(), 0.6e-4);
    }
}
