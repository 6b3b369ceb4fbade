package io.github.zonewright.imagej.workbench;

import java.awt.Color;
import java.awt.Point;
import java.awt.Rectangle;
import java.awt.event.MouseEvent;
import javax.swing.BorderFactory;
import javax.swing.JLabel;
import javax.swing.JWindow;
import javax.swing.Timer;

/** A line of text beside the mouse, which takes no focus and goes by itself. */
final class PointerNote {
    private static final int AWAY = 18;
    private static final int MILLISECONDS = 2500;
    private static final Color GROUND = new Color(0x202020);
    private static final Color INK = new Color(0xF0F0F0);

    private final Timer timer = new Timer(MILLISECONDS, e -> hide());
    private JWindow window;
    private JLabel label;

    /** Shows a text beside the place of a mouse event. */
    void show(String text, MouseEvent event) {
        if (window == null) {
            build();
        }
        if (!label.getText().equals(text)) {
            label.setText(text);
            window.pack();
        }
        Point at = event.getLocationOnScreen();
        Rectangle screen = event.getComponent().getGraphicsConfiguration().getBounds();
        int right = at.x + AWAY;
        int x = right + window.getWidth() <= screen.x + screen.width ? right : at.x - AWAY - window.getWidth();
        int below = at.y + AWAY;
        int y = below + window.getHeight() <= screen.y + screen.height ? below : at.y - AWAY - window.getHeight();
        window.setLocation(x, y);
        window.setVisible(true);
        timer.restart();
    }

    /** Takes it away. */
    void hide() {
        timer.stop();
        if (window != null) {
            window.setVisible(false);
        }
    }

    private void build() {
        timer.setRepeats(false);
        label = new JLabel("");
        label.setName("pointer note");
        label.setFont(Looks.text());
        label.setForeground(INK);
        label.setOpaque(true);
        label.setBackground(GROUND);
        label.setBorder(BorderFactory.createEmptyBorder(2, 6, 3, 6));
        window = new JWindow();
        window.setName("pointer note");
        window.setFocusableWindowState(false);
        window.setAlwaysOnTop(true);
        window.add(label);
    }
}
