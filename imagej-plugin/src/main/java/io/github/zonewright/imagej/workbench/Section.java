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
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import javax.swing.BorderFactory;
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
    private final JLabel summary = Looks.quiet("");
    private final Set<Component> absent = new HashSet<>();
    private final JPanel top = new JPanel(new BorderLayout());
    private final String heading;
    private int row;
    private boolean folded;
    private transient Runnable onFold = () -> {};

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
                onFold.run();
            }
        });
        summary.setName("summary " + heading);
        summary.setVisible(false);
        title.setOpaque(true);
        title.setBorder(BorderFactory.createEmptyBorder(3, 0, 3, Looks.GAP));
        top.add(title, BorderLayout.LINE_START);
        top.add(summary, BorderLayout.CENTER);
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

    final String heading() {
        return heading;
    }

    /** Is told when a person folds the section or opens it. */
    final void onFold(Runnable listener) {
        onFold = listener;
    }

    /** Says that a person works here and needs more room: others fold sooner than this one. */
    final void workedIn() {
        if (!folded) {
            onFold.run();
        }
    }

    /** Says in the heading, while the section is folded, what stands in it. */
    final void summary(String text) {
        summary.setText(text);
        summary.setToolTipText(text.isEmpty() ? null : text);
    }

    /** Marks the section that has the next thing to do. */
    final void next(boolean here) {
        title.setBackground(here ? Looks.GUIDE_GROUND : null);
        top.setBackground(here ? Looks.GUIDE_GROUND : null);
    }

    final boolean isFolded() {
        return folded;
    }

    /** Folds the section to its heading, or opens it. */
    final void fold(boolean away) {
        folded = away;
        title.setText((away ? FOLDED : OPEN) + heading);
        summary.setVisible(away);
        for (Component part : getComponents()) {
            if (part != top) {
                part.setVisible(!away && !absent.contains(part));
            }
        }
        revalidate();
    }

    /** Shows one of the rows or takes it away; while the section is folded it comes with the others when that opens. */
    final void show(Component part, boolean present) {
        if (present) {
            absent.remove(part);
        } else {
            absent.add(part);
        }
        part.setVisible(present && !folded);
    }

    /** A row that is there as long as a label has something to say. */
    final void saying(JLabel label) {
        JPanel line = line(label);
        wide(line);
        Runnable check = () -> show(line, !label.getText().isBlank());
        label.addPropertyChangeListener("text", e -> check.run());
        check.run();
    }

    @Override
    public final Dimension getMaximumSize() {
        return new Dimension(Integer.MAX_VALUE, getPreferredSize().height);
    }

    /** Height in px when it is folded. */
    final int foldedHeight() {
        Insets around = getInsets();
        return around.top + around.bottom + top.getPreferredSize().height + Looks.GAP / 2;
    }

    /** Height in px when it is open. */
    final int openHeight() {
        if (!folded) {
            return getPreferredSize().height;
        }
        fold(false);
        int height = getPreferredSize().height;
        fold(true);
        return height;
    }

    /** A row with a label on the left; returns the label and what is right of it. */
    final List<Component> row(String label, Component... parts) {
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
        return List.of(name, line);
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
