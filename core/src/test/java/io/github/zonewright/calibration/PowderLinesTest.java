package io.github.zonewright.calibration;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.lattice.Hkl;
import java.util.List;
import org.junit.jupiter.api.Test;

class PowderLinesTest {

    private static List<PowderLine> lines(String name, double gMax) {
        return PowderLines.of(CrystalShelf.find(name).orElseThrow(), gMax);
    }

    /** Spacings of gold from the powder diffraction tables (from memory): 2.355, 2.039, 1.442, 1.230, 1.1774 Å. */
    @Test
    void of_gold_hasTheKnownSpacings() {
        List<PowderLine> lines = lines("gold", 0.9);
        double[] expected = {2.355, 2.039, 1.442, 1.230, 1.1774};
        assertEquals(expected.length, lines.size());
        for (int i = 0; i < expected.length; i++) {
            assertEquals(expected[i], lines.get(i).d(), 1e-3);
        }
        assertEquals(new Hkl(1, 1, 1), lines.get(0).families().get(0));
        assertEquals(1, lines.get(0).strength(), 0);
    }

    @Test
    void of_silicon_hasNoTwoZeroZeroAndJoinsEqualSpacings() {
        List<PowderLine> lines = lines("silicon", 1);
        assertTrue(lines.stream().noneMatch(l -> l.families().contains(new Hkl(2, 0, 0))));
        assertTrue(lines.stream().noneMatch(l -> l.families().contains(new Hkl(2, 2, 2))));
        PowderLine joined = lines.stream()
                .filter(l -> l.families().contains(new Hkl(3, 3, 3)))
                .findFirst()
                .orElseThrow();
        assertEquals(List.of(new Hkl(5, 1, 1), new Hkl(3, 3, 3)), joined.families());
        assertEquals(5.4307 / Math.sqrt(27), joined.d(), 1e-12);
    }

    @Test
    void joined_neighbours_haveTheMeanByStrength() {
        List<PowderLine> lines = List.of(
                new PowderLine(List.of(new Hkl(1, 0, 0)), 2.0, 1),
                new PowderLine(List.of(new Hkl(0, 1, 0)), 1.01, 0.25),
                new PowderLine(List.of(new Hkl(0, 0, 1)), 1.0, 0.75));
        List<PowderLine> joined = PowderLines.joined(lines, 0.02);
        assertEquals(2, joined.size());
        assertEquals(1 / (0.25 / 1.01 + 0.75), joined.get(1).d(), 1e-12);
        assertEquals(List.of(new Hkl(0, 0, 1), new Hkl(0, 1, 0)), joined.get(1).families());
    }

    /** λ = 0.1 Å, d = 1 Å: sin θ = 0.05, tan 2θ = 2·0.05·√(1−0.0025)/(1−0.005) by the double-angle formulae. */
    @Test
    void reducedRadius_workedByHand() {
        PowderLine line = new PowderLine(List.of(), 1, 1);
        assertEquals(10 * 0.1 * Math.sqrt(0.9975) / 0.995, line.reducedRadius(0.1), 1e-12);
        assertEquals(1000.236, 1000 * line.reducedRadius(0.0250793), 5e-4);
        assertThrows(IllegalArgumentException.class, () -> line.reducedRadius(1.5));
    }
}
