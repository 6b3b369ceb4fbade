package io.github.zonewright.imagej.workbench;

import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.document.CalibrationFolder;
import io.github.zonewright.imagej.session.AppliedCalibration;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.KeptCalibrations;
import java.awt.BorderLayout;
import java.awt.Component;
import java.awt.Dimension;
import java.io.IOException;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Consumer;
import javax.swing.BorderFactory;
import javax.swing.JButton;
import javax.swing.JComboBox;
import javax.swing.JLabel;
import javax.swing.JList;
import javax.swing.JPanel;
import javax.swing.ListCellRenderer;
import javax.swing.event.PopupMenuEvent;
import javax.swing.event.PopupMenuListener;

/** The kept calibrations to choose from, and what the chosen one says and what speaks against it. */
final class CalibrationPanel {
    private static final int LIST_WIDTH = 340;
    private static final int TEXT_WIDTH = 460;

    private final JComboBox<Optional<Calibration>> kept = new JComboBox<>();
    private final JButton rings = new JButton("From rings…");
    private final JButton manage = new JButton("Kept…");
    private final CheckedField<OptionalDouble> length =
            new CheckedField<>("image camera length", 5, Reading.optional(1, 1e5));
    private final CheckedField<OptionalDouble> pixel =
            new CheckedField<>("image pixel size", 4, Reading.optional(1e-3, 1e4));
    private final JPanel image;
    private final JLabel facts = Looks.quiet("");
    private final JLabel warning = Looks.label("");
    private Optional<AppliedCalibration> applied = Optional.empty();
    private Consumer<Optional<AppliedCalibration>> onChoose = chosen -> {};
    private Runnable onChange = () -> {};
    private boolean quiet;

    CalibrationPanel() {
        kept.setName("calibrations");
        kept.setFont(Looks.text());
        kept.setRenderer(new Cell());
        kept.setToolTipText("Calibrations that are kept; the chosen one gives scale, tolerance, ellipse and mirror");
        kept.setPreferredSize(new Dimension(LIST_WIDTH, kept.getPreferredSize().height));
        kept.setMaximumSize(kept.getPreferredSize());
        for (JButton button : List.of(rings, manage)) {
            button.setFont(Looks.text());
            button.setName(button.getText());
        }
        rings.setToolTipText("Measures the rings of a known powder on this image");
        manage.setToolTipText("Lists, renames and deletes calibrations, and keeps the present one");
        length.setToolTipText("Nominal camera length of this image; blank where it is not known");
        pixel.setToolTipText("Unbinned pixel of this image; blank where it is not known");
        JLabel label = Looks.label("This image");
        label.setPreferredSize(new Dimension(Looks.LABEL_WIDTH + Looks.GAP / 2, label.getPreferredSize().height));
        label.setMinimumSize(label.getPreferredSize());
        image = Section.line(
                label,
                Looks.label("camera length"),
                length,
                Looks.label("mm,  pixel"),
                pixel,
                Looks.label("µm"),
                length.reasonLabel());
        facts.setName("calibration facts");
        warning.setName("calibration warning");
        warning.setForeground(Looks.WRONG);
        fill();
        kept.addPopupMenuListener(new PopupMenuListener() {
            @Override
            public void popupMenuWillBecomeVisible(PopupMenuEvent e) {
                fill();
            }

            @Override
            public void popupMenuWillBecomeInvisible(PopupMenuEvent e) {}

            @Override
            public void popupMenuCanceled(PopupMenuEvent e) {}
        });
        kept.addActionListener(e -> chosen());
        length.onChange(this::told);
        pixel.onChange(this::told);
    }

    JComboBox<Optional<Calibration>> list() {
        return kept;
    }

    JButton rings() {
        return rings;
    }

    JButton manage() {
        return manage;
    }

    /** The row for what is told of the image, with which the calibration is compared. */
    JPanel image() {
        return image;
    }

    JLabel facts() {
        return facts;
    }

    JLabel warning() {
        return warning;
    }

    /** Is told what a person chose from the list; empty for none. */
    void onChoose(Consumer<Optional<AppliedCalibration>> listener) {
        onChoose = listener;
    }

    /** Is told when a person says more of the image. */
    void onChange(Runnable listener) {
        onChange = listener;
    }

    /** The chosen one with what is told of the image; empty for none, or while something is wrong. */
    Optional<AppliedCalibration> applied() {
        return length.value().isPresent() && pixel.value().isPresent()
                ? applied.map(a -> new AppliedCalibration(
                        a.calibration(), length.value().get(), pixel.value().get(), a.centre()))
                : Optional.empty();
    }

    boolean isChosen() {
        return applied.isPresent();
    }

