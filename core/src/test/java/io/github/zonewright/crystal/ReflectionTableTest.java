package io.github.zonewright.crystal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.TestData;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import java.io.IOException;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class ReflectionTableTest {

    private static final Crystal ALUMINIUM =
            Crystal.of("Al", Lattice.cubic(4.0494), "F m -3 m", AtomSite.of("Al", 0, 0, 0));

    /** Lines of Al, powder diffraction file card 4-787 (from memory): d and multiplicity of the first five. */
    @Test
    void families_linesOfAluminium() {
        List<ReflectionFamily> lines = ReflectionTable.ofSpacing(ALUMINIUM, 1.1).families();
        assertEquals(
                List.of(new Hkl(1, 1, 1), new Hkl(2, 0, 0), new Hkl(2, 2, 0), new Hkl(3, 1, 1), new Hkl(2, 2, 2)),
                lines.stream().map(ReflectionFamily::representative).toList());
        double[] spacings = {2.338, 2.024, 1.431, 1.221, 1.1690};
        int[] multiplicities = {8, 6, 12, 24, 8};
        for (int i = 0; i < 5; i++) {
            assertEquals(spacings[i], lines.get(i).d(), 0.001);
            assertEquals(multiplicities[i], lines.get(i).multiplicity());
        }
    }

    /** Every member's F, made by symmetry, is the sum over the atoms; no reflection is missing or twice. */
    @ParameterizedTest
    @ValueSource(
            strings = {
                "SiO2-Quartz-alpha",
                "GaN",
                "Si-Silicon",
                "Al2O3-Corundum",
                "YBa2Cu3O6.9-YBCO",
                "FeS2-Pyrite",
                "CaCO3-Calcite",
                "SiO2-Cristobalite",
                "V2O5-Shcherbinaite",
                "Be3Al2(SiO3)6-Beryl"
            })
    void reflections_factorsAreThoseOfThePlainSum(String name) throws IOException {
        Crystal crystal = CrystalCif.read(TestData.path("cif/" + name + ".cif")).get(0);
        StructureFactors factors = StructureFactors.of(crystal);
        double gMax = 1.1;
        Set<Hkl> seen = new HashSet<>();
        double last = 0;
        for (Reflection reflection : ReflectionTable.ofLength(crystal, gMax).reflections()) {
            Hkl hkl = reflection.hkl();
            assertTrue(seen.add(hkl), hkl + " twice");
            StructureFactor f = factors.at(hkl);
            assertEquals(f.re(), reflection.f().re(), 1e-9, hkl.toString());
            assertEquals(f.im(), reflection.f().im(), 1e-9, hkl.toString());
            double length = reflection.g().norm();
            assertEquals(1 / length, reflection.d(), 1e-12);
            assertTrue(length >= last - 1e-9 && length <= gMax * (1 + 1e-9));
            last = length;
        }
        int most = 40;
        for (int h = -most; h <= most; h++) {
            for (int k = -most; k <= most; k++) {
                for (int l = -most; l <= most; l++) {
                    Hkl hkl = new Hkl(h, k, l);
                    double g = crystal.lattice().reciprocal().vector(hkl).norm();
                    if (g > 0 && g < gMax * (1 - 1e-9)) {
                        assertEquals(!crystal.spaceGroup().isSystematicallyAbsent(hkl), seen.contains(hkl), "" + hkl);
                    }
                }
            }
        }
    }

    @Test
    void withAbsent_hasTheForbiddenOnesToo() {
        ReflectionTable all = ReflectionTable.withAbsent(ALUMINIUM, 0.6);
        ReflectionTable allowed = ReflectionTable.ofLength(ALUMINIUM, 0.6);
        assertEquals(8 + 6, allowed.reflections().size());
        assertTrue(all.reflections().size() > allowed.reflections().size());
        assertTrue(all.families().stream()
                .filter(ReflectionFamily::absent)
                .allMatch(
                        f -> f.amplitude() == 0 && ALUMINIUM.spaceGroup().isSystematicallyAbsent(f.representative())));
        assertEquals(0.6, all.gMax());
    }

    /** 222 of diamond vanishes by the atoms, not by the group: it is there, with nothing. */
    @Test
    void reflections_keepsThoseThatVanishByTheAtoms() {
        Crystal silicon = Crystal.of("Si", Lattice.cubic(5.43), "F d -3 m:1", AtomSite.of("Si", 0, 0, 0));
        Reflection found = ReflectionTable.ofSpacing(silicon, 1.5).reflections().stream()
                .filter(r -> r.hkl().equals(new Hkl(2, 2, 2)))
                .findFirst()
                .orElseThrow();
        assertEquals(0, found.amplitude(), 1e-9);
    }

    @Test
    void make_refusesLimitsWithoutAnEnd() {
        assertThrows(IllegalArgumentException.class, () -> ReflectionTable.ofLength(ALUMINIUM, 0));
        assertThrows(IllegalArgumentException.class, () -> ReflectionTable.ofLength(ALUMINIUM, Double.NaN));
        assertThrows(IllegalArgumentException.class, () -> ReflectionTable.ofLength(ALUMINIUM, 500));
        assertThrows(IllegalArgumentException.class, () -> ReflectionTable.ofSpacing(ALUMINIUM, 0));
        assertThrows(IllegalArgumentException.class, () -> ReflectionTable.ofSpacing(ALUMINIUM, -1));
    }
}
