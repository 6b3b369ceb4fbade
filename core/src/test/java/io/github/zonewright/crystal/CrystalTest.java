package io.github.zonewright.crystal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.symmetry.SpaceGroup;
import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;

class CrystalTest {

    private static final Crystal CORUNDUM = Crystal.of(
            "corundum",
            Lattice.hexagonal(4.758846, 12.99306),
            "R -3 c",
            AtomSite.of("Al", 0, 0, 0.3521),
            AtomSite.of("O", 0.3064, 0, 0.25));

    /** Corundum: 30 atoms in the hexagonal cell, 3.99 g/cm³ (handbook value, from memory). */
    @Test
    void corundum_atomsFormulaDensity() {
        assertEquals(30, CORUNDUM.unitCellAtoms().size());
        assertEquals("Al2 O3", CORUNDUM.formula());
        assertEquals(3.99, CORUNDUM.density(), 0.01);
        assertEquals(12.0, CORUNDUM.cellContents().get("Al"));
    }

    /** Densities of handbooks, from memory. */
    @Test
    void density_ofCommonMaterials() {
        assertEquals(
                2.70,
                Crystal.of("Al", Lattice.cubic(4.0495), "Fm-3m", AtomSite.of("Al", 0, 0, 0))
                        .density(),
                0.01);
        assertEquals(
                19.3,
                Crystal.of("W", Lattice.cubic(3.165), "Im-3m", AtomSite.of("W", 0, 0, 0))
                        .density(),
                0.1);
        assertEquals(
                2.33,
                Crystal.of("Si", Lattice.cubic(5.431), "227:1", AtomSite.of("Si", 0, 0, 0))
                        .density(),
                0.01);
    }

    @Test
    void formula_hillOrderMixedSitesAndReduction() {
        Crystal carbonate = Crystal.of(
                "calcite",
                Lattice.hexagonal(4.992, 17.069),
                "R -3 c",
                AtomSite.of("Ca", 0, 0, 0),
                AtomSite.of("C", 0, 0, 0.25),
                AtomSite.of("O", 0.25, 0, 0.25));
        assertEquals("C Ca O3", carbonate.formula());
        Crystal wustite = Crystal.of(
                "wüstite",
                Lattice.cubic(4.3),
                "Fm-3m",
                AtomSite.of("Fe", 0, 0, 0).withOccupancy(0.95),
                AtomSite.of("O", 0.5, 0, 0));
        assertEquals("Fe0.95 O", wustite.formula());
        Crystal mixed = Crystal.of(
                "alloy",
                Lattice.cubic(3.6),
                "Fm-3m",
                AtomSite.of("Ni", 0, 0, 0).withOccupancy(0.5),
                AtomSite.of("Cu", 0, 0, 0).withOccupancy(0.5));
        assertEquals("Cu0.5 Ni0.5", mixed.formula());
        assertEquals(8, mixed.unitCellAtoms().size());
        Crystal twoSites = Crystal.of(
                "W3O", Lattice.cubic(5.04), "P m -3 n", AtomSite.of("W", 0, 0, 0), AtomSite.of("W", 0.25, 0, 0.5));
        assertEquals("W", twoSites.formula());
    }

    /** Coordinates of three decimals stand for the special position. */
    @Test
    void unitCellAtoms_ofATruncatedSpecialPosition() {
        Crystal hcp = Crystal.of("Mg", Lattice.hexagonal(3.2, 5.2), "P63/mmc", AtomSite.of("Mg", 0.333, 0.667, 0.25));
        assertEquals(2, hcp.unitCellAtoms().size());
        assertEquals(1.0 / 3, hcp.unitCellAtoms().get(0).position().x(), 1e-9);
    }

    @Test
    void of_refusesUnknownGroupsAndNoSites() {
        IllegalArgumentException e = assertThrows(
                IllegalArgumentException.class,
                () -> Crystal.of("x", Lattice.cubic(4), "F q 3", AtomSite.of("Al", 0, 0, 0)));
        assertTrue(e.getMessage().contains("F q 3"));
        assertThrows(IllegalArgumentException.class, () -> Crystal.of("x", Lattice.cubic(4), "P 1"));
    }

    @Test
    void constructor_copiesItsLists() {
        List<AtomSite> sites = new ArrayList<>(List.of(AtomSite.of("Al", 0, 0, 0)));
        Crystal crystal = new Crystal("Al", Lattice.cubic(4), SpaceGroup.ofHall("P 1"), sites, new ArrayList<>());
        sites.clear();
        assertEquals(1, crystal.sites().size());
        assertThrows(
                UnsupportedOperationException.class, () -> crystal.notices().add("x"));
    }

    @Test
    void atomSite_refusesWhatCannotBe() {
        AtomSite site = AtomSite.of("Al", 0, 0, 0);
        assertThrows(IllegalArgumentException.class, () -> site.withOccupancy(1.1));
        assertThrows(IllegalArgumentException.class, () -> site.withOccupancy(Double.NaN));
        assertThrows(IllegalArgumentException.class, () -> AtomSite.of("Al", Double.NaN, 0, 0));
        assertThrows(IllegalArgumentException.class, () -> AtomSite.of("Al", 0, 1e9, 0));
        assertThrows(IllegalArgumentException.class, () -> AtomSite.of("Zz", 0, 0, 0));
        assertThrows(IllegalArgumentException.class, () -> Displacement.ofU(Double.POSITIVE_INFINITY));
        assertThrows(IllegalArgumentException.class, () -> new Displacement.Anisotropic(0, 0, 0, Double.NaN, 0, 0));
        assertEquals(0.5, ((Displacement.Isotropic) Displacement.ofB(0.5)).b(), 1e-15);
    }

    @Test
    void withName_keepsTheRest() {
        Crystal renamed = CORUNDUM.withName("sapphire");
        assertEquals("sapphire", renamed.name());
        assertEquals(CORUNDUM.sites(), renamed.sites());
        assertEquals(new Vector3(0.3064, 0, 0.25), renamed.sites().get(1).position());
    }
}
