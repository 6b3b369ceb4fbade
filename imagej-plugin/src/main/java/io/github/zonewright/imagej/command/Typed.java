package io.github.zonewright.imagej.command;

import java.util.OptionalDouble;

/** Numbers as people type them where they may leave them out. */
final class Typed {
    private Typed() {}

    /** A number above 0 that may be left blank. */
    static OptionalDouble positive(String label, String text) {
        OptionalDouble number = number(label, text, "a number above 0");
        if (number.isPresent() && !(number.getAsDouble() > 0)) {
            throw wrong(label, text, "a number above 0");
        }
        return number;
    }

    /** A finite number that may be left blank. */
    static OptionalDouble number(String label, String text, String expected) {
        if (text == null || text.isBlank()) {
            return OptionalDouble.empty();
        }
        try {
            double number = Double.parseDouble(text.strip());
            if (Double.isFinite(number)) {
                return OptionalDouble.of(number);
            }
        } catch (NumberFormatException e) {
            throw wrong(label, text, expected);
        }
        throw wrong(label, text, expected);
    }

    private static IllegalArgumentException wrong(String label, String text, String expected) {
        return new IllegalArgumentException(
                label + ": \"" + text.strip() + "\", expected " + expected + ", or nothing where it is not known");
    }
}
