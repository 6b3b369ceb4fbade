package io.github.zonewright.reference;

import java.util.List;
import java.util.regex.MatchResult;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/** A row of {@code check-values.csv}: a published value with its source and how far a computed one may lie from it. */
record CheckValue(String id, String category, String quantity, String value, double tolerance, String source) {

    private static final Pattern NUMBER = Pattern.compile("-?\\d+(\\.\\d+)?([eE][-+]?\\d+)?");

    static List<CheckValue> table() {
        return ReferenceCsv.read("check-values.csv", ',').stream()
                .map(row -> new CheckValue(
                        row.get("id"),
                        row.get("category"),
                        row.get("quantity"),
                        row.get("value"),
                        Double.parseDouble(row.get("tolerance_abs")),
                        row.get("source")))
                .toList();
    }

    /** The value, or the values where it lists several. */
    double[] numbers() {
        return numbersIn(value);
    }

    /** The group of a pattern that must occur in the description of the quantity. */
    String group(String regex) {
        return match(regex).group(1);
    }

    double number(String regex) {
        return Double.parseDouble(group(regex));
    }

    MatchResult match(String regex) {
        Matcher m = Pattern.compile(regex).matcher(quantity);
        if (!m.find()) {
            throw new IllegalStateException(id + ": \"" + quantity + "\" does not hold " + regex);
        }
        return m.toMatchResult();
    }

    boolean mentions(String text) {
        return quantity.contains(text);
    }

    private static double[] numbersIn(String text) {
        return NUMBER.matcher(text)
                .results()
                .mapToDouble(r -> Double.parseDouble(r.group()))
                .toArray();
    }
}
