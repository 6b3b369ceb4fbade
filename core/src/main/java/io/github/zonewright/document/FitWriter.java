package io.github.zonewright.document;

import io.github.zonewright.cif.CifBlock;
import io.github.zonewright.cif.CifBlockBuilder;
import io.github.zonewright.cif.CifDegrees;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.cif.CifLoop;
import io.github.zonewright.cif.CifValue;
import io.github.zonewright.cif.CifVersion;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalCif;
import io.github.zonewright.geometry.Matrix3;
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
import io.github.zonewright.spots.MeasuredSpot;
import java.time.format.DateTimeFormatter;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/** Turns a record of a fit into a CIF. */
final class FitWriter {
    static final String TYPE = "fit";
    static final String ALTERNATIVE = "alternative";
    static final String GRAIN = "grain";
    static final int VERSION = 1;

    static final String NOTICE = "_zonewright_crystal_notice";

    static final List<String> REFLECTION = List.of(
            "_diffrn_refln_index_h",
            "_diffrn_refln_index_k",
            "_diffrn_refln_index_l",
            "_zonewright_refln_computed_x",
            "_zonewright_refln_computed_y");

    static final List<String> EXPLAINED_SPOT = List.of(
            "_zonewright_refln_measured_x",
            "_zonewright_refln_measured_y",
            "_zonewright_refln_measured_su",
            "_diffrn_refln_intensity_net",
            "_zonewright_refln_signal_to_noise",
            "_zonewright_refln_saturated");

    static final String REMARK = "_zonewright_fit_remark";

    /** In the order of {@link #EXPLAINED_SPOT}. */
    static final List<String> UNEXPLAINED_SPOT = List.of(
            "_zonewright_unexplained_x",
            "_zonewright_unexplained_y",
            "_zonewright_unexplained_su",
            "_zonewright_unexplained_intensity_net",
            "_zonewright_unexplained_signal_to_noise",
            "_zonewright_unexplained_saturated");

    private static final String FRAME =
            "UB takes the column (h, k, l) to the scattering vector in 1/Angstrom, |g| = 1/d."
                    + "\nMicroscope frame, right-handed: X right on the screen, Y up, Z out of the screen,"
                    + "\ntowards the electron source. UB = R B; B is of the crystal frame x along a,"
                    + "\nb in the xy plane, z along c*.";

    private final FitDocument document;
    private final Optional<Grain> grain;
    private final CifBlockBuilder out;

    private FitWriter(FitDocument document, String blockName) {
        this(document, blockName, Optional.empty());
    }

    private FitWriter(FitDocument document, String blockName, Optional<Grain> grain) {
        this.document = document;
        this.grain = grain;
        this.out = CifBlock.builder(blockName);
    }

    /** A record, and behind it other solutions of the same search. */
    static CifFile file(FitDocument document, List<Solution> others) {
        List<CifBlock> blocks = new ArrayList<>();
        blocks.add(new FitWriter(document, "zonewright_fit").block(TYPE, true));
        for (Solution other : others) {
            blocks.add(new FitWriter(FitDocument.of(other), "zonewright_alternative_" + blocks.size())
                    .block(ALTERNATIVE, isOfAnotherCrystal(other, document)));
        }
        int number = 0;
        for (Grain grain : document.findings().grains()) {
            FitWriter writer =
                    new FitWriter(FitDocument.of(grain.solution()), "zonewright_grain_" + ++number, Optional.of(grain));
            blocks.add(writer.block(GRAIN, isOfAnotherCrystal(grain.solution(), document)));
        }
        CifBlock[] all = blocks.toArray(CifBlock[]::new);
        CifFile plain = CifFile.of(all);
        boolean ascii = plain.toText().chars().allMatch(c -> c < 128);
        return ascii ? plain : CifFile.of(CifVersion.CIF_2_0, all);
    }

    private static boolean isOfAnotherCrystal(Solution other, FitDocument document) {
        return !other.placement().crystal().equals(document.placement().crystal());
    }

