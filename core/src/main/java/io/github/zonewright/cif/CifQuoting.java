package io.github.zonewright.cif;

import java.util.List;
import java.util.Locale;
import java.util.stream.Collectors;

/**
 * Which delimiters a value needs (International Tables G, 2.2.7, and for CIF 2.0 Bernstein et al. 2016).
 */
final class CifQuoting {
    private static final int LONGEST_EXCERPT = 75;
    private static final int MOST_NAMES = 40;

    private CifQuoting() {}

    /** The kind as which a string is best written in either version. */
    static CifValue.Kind kindFor(String text) {
        boolean bare = isBare(text, CifVersion.CIF_2_0)
                && isBare(text, CifVersion.CIF_1_1)
                && CifNumber.parse(text).isEmpty();
        if (bare) {
            return CifValue.Kind.BARE;
        }
        return text.indexOf('\n') < 0 && !quoted(text, CifVersion.CIF_1_1).isEmpty()
                ? CifValue.Kind.QUOTED
                : CifValue.Kind.TEXT_FIELD;
    }

    /** Whether every reader takes these characters, without delimiters, for one value that is neither ? nor . */
    static boolean isBare(String text, CifVersion version) {
        if (text.isEmpty()
                || "?.\"#$'_;[]{}".indexOf(text.charAt(0)) >= 0 && !isLeadingPoint(text)
                || isReserved(text)) {
            return false;
        }
        for (int i = 0; i < text.length(); i++) {
            char c = text.charAt(i);
            if (CifCharacters.isBlank(c) || version == CifVersion.CIF_2_0 && isBracket(c)) {
                return false;
            }
        }
        return true;
    }

    private static boolean isLeadingPoint(String text) {
        return text.length() > 1 && (text.charAt(0) == '.' || text.charAt(0) == '?');
    }

    static boolean isBracket(char c) {
        return c == '[' || c == ']' || c == '{' || c == '}';
    }

    private static boolean isReserved(String text) {
        for (String word : new String[] {"data_", "save_", "loop_", "global_", "stop_"}) {
            if (text.regionMatches(true, 0, word, 0, word.length())) {
                return true;
            }
        }
        return false;
    }

    /** The text between quotes, or "" if quotes cannot hold it. */
    static String quoted(String text, CifVersion version) {
        if (text.indexOf('\n') >= 0) {
            return "";
        }
        for (char quote : new char[] {'\'', '"'}) {
            if (text.indexOf(quote) < 0) {
                return quote + text + quote;
            }
        }
        if (version == CifVersion.CIF_2_0) {
            return "";
        }
        for (char quote : new char[] {'\'', '"'}) {
            if (!text.contains(quote + " ") && !text.contains(quote + "\t")) {
                return quote + text + quote;
            }
        }
        return "";
    }

    /** The key under which names that differ in case alone are one. */
    static String fold(String name) {
        return name.toLowerCase(Locale.ROOT);
    }

    /** Data names for a message, the first few if there are many. */
    static String names(List<String> tags) {
        String listed = tags.stream().limit(MOST_NAMES).map(CifQuoting::shorten).collect(Collectors.joining(", "));
        return tags.size() > MOST_NAMES ? listed + ", …" : listed;
    }

    /** The start of a text, between quotes, for a message. */
    static String excerpt(String text) {
        return "'" + shorten(text.strip().replace('\n', ' ')) + "'";
    }

    /** The start of a name for a message. */
    static String shorten(String name) {
        return name.length() <= LONGEST_EXCERPT ? name : name.substring(0, LONGEST_EXCERPT) + "…";
    }
}
