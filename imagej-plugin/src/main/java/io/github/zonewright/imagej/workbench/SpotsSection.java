package io.github.zonewright.imagej.workbench;

import io.github.zonewright.imagej.session.LengthUnit;
import java.awt.BorderLayout;
import java.awt.Component;
import java.awt.Dimension;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.function.Consumer;
import javax.swing.ButtonGroup;
import javax.swing.JButton;
import javax.swing.JCheckBox;
import javax.swing.JComboBox;
import javax.swing.JLabel;
import javax.swing.JMenuItem;
import javax.swing.JPanel;
import javax.swing.JPopupMenu;
import javax.swing.JToggleButton;
import javax.swing.SwingConstants;

/** What is measured on the image before any crystal is known: spots, centre, net, and the ruler. */
final class SpotsSection extends Section {
    private static final long serialVersionUID = 1L;
    private static final int LINES = 4;
    private static final int TEXT_WIDTH = 500;

    private final JButton findSpots = new JButton("Find spots");
    private final JButton table = new JButton("Table of spots");
    private final JButton profile = new JButton("Profile ▾");
    private final JComboBox<String> unit = new JComboBox<>();
    private final JLabel said = Looks.label(" ");
    private final JCheckBox dark = new JCheckBox("Dark spots on bright ground");
    private final JLabel ground = Looks.label("");
    private final JCheckBox shown = new JCheckBox("In place of the pattern");
    private final JButton hidden = new JButton("Hidden area ▾");
    private final Map<HandMode, JToggleButton> modes = new EnumMap<>(HandMode.class);
    private final RulerPanel ruler = new RulerPanel();

    SpotsSection() {
        super("Measured spots");
        for (JButton button : List.of(findSpots, table, profile, hidden)) {
            button.setFont(Looks.text());
            button.setName(button.getText().replace(" ▾", ""));
        }
        for (JCheckBox box : List.of(dark, shown)) {
            box.setFont(Looks.text());
            box.setName(box.getText());
        }
        for (LengthUnit each : LengthUnit.values()) {
            unit.addItem(each.label());
        }
        unit.setName("lengths");
        unit.setFont(Looks.text());
        unit.setMaximumSize(unit.getPreferredSize());
        unit.setSelectedItem(LengthUnit.last().label());
        unit.setToolTipText("The unit of all spacings");
        findSpots.setToolTipText("Measures the spots of this image, its centre and the net of the spots");
        table.setToolTipText("Shows the spots as an ImageJ table");
        profile.setToolTipText("Plots the grey value along a row of spots or about the centre");
        hidden.setToolTipText("The area behind the beam stop, where nothing is measured");
        dark.setToolTipText("For a negative on film: the inverse is measured, the image stays as it is");
        shown.setToolTipText("Draws the measured spots where a computed pattern lies over the image");
        said.setName("measured");
        said.setVerticalAlignment(SwingConstants.TOP);
        said.setPreferredSize(new Dimension(100, LINES * Looks.label("X").getPreferredSize().height + 2));
        ground.setForeground(Looks.WRONG);
        ground.setName("ground");
        wide(line(findSpots, table, profile, hidden, unit));
        wide(said);
        wide(line(dark, ground));
        ButtonGroup group = new ButtonGroup();
        Component[] buttons = new Component[HandMode.values().length + 1];
        for (HandMode mode : HandMode.values()) {
            JToggleButton button = new JToggleButton(mode.label(), mode == HandTool.mode());
            button.setFont(Looks.text());
            button.setName("hand " + mode.label());
            button.setToolTipText(mode.help());
            group.add(button);
            modes.put(mode, button);
            buttons[mode.ordinal()] = button;
        }
        buttons[buttons.length - 1] = shown;
        row("Hand tool takes", buttons);
        JPanel place = new JPanel(new BorderLayout());
        place.add(ruler);
        wide(place);
        ruler.setVisible(HandTool.mode() == HandMode.RULER);
    }

    JButton findSpots() {
        return findSpots;
    }

    JButton table() {
        return table;
    }

    JCheckBox dark() {
        return dark;
    }

    JCheckBox shown() {
        return shown;
    }

    RulerPanel ruler() {
        return ruler;
    }

    JButton hidden() {
        return hidden;
    }

    JButton profile() {
        return profile;
    }

    void onUnit(Consumer<LengthUnit> listener) {
        unit.addActionListener(e -> listener.accept(LengthUnit.values()[unit.getSelectedIndex()]));
    }

    void onMode(Consumer<HandMode> listener) {
        modes.forEach((mode, button) -> button.addActionListener(e -> {
            ruler.setVisible(mode == HandMode.RULER);
            revalidate();
            if (mode == HandMode.RULER) {
                workedIn();
            }
            listener.accept(mode);
        }));
    }

    /** Chooses what the hand tool takes hold of, as a click does. */
    void choose(HandMode mode) {
        modes.get(mode).doClick();
    }

    /** Lets a button open a menu. */
    static void menu(JButton button, Map<String, Runnable> items) {
        JPopupMenu menu = new JPopupMenu();
        items.forEach((label, action) -> {
            JMenuItem item = new JMenuItem(label);
            item.setName(label);
            item.setFont(Looks.text());
            item.addActionListener(e -> action.run());
            menu.add(item);
        });
        button.addActionListener(e -> menu.show(button, 0, button.getHeight()));
        button.setComponentPopupMenu(menu);
    }

    /** Shows sentences, a line each. */
    void say(List<String> sentences) {
        String text = String.join("\n", sentences);
        said.setText(Looks.wrapped(text, TEXT_WIDTH).replace("\n", "<br>"));
        said.setToolTipText(text.isBlank() ? null : said.getText());
    }

    /** Asks whether the spots are dark, and says why; nothing to ask when empty. */
    void ask(String question, String reason) {
        ground.setText(question);
        ground.setToolTipText(reason.isEmpty() ? null : reason);
    }
}
