package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;

import ij.ImagePlus;
import ij.gui.Plot;
import ij.gui.PlotWindow;
import io.github.zonewright.imagej.Fingerprint;
import java.awt.Component;
import java.awt.event.MouseEvent;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;

/**
 * ImageJ lays arrows of its own over a plot as overlay elements while the pointer is at its axes, without any work of ours, and
 * takes them away again: what is over a plot is to be compared without them.
 */
@Tag("window")
class PlotArrowsTest {
    @AfterEach
    void close() {
        Screen.clear();
    }

    @Test
    void arrowsOfImageJ_comeAndGoWithThePointer() {
        Screen.start();
        Plot plot = new Plot("plot of nothing of ours", "x", "y");
        plot.add("line", new double[] {1, 2, 3}, new double[] {2, 3, 1});
        PlotWindow window = plot.show();
        ImagePlus image = window.getImagePlus();
        Screen.onEventThread(() -> {
            move(window.getCanvas(), 200, 60);
            window.hideRangeArrows();
            Fingerprint before = Fingerprint.of(image);
            move(window.getCanvas(), 10, 10);
            assertEquals(16, image.getOverlay().size());
            assertNotEquals(before, Fingerprint.of(image));
            window.hideRangeArrows();
            before.assertSame(image);
            return null;
        });
    }

    private static void move(Component over, int x, int y) {
        over.dispatchEvent(new MouseEvent(over, MouseEvent.MOUSE_MOVED, 0, 0, x, y, 0, false));
    }
}
