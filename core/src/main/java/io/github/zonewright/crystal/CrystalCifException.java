package io.github.zonewright.crystal;

import io.github.zonewright.cif.CifBlock;
import io.github.zonewright.cif.CifEntry;
import io.github.zonewright.cif.CifItem;
import io.github.zonewright.cif.CifLoop;
import io.github.zonewright.cif.CifValue;

/** A CIF that is well formed but holds no crystal that could be used; the message names line and item. */
public final class CrystalCifException extends IllegalArgumentException {
    private static final long serialVersionUID = 1L;

    private final int line;
    private final String item;

    private CrystalCifException(int line, String item, String message) {
        super((line > 0 ? "line " + line + ", " : "") + item + ": " + message);
        this.line = line;
        this.item = item;
    }

    /** A value that is there but cannot be used. */
    static CrystalCifException at(CifValue value, String message) {
        return new CrystalCifException(value.line(), value.item(), message);
    }

    /** An item that a block should have; the line is that of its ? or, without one, of the block's first value. */
    static CrystalCifException missing(CifBlock block, String item, String message) {
        int line = block.value(item)
                .map(CifValue::line)
                .filter(n -> n > 0)
                .orElseGet(() -> block.entries().stream()
                        .map(CrystalCifException::line)
                        .filter(n -> n > 0)
                        .findFirst()
                        .orElse(1));
        return new CrystalCifException(line, item, "block " + block.name() + " " + message);
    }

    private static int line(CifEntry entry) {
        if (entry instanceof CifItem item) {
            return item.value().line();
        }
        return entry instanceof CifLoop loop && loop.size() > 0
                ? loop.row(0).get(0).line()
                : 0;
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
     * The item at fault.
     *
     * @return the data name
     */
    public String item() {
        return item;
    }
}
