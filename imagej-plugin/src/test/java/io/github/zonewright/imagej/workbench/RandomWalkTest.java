package io.github.zonewright.imagej.workbench;

import ij.Prefs;
import io.github.zonewright.imagej.session.LengthUnit;
import java.nio.file.Path;
import java.util.Properties;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/**
 * A seeded random walk over workbench, its windows and the images. No exception may reach ImageJ's console, the log or the
 * end of a thread, and after each step all that is the user's is as it was, or as the user's own step made it. The system
 * properties {@code zonewright.walk.seconds} and {@code zonewright.walk.seed} say how long and along which way.
 */
@Tag("window")
class RandomWalkTest {
    private static final int SECONDS = 60;
    private static final long SEED = 20;

    @TempDir
    static Path folder;

    private Properties preferences;

    @BeforeEach
    void start() {
        preferences = (Properties) Prefs.getControlPanelProperties().clone();
        Screen.start();
        Screen.userFolder(folder.resolve("kept"));
        Prefs.useJFileChooser = true;
    }

    @AfterEach
    void close() {
        Prefs.useJFileChooser = false;
        HandTool.use(HandMode.PATTERN);
        HandTool.ruler().pairs(false);
        HandTool.ruler().order(1);
        LengthUnit.ANGSTROM.remember();
        Screen.clear();
        // What it answered in dialogs must not be what other tests find remembered.
        Prefs.getControlPanelProperties().clear();
        Prefs.getControlPanelProperties().putAll(preferences);
    }

    @Test
    void walk_breaksNothing() {
        long seed = Long.getLong("zonewright.walk.seed", SEED);
        long end = System.nanoTime() + 1_000_000_000L * Integer.getInteger("zonewright.walk.seconds", SECONDS);
        try (RandomWalk walk = new RandomWalk(seed, folder)) {
            while (System.nanoTime() < end) {
                walk.step();
            }
            System.out.println(walk.summary());
        }
    }
}
