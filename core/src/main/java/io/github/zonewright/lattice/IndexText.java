package io.github.zonewright.lattice;

import java.util.ArrayList;
import java.util.List;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/** Reads three or four indices as people write them. */
final class IndexText {

    private static final Pattern SEPARATED = Pattern.compile("[-+\u2212]?\\d{1,4}");
    private static final Pattern COMPACT = Pattern.compile("[-+\u2212]?\\d");

    private IndexText() {}

    /** Three indices, or four of which the first three add up to zero. */
    static int[] parse(String text, String quantity) {
        String inner = text.replaceAll("[\\[\\](){}<>\u27e8\u27e9]", " ").strip();
        boolean separated = inner.matches(".*[\\s,;].*");
        String rest = separated
                ? SEPARATED.matcher(inner).replaceAll("")
                : COMPACT.matcher(inner).replaceAll("");
        List<Integer> found = new ArrayList<>();
        Matcher m = (separated ? SEPARATED : COMPACT).matcher(inner);
        while (m.find()) {
            found.add(Integer.parseInt(m.group().replace('\u2212', '-')));
        }
        if (!rest.replaceAll("[\\s,;]", "").isEmpty() || (found.size() != 3 && found.size() != 4)) {
            throw wrong(text, quantity, "three integers such as 1 -1 0");
        }
        if (found.size() == 4 && found.get(0) + found.get(1) + found.get(2) != 0) {
            throw wrong(text, quantity, "three integers, or four of which the first three add up to 0");
        }
        return found.stream().mapToInt(Integer::intValue).toArray();
    }

    private static IllegalArgumentException wrong(String text, String quantity, String expected) {
        return new IllegalArgumentException("indices of a " + quantity + ": \"" + text + "\", expected " + expected);
    }
}
