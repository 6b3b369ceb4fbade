package io.github.zonewright.imagej.workbench;

import io.github.zonewright.imagej.command.Answer;
import io.github.zonewright.imagej.command.ZoneChoice;
import io.github.zonewright.indexing.RowAnswer;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.Verdict;
import io.github.zonewright.orientation.ZoneSetting;
import java.awt.Component;
import java.awt.Dimension;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.Consumer;
import javax.swing.BorderFactory;
import javax.swing.JButton;
import javax.swing.JLabel;
import javax.swing.JProgressBar;
import javax.swing.JScrollPane;
import javax.swing.JTable;
import javax.swing.ListSelectionModel;
import javax.swing.SwingConstants;
import javax.swing.table.DefaultTableCellRenderer;
import javax.swing.table.DefaultTableModel;
import javax.swing.table.TableColumn;

/** The search, and its solutions to click through. */
final class SolutionsSection extends Section {
    private static final long serialVersionUID = 1L;
    private static final int ROWS = 4;
    private static final int REASON_HEIGHT = 16;
    private static final int WORDS_WIDTH = 500;
    private static final int RESIDUAL_WIDTH = 90;
    private static final int CRYSTAL_WIDTH = 100;
    private static final String[] COLUMNS = {
        "Crystal", "Zone axis", "Rotation (°)", "Explained", "Residual (px)", "Score"
    };

    private final JButton findOrientation = new JButton("Find orientation");
    private final CheckedField<ZoneChoice> zones = new CheckedField<>("zones searched", 7, Reading::zones);
    private final JButton wholeStack = new JButton("Whole stack…");
    private final JButton leftOver = new JButton("Left over…");
    private final JButton apart = new JButton("What tells apart…");
    private final JButton clicks = new JButton("By clicks…");
    private final JButton stop = new JButton("Stop");
    private final JProgressBar progress = new JProgressBar(0, 1000);
    private final JLabel spots = Looks.quiet(" ");
    private final JLabel note = Looks.quiet(" ");
    private final JLabel verdict = Looks.quiet(" ");
    private final DefaultTableModel model = new DefaultTableModel(COLUMNS, 0) {
        private static final long serialVersionUID = 1L;

        @Override
        public boolean isCellEditable(int row, int column) {
            return false;
        }
    };
    private final JTable table = new JTable(model);
    private final TableColumn crystals = table.getColumnModel().getColumn(0);
    private transient List<Solution> solutions = List.of();
    private transient Consumer<Solution> onChoose = solution -> {};
    private transient Verdict judged = new Verdict.Open("");
    private boolean quiet;

    SolutionsSection() {
        super("Solutions");
        for (JButton button : List.of(findOrientation, wholeStack, stop, leftOver, apart, clicks)) {
            button.setFont(Looks.text());
            button.setName(button.getText());
        }
        findOrientation.setToolTipText("Searches the zone axis and rotation that explain the measured spots");
        wholeStack.setToolTipText("Searches all slices of this stack, with a table of the answers");
        wholeStack.setVisible(false);
        stop.setToolTipText("Ends the search; what was found before stays (Esc)");
        stop.setEnabled(false);
        progress.setPreferredSize(new Dimension(90, progress.getPreferredSize().height));
        progress.setMaximumSize(new Dimension(120, 16));
        zones.show(ZoneChoice.ANY_LABEL);
        zones.setToolTipText("Zone axes to search: any, one as 1 1 0, or a family as <1 1 0>");
        wide(line(findOrientation, Looks.label("Zone axes"), zones, stop, progress));
        zones.reasonLabel().setMinimumSize(new Dimension(0, REASON_HEIGHT));
        wide(line(wholeStack, zones.reasonLabel()));
        wide(spots);
        table.setName("solutions");
        table.setFont(Looks.text());
        table.setRowHeight(20);
        table.setIntercellSpacing(new Dimension(0, 1));
        table.setShowVerticalLines(false);
        table.setGridColor(Looks.RULE);
        table.setSelectionMode(ListSelectionModel.SINGLE_SELECTION);
        table.getTableHeader().setFont(Looks.text());
        table.getTableHeader().setReorderingAllowed(false);
        table.setToolTipText("Score: log-likelihood ratio against chance, in nats; higher is better");
        for (int column = 0; column < COLUMNS.length; column++) {
            table.getColumnModel()
                    .getColumn(column)
                    .setCellRenderer(new PaddedCell(column < 2 ? SwingConstants.LEFT : SwingConstants.RIGHT));
        }
        table.getColumnModel().getColumn(2).setPreferredWidth(RESIDUAL_WIDTH);
        table.getColumnModel().getColumn(4).setPreferredWidth(RESIDUAL_WIDTH);
        crystals.setPreferredWidth(CRYSTAL_WIDTH);
        table.removeColumn(crystals);
        table.getSelectionModel().addListSelectionListener(e -> chosen());
        JScrollPane pane = new JScrollPane(table);
        Looks.passWheel(pane);
        pane.setBorder(BorderFactory.createLineBorder(Looks.RULE));
        int height = table.getTableHeader().getPreferredSize().height + ROWS * table.getRowHeight() + 3;
        pane.setPreferredSize(new Dimension(100, height));
        pane.setMinimumSize(pane.getPreferredSize());
        wide(pane);
        verdict.setName("verdict");
        verdict.setVerticalAlignment(SwingConstants.TOP);
        verdict.setToolTipText("How sure the answer is, for crystal, zone axis and rotation");
        wide(verdict);
        note.setName("remarks");
        note.setVerticalAlignment(SwingConstants.TOP);
        wide(note);
        leftOver.setToolTipText("A second grain, a twin or another phase among the spots that nothing explains");
        apart.setToolTipText("What tells the chosen solution from those that explain the same spots");
        clicks.setToolTipText("Index two or three spots that you click, with their h k l or without");
        wide(line(leftOver, apart, clicks));
    }

