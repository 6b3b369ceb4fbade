package io.github.zonewright.crystal;

import java.util.Locale;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/** What a type symbol or label of a site says of its element: {@code Fe3+}, {@code O2-}, {@code CaM1}, {@code D}. */
record SiteLabel(Optional<Element> element, boolean ion, boolean deuterium, boolean water) {

    private static final Pattern LETTERS = Pattern.compile("^[^A-Za-z]*([A-Za-z]+)(.*)$", Pattern.DOTALL);
    private static final Pattern CHARGE = Pattern.compile("\\d*\\.?\\d*[+-]|[+-]\\d*\\.?\\d*");

    /**
     * Reads a type symbol, such as Fe3+ or Si, or a label, such as FeM1.
     *
     * <p>Two letters make an element if they do as written, with the second in lower case, or if nothing else does.
     */
    static SiteLabel parse(String text) {
        Matcher m = LETTERS.matcher(text.trim());
        if (!m.matches()) {
            return new SiteLabel(Optional.empty(), false, false, false);
        }
        String letters = m.group(1);
        if (letters.toLowerCase(Locale.ROOT).startsWith("wat")) {
            return new SiteLabel(Element.find("O"), false, false, true);
        }
        if (letters.equalsIgnoreCase("va") || letters.toLowerCase(Locale.ROOT).startsWith("vac")) {
            return new SiteLabel(Optional.empty(), false, false, false);
        }
        String two = letters.substring(0, Math.min(2, letters.length()));
        Optional<Element> first = Element.find(letters.substring(0, 1));
        Optional<Element> both = two.length() == 2 ? Element.find(two) : Optional.empty();
        boolean asWritten = two.length() == 2 && Character.isLowerCase(two.charAt(1));
        boolean charged = letters.length() <= 2 && CHARGE.matcher(m.group(2)).matches();
        boolean alone = letters.length() == 2 && (m.group(2).isEmpty() || charged);
        Optional<Element> element = both.isPresent() && (asWritten || alone || first.isEmpty()) ? both : first;
        boolean deuterium = element.equals(first)
                && letters.startsWith("D")
                && both.filter(e -> asWritten).isEmpty();
        return new SiteLabel(element, charged, deuterium, false);
    }
}
