package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.ImageStack;
import ij.WindowManager;
import ij.gui.Roi;
import ij.gui.Toolbar;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.command.Launching;
import io.github.zonewright.imagej.session.LengthUnit;
import io.github.zonewright.imagej.session.Measurement;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.MeasuredSpot;
import io.github.zonewright.spots.PatternCentre;
import java.awt.Window;
import java.awt.event.InputEvent;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import javax.swing.AbstractButton;
import javax.swing.JCheckBox;
import javax.swing.JComboBox;
import javax.swing.JComponent;
import javax.swing.JFrame;
import javax.swing.JLabel;
import javax.swing.JMenuItem;
import javax.swing.JTable;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The measured spots in the window, by button and by hand on the image. Copper: d(111) = 3.615 Å/√3 = 2.0871 Å. */
@Tag("window")
class SpotsSectionTest {
    @TempDir
    static Path folder;

    private ImagePlus image;
    private JFrame frame;

    @BeforeEach
    void open() {
        Screen.start();
        Screen.userFolder(folder);
        frame = Screen.workbench();
        show(TestPatterns.imageOfUser());
        Screen.pick(frame, "Copper");
    }

    @AfterEach
    void close() {
        Screen.click(frame, "hand Pattern");
        Toolbar.getInstance().setTool(Toolbar.RECTANGLE);
        LengthUnit.ANGSTROM.remember();
        for (Window window : WindowManager.getAllNonImageWindows()) {
            if (window instanceof ij.text.TextWindow text) {
                text.close(false);
            }
        }
        Screen.clear();
    }

    @Test
    void findSpots_isOneClickToTheNet() {
        Fingerprint user = Fingerprint.of(image);
        find();
        String said = said();
        assertTrue(said.startsWith("16 spots; centre "), said);
        double x = Double.parseDouble(said.replaceAll("(?s).*centre ([\\d.]+),.*", "$1"));
        assertEquals(TestPatterns.copper110().camera().centre().x(), x, 0.05);
        assertTrue(said.contains("from the direct beam") && said.contains("Net: a 57.5"), said);
        assertTrue(said.contains("d of a 2.087 ± "), said);
        assertEquals(16, count("measured spot"));
        assertEquals(1, count("net vector a"));
        assertEquals(1, count("centre"));
        user.assertSame(image);
    }

    @Test
    void lengths_areShownInNanometres() {
        find();
        Screen.onEventThread(() -> {
            Screen.find(frame, "lengths", JComboBox.class).setSelectedIndex(1);
            return null;
        });
        Screen.settle();
        assertTrue(said().contains("d of a 0.2087 ± "), said());
    }

    @Test
    void ruler_readsSpots_andListsTheirForms() {
        Fingerprint user = Fingerprint.of(image);
        find();
        Screen.click(frame, "hand Ruler");
        PixelPoint first = spots().get(0).position();
        PixelPoint second = spots().get(1).position();
        Screen.clickAt(image, first.x() + 1, first.y() - 1, 0);
        Screen.clickAt(image, second.x(), second.y(), 0);
        JTable table = Screen.find(frame, "readings", JTable.class);
        assertEquals(2, table.getRowCount());
        assertTrue(
                table.getValueAt(0, 1).toString().startsWith("2.08"),
                table.getValueAt(0, 1).toString());
        assertTrue(
                table.getValueAt(0, 4).toString().startsWith("{111}"),
                table.getValueAt(0, 4).toString());
        assertFalse(table.getValueAt(1, 2).toString().isEmpty());
        assertEquals(2, count("ruler"));
        Screen.click(frame, "Readings");
        Screen.await(() -> WindowManager.getWindow("Spacings of " + image.getTitle()) != null);
        Screen.click(frame, "Clear");
        assertEquals(0, table.getRowCount());
        Screen.click(frame, "Undo");
        assertEquals(2, Screen.find(frame, "readings", JTable.class).getRowCount());
        Screen.type(frame, "within", "0.01");
        assertTrue(
                table.getValueAt(0, 4).toString().startsWith("no {hkl}"),
                table.getValueAt(0, 4).toString());
        Screen.type(frame, "within", "2");
        user.assertSame(image);
    }

    @Test
    void ruler_ofAPair_needsTwoClicks() {
        find();
        Screen.click(frame, "hand Ruler");
        Screen.click(frame, "pairs");
        PixelPoint spot = spots().get(0).position();
        PixelPoint centre = measured().centre().orElseThrow().position();
        Screen.clickAt(image, spot.x(), spot.y(), 0);
        assertEquals(0, measurement().ruler().size());
        PixelPoint opposite = centre.plus(centre.minus(spot));
        Screen.clickAt(image, opposite.x(), opposite.y(), 0);
        assertEquals(1, measurement().ruler().size());
        assertTrue(measurement().ruler().get(0).opposite().isPresent());
        Screen.click(frame, "pairs");
    }

