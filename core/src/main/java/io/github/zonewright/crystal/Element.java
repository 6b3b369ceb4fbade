package io.github.zonewright.crystal;

import java.util.List;
import java.util.Locale;
import java.util.Optional;

/**
 * A chemical element, hydrogen to californium.
 *
 * @param number atomic number, 1 to 98
 * @param symbol chemical symbol
 * @param weight atomic weight in daltons
 */
public record Element(int number, String symbol, double weight) {

    /** The largest atomic number known here, californium. */
    public static final int LARGEST_NUMBER = 98;

    /** The table is read once, when first asked for. */
    private static final class Table {
        static final List<Element> ALL = ResourceTable.read("atomic-weights.csv").stream()
                .map(row -> new Element(Integer.parseInt(row[0]), row[1], Double.parseDouble(row[2])))
                .toList();
    }

    /**
     * Checks number and weight.
     *
     * @throws IllegalArgumentException if the number is not 1 to 98 or the weight not above 0
     */
    public Element {
        checkNumber(number);
        if (!(weight > 0)) {
            throw new IllegalArgumentException("atomic weight of " + symbol + ": " + weight + ", expected above 0");
        }
    }

    private static void checkNumber(int number) {
        if (number < 1 || number > LARGEST_NUMBER) {
            throw new IllegalArgumentException("atomic number " + number + ", expected 1 to " + LARGEST_NUMBER);
        }
    }

    /**
     * The element of an atomic number.
     *
     * @param number 1 to 98
     * @return the element
     * @throws IllegalArgumentException if the number is out of range
     */
    public static Element ofNumber(int number) {
        checkNumber(number);
        return Table.ALL.get(number - 1);
    }

    /**
     * The element of a chemical symbol; D and T are hydrogen.
     *
     * @param symbol the symbol, in any case
     * @return the element
     * @throws IllegalArgumentException if there is no such element among the first 98
     */
    public static Element ofSymbol(String symbol) {
        return find(symbol)
                .orElseThrow(() -> new IllegalArgumentException(
                        "element \"" + symbol + "\", expected a chemical symbol from H to Cf"));
    }

    /**
     * The element of a chemical symbol; D and T are hydrogen.
     *
     * @param symbol the symbol, in any case
     * @return the element, or empty if there is none among the first 98
     */
    public static Optional<Element> find(String symbol) {
        String wanted = symbol.trim().toLowerCase(Locale.ROOT);
        String name = wanted.equals("d") || wanted.equals("t") ? "h" : wanted;
        return Table.ALL.stream()
                .filter(e -> e.symbol.toLowerCase(Locale.ROOT).equals(name))
                .findFirst();
    }

    @Override
    public String toString() {
        return symbol;
    }
}
