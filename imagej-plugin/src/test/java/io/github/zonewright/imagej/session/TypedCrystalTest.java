package io.github.zonewright.imagej.session;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.StructureType;
import io.github.zonewright.lattice.Lattice;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Crystals as typed. */
class TypedCrystalTest {
    private static final TypedCrystal.Site TITANIUM = site("Ti", "0", "0", "0");
    private static final TypedCrystal.Site OXYGEN = site("O", "0.305", "0.305", "0");

    private static TypedCrystal.Site site(String atom, String x, String y, String z) {
        return new TypedCrystal.Site(atom, x, y, z, "", "");
    }

    /** Density of silver 10.50 g/cm³ (handbooks; from memory). */
    @Test
    void ofType_silver() {
        Crystal silver = TypedCrystal.ofType("", StructureType.of("A1"), Map.of(), List.of("Ag"), List.of(4.0862));
        assertEquals("Ag (A1)", silver.name());
        assertEquals(10.50, silver.density(), 0.01);
    }

    @Test
    void ofType_withParameterAndName() {
        Crystal rutile = TypedCrystal.ofType(
                "  mine ", StructureType.of("C4"), Map.of("u", 0.31), List.of("Ti", "O"), List.of(4.594, 2.959));
        assertEquals("mine", rutile.name());
        assertEquals(0.31, rutile.sites().get(1).position().x(), 1e-12);
    }

    @Test
    void ofCell_blanksFollowFromTheGroup() {
        Crystal rutile = TypedCrystal.ofCell(
                "",
                "p42/mnm",
                List.of("4.594", "", "2.959", "", "", ""),
                List.of(TITANIUM, site("", "", "", ""), OXYGEN));
        assertEquals("O2 Ti (P 42/m n m)", rutile.name());
        assertEquals(Lattice.tetragonal(4.594, 2.959), rutile.lattice());
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "225 | 4,,,,, | 4 4 4 90 90 90",
                "P 63/m m c | 3,,5,,, | 3 3 5 90 90 120",
                "R -3 m :R | 4,,,60,, | 4 4 4 60 60 60",
                "R -3 m | 3,,9,,, | 3 3 9 90 90 120",
                "62 | 3,4,5,,, | 3 4 5 90 90 90",
                "P 21/c | 3,4,5,,100, | 3 4 5 90 100 90",
                "P 1 1 21/b | 3,4,5,,,100 | 3 4 5 90 90 100",
                "1 | 3,4,5,80,85,95 | 3 4 5 80 85 95"
            })
    void cell_isCompleted(String group, String typed, String wanted) {
        Lattice cell = TypedCrystal.cell(TypedCrystal.group(group), Arrays.asList((typed + " ").split(",", -1)));
        double[] w = Arrays.stream(wanted.split(" "))
                .mapToDouble(Double::parseDouble)
                .toArray();
        assertEquals(Lattice.ofDegrees(w[0], w[1], w[2], w[3], w[4], w[5]), cell);
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "Xm-3m | 4,,,,, | space group",
                "62 | 3,4,,,, | c: blank",
                "62 | 3,4,NaN,,, | finite",
                "62 | 3,4,1e999,,, | finite",
                "62 | 3,4,x,,, | number",
                "P 21/c | 3,4,5,,, | β: blank",
                "1 | 3,4,5,90,90, | γ: blank",
                "225 | -4,,,,, | -4",
                "225 | 4,5,,,, | expected"
            })
    void ofCell_wrongCell_isRefused(String group, String cell, String reason) {
        IllegalArgumentException refused = assertThrows(
                IllegalArgumentException.class,
                () -> TypedCrystal.ofCell("x", group, Arrays.asList((cell + " ").split(",", -1)), List.of(TITANIUM)));
        assertTrue(refused.getMessage().contains(reason), refused.getMessage());
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "Qq | 0 | | | row 1: element",
                "Ti | a | | | row 1",
                "Ti | 0 | 2 | | row 1",
                "Ti | 0 | x | | row 1: occupancy",
                "Ti | 0 | | -1 | row 1: B",
                "Ti | 0 | | Infinity | row 1: B"
            })
    void ofCell_wrongSite_isNamed(String atom, String x, String occupancy, String b, String reason) {
        TypedCrystal.Site site =
                new TypedCrystal.Site(atom, x, "0", "0", occupancy == null ? "" : occupancy, b == null ? "" : b);
        IllegalArgumentException refused = assertThrows(
                IllegalArgumentException.class,
                () -> TypedCrystal.ofCell("x", "225", List.of("4", "", "", "", "", ""), List.of(site)));
        assertTrue(refused.getMessage().startsWith(reason), refused.getMessage());
    }
}
