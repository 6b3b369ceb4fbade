package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.imagej.bridge.ReciprocalCalibration;
import io.github.zonewright.imagej.session.AppliedCalibration;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.ScaleKind;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import java.awt.Component;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import javax.swing.JCheckBox;
import javax.swing.JComboBox;
import javax.swing.JLabel;

/** Voltage, scale and mirror. */
final class InstrumentSection extends Section {
    private static final long serialVersionUID = 1L;
    private static final int DERIVED_WIDTH = 320;

    private final CheckedField<Double> kilovolts = new CheckedField<>("kilovolts", 6, Reading.number(0.01, 3000));
    private final JComboBox<String> kind = new JComboBox<>();
    private final CheckedField<Double> scale = new CheckedField<>("scale", 8, Reading.number(1e-3, 1e6));
    private final JLabel scaleUnit = Looks.label("px·Å");
    private final CheckedField<Double> tolerance = new CheckedField<>("tolerance", 4, Reading.number(0.1, 20));
    private final CheckedField<Double> pixel = new CheckedField<>("pixel size", 6, Reading.number(1e-3, 1e4));
    private final CheckedField<Integer> binning = new CheckedField<>("binning", 3, Reading.whole(1, 64));
    private final JCheckBox mirrored = new JCheckBox("Image is mirrored");
    private final JLabel derived = Looks.quiet(" ");
    private final transient CalibrationPanel calibrations = new CalibrationPanel();
    private final ImageCalibrationRow imageCalibration = new ImageCalibrationRow();
    private final JLabel onMicrograph = Looks.quiet("");
    private final transient List<Component> pixelRow;
    private transient Runnable onChange = () -> {};
    private boolean quiet;

    InstrumentSection() {
        super("Instrument");
        for (ScaleKind each : ScaleKind.values()) {
            kind.addItem(each.label());
        }
        kind.setFont(Looks.text());
        kind.setMaximumSize(kind.getPreferredSize());
        mirrored.setFont(Looks.text());
        mirrored.setName("mirrored");
        kind.setName("scale kind");
        kind.setToolTipText("How the scale of the image is known to you");
        kilovolts.setToolTipText("Accelerating voltage of the microscope");
        scale.setToolTipText("The scale as it is known; R·d = camera constant");
        tolerance.setToolTipText("How far the scale may be off in the search");
        pixel.setToolTipText("Size of a pixel: as recorded for mm·Å, unbinned for the camera length");
        binning.setToolTipText("Pixels joined to one along each side");
        mirrored.setToolTipText("Set when left and right are swapped against the view from the electron source");
        row("Voltage", kilovolts, Looks.label("kV"), mirrored, kilovolts.reasonLabel());
        row("Calibration", calibrations.list());
        row("", calibrations.rings(), calibrations.manage(), imageCalibration.set(), imageCalibration.back());
        wide(line(calibrations.image()));
        row("Scale given as", kind);
        row(
                "Scale",
                scale,
                scaleUnit,
                Looks.label("good to"),
                tolerance,
                Looks.label("%"),
                scale.reasonLabel(),
                tolerance.reasonLabel());
        pixelRow = row(
                "Pixel size", pixel, Looks.label("µm,  binning"), binning, pixel.reasonLabel(), binning.reasonLabel());
        row("", derived);
        saying(calibrations.facts());
        saying(calibrations.warning());
        saying(onMicrograph);
        saying(imageCalibration.note());
        kilovolts.onChange(this::changed);
        scale.onChange(this::changed);
        tolerance.onChange(this::changed);
        pixel.onChange(this::changed);
        binning.onChange(this::changed);
        kind.addActionListener(e -> changed());
        mirrored.addActionListener(e -> changed());
        calibrations.onChoose(this::choose);
        calibrations.onChange(this::changed);
        onMicrograph.setName("on the micrograph");
        show(Instrument.last());
    }

    CalibrationPanel calibrations() {
        return calibrations;
    }

    /** Takes a calibration for the image and tells the listener. */
    void use(AppliedCalibration other, int imageBinning) {
        kilovolts.value().ifPresent(kv -> {
            show(instrument().orElse(Instrument.last()).withKilovolts(kv).with(other, imageBinning));
            onChange.run();
        });
    }

    /** Takes one for the image; binning that was told before is that of the image, whatever the calibration was made at. */
    void choose(Optional<AppliedCalibration> chosen) {
        if (chosen.isEmpty()) {
            kind.setSelectedItem(ScaleKind.PIXELS.label());
            return;
        }
        int made = chosen.get().calibration().setting().binning();
        use(chosen.get(), kind().needsBinning() ? binning.value().orElse(made) : made);
        instrument().ifPresent(said -> said.applied().ifPresent(applied -> record(said, applied)));
    }

    /** Records that a kept calibration is applied to the image. */
    private static void record(Instrument said, AppliedCalibration applied) {
        Recording.of(
                "Apply Calibration...",
                List.of(
                        new Recording.Option(
                                "calibration", applied.calibration().name()),
                        new Recording.Option("kilovolts", Reading.text(said.kilovolts())),
                        new Recording.Option("binning", Integer.toString(said.binning())),
                        new Recording.Option("cameralength", text(applied.cameraLength())),
                        new Recording.Option("pixelsize", text(applied.pixelSize()))));
    }

    private static String text(OptionalDouble number) {
        return number.isPresent() ? Reading.text(number.getAsDouble()) : "";
    }

    void onChange(Runnable listener) {
        onChange = listener;
    }

