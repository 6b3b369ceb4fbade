package io.github.zonewright.crystal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.lattice.Hkl;
import java.util.Arrays;
import java.util.List;
import java.util.stream.DoubleStream;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.MethodSource;

class StructureTypeTest {

    static Stream<StructureType> all() {
        return StructureType.all().stream();
    }

    private static double[] edges(StructureType type) {
        return DoubleStream.of(5, 6.7, 4.5).limit(type.edges().size()).toArray();
    }

    /** The sites of each type make the formula that it is named for, and none of them was put right or doubted. */
    @ParameterizedTest
    @MethodSource("all")
    void crystal_ofThePrototypesElements(StructureType type) {
        Crystal crystal = type.crystal(type.roles(), edges(type));
        assertTrue(CrystalNames.sameFormula(type.prototype(), crystal.formula()), type + ": " + crystal.formula());
        assertEquals(List.of(), crystal.notices());
        assertTrue(crystal.name().contains(type.symbol()));
    }

    /** Symbols, names and prototypes are each found, and mean the type itself where no other has the prototype. */
    @ParameterizedTest
    @MethodSource("all")
    void find_bySymbolAndNames(StructureType type) {
        assertEquals(type, StructureType.of(type.symbol()));
        type.otherNames().forEach(name -> assertEquals(type, StructureType.of(name)));
        assertTrue(StructureType.find(type.prototype()).isPresent());
    }

    /**
     * Atoms in the cell and density in g/cm³ of well-known members. Cells: Wyckoff, Crystal Structures (1963) and
     * Pearson's handbook (1985); densities: handbooks; all from memory.
     */
    @ParameterizedTest
    @CsvSource({
        "A1,Cu,3.615,4,8.94",
        "A2,Fe,2.8665,2,7.87",
        "A3,Ti,2.950 4.686,2,4.51",
        "A4,Si,5.4309,8,2.33",
        "A5,Sn,5.831 3.182,4,7.29",
        "A6,In,3.2523 4.9461,2,7.29",
        "A7,Bi,4.546 11.862,6,9.80",
        "A9,C,2.461 6.708,4,2.27",
        "A15,Nb Sn,5.29,8,8.9",
        "B1,Mg O,4.2112,8,3.58",
        "B2,Ni Al,2.887,2,5.9",
        "B3,Ga As,5.6533,8,5.32",
        "B4,Zn O,3.2495 5.2069,4,5.68",
        "B8_1,Ni As,3.619 5.034,4,7.78",
        "B_h,W C,2.906 2.837,2,15.7",
        "C1,Ca F,5.463,12,3.18",
        "C2,Fe S,5.418,12,5.01",
        "C3,Cu O,4.2696,6,6.1",
        "C4,Ti O,4.5937 2.9587,6,4.25",
        "C5,Ti O,3.785 9.514,12,3.89",
        "C14,Mg Zn,5.223 8.566,12,5.1",
        "C15,Mg Cu,7.034,24,5.8",
        "C16,Al Cu,6.067 4.877,12,4.35",
        "C32,Ti B,3.028 3.228,3,4.5",
        "D0_3,Al Fe,5.79,16,6.7",
        "D0_11,Fe C,5.089 6.743 4.523,16,7.69",
        "D0_19,Ti Al,5.77 4.62,8,4.2",
        "D0_22,Al Ti,3.85 8.6,8,3.4",
        "D2_1,La B,4.1569,7,4.72",
        "D5_1,Al O,4.7589 12.993,30,3.99",
        "D8_4,Cr C,10.65,116,6.97",
        "E2_1,Sr Ti O,3.905,5,5.12",
        "H1_1,Mg Al O,8.0836,56,3.58",
        "L1_0,Au Cu,2.80 3.67,2,15.0",
        "L1_2,Ni Al,3.572,4,7.41",
        "L2_1,Cu Mn Al,5.95,16,6.6"
    })
    void crystal_ofKnownMembers(String symbol, String elements, String cell, int atoms, double density) {
        double[] edges =
                Arrays.stream(cell.split(" ")).mapToDouble(Double::parseDouble).toArray();
        Crystal crystal = StructureType.of(symbol).crystal(List.of(elements.split(" ")), edges);
        assertEquals(atoms, crystal.unitCellAtoms().size());
        assertEquals(density, crystal.density(), 0.015 * density);
    }

