package io.github.zonewright.imagej.workbench;

import java.awt.Color;
import java.awt.Component;
import java.awt.Font;
import java.awt.Rectangle;
import java.awt.Window;
import java.awt.event.KeyEvent;
import java.awt.event.WindowEvent;
import javax.swing.BorderFactory;
import javax.swing.JComponent;
import javax.swing.JLabel;
import javax.swing.JScrollPane;
import javax.swing.KeyStroke;
import javax.swing.RootPaneContainer;
import javax.swing.SwingUtilities;
import javax.swing.border.Border;

/** Spacing, fonts and colours of the window, in one place. */
final class Looks {
    static final int GAP = 6;
    static final int MARGIN = 12;
    static final int LABEL_WIDTH = 128;
    static final Color WRONG = new Color(0xA33000);
    static final Color QUIET = new Color(0x5A5A5A);
    static final Color GUIDE_GROUND = new Color(0xFFF6D8);
    static final Color GUIDE_INK = new Color(0x3A2E00);
    static final Color RULE = new Color(0xC4C4C4);

    private Looks() {}

    static Font text() {
        return new Font(Font.SANS_SERIF, Font.PLAIN, 12);
    }

    static JLabel label(String text) {
        JLabel label = new JLabel(text);
        label.setFont(text());
        return label;
    }

    static JLabel quiet(String text) {
        JLabel label = label(text);
        label.setForeground(QUIET);
        return label;
    }

    static JLabel heading(String text) {
        JLabel label = label(text);
        label.setFont(text().deriveFont(Font.BOLD));
        return label;
    }

    static Border section() {
        return BorderFactory.createCompoundBorder(
                BorderFactory.createMatteBorder(1, 0, 0, 0, RULE),
                BorderFactory.createEmptyBorder(GAP - 1, MARGIN, GAP - 1, MARGIN));
    }

    /** Text that wraps at a width in px. */
    static String wrapped(String text, int width) {
        String safe = text.replace("&", "&amp;").replace("<", "&lt;");
        return "<html><div style='width:" + Math.round(width * 0.76) + "px'>" + safe + "</div></html>";
    }

    /** Text that breaks at its line ends. */
    static String lines(String text) {
        String safe = text.replace("&", "&amp;").replace("<", "&lt;");
        return "<html>" + safe.replace("\n", "<br>") + "</html>";
    }

    /** Shows a window left of the one that a component is in, or right of it where there is more room; Escape closes it. */
    static void beside(Component owner, Window window) {
        Window own = SwingUtilities.getWindowAncestor(owner);
        if (own != null && own.isShowing()) {
            Rectangle screen = own.getGraphicsConfiguration().getBounds();
            int left = own.getX() - window.getWidth() - GAP;
            int right = own.getX() + own.getWidth() + GAP;
            boolean roomOnRight = right + window.getWidth() <= screen.x + screen.width;
            int top = Math.max(screen.y, Math.min(own.getY() + 60, screen.y + screen.height - window.getHeight() - 40));
            window.setLocation(left >= screen.x ? left : roomOnRight ? right : screen.x, top);
        }
        if (window instanceof RootPaneContainer framed) {
            framed.getRootPane()
                    .registerKeyboardAction(
                            e -> window.dispatchEvent(new WindowEvent(window, WindowEvent.WINDOW_CLOSING)),
                            KeyStroke.getKeyStroke(KeyEvent.VK_ESCAPE, 0),
                            JComponent.WHEN_IN_FOCUSED_WINDOW);
        }
        window.setVisible(true);
    }

    /** Hands the mouse wheel on to what lies around a small pane that has nothing to scroll; Swing would swallow it. */
    static void passWheel(JScrollPane pane) {
        pane.addMouseWheelListener(turn -> {
            if (!pane.getVerticalScrollBar().isVisible() && pane.getParent() != null) {
                pane.getParent().dispatchEvent(SwingUtilities.convertMouseEvent(pane, turn, pane.getParent()));
            }
        });
    }
}
