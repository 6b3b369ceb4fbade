package io.github.zonewright.symmetry;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import java.util.stream.IntStream;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.Combinators;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;

/** What holds for every group, tried on settings drawn from all that are tabulated. */
class SpaceGroupProperties {

    private static final List<SpaceGroupSetting> SETTINGS = IntStream.rangeClosed(1, 230)
            .boxed()
            .flatMap(n -> SpaceGroups.settings(n).stream())
            .toList();

    @Provide
    Arbitrary<SpaceGroupSetting> settings() {
        return Arbitraries.of(SETTINGS);
    }

    @Provide
    Arbitrary<Hkl> reflections() {
        Arbitrary<Integer> index = Arbitraries.integers().between(-12, 12);
        return Combinators.combine(index, index, index).as(Hkl::new);
    }

    @Provide
    Arbitrary<Vector3> sites() {
        Arbitrary<Double> x = Arbitraries.doubles().between(-2, 2);
        return Combinators.combine(x, x, x).as(Vector3::new);
    }

    /** Products and inverses of operations are operations. */
    @Property(tries = 200)
    void closure(@ForAll("settings") SpaceGroupSetting setting, @ForAll int first, @ForAll int second) {
        List<SymmetryOperation> all = setting.group().operations();
        SymmetryOperation a = all.get(Math.floorMod(first, all.size()));
        SymmetryOperation b = all.get(Math.floorMod(second, all.size()));
        Set<SymmetryOperation> set = new HashSet<>(all);
        assertTrue(set.contains(a.after(b).reduced()), setting + ": " + a + " after " + b);
        assertTrue(set.contains(a.inverse().reduced()), setting + ": " + a);
    }

    /** Lagrange: the order of an operation's powers, modulo the lattice, divides that of the group. */
    @Property(tries = 200)
    void order_divides(@ForAll("settings") SpaceGroupSetting setting, @ForAll int which) {
        SpaceGroup group = setting.group();
        SymmetryOperation a = group.operations().get(Math.floorMod(which, group.order()));
        int order = 1;
        for (SymmetryOperation power = a; !power.equals(SymmetryOperation.IDENTITY); order++) {
            power = a.after(power).reduced();
            assertTrue(order <= group.order(), setting + ": " + a);
        }
        assertEquals(0, group.order() % order, setting + ": " + a);
        assertEquals(
                group.order(),
                group.rotations().size() * group.centringVectors().size(),
                setting.toString());
        assertEquals(group.rotations().size(), group.pointGroup().order(), setting.toString());
    }

    /** An orbit has as many sites as the group has operations, or a whole fraction of that on a special position. */
    @Property(tries = 100)
    void orbit_dividesTheOrder(@ForAll("settings") SpaceGroupSetting setting, @ForAll("sites") Vector3 site) {
        SpaceGroup group = setting.group();
        assertEquals(0, group.order() % group.orbit(site, 1e-6).size(), setting + " " + site);
    }

    /** Equivalence is mutual, holds the reflection and its Friedel mate, and shares absences. */
    @Property(tries = 200)
    void equivalents_areAClass(@ForAll("settings") SpaceGroupSetting setting, @ForAll("reflections") Hkl hkl) {
        SpaceGroup group = setting.group();
        List<Hkl> all = group.equivalents(hkl);
        assertTrue(all.contains(hkl) && all.contains(hkl.negate()));
        int order = 2 * group.laueClass().properOrder();
        assertEquals(0, order % all.size(), setting + " " + hkl);
        for (Hkl other : all) {
            assertEquals(all, group.equivalents(other), setting + " " + hkl + " " + other);
            assertEquals(group.isSystematicallyAbsent(hkl), group.isSystematicallyAbsent(other));
        }
        assertFalse(group.isSystematicallyAbsent(new Hkl(0, 0, 0)));
    }
}