    /** The zone axes to search; empty when what is typed is wrong. */
    Optional<ZoneChoice> zones() {
        return zones.value();
    }

    JButton findOrientation() {
        return findOrientation;
    }

    JButton wholeStack() {
        return wholeStack;
    }

    JButton leftOver() {
        return leftOver;
    }

    JButton apart() {
        return apart;
    }

    JButton clicks() {
        return clicks;
    }

    JButton stop() {
        return stop;
    }

    void onChoose(Consumer<Solution> listener) {
        onChoose = listener;
    }

    /** Shows that a search runs, or none. */
    void searching(boolean running) {
        findOrientation.setEnabled(!running);
        stop.setEnabled(running);
        if (!running) {
            progress.setValue(0);
        }
    }

    void progress(double part) {
        progress.setValue((int) Math.round(1000 * part));
    }

    /** Says what there is to say of the search. */
    void spots(String text) {
        spots.setText(text.isBlank() ? " " : Looks.wrapped(text, WORDS_WIDTH));
        spots.setVisible(!text.isBlank());
        spots.setToolTipText(text);
    }

    /**
     * Shows solutions and which of them is chosen, without telling the listener; with the names of their crystals where
     * there are several, or may be.
     */
    void show(List<Solution> found, Optional<Solution> chosen, Optional<RowAnswer> row, boolean several) {
        quiet = true;
        showCrystals(several
                || found.stream().map(s -> s.placement().crystal()).distinct().count() > 1);
        if (!found.equals(solutions)) {
            solutions = found;
            model.setRowCount(0);
            found.forEach(solution -> model.addRow(row(solution)));
        }
        int index = chosen.map(solutions::indexOf).orElse(-1);
        if (index < 0) {
            table.clearSelection();
        } else {
            table.setRowSelectionInterval(index, index);
        }
        verdict.setText(verdict(row));
        note.setText(chosen.map(SolutionsSection::remarks).orElse(" "));
        verdict.setVisible(!verdict.getText().isBlank());
        note.setVisible(!note.getText().isBlank());
        quiet = false;
    }

    /** Is told how sure the solutions are that are shown next. */
    void judge(Verdict whole) {
        judged = whole;
    }

    private String verdict(Optional<RowAnswer> row) {
        return solutions.isEmpty()
                ? row.map(r -> Looks.wrapped(r.sentence(), WORDS_WIDTH)).orElse(" ")
                : Looks.wrapped(judged.sentence(), WORDS_WIDTH);
    }

    private static String remarks(Solution solution) {
        String lean = Answer.lean(solution);
        List<String> all = new ArrayList<>(Answer.remarks(solution));
        all.add(0, "L" + lean.substring(1) + ".");
        return Looks.wrapped(String.join(" ", all), WORDS_WIDTH);
    }

    /** The names of the crystals stand before the zone axes when there are solutions of several. */
    private void showCrystals(boolean several) {
        boolean shown = table.getColumnCount() == COLUMNS.length;
        if (several && !shown) {
            table.addColumn(crystals);
            table.moveColumn(COLUMNS.length - 1, 0);
        } else if (!several && shown) {
            table.removeColumn(crystals);
        }
    }

    private void chosen() {
        int index = table.getSelectedRow();
        if (!quiet && index >= 0 && index < solutions.size()) {
            onChoose.accept(solutions.get(index));
        }
    }

    private static Object[] row(Solution solution) {
        ZoneSetting setting = solution.placement().setting();
        return new Object[] {
            solution.placement().crystal().name(),
            "[" + setting.zone() + "]",
            Reading.fixed(Math.toDegrees(setting.rotation()), 2),
            solution.matches().size() + " of " + Answer.measured(solution),
            Reading.fixed(solution.rmsResidual(), 2),
            Reading.fixed(solution.score(), 1)
        };
    }

    /** A cell with room at its sides. */
    private static final class PaddedCell extends DefaultTableCellRenderer {
        private static final long serialVersionUID = 1L;

        PaddedCell(int alignment) {
            setHorizontalAlignment(alignment);
        }

        @Override
        public Component getTableCellRendererComponent(
                JTable table, Object value, boolean selected, boolean focused, int row, int column) {
            super.getTableCellRendererComponent(table, value, selected, false, row, column);
            setBorder(BorderFactory.createEmptyBorder(0, Looks.GAP, 0, Looks.GAP));
            return this;
        }
    }
}
