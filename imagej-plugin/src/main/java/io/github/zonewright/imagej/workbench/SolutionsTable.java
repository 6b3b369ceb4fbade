package io.github.zonewright.imagej.workbench;

import io.github.zonewright.imagej.command.Answer;
import io.github.zonewright.imagej.overlay.ZoneIcon;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.Verdict;
import io.github.zonewright.orientation.ZoneSetting;
import java.awt.Component;
import java.awt.Dimension;
import java.awt.event.KeyEvent;
import java.awt.image.BufferedImage;
import java.util.List;
import java.util.Optional;
import java.util.function.Consumer;
import javax.swing.BorderFactory;
import javax.swing.Box;
import javax.swing.BoxLayout;
import javax.swing.Icon;
import javax.swing.ImageIcon;
import javax.swing.JLabel;
import javax.swing.JPanel;
import javax.swing.JScrollPane;
import javax.swing.JTable;
import javax.swing.KeyStroke;
import javax.swing.ListSelectionModel;
import javax.swing.SwingConstants;
import javax.swing.table.DefaultTableCellRenderer;
import javax.swing.table.DefaultTableModel;
import javax.swing.table.TableCellRenderer;
import javax.swing.table.TableColumn;

/** Solutions to look at and to choose, by mouse or arrow keys: each a small picture and what there is to say of it. */
final class SolutionsTable extends JTable {
    private static final long serialVersionUID = 1L;
    private static final int MOST_ROWS = 3;
    private static final int ZONE_DIGITS = 13;
    static final Icon WAITING =
            new ImageIcon(new BufferedImage(SolutionPictures.SIDE, SolutionPictures.SIDE, BufferedImage.TYPE_INT_RGB));
    private static final String[] COLUMNS = {"Crystal", "Pattern", "Zone axis", "Explained", "Residual", "Score"};
    private static final int[] WIDTHS = {84, SolutionPictures.SIDE + 8, 92, 100, 72, 66};
    private static final int PATTERN = 1;
    private static final int ZONE = 2;

    private final DefaultTableModel rows;
    private final TableColumn crystals;
    private final transient SolutionPictures pictures = new SolutionPictures(this::repaint);
    private transient List<Solution> solutions = List.of();
    private transient Verdict judged = new Verdict.Open("");
    private transient Consumer<Solution> onChoose = solution -> {};
    private boolean quiet;

    SolutionsTable() {
        super(new DefaultTableModel(COLUMNS, 0) {
            private static final long serialVersionUID = 1L;

            @Override
            public boolean isCellEditable(int row, int column) {
                return false;
            }
        });
        rows = (DefaultTableModel) getModel();
        crystals = getColumnModel().getColumn(0);
        setName("solutions");
        getAccessibleContext().setAccessibleName("Solutions");
        setFont(Looks.text());
        setRowHeight(SolutionPictures.SIDE + 5);
        setShowVerticalLines(false);
        setGridColor(Looks.RULE);
        setSelectionMode(ListSelectionModel.SINGLE_SELECTION);
        getTableHeader().setFont(Looks.text());
        getTableHeader().setReorderingAllowed(false);
        setToolTipText(
                "<html>Bright: computed, the stronger the larger. Faint rim: measured there. Diamond: measured, not"
                        + " explained.<br>Score: log-likelihood ratio against chance, in nats; higher is better.</html>");
        for (int column = 0; column < COLUMNS.length; column++) {
            TableColumn each = getColumnModel().getColumn(column);
            each.setPreferredWidth(WIDTHS[column]);
            each.setCellRenderer(
                    column == PATTERN ? new PictureCell() : column == ZONE ? new ZoneCell() : new TextCell(column < 4));
        }
        removeColumn(crystals);
        // Enter does the next thing, here as everywhere in the window.
        getInputMap(WHEN_ANCESTOR_OF_FOCUSED_COMPONENT).put(KeyStroke.getKeyStroke(KeyEvent.VK_ENTER, 0), "none");
        getSelectionModel().addListSelectionListener(e -> chosen());
    }

    /** Is told when a person chooses a solution. */
    void onChoose(Consumer<Solution> listener) {
        onChoose = listener;
    }

    /** The table in a pane that is as tall as its rows, up to three of them. */
    JScrollPane pane() {
        JScrollPane pane = new JScrollPane(this) {
            private static final long serialVersionUID = 1L;

            @Override
            public Dimension getPreferredSize() {
                int shown = Math.min(MOST_ROWS, getRowCount());
                return new Dimension(100, getTableHeader().getPreferredSize().height + shown * getRowHeight() + 3);
            }

            @Override
            public Dimension getMinimumSize() {
                return getPreferredSize();
            }
        };
        Looks.passWheel(pane);
        pane.setBorder(BorderFactory.createLineBorder(Looks.RULE));
        return pane;
    }

