package io.github.zonewright.crystal;

import java.text.Normalizer;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.TreeMap;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Collectors;

/** How names and formulae of crystals are compared, and turned into names of files. */
final class CrystalNames {

    private static final Pattern PART = Pattern.compile("([A-Z][a-z]?)(\\d*\\.?\\d*)");
    private static final Pattern RESERVED = Pattern.compile("con|prn|aux|nul|com\\d|lpt\\d");
    private static final int LONGEST_FILE_NAME = 80;
    private static final int LONGEST_FORMULA = 1000;

    private CrystalNames() {}

    /** Names are the same when these are: case, spaces, hyphens and underscores do not count. */
    static String fold(String name) {
        return name.toLowerCase(Locale.ROOT).replaceAll("[\\s_-]+", "");
    }

    /** Whether the words are part of a name, or the formula. */
    static boolean matches(String words, String formula, List<String> names) {
        return names.stream().anyMatch(n -> fold(n).contains(fold(words))) || sameFormula(words, formula);
    }

    /** Whether two texts are one formula, whatever the order of the elements. */
    static boolean sameFormula(String one, String other) {
        Map<String, Double> amounts = amounts(one);
        return !amounts.isEmpty() && amounts.equals(amounts(other));
    }

    /** Element to amount; empty if the text is no formula. */
    static Map<String, Double> amounts(String formula) {
        String text = formula.replaceAll("\\s+", "");
        Map<String, Double> parts = new TreeMap<>();
        if (text.length() > LONGEST_FORMULA) {
            return parts;
        }
        Matcher m = PART.matcher(text);
        int end = 0;
        while (m.find() && m.start() == end) {
            String n = m.group(2);
            parts.merge(m.group(1), n.isEmpty() || n.equals(".") ? 1 : Double.parseDouble(n), Double::sum);
            end = m.end();
        }
        return end == text.length() ? parts : Map.of();
    }

    /**
     * A name of a file that any system can store: letters a to z, digits and hyphens. Other letters are spelt by their
     * Unicode names: γ′ is gamma-prime.
     */
    static String fileName(String name) {
        String plain = Normalizer.normalize(name, Normalizer.Form.NFKD)
                .codePoints()
                .mapToObj(CrystalNames::spelt)
                .collect(Collectors.joining())
                .replaceAll("-+", "-")
                .replaceAll("^-|-$", "");
        String shortened = plain.substring(0, Math.min(LONGEST_FILE_NAME, plain.length()));
        if (shortened.isEmpty()) {
            return "crystal";
        }
        return RESERVED.matcher(shortened).matches() ? shortened + "-crystal" : shortened;
    }

    private static String spelt(int c) {
        if (c < 128) {
            return Character.isLetterOrDigit(c) ? Character.toString(Character.toLowerCase(c)) : "-";
        }
        if (Character.getType(c) == Character.NON_SPACING_MARK || Character.isWhitespace(c)) {
            return "";
        }
        String full = Character.getName(c);
        return full == null ? "-" : "-" + full.replaceAll("^.* |[^A-Z0-9]", "").toLowerCase(Locale.ROOT) + "-";
    }
}
