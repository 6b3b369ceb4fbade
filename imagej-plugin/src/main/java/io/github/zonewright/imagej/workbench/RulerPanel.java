package io.github.zonewright.imagej.workbench;

import io.github.zonewright.calibration.Spacing;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.imagej.command.RulerAnswer;
import io.github.zonewright.imagej.session.Figures;
import io.github.zonewright.imagej.session.Ruler;
import io.github.zonewright.imagej.session.SpacingCandidates;
import java.awt.BorderLayout;
import java.awt.Dimension;
import java.awt.event.MouseEvent;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import javax.swing.BorderFactory;
import javax.swing.JButton;
import javax.swing.JCheckBox;
import javax.swing.JPanel;
import javax.swing.JScrollPane;
import javax.swing.JTable;
import javax.swing.table.DefaultTableModel;

/** The ruler: how it is laid, and its readings with the {hkl} they may be. */
final class RulerPanel extends JPanel {
    private static final long serialVersionUID = 1L;
    private static final int ROWS = 4;
    private static final String[] COLUMNS = {"Order", "Spacing", "Ratio", "Angle", "{hkl}"};
    private static final int[] WIDTHS = {44, 110, 124, 128, 114};

    private final CheckedField<Integer> order = new CheckedField<>("order", 2, Reading.whole(1, 99));
    private final CheckedField<Double> within = new CheckedField<>("within", 3, Reading.number(0.01, 20));
    private final JCheckBox pairs = new JCheckBox("Pair g, −g");
    private final JButton table = new JButton("Readings");
    private final JButton clear = new JButton("Clear");
    private final DefaultTableModel model = new DefaultTableModel(COLUMNS, 0) {
        private static final long serialVersionUID = 1L;

        @Override
        public boolean isCellEditable(int row, int column) {
            return false;
        }
    };
    private final transient SpacingCandidates candidates = new SpacingCandidates();
    private transient List<Ruler.Reading> readings = List.of();
    private transient Optional<Ruler> ruler = Optional.empty();
    private transient List<Crystal> crystals = List.of();
    private transient List<String> forms = List.of();
    private String title = "";
    private transient Runnable onClear = () -> {};

    RulerPanel() {
        super(new BorderLayout(0, Looks.GAP));
        setName("ruler");
        order.show("1");
        within.show("2");
        order.setToolTipText("Which spot of its row is clicked, counted from the centre: 2 for the second");
        within.setToolTipText("How far a spacing of the crystals at hand may be off");
        pairs.setToolTipText("Click a spot and the one opposite: half their distance is read, and no centre is needed");
        table.setToolTipText("Shows the readings as an ImageJ table");
        clear.setToolTipText("Takes all readings away; undo brings them back");
        pairs.setFont(Looks.text());
        pairs.setName("pairs");
        for (JButton button : List.of(table, clear)) {
            button.setFont(Looks.text());
            button.setName(button.getText());
        }
        add(
                Section.line(
                        Looks.label("Order"),
                        order,
                        pairs,
                        Looks.label("{hkl} within"),
                        within,
                        Looks.label("%"),
                        table,
                        clear),
                BorderLayout.NORTH);
        JTable shown = new JTable(model) {
            private static final long serialVersionUID = 1L;

            @Override
            public String getToolTipText(MouseEvent event) {
                int row = rowAtPoint(event.getPoint());
                int column = columnAtPoint(event.getPoint());
                return row < 0 || column < 0
                        ? super.getToolTipText(event)
                        : Looks.wrapped(getValueAt(row, column).toString(), 400);
            }
        };
        shown.setName("readings");
        shown.setToolTipText("What was read with the ruler");
        shown.setFont(Looks.text());
        shown.setRowHeight(20);
        shown.getTableHeader().setFont(Looks.text());
        shown.getTableHeader().setReorderingAllowed(false);
        shown.setShowVerticalLines(false);
        shown.setGridColor(Looks.RULE);
        shown.getTableHeader().setToolTipText("Ratio and angle are to the reading before");
        for (int i = 0; i < WIDTHS.length; i++) {
            shown.getColumnModel().getColumn(i).setPreferredWidth(WIDTHS[i]);
        }
        JScrollPane pane = new JScrollPane(shown);
        Looks.passWheel(pane);
        pane.setBorder(BorderFactory.createLineBorder(Looks.RULE));
        pane.setPreferredSize(new Dimension(100, shown.getTableHeader().getPreferredSize().height + ROWS * 20 + 3));
        add(pane, BorderLayout.CENTER);
        order.onChange(() -> order.value().ifPresent(HandTool.ruler()::order));
        pairs.addActionListener(e -> HandTool.ruler().pairs(pairs.isSelected()));
        within.onChange(() -> within.value().ifPresent(v -> fill()));
        table.addActionListener(e -> ruler.ifPresent(r -> {
            RulerAnswer.table(readings, r, forms).show("Spacings of " + title);
            Recording.flag("Measure Spacing...", "table");
        }));
        clear.addActionListener(e -> onClear.run());
    }

    void onClear(Runnable listener) {
        onClear = listener;
    }

    /** Shows readings of an image. */
    void show(String imageTitle, Ruler with, List<Ruler.Reading> read, List<Crystal> atHand) {
        title = imageTitle;
        ruler = Optional.of(with);
        readings = read;
        crystals = atHand;
        table.setEnabled(!read.isEmpty());
        clear.setEnabled(!read.isEmpty());
        fill();
    }

    private void fill() {
        model.setRowCount(0);
        List<String> found = new ArrayList<>();
        for (Ruler.Reading reading : readings) {
            String form = forms(reading);
            found.add(form);
            Optional<Spacing.Relation> relation = reading.relation();
            model.addRow(new Object[] {
                reading.point().order(),
                ruler.map(r -> r.text(reading.spacing())).orElse(""),
                relation.map(r -> Figures.of(r.ratio(), "")).orElse(""),
                relation.map(r -> Figures.degrees(r.angle())).orElse(""),
                form
            });
        }
        forms = found;
    }

    private String forms(Ruler.Reading reading) {
        try {
            return RulerAnswer.forms(
                    reading,
                    ruler.orElseThrow(),
                    candidates,
                    crystals,
                    within.value().orElse(2.0));
        } catch (IllegalArgumentException e) {
            return e.getMessage();
        }
    }
}
