package io.github.zonewright.cif;

import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;

class CoreDictionaryTest {
    private static final CoreDictionary DICTIONARY = CoreDictionary.load();

    @Test
    void contains_namesAndAliases() {
        for (String name : List.of(
                "_cell.length_a",
                "_cell_length_a",
                "_symmetry_equiv_pos_as_xyz",
                "_atom_site_thermal_displace_type",
                "_space_group_IT_number",
                "_diffrn_source",
                "_space_group_symop_operation_xyz",
                "_space_group_symop.operation_xyz",
                "_diffrn_source_voltage",
                "_diffrn_radiation_probe",
                "_diffrn_radiation_wavelength",
                "_diffrn_orient_matrix_UB_11",
                "_diffrn_refln_index_h")) {
            assertTrue(DICTIONARY.contains(name), name);
        }
        assertTrue(DICTIONARY.contains("_CELL_LENGTH_A"));
    }

    @Test
    void contains_nothingElse() {
        for (String name : List.of("", "item", "_zonewright_x", "_cell_length_d", "Text", "_alias.deprecation_date")) {
            assertFalse(DICTIONARY.contains(name), name);
        }
        assertTrue(DICTIONARY.size() > 1000, "" + DICTIONARY.size());
    }
}
