package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.awt.Dimension;
import java.awt.event.MouseWheelEvent;
import java.util.concurrent.atomic.AtomicInteger;
import javax.swing.JPanel;
import javax.swing.JScrollPane;
import org.junit.jupiter.api.Test;

/** Needs no display: the panes are never shown. */
class LooksTest {

    /** A list inside the window that has nothing to scroll lets the window scroll, one that has scrolls itself. */
    @Test
    void passWheel_handsOnWhatThePaneCantUse() {
        for (boolean tall : new boolean[] {false, true}) {
            JPanel content = new JPanel();
            content.setPreferredSize(new Dimension(50, tall ? 500 : 20));
            JScrollPane inner = new JScrollPane(content);
            Looks.passWheel(inner);
            JPanel around = new JPanel(null);
            inner.setBounds(0, 0, 100, 60);
            around.add(inner);
            inner.doLayout();
            AtomicInteger turns = new AtomicInteger();
            around.addMouseWheelListener(e -> turns.incrementAndGet());
            inner.dispatchEvent(new MouseWheelEvent(
                    inner, MouseWheelEvent.MOUSE_WHEEL, 0, 0, 5, 5, 0, false, MouseWheelEvent.WHEEL_UNIT_SCROLL, 3, 1));
            assertEquals(tall ? 0 : 1, turns.get());
        }
    }
}
