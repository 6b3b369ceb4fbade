package io.github.zonewright.cif;

import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.Optional;

/**
 * One value of a CIF: its characters, how they were delimited, and where they stood.
 *
 * <p>Two values are equal when kind and text are; the place is not compared.
 */
public final class CifValue {
    /** How a value is written, which is also what it may mean. */
    public enum Kind {
        /** A bare {@code ?}: the value is not known. */
        UNKNOWN,
        /** A bare {@code .}: there can be no value, or the default holds. */
        NOT_APPLICABLE,
        /** Characters without delimiters: a number or a word. */
        BARE,
        /** Characters between quotes. */
        QUOTED,
        /** Lines between semicolons at the start of a line, the folding and prefix protocols undone. */
        TEXT_FIELD,
        /** A list in brackets (CIF 2.0); the text is verbatim. */
        LIST,
        /** A table in braces (CIF 2.0); the text is verbatim. */
        TABLE
    }

    /** The value {@code ?}. */
    public static final CifValue UNKNOWN = plain(Kind.UNKNOWN, "?");
    /** The value {@code .}. */
    public static final CifValue NOT_APPLICABLE = plain(Kind.NOT_APPLICABLE, ".");

    private final Kind kind;
    private final String text;
    private final List<String> keys;
    private final List<CifValue> elements;
    private final String item;
    private final int line;
    private final int column;

    CifValue(Kind kind, String text, List<String> keys, List<CifValue> elements, String item, int line, int column) {
        this.kind = kind;
        this.text = text;
        this.keys = keys;
        this.elements = elements;
        this.item = item;
        this.line = line;
        this.column = column;
    }

    private static CifValue plain(Kind kind, String text) {
        return new CifValue(kind, text, List.of(), List.of(), "", 0, 0);
    }

    /**
     * A string, to be written so that every reader takes it for a string: quoted if it looks like a number, a name, a
     * comment, a reserved word, {@code ?} or {@code .}, and as a text field if it has several lines.
     *
     * @param text the characters; CR and CRLF become LF
     * @return the value
     * @throws IllegalArgumentException if the text has a character that a CIF cannot hold
     */
    public static CifValue of(String text) {
        String unified = CifCharacters.unifyLineEnds(text);
        CifCharacters.requireWritable(unified, "CIF value");
        return plain(CifQuoting.kindFor(unified), unified);
    }

    /**
     * A number with all the digits it needs to be read back the same ({@link Double#toString(double)}).
     *
     * @param number the number, finite
     * @return the value
     * @throws IllegalArgumentException if the number is not finite
     */
    public static CifValue of(double number) {
        if (!Double.isFinite(number)) {
            throw new IllegalArgumentException("a CIF number is finite, but this is " + number);
        }
        return plain(Kind.BARE, Double.toString(number));
    }

    /**
     * A whole number.
     *
     * @param number the number
     * @return the value
     */
    public static CifValue of(long number) {
        return plain(Kind.BARE, Long.toString(number));
    }

    /** A number in characters of its own choice. */
    static CifValue bare(String number) {
        return plain(Kind.BARE, number);
    }

    /** The same value as the value of an item. */
    CifValue in(String tag) {
        return tag.equals(item) ? this : new CifValue(kind, text, keys, elements, tag, line, column);
    }

    /**
     * How the value is written.
     *
     * @return the kind
     */
    public Kind kind() {
        return kind;
    }

    /**
     * The characters between the delimiters. A text field keeps its line ends (as LF), the first one included when
     * the text begins on the line after its semicolon; the last one belongs to the delimiter.
     *
     * @return the characters; for a list or table as it stands in the file, brackets included
     */
    public String text() {
        return text;
    }

    /**
     * Whether there is a value at all.
     *
     * @return false for a bare {@code ?} or {@code .}
     */
    public boolean isKnown() {
        return kind != Kind.UNKNOWN && kind != Kind.NOT_APPLICABLE;
    }

    /**
     * The values of a list or table of CIF 2.0.
     *
     * @return the values in order; empty for any other kind
     */
    public List<CifValue> elements() {
        return elements;
    }

    /**
     * The table of CIF 2.0.
     *
     * @return key and value in order; empty for any other kind
     */
    public Map<String, CifValue> table() {
        Map<String, CifValue> table = new LinkedHashMap<>();
        for (int i = 0; i < keys.size(); i++) {
            table.put(keys.get(i), elements.get(i));
        }
        return Collections.unmodifiableMap(table);
    }

    /**
     * The number that the value stands for. A number between quotes is accepted, as files in the wild have them.
     *
     * @return the number
     * @throws CifValueException if the value is no number, or beyond the range of a {@code double}
     */
    public CifNumber asNumber() {
        boolean mayBe = kind == Kind.BARE || kind == Kind.QUOTED;
        return (mayBe ? CifNumber.parse(text) : Optional.<CifNumber>empty())
                .orElseThrow(() -> fault("a number was expected"));
    }

    /**
     * The whole number that the value stands for; its uncertainty, if any, is left aside.
     *
     * @return the number
     * @throws CifValueException if the value is no number, not whole, or beyond the range of an {@code int}
     */
    public int asInt() {
        double number = asNumber().value();
        if (number != (int) number) {
            throw fault("a whole number was expected");
        }
        return (int) number;
    }

    /**
     * An exception for a reader to throw that finds this value unfit: it names item, line, column and text.
     *
     * @param expected what was expected, as a clause such as "a number was expected"
     * @return the exception, not thrown
     */
    public CifValueException fault(String expected) {
        return new CifValueException(line, column, item, expected + ", but the value is " + CifQuoting.excerpt(text));
    }

    /**
     * The item that the value belongs to.
     *
     * @return the data name as written, or "" for a value that belongs to none yet
     */
    public String item() {
        return item;
    }

    /**
     * The line on which the value starts.
     *
     * @return the line, from 1, or 0 for a value that was not read
     */
    public int line() {
        return line;
    }

    /**
     * The column in which the value, its delimiter included, starts.
     *
     * @return the column in UTF-16 units, from 1, or 0 for a value that was not read
     */
    public int column() {
        return column;
    }

    @Override
    public boolean equals(Object other) {
        return other instanceof CifValue that && kind == that.kind && text.equals(that.text);
    }

    @Override
    public int hashCode() {
        return Objects.hash(kind, text);
    }

    @Override
    public String toString() {
        return text;
    }
}
