package io.github.zonewright.imagej.overlay;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.MillerBravais;
import io.github.zonewright.lattice.Uvw;
import java.util.Arrays;
import java.util.stream.Collectors;

/** Indices as crystallographers print them: negative ones with a bar above (International Tables A, section 1.4). */
public final class IndexLabel {
    private static final char BAR = '\u0305';

    private IndexLabel() {}

    /**
     * A reflection.
     *
     * @param hkl the reflection
     * @return for example {@code 11̅1}; with spaces between when an index has two digits
     */
    public static String of(Hkl hkl) {
        return joined(hkl.h(), hkl.k(), hkl.l());
    }

    /**
     * A reflection of a crystal: in the four-index form (h k i l) where the crystal is described in hexagonal axes.
     *
     * @param hkl the reflection
     * @param crystal the crystal
     * @return for example {@code 101̅0}
     */
    public static String of(Hkl hkl, Crystal crystal) {
        return joined(shown(hkl, crystal));
    }

    /**
     * The indices that are shown of a reflection of a crystal.
     *
     * @param hkl the reflection
     * @param crystal the crystal
     * @return h, k, l; in hexagonal axes h, k, i, l
     */
    public static int[] shown(Hkl hkl, Crystal crystal) {
        return crystal.lattice().hasHexagonalAxes() ? MillerBravais.of(hkl) : new int[] {hkl.h(), hkl.k(), hkl.l()};
    }

    /** Whether indices need room between them: one has two digits. */
    static boolean isWide(int... indices) {
        return Arrays.stream(indices).anyMatch(i -> Math.abs(i) > 9);
    }

    /**
     * A zone axis.
     *
     * @param zone the zone axis
     * @return for example {@code [11̅0]}
     */
    public static String of(Uvw zone) {
        return "[" + joined(zone.u(), zone.v(), zone.w()) + "]";
    }

    static String joined(int... indices) {
        return Arrays.stream(indices)
                .mapToObj(IndexLabel::barred)
                .collect(Collectors.joining(isWide(indices) ? " " : ""));
    }

    private static String barred(int index) {
        String digits = Integer.toString(Math.abs(index));
        if (index >= 0) {
            return digits;
        }
        StringBuilder text = new StringBuilder();
        for (char digit : digits.toCharArray()) {
            text.append(digit).append(BAR);
        }
        return text.toString();
    }
}
