package io.github.zonewright.document;

import io.github.zonewright.cif.CifValue;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalCif;
import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.indexing.Grain;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.SolutionErrors;
import io.github.zonewright.indexing.SpotMatch;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredSpot;
import java.time.OffsetDateTime;
import java.time.format.DateTimeParseException;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;

/** Takes a record of a fit out of its block. */
final class FitReader {
    /** Relative; wider than another release of the natural constants would move a wavelength. */
    private static final double WAVELENGTH_TOLERANCE = 1e-6;

    /** In 1/Å; far below what a spot shows, far above rounding. */
    private static final double UB_TOLERANCE = 1e-9;

    private final RecordBlock in;
    private final Optional<Crystal> common;

    /** Reads a record that holds its own crystal. */
    FitReader(RecordBlock in) {
        this(in, Optional.empty());
    }

    /** Reads one that need not, as another solution does which is of the same crystal. */
    FitReader(RecordBlock in, Optional<Crystal> common) {
        this.in = in;
        this.common = common;
    }

    FitDocument document() {
        Placement placement = placement();
        CifValue state = in.value("_zonewright_fit_state");
        Optional<Solution> solution = switch (state.text()) {
            case "solution" -> Optional.of(solution(placement));
            case "placement" -> Optional.empty();
            default -> throw state.fault("solution or placement was expected");
        };
        String software =
                in.optional("_computing_data_reduction").map(CifValue::text).orElse("");
        Optional<ImageReference> image = image();
        FitFindings findings = new FitFindings(List.of(), FindingItems.apart(in));
        return new FitDocument(
                placement, solution, image, created(), software, findings, HandlingItems.read(in, image));
    }

    /** Reads the block of a further crystal. */
    Grain grain(Placement first) {
        Solution solution = solution(placement());
        return FindingItems.grain(in, solution, first);
    }

    private Optional<OffsetDateTime> created() {
        return in.optional("_audit_creation_date").map(value -> {
            try {
                return OffsetDateTime.parse(value.text());
            } catch (DateTimeParseException e) {
                throw value.fault("a time such as 2026-03-01T14:05:00Z was expected");
            }
        });
    }

    private Optional<ImageReference> image() {
        return in.optional("_zonewright_image_file_name")
                .map(name -> RecordBlock.blame(
                        name,
                        v -> new ImageReference(
                                v.text(),
                                in.integer("_zonewright_image_width"),
                                in.integer("_zonewright_image_height"),
                                in.optional("_zonewright_image_sha256").map(CifValue::text))));
    }

    private Placement placement() {
        Crystal crystal = crystal();
        Placement placement = new Placement(crystal, beam(), setting(), camera());
        Matrix3 ub = placement.orientation().ub(crystal.lattice());
        for (int row = 0; row < 3; row++) {
            for (int column = 0; column < 3; column++) {
                in.confirm(FitWriter.ubItem(row, column), ub.get(row, column), UB_TOLERANCE);
            }
        }
        return placement;
    }

    /** The crystal, with the notices of the file it first came from. */
    private Crystal crystal() {
        if (common.isPresent() && in.block().value("_cell_length_a").isEmpty()) {
            return common.get();
        }
        Crystal read = CrystalCif.asWritten(in.block());
        List<String> notices =
                in.block().values(FitWriter.NOTICE).stream().map(CifValue::text).toList();
        return new Crystal(read.name(), read.lattice(), read.spaceGroup(), read.sites(), notices);
    }

    private Beam beam() {
        CifValue probe = in.value("_diffrn_radiation_probe");
        if (!probe.text().equals("electron")) {
            throw probe.fault("electron was expected");
        }
        String voltage = "_diffrn_source_voltage";
        Beam beam = in.make(voltage, () -> Beam.ofKilovolts(in.number(voltage)));
        in.confirm("_diffrn_radiation_wavelength", beam.wavelength(), WAVELENGTH_TOLERANCE * beam.wavelength());
        return beam;
    }

