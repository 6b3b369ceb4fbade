package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.Prefs;
import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.calibration.MicroscopeSetting;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.RingPatterns;
import io.github.zonewright.imagej.command.Launching;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.AppliedCalibration;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.KeptCalibrations;
import io.github.zonewright.imagej.session.ScaleKind;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.imagej.session.UserFolder;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.spots.MeasuredValue;
import java.awt.event.KeyEvent;
import java.io.IOException;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import javax.swing.JButton;
import javax.swing.JComboBox;
import javax.swing.JFrame;
import javax.swing.JLabel;
import javax.swing.JTable;
import javax.swing.JTextField;
import javax.swing.JTextPane;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Calibration in the window: from rings, kept, chosen, warned about. */
@Tag("window")
class CalibrationWindowTest {
    @TempDir
    private Path folder;

    private ImagePlus image;
    private Fingerprint before;
    private JFrame frame;

    @BeforeEach
    void open() {
        Screen.start();
        Screen.userFolder(folder);
        Prefs.set("zonewright.standard", "Aluminium");
        new Instrument(200, ScaleKind.PIXELS, 500, 14, 1, 3, false).remember();
        image = Screen.show(RingPatterns.aluminium());
        before = Fingerprint.of(image);
        frame = Screen.workbench();
        Screen.await(() -> frame.getTitle().contains("aluminium rings"));
    }

    @AfterEach
    void close() {
        new Instrument(200, ScaleKind.PIXELS, 500, 14, 1, 3, false).remember();
        Screen.clear();
    }

    private JFrame rings() {
        Screen.click(frame, "From rings…");
        JFrame window = Screen.window("rings window");
        settled(window);
        return window;
    }

    /** Waits for the rings to be measured and judged. */
    private static void settled(JFrame window) {
        Screen.settle();
        Screen.await(() -> Screen.find(window, "Measure rings", JButton.class).isEnabled());
        Screen.await(() -> !said(window).startsWith("Measuring"));
    }

    private static String said(JFrame window) {
        return Screen.onEventThread(
                () -> Screen.find(window, "ring text", JTextPane.class).getText());
    }

    private static void standard(JFrame window, String name) {
        Screen.type(window, "standard", name);
        Screen.press(Screen.find(window, "standard", JTextField.class), KeyEvent.VK_ENTER);
        settled(window);
    }

    private String text(String label) {
        return Screen.onEventThread(
                () -> Screen.find(frame, label, JLabel.class).getText().replaceAll("<[^>]*>", ""));
    }

    private static Calibration kept(String name, int daysOld) throws IOException {
        Calibration made = new Calibration(
                name,
                new MicroscopeSetting("Bench", 300, OptionalDouble.of(800), OptionalDouble.of(14), 2),
                LocalDate.now().minusDays(daysOld),
                "Gold",
                new MeasuredValue(310, 0.12),
                new MeasuredValue(1.0123, 4e-4),
                new MeasuredValue(0.6, 0.02),
                true,
                Optional.of(new MeasuredValue(Math.toRadians(30), 0.01)));
        UserFolder.calibrations().add(made);
        return made;
    }

    private void choose(Calibration calibration) {
        Screen.onEventThread(() -> {
            JComboBox<?> list = Screen.find(frame, "calibrations", JComboBox.class);
            list.firePopupMenuWillBecomeVisible();
            list.setSelectedItem(Optional.of(calibration));
            return null;
        });
        Screen.settle();
    }

    @Test
    void rings_areDrawnPlottedListed_andUsed() {
        JFrame window = rings();
        assertTrue(said(window).startsWith("Aluminium: camera constant 180."), said(window));
        assertTrue(PatternOverlay.count(image) >= 10);
        JTable table = Screen.find(window, "rings table", JTable.class);
        assertEquals("{1 1 1}", table.getValueAt(0, 0));
        assertTrue(Screen.find(window, "profile plot", JLabel.class).getIcon().getIconWidth() > 300);
        assertTrue(Screen.find(window, "residual plot", JLabel.class).getIcon().getIconWidth() > 300);
        Screen.click(window, "Use it");
        assertEquals(
                "kept calibration",
                Screen.find(frame, "scale kind", JComboBox.class).getSelectedItem());
        assertTrue(text("calibration facts").contains("ellipse 1.020"), text("calibration facts"));
        assertFalse(Screen.find(frame, "calibration warning", JLabel.class).isVisible());
        Screen.type(frame, "zone", "0 0 1");
        Camera laid = Sitting.of(image).placement().orElseThrow().camera();
        assertEquals(RingPatterns.CONSTANT, laid.constant(), 0.001 * RingPatterns.CONSTANT);
        assertEquals(RingPatterns.RATIO, laid.ellipseRatio(), 0.003);
        assertEquals(RingPatterns.AZIMUTH, Math.toDegrees(laid.ellipseAzimuth()), 2);
        assertEquals(RingPatterns.X, laid.centre().x(), 0.3);
        before.assertSame(image);
    }

