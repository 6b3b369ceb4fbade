package io.github.zonewright.crystal;

import java.util.regex.Matcher;
import java.util.regex.Pattern;

/** A fractional coordinate as people type it: 0.25, .25, 1/4, -1/4. */
final class Fraction {

    private static final String NUMBER = "\\d{1,15}(?:\\.\\d{0,15})?|\\.\\d{1,15}";
    private static final Pattern QUOTIENT = Pattern.compile("([+-]?)(" + NUMBER + ")(?:/(" + NUMBER + "))?");

    private Fraction() {}

    static double parse(String text) {
        Matcher m = QUOTIENT.matcher(text.trim().replace('\u2212', '-'));
        double divisor = m.matches() && m.group(3) != null ? Double.parseDouble(m.group(3)) : 1;
        if (!m.matches() || divisor == 0) {
            throw new IllegalArgumentException(
                    "coordinate \"" + text + "\", expected a number or fraction such as 0.25 or 1/4");
        }
        double value = Double.parseDouble(m.group(2)) / divisor;
        return m.group(1).equals("-") ? -value : value;
    }
}
