package io.github.zonewright.imagej.workbench;

import io.github.zonewright.imagej.session.ZoneChoice;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import java.util.Locale;
import java.util.OptionalDouble;
import java.util.function.Function;

/** How typed text is read, with reasons short enough to stand beside a field. */
final class Reading {
    private Reading() {}

    /** A number from least to most. */
    static Function<String, Double> number(double least, double most) {
        return text -> {
            double number;
            try {
                number = Double.parseDouble(text);
            } catch (NumberFormatException e) {
                throw new IllegalArgumentException("a number, please", e);
            }
            if (!(number >= least && number <= most)) {
                throw new IllegalArgumentException("from " + text(least) + " to " + text(most));
            }
            return number;
        };
    }

    /** A number from least to most, or nothing where it is not known. */
    static Function<String, OptionalDouble> optional(double least, double most) {
        return text -> text.isBlank()
                ? OptionalDouble.empty()
                : OptionalDouble.of(number(least, most).apply(text));
    }

    /** A whole number from least to most. */
    static Function<String, Integer> whole(int least, int most) {
        return text -> {
            double number = number(least, most).apply(text);
            if (number != Math.rint(number)) {
                throw new IllegalArgumentException("a whole number, please");
            }
            return (int) number;
        };
    }

    /** A zone axis. */
    static Uvw zone(String text) {
        try {
            Uvw zone = Uvw.parse(text);
            if (!zone.isZero()) {
                return zone.reduced();
            }
        } catch (IllegalArgumentException e) {
            throw new IllegalArgumentException("three indices, as 1 -1 0", e);
        }
        throw new IllegalArgumentException("0 0 0 is no direction");
    }

    /** The zone axes that a search tries. */
    static ZoneChoice zones(String text) {
        try {
            return ZoneChoice.parse(text);
        } catch (IllegalArgumentException e) {
            throw new IllegalArgumentException("any, or as 1 1 0, or a family as <1 1 0>", e);
        }
    }

    /** A reflection. */
    static Hkl reflection(String text) {
        try {
            return Hkl.parse(text);
        } catch (IllegalArgumentException e) {
            throw new IllegalArgumentException("three indices, as 1 -1 0", e);
        }
    }

    /** A number as short as it can be said. */
    static String text(double number) {
        return number == Math.rint(number) && Math.abs(number) < 1e7
                ? Long.toString(Math.round(number))
                : String.format(Locale.ROOT, "%.6g", number)
                        .replaceAll("(\\.\\d*?)0+$", "$1")
                        .replaceAll("\\.$", "");
    }

    /** A number with fixed decimals. */
    static String fixed(double number, int decimals) {
        String text = String.format(Locale.ROOT, "%." + decimals + "f", number);
        return text.matches("-0\\.?0*") ? text.substring(1) : text;
    }
}
