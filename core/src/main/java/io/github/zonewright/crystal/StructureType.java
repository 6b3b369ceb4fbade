package io.github.zonewright.crystal;

import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Collectors;
import java.util.stream.IntStream;
import java.util.stream.Stream;

/**
 * A structure type by its symbol in the Strukturbericht (A1, B2, L1_2 …): group and sites, to be filled with elements and
 * edges.
 *
 * <p>Example: {@code StructureType.of("L1_2").crystal(List.of("Ni", "Al"), 3.572)} is γ′. The elements stand for those of
 * {@link #prototype()} in the order of {@link #roles()}: Cu3Au asks for the face centres first, then for the corners.
 *
 * <p>Known limit: L1_0 is given by its primitive cell, whose a is that of the face-centred one divided by √2.
 *
 * <p>Source: Strukturbericht as tabulated in Pearson, The Crystal Chemistry and Physics of Metals and Alloys (1972), and
 * Wyckoff, Crystal Structures (1963); from memory.
 *
 * @param symbol the symbol in plain text, such as {@code D0_19}
 * @param otherNames further names it is found by
 * @param prototype the formula of the compound that the type is named for
 * @param spaceGroup the Hermann–Mauguin symbol, with the origin where there are two
 * @param parameters the free coordinates by name, with their values in the prototype
 * @param sites the sites as element of the prototype and coordinates, which may name parameters: {@code Sn x 2x 1/4}
 */
