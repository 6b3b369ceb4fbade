package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.Prefs;
import ij.WindowManager;
import io.github.zonewright.imagej.session.Sitting;
import java.nio.file.Path;
import java.util.List;
import javax.swing.JFrame;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The first time: no preferences, nothing kept, no image. */
@Tag("window")
class FirstRunTest {
    @TempDir
    Path folder;

    @BeforeEach
    void forget() {
        Screen.start();
        for (String preference : List.of(
                "kilovolts", "scalekind", "scale", "pixelsize", "binning", "tolerance", "mirrored", "crystal")) {
            Prefs.set("zonewright." + preference, null);
        }
        Screen.userFolder(folder.resolve("not made yet"));
    }

    @AfterEach
    void close() {
        Screen.clear();
    }

    /** Each click is that of the button which the line on top makes the default, so Enter would do as well. */
    @Test
    void threeClicks_leadToTheAnswerOfTheExample() {
        JFrame frame = Screen.workbench();
        assertTrue(Screen.guide(frame).startsWith("Open"), Screen.guide(frame));
        next(frame, "Open example");
        Screen.await(() -> Screen.guide(frame).contains("Find the spots"));
        ImagePlus example = WindowManager.getCurrentImage();
        next(frame, "Find spots");
        Screen.await(() -> Screen.guide(frame).contains("orientation"));
        next(frame, "Find orientation");
        Screen.await(() -> Sitting.of(example).chosen().isPresent());
        assertEquals(
                "2 1 1",
                Sitting.of(example)
                        .chosen()
                        .orElseThrow()
                        .placement()
                        .setting()
                        .zone()
                        .toString());
        assertTrue(Screen.guide(frame).contains("keep the record"), Screen.guide(frame));
    }

    private static void next(JFrame frame, String button) {
        assertEquals(
                button,
                Screen.onEventThread(
                        () -> frame.getRootPane().getDefaultButton().getText()));
        Screen.click(frame, button);
    }
}
