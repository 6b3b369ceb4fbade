package io.github.zonewright.crystal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.cif.CifBlock;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.cif.CoreDictionary;
import io.github.zonewright.geometry.Vector3;
import java.io.IOException;
import java.io.InputStream;
import java.util.HashSet;
import java.util.List;
import java.util.Locale;
import java.util.Set;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;

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
        if (entry.id().equals("thallium-chloride")) {
            assertTrue(crystal.notices().get(0).contains("CAUTION")
                    && crystal.notices().get(0).contains("toxic"));
        } else {
            assertTrue(crystal.notices().isEmpty(), "" + crystal.notices());
        }
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
        CoreDictionary dictionary = CoreDictionary.load();
        for (ShelfEntry entry : CrystalShelf.entries()) {
            for (CifBlock block : List.of(block(entry), CrystalCif.toBlock(entry.crystal()))) {
                block.tags().forEach(tag -> assertTrue(dictionary.contains(tag), tag));
            }
        }
    }

    /**
     * Densities of handbooks in g/cm³, from memory; a few of them, of alloys and phases that are never found pure, of
     * X-ray work. None is off by more than the cell of another composition or temperature makes it.
     */
    private static final String HANDBOOK = """
            aluminium 2.70
            copper 8.94
            silver 10.5
            gold 19.3
            platinum 21.45
            palladium 12.0
            lead 11.34
            nickel 8.91
            austenite 8.0
            ferrite 7.87
            chromium 7.19
            molybdenum 10.22
            vanadium 6.11
            niobium 8.57
            tantalum 16.65
            tungsten 19.25
            magnesium 1.74
            titanium-alpha 4.51
            titanium-beta 4.40
            zirconium-alpha 6.51
            zinc 7.14
            cobalt 8.86
            beryllium 1.85
            cadmium 8.65
            rhenium 21.0
            hafnium 13.3
            tin-white 7.29
            manganese-alpha 7.47
            diamond 3.515
            graphite 2.26
            silicon 2.33
            germanium 5.33
            gallium-arsenide 5.32
            gallium-phosphide 4.14
            indium-phosphide 4.81
            indium-arsenide 5.67
            aluminium-arsenide 3.73
            gallium-nitride 6.09
            aluminium-nitride 3.26
            zincite 5.68
            sphalerite 4.09
            cadmium-telluride 5.85
            silicon-carbide-3c 3.21
            tungsten-carbide 15.67
            silicon-nitride-beta 3.19
            periclase 3.58
            corundum 3.99
            hematite 5.26
            eskolaite 5.22
            magnetite 5.18
            wustite 5.95
            nickel-oxide 6.81
            spinel 3.58
            rutile 4.25
            anatase 3.89
            quartz-alpha 2.65
            cristobalite 2.33
            ceria 7.22
            zirconia-cubic 6.2
            cassiterite 7.0
            cuprite 6.1
            uraninite 10.97
            yttria 5.03
            strontium-titanate 5.12
            barium-titanate 6.02
            perovskite 4.03
            ybco 6.38
            halite 2.165
            sylvite 1.99
            fluorite 3.18
            calcite 2.71
            dolomite 2.87
            pyrite 5.01
            galena 7.6
            gypsum 2.31
            barite 4.48
            gold-copper 15.0
            heusler 6.6
            nickeline 7.8
            cementite 7.69
            gamma-prime 7.41
            nickel-aluminide 5.9
            titanium-carbide 4.93
            titanium-nitride 5.40
            niobium-carbide 7.82
            vanadium-carbide 5.77
            theta-al2cu 4.34
            sigma-fecr 7.6
            lanthanum-hexaboride 4.72
            vanadium-nitride 6.1
            chromium-nitride 6.14
            niobium-nitride 8.4
            iron-nitride 7.2
            chromium-carbide-m23c6 6.97
            molybdenum-carbide 9.1
            laves-fe2mo 9.1
            martensite 7.75
            manganese-sulfide 4.05
            nickel-titanium-eta 7.9
            gamma-double-prime 9.2
            titanium-aluminide-alpha2 4.2
            titanium-aluminide-gamma 3.83
            copper-gold 12.2
            magnesium-zinc 5.1
            magnesium-silicide 1.99
            caesium-chloride 3.99
            thallium-chloride 7.0
            """;

    static Stream<Arguments> densities() {
        return HANDBOOK.lines().map(line -> line.split(" ")).map(f -> Arguments.of(f[0], Double.valueOf(f[1])));
    }

    @ParameterizedTest
    @MethodSource("densities")
    void density_ofHandbooks(String id, double density) {
        assertEquals(density, CrystalShelf.entry(id).orElseThrow().crystal().density(), 0.015 * density);
    }

    @Test
    void density_checkedForEveryEntry() {
        assertEquals(CrystalShelf.entries().size(), densities().count());
    }

    /** What rings and lattice fringes are calibrated with. */
    @ParameterizedTest
    @ValueSource(strings = {"Au", "Al", "Si", "CeO2", "MgO", "TlCl", "LaB6", "NaCl"})
    void find_calibrationStandards(String formula) {
        assertTrue(CrystalShelf.find(formula).isPresent());
    }

    @ParameterizedTest
    @CsvSource({
        "Ferrite,Ferrite",
        "ALPHA IRON,Ferrite",
        "γ-Fe,Austenite",
        "Fe3C,Cementite",
        "C Fe3,Cementite",
        "GaAs,Gallium arsenide",
        "Al2O3,Corundum",
        "sapphire,Corundum",
        "MgAl2O4,Spinel",
        "rock salt,Halite",
        "Ni3Al,Gamma prime",
        "LaB6,Lanthanum hexaboride",
        "Cu,Copper",
        "Fe,Ferrite",
        "M23C6,Chromium carbide M23C6",
        "Mo2C,Molybdenum carbide",
        "Co,Cobalt",
        "tin,White tin",
        "alpha-titanium,Alpha titanium"
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
