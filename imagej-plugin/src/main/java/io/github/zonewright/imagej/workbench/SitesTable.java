package io.github.zonewright.imagej.workbench;

import io.github.zonewright.imagej.session.TypedCrystal;
import java.awt.BorderLayout;
import java.awt.Dimension;
import java.util.ArrayList;
import java.util.List;
import javax.swing.BorderFactory;
import javax.swing.DefaultCellEditor;
import javax.swing.JButton;
import javax.swing.JPanel;
import javax.swing.JScrollPane;
import javax.swing.JTable;
import javax.swing.JTextField;
import javax.swing.event.DocumentEvent;
import javax.swing.event.DocumentListener;
import javax.swing.table.DefaultTableModel;

/** The sites of a crystal, a row each, to type in; the last row stays free. */
final class SitesTable extends JPanel {
    private static final long serialVersionUID = 1L;
    private static final String[] COLUMNS = {"Atom", "x", "y", "z", "Occupancy", "B (Å²)"};

    private final DefaultTableModel model = new DefaultTableModel(COLUMNS, 1);
    private final JTable table = new JTable(model);
    private final JTextField typing = new JTextField();
    private final JButton remove = new JButton("Remove site");
    private transient Runnable onChange = () -> {};

    SitesTable() {
        super(new BorderLayout(0, Looks.GAP));
        setBorder(BorderFactory.createEmptyBorder(0, Looks.MARGIN, Looks.GAP, Looks.MARGIN));
        table.setName("sites");
        table.setFont(Looks.text());
        table.getTableHeader().setFont(Looks.text());
        table.getTableHeader().setReorderingAllowed(false);
        table.setRowHeight(21);
        table.setGridColor(Looks.RULE);
        table.setToolTipText("Coordinates as fractions, 0.25 or 1/4; occupancy blank for 1, B blank for none");
        table.putClientProperty("terminateEditOnFocusLost", Boolean.TRUE);
        remove.setName("Remove site");
        remove.setFont(Looks.text());
        remove.addActionListener(e -> removeChosen());
        typing.setFont(Looks.text());
        typing.setBorder(BorderFactory.createEmptyBorder(0, 2, 0, 2));
        typing.getDocument().addDocumentListener(new DocumentListener() {
            @Override
            public void insertUpdate(DocumentEvent e) {
                onChange.run();
            }

            @Override
            public void removeUpdate(DocumentEvent e) {
                onChange.run();
            }

            @Override
            public void changedUpdate(DocumentEvent e) {
                onChange.run();
            }
        });
        table.setDefaultEditor(Object.class, new DefaultCellEditor(typing));
        JScrollPane pane = new JScrollPane(table);
        pane.setPreferredSize(new Dimension(440, 150));
        add(Looks.heading("Sites"), BorderLayout.NORTH);
        add(pane, BorderLayout.CENTER);
        add(Section.line(remove), BorderLayout.SOUTH);
        model.addTableModelListener(e -> changed());
    }

    void onChange(Runnable listener) {
        onChange = listener;
    }

    /** The rows, blank ones too, with what is being typed. */
    List<TypedCrystal.Site> sites() {
        List<TypedCrystal.Site> sites = new ArrayList<>();
        for (int row = 0; row < model.getRowCount(); row++) {
            sites.add(new TypedCrystal.Site(
                    text(row, 0), text(row, 1), text(row, 2), text(row, 3), text(row, 4), text(row, 5)));
        }
        return sites;
    }

    private String text(int row, int column) {
        boolean typed = table.isEditing() && table.getEditingRow() == row && table.getEditingColumn() == column;
        Object value = typed ? typing.getText() : model.getValueAt(row, column);
        return value == null ? "" : value.toString().strip();
    }

    private void removeChosen() {
        if (table.isEditing()) {
            table.getCellEditor().cancelCellEditing();
        }
        int row = table.getSelectedRow();
        if (row >= 0) {
            model.removeRow(row);
        }
    }

    private void changed() {
        List<TypedCrystal.Site> sites = sites();
        if (sites.isEmpty() || !sites.get(sites.size() - 1).isBlank()) {
            model.addRow(new Object[COLUMNS.length]);
            return;
        }
        onChange.run();
    }
}
