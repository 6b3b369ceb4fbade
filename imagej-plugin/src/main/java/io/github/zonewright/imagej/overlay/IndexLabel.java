package io.github.zonewright.imagej.overlay;

import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;

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
     * A zone axis.
     *
     * @param zone the zone axis
     * @return for example {@code [11̅0]}
     */
    public static String of(Uvw zone) {
        return "[" + joined(zone.u(), zone.v(), zone.w()) + "]";
    }

    private static String joined(int a, int b, int c) {
        boolean wide = Math.max(Math.abs(a), Math.max(Math.abs(b), Math.abs(c))) > 9;
        String gap = wide ? " " : "";
        return barred(a) + gap + barred(b) + gap + barred(c);
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
