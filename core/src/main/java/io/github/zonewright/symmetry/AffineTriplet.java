package io.github.zonewright.symmetry;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.math.RoundingMode;

/**
 * An affine map of fractional coordinates as written in a triplet such as {@code -x+1/2,y,z}, with rational
 * coefficients, all in units of 1/{@value #DENOMINATOR}.
 */
record AffineTriplet(long[][] matrix, long[] shift) {

    /** The unit of all numbers here is one over this. */
    static final int DENOMINATOR = 720;

    private static final int LONGEST_TEXT = 200;
    private static final BigDecimal LARGEST = BigDecimal.valueOf(1000);

    /** How far a decimal may lie from the fraction of 24 that it stands for: 0.33 for 1/3 is read, 0.3 is not. */
    private static final BigDecimal DECIMAL_TOLERANCE = new BigDecimal("0.0035");

    static AffineTriplet parse(String text) {
        if (text.length() > LONGEST_TEXT) {
            throw new IllegalArgumentException("symmetry operation: " + text.length()
                    + " characters long, expected a triplet of at most " + LONGEST_TEXT);
        }
        String[] parts = text.split("[,;]", -1);
        if (parts.length != 3) {
            throw problem(text, "expected three expressions of x, y, z between commas");
        }
        long[][] matrix = new long[3][];
        long[] shift = new long[3];
        for (int row = 0; row < 3; row++) {
            long[] terms = new Expression(text, parts[row].replaceAll("\\s", "")).terms();
            matrix[row] = new long[] {terms[0], terms[1], terms[2]};
            shift[row] = terms[3];
        }
        return new AffineTriplet(matrix, shift);
    }

    private static IllegalArgumentException problem(String text, String expected) {
        return new IllegalArgumentException("symmetry operation \"" + text + "\": " + expected);
    }

    /** One sum of terms such as {@code 1/2+x}, {@code -y}, {@code 2*z}, {@code x/3} or {@code 0.25}. */
    private static final class Expression {

        private final String whole;
        private final String text;
        private int at;

        Expression(String whole, String text) {
            this.whole = whole;
            this.text = text;
        }

        long[] terms() {
            if (text.isEmpty()) {
                throw problem(whole, "an expression is empty, expected a sum of terms in x, y, z");
            }
            BigDecimal[] exact = new BigDecimal[4];
            long[] sum = new long[4];
            while (at < text.length()) {
                boolean first = at == 0;
                int sign = sign(first);
                BigDecimal[] number = number();
                int axis = axis(number != null);
                if (number == null && axis == 3) {
                    throw problem(whole, "unexpected '" + rest() + "', expected x, y, z or a number");
                }
                BigDecimal numerator = number == null ? BigDecimal.ONE : number[0];
                BigDecimal denominator = number == null ? BigDecimal.ONE : number[1];
                if (axis < 3 && at < text.length() && text.charAt(at) == '/') {
                    at++;
                    denominator = denominator.multiply(digits());
                }
                sum[axis] += sign * inUnits(numerator, denominator);
            }
            return sum;
        }

        private int sign(boolean first) {
            char c = text.charAt(at);
            if (c == '+' || c == '-') {
                at++;
                if (at == text.length()) {
                    throw problem(whole, "ends with a sign, expected a term after it");
                }
                return c == '+' ? 1 : -1;
            }
            if (!first) {
                throw problem(whole, "unexpected '" + rest() + "', expected + or -");
            }
            return 1;
        }

        private BigDecimal[] number() {
            if (!isNumeric(text.charAt(at))) {
                return null;
            }
            BigDecimal numerator = digits();
            BigDecimal denominator = BigDecimal.ONE;
            if (at < text.length() && text.charAt(at) == '/') {
                at++;
                denominator = digits();
            }
            return new BigDecimal[] {numerator, denominator};
        }

        private BigDecimal digits() {
            int start = at;
            while (at < text.length() && isNumeric(text.charAt(at))) {
                at++;
            }
            try {
                return new BigDecimal(text.substring(start, at));
            } catch (NumberFormatException e) {
                throw problem(whole, "unexpected '" + text.substring(start) + "', expected a number");
            }
        }

        private int axis(boolean afterNumber) {
            if (afterNumber && at < text.length() && text.charAt(at) == '*') {
                at++;
            }
            int axis = at < text.length() ? "xyz".indexOf(Character.toLowerCase(text.charAt(at))) : -1;
            if (axis < 0) {
                return 3;
            }
            at++;
            return axis;
        }

        private static boolean isNumeric(char c) {
            return c >= '0' && c <= '9' || c == '.';
        }

        private String rest() {
            return text.substring(at);
        }

        private long inUnits(BigDecimal numerator, BigDecimal denominator) {
            if (denominator.signum() == 0 || numerator.compareTo(LARGEST) > 0 || denominator.compareTo(LARGEST) > 0) {
                throw problem(whole, "a number is out of range, expected at most " + LARGEST + " and no division by 0");
            }
            BigDecimal units = numerator.multiply(BigDecimal.valueOf(DENOMINATOR));
            if (numerator.scale() <= 0 && denominator.scale() <= 0) {
                BigInteger[] q = units.toBigIntegerExact().divideAndRemainder(denominator.toBigIntegerExact());
                if (q[1].signum() != 0) {
                    throw problem(whole, "expected fractions with a denominator that divides " + DENOMINATOR);
                }
                return q[0].longValueExact();
            }
            BigDecimal value = numerator.divide(denominator, 12, RoundingMode.HALF_EVEN);
            for (int parts : new int[] {24, DENOMINATOR}) {
                BigDecimal n = value.multiply(BigDecimal.valueOf(parts)).setScale(0, RoundingMode.HALF_EVEN);
                BigDecimal off = n.divide(BigDecimal.valueOf(parts), 12, RoundingMode.HALF_EVEN)
                        .subtract(value)
                        .abs();
                BigDecimal tolerance =
                        parts == 24 ? DECIMAL_TOLERANCE : BigDecimal.ONE.movePointLeft(Math.min(value.scale(), 4));
                if (off.compareTo(tolerance) <= 0) {
                    return n.longValueExact() * (DENOMINATOR / parts);
                }
            }
            throw problem(whole, "the number " + value.toPlainString() + " is no fraction of " + DENOMINATOR);
        }
    }
}
