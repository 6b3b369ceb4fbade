package io.github.zonewright.crystal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.reference.ReferenceCsv;
import java.util.List;
import java.util.Map;
import java.util.TreeSet;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Collectors;
import org.junit.jupiter.api.Test;

/** Values of books and standards (testdata/reference/check-values.csv) that concern scattering. */
class CheckValuesTest {

    private static final List<Map<String, String>> ROWS = ReferenceCsv.read("check-values.csv", ',');

    /** Lattice parameters from memory, to the digits that reference lists commonly have; the files give none. */
    private static final Map<String, Crystal> CRYSTALS = Map.ofEntries(
            Map.entry("Al", fcc("Al", 4.0495)),
            Map.entry("Ni", fcc("Ni", 3.524)),
            Map.entry("Cu", fcc("Cu", 3.615)),
            Map.entry("Ag", fcc("Ag", 4.086)),
            Map.entry("Au", fcc("Au", 4.0782)),
            Map.entry("Fe", bcc("Fe", 2.8665)),
            Map.entry("W", bcc("W", 3.165)),
            Map.entry("Si", diamond("Si", 5.431)),
            Map.entry("diamond", diamond("C", 3.567)),
            Map.entry(
                    "Mg",
                    Crystal.of(
                            "Mg",
                            Lattice.hexagonal(3.2094, 5.2107),
                            "P 63/m m c",
                            AtomSite.of("Mg", 1 / 3.0, 2 / 3.0, .25))),
            Map.entry(
                    "MgO",
                    Crystal.of(
                            "MgO",
                            Lattice.cubic(4.212),
                            "F m -3 m",
                            AtomSite.of("Mg", 0, 0, 0),
                            AtomSite.of("O", .5, 0, 0))));

    private static Crystal fcc(String element, double a) {
        return Crystal.of(element, Lattice.cubic(a), "F m -3 m", AtomSite.of(element, 0, 0, 0));
    }

    private static Crystal bcc(String element, double a) {
        return Crystal.of(element, Lattice.cubic(a), "I m -3 m", AtomSite.of(element, 0, 0, 0));
    }

    private static Crystal diamond(String element, double a) {
        return Crystal.of(element, Lattice.cubic(a), "F d -3 m:1", AtomSite.of(element, 0, 0, 0));
    }

    private static double value(String id) {
        return Double.parseDouble(row(id).get("value"));
    }

    private static Map<String, String> row(String id) {
        return ROWS.stream().filter(r -> r.get("id").equals(id)).findFirst().orElseThrow();
    }

    /** Against the books within the row's own tolerance (12 %), against an independent computation within 1 %. */
    @Test
    void extinctionDistance_ofBooks() {
        Pattern quantity = Pattern.compile("(\\w+) \\((\\d)(\\d)(\\d)\\) xi_g (\\d+) kV");
        int checked = 0;
        for (Map<String, String> row : ROWS) {
            Matcher m = quantity.matcher(row.get("quantity"));
            if (!row.get("category").equals("EXTINCTION") || !m.matches()) {
                continue;
            }
            Hkl hkl = new Hkl(Integer.parseInt(m.group(2)), Integer.parseInt(m.group(3)), Integer.parseInt(m.group(4)));
            double nanometres = StructureFactors.of(CRYSTALS.get(m.group(1)))
                            .extinctionDistance(hkl, Beam.ofKilovolts(Double.parseDouble(m.group(5))))
                    / 10;
            assertEquals(
                    value(row.get("id")), nanometres, Double.parseDouble(row.get("tolerance_abs")), row.toString());
            double independent = Double.parseDouble(row.get("computed"));
            assertEquals(independent, nanometres, 0.01 * independent, row.toString());
            checked++;
        }
        assertEquals(34, checked);
    }

