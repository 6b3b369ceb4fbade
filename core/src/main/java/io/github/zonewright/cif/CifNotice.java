package io.github.zonewright.cif;

import java.util.Objects;

/**
 * Something in a file that the standard forbids and the reader let pass, and how it was understood.
 *
 * @param line the line, from 1
 * @param column the column in UTF-16 units, from 1
 * @param message what was found and how it was read
 */
public record CifNotice(int line, int column, String message) {
    /** Checks that there is a message. */
    public CifNotice {
        Objects.requireNonNull(message, "message");
    }

    @Override
    public String toString() {
        return "line " + line + ", column " + column + ": " + message;
    }
}