    @Test
    void spots_areRemovedAddedAndMovedByHand() {
        Fingerprint user = Fingerprint.of(image);
        find();
        Screen.click(frame, "hand Spots");
        PixelPoint spot = spots().get(3).position();
        PixelPoint other = spots().get(8).position();
        Screen.clickAt(image, spot.x(), spot.y(), InputEvent.ALT_DOWN_MASK);
        assertEquals(15, spots().size());
        Screen.clickAt(image, spot.x() + 2, spot.y(), 0);
        assertEquals(16, spots().size());
        assertEquals(1, count("spot by hand"));
        Screen.clickAt(image, other.x(), other.y(), InputEvent.ALT_DOWN_MASK);
        Screen.drag(image, spot.x(), spot.y(), other.x() + 1, other.y() + 1);
        assertEquals(15, spots().size());
        assertTrue(spots().stream().anyMatch(s -> s.position().distanceTo(other) < 0.05));
        assertTrue(spots().stream().noneMatch(s -> s.position().distanceTo(spot) < 5));
        for (int i = 0; i < 4; i++) {
            Screen.click(frame, "Undo");
        }
        assertEquals(16, spots().size());
        assertFalse(measurement().edited());
        user.assertSame(image);
    }

    @Test
    void centre_isDragged() {
        find();
        Screen.click(frame, "hand Spots");
        PixelPoint centre = measured().centre().orElseThrow().position();
        Screen.drag(image, centre.x(), centre.y(), centre.x() + 30, centre.y() - 22);
        PatternCentre moved = measured().centre().orElseThrow();
        assertEquals(PatternCentre.Source.BY_HAND, moved.source());
        assertEquals(centre.x() + 30, moved.position().x(), 1.1);
        assertTrue(said().contains("set by hand"), said());
        PixelPoint now = moved.position();
        Screen.drag(image, now.x(), now.y(), centre.x() + 1, centre.y() + 1);
        assertEquals(0, measured().centre().orElseThrow().position().distanceTo(centre), 0.05);
    }

    /** What the recorder wrote, run as a macro on the same pattern, comes to the same spots. */
    @Test
    void recordedMacro_doesTheSame() {
        ij.plugin.frame.Recorder recorder = Screen.onEventThread(() -> new ij.plugin.frame.Recorder(false));
        try {
            find();
            Screen.click(frame, "hand Spots");
            PixelPoint spot = spots().get(3).position();
            Screen.clickAt(image, spot.x(), spot.y(), InputEvent.ALT_DOWN_MASK);
            Screen.click(frame, "hand Ruler");
            PixelPoint read = spots().get(0).position();
            Screen.clickAt(image, read.x(), read.y(), 0);
            ImagePlus other = TestPatterns.imageOfUser();
            replay(recorder.getText(), other);
            Measurement replayed = Sitting.of(other).measurement();
            assertEquals(spots(), replayed.pattern().orElseThrow().spots());
            assertEquals(
                    measurement().ruler().get(0).place(),
                    replayed.ruler().get(0).place());
        } finally {
            Screen.onEventThread(() -> {
                recorder.close();
                return null;
            });
        }
    }

    @Test
    void clickOnNothing_changesNothing() {
        find();
        Measurement before = measurement();
        Screen.click(frame, "hand Spots");
        Screen.clickAt(image, 4, 4, 0);
        Screen.clickAt(image, 4, 4, InputEvent.ALT_DOWN_MASK);
        assertEquals(before.withShown(true), measurement());
    }

    @Test
    void hiddenArea_isTheSelection_andIsShown() {
        find();
        PixelPoint covered = spots().get(0).position();
        image.setRoi(new Roi(covered.x() - 10, covered.y() - 10, 20, 20));
        Fingerprint user = Fingerprint.of(image);
        choose("Hidden area", "Hide the selection alone");
        Screen.await(() -> measured().isHidden(covered) && free());
        assertEquals(1, count("hidden area"));
        user.assertSame(image);
        Screen.click(frame, "Undo");
        choose("Hidden area", "As found by itself");
        Screen.await(() -> !measured().isHidden(covered) && free());
        user.assertSame(image);
    }

