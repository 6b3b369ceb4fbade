package io.github.zonewright.calibration;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.ReflectionFamily;
import io.github.zonewright.crystal.ReflectionTable;
import io.github.zonewright.lattice.Hkl;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;

/** The lines that a powder of a crystal shows. */
public final class PowderLines {

    private static final double MOST_REFLECTIONS = 40_000;
    private static final double FAINTEST = 2e-3;
    private static final double SAME = 1e-6;

    private PowderLines() {}

    /**
     * The lines of a crystal.
     *
     * @param crystal the crystal
     * @param gMax largest 1/d in 1/Å; less is taken where that would be more than some 40 000 reflections
     * @return the lines by descending d; those below 0.2 % of the strongest are left out
     * @throws IllegalArgumentException if gMax is not above 0
     */
    public static List<PowderLine> of(Crystal crystal, double gMax) {
        double most = Math.cbrt(
                MOST_REFLECTIONS * 3 / (4 * Math.PI) / crystal.lattice().volume());
        List<ReflectionFamily> families =
                ReflectionTable.ofLength(crystal, Math.min(gMax, most)).families();
        double strongest =
                families.stream().mapToDouble(PowderLines::strength).max().orElse(1);
        List<PowderLine> lines = families.stream()
                .filter(f -> strength(f) > FAINTEST * strongest)
                .map(f -> new PowderLine(List.of(f.representative()), f.d(), strength(f) / strongest))
                .toList();
        return joined(lines, SAME);
    }

    private static double strength(ReflectionFamily family) {
        return family.multiplicity() * family.amplitude() * family.amplitude() * Math.pow(family.d(), 3);
    }

    /**
     * Joins lines that cannot be told apart.
     *
     * @param lines the lines by descending d
     * @param relative lines whose d differ by less than this part are joined with their neighbours
     * @return the lines, fewer perhaps
     */
    static List<PowderLine> joined(List<PowderLine> lines, double relative) {
        List<PowderLine> result = new ArrayList<>();
        List<PowderLine> group = new ArrayList<>();
        for (PowderLine line : lines) {
            if (!group.isEmpty() && group.get(group.size() - 1).d() > line.d() * (1 + relative)) {
                result.add(join(group));
                group.clear();
            }
            group.add(line);
        }
        if (!group.isEmpty()) {
            result.add(join(group));
        }
        return List.copyOf(result);
    }

    private static PowderLine join(List<PowderLine> group) {
        if (group.size() == 1) {
            return group.get(0);
        }
        double strength = group.stream().mapToDouble(PowderLine::strength).sum();
        double g = group.stream().mapToDouble(l -> l.strength() / l.d()).sum() / strength;
        List<Hkl> families = group.stream()
                .sorted(Comparator.comparingDouble(PowderLine::strength).reversed())
                .flatMap(l -> l.families().stream())
                .toList();
        return new PowderLine(families, 1 / g, strength);
    }
}
