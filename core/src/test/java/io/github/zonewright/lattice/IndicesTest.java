package io.github.zonewright.lattice;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.HashSet;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class IndicesTest {

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "1 -1 0|1|-1|0",
                "(1-10)|1|-1|0",
                "1,-1,0|1|-1|0",
                "{111}|1|1|1",
                "[ 10 -1 12 ]|10|-1|12",
                "<1; 2; \u22123>|1|2|-3",
                "\u27e8+1 0 0\u27e9|1|0|0",
                "1 -1\t0|1|-1|0",
                "-1-1-1|-1|-1|-1"
            })
    void parse_threeIndices_asPeopleWriteThem(String text, int i, int j, int k) {
        assertEquals(new Hkl(i, j, k), Hkl.parse(text));
        assertEquals(new Uvw(i, j, k), Uvw.parse(text));
    }

    @Test
    void parse_fourIndices_meanPlanesOrDirections() {
        assertEquals(new Hkl(1, 0, 1), Hkl.parse("(10-11)"));
        assertEquals(new Hkl(2, -1, 0), Hkl.parse("2 -1 -1 0"));
        assertEquals(new Uvw(1, 0, 0), Uvw.parse("[2 -1 -1 0]"));
        assertEquals(new Uvw(1, 1, 0), Uvw.parse("[11-20]"));
        assertEquals(new Uvw(0, 0, 1), Uvw.parse("0001"));
    }

    @ParameterizedTest
    @ValueSource(
            strings = {"", "1 1", "12", "1 1 1 1", "1121", "1.5 0 0", "a b c", "1 - 0 0", "--100", "1 2 3 4 5", "123456"
            })
    void parse_anythingElse_isRefused(String text) {
        String message = assertThrows(IllegalArgumentException.class, () -> Hkl.parse(text))
                .getMessage();
        assertTrue(message.startsWith("indices of a reflection: \"" + text + "\", expected three integers"), message);
        assertThrows(IllegalArgumentException.class, () -> Uvw.parse(text));
    }

    @Test
    void toString_isParsedBack() {
        assertEquals("1 -12 0", new Hkl(1, -12, 0).toString());
        for (Hkl hkl : List.of(new Hkl(0, 0, 0), new Hkl(-3, 14, -15))) {
            assertEquals(hkl, Hkl.parse(hkl.toString()));
        }
        assertEquals(new Uvw(-9, 2, 6), Uvw.parse(new Uvw(-9, 2, 6).toString()));
    }

    @Test
    void zoneWith_isAlongTheVectorProduct() {
        // g₁ × g₂ in this order: 200 × 020 is along +c.
        assertEquals(new Uvw(0, 0, 1), new Hkl(2, 0, 0).zoneWith(new Hkl(0, 2, 0)));
        assertEquals(new Uvw(0, 0, -1), new Hkl(0, 2, 0).zoneWith(new Hkl(2, 0, 0)));
        Lattice triclinic = Lattice.ofDegrees(5, 6, 7, 80, 95, 103);
        Hkl first = new Hkl(1, -2, 1);
        Hkl second = new Hkl(3, 1, 0);
        double angle = triclinic
                .vector(first.zoneWith(second))
                .angleTo(triclinic
                        .reciprocal()
                        .vector(first)
                        .cross(triclinic.reciprocal().vector(second)));
        assertEquals(0, angle, 1e-14);
    }

    @Test
    void zoneWith_parallelReflections_isRefused() {
        assertThrows(IllegalArgumentException.class, () -> new Hkl(1, 1, 1).zoneWith(new Hkl(-2, -2, -2)));
        assertThrows(IllegalArgumentException.class, () -> new Hkl(1, 1, 1).zoneWith(new Hkl(0, 0, 0)));
        assertThrows(IllegalArgumentException.class, () -> new Uvw(0, 1, 0).planeWith(new Uvw(0, 3, 0)));
    }

    @Test
    void planeWith_holdsBothDirections() {
        Uvw first = new Uvw(1, 1, 0);
        Uvw second = new Uvw(1, 0, 1);
        Hkl plane = first.planeWith(second);
        assertEquals(new Hkl(1, -1, -1), plane);
        assertEquals(0, plane.dot(first));
        assertEquals(0, plane.dot(second));
    }

    @Test
    void reduced_dropsTheCommonDivisorAndKeepsTheSense() {
        assertEquals(new Uvw(-1, 2, 0), new Uvw(-4, 8, 0).reduced());
        assertEquals(new Uvw(0, 0, -1), new Uvw(0, 0, -7).reduced());
        assertEquals(new Uvw(6, 10, 15), new Uvw(6, 10, 15).reduced());
        assertEquals(new Uvw(0, 0, 0), new Uvw(0, 0, 0).reduced());
    }

    @Test
    void arithmetic_ofIndices() {
        Hkl g = new Hkl(1, -2, 3);
        assertEquals(new Hkl(-1, 2, -3), g.negate());
        assertEquals(new Hkl(2, -2, 2), g.plus(new Hkl(1, 0, -1)));
        assertEquals(new Hkl(0, -2, 4), g.minus(new Hkl(1, 0, -1)));
        assertEquals(new Uvw(-1, 0, 2), new Uvw(1, 0, -2).negate());
        assertEquals(2, g.dot(new Uvw(1, 1, 1)));
        assertEquals(5, new Uvw(3, -5, 4).largestIndex());
        assertTrue(new Hkl(0, 0, 0).isZero());
        assertFalse(g.isZero());
        assertTrue(new Uvw(0, 0, 0).isZero());
    }

    @Test
    void compareTo_ordersByFirstThenSecondThenThird() {
        List<Hkl> sorted = Stream.of("0 1 0", "-1 2 2", "0 0 1", "0 0 -1")
                .map(Hkl::parse)
                .sorted()
                .toList();
        assertEquals("[-1 2 2, 0 0 -1, 0 0 1, 0 1 0]", sorted.toString());
        List<Uvw> zones =
                Stream.of("1 0 1", "1 0 0", "0 9 9").map(Uvw::parse).sorted().toList();
        assertEquals("[0 9 9, 1 0 0, 1 0 1]", zones.toString());
    }

    @Test
    void millerBravais_everySmallDirection_isRoundTrip() {
        for (int u = -4; u <= 4; u++) {
            for (int v = -4; v <= 4; v++) {
                for (int w = -4; w <= 4; w++) {
                    Uvw direction = new Uvw(u, v, w).reduced();
                    int[] four = MillerBravais.of(direction);
                    assertEquals(0, four[0] + four[1] + four[2]);
                    assertEquals(direction, MillerBravais.direction(four[0], four[1], four[3]));
                }
            }
        }
    }

    /** With four indices a direction ua₁ + va₂ + ta₃ + wc, where a₃ = −(a₁ + a₂), is the same vector as with three. */
    @Test
    void millerBravais_direction_isTheSameVector() {
        Lattice mg = Lattice.hexagonal(3.2094, 5.2112);
        for (Uvw three : List.of(new Uvw(1, 0, 0), new Uvw(2, 1, 0), new Uvw(1, -1, 1), new Uvw(3, 1, 2))) {
            int[] i = MillerBravais.of(three);
            Uvw summed = new Uvw(i[0] - i[2], i[1] - i[2], i[3]);
            assertEquals(0, mg.angle(three, summed), 1e-15);
        }
        assertArrayEquals(new int[] {2, -1, -1, 0}, MillerBravais.of(new Uvw(1, 0, 0)));
        assertArrayEquals(new int[] {1, 0, -1, 2}, MillerBravais.of(new Hkl(1, 0, 2)));
    }

    /**
     * How many directions there are without a common divisor: all triples but zero, less the multiples of smaller ones
     * (26 of 2·[uvw] up to 2; as many again of 3·[uvw] up to 3).
     */
    @ParameterizedTest
    @CsvSource({"1, 26", "2, 98", "3, 290"})
    void directionsUpTo_areAllOnce(int largest, int expected) {
        List<Uvw> all = Uvw.upTo(largest);
        assertEquals(expected, all.size());
        assertEquals(expected, new HashSet<>(all).size());
        assertEquals(
                List.of("1 0 0", "0 1 0", "0 0 1", "0 0 -1", "0 -1 0", "-1 0 0", "1 1 0"),
                all.stream().limit(7).map(Uvw::toString).toList());
    }
}