    @Test
    void negative_isSeenAndCanBeContradicted() {
        ImagePlus negative = TestPatterns.image();
        negative.setTitle("negative");
        negative.getProcessor().invert();
        show(negative);
        Fingerprint user = Fingerprint.of(image);
        find();
        JCheckBox dark = Screen.find(frame, "Dark spots on bright ground", JCheckBox.class);
        assertTrue(dark.isSelected());
        assertTrue(Screen.find(frame, "ground", JLabel.class).getText().contains("untick"));
        assertEquals(16, spots().size());
        Screen.click(frame, "Dark spots on bright ground");
        Screen.await(() -> free() && spots().size() < 16);
        assertEquals("", Screen.find(frame, "ground", JLabel.class).getText());
        user.assertSame(image);
    }

    @Test
    void tableAndProfile_areOneClick() {
        find();
        Screen.click(frame, "Table of spots");
        Screen.await(() -> WindowManager.getWindow("Measured spots of " + image.getTitle()) != null);
        choose("Profile", "Along a");
        Screen.await(() -> WindowManager.getCurrentImage().getTitle().startsWith("Row of"));
        ij.IJ.wait(700);
        assertTrue(frame.getTitle().endsWith(image.getTitle()), "the plot is no pattern");
        choose("Profile", "About the centre");
        Screen.await(() -> WindowManager.getCurrentImage().getTitle().startsWith("Profile of"));
    }

    @Test
    void sliceAndReopening_keepTheMeasurement() {
        ImageStack stack = new ImageStack(TestPatterns.SIDE, TestPatterns.SIDE);
        stack.addSlice(TestPatterns.image().getProcessor());
        stack.addSlice(TestPatterns.image().getProcessor());
        show(new ImagePlus("two slices", stack));
        find();
        image.setSlice(2);
        Screen.await(() -> said().contains("Nothing is measured"));
        Screen.onEventThread(() -> {
            frame.dispose();
            return null;
        });
        image.setSlice(1);
        frame = Screen.workbench();
        Screen.await(() -> said().startsWith("16 spots"));
    }

    @Test
    void folding_hidesAllButTheHeading() {
        SpotsSection section = (SpotsSection) Screen.find(frame, "Find spots", AbstractButton.class)
                .getParent()
                .getParent();
        Screen.onEventThread(() -> {
            section.fold(true);
            return null;
        });
        assertEquals(
                1,
                Arrays.stream(section.getComponents())
                        .filter(java.awt.Component::isVisible)
                        .count());
        Screen.onEventThread(() -> {
            section.fold(false);
            return null;
        });
        assertTrue(Screen.find(frame, "Find spots", AbstractButton.class).isShowing());
    }

    private static void replay(String macro, ImagePlus on) {
        Map<String, String> commands = Map.of(
                "Measure Net...", "MeasureNet", "Edit Spots...", "EditSpots", "Measure Spacing...", "MeasureSpacing");
        Matcher line = Pattern.compile("run\\(\"([^\"]+)\", \"([^\"]+)\"\\);").matcher(macro);
        int lines = 0;
        while (line.find()) {
            Optional<String> refused = Launching.macro(on, "command." + commands.get(line.group(1)), line.group(2));
            assertTrue(refused.isEmpty(), line.group() + refused);
            lines++;
        }
        assertEquals(3, lines, macro);
    }

    private void show(ImagePlus shown) {
        image = Screen.show(shown);
        Screen.await(() -> frame.getTitle().endsWith(shown.getTitle()) && free());
    }

    private void find() {
        Screen.click(frame, "Find spots");
        Screen.await(() -> Sitting.of(image).measured().isPresent() && free());
    }

    private boolean free() {
        return Screen.find(frame, "Find spots", AbstractButton.class).isEnabled();
    }

    private void choose(String button, String item) {
        JComponent owner = Screen.find(frame, button, AbstractButton.class);
        Screen.onEventThread(() -> {
            Screen.find(owner.getComponentPopupMenu(), item, JMenuItem.class).doClick();
            return null;
        });
        Screen.settle();
    }

    private String said() {
        return Screen.onEventThread(() -> Screen.find(frame, "measured", JLabel.class)
                .getText()
                .replaceAll("<[^>]*>", " ")
                .strip());
    }

    private Measurement measurement() {
        return Sitting.of(image).measurement();
    }

    private MeasuredPattern measured() {
        return Sitting.of(image).measured().orElseThrow();
    }

    private List<MeasuredSpot> spots() {
        return measured().spots();
    }

    private long count(String name) {
        return Arrays.stream(image.getOverlay().toArray())
                .filter(roi -> name.equals(roi.getName()))
                .count();
    }
}
