package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.WindowManager;
import ij.text.TextPanel;
import ij.text.TextWindow;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.SeriesPatterns;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.command.Launching;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Sitting;
import java.awt.Window;
import java.nio.file.Path;
import java.util.Optional;
import javax.swing.AbstractButton;
import javax.swing.JFrame;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** A whole stack on a real ImageJ: scrolling shows what each slice was found to be. */
@Tag("window")
class StackWindowTest {
    private static final String TABLE = "Zone axes of drifting";

    @TempDir
    static Path folder;

    private ImagePlus image;

    @BeforeEach
    void open() {
        Screen.start();
        Screen.userFolder(folder);
        image = Screen.show(SeriesPatterns.stack());
    }

    @AfterEach
    void close() {
        for (Window window : Window.getWindows()) {
            if (window instanceof TextWindow table && table.isShowing()) {
                Screen.onEventThread(() -> {
                    table.close(false);
                    return null;
                });
            }
        }
        Screen.clear();
    }

    private void find() {
        String options = "crystal=copper kilovolts=200 scale=" + TestPatterns.CONSTANT + " ";
        assertEquals(Optional.empty(), Launching.macro(image, "command.FindInStack", options));
    }

    private static boolean marksOf(ImagePlus image, int slice) {
        return Screen.onEventThread(() ->
                image.getCurrentSlice() == slice && PatternOverlay.state(image).isPresent());
    }

    @Test
    void scrolling_showsTheMarksOfEachSlice_alsoInTheWorkbench() {
        Fingerprint before = Fingerprint.of(image);
        JFrame frame = Screen.workbench();
        Screen.await(
                () -> Screen.find(frame, "Whole stack…", AbstractButton.class).isVisible());
        find();
        for (int slice : new int[] {1, 2, 6, 3, 2}) {
            image.setSlice(slice);
            Screen.await(() -> marksOf(image, slice));
            Screen.await(() -> Screen.guide(frame).contains("keep the record"));
        }
        image.setSlice(SeriesPatterns.BLANK);
        Screen.settle();
        assertFalse(marksOf(image, SeriesPatterns.BLANK));
        image.setSlice(1);
        before.assertSame(image);
        // Refining measures again what a slice of a stack does not keep.
        Screen.await(() -> Screen.guide(frame).contains("keep the record"));
        double score = Sitting.of(image).chosen().orElseThrow().score();
        Screen.click(frame, "Refine");
        Screen.await(() -> Sitting.of(image).chosen().orElseThrow().score() != score
                || Screen.guide(frame).contains("keep the record"));
    }

    @Test
    void row_clicked_goesToItsSlice() {
        find();
        TextPanel panel = Screen.onEventThread(() -> ((TextWindow) WindowManager.getWindow(TABLE)).getTextPanel());
        assertEquals(SeriesPatterns.SLICES, panel.getResultsTable().size());
        Screen.onEventThread(() -> {
            panel.setSelection(4, 4);
            java.awt.Component canvas = panel.getComponent(0);
            java.awt.event.MouseEvent up = new java.awt.event.MouseEvent(
                    canvas, java.awt.event.MouseEvent.MOUSE_RELEASED, 0, 0, 20, 20, 1, false);
            canvas.dispatchEvent(up);
            return null;
        });
        Screen.await(() -> marksOf(image, 5));
    }

    @Test
    void secondRun_leavesTheFirstTable() {
        find();
        find();
        assertTrue(WindowManager.getWindow(TABLE) != null);
        assertTrue(WindowManager.getWindow(TABLE + " (2)") != null);
    }
}
