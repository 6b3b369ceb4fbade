package io.github.zonewright.crystal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.symmetry.SpaceGroups;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class CrystalBuilderTest {

    private static String refused(CrystalBuilder builder) {
        return assertThrows(IllegalArgumentException.class, builder::build).getMessage();
    }

    private static String setting(Crystal crystal) {
        return SpaceGroups.identify(crystal.spaceGroup()).orElseThrow().hermannMauguin();
    }

    /** Every spelling of one group, and the edge alone. */
    @ParameterizedTest
    @ValueSource(strings = {"225", "Fm-3m", "F m -3 m", "F m 3 m", "F 4/m -3 2/m", "-F 4 2 3", "fm3m"})
    void build_groupInAnySpelling(String group) {
        Crystal crystal = Crystal.builder("rock salt")
                .spaceGroup(group)
                .edges(5.64)
                .site("Na+", "0", "0", "0")
                .site("Cl-", "1/2", "1/2", "1/2")
                .build();
        assertEquals("Cl Na", crystal.formula());
        assertEquals(8, crystal.unitCellAtoms().size());
        assertEquals(List.of(), crystal.notices());
        assertEquals("Na1", crystal.sites().get(0).label());
    }

    @Test
    void build_wholeCellAndMixedSites() {
        Crystal crystal = Crystal.builder(" gypsum-like ")
                .spaceGroup("I 1 2/c 1")
                .cell(Lattice.monoclinicDegrees(5.68, 15.2, 6.53, 118.5))
                .site("Ca", "1/2", "0.0797", "-1/4", 0.5, Displacement.ofB(0.5))
                .site("Sr", "1/2", "0.0797", "-1/4", 0.5, Displacement.ofB(0.5))
                .build();
        assertEquals("gypsum-like", crystal.name());
        assertEquals(8, crystal.unitCellAtoms().size());
        assertEquals("Ca0.5 Sr0.5", crystal.formula());
    }

    /** Three decimals of a third are put onto the third, and told. */
    @Test
    void build_truncatedCoordinates() {
        Crystal crystal = Crystal.builder("Mg")
                .spaceGroup("P63/mmc")
                .edges(3.2094, 5.2105)
                .site("Mg", "0.333", "0.667", ".25")
                .build();
        assertEquals(2, crystal.unitCellAtoms().size());
        assertEquals(1.0 / 3, crystal.sites().get(0).position().x(), 1e-12);
        assertTrue(crystal.notices().get(0).startsWith("Truncated"), "" + crystal.notices());
    }

    /**
     * A symbol that names no origin: coordinates of either origin of International Tables A (diamond; spinel, u = 0.2625
     * and 0.3875) are read with their own. Those of cuprite, from 1/4 1/4 1/4, do not tell: half a cell apart both do.
     */
    @ParameterizedTest
    @CsvSource({
        "Fd-3m,5.43,Si 0 0 0,F d -3 m:1,8",
        "Fd-3m,5.43,Si 1/8 1/8 1/8,F d -3 m:2,8",
        "F d 3 m,8.08,Mg 1/8 1/8 1/8;Al 1/2 1/2 1/2;O .2625 .2625 .2625,F d -3 m:2,56",
        "F d 3 m,8.08,Mg 0 0 0;Al 5/8 5/8 5/8;O .3875 .3875 .3875,F d -3 m:1,56",
        "227:2,5.43,Si 0 0 0,F d -3 m:2,16"
    })
    void build_originByTheSites(String group, double a, String sites, String expected, int atoms) {
        CrystalBuilder builder = Crystal.builder("x").spaceGroup(group).edges(a);
        for (String site : sites.split(";")) {
            String[] f = site.split(" ");
            builder.site(f[0], f[1], f[2], f[3]);
        }
        Crystal crystal = builder.build();
        assertEquals(expected, setting(crystal));
        assertEquals(atoms, crystal.unitCellAtoms().size());
        assertEquals(
                group.contains(":"),
                crystal.notices().stream().noneMatch(n -> n.contains("leaves the origin open") && n.contains("apart")));
    }

    @Test
    void build_originThatTheSitesDoNotTell() {
        Crystal cuprite = Crystal.builder("cuprite")
                .spaceGroup("P n 3 m")
                .edges(4.26)
                .site("Cu", "1/4", "1/4", "1/4")
                .site("O", "0", "0", "0")
                .build();
        assertEquals("P n -3 m:2", setting(cuprite));
        assertTrue(cuprite.notices().get(0).contains("do not tell"), "" + cuprite.notices());
    }

    @Test
    void build_rhombohedralByTheCell() {
        CrystalBuilder bismuth = Crystal.builder("Bi").spaceGroup("R -3 m").site("Bi", "0.234", "0.234", "0.234");
        assertEquals(
                "R -3 m:R",
                setting(bismuth.cell(Lattice.rhombohedralDegrees(4.746, 57.23)).build()));
    }

    @Test
    void build_refusesWithTheReason() {
        assertTrue(refused(Crystal.builder("x").site("Al", "0", "0", "0")).contains("space group of x: none given"));
        assertTrue(refused(Crystal.builder("x").spaceGroup("225").edges(4)).contains("site of x: none given"));
        assertTrue(refused(Crystal.builder("x").spaceGroup("225").site("Al", "0", "0", "0"))
                .contains("cell of x: none given"));
        String shape = refused(Crystal.builder("x")
                .spaceGroup("P 63/m m c")
                .cell(Lattice.cubic(4))
                .site("Al", "0", "0", "0"));
        assertTrue(shape.contains("γ = 120°") && shape.contains("P 63/m m c"), shape);
        String angles =
                refused(Crystal.builder("x").spaceGroup("P 21/c").edges(4, 5, 6).site("Al", "0", "0", "0"));
        assertTrue(angles.contains("angles"), angles);
        String twice = refused(Crystal.builder("x")
                .spaceGroup("225")
                .edges(4)
                .site("Al", "0", "0", "0")
                .site("Al", "1/2", "1/2", "0"));
        assertTrue(twice.contains("Al2 is Al1 again"), twice);
        String overfull = refused(Crystal.builder("x")
                .spaceGroup("225")
                .edges(4)
                .site("Al", "0", "0", "0")
                .site("Cu", "0", "0", "0"));
        assertTrue(overfull.contains("Cu1 shares its place with Al1"), overfull);
    }

    @Test
    void site_refusesWhatCannotBe() {
        CrystalBuilder builder = Crystal.builder("x");
        assertThrows(IllegalArgumentException.class, () -> Crystal.builder(" "));
        assertThrows(IllegalArgumentException.class, () -> builder.spaceGroup("F m 7 m"));
        assertThrows(IllegalArgumentException.class, () -> builder.site("Xx", "0", "0", "0"));
        assertThrows(IllegalArgumentException.class, () -> builder.site("Al", "0", "0", "0", 1.5, Displacement.NONE));
        for (String text : List.of("", "a", "1/0", "1//2", "1e5", "0,5", "1/2/3", "--1")) {
            String message = assertThrows(IllegalArgumentException.class, () -> builder.site("Al", text, "0", "0"))
                    .getMessage();
            assertTrue(message.contains("\"" + text + "\""), message);
        }
    }

    @ParameterizedTest
    @CsvSource({"0.25,0.25", "1/4,0.25", "-1/4,-0.25", "+.5,0.5", "' 2/3 ',0.6666666666666666", "−1/8,-0.125", "0.,0"})
    void fraction_asPeopleTypeIt(String text, double value) {
        assertEquals(value, Fraction.parse(text));
    }
}