    private CifBlock block(String type, boolean withCrystal) {
        out.add(RecordBlock.TYPE_ITEM, type).add(RecordBlock.VERSION_ITEM, VERSION);
        document.created()
                .ifPresent(t -> out.add("_audit_creation_date", DateTimeFormatter.ISO_OFFSET_DATE_TIME.format(t)));
        if (!document.software().isEmpty()) {
            out.add("_computing_data_reduction", document.software());
        }
        document.image().ifPresent(this::image);
        if (withCrystal) {
            out.comment("The crystal.");
            crystal(document.placement().crystal());
        }
        beam(document.placement().beam());
        setting(document.placement().setting());
        camera(document.placement().camera());
        out.comment("The fit: places in px, standard uncertainties in the units of what they belong to.");
        out.add("_zonewright_fit_state", document.solution().isPresent() ? "solution" : "placement");
        document.solution().ifPresent(this::solution);
        grain.ifPresent(g -> FindingItems.write(g, out));
        document.findings().apart().ifPresent(apart -> FindingItems.write(apart, out));
        HandlingItems.write(document.handling(), out);
        cautions();
        return out.build();
    }

    private void image(ImageReference image) {
        out.add("_zonewright_image_file_name", image.fileName());
        out.add("_zonewright_image_width", image.width());
        out.add("_zonewright_image_height", image.height());
        image.sha256().ifPresent(digits -> out.add("_zonewright_image_sha256", digits));
    }

    private void crystal(Crystal crystal) {
        CrystalCif.toBlock(crystal).entries().forEach(out::add);
        loop(
                List.of(NOTICE),
                crystal.notices().stream().map(n -> List.of(CifValue.of(n))).toList());
    }

    private void beam(Beam beam) {
        out.comment("The instrument: kV, Angstrom.");
        out.add("_diffrn_radiation_probe", "electron");
        out.add("_diffrn_source_voltage", beam.kilovolts());
        out.add("_diffrn_radiation_wavelength", beam.wavelength());
    }

    private void setting(ZoneSetting setting) {
        out.comment("The orientation: degrees; X right, Y up on the screen, Z towards the source.");
        Uvw zone = setting.zone();
        out.add("_zonewright_zone_axis_u", zone.u());
        out.add("_zonewright_zone_axis_v", zone.v());
        out.add("_zonewright_zone_axis_w", zone.w());
        Hkl reference = setting.reference();
        out.add("_zonewright_reference_index_h", reference.h());
        out.add("_zonewright_reference_index_k", reference.k());
        out.add("_zonewright_reference_index_l", reference.l());
        out.add("_zonewright_rotation", angle(setting.rotation()));
        out.add("_zonewright_lean_x", angle(setting.leanX()));
        out.add("_zonewright_lean_y", angle(setting.leanY()));
        out.add("_diffrn_orient_matrix_type", FRAME);
        Matrix3 ub = document.placement()
                .orientation()
                .ub(document.placement().crystal().lattice());
        for (int row = 0; row < 3; row++) {
            for (int column = 0; column < 3; column++) {
                out.add(ubItem(row, column), ub.get(row, column));
            }
        }
    }

    static String ubItem(int row, int column) {
        return "_diffrn_orient_matrix_UB_" + (row + 1) + (column + 1);
    }

    private void camera(Camera camera) {
        out.comment("The camera: px, the constant px Angstrom; x right, y down from the corner of the image.");
        out.add("_zonewright_camera_centre_x", camera.centre().x());
        out.add("_zonewright_camera_centre_y", camera.centre().y());
        out.add("_zonewright_camera_constant", camera.constant());
        out.add("_zonewright_camera_ellipse_ratio", camera.ellipseRatio());
        out.add("_zonewright_camera_ellipse_azimuth", angle(camera.ellipseAzimuth()));
        out.add("_zonewright_camera_mirrored", yesNo(camera.mirrored()));
    }

