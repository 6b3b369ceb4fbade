package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import ij.ImagePlus;
import ij.Menus;
import ij.Prefs;
import ij.gui.Toolbar;
import ij.plugin.frame.Recorder;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.session.LengthUnit;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import java.awt.Component;
import java.awt.Container;
import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import javax.swing.AbstractButton;
import javax.swing.JComboBox;
import javax.swing.JFrame;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/**
 * Whatever a button of the workbench does to an image, ImageJ's recorder hears as a command; and the macro leaves another copy
 * of the image as the buttons left the first.
 */
@Tag("window")
class RecordedActionsTest {
    private static final Pattern ENTRY = Pattern.compile("(?m)^[^#,\\n]+, \"([^\"]+)\", (.+)$");

    /**
     * What acts on no image: help, folding and windows that are opened; what is told for a later command, which records it; the
     * crystals of the shelf; what stops or blinks and leaves nothing.
     */
    private static final Pattern QUIET =
            Pattern.compile("help .*|fold .*|From rings…|Kept…|Left over…|What tells apart…"
                    + "|By clicks…|mirrored|pairs|hold .*|Open CIF…|Type in…|Candidates…|Keep on my shelf|Remove from my shelf"
                    + "|Stop|Blink");

    /** Recorded too, and checked elsewhere: by what is chosen in a menu, a dialog or a file chooser. */
    private static final Pattern ASKS = Pattern.compile(
            "Open example|Profile|Hidden area|Whole stack…|Record \\(CIF\\)…|Report \\(HTML\\)…|Spots \\(CSV\\)…");

    private static final Map<String, String> RECORDED = new LinkedHashMap<>();

    static {
        RECORDED.put("Find spots", "Measure Net...");
        RECORDED.put("Table of spots", "Measure Net...");
        RECORDED.put("Dark spots on bright ground", "Measure Net...");
        RECORDED.put("Find orientation", "Find Zone Axis...");
        RECORDED.put("In place of the pattern", "Show Marks...");
        RECORDED.put("hand Pattern", "Show Marks...");
        RECORDED.put("hand Spots", "Show Marks...");
        RECORDED.put("hand Ruler", "Measure Spacing...");
        RECORDED.put("Readings", "Measure Spacing...");
        RECORDED.put("Clear", "Measure Spacing...");
        RECORDED.put("Set image calibration", "Set Image Calibration...");
        RECORDED.put("Put it back", "Set Image Calibration...");
        RECORDED.put("Zones", "Zone Chart...");
        for (String field : List.of("rotation", "lean right", "lean up", "centre x", "centre y", "camera constant")) {
            RECORDED.put(field + " up", "Move Pattern...");
            RECORDED.put(field + " down", "Move Pattern...");
        }
        RECORDED.put("Reference up", "Move Pattern...");
        RECORDED.put("Undo", "Lay Computed Pattern...");
        RECORDED.put("Refine", "Refine Pattern...");
        RECORDED.put("Back to the fit", "Move Pattern...");
        for (String box : List.of(
                "Indices", "Legend", "Scale bar", "Laue circle", "Double diffraction", "Residuals", "Computed half")) {
            RECORDED.put(box, "Show Marks...");
        }
        RECORDED.put("Table", "Keep Solution...");
    }

    @TempDir
    static Path folder;

    private Recorder recorder;
    private ImagePlus image;
    private JFrame frame;

    @BeforeEach
    void start() throws IOException {
        Screen.start();
        Screen.userFolder(folder.resolve("kept"));
        install();
        image = Screen.show(TestPatterns.image());
        frame = Screen.workbench();
        Screen.type(frame, "scale", Double.toString(TestPatterns.CONSTANT));
        Screen.pick(frame, "Copper");
        recorder = Screen.onEventThread(() -> new Recorder(false));
    }

    @AfterEach
    void close() {
        Screen.onEventThread(() -> {
            recorder.close();
            return null;
        });
        HandTool.use(HandMode.PATTERN);
        LengthUnit.ANGSTROM.remember();
        Prefs.set("zonewright.shown", "");
        Toolbar.getInstance().setTool(Toolbar.RECTANGLE);
        Screen.clear();
    }

    @Test
    void everyButton_isKnown() {
        List<String> unknown = new ArrayList<>();
        for (AbstractButton button : buttons(frame.getContentPane())) {
            String name = button.getName();
            if (name != null
                    && !RECORDED.containsKey(name)
                    && !QUIET.matcher(name).matches()
                    && !ASKS.matcher(name).matches()) {
                unknown.add(name);
            }
        }
        assertEquals(List.of(), unknown, "new buttons: say above what each records, or why nothing");
    }