public record StructureType(
        String symbol,
        List<String> otherNames,
        String prototype,
        String spaceGroup,
        Map<String, Double> parameters,
        List<String> sites) {

    /** The table is read once, when first asked for. */
    private static final class Table {
        static final List<StructureType> ALL = ResourceTable.lines("structure-types.txt").stream()
                .map(StructureType::ofRow)
                .toList();
    }

    /** Copies the lists. */
    public StructureType {
        otherNames = List.copyOf(otherNames);
        parameters = Collections.unmodifiableMap(new LinkedHashMap<>(parameters));
        sites = List.copyOf(sites);
    }

    private static StructureType ofRow(String row) {
        String[] f = row.split("\t", -1);
        Map<String, Double> parameters = new LinkedHashMap<>();
        Stream.of(f[4].split(" "))
                .filter(p -> !p.isEmpty())
                .map(p -> p.split("="))
                .forEach(p -> parameters.put(p[0], Double.valueOf(p[1])));
        List<String> names = f[1].isEmpty() ? List.of() : List.of(f[1].split(","));
        return new StructureType(f[0], names, f[2], f[3], parameters, List.of(f[5].split("; ")));
    }

    /**
     * Every type that is known here.
     *
     * @return the types in the order of their symbols
     */
    public static List<StructureType> all() {
        return Table.ALL;
    }

    /**
     * The type of a symbol, name or prototype.
     *
     * @param text for example {@code L1_2}, {@code L12}, {@code L1₂}, {@code fcc}, {@code rock salt} or {@code CaF2}
     * @return the first type whose symbol, name or prototype it is, in this order; empty if there is none
     */
    public static Optional<StructureType> find(String text) {
        String wanted = key(text);
        return Stream.of(
                        all().stream().filter(t -> key(t.symbol).equals(wanted)),
                        all().stream().filter(t -> t.otherNames.stream().anyMatch(n -> key(n).equals(wanted))),
                        all().stream().filter(t -> CrystalNames.sameFormula(t.prototype, text)))
                .flatMap(s -> s)
                .findFirst();
    }

    /**
     * The type of a symbol, name or prototype.
     *
     * @param text as for {@link #find}
     * @return the type
     * @throws IllegalArgumentException if there is none
     */
    public static StructureType of(String text) {
        return find(text)
                .orElseThrow(() -> new IllegalArgumentException("structure type \"" + text + "\", expected one of "
                        + all().stream().map(StructureType::symbol).collect(Collectors.joining(", "))));
    }

    private static String key(String text) {
        StringBuilder plain = new StringBuilder();
        for (char c : CrystalNames.fold(text).toCharArray()) {
            plain.append(c >= '₀' && c <= '₉' ? (char) (c - '₀' + '0') : c == '′' || c == '’' ? '\'' : c);
        }
        return plain.toString();
    }

    /**
     * What each element to be given stands for.
     *
     * @return the elements of the prototype in the order in which theirs are to be given
     */
    public List<String> roles() {
        return sites.stream()
                .map(s -> s.substring(0, s.indexOf(' ')))
                .distinct()
                .toList();
    }

    /**
     * The edges to be given.
     *
     * @return {@code a}, {@code a c} or {@code a b c}, as the group leaves them free
     */
    public List<String> edges() {
        return CellShape.ofGroup(spaceGroup).edges();
    }

    /**
     * The same type with another value of a free coordinate.
     *
     * @param parameter its name
     * @param value the coordinate, as a fraction of an edge
     * @return the type
     * @throws IllegalArgumentException if the type has no such parameter or the value is not finite
     */
    public StructureType with(String parameter, double value) {
        if (!parameters.containsKey(parameter) || !Double.isFinite(value)) {
            throw new IllegalArgumentException("parameter " + parameter + " = " + value + " of " + symbol
                    + ", expected a finite value of one of " + parameters.keySet());
        }
        Map<String, Double> changed = new LinkedHashMap<>(parameters);
        changed.put(parameter, value);
        return new StructureType(symbol, otherNames, prototype, spaceGroup, changed, sites);
    }

    /**
     * A crystal of this type.
     *
     * @param elements chemical symbols in the order of {@link #roles()}
     * @param edges the edges in Å in the order of {@link #edges()}
     * @return the crystal, named by formula and symbol: {@code Al Ni3 (L1_2)}
     * @throws IllegalArgumentException if there are not as many elements or edges as the type asks for, or one of them
     *     cannot be
     */
    public Crystal crystal(List<String> elements, double... edges) {
        List<String> roles = roles();
        if (elements.size() != roles.size()) {
            throw new IllegalArgumentException("elements of type " + symbol + ": " + elements + ", expected "
                    + roles.size() + ", for " + String.join(", ", roles) + " of " + prototype);
        }
        CrystalBuilder builder = Crystal.builder("crystal of type " + symbol)
                .spaceGroup(spaceGroup)
                .edges(edges);
        List<Element> given = elements.stream().map(Element::ofSymbol).toList();
        Map<String, Integer> numbers = new LinkedHashMap<>();
        for (String site : sites) {
            String[] f = site.split(" ");
            Element element = given.get(roles.indexOf(f[0]));
            String label = element.symbol() + numbers.merge(element.symbol(), 1, Integer::sum);
            double[] x = IntStream.rangeClosed(1, 3)
                    .mapToDouble(i -> coordinate(f[i]))
                    .toArray();
            builder.site(AtomSite.of(element.symbol(), x[0], x[1], x[2]).withLabel(label));
        }
        Crystal crystal = builder.build();
        return crystal.withName(crystal.formula() + " (" + symbol + ")");
    }

    /** A sum of numbers, fractions and multiples of parameters: x+1/2, 2x, -u. */
    private double coordinate(String text) {
        double sum = 0;
        for (String term : text.split("(?<=.)(?=[+-])")) {
            String last = term.substring(term.length() - 1);
            if (parameters.containsKey(last)) {
                String factor = term.substring(0, term.length() - 1);
                sum += parameters.get(last)
                        * (factor.isEmpty() || factor.equals("+")
                                ? 1
                                : factor.equals("-") ? -1 : Double.parseDouble(factor));
            } else {
                sum += Fraction.parse(term);
            }
        }
        return sum;
    }

    /**
     * Symbol, prototype and names, for a list.
     *
     * @return for example {@code B1 (NaCl, rock salt)}
     */
    @Override
    public String toString() {
        return Stream.concat(Stream.of(prototype), otherNames.stream())
                .collect(Collectors.joining(", ", symbol + " (", ")"));
    }
}