    private void solution(Solution solution) {
        out.add("_zonewright_fit_rms_residual", number(solution.rmsResidual()));
        out.add("_zonewright_fit_score", number(solution.score()));
        solution.ownScore().ifPresent(own -> out.add("_zonewright_fit_own_score", number(own)));
        out.add("_zonewright_fit_spots_explained", solution.matches().size());
        out.add("_zonewright_fit_spots_unexplained", solution.unexplained().size());
        SolutionErrors errors = solution.errors();
        out.add("_zonewright_rotation_su", angle(errors.rotation()));
        out.add("_zonewright_lean_x_su", angle(errors.leanX()));
        out.add("_zonewright_lean_y_su", angle(errors.leanY()));
        out.add("_zonewright_camera_centre_x_su", number(errors.centreX()));
        out.add("_zonewright_camera_centre_y_su", number(errors.centreY()));
        out.add("_zonewright_camera_constant_su", number(errors.constant()));
        solution.halfTurn().ifPresent(this::halfTurn);
        matches(solution.matches());
        loop(
                UNEXPLAINED_SPOT,
                solution.unexplained().stream().map(FitWriter::cells).toList());
        loop(
                List.of(REMARK),
                solution.remarks().stream().map(r -> List.of(CifValue.of(r))).toList());
    }

    private void halfTurn(Orientation mate) {
        double[] q = mate.rotation().quaternion();
        out.add("_zonewright_half_turn_quaternion_w", q[0]);
        out.add("_zonewright_half_turn_quaternion_x", q[1]);
        out.add("_zonewright_half_turn_quaternion_y", q[2]);
        out.add("_zonewright_half_turn_quaternion_z", q[3]);
    }

    private void matches(List<SpotMatch> matches) {
        List<List<CifValue>> rows = new ArrayList<>();
        for (SpotMatch match : matches) {
            List<CifValue> row = new ArrayList<>(List.of(
                    CifValue.of(match.hkl().h()),
                    CifValue.of(match.hkl().k()),
                    CifValue.of(match.hkl().l()),
                    number(match.computed().x()),
                    number(match.computed().y())));
            row.addAll(cells(match.measured()));
            grain.ifPresent(g -> row.add(yesNo(g.shared().contains(match))));
            rows.add(row);
        }
        List<String> tags = new ArrayList<>(REFLECTION);
        tags.addAll(EXPLAINED_SPOT);
        grain.ifPresent(g -> tags.add(FindingItems.SHARED));
        loop(tags, rows);
    }

    private static List<CifValue> cells(MeasuredSpot spot) {
        return List.of(
                number(spot.position().x()),
                number(spot.position().y()),
                number(spot.positionError()),
                number(spot.intensity()),
                number(spot.signalToNoise()),
                yesNo(spot.saturated()));
    }

    private void cautions() {
        loop(
                List.of("_zonewright_caution_code", "_zonewright_caution_details"),
                document.cautions().stream()
                        .map(c -> List.of(CifValue.of(c.code()), CifValue.of(c.details())))
                        .toList());
    }

    private void loop(List<String> tags, List<List<CifValue>> rows) {
        loop(out, tags, rows);
    }

    /** Adds a loop; a CIF has none without rows. */
    static void loop(CifBlockBuilder out, List<String> tags, List<List<CifValue>> rows) {
        if (!rows.isEmpty()) {
            out.add(CifLoop.of(tags, rows));
        }
    }

    static CifValue angle(double radians) {
        return Double.isFinite(radians) ? CifDegrees.ofRadians(radians) : number(radians);
    }

    /** A number; what is not known is a question mark, what is infinite a full stop. */
    static CifValue number(double number) {
        if (Double.isNaN(number)) {
            return CifValue.UNKNOWN;
        }
        return number == Double.POSITIVE_INFINITY ? CifValue.NOT_APPLICABLE : CifValue.of(number);
    }

    private static CifValue yesNo(boolean yes) {
        return CifValue.of(yes ? "yes" : "no");
    }
}
