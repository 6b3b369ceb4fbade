package io.github.zonewright.imagej.workbench;

import ij.Prefs;
import java.awt.Rectangle;
import java.awt.event.ComponentAdapter;
import java.awt.event.ComponentEvent;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Collectors;
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
    private Section next;
    private transient Optional<Section> last = Optional.empty();

    /** Of sections, and those that are open the first time. */
    SectionStack(List<Section> sections, List<Section> first) {
        this.sections = sections;
        this.next = sections.get(0);
        JPanel body = new JPanel();
        body.setLayout(new BoxLayout(body, BoxLayout.Y_AXIS));
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
     * Says near which section the next thing is to be done, and whether there; opens it when that is news, and makes room for
     * what has grown else.
     *
     * @param with another that is looked at for it
     */
    void next(Section section, boolean there, Optional<Section> with) {
        boolean news = section != next;
        next.next(false);
        section.next(there);
        next = section;
        last = news ? with : last;
        if (news
                || getViewport().getView().getPreferredSize().height
                        > getViewport().getHeight()) {
            arrange(news);
        }
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

    private void arrange(boolean mayOpen) {
        int height = getViewport().getHeight();
        if (height == 0) {
            return;
        }
        List<Folding.Part> parts = new ArrayList<>();
        for (Section section : sections) {
            boolean called = section == next || last.filter(section::equals).isPresent() || wanted.contains(section);
            boolean open = !section.isFolded() || mayOpen && called;
            parts.add(new Folding.Part(section.foldedHeight(), open ? section.openHeight() : 0, open));
        }
        List<Integer> open = new Folding(
                        parts,
                        sections.indexOf(next),
                        last.map(sections::indexOf).orElse(-1))
                .open(height);
        for (int i = 0; i < sections.size(); i++) {
            if (open.contains(i) == sections.get(i).isFolded()) {
                sections.get(i).fold(!open.contains(i));
            }
        }
        revalidate();
    }
}
