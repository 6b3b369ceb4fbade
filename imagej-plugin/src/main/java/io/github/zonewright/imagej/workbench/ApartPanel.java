package io.github.zonewright.imagej.workbench;

import io.github.zonewright.imagej.overlay.TiltPicture;
import io.github.zonewright.imagej.session.Comparison;
import io.github.zonewright.indexing.Discrimination;
import java.awt.BorderLayout;
import java.awt.Component;
import java.util.List;
import java.util.Optional;
import javax.swing.DefaultListCellRenderer;
import javax.swing.ImageIcon;
import javax.swing.JComboBox;
import javax.swing.JLabel;
import javax.swing.JList;
import javax.swing.JPanel;

/** What tells apart: the solution shown against another, in sentences and in the two patterns after a tilt. */
final class ApartPanel extends JPanel {
    private static final long serialVersionUID = 1L;

    private final JComboBox<Comparison> against = new JComboBox<>();
    private final JLabel own = Looks.label(" ");
    private final Words words = new Words("apart");
    private final JLabel picture = new JLabel();
    private transient List<Comparison> pairs = List.of();
    private transient Optional<Comparison> answered = Optional.empty();
    private transient Runnable onChoose = () -> {};
    private boolean quiet;

    ApartPanel() {
        super(new BorderLayout(0, Looks.GAP));
        QuestionsWindow.pad(this);
        against.setName("against");
        against.setFont(Looks.text());
        against.setToolTipText("The other solution; the first is the one that is chosen in the list");
        against.setRenderer(new DefaultListCellRenderer() {
            private static final long serialVersionUID = 1L;

            @Override
            public Component getListCellRendererComponent(
                    JList<?> in, Object value, int index, boolean selected, boolean focused) {
                String label = value instanceof Comparison pair ? pair.label() : "";
                return super.getListCellRendererComponent(in, label, index, selected, focused);
            }
        });
        against.addActionListener(e -> chosen());
        picture.setName("patterns");
        picture.setHorizontalAlignment(JLabel.CENTER);
        add(Section.line(own, against), BorderLayout.NORTH);
        add(QuestionsWindow.scroll(words), BorderLayout.CENTER);
        add(picture, BorderLayout.SOUTH);
    }

    /** Is told when another pair is chosen. */
    void onChoose(Runnable listener) {
        onChoose = listener;
    }

    /** The pair that a person looks at and that is not compared yet. */
    Optional<Comparison> unanswered() {
        return Optional.ofNullable((Comparison) against.getSelectedItem())
                .filter(pair -> isShowing() && answered.filter(pair::equals).isEmpty());
    }

    /** Keeps in mind that a pair is being compared. */
    void answered(Comparison pair) {
        answered = Optional.of(pair);
        words.say(List.of("Comparing."));
        picture.setIcon(null);
    }

    /** Offers pairs; says why when there is none. */
    void show(String first, List<Comparison> offered, boolean ready) {
        own.setText(first);
        against.setVisible(!offered.isEmpty());
        against.setEnabled(ready);
        if (!offered.equals(pairs)) {
            pairs = offered;
            quiet = true;
            against.removeAllItems();
            offered.forEach(against::addItem);
            quiet = false;
            answered = Optional.empty();
            picture.setIcon(null);
            words.say(List.of(offered.isEmpty() ? "Nothing stands against the solution shown." : ""));
        }
    }

    /** Shows what tells a pair apart. */
    void show(Discrimination found, boolean mirrored) {
        words.say(found.sentences());
        picture.setIcon(found.tilt()
                .map(t -> new ImageIcon(TiltPicture.of(t, mirrored)))
                .orElse(null));
    }

    private void chosen() {
        if (!quiet) {
            onChoose.run();
        }
    }
}
