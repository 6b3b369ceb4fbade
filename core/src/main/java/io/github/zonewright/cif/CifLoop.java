package io.github.zonewright.cif;

import java.util.AbstractList;
import java.util.ArrayList;
import java.util.Collections;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.Optional;

/**
 * A table: data names as columns, and rows of values.
 *
 * <p>Data names are compared without regard to case. Where several are given they are aliases, tried in order.
 */
public final class CifLoop implements CifEntry {
    private final List<String> tags;
    private final List<CifValue> values;
    private final Map<String, Integer> columns = new HashMap<>();

    /** A loop of values row by row. */
    CifLoop(List<String> tags, List<CifValue> values) {
        this.tags = List.copyOf(tags);
        if (tags.isEmpty()) {
            throw new IllegalArgumentException("a loop has at least one data name, but this has none");
        }
        for (String tag : tags) {
            CifCharacters.requireTag(tag);
            if (columns.putIfAbsent(CifQuoting.fold(tag), columns.size()) != null) {
                throw new IllegalArgumentException("a loop has a data name once, but this has it twice: " + tag);
            }
        }
        List<CifValue> owned = new ArrayList<>(values.size());
        for (CifValue value : values) {
            owned.add(value.in(this.tags.get(owned.size() % tags.size())));
        }
        this.values = owned;
    }

    /**
     * A loop to be written.
     *
     * @param tags the data names
     * @param rows the rows, at least one, each with a value for every name
     * @return the loop
     * @throws IllegalArgumentException if there is no row, a row is too short or too long, a name is no data name or
     *     stands twice. A CIF cannot hold a loop without rows: leave it out
     */
    public static CifLoop of(List<String> tags, List<List<CifValue>> rows) {
        if (rows.isEmpty()) {
            throw new IllegalArgumentException(
                    "a loop has at least one row, but this has none; leave it out: " + CifQuoting.names(tags));
        }
        List<CifValue> values = new ArrayList<>();
        for (List<CifValue> row : rows) {
            if (row.size() != tags.size()) {
                throw new IllegalArgumentException("a row of this loop has " + tags.size() + " values, but one has "
                        + row.size() + ": " + CifQuoting.names(tags));
            }
            values.addAll(row);
        }
        return new CifLoop(tags, values);
    }

    /**
     * The data names.
     *
     * @return the names as written, in order
     */
    public List<String> tags() {
        return tags;
    }

    /**
     * How many rows there are.
     *
     * @return the number of rows; 0 only in a file that breaks the standard
     */
    public int size() {
        return values.size() / tags.size();
    }

    /**
     * One row.
     *
     * @param index the row, from 0
     * @return its values in the order of {@link #tags()}
     * @throws IndexOutOfBoundsException if there is no such row
     */
    public List<CifValue> row(int index) {
        return new Slice(values, Objects.checkIndex(index, size()) * tags.size(), 1, tags.size());
    }

    /**
     * All rows.
     *
     * @return the rows in order
     */
    public List<List<CifValue>> rows() {
        return new AbstractList<>() {
            @Override
            public List<CifValue> get(int index) {
                return row(index);
            }

            @Override
            public int size() {
                return CifLoop.this.size();
            }
        };
    }

    /** The values row by row. */
    List<CifValue> values() {
        return Collections.unmodifiableList(values);
    }

    /**
     * Whether the loop has a column of one of these names.
     *
     * @param names a data name and its aliases
     * @return true if there is one
     */
    public boolean has(String... names) {
        return index(names) >= 0;
    }

    /**
     * One column.
     *
     * @param names a data name and its aliases; the first that the loop has is taken
     * @return the values from the first row to the last, or empty if the loop has none of the names
     */
    public Optional<List<CifValue>> column(String... names) {
        int index = index(names);
        return index < 0 ? Optional.empty() : Optional.of(new Slice(values, index, tags.size(), size()));
    }

    /**
     * One value.
     *
     * @param row the row, from 0
     * @param names a data name and its aliases; the first that the loop has is taken
     * @return the value, or empty if the loop has none of the names
     * @throws IndexOutOfBoundsException if there is no such row
     */
    public Optional<CifValue> value(int row, String... names) {
        List<CifValue> cells = row(row);
        int index = index(names);
        return index < 0 ? Optional.empty() : Optional.of(cells.get(index));
    }

    private int index(String... names) {
        for (String name : names) {
            Integer index = columns.get(CifQuoting.fold(name));
            if (index != null) {
                return index;
            }
        }
        return -1;
    }

    @Override
    public boolean equals(Object other) {
        return other instanceof CifLoop that && tags.equals(that.tags) && values.equals(that.values);
    }

    @Override
    public int hashCode() {
        return 31 * tags.hashCode() + values.hashCode();
    }

    @Override
    public String toString() {
        return "loop of " + size() + " rows: " + CifQuoting.names(tags);
    }

    /** Every {@code stride}-th value from {@code first} on. */
    private static final class Slice extends AbstractList<CifValue> {
        private final List<CifValue> values;
        private final int first;
        private final int stride;
        private final int length;

        Slice(List<CifValue> values, int first, int stride, int length) {
            this.values = values;
            this.first = first;
            this.stride = stride;
            this.length = length;
        }

        @Override
        public CifValue get(int index) {
            return values.get(first + Objects.checkIndex(index, length) * stride);
        }

        @Override
        public int size() {
            return length;
        }
    }
}
