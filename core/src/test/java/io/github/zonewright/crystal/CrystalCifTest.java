package io.github.zonewright.crystal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.TestData;
import io.github.zonewright.cif.CifException;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.cif.CifValueException;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.symmetry.SpaceGroup;
import io.github.zonewright.symmetry.SpaceGroups;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;

class CrystalCifTest {

    private static final String CUBIC_CELL = """
            data_test
            _cell_length_a 5.43
            _cell_length_b 5.43
            _cell_length_c 5.43
            _cell_angle_alpha 90
            _cell_angle_beta 90
            _cell_angle_gamma 90
            """;

    private static final String SILICON = """
            loop_
            _atom_site_label
            _atom_site_fract_x
            _atom_site_fract_y
            _atom_site_fract_z
            Si1 0 0 0
            """;

    private static final String SILICON_AT_ORIGIN_2 = SILICON.replace("0 0 0", "0.125 0.125 0.125");

    private static Crystal parse(String text) {
        return CrystalCif.of(CifFile.parse(text)).get(0);
    }

    private static String operations(String hall) {
        StringBuilder loop = new StringBuilder("loop_\n_symmetry_equiv_pos_as_xyz\n");
        SpaceGroup.ofHall(hall)
                .operations()
                .forEach(o -> loop.append("'").append(o).append("'\n"));
        return loop.toString();
    }

    private static void assertNotice(Crystal crystal, String... words) {
        assertTrue(
                crystal.notices().stream().anyMatch(n -> Stream.of(words).allMatch(n::contains)),
                "notices: " + crystal.notices());
    }

    static Stream<Path> files() throws IOException {
        return Files.list(TestData.path("cif")).sorted();
    }

    /** Thirty files of the Crystallography Open Database: all load, and fit the cell volume that they give. */
    @ParameterizedTest
    @MethodSource("files")
    void read_filesAsFound(Path file) throws IOException {
        List<Crystal> crystals = CrystalCif.read(file);
        assertEquals(1, crystals.size());
        Crystal crystal = crystals.get(0);
        boolean beryl = crystal.formula().equals("Al2 Be3 O18 Si6");
        // the beryl of 1926 has its origin a quarter of c off that of International Tables: a setting not tabulated
        assertEquals(!beryl, SpaceGroups.identify(crystal.spaceGroup()).isPresent());
        if (beryl) {
            assertNotice(crystal, "P 6/m c c S", "not tabulated", "were used");
        }
        double stated = CifFile.read(file)
                .blocks()
                .get(0)
                .value("_cell_volume")
                .orElseThrow()
                .asNumber()
                .value();
        assertEquals(stated, crystal.lattice().volume(), 0.01 * stated);
        assertTrue(crystal.notices().stream().noneMatch(n -> n.contains("disagrees")), "" + crystal.notices());
    }

    /** A file written and read again is the same crystal, to the last bit but for angles that are no whole degrees. */
    @ParameterizedTest
    @MethodSource("files")
    void write_readBackIsTheSame(Path file) throws IOException {
        Crystal crystal = CrystalCif.read(file).get(0);
        Crystal back = parse(CifFile.of(CrystalCif.toBlock(crystal)).toText());
        assertEquals(crystal.spaceGroup(), back.spaceGroup());
        assertEquals(crystal.name(), back.name());
        assertEquals(crystal.lattice().a(), back.lattice().a());
        assertEquals(crystal.lattice().gamma(), back.lattice().gamma(), 1e-15);
        assertEquals(crystal.formula(), back.formula());
        for (int i = 0; i < crystal.sites().size(); i++) {
            assertEquals(crystal.sites().get(i).position(), back.sites().get(i).position());
            assertEquals(
                    crystal.sites().get(i).displacement(), back.sites().get(i).displacement());
            assertEquals(crystal.sites().get(i).occupancy(), back.sites().get(i).occupancy());
        }
        StructureFactor one = StructureFactors.of(crystal).at(new Hkl(1, 1, 2));
        StructureFactor other = StructureFactors.of(back).at(new Hkl(1, 1, 2));
        assertEquals(one.re(), other.re(), 1e-12);
        assertTrue(back.notices().isEmpty(), "" + back.notices());
    }

    @Test
    void write_toAFile(@TempDir Path folder) throws IOException {
        Crystal crystal = CrystalCif.read(TestData.path("cif/TiO2-Rutile.cif")).get(0);
        Path file = folder.resolve("rutile.cif");
        CrystalCif.write(crystal, file);
        assertEquals("O2 Ti", CrystalCif.read(file).get(0).formula());
    }

