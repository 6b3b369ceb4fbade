package io.github.zonewright.imagej.workbench;

import ij.gui.Plot;
import ij.measure.ResultsTable;
import io.github.zonewright.calibration.MeasuredRings;
import io.github.zonewright.calibration.RingCalibration;
import io.github.zonewright.imagej.bridge.RingPlots;
import io.github.zonewright.imagej.bridge.RingTable;
import java.awt.Cursor;
import java.awt.Dimension;
import java.awt.event.MouseAdapter;
import java.awt.event.MouseEvent;
import java.util.Optional;
import javax.swing.Box;
import javax.swing.BoxLayout;
import javax.swing.ImageIcon;
import javax.swing.JLabel;
import javax.swing.JPanel;
import javax.swing.JScrollPane;
import javax.swing.JTable;
import javax.swing.SwingConstants;
import javax.swing.table.DefaultTableCellRenderer;
import javax.swing.table.DefaultTableModel;

/** How rings fit a standard: the radial profile, the residuals and the table. A click on a plot opens it as ImageJ's own. */
final class RingView extends JPanel {
    private static final long serialVersionUID = 1L;
    private static final int ROWS = 6;
    private static final int DECIMALS = 4;
    private static final int COLUMN_ROOM = 10;
    private static final int NARROWEST_COLUMN = 68;

    private final JLabel profile = new JLabel();
    private final JLabel residuals = new JLabel();
    private final DefaultTableModel model = new DefaultTableModel() {
        private static final long serialVersionUID = 1L;

        @Override
        public boolean isCellEditable(int row, int column) {
            return false;
        }
    };
    private final JTable table = new JTable(model);
    private transient Optional<Plot> profilePlot = Optional.empty();
    private transient Optional<Plot> residualPlot = Optional.empty();

    RingView() {
        setLayout(new BoxLayout(this, BoxLayout.Y_AXIS));
        profile.setName("profile plot");
        residuals.setName("residual plot");
        table.setName("rings table");
        table.setFont(Looks.text());
        table.setRowHeight(20);
        table.setShowVerticalLines(false);
        table.setGridColor(Looks.RULE);
        table.getTableHeader().setFont(Looks.text());
        table.getTableHeader().setReorderingAllowed(false);
        DefaultTableCellRenderer right = new DefaultTableCellRenderer();
        right.setHorizontalAlignment(SwingConstants.RIGHT);
        table.setDefaultRenderer(Object.class, right);
        JScrollPane pane = new JScrollPane(table);
        Looks.passWheel(pane);
        pane.setPreferredSize(new Dimension(
                100, table.getTableHeader().getPreferredSize().height + ROWS * table.getRowHeight() + 20));
        opens(profile, true);
        opens(residuals, false);
        for (JLabel label : new JLabel[] {profile, residuals}) {
            label.setToolTipText("Click to open the plot with its data");
            label.setCursor(Cursor.getPredefinedCursor(Cursor.HAND_CURSOR));
            JPanel line = new JPanel();
            line.setLayout(new BoxLayout(line, BoxLayout.X_AXIS));
            line.add(label);
            line.add(Box.createHorizontalGlue());
            add(line);
        }
        add(pane);
    }

    private void opens(JLabel label, boolean first) {
        label.addMouseListener(new MouseAdapter() {
            @Override
            public void mouseClicked(MouseEvent e) {
                (first ? profilePlot : residualPlot).ifPresent(Plot::show);
            }
        });
    }

    /** Shows rings, and the standard's lines where there are some. */
    void show(MeasuredRings measured, Optional<RingCalibration.Fitted> fitted) {
        profilePlot = Optional.of(RingPlots.profile(measured, fitted));
        residualPlot = fitted.map(RingPlots::residuals);
        draw(profile, profilePlot);
        draw(residuals, residualPlot);
        model.setRowCount(0);
        model.setColumnCount(0);
        fitted.map(RingTable::of).ifPresent(this::fill);
        revalidate();
        repaint();
    }

    private static void draw(JLabel label, Optional<Plot> plot) {
        label.setVisible(plot.isPresent());
        label.setIcon(
                plot.map(p -> new ImageIcon(p.getProcessor().createImage())).orElse(null));
    }

    private void fill(ResultsTable rings) {
        String[] columns = rings.getHeadings();
        model.setColumnIdentifiers(columns);
        for (int i = 0; i < columns.length; i++) {
            int header = table.getFontMetrics(table.getFont()).stringWidth(columns[i]) + COLUMN_ROOM;
            table.getColumnModel().getColumn(i).setPreferredWidth(Math.max(NARROWEST_COLUMN, header));
        }
        for (int row = 0; row < rings.size(); row++) {
            Object[] cells = new Object[columns.length];
            for (int i = 0; i < columns.length; i++) {
                String text = rings.getStringValue(columns[i], row);
                double number = rings.getValue(columns[i], row);
                boolean isText = text.startsWith("{") || Character.isLetter(text.isEmpty() ? ' ' : text.charAt(0));
                cells[i] = isText && !text.equals("NaN")
                        ? text
                        : Double.isNaN(number) ? "" : Reading.fixed(number, DECIMALS);
            }
            model.addRow(cells);
        }
    }
}
