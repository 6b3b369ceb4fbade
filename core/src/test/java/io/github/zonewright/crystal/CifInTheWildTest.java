package io.github.zonewright.crystal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.cif.CifFile;
import io.github.zonewright.symmetry.SpaceGroups;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Habits of files from databases, papers and refinement programs, each in a small file made up here. */
class CifInTheWildTest {

    private static final String CELL = """
            _cell_length_a 8.0(1)
            _cell_length_b 8.0(1)
            _cell_length_c 8.0(1)
            _cell_angle_alpha 90
            _cell_angle_beta 90.
            _cell_angle_gamma 90.00
            """;

    private static Crystal parse(String text) {
        return CrystalCif.of(CifFile.parse(text)).get(0);
    }

    private static void assertNotice(Crystal crystal, String... words) {
        assertTrue(
                crystal.notices().stream().anyMatch(n -> Stream.of(words).allMatch(n::contains)),
                "notices: " + crystal.notices());
    }

    /** A refinement's output: local names, riding hydrogens, charges, disorder, both kinds of displacement, old names. */
    private static final String REFINEMENT = "data_I\n_[local]_cod_chemical_formula_sum_orig 'C2 H6 O'\n"
            + "_audit_creation_method 'by hand'\n_refine_ls_R_factor_all ?\n" + CELL + """
            _symmetry_cell_setting monoclinic
            _symmetry_space_group_name_H-M 'P 1 21/c 1'
            loop_
              _symmetry_equiv_pos_site_id
              _symmetry_equiv_pos_as_xyz
              1 'x, y, z'
              2 '-x, 1/2+y, 1/2-z'
              3 '-x, -y, -z'
              4 'x, 1/2-y, 1/2+z'
            loop_
              _atom_type_symbol
              _atom_type_oxidation_number
              Fe3+ 3
              O2- -2
              D1+ 1
            loop_
              _atom_site_label
              _atom_site_type_symbol
              _atom_site_fract_x
              _atom_site_fract_y
              _atom_site_fract_z
              _atom_site_U_iso_or_equiv
              _atom_site_thermal_displace_type
              _atom_site_occupancy
              _atom_site_calc_flag
              _atom_site_refinement_flags
              _atom_site_disorder_assembly
              _atom_site_disorder_group
              Fe1 Fe3+ 0.1000(1) 0.2000(2) 0.3000(3) 0.0100(5) Uani 1 d . . .
              O1A O2- 0.41 0.22 0.13 0.020(1) Uiso 0.60(2) d P A 1
              O1B O2- 0.45 0.26 0.15 0.020(1) Uiso 0.40(2) d P A 2
              D1 D1+ 0.70 0.10 0.20 0.03 Uiso 1 calc R . .
              H2 H ? ? ? ? Uiso 1 calc . . .
              Q1 ? 0.5 0.5 0.5 0.05 Uiso 1 dum . . .
              O3 ? 0.9 0.8 0.7 ? . ? d . . -1
            loop_
              _atom_site_aniso_label
              _atom_site_aniso_U_11
              _atom_site_aniso_U_22
              _atom_site_aniso_U_33
              _atom_site_aniso_U_23
              _atom_site_aniso_U_13
              _atom_site_aniso_U_12
              Fe1 0.011(1) 0.012(1) 0.013(1) 0.001(1) 0.002(1) 0.003(1)
            loop_
              _geom_bond_atom_site_label_1
              _geom_bond_distance
              Fe1 2.0(1)
            """;

    @Test
    void of_refinementsOutput() {
        Crystal crystal = parse(REFINEMENT);
        assertEquals(4, crystal.spaceGroup().order());
        assertEquals(
                List.of("Fe1", "O1A", "O1B", "D1", "O3"),
                crystal.sites().stream().map(AtomSite::label).toList());
        assertEquals(
                new Displacement.Anisotropic(.011, .012, .013, .003, .002, .001),
                crystal.sites().get(0).displacement());
        assertEquals(0.6, crystal.sites().get(1).occupancy());
        assertEquals(0.4, crystal.sites().get(2).occupancy());
        assertEquals(Displacement.NONE, crystal.sites().get(4).displacement());
        assertEquals(1, crystal.sites().get(4).occupancy());
        assertEquals("Fe H O2", crystal.formula());
        assertNotice(crystal, "neutral atoms", "Fe3+", "O2-");
        assertNotice(crystal, "Deuterium", "D1");
        assertNotice(crystal, "H2", "no coordinates");
        assertNotice(crystal, "Q1", "dummy");
        assertNotice(crystal, "Alternatives of disorder are all kept", "O1A, O1B, O3");
    }

    /** Labels that name no element of their own, without type symbols. */
    @Test
    void of_deuteriumWaterAndVacancies() {
        String rows = sites("D1 .1 .2 .3", "Wat1 .2 .3 .4", "Va1 .4 .5 .6").replace("_atom_site_type_symbol\n", "");
        Crystal crystal = parse("data_a\n" + CELL + "_space_group_name_Hall 'P 1'\n" + rows);
        assertEquals("H O", crystal.formula());
        assertNotice(crystal, "Deuterium", "D1");
        assertNotice(crystal, "Water", "Wat1");
        assertNotice(crystal, "Va1", "vacancy");
    }

