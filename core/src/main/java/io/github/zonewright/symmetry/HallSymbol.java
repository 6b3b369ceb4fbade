package io.github.zonewright.symmetry;

import static io.github.zonewright.symmetry.SymmetryOperation.DENOMINATOR;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;

/**
 * A Hall symbol, which spells the generators of a space group: a lattice letter, up to four rotations with their
 * translations, and a change of basis, as in {@code -P 2ybc}, {@code F 4d 2 3 -1d} or {@code P 31 2 (0 0 4)}.
 *
 * <p>Source: S. R. Hall, Acta Cryst. A37 (1981) 517; International Tables for Crystallography B, section A1.4.2, whose
 * rules for axes left out are followed: the first rotation is along c; a second 2 is along a after a 2 or 4 and along
 * a−b after a 3 or 6; a 3 in a later place is along a+b+c. The lattice letters are P A B C I R S T F and H.
 *
 * @param text the symbol as written, spaces tidied
 * @param generators the generators in the final basis: translations of the lattice and rotations
 */
public record HallSymbol(String text, List<SymmetryOperation> generators) {

    private static final Map<Character, int[][]> LATTICES = Map.of(
            'P',
            new int[][] {},
            'A',
            new int[][] {{0, 6, 6}},
            'B',
            new int[][] {{6, 0, 6}},
            'C',
            new int[][] {{6, 6, 0}},
            'I',
            new int[][] {{6, 6, 6}},
            'R',
            new int[][] {{8, 4, 4}},
            'S',
            new int[][] {{4, 4, 8}},
            'T',
            new int[][] {{4, 8, 4}},
            'H',
            new int[][] {{8, 4, 0}},
            'F',
            new int[][] {{0, 6, 6}, {6, 0, 6}});

    private static final Map<Character, int[]> TRANSLATIONS = Map.of(
            'a', new int[] {6, 0, 0},
            'b', new int[] {0, 6, 0},
            'c', new int[] {0, 0, 6},
            'n', new int[] {6, 6, 6},
            'u', new int[] {3, 0, 0},
            'v', new int[] {0, 3, 0},
            'w', new int[] {0, 0, 3},
            'd', new int[] {3, 3, 3});

    private static final int LONGEST_TEXT = 200;

    /** Copies the generators. */
    public HallSymbol {
        generators = List.copyOf(generators);
    }

    /**
     * Reads a symbol. Case, extra spaces and underscores for spaces do not matter.
     *
     * @param symbol the Hall symbol
     * @return the symbol with its generators
     * @throws IllegalArgumentException if the text is no Hall symbol
     */
    public static HallSymbol parse(String symbol) {
        String text = symbol.replace('_', ' ').trim().replaceAll("\\s+", " ");
        if (text.length() > LONGEST_TEXT) {
            throw new IllegalArgumentException(
                    "Hall symbol: " + text.length() + " characters long, expected at most " + LONGEST_TEXT);
        }
        int parenthesis = text.indexOf('(');
        String rotations = parenthesis < 0 ? text : text.substring(0, parenthesis);
        Optional<ChangeOfBasis> change = Optional.empty();
        if (parenthesis >= 0) {
            if (!text.endsWith(")")) {
                throw problem(text, "change of basis is not closed, expected ) at the end");
            }
            change = Optional.of(ChangeOfBasis.parse(text.substring(parenthesis + 1, text.length() - 1), text));
        }
        List<SymmetryOperation> generators =
                new Reader(text, rotations.trim().toLowerCase(Locale.ROOT).split(" ")).generators();
        if (change.isPresent()) {
            generators = change.get().apply(GroupClosure.of(generators));
        }
        return new HallSymbol(text, generators);
    }

    private static IllegalArgumentException problem(String symbol, String text) {
        return new IllegalArgumentException("Hall symbol \"" + symbol + "\": " + text);
    }

    /** Reads lattice and rotations, keeping in mind what came before, which settles the axes left out. */
    private static final class Reader {

        private final String symbol;
        private final String[] words;
        private final List<SymmetryOperation> generators = new ArrayList<>();
        private int previousOrder;
        private char previousAxis = 'z';

        Reader(String symbol, String[] words) {
            this.symbol = symbol;
            this.words = words;
        }

        List<SymmetryOperation> generators() {
            lattice(words[0]);
            if (words.length < 2 || words.length > 5) {
                throw problem(symbol, words.length - 1 + " rotations, expected one to four");
            }
            for (int place = 0; place < words.length - 1; place++) {
                rotation(words[place + 1], place);
            }
            return generators;
        }

