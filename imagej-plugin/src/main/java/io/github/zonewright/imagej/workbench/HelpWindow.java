package io.github.zonewright.imagej.workbench;

import java.awt.Dimension;
import java.io.IOException;
import java.io.InputStream;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.Locale;
import javax.swing.JEditorPane;
import javax.swing.JFrame;
import javax.swing.JScrollPane;
import javax.swing.SwingUtilities;
import javax.swing.event.HyperlinkEvent;

/** The help, one page from the jar, opened at the subject at hand. All methods belong on the event thread. */
final class HelpWindow extends JFrame {
    private static final long serialVersionUID = 1L;

    /** The anchor at the top of the page. */
    static final String START = "start";

    private static final String PAGE = "help.html";
    private static final Dimension SIZE = new Dimension(560, 640);

    private static HelpWindow open;

    private final JEditorPane page = new JEditorPane("text/html", "");

    private HelpWindow() {
        super("Zonewright help");
        setName("help");
        setDefaultCloseOperation(DISPOSE_ON_CLOSE);
        page.setName("help page");
        page.setEditable(false);
        page.setText(html());
        page.addHyperlinkListener(e -> {
            if (e.getEventType() == HyperlinkEvent.EventType.ACTIVATED) {
                page.scrollToReference(e.getDescription().substring(1));
            }
        });
        JScrollPane scroll = new JScrollPane(page);
        scroll.setPreferredSize(SIZE);
        add(scroll);
        pack();
        setLocationByPlatform(true);
    }

    /** Opens the help at an anchor, or brings it to the front. */
    static void open(String anchor) {
        if (open == null || !open.isDisplayable()) {
            open = new HelpWindow();
        }
        open.setVisible(true);
        open.toFront();
        // The page has its places only once it is laid out.
        SwingUtilities.invokeLater(() -> open.page.scrollToReference(anchor));
    }

    /** Closes it, if it is open. */
    static void close() {
        if (open != null) {
            open.dispose();
        }
    }

    /** The anchor that belongs to a heading of the workbench. */
    static String anchor(String heading) {
        return heading.toLowerCase(Locale.ROOT).replace(' ', '-');
    }

    /** The page as it stands in the jar. */
    static String html() {
        try (InputStream in = HelpWindow.class.getResourceAsStream(PAGE)) {
            if (in == null) {
                throw new IOException("the help page " + PAGE + " is not in this jar");
            }
            return new String(in.readAllBytes(), StandardCharsets.UTF_8);
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }
}
