package io.github.zonewright.imagej.workbench;

import io.github.zonewright.imagej.bridge.HandTable;
import io.github.zonewright.indexing.HandAnswer;
import io.github.zonewright.lattice.Hkl;
import java.awt.BorderLayout;
import java.util.List;
import java.util.function.Consumer;
import java.util.stream.Collectors;
import javax.swing.BorderFactory;
import javax.swing.JButton;
import javax.swing.JLabel;
import javax.swing.JPanel;
import javax.swing.JScrollPane;
import javax.swing.JTable;
import javax.swing.JTextField;
import javax.swing.ListSelectionModel;
import javax.swing.table.DefaultTableModel;

/** Two or three clicked spots, with their indices or without, and the zones that they may belong to. */
final class ClicksPanel extends JPanel {
    private static final long serialVersionUID = 1L;
    private static final String[] COLUMNS = {
        "Crystal", "Zone axis", "Rotation (°)", "Indices", "d off (%)", "Angle off (°)", "Misfit"
    };

    private final JButton click = new JButton("Click spots");
    private final JButton again = new JButton("Start again");
    private final JButton index = new JButton("List zones");
    private final JTextField hkl = new JTextField(14);
    private final JLabel count = Looks.label(" ");
    private final DefaultTableModel model = new DefaultTableModel(COLUMNS, 0) {
        private static final long serialVersionUID = 1L;

        @Override
        public boolean isCellEditable(int row, int column) {
            return false;
        }
    };
    private final JTable table = new JTable(model);
    private transient List<HandAnswer> answers = List.of();
    private transient Consumer<HandAnswer> onChoose = answer -> {};

    ClicksPanel() {
        super(new BorderLayout(0, Looks.GAP));
        QuestionsWindow.pad(this);
        for (JButton button : List.of(click, again, index)) {
            button.setFont(Looks.text());
            button.setName(button.getText());
        }
        click.setToolTipText("Picks up the ruler: click two or three spots on the image, not all on one row");
        again.setToolTipText("Forgets the clicked spots");
        index.setToolTipText("Lists the zones of the chosen crystals that have such spots, best first");
        hkl.setName("clicked hkl");
        hkl.setFont(Looks.text());
        hkl.setToolTipText(
                "As far as they are known, in the order of the clicks: 1 1 1; 2 0 0. Leave a part empty: ; 2 0 0");
        hkl.setMaximumSize(hkl.getPreferredSize());
        table.setName("zones by hand");
        table.setFont(Looks.text());
        table.setRowHeight(20);
        table.getTableHeader().setFont(Looks.text());
        table.setShowVerticalLines(false);
        table.setGridColor(Looks.RULE);
        table.setSelectionMode(ListSelectionModel.SINGLE_SELECTION);
        table.setToolTipText("A click lays the zone over the image; then refine it. Misfit: 0 is exact, 1 the limit");
        table.getSelectionModel().addListSelectionListener(e -> chosen());
        JScrollPane pane = new JScrollPane(table);
        pane.setBorder(BorderFactory.createLineBorder(Looks.RULE));
        JPanel top = new JPanel(new BorderLayout(0, Looks.GAP));
        top.add(Section.line(click, again, count), BorderLayout.NORTH);
        top.add(Section.line(Looks.label("Their h k l"), hkl, index), BorderLayout.SOUTH);
        add(top, BorderLayout.NORTH);
        add(pane, BorderLayout.CENTER);
    }

    JButton click() {
        return click;
    }

    JButton again() {
        return again;
    }

    JButton index() {
        return index;
    }

    /** The indices that are typed. */
    String hkl() {
        return hkl.getText();
    }

    void onChoose(Consumer<HandAnswer> listener) {
        onChoose = listener;
    }

    /** Says how many spots are clicked. */
    void show(int spots, boolean ready) {
        count.setText(spots == 0 ? "None clicked yet." : spots + (spots == 1 ? " spot clicked." : " spots clicked."));
        click.setEnabled(ready);
        again.setEnabled(spots > 0);
        index.setEnabled(ready && spots > 1);
        if (spots < 2) {
            show(List.of());
        }
    }

    /** Shows answers to choose from. */
    void show(List<HandAnswer> found) {
        if (found.equals(answers)) {
            return;
        }
        answers = List.of();
        model.setRowCount(0);
        for (HandAnswer a : found) {
            model.addRow(new Object[] {
                a.placement().crystal().name(),
                "[" + a.placement().setting().zone() + "]",
                Reading.fixed(Math.toDegrees(a.placement().setting().rotation()), 2),
                a.indices().stream().map(Hkl::toString).collect(Collectors.joining(", ")),
                Reading.fixed(HandTable.largest(a.spacingResiduals()), 2),
                Reading.fixed(HandTable.largest(a.angleResiduals()), 2),
                Reading.fixed(a.misfit(), 2)
            });
        }
        answers = found;
    }

    private void chosen() {
        int row = table.getSelectedRow();
        if (row >= 0 && row < answers.size()) {
            onChoose.accept(answers.get(row));
        }
    }
}