    /** Silicon: measured mean inner potentials of 12.1 to 12.6 V, and the book's ξ of 111, lie within the stated bounds. */
    @Test
    void bounds_holdMeasuredValues() {
        StructureFactors silicon = StructureFactors.of(CRYSTALS.get("Si"));
        StructureFactors.Bounds potential = silicon.meanInnerPotentialBounds();
        assertTrue(potential.low() < 12.1 && 12.6 < potential.high(), potential.toString());
        assertEquals(silicon.meanInnerPotential(), potential.high());
        Beam beam = Beam.ofKilovolts(100);
        StructureFactors.Bounds distance = silicon.extinctionDistanceBounds(new Hkl(1, 1, 1), beam);
        double computed = silicon.extinctionDistance(new Hkl(1, 1, 1), beam);
        assertEquals(0.88 * computed, distance.low(), 1e-9 * computed);
        assertEquals(1.12 * computed, distance.high(), 1e-9 * computed);
        // 602 Å at 100 kV: Hirsch et al., Electron Microscopy of Thin Crystals (1965), table 4.1 (from memory)
        assertTrue(distance.low() < 602 && 602 < distance.high(), distance.toString());
    }

    @Test
    void factor_forwardScatteringOfTheTables() {
        assertEquals(value("FE0-01"), ElectronScattering.factor("Al", 0), 0.002);
        assertEquals(value("FE0-02"), ElectronScattering.factor("Si", 0), 0.002);
        assertEquals(value("FE0-04"), ElectronScattering.factor("Au", 0), 0.003);
        assertEquals(value("FE0-05"), StructureFactors.of(CRYSTALS.get("Si")).meanInnerPotential(), 0.05);
    }

    @Test
    void at_forbiddenReflectionsOfDiamondAndHcp() {
        StructureFactors silicon = StructureFactors.of(CRYSTALS.get("Si"));
        assertEquals(value("FORBID-01"), silicon.at(new Hkl(2, 0, 0)).amplitude(), 1e-9);
        assertEquals(value("FORBID-02"), silicon.at(new Hkl(2, 2, 2)).amplitude(), 1e-9);
        Hkl hkl = new Hkl(1, 1, 1);
        double f = ElectronScattering.factor(
                "Si", 1 / CRYSTALS.get("Si").lattice().reciprocal().spacing(hkl) / 2);
        assertEquals(value("FORBID-03"), silicon.at(hkl).amplitude() / (8 * f), 1e-4);

        Crystal magnesium = CRYSTALS.get("Mg");
        StructureFactors hcp = StructureFactors.of(magnesium);
        assertEquals(value("FORBID-07"), hcp.at(new Hkl(0, 0, 1)).amplitude(), 1e-9);
        assertEquals(value("FORBID-08"), hcp.at(new Hkl(1, 1, 1)).amplitude(), 1e-9);
        String ratios = List.of(new Hkl(1, 0, 1), new Hkl(1, 0, 0), new Hkl(0, 0, 2), new Hkl(1, 0, 2)).stream()
                .map(g -> {
                    double s = 0.5 / magnesium.lattice().reciprocal().spacing(g);
                    return ""
                            + Math.round(1e6 * Math.pow(hcp.at(g).amplitude() / ElectronScattering.factor("Mg", s), 2))
                                    / 1e6;
                })
                .map(t -> t.replace(".0", ""))
                .collect(Collectors.joining(","));
        assertEquals(row("FORBID-09").get("value"), ratios);
    }

    /** h² + k² + l² of the lines that have intensity. */
    @Test
    void families_sequencesOfCubicLines() {
        assertEquals(row("FORBID-12").get("value"), lines(CRYSTALS.get("Al"), 8));
        assertEquals(row("FORBID-14").get("value"), lines(CRYSTALS.get("Si"), 8));
    }

    private static String lines(Crystal crystal, int count) {
        TreeSet<Integer> squares = new TreeSet<>();
        double dMin = crystal.lattice().a() / Math.sqrt(33);
        for (ReflectionFamily family : ReflectionTable.ofSpacing(crystal, dMin).families()) {
            Hkl r = family.representative();
            if (family.amplitude() > 1e-9) {
                squares.add(r.h() * r.h() + r.k() * r.k() + r.l() * r.l());
            }
        }
        assertTrue(squares.size() >= count);
        return squares.stream().limit(count).map(String::valueOf).collect(Collectors.joining(","));
    }
}
