package io.github.zonewright.imagej.workbench;

import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.document.CalibrationFolder;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.KeptCalibrations;
import io.github.zonewright.imagej.session.PresentCamera;
import java.awt.BorderLayout;
import java.awt.Dimension;
import java.io.IOException;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Consumer;
import java.util.function.Supplier;
import javax.swing.BorderFactory;
import javax.swing.JButton;
import javax.swing.JFrame;
import javax.swing.JLabel;
import javax.swing.JScrollPane;
import javax.swing.JTable;
import javax.swing.ListSelectionModel;
import javax.swing.table.DefaultTableModel;

/** The kept calibrations: used, renamed and deleted here; the present camera is kept here too. Deleting asks for a second click. */
final class CalibrationsWindow extends JFrame {
    private static final long serialVersionUID = 1L;
    private static final int ROWS = 7;
    private static final int NOTE_WIDTH = 640;
    private static final String[] COLUMNS = {
        "Name", "kV", "L (mm)", "Pixel (µm)", "Binning", "px·Å", "± (%)", "Ellipse", "Standard", "Date"
    };
    private static final int[] WIDTHS = {150, 45, 60, 75, 60, 70, 50, 60, 90, 90};

    private final DefaultTableModel model = new DefaultTableModel(COLUMNS, 0) {
        private static final long serialVersionUID = 1L;

        @Override
        public boolean isCellEditable(int row, int column) {
            return false;
        }
    };
    private final JTable table = new JTable(model);
    private final JButton use = new JButton("Use for this image");
    private final CheckedField<String> name = new CheckedField<>("new calibration name", 16, text -> text);
    private final JButton rename = new JButton("Rename calibration");
    private final JButton delete = new JButton("Delete calibration");
    private final JLabel note = Looks.quiet(" ");
    private final KeepPanel keep = new KeepPanel("Keep the present setting");
    private final transient Supplier<Optional<PresentCamera>> present;
    private final transient Consumer<Calibration> onUse;
    private transient List<Calibration> kept = List.of();
    private boolean sure;

    /**
     * A window.
     *
     * @param known what is said of the instrument
     * @param present the camera of the current image, if it has one worth keeping
     * @param onUse is given the calibration to use
     */
    CalibrationsWindow(Instrument known, Supplier<Optional<PresentCamera>> present, Consumer<Calibration> onUse) {
        super("Calibrations");
        this.present = present;
        this.onUse = onUse;
        setName("calibrations window");
        setDefaultCloseOperation(DISPOSE_ON_CLOSE);
        for (JButton button : new JButton[] {use, rename, delete}) {
            button.setFont(Looks.text());
            button.setName(button.getText());
        }
        table.setName("calibrations table");
        table.setFont(Looks.text());
        table.setRowHeight(20);
        table.setShowVerticalLines(false);
        table.setGridColor(Looks.RULE);
        table.setSelectionMode(ListSelectionModel.SINGLE_SELECTION);
        table.getTableHeader().setFont(Looks.text());
        for (int i = 0; i < WIDTHS.length; i++) {
            table.getColumnModel().getColumn(i).setPreferredWidth(WIDTHS[i]);
        }
        JScrollPane pane = new JScrollPane(table);
        pane.setBorder(BorderFactory.createLineBorder(Looks.RULE));
        pane.setPreferredSize(new Dimension(NOTE_WIDTH + 80, ROWS * table.getRowHeight() + 26));
        note.setName("calibrations note");
        Section list = new Section("Kept calibrations");
        list.wide(pane);
        list.wide(Section.line(use, name, rename, delete));
        list.wide(note);
        add(list, BorderLayout.CENTER);
        add(keep, BorderLayout.SOUTH);
        table.getSelectionModel().addListSelectionListener(e -> chosen());
        name.onChange(this::enableButtons);
        use.addActionListener(e -> selected().ifPresent(onUse));
        rename.addActionListener(e -> selected().ifPresent(this::rename));
        delete.addActionListener(e -> selected().ifPresent(this::delete));
        keep.onKept(made -> {
            fill();
            select(made.name());
        });
        keep.suggest(known);
        fill();
        refresh();
        pack();
    }

