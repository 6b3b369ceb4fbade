package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.awt.Component;
import java.awt.Container;
import java.awt.event.KeyEvent;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import javax.swing.JEditorPane;
import javax.swing.JFrame;
import javax.swing.JTextField;
import javax.swing.text.AttributeSet;
import javax.swing.text.html.HTML;
import javax.swing.text.html.HTMLDocument;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The help opens at the part that the person is at. */
@Tag("window")
class HelpWindowTest {
    @TempDir
    static Path folder;

    private JFrame frame;

    @BeforeEach
    void open() {
        Screen.start();
        Screen.userFolder(folder);
        frame = Screen.workbench();
    }

    @AfterEach
    void close() {
        Screen.onEventThread(() -> {
            HelpWindow.close();
            return null;
        });
        Screen.clear();
    }

    @Test
    void questionMark_opensAtItsSection() {
        List<String> headings = new ArrayList<>();
        collect(frame, "heading ", headings);
        assertTrue(headings.size() >= 6, headings.toString());
        for (String heading : headings) {
            Screen.click(frame, "help " + heading);
            assertShows(HelpWindow.anchor(heading));
        }
    }

    @Test
    void f1_opensAtTheSectionWithTheFocus() {
        Screen.fold(frame, "By hand", false);
        JTextField zone = Screen.find(frame, "zone", JTextField.class);
        Screen.onEventThread(() -> {
            frame.toFront();
            zone.requestFocus();
            return null;
        });
        Screen.await(zone::isFocusOwner);
        Screen.press(zone, KeyEvent.VK_F1);
        assertShows("by-hand");
        Screen.fold(frame, "By hand", true);
    }

    @Test
    void command_opensAtTheStart() {
        new OpenHelp().run();
        Screen.settle();
        assertShows(HelpWindow.START);
    }

    /** The anchor's line is in sight, and at the top wherever the page is long enough beneath it. */
    private static void assertShows(String anchor) {
        JFrame help = Screen.window("help");
        Screen.settle();
        Screen.settle();
        Screen.onEventThread(() -> {
            JEditorPane page = Screen.find(help, "help page", JEditorPane.class);
            int place = place((HTMLDocument) page.getDocument(), anchor);
            assertTrue(place >= 0, "no anchor " + anchor);
            double y = page.modelToView2D(place).getY();
            var seen = page.getVisibleRect();
            boolean end = seen.y + seen.height >= page.getHeight() - 1;
            assertTrue(seen.contains(seen.x, y), anchor + " at " + y + ", seen " + seen);
            assertEquals(seen.y, y, end ? seen.height : 60, anchor);
            return null;
        });
    }

    private static int place(HTMLDocument document, String anchor) {
        for (HTMLDocument.Iterator a = document.getIterator(HTML.Tag.A); a.isValid(); a.next()) {
            AttributeSet attributes = a.getAttributes();
            if (anchor.equals(attributes.getAttribute(HTML.Attribute.NAME))) {
                return a.getStartOffset();
            }
        }
        return -1;
    }

    private static void collect(Container in, String start, List<String> found) {
        for (Component part : in.getComponents()) {
            if (part.getName() != null && part.getName().startsWith(start)) {
                found.add(part.getName().substring(start.length()));
            }
            if (part instanceof Container inner) {
                collect(inner, start, found);
            }
        }
    }
}