    /** All spellings of the list of operations. */
    @ParameterizedTest
    @ValueSource(
            strings = {
                "_symmetry_equiv_pos_as_xyz",
                "_space_group_symop_operation_xyz",
                "_space_group_symop.operation_xyz",
                "_SYMMETRY_EQUIV_POS_AS_XYZ",
                "_symmetry_equiv.pos_as_xyz"
            })
    void of_operationsUnderEveryName(String name) {
        String list = operations("F 4d 2 3 -1d").replace("_symmetry_equiv_pos_as_xyz", name);
        Crystal crystal = parse(CUBIC_CELL + list + SILICON);
        assertEquals(8, crystal.unitCellAtoms().size());
        assertTrue(crystal.notices().isEmpty(), "" + crystal.notices());
    }

    /** Without operations: Hall symbol, then Hermann–Mauguin symbol, then number; an open origin is that of the sites. */
    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            quoteCharacter = '`',
            value = {
                "_symmetry_space_group_name_Hall 'F 4d 2 3 -1d' | F d -3 m:1",
                "_space_group_name_Hall '-F 4vw 2vw 3' | F d -3 m:2",
                "_symmetry_space_group_name_H-M 'F d -3 m :1' | F d -3 m:1",
                "_symmetry_space_group_name_H-M Fd3m | F d -3 m:1",
                "_space_group_name_H-M_alt 'F d -3 m S' | F d -3 m:1",
                "_space_group.name_H-M_alt 'F d -3 m :2' | F d -3 m:2",
                "_space_group_IT_number 227 | F d -3 m:1",
                "_symmetry_Int_Tables_number 225 | F m -3 m"
            })
    void of_groupWithoutOperations(String item, String setting) {
        Crystal crystal = parse(CUBIC_CELL + item + "\n" + SILICON);
        assertEquals(
                setting,
                SpaceGroups.identify(crystal.spaceGroup()).orElseThrow().hermannMauguin());
        if (!item.contains("Hall")) {
            assertNotice(crystal, "lists no operations", setting);
        }
    }

    /** The cell settles whether R 3 c means hexagonal or rhombohedral axes. */
    @Test
    void of_rhombohedralAxesByTheCell() {
        String rhombohedral = CUBIC_CELL.replace(" 90", " 55.28");
        String hexagonal = CUBIC_CELL.replace("gamma 90", "gamma 120");
        String symbol = "_symmetry_space_group_name_H-M 'R -3 c'\n" + SILICON;
        assertEquals(12, parse(rhombohedral + symbol).spaceGroup().order());
        assertEquals(36, parse(hexagonal + symbol).spaceGroup().order());
    }

    /** A file that says rhombohedral axes and gives a hexagonal cell, as found for LiNbO3. */
    @Test
    void of_rhombohedralSymbolWithHexagonalCell() {
        Crystal crystal = parse(CUBIC_CELL.replace("gamma 90", "gamma 120")
                + "_symmetry_space_group_name_H-M 'R 3 c {rhombohedral axes}'\n" + SILICON);
        assertEquals(18, crystal.spaceGroup().order());
        assertNotice(crystal, "R 3 c:H", "R 3 c {rhombohedral axes}", "axes the cell does not have");
    }

    @Test
    void of_bareSymbolWithOriginTwoOperations() {
        Crystal crystal = parse(CUBIC_CELL + "_symmetry_space_group_name_H-M 'F d 3 m'\n" + operations("-F 4vw 2vw 3")
                + SILICON_AT_ORIGIN_2);
        assertEquals(8, crystal.unitCellAtoms().size());
        assertNotice(crystal, "F d 3 m", "leaves the setting open", "F d -3 m:2", "were used");
    }

    @Test
    void of_symbolAndNumberThatDisagree() {
        Crystal crystal = parse(CUBIC_CELL + "_symmetry_space_group_name_H-M 'F m -3 m'\n_space_group_IT_number 225\n"
                + "_symmetry_space_group_name_Hall '-F 4 2 3'\n" + operations("F 4d 2 3 -1d") + SILICON);
        assertEquals(8, crystal.unitCellAtoms().size());
        assertNotice(crystal, "F m -3 m", "disagrees", "F d -3 m:1", "were used");
        assertNotice(crystal, "225", "disagrees");
        assertNotice(crystal, "-F 4 2 3", "disagrees");
    }

    @Test
    void of_operationsThatAreIncompleteOrNone() {
        Crystal completed = parse(CUBIC_CELL + "loop_\n_symmetry_equiv_pos_as_xyz\nx,y,z\n-y,x,z\n" + SILICON);
        assertEquals(4, completed.spaceGroup().order());
        assertNotice(completed, "completed to 4");
        Crystal symbol = parse(CUBIC_CELL
                + "_symmetry_space_group_name_H-M 'F m -3 m'\nloop_\n_symmetry_equiv_pos_as_xyz\nx,y,z\nx+y,y,z\n"
                + SILICON);
        assertEquals(192, symbol.spaceGroup().order());
        assertNotice(symbol, "make no space group");
        Crystal none = parse(CUBIC_CELL + SILICON);
        assertEquals(1, none.spaceGroup().order());
        assertNotice(none, "P 1 was taken");
    }

    @Test
    void of_cellWithoutTheSymmetryOfTheGroup() {
        Crystal crystal = parse(
                CUBIC_CELL.replace("_cell_length_c 5.43", "_cell_length_c 5.5") + operations("F 4d 2 3 -1d") + SILICON);
        assertNotice(crystal, "does not have the symmetry");
    }

    /** Truncated special positions, and sites repeated by symmetry. */
    @Test
    void of_snapsAndMerges() {
        String cell = CUBIC_CELL.replace("gamma 90", "gamma 120");
        Crystal crystal = parse(cell + operations("-P 6c 2c") + SILICON.replace("0 0 0", "0.3333 0.6667 0.25")
                + "Si2 0.6667 0.3333 0.75\n");
        assertEquals(1, crystal.sites().size());
        assertEquals(2, crystal.unitCellAtoms().size());
        assertEquals(1.0 / 3, crystal.sites().get(0).position().x(), 1e-12);
        assertNotice(crystal, "Truncated", "Si1");
        assertNotice(crystal, "Si2 is Si1 again");
    }

    @Test
    void of_mixedSitesStayApart() {
        String sites = """
                loop_
                _atom_site_label
                _atom_site_type_symbol
                _atom_site_fract_x
                _atom_site_fract_y
                _atom_site_fract_z
                _atom_site_occupancy
                Fe1 Fe3+ 0 0 0 0.6
                Fe2 Fe2+ 0 0 0 0.2(1)
                Mg1 Mg2+ 0 0 0 .2
                O1 O2- .5 0 0 .
                """;
        Crystal crystal = parse(CUBIC_CELL + operations("-F 4 2 3") + sites);
        assertEquals(4, crystal.sites().size());
        assertEquals("Fe0.8 Mg0.2 O", crystal.formula());
        assertNotice(crystal, "neutral atoms", "Fe2+, Fe3+, Mg2+, O2-");
        Crystal overfull = parse(CUBIC_CELL
                + operations("-F 4 2 3")
                + sites.replace("0.2(1)", "0.9").replace(".2\n", "1\n"));
        assertNotice(overfull, "Fe2 is Fe1 again");
        assertNotice(overfull, "Mg1", "add up to 1.600");
    }

    @Test
    void of_displacementsOfEveryKind() {
        String sites = """
                loop_
                _atom_site_label
                _atom_site_fract_x
                _atom_site_fract_y
                _atom_site_fract_z
                _atom_site_U_iso_or_equiv
                _atom_site_B_iso_or_equiv
                Si1 0 0 0 0.01(2) ?
                Si2 .5 0 0 . 0.8
                Si3 0 .5 0 0.02 .
                Si4 0 0 .5 ? ?
                Si5 .5 .5 .5 ? ?
                loop_
                _atom_site_aniso_label
                _atom_site_aniso_U_11
                _atom_site_aniso_U_22
                _atom_site_aniso_U_33
                _atom_site_aniso_U_12
                _atom_site_aniso_U_13
                _atom_site_aniso_U_23
                Si3 .01 .02 .03 .001 .002 .003
                Si4 ? ? ? ? ? ?
                loop_
                _chemical_conn_atom_number
                1
                """;
        List<AtomSite> read = parse(CUBIC_CELL + operations("P 1") + sites).sites();
        assertEquals(Displacement.ofU(0.01), read.get(0).displacement());
        assertEquals(Displacement.ofB(0.8), read.get(1).displacement());
        assertEquals(
                new Displacement.Anisotropic(.01, .02, .03, .001, .002, .003),
                read.get(2).displacement());
        assertEquals(Displacement.NONE, read.get(3).displacement());
        assertEquals(Displacement.NONE, read.get(4).displacement());
    }

    @Test
    void of_valuesThatTheFileContradicts() {
        Crystal crystal = parse(CUBIC_CELL + "_cell_volume 170\n_exptl_crystal_density_diffrn 2.6\n"
                + operations("F 4d 2 3 -1d") + SILICON);
        assertNotice(crystal, "cell volume", "170", "160.10");
        assertNotice(crystal, "density", "2.600", "2.33");
    }

    /** Several structures offer a choice; a block that cannot be used is told. */
    @Test
    void of_severalBlocks() {
        String second = CUBIC_CELL.replace("data_test", "data_two") + operations("-F 4 2 3") + SILICON;
        String broken =
                CUBIC_CELL.replace("data_test", "data_three") + operations("P 1") + SILICON.replace("Si1", "Xx1");
        List<Crystal> crystals = CrystalCif.of(CifFile.parse(
                "data_global\n_journal_year 1999\n" + CUBIC_CELL + operations("P 1") + SILICON + second + broken));
        assertEquals(
                List.of("test", "two"), crystals.stream().map(Crystal::name).toList());
        assertNotice(crystals.get(0), "Block three", "Xx1");
    }

    /** What cannot be a crystal is refused with item and line. */
    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            quoteCharacter = '`',
            value = {
                "_cell_length_a 5.43 | _cell_length_a ? | _cell_length_a | 2",
                "_cell_length_a 5.43 | _cell_length_a -5 | _cell_length_a | 2",
                "_cell_length_b 5.43 | _cell_length_b wide | _cell_length_b | 3",
                "_cell_angle_beta 90 | _cell_angle_beta 190 | _cell_angle_beta | 6",
                "gamma 90 | gamma 0 | _cell_angle_gamma | 7",
                "Si1 0 0 0 | Qq1 0 0 0 | _atom_site_label | 13",
                "Si1 0 0 0 | Si1 0 zero 0 | _atom_site_fract_y | 13",
                "Si1 0 0 0 | Si1 0 1e9 0 | _atom_site_fract_x | 13"
            })
    void of_refusesWithItemAndLine(String from, String to, String item, int line) {
        String text = (CUBIC_CELL + SILICON).replace(from, to);
        IllegalArgumentException e = assertThrows(IllegalArgumentException.class, () -> parse(text));
        String expected = "line " + line + ",";
        assertTrue(e.getMessage().startsWith(expected) && e.getMessage().contains(item), e.getMessage());
        assertTrue(e instanceof CifException || e instanceof CrystalCifException);
        if (e instanceof CrystalCifException place) {
            assertEquals(line, place.line());
            assertEquals(item, place.item());
        }
    }

    @Test
    void of_refusesAnglesThatCloseNoCell() {
        String text = CUBIC_CELL.replace("alpha 90", "alpha 10").replace("beta 90", "beta 110") + SILICON;
        CrystalCifException e = assertThrows(CrystalCifException.class, () -> parse(text));
        assertEquals(5, e.line());
        assertEquals("_cell_angle_alpha", e.item());
    }

    @Test
    void of_refusesFilesWithoutACrystal() {
        assertThrows(CrystalCifException.class, () -> parse("data_x\n_journal_year 1999\n"));
        assertThrows(CrystalCifException.class, () -> parse(""));
        assertThrows(CrystalCifException.class, () -> parse(CUBIC_CELL));
        assertThrows(CrystalCifException.class, () -> parse("data_x\n" + SILICON));
        String bad = CUBIC_CELL + "loop_\n_symmetry_equiv_pos_as_xyz\nx,y,z\nx,y,q\n" + SILICON;
        CrystalCifException e = assertThrows(CrystalCifException.class, () -> parse(bad));
        assertEquals(11, e.line());
        assertThrows(
                CifValueException.class,
                () -> parse(CUBIC_CELL
                        + SILICON.replace("_atom_site_fract_x", "_atom_site_occupancy\n_atom_site_fract_x")
                                .replace("Si1", "Si1 -1")));
    }

    /** Angles left out are 90 degrees by the dictionary. */
    @Test
    void of_anglesLeftOut() {
        Crystal crystal = parse(CUBIC_CELL.replace("_cell_angle_beta 90\n", "") + operations("P 1") + SILICON);
        assertEquals(Math.PI / 2, crystal.lattice().beta());
        assertNotice(crystal, "beta", "90");
    }
}