    /** What is typed by type is the crystal of the shelf: every |F| up to 1 1/Å. */
    @ParameterizedTest
    @CsvSource({
        "A1,Cu,3.615,copper",
        "A3,Mg,3.2093 5.2103,magnesium",
        "A4,Si,5.4307,silicon",
        "B1,Na Cl,5.64056,halite",
        "L1_2,Ni Al,3.572,gamma-prime",
        "A9,C,2.456 6.696,graphite"
    })
    void crystal_scattersAsTheOneOfTheShelf(String symbol, String elements, String cell, String id) {
        double[] edges =
                Arrays.stream(cell.split(" ")).mapToDouble(Double::parseDouble).toArray();
        Crystal typed = StructureType.of(symbol).crystal(List.of(elements.split(" ")), edges);
        Crystal kept = CrystalShelf.entry(id).orElseThrow().crystal();
        StructureFactors one = StructureFactors.of(typed);
        StructureFactors other = StructureFactors.of(kept);
        for (Reflection reflection : ReflectionTable.ofLength(kept, 1).reflections()) {
            Hkl hkl = reflection.hkl();
            assertEquals(other.at(hkl).amplitude(), one.at(hkl).amplitude(), 0.02, symbol + " " + hkl);
        }
    }

    @ParameterizedTest
    @CsvSource({"L12,L1_2", "L1₂,L1_2", "l1_2,L1_2", "FCC,A1", "Rock Salt,B1", "CaF2,C1", "A3′,A3'", "wurtzite,B4"})
    void find_inTheUsualSpellings(String text, String symbol) {
        assertEquals(symbol, StructureType.of(text).symbol());
    }

    @Test
    void of_unknown() {
        assertTrue(StructureType.find("Z9").isEmpty());
        assertTrue(StructureType.find("").isEmpty());
        String message = assertThrows(IllegalArgumentException.class, () -> StructureType.of("Z9"))
                .getMessage();
        assertTrue(message.contains("Z9") && message.contains("L1_2"), message);
    }

    /** Rutile with u = 0.305 and another: the oxygen moves. */
    @Test
    void with_anotherParameter() {
        StructureType rutile = StructureType.of("C4");
        Crystal moved = rutile.with("u", 0.30).crystal(List.of("Sn", "O"), 4.737, 3.186);
        assertEquals(0.30, moved.sites().get(1).position().x());
        assertEquals(0.305, rutile.parameters().get("u"));
        assertThrows(IllegalArgumentException.class, () -> rutile.with("w", 0.1));
        assertThrows(IllegalArgumentException.class, () -> rutile.with("u", Double.NaN));
    }

    @Test
    void crystal_refusesWhatDoesNotFit() {
        StructureType type = StructureType.of("L1_2");
        assertEquals(List.of("Cu", "Au"), type.roles());
        assertEquals(List.of("a"), type.edges());
        String elements = assertThrows(IllegalArgumentException.class, () -> type.crystal(List.of("Ni"), 3.57))
                .getMessage();
        assertTrue(elements.contains("expected 2, for Cu, Au of Cu3Au"), elements);
        String edges = assertThrows(IllegalArgumentException.class, () -> type.crystal(List.of("Ni", "Al"), 3.57, 4.2))
                .getMessage();
        assertTrue(edges.contains("[3.57, 4.2]") && edges.contains("expected a for"), edges);
        assertThrows(IllegalArgumentException.class, () -> type.crystal(List.of("Ni", "Xx"), 3.57));
        assertThrows(IllegalArgumentException.class, () -> type.crystal(List.of("Ni", "Al"), -3.57));
    }
}
