package io.github.zonewright.crystal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.symmetry.SpaceGroup;
import io.github.zonewright.symmetry.SpaceGroupSetting;
import io.github.zonewright.symmetry.SpaceGroups;
import java.util.List;
import java.util.Random;
import java.util.stream.IntStream;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;

/** What holds for the reflections of every crystal, tried on random atoms in settings drawn from all that are tabulated. */
class ReflectionProperties {

    private static final List<SpaceGroupSetting> SETTINGS = IntStream.rangeClosed(1, 230)
            .boxed()
            .flatMap(n -> SpaceGroups.settings(n).stream())
            .toList();

    @Provide
    Arbitrary<SpaceGroupSetting> settings() {
        return Arbitraries.of(SETTINGS);
    }

    /** A cell that has the symmetry of the group: a random metric, averaged over its rotations, has. */
    private static Lattice cell(SpaceGroup group, Random random) {
        double[][] seed = new double[3][3];
        for (int i = 0; i < 3; i++) {
            seed[i][i] = 20 + 20 * random.nextDouble();
        }
        seed[0][1] = seed[1][0] = 6 * random.nextDouble() - 3;
        seed[0][2] = seed[2][0] = 6 * random.nextDouble() - 3;
        seed[1][2] = seed[2][1] = 6 * random.nextDouble() - 3;
        double[][] m = new double[3][3];
        group.rotations().forEach(w -> {
            for (int i = 0; i < 9; i++) {
                for (int k = 0; k < 9; k++) {
                    m[i / 3][i % 3] += w.rotation(k / 3, i / 3)
                            * seed[k / 3][k % 3]
                            * w.rotation(k % 3, i % 3)
                            / group.rotations().size();
                }
            }
        });
        double a = Math.sqrt(m[0][0]);
        double b = Math.sqrt(m[1][1]);
        double c = Math.sqrt(m[2][2]);
        return new Lattice(
                a, b, c, Math.acos(m[1][2] / (b * c)), Math.acos(m[0][2] / (a * c)), Math.acos(m[0][1] / (a * b)));
    }

    private static AtomSite atom(String symbol, Random random) {
        Displacement displacement = random.nextBoolean()
                ? Displacement.ofB(random.nextDouble())
                : new Displacement.Anisotropic(0.01, 0.02, 0.015, 0.002, -0.003, 0.001);
        return new AtomSite(
                symbol,
                Element.ofSymbol(symbol),
                new Vector3(random.nextDouble(), random.nextDouble(), random.nextDouble()),
                0.5 + random.nextDouble() / 2,
                displacement);
    }

    private static Crystal crystal(SpaceGroupSetting setting, Random random) {
        SpaceGroup group = setting.group();
        return new Crystal(
                setting.toString(),
                cell(group, random),
                group,
                List.of(atom("Fe", random), atom("O", random), atom("Ti", random)),
                List.of());
    }

    /** Equivalent reflections have one d and one |F|, and F vanishes where the group says so and, by chance, nowhere else. */
    @Property(tries = 150)
    void equivalents_haveEqualSpacingAndFactor(@ForAll("settings") SpaceGroupSetting setting, @ForAll long seed) {
        Random random = new Random(seed);
        Crystal crystal = crystal(setting, random);
        assertTrue(crystal.spaceGroup().fits(crystal.lattice(), 1e-9), setting + " " + crystal.lattice());
        StructureFactors factors = StructureFactors.of(crystal);
        for (int n = 0; n < 20; n++) {
            Hkl hkl = new Hkl(random.nextInt(7) - 3, random.nextInt(7) - 3, random.nextInt(7) - 3);
            double amplitude = factors.at(hkl).amplitude();
            double sum = crystal.unitCellAtoms().size();
            if (crystal.spaceGroup().isSystematicallyAbsent(hkl)) {
                assertEquals(0, amplitude, 1e-11 * sum, setting + " " + hkl);
            } else {
                assertTrue(amplitude > 1e-9, setting + " " + hkl + ": |F| = " + amplitude);
            }
            double length = crystal.lattice().reciprocal().vector(hkl).norm();
            for (Hkl other : crystal.spaceGroup().equivalents(hkl)) {
                assertEquals(amplitude, factors.at(other).amplitude(), 1e-11 * sum, setting + " " + hkl + " " + other);
                assertEquals(
                        length, crystal.lattice().reciprocal().vector(other).norm(), 1e-12, setting + " " + other);
            }
        }
    }

    /** The table's families are the classes of equivalent reflections, each with its multiplicity. */
    @Property(tries = 60)
    void families_areTheClasses(@ForAll("settings") SpaceGroupSetting setting, @ForAll long seed) {
        Crystal crystal = crystal(setting, new Random(seed));
        for (ReflectionFamily family : ReflectionTable.withAbsent(crystal, 0.4).families()) {
            List<Hkl> members =
                    family.reflections().stream().map(Reflection::hkl).sorted().toList();
            assertEquals(crystal.spaceGroup().equivalents(family.representative()), members, setting.toString());
            assertEquals(members.size(), family.multiplicity());
            family.reflections().forEach(r -> assertEquals(family.amplitude(), r.amplitude(), 1e-9));
            family.reflections().forEach(r -> assertEquals(family.d(), r.d(), 1e-9));
        }
    }
}