    /** Shows one, kept or not, without telling the listeners. */
    void show(Optional<AppliedCalibration> shown) {
        quiet = true;
        applied = shown;
        shown.ifPresent(a -> {
            length.show(text(a.cameraLength()));
            pixel.show(text(a.pixelSize()));
        });
        fill();
        quiet = false;
    }

    /** Says what the one in use gives, and what speaks against it. */
    void describe(Optional<Instrument> said) {
        Optional<Instrument> using = said.filter(i -> i.calibration().isPresent());
        facts.setText(using.map(i -> Looks.wrapped(i.applied().orElseThrow().line(i.binning()), TEXT_WIDTH))
                .orElse(""));
        List<String> against = using.map(i -> i.warnings(LocalDate.now())).orElse(List.of());
        warning.setText(against.isEmpty() ? "" : Looks.wrapped(String.join(" ", against), TEXT_WIDTH));
        facts.setVisible(using.isPresent());
        warning.setVisible(!against.isEmpty());
    }

    private static String text(OptionalDouble number) {
        return number.isPresent() ? Reading.text(number.getAsDouble()) : "";
    }

    private void told() {
        if (!quiet) {
            onChange.run();
        }
    }

    /** Reads the folder anew; one in use that is not kept stands among the others. */
    private void fill() {
        boolean before = quiet;
        quiet = true;
        List<Optional<Calibration>> all = new ArrayList<>();
        all.add(Optional.empty());
        try {
            KeptCalibrations.list().calibrations().stream()
                    .map(CalibrationFolder.Kept::calibration)
                    .forEach(c -> all.add(Optional.of(c)));
            kept.setEnabled(true);
        } catch (IOException | IllegalArgumentException e) {
            kept.setToolTipText("The folder of calibrations can't be read: " + e.getMessage());
        }
        Optional<Calibration> using = applied.map(AppliedCalibration::calibration);
        if (!all.contains(using)) {
            all.add(using);
        }
        kept.removeAllItems();
        all.forEach(kept::addItem);
        kept.setSelectedItem(using);
        quiet = before;
    }

    private void chosen() {
        if (quiet || !(kept.getSelectedItem() instanceof Optional<?> item)) {
            return;
        }
        Optional<Calibration> other = item.map(Calibration.class::cast);
        if (!other.equals(applied.map(AppliedCalibration::calibration))) {
            onChoose.accept(other.map(c -> new AppliedCalibration(
                    c,
                    length.value().orElse(OptionalDouble.empty()),
                    pixel.value().orElse(OptionalDouble.empty()),
                    Optional.empty())));
        }
    }

    /** Name and date, and beneath them setting, standard and uncertainty. */
    private static final class Cell extends JPanel implements ListCellRenderer<Optional<Calibration>> {
        private static final long serialVersionUID = 1L;

        private final JLabel name = Looks.label(" ");
        private final JLabel date = Looks.quiet(" ");
        private final JLabel detail = Looks.quiet(" ");

        Cell() {
            super(new BorderLayout(Looks.MARGIN, 0));
            setBorder(BorderFactory.createEmptyBorder(1, 4, 1, 4));
            detail.setFont(Looks.text().deriveFont(11f));
            add(name, BorderLayout.CENTER);
            add(date, BorderLayout.EAST);
            add(detail, BorderLayout.SOUTH);
        }

        @Override
        public Component getListCellRendererComponent(
                JList<? extends Optional<Calibration>> in,
                Optional<Calibration> item,
                int index,
                boolean selected,
                boolean focused) {
            Optional<Calibration> shown = item == null ? Optional.empty() : item;
            Optional<Calibration> listed = shown.filter(c -> index >= 0);
            name.setText(shown.map(Calibration::name).orElse("none"));
            date.setText(listed.map(c -> c.date().toString()).orElse(""));
            detail.setText(listed.map(Cell::detail).orElse(""));
            detail.setVisible(listed.isPresent());
            setBackground(selected ? in.getSelectionBackground() : in.getBackground());
            return this;
        }

        private static String detail(Calibration c) {
            List<String> parts = new ArrayList<>();
            parts.add(Reading.text(c.setting().kilovolts()) + " kV");
            c.setting().cameraLength().ifPresent(v -> parts.add(Reading.text(v) + " mm"));
            c.setting().pixelSize().ifPresent(v -> parts.add(Reading.text(v) + " µm"));
            parts.add("binning " + c.setting().binning());
            String standard = c.standard().isBlank() ? "" : c.standard() + " ";
            parts.add(standard + "± " + Reading.fixed(100 * c.constant().relativeError(), 2) + " %");
            return String.join(", ", parts);
        }
    }
}