    @Test
    void whatActsOnTheImage_isRecorded_andReplayed() {
        press("Find spots");
        press("Find orientation");
        Screen.await(() -> Sitting.of(image).chosen().isPresent());
        press("Set image calibration");
        press("Put it back");
        press("In place of the pattern");
        press("In place of the pattern");
        press("hand Spots");
        press("hand Pattern");
        press("Table of spots");
        Screen.click(frame, "hand Ruler");
        PlacedSpot spot = spot();
        heard(
                "Measure Spacing...",
                () -> Screen.clickAt(image, spot.position().x(), spot.position().y(), 0));
        press("Readings");
        press("Clear");
        press("hand Pattern");
        for (String name : RECORDED.keySet()) {
            if (name.endsWith(" up") && !name.startsWith("Reference") || name.endsWith(" down")) {
                press(name);
            }
        }
        press("Reference up");
        press("Undo");
        press("Back to the fit");
        press("rotation up");
        press("Refine");
        for (String box : List.of(
                "Indices", "Legend", "Scale bar", "Laue circle", "Double diffraction", "Residuals", "Computed half")) {
            press(box);
        }
        press("Computed half");
        choose("view", 1);
        choose("lengths", 1);
        press("Table");
        press("Zones");
        String macro = Screen.onEventThread(recorder::getText);
        assertTrue(macro.matches("[ -~\\s]*"), macro);
        replay(macro);
    }

    @Test
    void darkSpots_areRecorded() {
        press("Find spots");
        press("Dark spots on bright ground");
    }

    private void replay(String macro) {
        Sitting driven = Sitting.of(image);
        LengthUnit.ANGSTROM.remember();
        Screen.clear();
        ImagePlus again = Screen.show(TestPatterns.image());
        Thread run = new Thread(() -> IJ.runMacro(macro), "replay");
        run.start();
        new Dialogs().until(() -> !run.isAlive());
        Sitting replayed = Sitting.of(again);
        Placement a = driven.placement().orElseThrow();
        Placement b = replayed.placement().orElseThrow(() -> new AssertionError(macro));
        assertEquals(a.setting().zone(), b.setting().zone(), macro);
        assertEquals(a.setting().rotation(), b.setting().rotation(), 1e-4, macro);
        assertEquals(0, a.camera().centre().distanceTo(b.camera().centre()), 1e-2, macro);
        assertEquals(a.camera().constant(), b.camera().constant(), 1e-2, macro);
        assertEquals(driven.labelled(), replayed.labelled(), macro);
        assertEquals(driven.solutions().size(), replayed.solutions().size(), macro);
        assertEquals(driven.measurement().ruler(), replayed.measurement().ruler(), macro);
        assertEquals(LengthUnit.NANOMETRE, LengthUnit.last(), macro);
    }

    private void press(String button) {
        heard(RECORDED.get(button), () -> Screen.click(frame, button));
    }

    private void choose(String combo, int entry) {
        heard(
                "Show Marks...",
                () -> Screen.onEventThread(() -> {
                    Screen.find(frame, combo, JComboBox.class).setSelectedIndex(entry);
                    return null;
                }));
    }

    /** Does something, and waits until the recorder has one more line that calls a command. */
    private void heard(String command, Runnable act) {
        int before = calls(command);
        act.run();
        Screen.await(() -> calls(command) == before + 1);
    }

    private int calls(String command) {
        String text = Screen.onEventThread(recorder::getText);
        return text.split(Pattern.quote("\"" + command + "\""), -1).length - 1;
    }

    private PlacedSpot spot() {
        Placement laid = Sitting.of(image).placement().orElseThrow();
        return new io.github.zonewright.imagej.overlay.ComputedSpots()
                .on(laid, TestPatterns.SIDE, TestPatterns.SIDE, 500).stream()
                        .filter(s -> s.position().distanceTo(laid.camera().centre()) > 30)
                        .findFirst()
                        .orElseThrow();
    }

    private static List<AbstractButton> buttons(Container in) {
        List<AbstractButton> found = new ArrayList<>();
        for (Component part : in.getComponents()) {
            if (part instanceof AbstractButton button) {
                found.add(button);
            }
            if (part instanceof Container inner) {
                found.addAll(buttons(inner));
            }
        }
        return found;
    }

    /** Puts our commands where ImageJ looks for those of a jar in its plugins folder. */
    @SuppressWarnings("unchecked")
    private static void install() throws IOException {
        try (InputStream config = RecordedActionsTest.class.getResourceAsStream("/plugins.config")) {
            Matcher entry = ENTRY.matcher(new String(config.readAllBytes(), StandardCharsets.UTF_8));
            while (entry.find()) {
                Menus.getCommands().put(entry.group(1), entry.group(2));
            }
        }
    }
}