    /** Shows what of the current image could be kept. */
    void refresh() {
        keep.show(
                present.get(),
                "There is nothing to keep yet: find an orientation of a known crystal, or calibrate from rings.");
    }

    private Optional<Calibration> selected() {
        int row = table.getSelectedRow();
        return row >= 0 && row < kept.size() ? Optional.of(kept.get(row)) : Optional.empty();
    }

    private void chosen() {
        ask(false);
        name.show(selected().map(Calibration::name).orElse(""));
        enableButtons();
    }

    private void enableButtons() {
        Optional<Calibration> now = selected();
        use.setEnabled(now.isPresent());
        delete.setEnabled(now.isPresent());
        String typed = name.getText().strip();
        rename.setEnabled(
                now.filter(c -> !typed.isEmpty() && !typed.equals(c.name())).isPresent());
    }

    private void fill() {
        try {
            CalibrationFolder.Contents contents = KeptCalibrations.list();
            kept = contents.calibrations().stream()
                    .map(CalibrationFolder.Kept::calibration)
                    .toList();
            List<String> troubles = new ArrayList<>();
            contents.unreadable().forEach(u -> troubles.add(u.file().getFileName() + ": " + u.reason()));
            say(String.join(" ", troubles), true);
        } catch (IOException e) {
            kept = List.of();
            say("The folder of calibrations can't be read: " + e.getMessage(), true);
        }
        model.setRowCount(0);
        kept.forEach(c -> model.addRow(row(c)));
        enableButtons();
    }

    private static Object[] row(Calibration c) {
        return new Object[] {
            c.name(),
            Reading.text(c.setting().kilovolts()),
            text(c.setting().cameraLength()),
            text(c.setting().pixelSize()),
            c.setting().binning(),
            Reading.text(c.constant().value()),
            Reading.fixed(100 * c.constant().relativeError(), 3),
            Reading.fixed(c.ellipseRatio().value(), 4),
            c.standard(),
            c.date().toString()
        };
    }

    private static String text(OptionalDouble number) {
        return number.isPresent() ? Reading.text(number.getAsDouble()) : "";
    }

    private void select(String wanted) {
        for (int i = 0; i < kept.size(); i++) {
            if (kept.get(i).name().equals(wanted)) {
                table.setRowSelectionInterval(i, i);
            }
        }
    }

    private void rename(Calibration old) {
        change(() -> {
            Calibration now = KeptCalibrations.rename(old.name(), name.getText());
            fill();
            select(now.name());
            Recording.of(
                    "Rename Calibration...",
                    List.of(
                            new Recording.Option("calibration", old.name()),
                            new Recording.Option("newname", now.name())));
            return "“" + old.name() + "” is called “" + now.name() + "” now.";
        });
    }

    private void delete(Calibration old) {
        if (!sure) {
            ask(true);
            say("This deletes the file of “" + old.name() + "”.", false);
            return;
        }
        change(() -> {
            String said = KeptCalibrations.delete(old.name());
            fill();
            Recording.of("Delete Calibration...", List.of(new Recording.Option("calibration", old.name())));
            return said;
        });
    }

    /** A change of the folder; it says what it did. */
    @FunctionalInterface
    private interface Change {
        String make() throws IOException;
    }

    private void change(Change what) {
        ask(false);
        try {
            say(what.make(), false);
        } catch (IOException | IllegalArgumentException e) {
            say(Optional.ofNullable(e.getMessage()).orElse(e.toString()), true);
        }
    }

    private void ask(boolean asked) {
        sure = asked;
        delete.setText(asked ? "Click again to delete" : "Delete calibration");
    }

    private void say(String sentence, boolean wrong) {
        note.setForeground(wrong ? Looks.WRONG : Looks.QUIET);
        note.setText(sentence.isEmpty() ? " " : Looks.wrapped(sentence, NOTE_WIDTH));
    }
}
