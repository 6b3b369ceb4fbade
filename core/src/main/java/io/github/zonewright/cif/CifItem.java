package io.github.zonewright.cif;

import java.util.Objects;

/**
 * A data name with its one value.
 *
 * @param tag the data name, with its leading underscore, as it was written
 * @param value the value
 */
public record CifItem(String tag, CifValue value) implements CifEntry {
    /**
     * Checks the name and tells the value its item.
     *
     * @throws IllegalArgumentException if the tag is no data name
     */
    public CifItem {
        CifCharacters.requireTag(tag);
        value = Objects.requireNonNull(value, "value").in(tag);
    }
}
