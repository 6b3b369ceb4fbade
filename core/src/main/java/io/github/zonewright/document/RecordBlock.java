package io.github.zonewright.document;

import io.github.zonewright.cif.CifBlock;
import io.github.zonewright.cif.CifDegrees;
import io.github.zonewright.cif.CifException;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.cif.CifItem;
import io.github.zonewright.cif.CifValue;
import io.github.zonewright.cif.CifValueException;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.Function;
import java.util.function.Supplier;

/** A data block read as a record: items that must be there, and are of a type, or a complaint that names item and line. */
final class RecordBlock {
    static final String TYPE_ITEM = "_zonewright_record_type";
    static final String VERSION_ITEM = "_zonewright_record_version";

    private final CifBlock block;

    RecordBlock(CifBlock block) {
        this.block = block;
    }

    /** The first record of a type, provided it is of a version. */
    static RecordBlock find(CifFile file, String type, int version) {
        List<CifValue> types =
                file.blocks().stream().flatMap(b -> b.value(TYPE_ITEM).stream()).toList();
        List<RecordBlock> found = all(file, type, version);
        if (!found.isEmpty()) {
            return found.get(0);
        }
        CifValue wrong = types.isEmpty() ? absent(TYPE_ITEM) : types.get(0);
        throw wrong.fault("a record of type '" + type + "' was expected");
    }

    /** The records of a type, all of a version. */
    static List<RecordBlock> all(CifFile file, String type, int version) {
        List<RecordBlock> found = new ArrayList<>();
        for (CifBlock block : file.blocks()) {
            if (block.value(TYPE_ITEM).map(CifValue::text).filter(type::equals).isPresent()) {
                RecordBlock record = new RecordBlock(block);
                CifValue stated = record.value(VERSION_ITEM);
                if (stated.asInt() != version) {
                    throw stated.fault("a record of version " + version + " was expected");
                }
                found.add(record);
            }
        }
        return found;
    }

    private static CifValue absent(String tag) {
        return new CifItem(tag, CifValue.UNKNOWN).value();
    }

    CifBlock block() {
        return block;
    }

    Optional<CifValue> optional(String tag) {
        return block.value(tag).filter(CifValue::isKnown);
    }

    /** The value of an item that may be ? or . but must be there. */
    CifValue value(String tag) {
        return block.value(tag).orElseThrow(() -> missing(tag));
    }

    CifValueException missing(String tag) {
        return absent(tag).fault("the record in block '" + block.name() + "' needs this item");
    }

    /** The column of an item, which must have so many rows; none of it need be there for no rows. */
    List<CifValue> column(String tag, int rows) {
        List<CifValue> column = block.values(tag);
        if (column.isEmpty() && rows > 0) {
            throw missing(tag);
        }
        if (column.size() != rows) {
            throw column.get(column.size() - 1)
                    .fault(rows + " rows were expected, as the record counts, but there are " + column.size());
        }
        return column;
    }

    /** The column of an item, of any number of rows. */
    List<CifValue> column(String tag) {
        return block.values(tag);
    }

    /** How many rows a loop has. */
    int count(String tag) {
        CifValue value = value(tag);
        if (value.asInt() < 0) {
            throw value.fault("a count from 0 was expected");
        }
        return value.asInt();
    }

    int integer(String tag) {
        return value(tag).asInt();
    }

    double number(String tag) {
        return number(value(tag));
    }

    double radians(String tag) {
        CifValue value = value(tag);
        return value.isKnown() ? CifDegrees.radians(value) : number(value);
    }

    boolean yes(String tag) {
        return yes(value(tag));
    }

    /** Takes a value that follows from others and must not contradict them. */
    void confirm(String tag, double expected, double tolerance) {
        CifValue value = value(tag);
        if (!(Math.abs(number(value) - expected) <= tolerance)) {
            throw value.fault(expected + " was expected from the other items of the record");
        }
    }

    /** The same for an angle in radians. */
    void confirmAngle(String tag, double expected, double tolerance) {
        if (!(Math.abs(radians(tag) - expected) <= tolerance)) {
            throw value(tag).fault(Math.toDegrees(expected) + " was expected from the other items of the record");
        }
    }

    static double number(CifValue value) {
        return switch (value.kind()) {
            case UNKNOWN -> Double.NaN;
            case NOT_APPLICABLE -> Double.POSITIVE_INFINITY;
            default -> value.asNumber().value();
        };
    }

    static boolean yes(CifValue value) {
        return switch (value.text()) {
            case "yes" -> true;
            case "no" -> false;
            default -> throw value.fault("yes or no was expected");
        };
    }

    /** Makes an object of items, and lays its complaint about a value at the door of the first item. */
    <T> T make(String tag, Supplier<T> maker) {
        return blame(value(tag), v -> maker.get());
    }

    static <T> T blame(CifValue value, Function<CifValue, T> maker) {
        try {
            return maker.apply(value);
        } catch (CifException e) {
            throw e;
        } catch (IllegalArgumentException e) {
            CifValueException fault = value.fault(e.getMessage());
            fault.initCause(e);
            throw fault;
        }
    }
}
