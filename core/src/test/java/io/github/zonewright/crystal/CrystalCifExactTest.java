package io.github.zonewright.crystal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.TestData;
import io.github.zonewright.cif.CifBlock;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.lattice.Lattice;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Random;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;

/** A crystal kept in a CIF and had back as it was. */
class CrystalCifExactTest {

    private static Crystal reread(Crystal crystal) {
        CifBlock block = CrystalCif.toBlock(crystal);
        return CrystalCif.asWritten(
                CifFile.parse(CifFile.of(block).toText()).blocks().get(0));
    }

    private static Crystal withoutNotices(Crystal c) {
        return new Crystal(c.name(), c.lattice(), c.spaceGroup(), c.sites(), List.of());
    }

    @Test
    void asWritten_everyCrystalOfTheTestData_isTheSame() throws IOException {
        List<Path> files;
        try (Stream<Path> list = Files.list(TestData.path("cif"))) {
            files = list.filter(p -> p.toString().endsWith(".cif")).toList();
        }
        assertTrue(files.size() >= 20);
        for (Path file : files) {
            for (Crystal crystal : CrystalCif.read(file)) {
                assertEquals(withoutNotices(crystal), reread(crystal), file.toString());
            }
        }
    }

    @Test
    void asWritten_anglesOfNoRoundDegrees_areTheSameInEveryBit() {
        Random random = new Random(1);
        for (int i = 0; i < 300; i++) {
            Lattice cell = new Lattice(
                    3,
                    4,
                    5,
                    1.3 + 0.5 * random.nextDouble(),
                    1.3 + 0.5 * random.nextDouble(),
                    1.3 + 0.5 * random.nextDouble());
            Crystal crystal = Crystal.of("cell", cell, "P 1", AtomSite.of("C", random.nextDouble(), 0, 0));
            assertEquals(crystal, reread(crystal));
        }
    }

    @Test
    void asWritten_roundedSpecialPosition_staysAsItIs_whereOfPutsItRight() {
        AtomSite site = AtomSite.of("Mg", 0.3333, 0.6667, 0.25);
        Crystal crystal = Crystal.of("magnesium", Lattice.hexagonal(3.2094, 5.2108), "P 63/m m c", site);
        assertEquals(crystal, reread(crystal));
        assertNotEquals(
                crystal.sites(), CrystalCif.of(CrystalCif.toBlock(crystal)).sites());
    }

    @Test
    void asWritten_nameOfSeveralSpacesOrNone_isKept() {
        for (String name : List.of("two  words", " edge ", "", "?", "β-Sn")) {
            Crystal crystal = Crystal.of(name, Lattice.cubic(4), "P 1", AtomSite.of("C", 0, 0, 0));
            assertEquals(name, reread(crystal).name());
        }
    }

    @Test
    void asWritten_sitesThatShareALabel_getNumberedOnes() {
        AtomSite half = AtomSite.of("Fe", 0, 0, 0).withOccupancy(0.5);
        Crystal crystal = Crystal.of("mixed", Lattice.cubic(4), "P 1", half, half);
        assertEquals(
                List.of("Fe", "Fe_2"),
                reread(crystal).sites().stream().map(AtomSite::label).toList());
    }
}