    private ZoneSetting setting() {
        Uvw zone = new Uvw(
                in.integer("_zonewright_zone_axis_u"),
                in.integer("_zonewright_zone_axis_v"),
                in.integer("_zonewright_zone_axis_w"));
        Hkl reference = new Hkl(
                in.integer("_zonewright_reference_index_h"),
                in.integer("_zonewright_reference_index_k"),
                in.integer("_zonewright_reference_index_l"));
        return in.make(
                "_zonewright_zone_axis_u",
                () -> new ZoneSetting(
                        zone,
                        reference,
                        in.radians("_zonewright_rotation"),
                        in.radians("_zonewright_lean_x"),
                        in.radians("_zonewright_lean_y")));
    }

    private Camera camera() {
        return in.make(
                "_zonewright_camera_constant",
                () -> new Camera(
                        new PixelPoint(
                                in.number("_zonewright_camera_centre_x"), in.number("_zonewright_camera_centre_y")),
                        in.number("_zonewright_camera_constant"),
                        in.number("_zonewright_camera_ellipse_ratio"),
                        in.radians("_zonewright_camera_ellipse_azimuth"),
                        in.yes("_zonewright_camera_mirrored")));
    }

    private Solution solution(Placement placement) {
        SolutionErrors errors = new SolutionErrors(
                in.radians("_zonewright_rotation_su"),
                in.radians("_zonewright_lean_x_su"),
                in.radians("_zonewright_lean_y_su"),
                in.number("_zonewright_camera_centre_x_su"),
                in.number("_zonewright_camera_centre_y_su"),
                in.number("_zonewright_camera_constant_su"));
        return new Solution(
                placement,
                matches(),
                spots(FitWriter.UNEXPLAINED_SPOT, in.count("_zonewright_fit_spots_unexplained")),
                in.number("_zonewright_fit_rms_residual"),
                in.number("_zonewright_fit_score"),
                errors,
                halfTurn(),
                in.column(FitWriter.REMARK).stream().map(CifValue::text).toList(),
                ownScore());
    }

    private OptionalDouble ownScore() {
        return in.optional("_zonewright_fit_own_score").stream()
                .mapToDouble(RecordBlock::number)
                .findFirst();
    }

    private List<SpotMatch> matches() {
        int rows = in.count("_zonewright_fit_spots_explained");
        List<MeasuredSpot> measured = spots(FitWriter.EXPLAINED_SPOT, rows);
        List<List<CifValue>> columns = columns(FitWriter.REFLECTION, rows);
        List<SpotMatch> matches = new ArrayList<>();
        for (int i = 0; i < rows; i++) {
            Hkl hkl = new Hkl(
                    columns.get(0).get(i).asInt(),
                    columns.get(1).get(i).asInt(),
                    columns.get(2).get(i).asInt());
            matches.add(new SpotMatch(
                    measured.get(i),
                    hkl,
                    point(columns.get(3).get(i), columns.get(4).get(i))));
        }
        return matches;
    }

    private List<MeasuredSpot> spots(List<String> tags, int rows) {
        List<List<CifValue>> columns = columns(tags, rows);
        List<MeasuredSpot> spots = new ArrayList<>();
        for (int i = 0; i < rows; i++) {
            int row = i;
            spots.add(RecordBlock.blame(
                    columns.get(2).get(row),
                    su -> new MeasuredSpot(
                            point(columns.get(0).get(row), columns.get(1).get(row)),
                            RecordBlock.number(su),
                            RecordBlock.number(columns.get(3).get(row)),
                            RecordBlock.number(columns.get(4).get(row)),
                            RecordBlock.yes(columns.get(5).get(row)))));
        }
        return spots;
    }

    private List<List<CifValue>> columns(List<String> tags, int rows) {
        return tags.stream().map(tag -> in.column(tag, rows)).toList();
    }

    private static PixelPoint point(CifValue x, CifValue y) {
        return new PixelPoint(RecordBlock.number(x), RecordBlock.number(y));
    }

    private Optional<Orientation> halfTurn() {
        String w = "_zonewright_half_turn_quaternion_w";
        return in.optional(w)
                .map(value -> RecordBlock.blame(
                        value,
                        v -> new Orientation(Rotation.ofQuaternion(
                                in.number(w),
                                in.number("_zonewright_half_turn_quaternion_x"),
                                in.number("_zonewright_half_turn_quaternion_y"),
                                in.number("_zonewright_half_turn_quaternion_z")))));
    }
}
