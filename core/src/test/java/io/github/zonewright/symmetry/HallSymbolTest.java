package io.github.zonewright.symmetry;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Set;
import java.util.TreeSet;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class HallSymbolTest {

    private static Set<String> operations(String hall) {
        Set<String> found = new TreeSet<>();
        SpaceGroup.ofHall(hall).operations().forEach(o -> found.add(o.toString()));
        return found;
    }

    /** P 2₁/c, International Tables A, No. 14, general positions. */
    @Test
    void parse_monoclinicExample() {
        assertEquals(Set.of("x,y,z", "-x,y+1/2,-z+1/2", "-x,-y,-z", "x,-y+1/2,z+1/2"), operations("-P 2ybc"));
    }

    /** Pairs that spell one group: explicit and left-out axes, order of letters, case, underscores. */
    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            quoteCharacter = '`',
            value = {
                "P 2 2 | P 2z 2x",
                "P 4 2 3 | P 4z 2x 3*",
                "P 3 2 | P 3z 2'",
                "P 31 2\" | P 31z 2\"",
                "-P 2ybc | -p_2ycb",
                "-P 2ybc |   -P   2YBC ",
                "P 61 | P 6z1",
                "P 63 | P 6c",
                "P 42 | P 4c",
                "P 21 | P 2c",
                "F 4d 2 3 -1d | F 4d 2 3 -1uvw",
                "C 2y | C 2y 1",
                "-P 1 | P -1"
            })
    void parse_sameGroup(String one, String other) {
        assertEquals(operations(one), operations(other));
    }

    /** Change of basis: settings of one type reached from another, as tabulated in International Tables B, A1.4.2. */
    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            quoteCharacter = '`',
            value = {
                "-P 2yc (z,x,y) | -P 2a",
                "F 4d 2 3 -1d (x-1/8,y-1/8,z-1/8) | -F 4vw 2vw 3",
                "P 2 2 -1n (x+1/4,y+1/4,z+1/4) | -P 2ab 2bc",
                "P 2 2 -1n (3 3 3) | -P 2ab 2bc",
                "P 4 (1/2*x+1/2*y,-1/2*x+1/2*y,z) | C 4",
                "C 4 (x-y,x+y,z) | P 4"
            })
    void parse_changeOfBasis(String changed, String plain) {
        assertEquals(operations(plain), operations(changed));
    }

    @Test
    void parse_primitiveCellOfFaceCentredGroup() {
        SpaceGroup primitive = SpaceGroup.ofHall("F 2 2 3 (-x+y+z,x-y+z,x+y-z)");
        assertEquals(12, primitive.order());
        assertEquals('P', primitive.centring());
        assertEquals(PointGroup.T, primitive.pointGroup());
    }

    @Test
    void parse_rhombohedralFromHexagonal() {
        // obverse setting: x_r = x+z, y_r = -x+y+z, z_r = -y+z (International Tables A, section 1.5.3)
        assertEquals(operations("P 3*"), operations("R 3 (x+z,-x+y+z,-y+z)"));
        assertEquals(operations("-P 3* 2n"), operations("-R 3 2\"c (x+z,-x+y+z,-y+z)"));
    }

    @ParameterizedTest
    @ValueSource(
            strings = {
                "",
                "P",
                "Q 2",
                "P 5",
                "P 2 2 2 2 2",
                "P 2q",
                "-",
                "P -",
                "P 2xy",
                "P 3'",
                "P 4*",
                "P 3* 2 2",
                "P 44",
                "P 2 (0 0",
                "P 2 (0 0 1) x",
                "P 2 (x,y,x)",
                "P 2 (0,0,0)",
                "P 4 (2*x,y,z)",
                "P 4 (x/2,y,z)",
                "P 2'c1",
                "P 2 (x-y,x+y,z)",
                "P 2 (9999*x,y,z)",
                "F m -3 m"
            })
    void parse_refusesWhatIsNoSymbol(String text) {
        IllegalArgumentException e = assertThrows(IllegalArgumentException.class, () -> HallSymbol.parse(text));
        assertTrue(e.getMessage().contains("expected") || e.getMessage().contains("\""), e.getMessage());
    }
}
