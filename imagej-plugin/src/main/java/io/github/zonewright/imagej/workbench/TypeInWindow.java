package io.github.zonewright.imagej.workbench;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.imagej.command.CrystalReport;
import io.github.zonewright.imagej.session.CrystalOffer;
import io.github.zonewright.imagej.session.UserFolder;
import java.awt.BorderLayout;
import java.io.IOException;
import java.util.List;
import java.util.Optional;
import java.util.function.Consumer;
import javax.swing.BorderFactory;
import javax.swing.Box;
import javax.swing.BoxLayout;
import javax.swing.JButton;
import javax.swing.JFrame;
import javax.swing.JPanel;
import javax.swing.JTabbedPane;

/** Takes a crystal as it is typed, by structure type or by cell and sites, and shows at once what it makes. */
final class TypeInWindow extends JFrame {
    private static final long serialVersionUID = 1L;
    private static final int RESULT_HEIGHT = 96;

    private final TypePanel byType = new TypePanel();
    private final CellPanel byCell = new CellPanel();
    private final JTabbedPane ways = new JTabbedPane();
    private final CheckedField<String> name = new CheckedField<>("crystal name", 24, text -> text);
    private final CrystalText result = new CrystalText("typed crystal", RESULT_HEIGHT);
    private final JButton use = new JButton("Use");
    private final JButton keep = new JButton("Keep on my shelf");
    private final transient Consumer<CrystalOffer> onUse;
    private transient Optional<Crystal> crystal = Optional.empty();

    TypeInWindow(Consumer<CrystalOffer> onUse) {
        super("Type in a crystal");
        this.onUse = onUse;
        setName("type-in window");
        setDefaultCloseOperation(DISPOSE_ON_CLOSE);
        ways.setName("ways");
        ways.setFont(Looks.text());
        ways.addTab("Structure type", byType);
        ways.addTab("Cell, space group and sites", byCell);
        for (JButton button : new JButton[] {use, keep}) {
            button.setName(button.getText());
            button.setFont(Looks.text());
        }
        keep.setToolTipText(
                "Writes the crystal as a CIF into " + UserFolder.crystals().path());
        name.setToolTipText("Blank for the formula");
        JPanel below = new JPanel();
        below.setLayout(new BoxLayout(below, BoxLayout.Y_AXIS));
        below.setBorder(BorderFactory.createEmptyBorder(Looks.GAP, Looks.MARGIN, Looks.MARGIN, Looks.MARGIN));
        below.add(Section.line(Looks.label("Name"), name, Looks.quiet("blank for the formula")));
        below.add(Box.createVerticalStrut(Looks.GAP));
        below.add(result);
        below.add(Box.createVerticalStrut(Looks.GAP));
        below.add(Section.line(use, keep));
        add(ways, BorderLayout.CENTER);
        add(below, BorderLayout.SOUTH);
        ways.addChangeListener(e -> check());
        byType.onChange(this::check);
        byCell.onChange(this::check);
        name.onChange(this::check);
        use.addActionListener(e -> crystal.ifPresent(c -> onUse.accept(new CrystalOffer.Loose(c, "typed in"))));
        keep.addActionListener(e -> crystal.ifPresent(this::keep));
        getRootPane().setDefaultButton(use);
        check();
        pack();
    }

    private void check() {
        String called = name.getText();
        crystal = Optional.empty();
        try {
            crystal = ways.getSelectedIndex() == 0 ? byType.crystal(called) : byCell.crystal(called);
            crystal.ifPresentOrElse(
                    c -> result.show(List.of(c.name()), CrystalReport.of(c), List.of()),
                    () -> result.show(List.of("Fill in what is marked."), List.of()));
        } catch (IllegalArgumentException e) {
            result.refuse(e.getMessage());
        }
        use.setEnabled(crystal.isPresent());
        keep.setEnabled(crystal.isPresent());
    }

    private void keep(Crystal typed) {
        try {
            onUse.accept(new CrystalOffer.InFolder(UserFolder.keep(typed, typed.name())));
            result.show(
                    List.of(typed.name()),
                    CrystalReport.of(typed),
                    List.of("Kept in " + UserFolder.crystals().path()));
        } catch (IOException | IllegalArgumentException e) {
            result.refuse(e.getMessage());
        }
    }
}