    /** Shows solutions and which of them is chosen, without telling the listener. */
    void show(
            List<Solution> found, Verdict verdict, Optional<Solution> chosen, double thickness, boolean withCrystals) {
        quiet = true;
        showCrystals(withCrystals);
        pictures.keep(found, thickness);
        if (!found.equals(solutions) || !verdict.equals(judged)) {
            solutions = found;
            judged = verdict;
            rows.setRowCount(0);
            found.forEach(solution -> rows.addRow(row(solution)));
        }
        solutions = found;
        int index = chosen.map(solutions::indexOf).orElse(-1);
        if (index < 0) {
            clearSelection();
        } else {
            setRowSelectionInterval(index, index);
            scrollRectToVisible(getCellRect(index, 0, true));
        }
        quiet = false;
    }

    /** The names of the crystals stand before the pictures when there are solutions of several. */
    private void showCrystals(boolean several) {
        boolean shown = getColumnCount() == COLUMNS.length;
        if (several && !shown) {
            addColumn(crystals);
            moveColumn(COLUMNS.length - 1, 0);
        } else if (!several && shown) {
            removeColumn(crystals);
        }
    }

    private void chosen() {
        int index = getSelectedRow();
        if (!quiet && index >= 0 && index < solutions.size()) {
            onChoose.accept(solutions.get(index));
        }
    }

    private Object[] row(Solution solution) {
        ZoneSetting setting = solution.placement().setting();
        return new Object[] {
            solution.placement().crystal().name(),
            "computed pattern of [" + setting.zone() + "]",
            "[" + setting.zone() + "]\n" + Reading.fixed(Math.toDegrees(setting.rotation()), 2) + "°\n"
                    + Answer.verdict(solution, solutions, judged),
            solution.matches().size() + " of " + Answer.measured(solution) + "\n"
                    + solution.unexplained().size() + " unexplained",
            Reading.fixed(solution.rmsResidual(), 2) + " px",
            Reading.fixed(solution.score(), 1)
        };
    }

    /** Lines of text with room at the sides. */
    private static final class TextCell extends DefaultTableCellRenderer {
        private static final long serialVersionUID = 1L;

        TextCell(boolean left) {
            setHorizontalAlignment(left ? SwingConstants.LEFT : SwingConstants.RIGHT);
        }

        @Override
        public Component getTableCellRendererComponent(
                JTable table, Object value, boolean selected, boolean focused, int row, int column) {
            String text = value.toString();
            Object shown = text.contains("\n") ? Looks.lines(text) : text;
            super.getTableCellRendererComponent(table, shown, selected, false, row, column);
            setBorder(BorderFactory.createEmptyBorder(0, Looks.GAP, 0, Looks.GAP));
            return this;
        }
    }

    /** The zone axis large, its rotation and the verdict beneath. */
    private final class ZoneCell extends JPanel implements TableCellRenderer {
        private static final long serialVersionUID = 1L;

        private final JLabel zone = new JLabel();
        private final JLabel lines = Looks.label("");

        ZoneCell() {
            setLayout(new BoxLayout(this, BoxLayout.Y_AXIS));
            setBorder(BorderFactory.createEmptyBorder(0, Looks.GAP, 0, Looks.GAP));
            lines.setBorder(BorderFactory.createEmptyBorder(Looks.GAP, 0, 0, 0));
            add(Box.createVerticalGlue());
            add(zone);
            add(lines);
            add(Box.createVerticalGlue());
        }

        @Override
        public Component getTableCellRendererComponent(
                JTable table, Object value, boolean selected, boolean focused, int row, int column) {
            String text = value.toString();
            setBackground(selected ? table.getSelectionBackground() : table.getBackground());
            zone.setForeground(selected ? table.getSelectionForeground() : table.getForeground());
            lines.setForeground(zone.getForeground());
            zone.setIcon(new ZoneIcon(solutions.get(row).placement().setting().zone(), ZONE_DIGITS));
            lines.setText(Looks.lines(text.substring(text.indexOf('\n') + 1)));
            getAccessibleContext().setAccessibleName(text);
            return this;
        }
    }

    /** The picture, or a dark square while it is being drawn. */
    private final class PictureCell extends DefaultTableCellRenderer {
        private static final long serialVersionUID = 1L;

        PictureCell() {
            setHorizontalAlignment(SwingConstants.CENTER);
        }

        @Override
        public Component getTableCellRendererComponent(
                JTable table, Object value, boolean selected, boolean focused, int row, int column) {
            super.getTableCellRendererComponent(table, "", selected, false, row, column);
            getAccessibleContext().setAccessibleName(value.toString());
            setIcon(pictures.of(solutions.get(row)).orElse(WAITING));
            return this;
        }
    }
}
