package io.github.zonewright.crystal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class CrystalNamesTest {

    @ParameterizedTest
    @CsvSource({
        "Ferrite,ferrite",
        "γ′ phase,gamma-prime-phase",
        "Fe₃C,fe3c",
        "α-Al2O3 (heated),alpha-al2o3-heated",
        "../../etc/passwd,etc-passwd",
        "CON,con-crystal",
        "Würfel,wurfel",
        "a:b*c?,a-b-c",
        "'...',crystal"
    })
    void fileName_anySystemCanStore(String name, String file) {
        assertEquals(file, CrystalNames.fileName(name));
    }

    @Test
    void fileName_ofLongAndStrangeNames() {
        assertEquals(80, CrystalNames.fileName("x".repeat(5000)).length());
        for (int c = 0; c < 0x3000; c++) {
            String file = CrystalNames.fileName("a" + Character.toString(c) + "b");
            assertTrue(file.matches("[a-z0-9-]+"), Integer.toHexString(c) + " " + file);
        }
    }

    @Test
    void amounts_ofFormulae() {
        assertEquals(Map.of("Fe", 3.0, "C", 1.0), CrystalNames.amounts("Fe3 C"));
        assertEquals(Map.of("C", 2.0, "H", 6.0, "O", 1.0), CrystalNames.amounts("CH3CH2OH"));
        assertEquals(Map.of("Fe", 0.95, "O", 1.0), CrystalNames.amounts("Fe0.95O"));
        assertEquals(Map.of(), CrystalNames.amounts("iron"));
        assertEquals(Map.of(), CrystalNames.amounts("A".repeat(5000)));
        assertTrue(CrystalNames.sameFormula("CaCO3", "C Ca O3"));
        assertFalse(CrystalNames.sameFormula("", ""));
    }

    @Test
    void matches_partOfANameOrTheFormula() {
        assertTrue(CrystalNames.matches("IRON", "Fe", List.of("Ferrite", "alpha iron")));
        assertTrue(CrystalNames.matches("O2Ti", "O2 Ti", List.of("Rutile")));
        assertFalse(CrystalNames.matches("Ti", "O2 Ti", List.of("Rutle")));
    }
}
