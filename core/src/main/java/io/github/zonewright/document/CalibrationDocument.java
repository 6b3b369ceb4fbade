package io.github.zonewright.document;

import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.calibration.MicroscopeSetting;
import io.github.zonewright.cif.CifBlock;
import io.github.zonewright.cif.CifBlockBuilder;
import io.github.zonewright.cif.CifDegrees;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.cif.CifValue;
import io.github.zonewright.cif.CifVersion;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.MeasuredValue;
import java.io.IOException;
import java.nio.file.Path;
import java.time.LocalDate;
import java.time.format.DateTimeParseException;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * A calibration as a CIF. The package's description lists the items; what is read back equals what was written in every bit.
 *
 * <p><b>Known limit.</b> One record to a file; of several, the first is read.
 *
 * @param calibration the calibration
 */
public record CalibrationDocument(Calibration calibration) {
    static final String TYPE = "calibration";
    static final int VERSION = 1;

    private static final double WAVELENGTH_TOLERANCE = 1e-6;

    /**
     * The record as a CIF.
     *
     * @return the file
     * @throws IllegalArgumentException if a text has a character that a CIF cannot hold
     */
    public CifFile toCif() {
        CifBlockBuilder out = CifBlock.builder("zonewright_calibration");
        MicroscopeSetting setting = calibration.setting();
        out.add(RecordBlock.TYPE_ITEM, TYPE).add(RecordBlock.VERSION_ITEM, VERSION);
        out.add("_audit_creation_date", calibration.date().toString());
        out.add("_zonewright_calibration_name", calibration.name());
        out.add("_zonewright_calibration_standard", calibration.standard());
        out.comment("The setting: kV, Angstrom, mm, micrometres.");
        out.add("_diffrn_measurement_device_details", setting.instrument());
        out.add("_diffrn_radiation_probe", "electron");
        out.add("_diffrn_source_voltage", setting.kilovolts());
        out.add(
                "_diffrn_radiation_wavelength",
                Beam.ofKilovolts(setting.kilovolts()).wavelength());
        out.add("_zonewright_camera_length_nominal", optional(setting.cameraLength()));
        out.add("_zonewright_detector_pixel_size", optional(setting.pixelSize()));
        out.add("_zonewright_detector_binning", setting.binning());
        out.comment("The camera: px Angstrom, degrees; X right, Y up on the screen.");
        out.add("_zonewright_camera_constant", calibration.constant().value());
        out.add("_zonewright_camera_constant_su", calibration.constant().error());
        out.add("_zonewright_camera_ellipse_ratio", calibration.ellipseRatio().value());
        out.add(
                "_zonewright_camera_ellipse_ratio_su",
                calibration.ellipseRatio().error());
        angle(out, "_zonewright_camera_ellipse_azimuth", calibration.ellipseAzimuth());
        out.add("_zonewright_camera_mirrored", calibration.mirrored() ? "yes" : "no");
        calibration.imageRotation().ifPresent(rotation -> angle(out, "_zonewright_image_rotation", rotation));
        CifBlock block = out.build();
        CifFile plain = CifFile.of(block);
        boolean ascii = plain.toText().chars().allMatch(c -> c < 128);
        return ascii ? plain : CifFile.of(CifVersion.CIF_2_0, block);
    }

    private static void angle(CifBlockBuilder out, String tag, MeasuredValue angle) {
        out.add(tag, CifDegrees.ofRadians(angle.value()));
        out.add(tag + "_su", CifDegrees.ofRadians(angle.error()));
    }

    private static CifValue optional(OptionalDouble number) {
        return number.isPresent() ? CifValue.of(number.getAsDouble()) : CifValue.UNKNOWN;
    }

    /**
     * Writes the record, whole or not at all.
     *
     * @param path the file
     * @throws IOException if it cannot be written; an older file is then as it was
     * @throws IllegalArgumentException if a text has a character that a CIF cannot hold
     */
    public void write(Path path) throws IOException {
        toCif().write(path);
    }

    /**
     * Reads a record from its file.
     *
     * @param path the file
     * @return the record
     * @throws IOException if the file cannot be read
     * @throws io.github.zonewright.cif.CifException if it is no CIF, no record of a calibration or one of another version, or
     *     an item is missing or unfit; it names item and line
     */
    public static CalibrationDocument read(Path path) throws IOException {
        return read(CifFile.read(path));
    }

    /**
     * Reads a record.
     *
     * @param file the file
     * @return the record
     * @throws io.github.zonewright.cif.CifException if there is no record of a calibration in it or one of another version, or
     *     an item is missing or unfit; it names item and line
     */
    public static CalibrationDocument read(CifFile file) {
        RecordBlock in = RecordBlock.find(file, TYPE, VERSION);
        CifValue probe = in.value("_diffrn_radiation_probe");
        if (!probe.text().equals("electron")) {
            throw probe.fault("electron was expected");
        }
        String voltage = "_diffrn_source_voltage";
        Beam beam = in.make(voltage, () -> Beam.ofKilovolts(in.number(voltage)));
        in.confirm("_diffrn_radiation_wavelength", beam.wavelength(), WAVELENGTH_TOLERANCE * beam.wavelength());
        MicroscopeSetting setting = in.make(
                "_zonewright_detector_binning",
                () -> new MicroscopeSetting(
                        in.value("_diffrn_measurement_device_details").text(),
                        beam.kilovolts(),
                        optional(in, "_zonewright_camera_length_nominal"),
                        optional(in, "_zonewright_detector_pixel_size"),
                        in.integer("_zonewright_detector_binning")));
        String rotation = "_zonewright_image_rotation";
        return new CalibrationDocument(in.make(
                "_zonewright_camera_constant",
                () -> new Calibration(
                        in.value("_zonewright_calibration_name").text(),
                        setting,
                        date(in.value("_audit_creation_date")),
                        in.value("_zonewright_calibration_standard").text(),
                        new MeasuredValue(
                                in.number("_zonewright_camera_constant"), in.number("_zonewright_camera_constant_su")),
                        new MeasuredValue(
                                in.number("_zonewright_camera_ellipse_ratio"),
                                in.number("_zonewright_camera_ellipse_ratio_su")),
                        angle(in, "_zonewright_camera_ellipse_azimuth"),
                        in.yes("_zonewright_camera_mirrored"),
                        in.optional(rotation).map(v -> angle(in, rotation)))));
    }

    private static MeasuredValue angle(RecordBlock in, String tag) {
        return new MeasuredValue(in.radians(tag), in.radians(tag + "_su"));
    }

    private static OptionalDouble optional(RecordBlock in, String tag) {
        Optional<CifValue> value = in.optional(tag);
        return value.isPresent() ? OptionalDouble.of(RecordBlock.number(value.get())) : OptionalDouble.empty();
    }

    private static LocalDate date(CifValue value) {
        try {
            return LocalDate.parse(value.text());
        } catch (DateTimeParseException e) {
            throw value.fault("a day such as 2026-03-01 was expected");
        }
    }
}