    /** Nothing of a file is lost: local names, flags and bonds are there when it is written again. */
    @Test
    void cif_keepsWhatItDoesNotKnow() {
        CifFile file = CifFile.parse(REFINEMENT);
        CifFile again = CifFile.parse(file.toText());
        assertEquals(file.blocks(), again.blocks());
        assertEquals(
                "C2 H6 O",
                again.blocks()
                        .get(0)
                        .value("_[local]_cod_chemical_formula_sum_orig")
                        .orElseThrow()
                        .text());
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "1/2+x,1/2+y,z|2",
                "X+1/2, Y+0.5, Z|2",
                "+x+1/2,+y+1/2,+z|2",
                "x+.5,y+.5,z|2",
                "1/2 + X , 1/2 + Y , Z|2",
                "x-1/2,y+3/2,z|2",
                "x,y,z|1"
            })
    void of_tripletsInEverySpelling(String triplet, int order) {
        String loop = "loop_\n_symmetry_equiv_pos_as_xyz\nx,y,z\n'" + triplet + "'\n";
        Crystal crystal = parse("data_a\n" + CELL + loop + sites("Fe1 Fe .1 .2 .3"));
        assertEquals(order, crystal.spaceGroup().order());
    }

    private static String sites(String... rows) {
        return "loop_\n_atom_site_label\n_atom_site_type_symbol\n_atom_site_fract_x\n_atom_site_fract_y\n"
                + "_atom_site_fract_z\n" + String.join("\n", rows) + "\n";
    }

    /** A paper's file: a block of headings that all share, then the structures; one of them has no coordinates. */
    @Test
    void structures_ofAPaper() {
        String group = "_space_group_name_H-M_alt 'P 1'\n";
        String paper = "data_global\n_journal_year 1999\n_publ_section_title\n;\nSteels\n;\n"
                + "data_one\n_chemical_name_common ferrite\n" + CELL + group + sites("Fe1 Fe 0 0 0")
                + "data_two\n" + CELL.replace("90.00", "190") + group + sites("Fe1 Fe 0 0 0")
                + "data_three\n_chemical_name_mineral Wustite\n" + CELL + group
                + "data_four\n" + CELL + group + sites("Fe1 Fe 0 0 0", "O1 O .5 .5 .5");
        List<CifStructure> structures = CrystalCif.structures(CifFile.parse(paper));
        assertEquals(
                List.of("one", "two", "three", "four"),
                structures.stream().map(CifStructure::block).toList());
        assertEquals("ferrite (Fe)", structures.get(0).toString());
        assertEquals("four (Fe O)", structures.get(3).toString());
        CifStructure.Refused angle = assertInstanceOf(CifStructure.Refused.class, structures.get(1));
        assertTrue(angle.reason().contains("190") && angle.reason().contains("line "), angle.reason());
        CifStructure.Refused bare = assertInstanceOf(CifStructure.Refused.class, structures.get(2));
        assertEquals("Wustite", bare.name());
        assertTrue(bare.toString().startsWith("Wustite: line "), bare.toString());
        List<Crystal> crystals = CrystalCif.of(CifFile.parse(paper));
        assertEquals(2, crystals.size());
        assertNotice(crystals.get(1), "Block two", "190");
        assertEquals(List.of(), CrystalCif.structures(CifFile.parse("data_global\n_journal_year 1999\n")));
    }

    @Test
    void of_onlyOrthogonalCoordinates_isRefused() {
        String text = "data_a\n" + CELL + "loop_\n_atom_site_label\n_atom_site_Cartn_x\nFe1 0.1\n";
        String message =
                assertThrows(CrystalCifException.class, () -> parse(text)).getMessage();
        assertTrue(message.contains("_atom_site_fract_x") && message.contains("line "), message);
    }

    /**
     * A bare symbol of two origins, no operations: the stated formula tells, else the room between the atoms. Coordinates
     * of spinel by either origin: International Tables A, No. 227; u = 0.2625 and 0.3875.
     */
    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "Al2 Mg O4|Mg Mg 0 0 0|Al Al .625 .625 .625|O O .3875 .3875 .3875|F d -3 m:1|stated formula",
                "Al2 Mg O4|Mg Mg .125 .125 .125|Al Al .5 .5 .5|O O .2625 .2625 .2625|F d -3 m:2|stated formula",
                "?|Mg Mg 0 0 0|Al Al .625 .625 .625|O O .3875 .3875 .3875|F d -3 m:1|apart",
                "?|Mg Mg .125 .125 .125|Al Al .5 .5 .5|O O .2625 .2625 .2625|F d -3 m:2|apart"
            })
    void of_bareSymbolOfTwoOrigins(String sum, String one, String two, String three, String setting, String why) {
        String head = "data_a\n_chemical_formula_sum '" + sum + "'\n_symmetry_space_group_name_H-M 'F d 3 m'\n";
        Crystal crystal = parse((head + CELL + sites(one, two, three)).replace("'?'", "?"));
        assertEquals(
                setting,
                SpaceGroups.identify(crystal.spaceGroup()).orElseThrow().hermannMauguin());
        assertEquals("Al2 Mg O4", crystal.formula());
        assertNotice(crystal, "leaves the setting open", setting, why);
    }

    /** What the reader lets pass is told with the crystal: here an item that stands twice. */
    @Test
    void of_fileThatBreaksTheStandard() {
        String twice = "_journal_year 1999\n".repeat(9);
        Crystal crystal = parse("data_a\n" + twice + CELL + "_space_group_name_Hall 'P 1'\n" + sites("Fe Fe 0 0 0"));
        assertNotice(crystal, "breaks the standard", "line 3", "_journal_year");
        assertNotice(crystal, "3 more places");
        assertEquals(6, crystal.notices().size());
    }

    /** An effect on living things that the file states is told. */
    @Test
    void of_toxicMaterial() {
        Crystal crystal = parse("data_a\n_chemical_properties_biological\n;\n very\n toxic\n;\n" + CELL
                + "_space_group_name_Hall 'P 1'\n" + sites("Tl Tl 0 0 0"));
        assertNotice(crystal, "says: very toxic");
    }
}
