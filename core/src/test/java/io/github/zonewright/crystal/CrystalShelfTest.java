package io.github.zonewright.crystal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.cif.CifBlock;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.reference.ReferenceCsv;
import java.io.IOException;
import java.io.InputStream;
import java.util.HashSet;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Set;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.MethodSource;

class CrystalShelfTest {

    static Stream<ShelfEntry> entries() {
        return CrystalShelf.entries().stream();
    }

    private static CifBlock block(ShelfEntry entry) throws IOException {
        try (InputStream in = CrystalShelf.class.getResourceAsStream("shelf/" + entry.id() + ".cif")) {
            return CifFile.read(in).blocks().get(0);
        }
    }

    @Test
    void entries_atLeastSixtyWithNamesOfTheirOwn() {
        assertTrue(CrystalShelf.entries().size() >= 60);
        Set<String> names = new HashSet<>();
        entries().forEach(e -> {
            assertTrue(names.add(e.name().toLowerCase(Locale.ROOT)), e.name());
            e.otherNames().forEach(n -> assertTrue(names.add(n.toLowerCase(Locale.ROOT)), n));
        });
    }

    /** Each file reads without a doubt, says where it comes from, and agrees with the index. */
    @ParameterizedTest
    @MethodSource("entries")
    void crystal_readsWithoutNoticesAndNamesItsSource(ShelfEntry entry) throws IOException {
        Crystal crystal = entry.crystal();
        assertTrue(crystal.notices().isEmpty(), "" + crystal.notices());
        assertEquals(entry.name(), crystal.name());
        assertEquals(entry.formula(), crystal.formula());
        assertTrue(crystal.spaceGroup().fits(crystal.lattice(), 1e-6));
        String source =
                block(entry).value("_citation_special_details").orElseThrow().text();
        assertTrue(source.contains("Crystallography Open Database") || source.contains("from memory"), source);
        assertTrue(source.matches("(?s).*(\\(?(18|19|20)\\d\\d\\)?|card \\d+-\\d+|NIST SRM).*"), source);
    }

    /** No two atoms nearer than a bond of hydrogen to oxygen (0.9 Å): a slip in a coordinate would show so. */
    @ParameterizedTest
    @MethodSource("entries")
    void crystal_atomsKeepTheirDistance(ShelfEntry entry) {
        Crystal crystal = entry.crystal();
        List<UnitCellAtom> atoms = crystal.unitCellAtoms();
        for (int i = 0; i < atoms.size(); i++) {
            for (int j = 0; j < i; j++) {
                Vector3 d = atoms.get(i).position().minus(atoms.get(j).position());
                Vector3 near =
                        new Vector3(d.x() - Math.rint(d.x()), d.y() - Math.rint(d.y()), d.z() - Math.rint(d.z()));
                double distance = crystal.lattice().basis().times(near).norm();
                boolean mixed = distance < 1e-6
                        && atoms.get(i).site().occupancy() + atoms.get(j).site().occupancy() < 1.001;
                assertTrue(
                        mixed || distance > 0.9,
                        atoms.get(i).site().label() + " " + atoms.get(j).site().label() + " " + distance);
            }
        }
    }

    /** Names of items in the files of the shelf, and in those the library writes, stand in the core dictionary. */
    @Test
    void files_useNamesOfTheCoreDictionary() throws IOException {
        Set<String> names = new HashSet<>();
        for (Map<String, String> row : ReferenceCsv.read("cif-core-items.csv", ',')) {
            names.add(row.get("item").replace('.', '_').toLowerCase(Locale.ROOT));
            names.addAll(List.of(row.get("aliases").toLowerCase(Locale.ROOT).split(" ")));
        }
        for (ShelfEntry entry : CrystalShelf.entries()) {
            for (CifBlock block : List.of(block(entry), CrystalCif.toBlock(entry.crystal()))) {
                block.tags().forEach(tag -> assertTrue(names.contains(tag.toLowerCase(Locale.ROOT)), tag));
            }
        }
    }

    /** Densities of handbooks, from memory, in g/cm³. */
    @ParameterizedTest
    @CsvSource({
        "aluminium,2.70",
        "copper,8.94",
        "gold,19.3",
        "ferrite,7.87",
        "silicon,2.33",
        "magnesium,1.74",
        "tungsten,19.25",
        "corundum,3.99",
        "rutile,4.25",
        "quartz,2.65",
        "spinel,3.58",
        "halite,2.165",
        "cementite,7.69",
        "periclase,3.58",
        "titanium nitride,5.40",
        "titanium carbide,4.93",
        "magnetite,5.18",
        "fluorite,3.18",
        "calcite,2.71",
        "theta phase,4.34",
        "nickel,8.91",
        "lanthanum hexaboride,4.72",
        "pyrite,5.01",
        "galena,7.6"
    })
    void density_ofHandbooks(String name, double density) {
        assertEquals(density, CrystalShelf.find(name).orElseThrow().density(), 0.01 * density);
    }

    @ParameterizedTest
    @CsvSource({
        "Ferrite,Ferrite", "ALPHA IRON,Ferrite", "γ-Fe,Austenite", "Fe3C,Cementite", "C Fe3,Cementite",
                "GaAs,Gallium arsenide",
        "Al2O3,Corundum", "sapphire,Corundum", "MgAl2O4,Spinel", "rock salt,Halite", "Ni3Al,Gamma prime",
                "LaB6,Lanthanum hexaboride",
        "Cu,Copper", "Co,Cobalt", "tin,White tin", "alpha-titanium,Alpha titanium"
    })
    void find_byNameOrFormula(String words, String name) {
        assertEquals(name, CrystalShelf.find(words).orElseThrow().name());
    }

    @Test
    void find_nothing() {
        assertTrue(CrystalShelf.find("unobtainium").isEmpty());
        assertTrue(CrystalShelf.find("").isEmpty());
        assertTrue(CrystalShelf.find("Xx2").isEmpty());
        assertThrows(IllegalArgumentException.class, () -> CrystalShelf.read("../../secret"));
    }

    @Test
    void search_partsOfNames() {
        List<String> found =
                CrystalShelf.search("iron").stream().map(ShelfEntry::name).toList();
        assertTrue(found.containsAll(List.of("Ferrite", "Austenite", "Cementite")), "" + found);
        assertEquals(2, CrystalShelf.search("TiO2").size(), "rutile and anatase");
        assertEquals(CrystalShelf.entries(), CrystalShelf.search(" "));
        assertFalse(CrystalShelf.search("nitride").isEmpty());
    }
}
