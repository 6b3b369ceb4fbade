package io.github.zonewright.imagej.workbench;

import java.awt.BorderLayout;
import java.awt.Component;
import java.awt.Cursor;
import java.awt.Dimension;
import java.awt.GridBagConstraints;
import java.awt.GridBagLayout;
import java.awt.Insets;
import java.awt.event.MouseAdapter;
import java.awt.event.MouseEvent;
import javax.swing.Box;
import javax.swing.BoxLayout;
import javax.swing.JButton;
import javax.swing.JComponent;
import javax.swing.JLabel;
import javax.swing.JPanel;
import javax.swing.SwingUtilities;

/** A part of the window: a heading, and rows of a label and what belongs to it. */
class Section extends JPanel {
    private static final long serialVersionUID = 1L;

    private static final String OPEN = "▾  ";
    private static final String FOLDED = "▸  ";

    private final JLabel title;
    private final JPanel top = new JPanel(new BorderLayout());
    private final String heading;
    private int row;
    private boolean folded;

    Section(String heading) {
        super(new GridBagLayout());
        this.heading = heading;
        setBorder(Looks.section());
        title = Looks.heading(OPEN + heading);
        title.setName("heading " + heading);
        title.setToolTipText("Click to fold this part away, or to open it");
        title.setCursor(Cursor.getPredefinedCursor(Cursor.HAND_CURSOR));
        title.addMouseListener(new MouseAdapter() {
            @Override
            public void mousePressed(MouseEvent e) {
                fold(!folded);
            }
        });
        top.add(title, BorderLayout.CENTER);
        top.add(help(), BorderLayout.LINE_END);
        wide(top);
    }

    /** Opens the help at the section that a component belongs to, or else at its start. */
    static void helpOn(Component part) {
        Section in =
                part instanceof Section own ? own : (Section) SwingUtilities.getAncestorOfClass(Section.class, part);
        HelpWindow.open(in == null ? HelpWindow.START : HelpWindow.anchor(in.heading));
    }

    private JButton help() {
        JButton help = new JButton("?");
        help.setName("help " + heading);
        help.setFont(Looks.text());
        help.setMargin(new Insets(0, 5, 0, 5));
        help.setFocusable(false);
        help.setToolTipText("Help on this part (F1)");
        help.addActionListener(e -> helpOn(this));
        return help;
    }

    /** Folds the section to its heading, or opens it. */
    final void fold(boolean away) {
        folded = away;
        title.setText((away ? FOLDED : OPEN) + heading);
        for (Component part : getComponents()) {
            if (part != top) {
                part.setVisible(!away);
            }
        }
        revalidate();
    }

    /** A row with a label on the left. */
    final void row(String label, Component... parts) {
        JLabel name = Looks.label(label);
        name.setPreferredSize(new Dimension(Looks.LABEL_WIDTH, name.getPreferredSize().height));
        GridBagConstraints c = place(0, 1);
        add(name, c);
        JPanel line = line(parts);
        c = place(1, 1);
        c.weightx = 1;
        c.fill = GridBagConstraints.HORIZONTAL;
        add(line, c);
        for (Component part : parts) {
            if (part instanceof JComponent field && name.getLabelFor() == null) {
                name.setLabelFor(field);
            }
        }
        row++;
    }

    /** A row that takes the whole width. */
    final void wide(Component part) {
        GridBagConstraints c = place(0, 2);
        c.weightx = 1;
        c.fill = GridBagConstraints.HORIZONTAL;
        add(part, c);
        row++;
    }

    static JPanel line(Component... parts) {
        JPanel line = new JPanel();
        line.setLayout(new BoxLayout(line, BoxLayout.X_AXIS));
        for (int i = 0; i < parts.length; i++) {
            if (i > 0) {
                line.add(Box.createHorizontalStrut(Looks.GAP));
            }
            line.add(parts[i]);
        }
        line.add(Box.createHorizontalGlue());
        return line;
    }

    private GridBagConstraints place(int column, int width) {
        GridBagConstraints c = new GridBagConstraints();
        c.gridx = column;
        c.gridy = row;
        c.gridwidth = width;
        c.anchor = GridBagConstraints.LINE_START;
        c.insets =
                new Insets(row == 0 ? 0 : Looks.GAP / 2, 0, Looks.GAP / 2, column == 0 && width == 1 ? Looks.GAP : 0);
        return c;
    }
}
