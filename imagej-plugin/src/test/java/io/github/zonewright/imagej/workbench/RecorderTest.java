package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import ij.ImagePlus;
import ij.Menus;
import ij.Prefs;
import ij.WindowManager;
import ij.gui.Toolbar;
import ij.plugin.frame.Recorder;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.crystal.AtomSite;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalCif;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.session.CrystalChoice;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.MeasuredSpot;
import java.awt.event.InputEvent;
import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import javax.swing.JFrame;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** What ImageJ's recorder writes while the workbench is driven does the same when it runs as a macro. */
@Tag("window")
class RecorderTest {
    private static final Pattern ENTRY = Pattern.compile("(?m)^[^#,\\n]+, \"([^\"]+)\", (.+)$");

    @TempDir
    static Path folder;

    private Recorder recorder;

    @BeforeEach
    void start() throws IOException {
        Screen.start();
        Screen.userFolder(folder.resolve("kept"));
        Prefs.useJFileChooser = true;
        install();
        recorder = Screen.onEventThread(() -> new Recorder(false));
    }

    @AfterEach
    void close() {
        Screen.onEventThread(() -> {
            recorder.close();
            return null;
        });
        Prefs.useJFileChooser = false;
        Toolbar.getInstance().setTool(Toolbar.RECTANGLE);
        Screen.clear();
    }

    @Test
    void recordedMacro_leadsToTheSameSolution() throws IOException {
        JFrame frame = Screen.workbench();
        Screen.click(frame, "Open example");
        Screen.await(() -> Screen.guide(frame).contains("Find the spots"));
        ImagePlus example = WindowManager.getCurrentImage();
        Screen.click(frame, "Find spots");
        Screen.await(() -> Sitting.of(example).measured().isPresent());
        removeSpot(example, frame);
        Screen.click(frame, "Find orientation");
        Screen.await(() -> Sitting.of(example).chosen().isPresent());
        Path record = folder.resolve("driven.cif");
        Screen.save(frame, "Record (CIF)…", record);
        Sitting driven = Sitting.of(example);
        String macro = Screen.onEventThread(recorder::getText);
        assertTrue(macro.contains("Keep Solution...") && macro.matches("[ -~\\s]*"), macro);
        Screen.clear();

        Path again = folder.resolve("replayed.cif");
        Thread run = new Thread(() -> IJ.runMacro(macro.replace(record.toString(), again.toString())), "replay");
        run.start();
        new Dialogs().until(() -> !run.isAlive());
        assertTrue(Files.exists(again), macro);
        Sitting replayed = Sitting.of(WindowManager.getCurrentImage());
        assertEquals(places(driven), places(replayed), macro);
        assertEquals(placements(driven), placements(replayed), macro);
        assertEquals(driven.placement(), replayed.placement(), macro);
    }

    /** A crystal that stands in a CIF file alone is recorded by that file, which a macro can read again. */
    @Test
    void crystalOfALooseFile_isRecordedByItsFile() throws IOException {
        Crystal odd = Crystal.of("Odd copper", Lattice.cubic(3.6149), "F m -3 m", AtomSite.of("Cu", 0, 0, 0));
        Path file = folder.resolve("odd one.cif");
        CifFile.of(CrystalCif.toBlock(odd)).write(file);
        ImagePlus image = Screen.show(TestPatterns.image());
        JFrame frame = Screen.workbench();
        Screen.await(() -> Screen.guide(frame).contains("spots"));
        Screen.type(frame, "scale", Double.toString(TestPatterns.CONSTANT));
        Screen.drop(frame, file);
        Screen.click(frame, "Find orientation");
        Screen.await(() -> Sitting.of(image).chosen().isPresent());
        String macro = Screen.onEventThread(recorder::getText);
        assertTrue(macro.contains("crystal=[" + file + "]"), macro);
        Solution driven = Sitting.of(image).chosen().orElseThrow();
        assertEquals("Odd copper", driven.placement().crystal().name());
        assertEquals(
                odd.lattice(), CrystalChoice.group(file.toString(), null).get(0).lattice());
    }

    private static List<PixelPoint> places(Sitting sitting) {
        return sitting.measured().orElseThrow().spots().stream()
                .map(MeasuredSpot::position)
                .toList();
    }

    private static List<Placement> placements(Sitting sitting) {
        return sitting.solutions().stream().map(Solution::placement).toList();
    }

    private static void removeSpot(ImagePlus image, JFrame frame) {
        Screen.click(frame, "hand Spots");
        MeasuredPattern measured = Sitting.of(image).measured().orElseThrow();
        int before = measured.spots().size();
        PixelPoint weak = measured.spots().get(before - 1).position();
        Screen.clickAt(image, weak.x(), weak.y(), InputEvent.ALT_DOWN_MASK);
        Screen.await(() -> Sitting.of(image).measured().orElseThrow().spots().size() == before - 1);
        Screen.click(frame, "hand Pattern");
    }

    /** Puts our commands where ImageJ looks for those of a jar in its plugins folder. */
    @SuppressWarnings("unchecked")
    private static void install() throws IOException {
        try (InputStream config = RecorderTest.class.getResourceAsStream("/plugins.config")) {
            Matcher entry = ENTRY.matcher(new String(config.readAllBytes(), StandardCharsets.UTF_8));
            while (entry.find()) {
                Menus.getCommands().put(entry.group(1), entry.group(2));
            }
        }
    }
}
