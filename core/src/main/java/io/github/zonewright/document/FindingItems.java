package io.github.zonewright.document;

import io.github.zonewright.cif.CifBlockBuilder;
import io.github.zonewright.cif.CifValue;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.indexing.Discrimination.Sight;
import io.github.zonewright.indexing.Discrimination.TellingSpot;
import io.github.zonewright.indexing.Grain;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.SpotMatch;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.PlaneNormal;
import io.github.zonewright.orientation.Misorientation;
import io.github.zonewright.orientation.OrientationRelation;
import io.github.zonewright.pattern.Placement;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Optional;

/** What was found out beside a fit, as items of a record and back. */
final class FindingItems {
    /** In the loop of a further crystal's explained spots: whether another solution explains the spot too. */
    static final String SHARED = "_zonewright_refln_shared";

    /** In radians; far below what spots can tell, far above rounding. */
    private static final double ANGLE_TOLERANCE = 1e-6;

    private static final String ANGLE = "_zonewright_grain_misorientation_angle";
    private static final String AXIS = "_zonewright_grain_misorientation_axis_";
    private static final List<String> RELATION =
            List.of("_zonewright_grain_relation_name", "_zonewright_grain_relation_deviation");
    private static final String OTHER = "_zonewright_apart_other";
    private static final String DETAILS = "_zonewright_apart_details";
    private static final String TILT_X = "_zonewright_apart_tilt_x";
    private static final String TILT_Y = "_zonewright_apart_tilt_y";
    private static final List<String> TELLING = List.of(
            "_zonewright_telling_index_h",
            "_zonewright_telling_index_k",
            "_zonewright_telling_index_l",
            "_zonewright_telling_of",
            "_zonewright_telling_x",
            "_zonewright_telling_y",
            "_zonewright_telling_strength",
            "_zonewright_telling_strength_other",
            "_zonewright_telling_sight");

    private FindingItems() {}

    /** How a further crystal stands to the first; it follows from both placements and is there for people. */
    static void write(Grain grain, CifBlockBuilder out) {
        Misorientation m = grain.misorientation();
        PlaneNormal.Direction axis = m.nearestDirection();
        out.comment(
                "Turned from the fit's crystal: angle, the nearest lattice direction of that crystal to the axis, and how"
                        + "\nfar the axis is off it, in degrees.");
        out.add(ANGLE, FitWriter.angle(m.angle()));
        out.add(AXIS + "u", axis.uvw().u());
        out.add(AXIS + "v", axis.uvw().v());
        out.add(AXIS + "w", axis.uvw().w());
        out.add(AXIS + "off", FitWriter.angle(axis.angle()));
        FitWriter.loop(
                out,
                RELATION,
                grain.relations().stream().map(FindingItems::cells).toList());
    }

    private static List<CifValue> cells(OrientationRelation relation) {
        return List.of(CifValue.of(relation.name().replace("Σ", "Sigma ")), FitWriter.angle(relation.deviation()));
    }

    static Grain grain(RecordBlock in, Solution solution, Placement first) {
        List<CifValue> flags = in.column(SHARED, solution.matches().size());
        List<SpotMatch> shared = new ArrayList<>();
        for (int i = 0; i < flags.size(); i++) {
            if (RecordBlock.yes(flags.get(i))) {
                shared.add(solution.matches().get(i));
            }
        }
        Grain grain = Grain.of(solution, shared, first);
        in.confirmAngle(ANGLE, grain.misorientation().angle(), ANGLE_TOLERANCE);
        return grain;
    }

    static void write(ToldApart apart, CifBlockBuilder out) {
        out.comment("What tells the fit from another answer; the tilt is a rotation of the specimen, in degrees.");
        out.add(OTHER, apart.other());
        apart.tilt().ifPresent(tilt -> {
            out.add(TILT_X, FitWriter.angle(tilt.x()));
            out.add(TILT_Y, FitWriter.angle(tilt.y()));
        });
        FitWriter.loop(
                out,
                List.of(DETAILS),
                apart.sentences().stream()
                        .map(s -> List.of(CifValue.of(s.replace("°", " degrees"))))
                        .toList());
        FitWriter.loop(
                out, TELLING, apart.spots().stream().map(FindingItems::cells).toList());
    }

    private static List<CifValue> cells(TellingSpot spot) {
        return List.of(
                CifValue.of(spot.hkl().h()),
                CifValue.of(spot.hkl().k()),
                CifValue.of(spot.hkl().l()),
                CifValue.of(spot.ofFirst() ? "fit" : "other"),
                FitWriter.number(spot.place().x()),
                FitWriter.number(spot.place().y()),
                FitWriter.number(spot.strength()),
                FitWriter.number(spot.otherStrength()),
                CifValue.of(code(spot.sight())));
    }

    static Optional<ToldApart> apart(RecordBlock in) {
        return in.optional(OTHER)
                .map(other -> new ToldApart(
                        other.text(),
                        in.column(DETAILS).stream()
                                .map(v -> v.text().replace(" degrees", "°"))
                                .toList(),
                        telling(in),
                        in.optional(TILT_X).map(x -> new Vector3(in.radians(TILT_X), in.radians(TILT_Y), 0))));
    }

    private static List<TellingSpot> telling(RecordBlock in) {
        int rows = in.column(TELLING.get(0)).size();
        List<List<CifValue>> columns =
                TELLING.stream().map(tag -> in.column(tag, rows)).toList();
        List<TellingSpot> spots = new ArrayList<>();
        for (int i = 0; i < rows; i++) {
            int row = i;
            List<CifValue> c = columns.stream().map(column -> column.get(row)).toList();
            spots.add(new TellingSpot(
                    new Hkl(c.get(0).asInt(), c.get(1).asInt(), c.get(2).asInt()),
                    isOfFit(c.get(3)),
                    new PixelPoint(RecordBlock.number(c.get(4)), RecordBlock.number(c.get(5))),
                    RecordBlock.number(c.get(6)),
                    RecordBlock.number(c.get(7)),
                    sight(c.get(8))));
        }
        return spots;
    }

    private static boolean isOfFit(CifValue value) {
        return switch (value.text()) {
            case "fit" -> true;
            case "other" -> false;
            default -> throw value.fault("fit or other was expected");
        };
    }

    private static Sight sight(CifValue value) {
        return Arrays.stream(Sight.values())
                .filter(s -> code(s).equals(value.text()))
                .findFirst()
                .orElseThrow(() -> value.fault("seen, not_seen, hidden or outside was expected"));
    }

    private static String code(Sight sight) {
        return sight.name().toLowerCase(Locale.ROOT);
    }
}
