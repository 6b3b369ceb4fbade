package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotNull;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.plugin.frame.Recorder;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.TwinPattern;
import io.github.zonewright.imagej.command.Launching;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredSpot;
import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import javax.swing.JButton;
import javax.swing.JCheckBox;
import javax.swing.JComboBox;
import javax.swing.JFrame;
import javax.swing.JLabel;
import javax.swing.JTable;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** What can be asked about an answer, in the window. */
@Tag("window")
class QuestionsWindowTest {
    @TempDir
    static Path folder;

    private JFrame frame;

    @BeforeEach
    void open() {
        Screen.start();
        Screen.userFolder(folder);
    }

    @AfterEach
    void close() {
        Screen.clear();
    }

    private ImagePlus begin(ImagePlus shown) {
        ImagePlus image = Screen.show(shown);
        frame = Screen.workbench();
        Screen.await(() -> Screen.guide(frame).contains("spots"));
        Screen.pick(frame, "Copper");
        Screen.onEventThread(() -> {
            Screen.find(frame, "scale kind", JComboBox.class).setSelectedIndex(0);
            return null;
        });
        Screen.type(frame, "kilovolts", "200");
        Screen.type(frame, "scale", Double.toString(TestPatterns.CONSTANT));
        return image;
    }

    private void find(ImagePlus image) {
        Screen.click(frame, "Find orientation");
        Screen.await(() -> Sitting.of(image).chosen().isPresent());
    }

    @Test
    void twin_isSearchedInWhatIsLeftOver() {
        ImagePlus image = begin(TwinPattern.image());
        find(image);
        Fingerprint before = Fingerprint.of(image);
        Screen.click(frame, "Left over…");
        JFrame window = Screen.window("questions window");
        Screen.click(window, "Search what is left over");
        Screen.await(() -> !Sitting.of(image).findings().grains().isEmpty());
        Screen.await(() -> text(window, "left over").contains("Σ3"));
        assertTrue(text(window, "left over").contains("Settled, with a twin: ["), text(window, "left over"));
        Screen.await(() -> Screen.find(frame, "verdict", JLabel.class).getText().contains("with a twin"));
        before.assertSame(image);
        Screen.click(frame, "Undo");
        assertTrue(Sitting.of(image).findings().grains().isEmpty());
    }

    @Test
    void halfTurn_isToldApartInPictures() {
        ImagePlus image = begin(new ImagePlus(
                "copper-111",
                TestPatterns.pixels(TestPatterns.copper110()
                        .withSetting(ZoneSetting.onZone(new Uvw(1, 1, 1), new Hkl(2, -2, 0), 0.3)))));
        find(image);
        assertTrue(Screen.find(frame, "remarks", JLabel.class).getText().contains("Half a turn"));
        Screen.click(frame, "What tells apart…");
        JFrame window = Screen.window("questions window");
        Screen.await(() -> Screen.find(window, "patterns", JLabel.class).getIcon() != null);
        assertTrue(text(window, "apart").contains("Tilt by"), text(window, "apart"));
    }

    @Test
    void clickedSpots_nameZones_andHeldPartsStay() {
        ImagePlus image = begin(TestPatterns.image());
        Screen.click(frame, "Find spots");
        Screen.await(() -> Sitting.of(image).measured().isPresent());
        Screen.click(frame, "By clicks…");
        JFrame window = Screen.window("questions window");
        assertFalse(Screen.find(window, "List zones", JButton.class).isEnabled());
        Screen.click(window, "Click spots");
        PixelPoint centre = TestPatterns.copper110().camera().centre();
        List<MeasuredSpot> nearest = Sitting.of(image).measured().orElseThrow().spots().stream()
                .sorted(java.util.Comparator.comparingDouble(
                        s -> Math.rint(s.position().distanceTo(centre))))
                .limit(4)
                .toList();
        MeasuredSpot first = nearest.get(0);
        MeasuredSpot second = nearest.stream()
                .filter(s -> Math.abs(s.position()
                                .minus(centre)
                                .cross(first.position().minus(centre)))
                        > 1000)
                .findFirst()
                .orElseThrow();
        for (MeasuredSpot spot : List.of(first, second)) {
            Screen.clickAt(image, spot.position().x(), spot.position().y(), 0);
        }
        Screen.await(() -> Screen.find(window, "List zones", JButton.class).isEnabled());
        Screen.click(window, "List zones");
        JTable zones = Screen.find(window, "zones by hand", JTable.class);
        assertTrue(zones.getRowCount() > 0);
        Screen.onEventThread(() -> {
            zones.setRowSelectionInterval(0, 0);
            return null;
        });
        double rotation = Sitting.of(image).placement().orElseThrow().setting().rotation();
        Screen.onEventThread(() -> {
            Screen.find(frame, "hold rotation", JCheckBox.class).setSelected(true);
            return null;
        });
        Screen.click(frame, "Refine");
        Screen.await(() -> Sitting.of(image).chosen().isPresent());
        assertEquals(
                rotation,
                Sitting.of(image).chosen().orElseThrow().placement().setting().rotation(),
                0);
    }

