package io.github.zonewright.cif;

/** A word of a CIF. For a value, {@code value} holds it and {@code text} is empty. */
record CifToken(Type type, String text, CifValue value, int line, int column) {
    enum Type {
        DATA,
        SAVE,
        SAVE_END,
        LOOP,
        TAG,
        VALUE,
        COMMENT,
        END
    }

    /** The token as a message names it. */
    String described() {
        return switch (type) {
            case DATA -> "data_" + CifQuoting.shorten(text);
            case SAVE -> "save_" + CifQuoting.shorten(text);
            case SAVE_END -> "save_";
            case LOOP -> "loop_";
            case TAG -> CifQuoting.shorten(text);
            case VALUE -> "the value " + CifQuoting.excerpt(value.text());
            case COMMENT -> "a comment";
            case END -> "the end of the file";
        };
    }
}
