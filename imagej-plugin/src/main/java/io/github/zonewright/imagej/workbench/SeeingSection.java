package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import io.github.zonewright.imagej.overlay.ShownMarks;
import io.github.zonewright.imagej.session.ImageView;
import io.github.zonewright.imagej.session.LengthUnit;
import io.github.zonewright.imagej.session.Sitting;
import java.util.ArrayList;
import java.util.EnumMap;
import java.util.EnumSet;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.function.Consumer;
import java.util.function.Supplier;
import java.util.stream.Collectors;
import javax.swing.JCheckBox;
import javax.swing.JComboBox;
import javax.swing.JComponent;
import javax.swing.JToggleButton;
import javax.swing.Timer;

/** What is drawn about the pattern, how the image beneath is looked at, and blinking between the two. */
final class SeeingSection extends Section {
    private static final long serialVersionUID = 1L;
    private static final int BLINK_MILLISECONDS = 600;

    private final Map<ShownMarks, JCheckBox> boxes = new EnumMap<>(ShownMarks.class);
    private final JComboBox<String> view = new JComboBox<>();
    private final JToggleButton blink = new JToggleButton("Blink");
    private final Timer timer = new Timer(BLINK_MILLISECONDS, e -> turn());
    private final transient Supplier<Optional<ImagePlus>> image;
    private final transient Consumer<String> say;
    private transient Optional<ImagePlus> blinking = Optional.empty();
    private boolean hidden;
    private boolean showing;

    SeeingSection(Supplier<Optional<ImagePlus>> image, Consumer<String> say) {
        super("Seeing");
        this.image = image;
        this.say = say;
        List<JComponent> marks = new ArrayList<>();
        for (ShownMarks mark : ShownMarks.values()) {
            JCheckBox box = new JCheckBox(mark.label());
            box.setName(mark.label());
            box.setToolTipText(mark.help());
            box.addActionListener(e -> choose());
            boxes.put(mark, box);
            marks.add(box);
        }
        for (ImageView each : ImageView.values()) {
            view.addItem(each.label());
        }
        view.setName("view");
        view.setMaximumSize(view.getPreferredSize());
        view.setToolTipText("Another look-up table, as long as you look: no pixel changes, and nothing of it is saved");
        view.addActionListener(e -> look());
        blink.setName("Blink");
        blink.setToolTipText("Hides all marks and shows them again, to compare measured and computed");
        blink.addActionListener(e -> {
            if (blink.isSelected()) {
                begin();
            } else {
                end();
            }
        });
        marks.forEach(part -> part.setFont(Looks.text()));
        view.setFont(Looks.text());
        blink.setFont(Looks.text());
        row("Show", marks.get(0), marks.get(1), marks.get(2));
        row("", marks.get(3), marks.get(4), marks.get(5));
        row("View", view, blink);
    }

    /** Shows how things are for the current image. */
    void refresh() {
        showing = true;
        Optional<ImagePlus> now = image.get();
        Set<ShownMarks> shown = now.map(ShownMarks::of).orElse(Set.of());
        boxes.forEach((mark, box) -> {
            box.setSelected(shown.contains(mark));
            box.setEnabled(now.isPresent());
        });
        summary(shown.stream().map(ShownMarks::label).collect(Collectors.joining(", ")));
        view.setEnabled(now.isPresent());
        blink.setEnabled(now.isPresent());
        view.setSelectedItem(now.map(ImageView::of).orElse(ImageView.AS_IT_IS).label());
        if (blinking.isPresent() && !blinking.equals(now)) {
            end();
        }
        showing = false;
    }

    /** Stops blinking and leaves the marks as they were. */
    void end() {
        timer.stop();
        blink.setSelected(false);
        blinking.ifPresent(i -> i.setHideOverlay(hidden));
        blinking = Optional.empty();
    }

    private void choose() {
        Set<ShownMarks> shown = EnumSet.noneOf(ShownMarks.class);
        boxes.forEach((mark, box) -> {
            if (box.isSelected()) {
                shown.add(mark);
            }
        });
        image.get().ifPresent(i -> {
            ShownMarks.choose(shown, i);
            Sitting.of(i).show(i);
            record(i);
        });
    }

    private void look() {
        if (showing) {
            return;
        }
        image.get().ifPresent(i -> {
            try {
                ImageView.values()[view.getSelectedIndex()].show(i);
                record(i);
            } catch (IllegalArgumentException e) {
                say.accept(e.getMessage());
                refresh();
            }
        });
    }

    /** Records all that is shown of an image, and how. */
    static void record(ImagePlus over) {
        List<Recording.Option> options = new ArrayList<>();
        if (Sitting.of(over).labelled()) {
            options.add(new Recording.Option("indices", "true"));
        }
        for (ShownMarks mark : ShownMarks.of(over)) {
            options.add(
                    new Recording.Option(mark.label().toLowerCase(Locale.ROOT).replace(" ", ""), "true"));
        }
        options.add(new Recording.Option("view", ImageView.of(over).label()));
        if (Sitting.of(over).measurement().shown()) {
            options.add(new Recording.Option("measured", "true"));
        }
        options.add(new Recording.Option("lengths", LengthUnit.last().recorded()));
        Recording.of("Show Marks...", options);
    }

    private void begin() {
        blinking = image.get();
        blinking.ifPresent(i -> hidden = i.getHideOverlay());
        timer.start();
        turn();
    }

    private void turn() {
        Optional<ImagePlus> open = blinking.filter(i -> i.getWindow() != null);
        if (open.isEmpty()) {
            end();
            return;
        }
        open.get().setHideOverlay(!open.get().getHideOverlay());
    }
}
