package io.github.zonewright.cif;

import java.util.Optional;

/**
 * What is wrong with a CIF, and where. The one family of exceptions that reading a CIF throws, besides
 * {@link java.io.IOException} when the bytes cannot be had.
 *
 * <p>It is unchecked, as a caller can seldom mend a file; it is an {@link IllegalArgumentException}, as the text given
 * is not what was asked for. Catch it where a person chose the file.
 */
public abstract sealed class CifException extends IllegalArgumentException
        permits CifSyntaxException, CifValueException {
    private static final long serialVersionUID = 1L;

    private final int line;
    private final int column;
    private final String item;
    private final String reason;

    CifException(int line, int column, String item, String reason) {
        super(place(line, column, item) + reason);
        this.line = line;
        this.column = column;
        this.item = item;
        this.reason = reason;
    }

    private static String place(int line, int column, String item) {
        String where = line > 0 ? "line " + line + ", column " + column : "";
        String what = item.isEmpty() ? "" : (where.isEmpty() ? "" : ", ") + CifQuoting.shorten(item);
        return where.isEmpty() && what.isEmpty() ? "" : where + what + ": ";
    }

    /**
     * The line of the fault.
     *
     * @return the line, from 1, or 0 for a value that was not read from a file
     */
    public int line() {
        return line;
    }

    /**
     * The column of the fault.
     *
     * @return the column in UTF-16 units, from 1, or 0 for a value that was not read from a file
     */
    public int column() {
        return column;
    }

    /**
     * The item in which the fault lies.
     *
     * @return the data name as it was written, or empty where no item is concerned
     */
    public Optional<String> item() {
        return item.isEmpty() ? Optional.empty() : Optional.of(item);
    }

    /**
     * The fault without its place.
     *
     * @return the reason alone; {@link #getMessage()} has the place in front of it
     */
    public String reason() {
        return reason;
    }
}