    @Test
    void wrongStandard_isSaid_andTheBetterIsOffered() {
        JFrame window = rings();
        standard(window, "Silicon");
        assertTrue(said(window).startsWith("The rings do not fit Silicon"), said(window));
        assertFalse(Screen.find(window, "Use it", JButton.class).isEnabled());
        Screen.click(window, "take Aluminium");
        settled(window);
        assertTrue(said(window).startsWith("Aluminium: camera constant 180."), said(window));
        assertTrue(Screen.find(window, "Use it", JButton.class).isEnabled());
    }

    @Test
    void thallium_isCautionedFirst() {
        JFrame window = rings();
        standard(window, "Thallium chloride");
        assertTrue(said(window).startsWith("CAUTION: thallium chloride is highly toxic"), said(window));
    }

    @Test
    void roughConstant_isSaidAndAssumed() {
        JFrame window = rings();
        assertTrue(said(window).contains("do not tell Aluminium from Gold, Ceria"), said(window));
        Screen.type(window, "rough camera constant", "182");
        settled(window);
        assertTrue(said(window).contains("do not tell Aluminium from Gold;"), said(window));
        Screen.type(window, "rough camera constant", "many");
        assertEquals(
                "a number, please",
                ((CheckedField<?>) Screen.find(window, "rough camera constant", JTextField.class)).reason());
        Screen.type(window, "rough camera constant", "400");
        settled(window);
        assertTrue(said(window).startsWith("Rings that lines of Aluminium explain: "), said(window));
    }

    @Test
    void tooFewRings_areRefused_andTheOldRingsGo() {
        ImagePlus few = Screen.show(RingPatterns.image(2));
        Screen.select(few);
        Screen.await(() -> Instrument.of(few).isEmpty());
        JFrame window = rings();
        assertTrue(said(window).startsWith("Rings found: 2. At least 3 are needed"), said(window));
        assertFalse(Screen.find(window, "Use it", JButton.class).isEnabled());
        assertFalse(Screen.find(window, "Keep calibration", JButton.class).isEnabled());
        assertEquals(0, PatternOverlay.count(few));
    }

    /** What the recorder heard of rings, keeping and choosing, run as macros on another copy, comes to the same. */
    @Test
    void recordedMacro_doesTheSame() throws IOException {
        Calibration other = kept("Bench one", 1);
        ij.plugin.frame.Recorder recorder = Screen.onEventThread(() -> new ij.plugin.frame.Recorder(false));
        String macro;
        try {
            JFrame window = rings();
            Screen.type(window, "rough camera constant", "182");
            settled(window);
            Screen.click(window, "Measure rings");
            settled(window);
            Screen.click(window, "Use it");
            Screen.type(window, "keep calibration as", "Hall two");
            Screen.type(window, "image rotation", "31.5");
            Screen.click(window, "Keep calibration");
            choose(other);
            macro = recorder.getText();
        } finally {
            Screen.onEventThread(() -> {
                recorder.close();
                return null;
            });
        }
        Calibration first = KeptCalibrations.of("Hall two");
        KeptCalibrations.delete("Hall two");
        ImagePlus copy = RingPatterns.aluminium();
        Map<String, String> commands = Map.of(
                "Calibrate from Rings...", "CalibrateRings",
                "Keep Calibration...", "KeepCalibration",
                "Apply Calibration...", "ApplyCalibration");
        Matcher line = Pattern.compile("run\\(\"([^\"]+)\", \"([^\"]+)\"\\);").matcher(macro);
        List<String> ran = new ArrayList<>();
        while (line.find()) {
            Optional<String> refused = Launching.macro(copy, "command." + commands.get(line.group(1)), line.group(2));
            assertTrue(refused.isEmpty(), line.group() + refused);
            ran.add(line.group(1));
        }
        assertEquals(
                List.of(
                        "Calibrate from Rings...",
                        "Calibrate from Rings...",
                        "Calibrate from Rings...",
                        "Keep Calibration...",
                        "Apply Calibration..."),
                ran,
                macro);
        Calibration again = KeptCalibrations.of("Hall two");
        assertEquals(first.constant(), again.constant());
        assertEquals(first.imageRotation(), again.imageRotation());
        assertEquals(first.setting(), again.setting());
        assertEquals(
                Instrument.of(image).orElseThrow().applied(),
                Instrument.of(copy).orElseThrow().applied());
    }

