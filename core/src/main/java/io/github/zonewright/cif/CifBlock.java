package io.github.zonewright.cif;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * A data block, or a save frame within one: items, loops, frames and comments in the order of the file.
 *
 * <p>Data names are compared without regard to case. Where several are given they are aliases, tried in order.
 */
public final class CifBlock implements CifEntry {
    private final String name;
    private final List<CifEntry> entries;
    private final Map<String, CifEntry> index = new HashMap<>();

    /**
     * A block or frame of these entries.
     *
     * @param name what follows {@code data_} or {@code save_}; may be empty in a file that breaks the standard
     * @param entries what the block holds, in order
     * @throws IllegalArgumentException if the name has white space, a data name stands twice, or a frame has frames
     */
    public CifBlock(String name, List<CifEntry> entries) {
        CifCharacters.requireWord(name, "block name");
        this.name = name;
        this.entries = List.copyOf(entries);
        for (CifEntry entry : this.entries) {
            for (String tag : tagsOf(entry)) {
                if (index.put(CifQuoting.fold(tag), entry) != null) {
                    throw new IllegalArgumentException("a block has a data name once, but this has it twice: " + tag);
                }
            }
            if (entry instanceof CifBlock frame && !frame.frames().isEmpty()) {
                throw new IllegalArgumentException("a save frame holds no save frames, but this does: " + frame.name);
            }
        }
    }

    /**
     * Starts a block to be written.
     *
     * @param name the name, at least one character and no white space
     * @return a builder
     * @throws IllegalArgumentException if the name is empty or has white space
     */
    public static CifBlockBuilder builder(String name) {
        return new CifBlockBuilder(name);
    }

    private static List<String> tagsOf(CifEntry entry) {
        if (entry instanceof CifItem item) {
            return List.of(item.tag());
        }
        return entry instanceof CifLoop loop ? loop.tags() : List.of();
    }

    /**
     * The name.
     *
     * @return what follows {@code data_} or {@code save_}; empty only in a file that breaks the standard
     */
    public String name() {
        return name;
    }

    /**
     * All that the block holds.
     *
     * @return items, loops, save frames and comments in order
     */
    public List<CifEntry> entries() {
        return entries;
    }

    /**
     * The items outside loops.
     *
     * @return the items in order
     */
    public List<CifItem> items() {
        return only(CifItem.class);
    }

    /**
     * The loops.
     *
     * @return the loops in order
     */
    public List<CifLoop> loops() {
        return only(CifLoop.class);
    }

    /**
     * The save frames.
     *
     * @return the frames in order; empty in a frame
     */
    public List<CifBlock> frames() {
        return only(CifBlock.class);
    }

    private <T extends CifEntry> List<T> only(Class<T> type) {
        return entries.stream().filter(type::isInstance).map(type::cast).toList();
    }

    /**
     * The data names in the block, those of loops included.
     *
     * @return the names as written, in order
     */
    public List<String> tags() {
        List<String> tags = new ArrayList<>();
        entries.forEach(entry -> tags.addAll(tagsOf(entry)));
        return List.copyOf(tags);
    }

    /**
     * The value of an item, or of a loop of one row. Of the names present the first with a known value is taken; if
     * all are {@code ?} or {@code .}, the first.
     *
     * @param names a data name and its aliases
     * @return the value, or empty if the block has none of the names, or only in loops of other lengths
     */
    public Optional<CifValue> value(String... names) {
        Optional<CifValue> unknown = Optional.empty();
        for (String tag : names) {
            List<CifValue> values = values(tag);
            if (values.size() == 1) {
                if (values.get(0).isKnown()) {
                    return Optional.of(values.get(0));
                }
                unknown = unknown.or(() -> Optional.of(values.get(0)));
            }
        }
        return unknown;
    }

    /**
     * The values of an item, in a loop or not.
     *
     * @param names a data name and its aliases; the first that the block has is taken
     * @return the column of its loop, or its one value; empty if the block has none of the names
     */
    public List<CifValue> values(String... names) {
        for (String tag : names) {
            CifEntry entry = index.get(CifQuoting.fold(tag));
            if (entry instanceof CifItem item) {
                return List.of(item.value());
            }
            if (entry instanceof CifLoop loop) {
                return loop.column(tag).orElseThrow();
            }
        }
        return List.of();
    }

    /**
     * The loop that has one of these columns.
     *
     * @param names a data name and its aliases; the first that stands in a loop decides
     * @return the loop, or empty if none has any of the names
     */
    public Optional<CifLoop> loop(String... names) {
        for (String tag : names) {
            if (index.get(CifQuoting.fold(tag)) instanceof CifLoop loop) {
                return Optional.of(loop);
            }
        }
        return Optional.empty();
    }

    @Override
    public boolean equals(Object other) {
        return other instanceof CifBlock that && name.equals(that.name) && entries.equals(that.entries);
    }

    @Override
    public int hashCode() {
        return 31 * name.hashCode() + entries.hashCode();
    }

    @Override
    public String toString() {
        return "block " + name + " of " + index.size() + " items";
    }
}
