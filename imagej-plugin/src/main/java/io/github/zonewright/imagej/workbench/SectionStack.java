package io.github.zonewright.imagej.workbench;

import ij.Prefs;
import java.awt.Dimension;
import java.awt.Rectangle;
import java.awt.event.ComponentAdapter;
import java.awt.event.ComponentEvent;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import javax.swing.BorderFactory;
import javax.swing.Box;
import javax.swing.BoxLayout;
import javax.swing.JPanel;
import javax.swing.JScrollPane;

/**
 * The sections of the window from top to bottom. Those that a person opens stay open, also next time, as far as there is room;
 * the one with the next thing to do opens by itself. Between two such moments nothing opens, so that nothing moves away from
 * under the mouse.
 */
final class SectionStack extends JScrollPane {
    private static final long serialVersionUID = 1L;
    private static final String KEY = "zonewright.open";

    private final List<Section> sections;
    private final Set<Section> wanted = new HashSet<>();
    private transient Optional<Section> next = Optional.empty();
    private transient Optional<Section> last = Optional.empty();
    private boolean called;

    /** Of sections, and those that are open the first time. */
    SectionStack(List<Section> sections, List<Section> first) {
        this.sections = sections;
        Body body = new Body();
        Set<String> kept = Set.of(Prefs.get(KEY, headings(first)).split(","));
        for (Section section : sections) {
            body.add(section);
            section.onFold(() -> folded(section));
            if (kept.contains(section.heading())) {
                wanted.add(section);
            }
            section.fold(!wanted.contains(section));
        }
        body.add(Box.createVerticalGlue());
        setName("sections");
        setViewportView(body);
        setBorder(BorderFactory.createEmptyBorder());
        setHorizontalScrollBarPolicy(HORIZONTAL_SCROLLBAR_NEVER);
        getVerticalScrollBar().setUnitIncrement(16);
        addComponentListener(new ComponentAdapter() {
            @Override
            public void componentResized(ComponentEvent e) {
                arrange(true);
            }
        });
    }

    private static String headings(List<Section> sections) {
        return sections.stream().map(Section::heading).collect(Collectors.joining(","));
    }

    /**
     * Says in which section the next thing is to be done; opens it when that is news, and makes room for what has grown else.
     *
     * @param with another that is looked at for it
     * @param anew whether the work begins anew, so that others that are wanted open again
     */
    void next(Section section, Optional<Section> with, boolean anew) {
        boolean news = next.filter(section::equals).isEmpty();
        next.ifPresent(n -> n.next(false));
        section.next(true);
        next = Optional.of(section);
        last = news ? with : last;
        called |= news;
        if (news
                || getViewport().getView().getPreferredSize().height
                        > getViewport().getHeight()) {
            arrange(news && anew);
        }
    }

    /** Says that the next thing is in none of them. */
    void nothingNext() {
        next.ifPresent(n -> n.next(false));
        next = Optional.empty();
    }

    /** A person folded a section or opened it. */
    private void folded(Section section) {
        if (section.isFolded()) {
            wanted.remove(section);
            last = Optional.empty();
        } else {
            wanted.add(section);
            last = Optional.of(section);
            arrange(false);
            section.scrollRectToVisible(new Rectangle(section.getPreferredSize()));
        }
        Prefs.set(KEY, headings(sections.stream().filter(wanted::contains).toList()));
    }

    /** Folds what there is no room for, and opens what is called for, or all that is wanted. */
    private void arrange(boolean anew) {
        int height = getViewport().getHeight();
        if (height == 0) {
            // The window is not laid out yet; it will be told its size.
            return;
        }
        List<Folding.Part> parts = new ArrayList<>();
        for (Section section : sections) {
            boolean first = Stream.of(next, last)
                    .anyMatch(s -> s.filter(section::equals).isPresent());
            boolean open = !section.isFolded() || called && first || anew && wanted.contains(section);
            parts.add(new Folding.Part(section.foldedHeight(), open ? section.openHeight() : 0, open));
        }
        List<Integer> open = new Folding(
                        parts,
                        next.map(sections::indexOf).orElse(0),
                        last.map(sections::indexOf).orElse(-1))
                .open(height);
        called = false;
        for (int i = 0; i < sections.size(); i++) {
            if (open.contains(i) == sections.get(i).isFolded()) {
                sections.get(i).fold(!open.contains(i));
            }
        }
        revalidate();
    }

    /**
     * The sections below each other, measured anew each time: a box layout that is asked for its size while something in it is
     * still to change keeps that size, and would lay a section out too high or too low.
     */
    private static final class Body extends JPanel {
        private static final long serialVersionUID = 1L;

        Body() {
            setLayout(new BoxLayout(this, BoxLayout.Y_AXIS));
        }

        @Override
        public Dimension getPreferredSize() {
            ((BoxLayout) getLayout()).invalidateLayout(this);
            return super.getPreferredSize();
        }

        @Override
        public void doLayout() {
            ((BoxLayout) getLayout()).invalidateLayout(this);
            super.doLayout();
        }
    }
}