    @Test
    void keep_writesIt_andItIsInUse() throws IOException {
        JFrame window = rings();
        Screen.type(window, "calibration camera length", "520");
        Screen.type(window, "image rotation", "31.5");
        assertFalse(Screen.find(window, "Keep calibration", JButton.class).isEnabled());
        Screen.type(window, "keep calibration as", "Hall two");
        Screen.click(window, "Keep calibration");
        Calibration made = KeptCalibrations.of("Hall two");
        assertEquals("Aluminium", made.standard());
        assertEquals(31.5, Math.toDegrees(made.imageRotation().orElseThrow().value()), 1e-9);
        assertEquals(
                Optional.of(made), Instrument.of(image).orElseThrow().applied().map(AppliedCalibration::calibration));
        Screen.click(window, "Keep calibration");
        assertTrue(
                Screen.find(window, "keep calibration note", JLabel.class)
                        .getText()
                        .contains("another calibration is kept"),
                "kept twice");
        before.assertSame(image);
    }

    @Test
    void chosen_oldAndForAnotherSetting_isWarned() throws IOException {
        choose(kept("Spring", 200));
        assertTrue(text("calibration warning").contains("200 days old; 90 days"), text("calibration warning"));
        assertTrue(text("calibration warning").contains("It is for 300 kV"), text("calibration warning"));
        assertTrue(text("calibration facts").contains("camera constant 310."), text("calibration facts"));
        Screen.type(frame, "binning", "1");
        assertTrue(text("calibration facts").contains("camera constant 620."), text("calibration facts"));
        Screen.type(frame, "image camera length", "520");
        assertTrue(text("calibration warning").contains("camera length 800 mm"), text("calibration warning"));
        Screen.type(frame, "zone", "0 0 1");
        Camera laid = Sitting.of(image).placement().orElseThrow().camera();
        assertEquals(620, laid.constant(), 1e-9);
        assertEquals(1.0123, laid.ellipseRatio(), 1e-12);
        assertTrue(laid.mirrored());
        assertTrue(text("on the micrograph").contains("points to -30.00°"), text("on the micrograph"));
        Screen.onEventThread(() -> {
            Screen.find(frame, "scale kind", JComboBox.class).setSelectedItem("camera constant, px·Å");
            return null;
        });
        Screen.settle();
        assertFalse(Screen.find(frame, "calibration facts", JLabel.class).isVisible());
        assertEquals(
                Optional.empty(),
                Screen.find(frame, "calibrations", JComboBox.class).getSelectedItem());
    }

    @Test
    void calibrationKind_withoutOne_asksForIt() {
        Screen.onEventThread(() -> {
            Screen.find(frame, "scale kind", JComboBox.class).setSelectedItem("kept calibration");
            return null;
        });
        Screen.settle();
        assertTrue(Screen.guide(frame).contains("Choose a calibration"), Screen.guide(frame));
    }

    @Test
    void keptWindow_usesRenamesDeletes() throws IOException {
        kept("Spring", 200);
        kept("Autumn", 5);
        Screen.click(frame, "Kept…");
        JFrame window = Screen.window("calibrations window");
        JTable table = Screen.find(window, "calibrations table", JTable.class);
        assertEquals(2, table.getRowCount());
        assertEquals("Autumn", table.getValueAt(0, 0));
        assertFalse(Screen.find(window, "Use for this image", JButton.class).isEnabled());
        select(table, 1);
        Screen.click(window, "Use for this image");
        assertTrue(text("calibration facts").startsWith("Spring: "), text("calibration facts"));
        Screen.type(window, "new calibration name", "Winter");
        Screen.click(window, "Rename calibration");
        assertEquals("Winter", table.getValueAt(1, 0));
        select(table, 0);
        Screen.click(window, "Delete calibration");
        assertEquals(2, table.getRowCount());
        Screen.click(window, "Delete calibration");
        assertEquals(1, table.getRowCount());
        assertTrue(KeptCalibrations.named("Autumn").isEmpty());
        assertTrue(KeptCalibrations.named("Winter").isPresent());
    }

    private static void select(JTable table, int row) {
        Screen.onEventThread(() -> {
            table.setRowSelectionInterval(row, row);
            return null;
        });
        Screen.settle();
    }

    @Test
    void setImage_onlyWhenAsked_andPutBack() throws IOException {
        choose(kept("Spring", 200));
        before.assertSame(image);
        Screen.click(frame, "Set image calibration");
        assertEquals("1/nm", image.getLocalCalibration().getUnit());
        assertEquals(10 / 310.0, image.getLocalCalibration().pixelWidth, 1e-12);
        assertTrue(text("image calibration note").contains("it was 1.00000 pixel per pixel"));
        Screen.click(frame, "Put it back");
        before.assertSame(image);
    }

    @Test
    void applyCommand_isSeenInTheWindow() throws IOException {
        Calibration made = kept("Spring", 200);
        Instrument.last().with(AppliedCalibration.of(made), 2).keepWith(image);
        Sitting.of(image).show(image);
        Screen.await(() -> text("calibration facts").startsWith("Spring: "));
    }
}
