package io.github.zonewright.document;

import io.github.zonewright.cif.CifBlockBuilder;
import io.github.zonewright.cif.CifValue;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.spots.SpotEdit;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.BitSet;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.stream.Collectors;

/** What a person set by hand, as items of a record and back. */
final class HandlingItems {
    private static final String THICKNESS = "_zonewright_foil_thickness";
    private static final String DARK = "_zonewright_spots_dark";
    private static final String HIDDEN = "_zonewright_hidden_pixels";
    private static final String SHOWN = "_zonewright_shown_mark";
    private static final List<String> RUN =
            List.of("_zonewright_hidden_row", "_zonewright_hidden_first_column", "_zonewright_hidden_last_column");
    private static final List<String> EDIT = List.of(
            "_zonewright_edit_way",
            "_zonewright_edit_x",
            "_zonewright_edit_y",
            "_zonewright_edit_to_x",
            "_zonewright_edit_to_y");

    private HandlingItems() {}

    static void write(FitHandling handling, CifBlockBuilder out) {
        handling.thickness().ifPresent(t -> out.add(THICKNESS, t));
        handling.darkSpots().ifPresent(dark -> out.add(DARK, dark ? "yes" : "no"));
        handling.hidden().ifPresent(mask -> {
            out.add(HIDDEN, mask.count());
            FitWriter.loop(out, RUN, runs(mask));
        });
        FitWriter.loop(
                out, EDIT, handling.edits().stream().map(HandlingItems::cells).toList());
        FitWriter.loop(
                out,
                List.of(SHOWN),
                handling.shown().stream().map(s -> List.of(CifValue.of(s))).toList());
    }

    private static List<CifValue> cells(SpotEdit edit) {
        Optional<PixelPoint> to = edit.to();
        return List.of(
                CifValue.of(code(edit.way())),
                CifValue.of(edit.place().x()),
                CifValue.of(edit.place().y()),
                to.map(p -> CifValue.of(p.x())).orElse(CifValue.NOT_APPLICABLE),
                to.map(p -> CifValue.of(p.y())).orElse(CifValue.NOT_APPLICABLE));
    }

    /** The members of a mask, in pieces of rows. */
    private static List<List<CifValue>> runs(Mask mask) {
        List<List<CifValue>> rows = new ArrayList<>();
        int[] members = mask.members().toArray();
        int width = mask.width();
        int from = 0;
        for (int i = 1; i <= members.length; i++) {
            boolean ends = i == members.length || members[i] != members[i - 1] + 1 || members[i] % width == 0;
            if (ends) {
                rows.add(List.of(
                        CifValue.of(members[from] / width),
                        CifValue.of(members[from] % width),
                        CifValue.of(members[i - 1] % width)));
                from = i;
            }
        }
        return rows;
    }

    static FitHandling read(RecordBlock in, Optional<ImageReference> image) {
        return new FitHandling(
                in.optional(THICKNESS).stream()
                        .mapToDouble(HandlingItems::thickness)
                        .findFirst(),
                in.optional(DARK).map(RecordBlock::yes),
                in.optional(HIDDEN).map(count -> hidden(in, count, image)),
                edits(in),
                in.column(SHOWN).stream().map(HandlingItems::code).collect(Collectors.toSet()));
    }

    private static double thickness(CifValue value) {
        double angstroms = RecordBlock.number(value);
        if (!(angstroms > 0) || Double.isInfinite(angstroms)) {
            throw value.fault("a thickness above 0 was expected");
        }
        return angstroms;
    }

    private static String code(CifValue value) {
        if (!value.text().matches(FitHandling.CODE)) {
            throw value.fault("lower-case letters and underscores were expected");
        }
        return value.text();
    }

    private static Mask hidden(RecordBlock in, CifValue count, Optional<ImageReference> image) {
        if (image.isEmpty()) {
            throw count.fault("the size of the image, _zonewright_image_width and _height, was expected with it");
        }
        int width = image.get().width();
        int height = image.get().height();
        List<CifValue> rows = in.column(RUN.get(0));
        List<CifValue> firsts = in.column(RUN.get(1), rows.size());
        List<CifValue> lasts = in.column(RUN.get(2), rows.size());
        BitSet members = new BitSet();
        for (int i = 0; i < rows.size(); i++) {
            int row = within(rows.get(i), 0, height - 1);
            int first = within(firsts.get(i), 0, width - 1);
            int last = within(lasts.get(i), first, width - 1);
            members.set(row * width + first, row * width + last + 1);
        }
        if (members.cardinality() != count.asInt()) {
            throw count.fault(members.cardinality() + " was expected from the pieces of rows");
        }
        return Mask.of(width, height, members::get);
    }

    private static int within(CifValue value, int least, int most) {
        if (value.asInt() < least || value.asInt() > most) {
            throw value.fault("a whole number from " + least + " to " + most + " was expected");
        }
        return value.asInt();
    }

    private static List<SpotEdit> edits(RecordBlock in) {
        List<CifValue> ways = in.column(EDIT.get(0));
        List<List<CifValue>> places = EDIT.subList(1, EDIT.size()).stream()
                .map(tag -> in.column(tag, ways.size()))
                .toList();
        List<SpotEdit> edits = new ArrayList<>();
        for (int i = 0; i < ways.size(); i++) {
            int row = i;
            Optional<PixelPoint> to = Optional.of(places.get(2).get(row))
                    .filter(CifValue::isKnown)
                    .map(x -> point(x, places.get(3).get(row)));
            edits.add(RecordBlock.blame(
                    ways.get(row),
                    way -> new SpotEdit(
                            way(way),
                            point(places.get(0).get(row), places.get(1).get(row)),
                            to)));
        }
        return edits;
    }

    private static SpotEdit.Way way(CifValue value) {
        return Arrays.stream(SpotEdit.Way.values())
                .filter(way -> code(way).equals(value.text()))
                .findFirst()
                .orElseThrow(() -> value.fault("add, move, remove, centre or find_centre was expected"));
    }

    private static String code(SpotEdit.Way way) {
        return way.name().toLowerCase(Locale.ROOT);
    }

    private static PixelPoint point(CifValue x, CifValue y) {
        return new PixelPoint(x.asNumber().value(), y.asNumber().value());
    }
}
