package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import io.github.zonewright.imagej.command.Instrument;
import io.github.zonewright.imagej.command.ScaleKind;
import java.util.Locale;
import java.util.Optional;
import javax.swing.JCheckBox;
import javax.swing.JComboBox;
import javax.swing.JLabel;

/** Voltage, scale and mirror. */
final class InstrumentSection extends Section {
    private static final long serialVersionUID = 1L;

    private final CheckedField<Double> kilovolts = new CheckedField<>("kilovolts", 6, Reading.number(0.01, 3000));
    private final JComboBox<String> kind = new JComboBox<>();
    private final CheckedField<Double> scale = new CheckedField<>("scale", 8, Reading.number(1e-3, 1e6));
    private final JLabel scaleUnit = Looks.label("px·Å");
    private final CheckedField<Double> tolerance = new CheckedField<>("tolerance", 4, Reading.number(0.1, 20));
    private final CheckedField<Double> pixel = new CheckedField<>("pixel size", 6, Reading.number(1e-3, 1e4));
    private final CheckedField<Integer> binning = new CheckedField<>("binning", 3, Reading.whole(1, 64));
    private final JCheckBox mirrored = new JCheckBox("Image is mirrored");
    private final JLabel derived = Looks.quiet(" ");
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
        kilovolts.setToolTipText("Accelerating voltage of the microscope");
        scale.setToolTipText("The scale as it is known; R·d = camera constant");
        tolerance.setToolTipText("How far the scale may be off in the search");
        pixel.setToolTipText("Size of a pixel: as recorded for mm·Å, unbinned for the camera length");
        binning.setToolTipText("Pixels joined to one along each side");
        mirrored.setToolTipText("Set when left and right are swapped against the view from the electron source");
        row("Voltage", kilovolts, Looks.label("kV"), kilovolts.reasonLabel());
        row("Scale given as", kind);
        row("Scale", scale, scaleUnit, scale.reasonLabel());
        row("Pixel size", pixel, Looks.label("µm,  binning"), binning, pixel.reasonLabel(), binning.reasonLabel());
        row("Scale is good to", tolerance, Looks.label("%"), tolerance.reasonLabel());
        row("", mirrored);
        row("", derived);
        kilovolts.onChange(this::changed);
        scale.onChange(this::changed);
        tolerance.onChange(this::changed);
        pixel.onChange(this::changed);
        binning.onChange(this::changed);
        kind.addActionListener(e -> changed());
        mirrored.addActionListener(e -> changed());
        show(Instrument.last());
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
                mirrored.isSelected()));
    }

    /** Shows an instrument without telling the listener. */
    void show(Instrument instrument) {
        quiet = true;
        kilovolts.show(Reading.text(instrument.kilovolts()));
        kind.setSelectedItem(instrument.kind().label());
        scale.show(Reading.text(instrument.scale()));
        pixel.show(Reading.text(instrument.pixelMicrometres()));
        binning.show(Integer.toString(instrument.binning()));
        tolerance.show(Reading.text(instrument.tolerancePercent()));
        mirrored.setSelected(instrument.mirrored());
        quiet = false;
        arrange();
    }

    /** Says what follows from the values; returns the reason why no camera constant follows, or nothing. */
    Optional<String> derive(ImagePlus image) {
        Optional<Instrument> said = instrument();
        if (said.isEmpty()) {
            derived.setText(" ");
            return Optional.of("Put right what is marked under Instrument.");
        }
        try {
            double constant = said.get().cameraConstant(image);
            derived.setForeground(Looks.QUIET);
            derived.setText(String.format(
                    Locale.ROOT,
                    "%.5g px·Å;  wavelength %.5f Å",
                    constant,
                    said.get().beam().wavelength()));
            return Optional.empty();
        } catch (IllegalArgumentException e) {
            derived.setForeground(Looks.WRONG);
            derived.setText(Looks.wrapped(e.getMessage(), 300));
            return Optional.of(e.getMessage());
        }
    }

    private ScaleKind kind() {
        return ScaleKind.values()[Math.max(0, kind.getSelectedIndex())];
    }

    private void arrange() {
        ScaleKind chosen = kind();
        scale.setEnabled(chosen != ScaleKind.IMAGE);
        scaleUnit.setText(chosen.unit());
        pixel.setEnabled(chosen.needsPixelSize());
        binning.setEnabled(chosen.needsBinning());
    }

    private void changed() {
        arrange();
        if (!quiet) {
            onChange.run();
        }
    }
}
