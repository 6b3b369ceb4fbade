package io.github.zonewright.imagej.workbench;

import ij.Prefs;
import ij.io.OpenDialog;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.imagej.command.CrystalChoice;
import io.github.zonewright.lattice.Lattice;
import java.io.File;
import java.io.IOException;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import javax.swing.JButton;
import javax.swing.JComboBox;
import javax.swing.JLabel;

/** The crystal: from the shelf, or from a CIF file, which then stands on the list too. */
final class CrystalSection extends Section {
    private static final long serialVersionUID = 1L;
    private static final List<String> SHELF = CrystalChoice.shelfNames();
    private static final String KEY = "zonewright.crystal";

    private final JComboBox<String> names = new JComboBox<>();
    private final JButton open = new JButton("Open CIF…");
    private final JLabel cell = Looks.quiet(" ");
    private final transient Map<String, Crystal> opened = new LinkedHashMap<>();
    private transient Optional<Crystal> crystal = Optional.empty();
    private transient Runnable onChange = () -> {};
    private boolean quiet;

    CrystalSection() {
        super("Crystal");
        SHELF.forEach(names::addItem);
        names.setFont(Looks.text());
        names.setName("crystal");
        open.setFont(Looks.text());
        open.setToolTipText("Reads cell, space group and atoms from a CIF file");
        row("Crystal", names, open);
        row("", cell);
        names.setSelectedItem(Prefs.get(KEY, SHELF.get(0)));
        names.addActionListener(e -> choose());
        open.addActionListener(e -> ask());
        choose();
    }

    void onChange(Runnable listener) {
        onChange = listener;
    }

    Optional<Crystal> crystal() {
        return crystal;
    }

    /** Shows a crystal that came from elsewhere, without telling the listener. */
    void show(Crystal other) {
        if (crystal.filter(other::equals).isPresent()) {
            return;
        }
        quiet = true;
        if (!SHELF.contains(other.name())
                || !ofShelf(other.name()).filter(other::equals).isPresent()) {
            add(other);
        }
        names.setSelectedItem(other.name());
        quiet = false;
    }

    /** Reads a CIF file; what is wrong with it is said where the cell would be. */
    void read(File file) {
        try {
            Crystal read = CrystalChoice.of("", file);
            add(read);
            names.setSelectedItem(read.name());
        } catch (IOException | IllegalArgumentException e) {
            cell.setForeground(Looks.WRONG);
            cell.setText(Looks.wrapped(file.getName() + ": " + e.getMessage(), 290));
        }
    }

    private void add(Crystal other) {
        if (opened.put(other.name(), other) == null && !SHELF.contains(other.name())) {
            names.addItem(other.name());
        }
    }

    private void ask() {
        OpenDialog dialog = new OpenDialog("Open a crystal from a CIF file");
        if (dialog.getPath() != null) {
            read(new File(dialog.getPath()));
        }
    }

    private void choose() {
        String name = (String) names.getSelectedItem();
        if (name == null) {
            return;
        }
        crystal = Optional.ofNullable(opened.get(name)).or(() -> ofShelf(name));
        cell.setForeground(Looks.QUIET);
        cell.setText(crystal.map(CrystalSection::describe).orElse(" "));
        if (SHELF.contains(name)) {
            Prefs.set(KEY, name);
        }
        if (!quiet) {
            onChange.run();
        }
    }

    private static Optional<Crystal> ofShelf(String name) {
        return CrystalShelf.find(name);
    }

    private static String describe(Crystal crystal) {
        Lattice l = crystal.lattice();
        return crystal.formula() + ";  " + Reading.text(l.a()) + ", " + Reading.text(l.b()) + ", "
                + Reading.text(l.c()) + " Å;  " + degrees(l.alpha()) + ", " + degrees(l.beta()) + ", "
                + degrees(l.gamma()) + "°";
    }

    private static String degrees(double radians) {
        return Reading.text(Math.rint(1e4 * Math.toDegrees(radians)) / 1e4);
    }
}
