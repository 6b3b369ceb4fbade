package io.github.zonewright.cif;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;

class CifBlockTest {
    private static final CifBlock BLOCK = CifFile.parse("""
                    data_t
                    _Cell_Length_A 4.05
                    _symmetry_Int_Tables_number ?
                    _space_group_IT_number 225
                    _x .
                    loop_
                      _space_group_symop_operation_xyz
                      x,y,z
                    loop_
                      _atom_site_label
                      _atom_site_fract_x
                      Al1 0
                      Al2 0.5
                    loop_
                      _empty
                    """).blocks().get(0);

    @Test
    void value_anyCase() {
        assertEquals("4.05", BLOCK.value("_cell_length_a").orElseThrow().text());
        assertEquals(Optional.empty(), BLOCK.value("_cell_length_b"));
        assertEquals(Optional.empty(), BLOCK.value());
    }

    @Test
    void value_aliasesPreferKnown() {
        CifValue number = BLOCK.value("_symmetry_Int_Tables_number", "_space_group_IT_number")
                .orElseThrow();
        assertEquals("225", number.text());
        assertEquals(
                CifValue.UNKNOWN,
                BLOCK.value("_none", "_symmetry_int_tables_number", "_x").orElseThrow());
        assertEquals(CifValue.NOT_APPLICABLE, BLOCK.value("_x").orElseThrow());
    }

    @Test
    void value_ofLoop() {
        assertEquals(
                "x,y,z",
                BLOCK.value("_space_group_symop_operation_xyz").orElseThrow().text());
        assertEquals(Optional.empty(), BLOCK.value("_atom_site_label"));
        assertEquals(Optional.empty(), BLOCK.value("_empty"));
    }

    @Test
    void values_loopOrNot() {
        assertEquals(2, BLOCK.values("_none", "_ATOM_site_label").size());
        assertEquals(1, BLOCK.values("_cell_length_a").size());
        assertEquals(List.of(), BLOCK.values("_none"));
        assertEquals(List.of(), BLOCK.values("_empty"));
    }

    @Test
    void loop_byAnyColumn() {
        assertEquals(2, BLOCK.loop("_none", "_atom_site_fract_x").orElseThrow().size());
        assertTrue(BLOCK.loop("_cell_length_a").isEmpty());
        assertEquals(3, BLOCK.loops().size());
        assertEquals(4, BLOCK.items().size());
    }

    @Test
    void loop_access() {
        CifLoop loop = BLOCK.loop("_atom_site_label").orElseThrow();
        assertEquals(List.of("_atom_site_label", "_atom_site_fract_x"), loop.tags());
        assertEquals("Al2", loop.row(1).get(0).text());
        assertEquals(List.of(loop.row(0), loop.row(1)), loop.rows());
        assertEquals(
                "0.5",
                loop.column("_alias", "_atom_site_FRACT_x").orElseThrow().get(1).text());
        assertEquals("0.5", loop.value(1, "_atom_site_fract_x").orElseThrow().text());
        assertEquals(Optional.empty(), loop.value(1, "_atom_site_fract_y"));
        assertEquals(Optional.empty(), loop.column("_atom_site_fract_y"));
        assertTrue(loop.has("_atom_site_label"));
        assertFalse(loop.has("_atom"));
        assertThrows(IndexOutOfBoundsException.class, () -> loop.row(2));
        assertThrows(IndexOutOfBoundsException.class, () -> loop.value(-1, "_atom_site_label"));
        List<CifValue> column = loop.column("_atom_site_label").orElseThrow();
        assertThrows(IndexOutOfBoundsException.class, () -> column.get(2));
        assertThrows(UnsupportedOperationException.class, () -> column.set(0, CifValue.UNKNOWN));
        assertEquals("loop of 2 rows: _atom_site_label, _atom_site_fract_x", loop.toString());
    }

    @Test
    void loopOf_checks() {
        List<CifValue> one = List.of(CifValue.of(1));
        assertThrows(IllegalArgumentException.class, () -> CifLoop.of(List.of("_a"), List.of()));
        assertThrows(IllegalArgumentException.class, () -> CifLoop.of(List.of(), List.of(one)));
        assertThrows(IllegalArgumentException.class, () -> CifLoop.of(List.of("_a", "_A"), List.of(one)));
        assertThrows(IllegalArgumentException.class, () -> CifLoop.of(List.of("a"), List.of(one)));
        assertThrows(IllegalArgumentException.class, () -> CifLoop.of(List.of("_a b"), List.of(one)));
        IllegalArgumentException e =
                assertThrows(IllegalArgumentException.class, () -> CifLoop.of(List.of("_a", "_b"), List.of(one)));
        assertEquals("a row of this loop has 2 values, but one has 1: _a, _b", e.getMessage());
    }

    @Test
    void builder_checks() {
        assertThrows(IllegalArgumentException.class, () -> CifBlock.builder(""));
        assertThrows(IllegalArgumentException.class, () -> CifBlock.builder("a b"));
        CifBlockBuilder builder = CifBlock.builder("a").add("_x", 1);
        assertThrows(IllegalArgumentException.class, () -> builder.add("x", 1));
        assertThrows(IllegalArgumentException.class, () -> builder.add("_", 1));
        assertThrows(IllegalArgumentException.class, () -> builder.add("_y", "\u0007"));
        assertThrows(IllegalArgumentException.class, () -> builder.add(new CifComment("two\nlines")));
        builder.add("_X", 2);
        IllegalArgumentException e = assertThrows(IllegalArgumentException.class, builder::build);
        assertEquals("a block has a data name once, but this has it twice: _X", e.getMessage());
    }

    @Test
    void frames_haveTheirOwnNames() {
        CifBlock block = CifFile.parse("data_t\n_x 1\nsave_f\n_x 2\n# c\nsave_\nsave_g\n_x 3\nsave_\n_y 4\n")
                .blocks()
                .get(0);
        assertEquals(List.of("_x", "_y"), block.tags());
        assertEquals(2, block.frames().size());
        assertEquals("3", block.frames().get(1).value("_x").orElseThrow().text());
        assertThrows(
                IllegalArgumentException.class,
                () -> CifBlock.builder("u").add(block).build());
    }

    @Test
    void equals_byContent() {
        CifBlock one = CifBlock.builder("a").add("_x", 1).build();
        assertEquals(one, CifFile.parse("data_a _x 1").blocks().get(0));
        assertEquals(one.hashCode(), CifBlock.builder("a").add("_x", 1).build().hashCode());
        assertNotEquals(one, CifBlock.builder("a").add("_x", 2).build());
        assertNotEquals(one, CifBlock.builder("b").add("_x", 1).build());
        assertEquals("block a of 1 items", one.toString());
    }
}
