package io.github.zonewright.imagej.workbench;

import io.github.zonewright.imagej.command.CrystalReport;
import java.awt.Color;
import java.awt.Dimension;
import java.util.List;
import javax.swing.BorderFactory;
import javax.swing.JScrollPane;
import javax.swing.JTextPane;
import javax.swing.text.BadLocationException;
import javax.swing.text.SimpleAttributeSet;
import javax.swing.text.StyleConstants;
import javax.swing.text.StyledDocument;

/** A small scrolling text: cautions in red on top, then facts, then every notice in full. */
final class CrystalText extends JScrollPane {
    private static final long serialVersionUID = 1L;
    private static final Color NOTICE = new Color(0x7A4A00);

    private final JTextPane text = new JTextPane();

    CrystalText(String name, int height) {
        text.setName(name);
        text.setEditable(false);
        text.setFont(Looks.text());
        text.setBorder(BorderFactory.createEmptyBorder(3, Looks.GAP, 3, Looks.GAP));
        setViewportView(text);
        Looks.passWheel(this);
        setBorder(BorderFactory.createLineBorder(Looks.RULE));
        setHorizontalScrollBarPolicy(HORIZONTAL_SCROLLBAR_NEVER);
        setPreferredSize(new Dimension(100, height));
        setMinimumSize(getPreferredSize());
    }

    /** Shows a report, with something to say before it. */
    void show(List<String> first, CrystalReport report, List<String> last) {
        clear();
        report.cautions().forEach(t -> add(t, Looks.WRONG, true));
        first.forEach(t -> add(t, Color.BLACK, true));
        report.facts().forEach(t -> add(t, Color.BLACK, false));
        report.notices().forEach(t -> add(t, NOTICE, false));
        last.forEach(t -> add(t, Looks.QUIET, false));
        text.setCaretPosition(0);
    }

    /** Shows facts, with what is missing. */
    void show(List<String> facts, List<String> missing) {
        clear();
        facts.forEach(t -> add(t, Color.BLACK, false));
        missing.forEach(t -> add(t, Looks.WRONG, false));
        text.setCaretPosition(0);
    }

    /** Says why something did not work, above what stands there. */
    void refuse(String reason) {
        clear();
        add(reason, Looks.WRONG, false);
        text.setCaretPosition(0);
    }

    private void clear() {
        text.setText("");
    }

    private void add(String line, Color colour, boolean bold) {
        SimpleAttributeSet style = new SimpleAttributeSet();
        StyleConstants.setForeground(style, colour);
        StyleConstants.setBold(style, bold);
        StyledDocument document = text.getStyledDocument();
        try {
            document.insertString(document.getLength(), document.getLength() == 0 ? line : "\n" + line, style);
        } catch (BadLocationException e) {
            throw new IllegalStateException(e);
        }
    }
}
