package io.github.zonewright.document;

import java.util.ArrayDeque;
import java.util.Deque;

/**
 * Writes HTML that is well-formed XML too. Texts and attributes are escaped, whatever file they come from, so that they stay
 * text; characters that XML has no place for become U+FFFD.
 */
final class Markup {
    private final StringBuilder out = new StringBuilder();
    private final Deque<String> open = new ArrayDeque<>();

    /** Begins an element; attributes are names and values by turns. */
    Markup open(String tag, String... attributes) {
        begin(tag, attributes);
        out.append('>');
        open.push(tag);
        return this;
    }

    /** An element without content. */
    Markup empty(String tag, String... attributes) {
        begin(tag, attributes);
        out.append("/>");
        return this;
    }

    /** An element with a text. */
    Markup element(String tag, String text, String... attributes) {
        return open(tag, attributes).text(text).close();
    }

    /** Ends the element begun last. */
    Markup close() {
        out.append("</").append(open.pop()).append('>');
        return this;
    }

    Markup text(String text) {
        escape(text);
        return this;
    }

    Markup line() {
        out.append('\n');
        return this;
    }

    /** A style sheet of ours, which HTML reads as it stands and XML as markup: it may have neither {@code <} nor {@code &}. */
    Markup style(String sheet) {
        if (sheet.indexOf('<') >= 0 || sheet.indexOf('&') >= 0) {
            throw new IllegalArgumentException("style sheet with < or &, expected neither: " + sheet);
        }
        out.append("<style>\n").append(sheet).append("</style>");
        return this;
    }

    /**
     * Indices as crystallographers print them, negative ones with a bar above (International Tables A, section 1.4). A minus
     * that is not seen stands before them for those who copy or hear the text.
     */
    Markup indices(int... indices) {
        boolean wide = false;
        for (int index : indices) {
            wide |= Math.abs(index) > 9;
        }
        open("span", "class", "indices");
        for (int i = 0; i < indices.length; i++) {
            String digits = Integer.toString(Math.abs(indices[i]));
            text(i > 0 && wide ? "\u2009" : "");
            if (indices[i] < 0) {
                element("span", "\u2212", "class", "unseen").element("span", digits, "class", "bar");
            } else {
                text(digits);
            }
        }
        return close();
    }

    @Override
    public String toString() {
        if (!open.isEmpty()) {
            throw new IllegalStateException("elements left open: " + open);
        }
        return out.toString();
    }

    private void begin(String tag, String... attributes) {
        out.append('<').append(tag);
        for (int i = 0; i < attributes.length; i += 2) {
            out.append(' ').append(attributes[i]).append("=\"");
            escape(attributes[i + 1]);
            out.append('"');
        }
    }

    private void escape(String text) {
        text.codePoints().forEach(c -> {
            switch (c) {
                case '<' -> out.append("&lt;");
                case '>' -> out.append("&gt;");
                case '&' -> out.append("&amp;");
                case '"' -> out.append("&quot;");
                case '\'' -> out.append("&#39;");
                default -> out.appendCodePoint(isXml(c) ? c : 0xFFFD);
            }
        });
    }

    /** Char of XML 1.0 (W3C, fifth edition, production 2). */
    private static boolean isXml(int c) {
        return c == '\t'
                || c == '\n'
                || c == '\r'
                || (c >= 0x20 && c <= 0xD7FF)
                || (c >= 0xE000 && c <= 0xFFFD)
                || c >= 0x10000;
    }
}