    /** What is said, or empty while something is wrong. */
    Optional<Instrument> instrument() {
        ScaleKind chosen = kind();
        boolean right = kilovolts.value().isPresent()
                && tolerance.value().isPresent()
                && (chosen == ScaleKind.IMAGE || scale.value().isPresent())
                && (chosen != ScaleKind.CALIBRATION || calibrations.applied().isPresent())
                && (!chosen.needsPixelSize() || pixel.value().isPresent())
                && (!chosen.needsBinning() || binning.value().isPresent());
        if (!right) {
            return Optional.empty();
        }
        return Optional.of(new Instrument(
                kilovolts.value().get(),
                chosen,
                scale.value().orElse(1.0),
                pixel.value().orElse(1.0),
                binning.value().orElse(1),
                tolerance.value().get(),
                mirrored.isSelected(),
                chosen == ScaleKind.CALIBRATION ? calibrations.applied() : Optional.empty()));
    }

    /** Shows an instrument without telling the listener. */
    void show(Instrument instrument) {
        quiet = true;
        kilovolts.show(Reading.text(instrument.kilovolts()));
        kind.setSelectedItem(instrument.kind().label());
        // A scale that nobody told would look like one that is known.
        boolean told = Instrument.isRemembered() || !instrument.equals(Instrument.last());
        scale.show(told ? Reading.text(instrument.scale()) : "");
        pixel.show(Reading.text(instrument.pixelMicrometres()));
        binning.show(Integer.toString(instrument.binning()));
        tolerance.show(Reading.text(instrument.tolerancePercent()));
        mirrored.setSelected(instrument.mirrored());
        calibrations.show(instrument.kind() == ScaleKind.CALIBRATION ? instrument.applied() : Optional.empty());
        quiet = false;
        arrange();
    }

    /** Says what follows from the values; returns the reason why no camera constant follows, or nothing. */
    Optional<String> derive(ImagePlus image, Optional<Placement> laid) {
        Optional<Instrument> now = instrument();
        calibrations.describe(now);
        summary(now.map(InstrumentSection::summary).orElse("to be put right"));
        imageCalibration.show(Optional.ofNullable(image));
        onMicrograph.setText(now.flatMap(Instrument::calibration)
                .flatMap(c -> laid.flatMap(p -> onMicrograph(c, p.setting())))
                .orElse(""));
        if (now.isEmpty()) {
            derived.setText(" ");
            boolean untold = kind() != ScaleKind.IMAGE
                    && kind() != ScaleKind.CALIBRATION
                    && scale.getText().isBlank();
            return Optional.of(
                    kind() == ScaleKind.CALIBRATION && !calibrations.isChosen()
                            ? "Choose a calibration under Instrument, or another way to give the scale."
                            : untold
                                    ? "Give the scale under Instrument: a camera constant, a camera length, or a calibration."
                                    : "Put right what is marked under Instrument.");
        }
        try {
            double constant = now.get().cameraConstant(image);
            derived.setForeground(Looks.QUIET);
            String from = kind() == ScaleKind.IMAGE
                    ? ";  " + ReciprocalCalibration.of(image).explanation()
                    : "";
            derived.setText(Looks.wrapped(
                    String.format(
                            Locale.ROOT,
                            "%.5g px·Å;  wavelength %.5f Å%s",
                            constant,
                            now.get().beam().wavelength(),
                            from),
                    DERIVED_WIDTH));
            return Optional.empty();
        } catch (IllegalArgumentException e) {
            derived.setForeground(Looks.WRONG);
            derived.setText(Looks.wrapped(e.getMessage(), DERIVED_WIDTH));
            return Optional.of(e.getMessage());
        }
    }

    private static String summary(Instrument said) {
        String scale = said.kind() == ScaleKind.IMAGE
                ? said.kind().label()
                : Reading.text(said.scale()) + " " + said.kind().unit();
        return Reading.text(said.kilovolts()) + " kV, " + scale + " ± " + Reading.text(said.tolerancePercent()) + " %";
    }

    private static Optional<String> onMicrograph(Calibration calibration, ZoneSetting setting) {
        return calibration
                .azimuthInImage(setting.rotation())
                .map(azimuth -> String.format(
                        Locale.ROOT,
                        "On the micrograph %s points to %.2f°.",
                        setting.reference(),
                        Math.toDegrees(azimuth)));
    }

    private ScaleKind kind() {
        return ScaleKind.values()[Math.max(0, kind.getSelectedIndex())];
    }

    private void arrange() {
        ScaleKind chosen = kind();
        boolean byCalibration = chosen == ScaleKind.CALIBRATION;
        scale.setEnabled(chosen != ScaleKind.IMAGE && !byCalibration);
        calibrations.image().setVisible(byCalibration);
        scaleUnit.setText(chosen.unit());
        pixel.setEnabled(chosen.needsPixelSize());
        binning.setEnabled(chosen.needsBinning());
        pixelRow.forEach(part -> show(part, chosen.needsPixelSize() || chosen.needsBinning()));
    }

    private void changed() {
        if (!quiet) {
            quiet = true;
            if (kind() != ScaleKind.CALIBRATION) {
                calibrations.show(Optional.empty());
            }
            instrument()
                    .flatMap(Instrument::calibration)
                    .ifPresent(c -> scale.show(Reading.text(c.constant().value())));
            quiet = false;
        }
        arrange();
        if (!quiet) {
            onChange.run();
        }
    }
}
