package io.github.zonewright.document;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;
import java.util.Locale;

/** Numbers for people. */
final class Figures {
    private Figures() {}

    /**
     * A value with its standard uncertainty, the latter to two digits and the value to the same place, as the GUM (JCGM 100,
     * section 7.2.6) has it.
     */
    static String uncertain(double value, double uncertainty, String unit) {
        if (!(uncertainty > 0) || Double.isInfinite(uncertainty)) {
            return plain(value, 2) + unit + " (uncertainty not known)";
        }
        BigDecimal rounded = new BigDecimal(uncertainty).round(new MathContext(2, RoundingMode.HALF_UP));
        int decimals = Math.max(0, rounded.scale());
        return plain(value, decimals) + " ± "
                + rounded.setScale(decimals, RoundingMode.HALF_UP).toPlainString() + unit;
    }

    /** A number with so many decimals and a true minus; zero has none. */
    static String plain(double value, int decimals) {
        String text = String.format(Locale.ROOT, "%." + decimals + "f", value);
        return text.matches("-0(\\.0*)?") ? text.substring(1) : text.replace('-', '\u2212');
    }

    /** So many digits, without zeros that say nothing. */
    static String significant(double value, int digits) {
        return new BigDecimal(value)
                .round(new MathContext(digits, RoundingMode.HALF_UP))
                .stripTrailingZeros()
                .toPlainString()
                .replace('-', '\u2212');
    }
}