        private void lattice(String word) {
            boolean centred = word.startsWith("-");
            String letter = centred ? word.substring(1) : word;
            int[][] vectors = letter.length() == 1 ? LATTICES.get(Character.toUpperCase(letter.charAt(0))) : null;
            if (vectors == null) {
                throw problem(symbol, "lattice \"" + word + "\", expected one of P A B C I R S T F H, or - and it");
            }
            for (int[] v : vectors) {
                generators.add(translation(v));
            }
            if (centred) {
                generators.add(SymmetryOperation.INVERSION);
            }
        }

        private void rotation(String word, int place) {
            boolean improper = word.startsWith("-");
            String rest = improper ? word.substring(1) : word;
            int order = rest.isEmpty() ? -1 : "12346".indexOf(rest.charAt(0)) < 0 ? -1 : rest.charAt(0) - '0';
            if (order < 0) {
                throw problem(symbol, "rotation \"" + word + "\", expected an order of 1, 2, 3, 4 or 6");
            }
            char axis = 0;
            int screw = 0;
            int[] shift = new int[3];
            for (char c : rest.substring(1).toCharArray()) {
                if ("xyz'\"*".indexOf(c) >= 0 && axis == 0) {
                    axis = c;
                } else if (TRANSLATIONS.containsKey(c)) {
                    for (int i = 0; i < 3; i++) {
                        shift[i] += TRANSLATIONS.get(c)[i];
                    }
                } else if (c >= '1' && c < '0' + order && screw == 0) {
                    screw = c - '0';
                } else {
                    throw problem(symbol, "unexpected '" + c + "' in \"" + word + "\"");
                }
            }
            axis = axis != 0 || order == 1 ? axis : defaultAxis(order, place, word);
            if (screw > 0) {
                if (axis < 'x' || axis > 'z') {
                    throw problem(symbol, "screw " + screw + " in \"" + word + "\" is along no cell edge");
                }
                shift[axis - 'x'] += 12 * screw / order;
            }
            SymmetryOperation turn = SymmetryOperation.of(matrix(order, axis, word), new int[3]);
            generators.add(translation(shift).after(improper ? turn.after(SymmetryOperation.INVERSION) : turn));
            if (order > 1) {
                previousOrder = order;
                previousAxis = axis;
            }
        }

        private char defaultAxis(int order, int place, String word) {
            if (place == 0) {
                return 'z';
            }
            if (order == 3) {
                return '*';
            }
            if (place == 1 && order == 2 && previousOrder > 0) {
                return previousOrder % 3 == 0 ? '\'' : 'x';
            }
            throw problem(symbol, "the axis of \"" + word + "\" is left out, expected x, y, z, ', \" or *");
        }

        private int[] matrix(int order, char axis, String word) {
            int[] m = new int[9];
            if (axis == '*' && order == 3) {
                return new int[] {0, 0, 1, 1, 0, 0, 0, 1, 0};
            }
            if (order == 1) {
                return new int[] {1, 0, 0, 0, 1, 0, 0, 0, 1};
            }
            if ((axis == '\'' || axis == '"') && order == 2) {
                int along = previousAxis >= 'x' && previousAxis <= 'z' ? previousAxis - 'x' : 2;
                int sign = axis == '"' ? 1 : -1;
                m[4 * along] = -1;
                m[3 * ((along + 1) % 3) + (along + 2) % 3] = sign;
                m[3 * ((along + 2) % 3) + (along + 1) % 3] = sign;
                return m;
            }
            if (axis < 'x' || axis > 'z') {
                throw problem(symbol, "axis '" + axis + "' in \"" + word + "\" does not go with order " + order);
            }
            int[] block = switch (order) {
                case 2 -> new int[] {-1, 0, 0, -1};
                case 3 -> new int[] {0, -1, 1, -1};
                case 4 -> new int[] {0, -1, 1, 0};
                default -> new int[] {1, -1, 1, 0};
            };
            int along = axis - 'x';
            int first = (along + 1) % 3;
            int second = (along + 2) % 3;
            m[4 * along] = 1;
            m[3 * first + first] = block[0];
            m[3 * first + second] = block[1];
            m[3 * second + first] = block[2];
            m[3 * second + second] = block[3];
            return m;
        }

        private static SymmetryOperation translation(int[] twelfths) {
            int unit = DENOMINATOR / 12;
            return SymmetryOperation.ofTranslation(twelfths[0] * unit, twelfths[1] * unit, twelfths[2] * unit);
        }
    }
}
