package io.github.zonewright.imagej.workbench;

import java.awt.BorderLayout;
import java.util.List;
import java.util.Optional;
import javax.swing.JButton;
import javax.swing.JComboBox;
import javax.swing.JPanel;

/** What is left over: the search for further crystals, and what came of it. */
final class LeftoverPanel extends JPanel {
    private static final long serialVersionUID = 1L;

    private static final String CHOSEN = "what is chosen under Crystal";

    private final JButton search = new JButton("Search what is left over");
    private final JButton table = new JButton("Table of spots left over");
    private final JComboBox<String> among = new JComboBox<>();
    private final Words words = new Words("left over");

    LeftoverPanel() {
        super(new BorderLayout(0, Looks.GAP));
        QuestionsWindow.pad(this);
        search.setToolTipText("Searches a second grain, a twin or another phase among the spots that nothing explains");
        table.setToolTipText("Each spot left over: its indices in the frame of the solution, and what it may be");
        for (JButton button : List.of(search, table)) {
            button.setFont(Looks.text());
            button.setName(button.getText());
        }
        JPanel top = new JPanel(new BorderLayout(0, Looks.GAP));
        top.add(Section.line(search, table), BorderLayout.NORTH);
        among.setName("among");
        among.setFont(Looks.text());
        among.setToolTipText("What the further crystals may be: one crystal, or a list of candidates");
        top.add(Section.line(Looks.label("Among"), among), BorderLayout.SOUTH);
        add(top, BorderLayout.NORTH);
        add(QuestionsWindow.scroll(words), BorderLayout.CENTER);
    }

    JButton search() {
        return search;
    }

    JButton table() {
        return table;
    }

    /** Offers crystals and lists by name. */
    void offer(List<String> names) {
        Object before = among.getSelectedItem();
        among.removeAllItems();
        among.addItem(CHOSEN);
        names.forEach(among::addItem);
        among.setSelectedItem(before == null ? CHOSEN : before);
    }

    /** The crystal or list that a person named for the search; empty for what is chosen under Crystal. */
    Optional<String> named() {
        return Optional.ofNullable((String) among.getSelectedItem()).filter(name -> !name.equals(CHOSEN));
    }

    /** Shows what can be done and what is known. */
    void show(boolean ready, List<String> sentences) {
        search.setEnabled(ready);
        table.setEnabled(ready);
        words.say(sentences);
    }
}
