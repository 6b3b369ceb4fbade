package io.github.zonewright.imagej.workbench;

import java.awt.BorderLayout;
import java.util.List;
import javax.swing.JButton;
import javax.swing.JLabel;
import javax.swing.JPanel;

/** What is left over: the search for further crystals, and what came of it. */
final class LeftoverPanel extends JPanel {
    private static final long serialVersionUID = 1L;

    private final JButton search = new JButton("Search what is left over");
    private final JButton table = new JButton("Table of spots left over");
    private final JLabel among = Looks.quiet(" ");
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
        top.add(among, BorderLayout.SOUTH);
        add(top, BorderLayout.NORTH);
        add(QuestionsWindow.scroll(words), BorderLayout.CENTER);
    }

    JButton search() {
        return search;
    }

    JButton table() {
        return table;
    }

    /** Shows what can be done, among which crystals, and what is known. */
    void show(boolean ready, List<String> crystals, List<String> sentences) {
        search.setEnabled(ready && !crystals.isEmpty());
        table.setEnabled(ready);
        among.setText("Among: " + (crystals.size() > 3 ? crystals.size() + " candidates" : String.join(", ", crystals))
                + ", as chosen under Crystal.");
        words.say(sentences);
    }
}
