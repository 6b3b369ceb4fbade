package io.github.zonewright.cif;

/** The text is a CIF, but the value of an item is not what was asked for, such as a number. */
public final class CifValueException extends CifException {
    private static final long serialVersionUID = 1L;

    CifValueException(int line, int column, String item, String reason) {
        super(line, column, item, reason);
    }
}
