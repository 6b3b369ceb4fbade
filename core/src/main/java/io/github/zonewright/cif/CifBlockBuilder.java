package io.github.zonewright.cif;

import java.util.ArrayList;
import java.util.List;

/** Collects the entries of a block in the order in which they are to be written. */
public final class CifBlockBuilder {
    private final String name;
    private final List<CifEntry> entries = new ArrayList<>();

    CifBlockBuilder(String name) {
        if (name.isEmpty()) {
            throw new IllegalArgumentException("a data block has a name, but this is empty");
        }
        CifCharacters.requireWord(name, "block name");
        this.name = name;
    }

    /**
     * Adds any entry.
     *
     * @param entry an item, loop, save frame or comment
     * @return this builder
     */
    public CifBlockBuilder add(CifEntry entry) {
        entries.add(entry);
        return this;
    }

    /**
     * Adds an item.
     *
     * @param tag the data name
     * @param value the value
     * @return this builder
     * @throws IllegalArgumentException if the tag is no data name
     */
    public CifBlockBuilder add(String tag, CifValue value) {
        return add(new CifItem(tag, value));
    }

    /**
     * Adds a string.
     *
     * @param tag the data name
     * @param text the characters
     * @return this builder
     * @throws IllegalArgumentException if the tag is no data name or the text cannot be written
     */
    public CifBlockBuilder add(String tag, String text) {
        return add(tag, CifValue.of(text));
    }

    /**
     * Adds a number at full precision.
     *
     * @param tag the data name
     * @param number the number, finite
     * @return this builder
     * @throws IllegalArgumentException if the tag is no data name or the number is not finite
     */
    public CifBlockBuilder add(String tag, double number) {
        return add(tag, CifValue.of(number));
    }

    /**
     * Adds a whole number.
     *
     * @param tag the data name
     * @param number the number
     * @return this builder
     * @throws IllegalArgumentException if the tag is no data name
     */
    public CifBlockBuilder add(String tag, long number) {
        return add(tag, CifValue.of(number));
    }

    /**
     * Adds a comment, a line of the file for each of its lines.
     *
     * @param text the comment without {@code #}
     * @return this builder
     * @throws IllegalArgumentException if the text cannot be written
     */
    public CifBlockBuilder comment(String text) {
        CifCharacters.unifyLineEnds(text).lines().forEach(line -> add(new CifComment(" " + line)));
        return this;
    }

    /**
     * The block.
     *
     * @return the block
     * @throws IllegalArgumentException if a data name stands twice
     */
    public CifBlock build() {
        return new CifBlock(name, entries);
    }
}
