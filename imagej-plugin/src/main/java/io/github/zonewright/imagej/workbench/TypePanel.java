package io.github.zonewright.imagej.workbench;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.Element;
import io.github.zonewright.crystal.StructureType;
import io.github.zonewright.imagej.session.TypedCrystal;
import java.awt.BorderLayout;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import javax.swing.BorderFactory;
import javax.swing.JComboBox;
import javax.swing.JPanel;
import javax.swing.JScrollPane;

/** A crystal by structure type: the elements for each role, the free edges and the free coordinates. */
final class TypePanel extends JPanel {
    private static final long serialVersionUID = 1L;
    private static final double LEAST_EDGE = 0.5;
    private static final double LARGEST_EDGE = 500;

    private final JComboBox<StructureType> types =
            new JComboBox<>(StructureType.all().toArray(StructureType[]::new));
    private final JPanel place = new JPanel(new BorderLayout());
    private final transient List<CheckedField<String>> elements = new ArrayList<>();
    private final transient List<CheckedField<Double>> edges = new ArrayList<>();
    private final transient Map<String, CheckedField<Double>> parameters = new LinkedHashMap<>();
    private transient Runnable onChange = () -> {};

    TypePanel() {
        super(new BorderLayout());
        types.setName("structure type");
        types.setFont(Looks.text());
        types.setMaximumRowCount(16);
        types.addActionListener(e -> arrange());
        Section top = new Section("What it is built like");
        top.row("Structure type", types);
        add(top, BorderLayout.NORTH);
        JScrollPane pane = new JScrollPane(place);
        pane.setBorder(BorderFactory.createEmptyBorder());
        pane.setHorizontalScrollBarPolicy(JScrollPane.HORIZONTAL_SCROLLBAR_NEVER);
        pane.getVerticalScrollBar().setUnitIncrement(16);
        add(pane, BorderLayout.CENTER);
        arrange();
    }

    void onChange(Runnable listener) {
        onChange = listener;
    }

    /** The crystal, or empty while a field is wrong or not filled in. */
    Optional<Crystal> crystal(String name) {
        boolean right = elements.stream().allMatch(f -> f.value().isPresent())
                && edges.stream().allMatch(f -> f.value().isPresent())
                && parameters.values().stream().allMatch(f -> f.value().isPresent());
        if (!right) {
            return Optional.empty();
        }
        Map<String, Double> values = new LinkedHashMap<>();
        parameters.forEach((key, field) -> values.put(key, field.value().orElseThrow()));
        return Optional.of(TypedCrystal.ofType(
                name,
                type(),
                values,
                elements.stream().map(f -> f.value().orElseThrow()).toList(),
                edges.stream().map(f -> f.value().orElseThrow()).toList()));
    }

    private StructureType type() {
        return (StructureType) types.getSelectedItem();
    }

    /** Fields for what this type asks for; what was typed for another type stays where it can. */
    private void arrange() {
        List<String> before = elements.stream()
                .map(f -> f.getName().endsWith(" " + f.getText()) ? "" : f.getText())
                .toList();
        List<String> lengths = edges.stream().map(CheckedField::getText).toList();
        elements.clear();
        edges.clear();
        parameters.clear();
        StructureType type = type();
        Section fields = new Section("What it is made of");
        for (String role : type.roles()) {
            CheckedField<String> field = new CheckedField<>("element " + role, 5, TypePanel::element);
            String typed = elements.size() < before.size() ? before.get(elements.size()) : "";
            field.show(typed.isEmpty() ? role : typed);
            fields.row("In the place of " + role, field, field.reasonLabel());
            elements.add(field);
        }
        for (String edge : type.edges()) {
            CheckedField<Double> field =
                    new CheckedField<>("edge " + edge, 8, Reading.number(LEAST_EDGE, LARGEST_EDGE));
            field.show(edges.size() < lengths.size() ? lengths.get(edges.size()) : "");
            fields.row(edge, field, Looks.label("Å"), field.reasonLabel());
            edges.add(field);
        }
        type.parameters().forEach((key, value) -> {
            CheckedField<Double> field = new CheckedField<>("coordinate " + key, 8, Reading.number(-1, 1));
            field.show(Reading.text(value));
            field.setToolTipText("Free coordinate, as a fraction; in " + type.prototype() + " " + Reading.text(value));
            fields.row("Coordinate " + key, field, field.reasonLabel());
            parameters.put(key, field);
        });
        elements.forEach(f -> f.onChange(() -> onChange.run()));
        edges.forEach(f -> f.onChange(() -> onChange.run()));
        parameters.values().forEach(f -> f.onChange(() -> onChange.run()));
        place.removeAll();
        place.add(fields, BorderLayout.NORTH);
        place.revalidate();
        place.repaint();
        onChange.run();
    }

    private static String element(String text) {
        return Element.find(text)
                .map(Element::symbol)
                .orElseThrow(() -> new IllegalArgumentException("a chemical symbol, as Fe"));
    }
}
