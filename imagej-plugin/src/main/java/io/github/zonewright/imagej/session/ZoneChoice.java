package io.github.zonewright.imagej.session;

import io.github.zonewright.indexing.OrientationSearch;
import io.github.zonewright.lattice.Uvw;
import java.util.Locale;

/**
 * The zone axes that a search tries: any, one alone, or a family.
 *
 * @param zone the zone axis; 0 0 0 for any
 * @param family whether those that are equivalent to it by the crystal's Laue class are tried too
 */
public record ZoneChoice(Uvw zone, boolean family) {
    /** How any zone axis is written. */
    public static final String ANY_LABEL = "any";

    /** Any zone axis. */
    public static final ZoneChoice ANY = new ZoneChoice(new Uvw(0, 0, 0), false);

    /**
     * Reads a choice, one in square brackets or bare, a family in angle brackets (International Tables A).
     *
     * @param text for example {@code any}, {@code 1 1 0}, {@code [1 1 0]} or {@code <1 1 0>}; blank is any
     * @return the choice
     * @throws IllegalArgumentException if it is neither
     */
    public static ZoneChoice parse(String text) {
        String said = text == null ? "" : text.strip().toLowerCase(Locale.ROOT);
        if (said.isEmpty() || said.equals(ANY_LABEL)) {
            return ANY;
        }
        boolean family = said.matches("[<⟨].*[>⟩]");
        boolean bracketed = family || said.matches("\\[.*]");
        try {
            Uvw zone = Uvw.parse(bracketed ? said.substring(1, said.length() - 1) : said);
            if (!zone.isZero()) {
                return new ZoneChoice(zone.reduced(), family);
            }
        } catch (IllegalArgumentException e) {
            throw wrong(text, e);
        }
        throw wrong(text, null);
    }

    private static IllegalArgumentException wrong(String text, Exception cause) {
        return new IllegalArgumentException(
                "zone axes searched: \"" + text
                        + "\", expected any, a zone axis such as 1 1 0 or a family such as <1 1 0>",
                cause);
    }

    OrientationSearch limit(OrientationSearch search) {
        if (zone.isZero()) {
            return search;
        }
        return family ? search.withZoneFamily(zone) : search.withZone(zone);
    }

    /**
     * The choice as it is written.
     *
     * @return for example {@code <1 1 0>}
     */
    public String text() {
        return zone.isZero() ? ANY_LABEL : family ? "<" + zone + ">" : "[" + zone + "]";
    }
}