    @Test
    void limitOfZones_isCheckedAndKept() {
        ImagePlus image = begin(TestPatterns.image());
        Screen.type(frame, "zones searched", "<0 0");
        assertFalse(Screen.find(frame, "zones searched", javax.swing.JTextField.class)
                .getBackground()
                .equals(java.awt.Color.WHITE));
        Screen.type(frame, "zones searched", "[1 1 0]");
        find(image);
        Sitting.of(image)
                .solutions()
                .forEach(s ->
                        assertEquals(new Uvw(1, 1, 0), s.placement().setting().zone()));
        assertNotNull(Screen.find(frame, "verdict", JLabel.class));
    }

    /** What the recorder writes while the window is used gives the same answer on the same pixels when it is replayed. */
    @Test
    void recordedMacro_repeatsTheAnswer() throws Exception {
        ImagePlus image = begin(TwinPattern.image());
        Recorder recorder = Screen.onEventThread(() -> new Recorder(false));
        String macro;
        try {
            Recorder.record = true;
            find(image);
            Screen.click(frame, "Left over…");
            JFrame window = Screen.window("questions window");
            Screen.click(window, "Search what is left over");
            Screen.await(() -> !Sitting.of(image).findings().grains().isEmpty());
            Screen.click(frame, "Refine");
            Screen.await(() -> recorder.getText().contains("Refine Pattern..."));
            macro = recorder.getText();
        } finally {
            Recorder.record = false;
            Screen.onEventThread(() -> {
                recorder.close();
                return null;
            });
        }
        ImagePlus again = TwinPattern.image();
        for (String line : macro.lines().filter(l -> l.startsWith("run(")).toList()) {
            Matcher call =
                    Pattern.compile("run\\(\"([^\"]+)\", \"([^\"]*)\"\\);").matcher(line);
            assertTrue(call.matches(), line);
            String command = Map.of(
                            "Measure Net...", "MeasureNet",
                            "Find Zone Axis...", "FindZoneAxis",
                            "What Is Left Over...", "SearchLeftovers",
                            "Refine Pattern...", "RefinePattern")
                    .get(call.group(1));
            assertEquals(Optional.empty(), Launching.macro(again, "command." + command, call.group(2)), line);
            if (command.equals("SearchLeftovers")) {
                assertEquals(1, Sitting.of(again).findings().grains().size());
            }
        }
        assertEquals(
                Sitting.of(image).chosen().orElseThrow().placement(),
                Sitting.of(again).chosen().orElseThrow().placement());
    }

    /** Refine leaves a held ellipse as it is; it is fitted again once it is let go. */
    @Test
    void heldEllipse_stays() {
        ImagePlus image = begin(TestPatterns.image());
        find(image);
        Camera camera = TestPatterns.copper110().camera().withEllipse(1.004, 0.5);
        Placement laid = Sitting.of(image).placement().orElseThrow().withCamera(camera);
        Screen.onEventThread(() -> {
            Sitting.of(image).withPlacement(laid).show(image);
            Screen.find(frame, "hold ellipse", JCheckBox.class).setSelected(true);
            return null;
        });
        Screen.settle();
        Screen.click(frame, "Refine");
        Screen.await(() -> Sitting.of(image).chosen().isPresent());
        Camera held = Sitting.of(image).placement().orElseThrow().camera();
        assertEquals(camera.ellipseRatio(), held.ellipseRatio());
        assertEquals(camera.ellipseAzimuth(), held.ellipseAzimuth());
        Screen.onEventThread(() -> {
            Screen.find(frame, "hold ellipse", JCheckBox.class).setSelected(false);
            return null;
        });
        Screen.click(frame, "Refine");
        Screen.await(
                () -> Sitting.of(image).placement().orElseThrow().camera().ellipseRatio() != camera.ellipseRatio());
    }

    private static String text(JFrame window, String name) {
        return Screen.onEventThread(() -> Screen.find(window, name, Words.class)
                .getDocument()
                .getText(0, Screen.find(window, name, Words.class).getDocument().getLength()));
    }
}
