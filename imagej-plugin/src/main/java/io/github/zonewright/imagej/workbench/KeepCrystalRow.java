package io.github.zonewright.imagej.workbench;

import io.github.zonewright.imagej.session.CrystalOffer;
import io.github.zonewright.imagej.session.UserFolder;
import java.io.IOException;
import java.util.function.Consumer;
import javax.swing.Box;
import javax.swing.BoxLayout;
import javax.swing.JButton;
import javax.swing.JLabel;
import javax.swing.JPanel;

/**
 * Keeps a crystal in the user's folder under a name, or removes it from there. Removing deletes a file, so the button asks
 * for a second click.
 */
final class KeepCrystalRow extends JPanel {
    private static final long serialVersionUID = 1L;

    private final CheckedField<String> name = new CheckedField<>("keep as", 16, KeepCrystalRow::named);
    private final JLabel label = Looks.label("Keep as");
    private final JButton keep = new JButton("Keep on my shelf");
    private final JButton remove = new JButton("Remove from my shelf");
    private final JLabel said = Looks.quiet("");
    private transient CrystalOffer offer;
    private transient Consumer<CrystalOffer.InFolder> onKept = kept -> {};
    private transient Consumer<CrystalOffer.InFolder> onRemoved = removed -> {};
    private boolean sure;

    KeepCrystalRow() {
        setLayout(new BoxLayout(this, BoxLayout.Y_AXIS));
        setName("keep crystal");
        for (JButton button : new JButton[] {keep, remove}) {
            button.setFont(Looks.text());
            button.setName(button.getText());
        }
        name.setToolTipText("The name by which you find it again");
        remove.setToolTipText(
                "Deletes the file of this crystal from your shelf; it stays at hand until the window closes");
        keep.setToolTipText(
                "Writes the crystal as a CIF into " + UserFolder.crystals().path());
        said.setName("keep note");
        add(left(Section.line(label, name, keep, remove)));
        add(left(name.reasonLabel()));
        add(left(said));
        name.onChange(() -> keep.setEnabled(name.value().isPresent()));
        keep.addActionListener(e -> keep());
        remove.addActionListener(e -> remove());
    }

    private static JPanel left(java.awt.Component part) {
        JPanel line = new JPanel();
        line.setLayout(new BoxLayout(line, BoxLayout.X_AXIS));
        line.add(part);
        line.add(Box.createHorizontalGlue());
        return line;
    }

    private static String named(String text) {
        UserFolder.checkName(text);
        return text;
    }

    void onKept(Consumer<CrystalOffer.InFolder> listener) {
        onKept = listener;
    }

    void onRemoved(Consumer<CrystalOffer.InFolder> listener) {
        onRemoved = listener;
    }

    /** Offers what can be done with this. */
    void show(CrystalOffer other) {
        offer = other;
        boolean loose = other instanceof CrystalOffer.Loose;
        boolean mine = other instanceof CrystalOffer.InFolder;
        setVisible(loose || mine);
        label.setVisible(loose);
        name.setVisible(loose);
        name.reasonLabel().setVisible(loose);
        keep.setVisible(loose);
        remove.setVisible(mine);
        name.setText(loose ? other.name() : "");
        ask(false);
        said.setText("");
    }

    private void keep() {
        if (!(offer instanceof CrystalOffer.Loose loose) || name.value().isEmpty()) {
            return;
        }
        try {
            onKept.accept(new CrystalOffer.InFolder(
                    UserFolder.keep(loose.crystal(), name.value().get())));
        } catch (IOException | IllegalArgumentException e) {
            refuse(e.getMessage());
        }
    }

    private void remove() {
        if (!(offer instanceof CrystalOffer.InFolder mine)) {
            return;
        }
        if (!sure) {
            ask(true);
            said.setForeground(Looks.QUIET);
            said.setText(Looks.wrapped("This deletes " + mine.kept().file() + ".", 440));
            return;
        }
        ask(false);
        try {
            UserFolder.crystals().remove(mine.kept());
            onRemoved.accept(mine);
        } catch (IOException | IllegalArgumentException e) {
            refuse(e.getMessage());
        }
    }

    private void ask(boolean asked) {
        sure = asked;
        remove.setText(asked ? "Click again to delete the file" : "Remove from my shelf");
    }

    private void refuse(String reason) {
        said.setForeground(Looks.WRONG);
        said.setText(Looks.wrapped(reason, 440));
    }
}
