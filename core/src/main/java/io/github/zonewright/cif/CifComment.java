package io.github.zonewright.cif;

/**
 * A comment of a data block.
 *
 * @param text what follows the {@code #}, to the end of the line
 */
public record CifComment(String text) implements CifEntry {
    /**
     * Checks the text.
     *
     * @throws IllegalArgumentException if the text has a line end or another character that a CIF cannot hold
     */
    public CifComment {
        CifCharacters.requireWritable(text, "comment");
        if (text.indexOf('\n') >= 0) {
            throw new IllegalArgumentException("a CIF comment is one line, but this has several: " + text);
        }
    }
}
