package io.github.zonewright.crystal;

import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.TreeMap;
import java.util.stream.Collectors;

/** Contents of a cell and the formula they make, in the order of Hill, J. Am. Chem. Soc. 22 (1900) 478. */
final class Formula {

    private static final double WHOLE = 1e-3;

    private Formula() {}

    static Map<String, Double> cellContents(Crystal crystal) {
        Map<String, Double> counts = new TreeMap<>();
        for (UnitCellAtom atom : crystal.unitCellAtoms()) {
            counts.merge(atom.site().element().symbol(), atom.site().occupancy(), Double::sum);
        }
        Map<String, Double> ordered = new LinkedHashMap<>();
        if (counts.containsKey("C")) {
            for (String first : List.of("C", "H")) {
                if (counts.containsKey(first)) {
                    ordered.put(first, counts.get(first));
                }
            }
        }
        counts.forEach(ordered::putIfAbsent);
        return ordered;
    }

    static String of(Crystal crystal) {
        int units =
                crystal.sites().stream().mapToInt(s -> crystal.orbit(s).size()).reduce(0, Formula::gcd);
        Map<String, Double> contents = cellContents(crystal);
        contents.replaceAll((symbol, n) -> n / units);
        if (contents.values().stream().allMatch(n -> n > WHOLE && Math.abs(n - Math.rint(n)) < WHOLE)) {
            int common =
                    contents.values().stream().mapToInt(n -> (int) Math.rint(n)).reduce(0, Formula::gcd);
            contents.replaceAll((symbol, n) -> n / common);
        }
        return contents.entrySet().stream()
                .map(e -> e.getKey() + number(e.getValue()))
                .collect(Collectors.joining(" "));
    }

    private static String number(double n) {
        if (Math.abs(n - 1) < WHOLE) {
            return "";
        }
        return Math.abs(n - Math.rint(n)) < WHOLE
                ? Long.toString(Math.round(n))
                : String.format(Locale.ROOT, "%.3f", n).replaceAll("0+$", "");
    }

    private static int gcd(int a, int b) {
        return b == 0 ? a : gcd(b, a % b);
    }
}
