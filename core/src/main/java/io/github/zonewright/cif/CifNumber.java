package io.github.zonewright.cif;

import java.util.Objects;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * A number of a CIF: 1.234(5) is 1.234 with a standard uncertainty of 0.005, and 1.2e-3(4) is 0.0012 with 0.0004.
 *
 * <p>The digits in parentheses count in units of the last digit of the mantissa (International Tables G, 2.2.7).
 *
 * @param value the number, finite
 * @param standardUncertainty the standard uncertainty where one is given, finite and not negative
 */
public record CifNumber(double value, OptionalDouble standardUncertainty) {
    private static final Pattern NUMBER = Pattern.compile(
            "([+-]?(?:[0-9]++(?:\\.([0-9]*+))?|\\.([0-9]++)))(?:[eE]([+-]?[0-9]{1,6}+))?(?:\\(([0-9]++)\\))?");

    /**
     * Checks both numbers.
     *
     * @throws IllegalArgumentException if a number is not finite or the uncertainty is negative
     */
    public CifNumber {
        Objects.requireNonNull(standardUncertainty, "standardUncertainty");
        if (!Double.isFinite(value)) {
            throw new IllegalArgumentException("a CIF number is finite, but this is " + value);
        }
        double su = standardUncertainty.orElse(0);
        if (!(su >= 0) || Double.isInfinite(su)) {
            throw new IllegalArgumentException("a standard uncertainty is finite and not negative, but this is " + su);
        }
    }

    /**
     * Reads a number of the CIF grammar.
     *
     * @param text the characters of one value
     * @return the number, or empty if the text is no number or lies beyond the range of a {@code double}
     */
    public static Optional<CifNumber> parse(String text) {
        Matcher match = NUMBER.matcher(text);
        if (!match.matches()) {
            return Optional.empty();
        }
        String exponent = match.group(4) == null ? "0" : match.group(4);
        double value = Double.parseDouble(match.group(1) + "e" + exponent);
        OptionalDouble su = OptionalDouble.empty();
        if (match.group(5) != null) {
            int decimals = length(match.group(2)) + length(match.group(3));
            su = OptionalDouble.of(
                    Double.parseDouble(match.group(5) + "e" + ((long) Integer.parseInt(exponent) - decimals)));
        }
        boolean finite = Double.isFinite(value) && Double.isFinite(su.orElse(0));
        return finite ? Optional.of(new CifNumber(value, su)) : Optional.empty();
    }

    private static int length(String digits) {
        return digits == null ? 0 : digits.length();
    }
}
