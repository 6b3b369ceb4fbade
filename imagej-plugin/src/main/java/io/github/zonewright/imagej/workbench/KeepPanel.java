package io.github.zonewright.imagej.workbench;

import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.calibration.MicroscopeSetting;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.KeptCalibrations;
import io.github.zonewright.imagej.session.PresentCamera;
import io.github.zonewright.imagej.session.ScaleKind;
import io.github.zonewright.imagej.session.UserFolder;
import io.github.zonewright.spots.MeasuredValue;
import java.io.IOException;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Consumer;
import javax.swing.JButton;
import javax.swing.JLabel;

/** Asks for name and setting of a camera, and keeps it as a calibration. */
final class KeepPanel extends Section {
    private static final long serialVersionUID = 1L;
    private static final int NOTE_WIDTH = 430;
    private static final double USUAL_ROTATION_ERROR = 0.5;

    private final CheckedField<String> name = new CheckedField<>("keep calibration as", 18, text -> text);
    private final CheckedField<String> instrument = new CheckedField<>("calibration instrument", 12, text -> text);
    private final CheckedField<OptionalDouble> length =
            new CheckedField<>("calibration camera length", 6, Reading.optional(1, 1e5));
    private final CheckedField<OptionalDouble> pixel =
            new CheckedField<>("calibration pixel size", 5, Reading.optional(1e-3, 1e4));
    private final CheckedField<Integer> binning = new CheckedField<>("calibration binning", 3, Reading.whole(1, 64));
    private final CheckedField<OptionalDouble> rotation =
            new CheckedField<>("image rotation", 6, Reading.optional(-360, 360));
    private final CheckedField<Double> rotationError =
            new CheckedField<>("image rotation uncertainty", 4, Reading.number(0, 180));
    private final JButton keep = new JButton("Keep calibration");
    private final JLabel note = Looks.quiet(" ");
    private transient Optional<PresentCamera> camera = Optional.empty();
    private transient Consumer<Calibration> onKept = kept -> {};

    KeepPanel(String heading) {
        super(heading);
        row("Keep as", name, Looks.quiet("a name for it"));
        row("Instrument", instrument, Looks.quiet("your name for it; may be blank"));
        row(
                "Camera length",
                length,
                Looks.label("mm,  pixel"),
                pixel,
                Looks.label("µm,  binning"),
                binning,
                length.reasonLabel());
        row(
                "Image rotation",
                rotation,
                Looks.label("±"),
                rotationError,
                Looks.label("°"),
                Looks.quiet("blank where it is not known"));
        wide(line(keep));
        wide(note);
        length.setToolTipText("Nominal, as the microscope shows it; blank where it is not known");
        pixel.setToolTipText("Of an unbinned pixel; blank where it is not known");
        binning.setToolTipText("Pixels joined to one along each side on this image");
        rotation.setToolTipText("From the micrograph to the pattern, counter-clockwise");
        keep.setName(keep.getText());
        keep.setFont(Looks.text());
        keep.setToolTipText(
                "Writes it as a CIF into " + UserFolder.calibrations().path());
        note.setName("keep calibration note");
        binning.show("1");
        rotationError.show(Reading.text(USUAL_ROTATION_ERROR));
        keep.addActionListener(e -> keep());
        for (CheckedField<?> field : new CheckedField<?>[] {name, length, pixel, binning, rotation, rotationError}) {
            field.onChange(this::check);
        }
        check();
    }

    void onKept(Consumer<Calibration> listener) {
        onKept = listener;
    }

    /** Fills in what the instrument section knows of the setting. */
    void suggest(Instrument known) {
        if (known.kind() == ScaleKind.LENGTH) {
            length.show(Reading.text(known.scale()));
            pixel.show(Reading.text(known.pixelMicrometres()));
        }
        known.applied().ifPresent(a -> {
            a.cameraLength().ifPresent(v -> length.show(Reading.text(v)));
            a.pixelSize().ifPresent(v -> pixel.show(Reading.text(v)));
        });
        if (known.kind().needsBinning()) {
            binning.show(Integer.toString(known.binning()));
        }
    }

    /** Offers a camera to be kept, or says why there is none. */
    void show(Optional<PresentCamera> other, String reason) {
        camera = other;
        note.setForeground(Looks.QUIET);
        say(other.map(c -> "To be kept: the camera of " + c.origin() + ", at " + Reading.text(c.kilovolts()) + " kV.")
                .orElse(reason));
        check();
    }

    /** The setting as it is told, with the voltage of the camera; empty while something is wrong. */
    Optional<MicroscopeSetting> setting(double kilovolts) {
        boolean right = length.value().isPresent()
                && pixel.value().isPresent()
                && binning.value().isPresent();
        return right
                ? Optional.of(new MicroscopeSetting(
                        instrument.getText().strip(),
                        kilovolts,
                        length.value().get(),
                        pixel.value().get(),
                        binning.value().get()))
                : Optional.empty();
    }

    /** What is told of the setting, as the commands that keep a calibration are told. */
    List<Recording.Option> options() {
        return List.of(
                new Recording.Option("instrument", instrument.getText().strip()),
                new Recording.Option("cameralength", length.getText().strip()),
                new Recording.Option("pixelsize", pixel.getText().strip()),
                new Recording.Option("binning", binning.getText().strip()));
    }

    /** Records that the camera is kept under a name. */
    private void record(String kept) {
        List<Recording.Option> all = new ArrayList<>();
        all.add(new Recording.Option("keepcalibration", kept));
        all.addAll(options());
        all.add(new Recording.Option("imagerotation", rotation.getText().strip()));
        all.add(new Recording.Option("rotationerror", rotationError.getText().strip()));
        Recording.of("Keep Calibration...", all);
    }

    private void check() {
        keep.setEnabled(camera.isPresent()
                && !name.getText().isBlank()
                && rotation.value().isPresent()
                && rotationError.value().isPresent()
                && setting(1).isPresent());
    }

    private void keep() {
        try {
            PresentCamera shown = camera.orElseThrow();
            Calibration made = shown.calibration(
                    KeptCalibrations.free(name.getText()),
                    setting(shown.kilovolts()).orElseThrow());
            OptionalDouble turn = rotation.value().orElseThrow();
            if (turn.isPresent()) {
                made = made.withImageRotation(new MeasuredValue(
                                turn.getAsDouble(), rotationError.value().orElseThrow())
                        .times(Math.toRadians(1)));
            }
            String kept = KeptCalibrations.keep(made);
            note.setForeground(Looks.QUIET);
            say(kept);
            onKept.accept(made);
            record(made.name());
        } catch (IOException | IllegalArgumentException e) {
            note.setForeground(Looks.WRONG);
            say(Optional.ofNullable(e.getMessage()).orElse(e.toString()));
        }
    }

    private void say(String sentence) {
        note.setText(sentence.isEmpty() ? " " : Looks.wrapped(sentence, NOTE_WIDTH));
    }
}
