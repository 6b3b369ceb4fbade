package io.github.zonewright.imagej.workbench;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.imagej.session.TypedCrystal;
import io.github.zonewright.symmetry.SpaceGroupSetting;
import java.awt.BorderLayout;
import java.awt.Component;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import javax.swing.JLabel;
import javax.swing.JPanel;

/** A crystal by cell, space group and sites. */
final class CellPanel extends JPanel {
    private static final long serialVersionUID = 1L;
    private static final List<String> AXES = List.of("a", "b", "c");
    private static final List<String> ANGLES = List.of("α", "β", "γ");

    private final CheckedField<SpaceGroupSetting> group = new CheckedField<>("space group", 14, CellPanel::group);
    private final JLabel resolved = Looks.quiet(" ");
    private final transient List<CheckedField<String>> cell = new ArrayList<>();
    private final SitesTable sites = new SitesTable();
    private transient Runnable onChange = () -> {};

    CellPanel() {
        super(new BorderLayout());
        Section fields = new Section("Space group and cell");
        resolved.setName("space group read");
        group.setToolTipText("A number, a Hermann-Mauguin symbol in any spelling, or a Hall symbol");
        fields.row("Space group", group, group.reasonLabel());
        fields.row("", resolved);
        fields.row("Edges", parts(AXES, "Å"));
        fields.row("Angles", parts(ANGLES, "°"));
        fields.row("", Looks.quiet("Blank for what follows from the group"));
        add(fields, BorderLayout.NORTH);
        add(sites, BorderLayout.CENTER);
        group.onChange(this::changed);
        sites.onChange(() -> onChange.run());
    }

    private Component[] parts(List<String> names, String unit) {
        List<Component> parts = new ArrayList<>();
        for (String name : names) {
            CheckedField<String> field = new CheckedField<>("cell " + name, 6, CellPanel::numberOrBlank);
            field.onChange(() -> onChange.run());
            cell.add(field);
            parts.add(Looks.label(name));
            parts.add(field);
        }
        parts.add(Looks.label(unit));
        cell.subList(cell.size() - names.size(), cell.size()).forEach(f -> parts.add(f.reasonLabel()));
        return parts.toArray(Component[]::new);
    }

    void onChange(Runnable listener) {
        onChange = listener;
    }

    /** The crystal, or empty while nothing much is typed. */
    Optional<Crystal> crystal(String name) {
        List<TypedCrystal.Site> typed = sites.sites();
        if (group.value().isEmpty() || cell.stream().anyMatch(f -> f.value().isEmpty())) {
            return Optional.empty();
        }
        if (typed.stream().allMatch(TypedCrystal.Site::isBlank)) {
            TypedCrystal.cell(group.value().get(), texts());
            throw new IllegalArgumentException("sites: none yet, expected at least one");
        }
        return Optional.of(TypedCrystal.ofCell(name, group.getText(), texts(), typed));
    }

    private List<String> texts() {
        return cell.stream().map(CheckedField::getText).toList();
    }

    private void changed() {
        resolved.setText(group.value().map(SpaceGroupSetting::toString).orElse(" "));
        onChange.run();
    }

    private static SpaceGroupSetting group(String text) {
        try {
            return TypedCrystal.group(text);
        } catch (IllegalArgumentException e) {
            throw new IllegalArgumentException("a number, or as Fm-3m", e);
        }
    }

    private static String numberOrBlank(String text) {
        if (!text.isBlank()) {
            Reading.number(0.1, 1000).apply(text);
        }
        return text;
    }
}
