package io.github.zonewright.imagej.workbench;

import io.github.zonewright.crystal.CifStructure;
import java.awt.BorderLayout;
import java.awt.Component;
import java.awt.Dimension;
import java.awt.event.MouseAdapter;
import java.awt.event.MouseEvent;
import java.util.List;
import java.util.function.Consumer;
import javax.swing.BorderFactory;
import javax.swing.DefaultListCellRenderer;
import javax.swing.JButton;
import javax.swing.JFrame;
import javax.swing.JList;
import javax.swing.JPanel;
import javax.swing.JScrollPane;
import javax.swing.ListSelectionModel;

/** Lets a person choose among the structures of a CIF file; those that can't be used stand there with the reason. */
final class StructureWindow extends JFrame {
    private static final long serialVersionUID = 1L;

    private final JList<CifStructure> list;
    private final JButton use = new JButton("Use");
    private final transient Consumer<CifStructure.Usable> onUse;

    StructureWindow(String file, List<CifStructure> structures, Consumer<CifStructure.Usable> onUse) {
        super("Structures of " + file);
        this.onUse = onUse;
        setName("structures window");
        list = new JList<>(structures.toArray(CifStructure[]::new));
        list.setName("structures");
        list.setFont(Looks.text());
        list.setSelectionMode(ListSelectionModel.SINGLE_SELECTION);
        list.setCellRenderer(new StructureCell());
        list.addListSelectionListener(e -> use.setEnabled(list.getSelectedValue() instanceof CifStructure.Usable));
        list.addMouseListener(new MouseAdapter() {
            @Override
            public void mouseClicked(MouseEvent e) {
                if (e.getClickCount() == 2) {
                    use();
                }
            }
        });
        use.setName("Use");
        use.setFont(Looks.text());
        use.setEnabled(false);
        use.addActionListener(e -> use());
        JPanel below = Section.line(Looks.quiet("Which one is it?"));
        below.add(use);
        below.setBorder(BorderFactory.createEmptyBorder(Looks.GAP, Looks.MARGIN, Looks.GAP, Looks.MARGIN));
        JScrollPane pane = new JScrollPane(list);
        pane.setBorder(BorderFactory.createEmptyBorder());
        pane.setPreferredSize(new Dimension(520, 240));
        add(pane, BorderLayout.CENTER);
        add(below, BorderLayout.SOUTH);
        getRootPane().setDefaultButton(use);
        setDefaultCloseOperation(DISPOSE_ON_CLOSE);
        for (int i = 0; i < structures.size() && list.isSelectionEmpty(); i++) {
            if (structures.get(i) instanceof CifStructure.Usable) {
                list.setSelectedIndex(i);
            }
        }
        pack();
    }

    private void use() {
        if (list.getSelectedValue() instanceof CifStructure.Usable usable) {
            dispose();
            onUse.accept(usable);
        }
    }

    /** Name and formula, or name and reason. */
    private static final class StructureCell extends DefaultListCellRenderer {
        private static final long serialVersionUID = 1L;

        @Override
        public Component getListCellRendererComponent(
                JList<?> in, Object value, int index, boolean selected, boolean focused) {
            super.getListCellRendererComponent(in, value, index, selected, focused);
            setFont(Looks.text());
            setBorder(BorderFactory.createEmptyBorder(4, Looks.MARGIN, 4, Looks.MARGIN));
            if (value instanceof CifStructure.Refused) {
                setForeground(Looks.WRONG);
                setText(Looks.wrapped("Can't be used: " + value, 470));
            } else if (value instanceof CifStructure.Usable usable) {
                setText(usable.name() + ",  " + usable.crystal().formula() + ",  block " + usable.block());
            }
            return this;
        }
    }
}
