package io.github.zonewright.cif;

/** The text is not a CIF: where it breaks the syntax, and which rule. */
public final class CifSyntaxException extends CifException {
    private static final long serialVersionUID = 1L;

    CifSyntaxException(int line, int column, String item, String reason) {
        super(line, column, item, reason);
    }
}
