package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import ij.ImagePlus;
import ij.ImageStack;
import ij.Undo;
import ij.process.ByteProcessor;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.pattern.Placement;
import java.nio.file.Path;
import javax.swing.JComboBox;
import javax.swing.JFrame;
import javax.swing.JTable;
import javax.swing.JTextField;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The window on a real ImageJ. */
@Tag("window")
class WorkbenchTest {
    @TempDir
    static Path folder;

    private ImagePlus image;
    private JFrame frame;

    @BeforeEach
    void open() {
        Screen.start();
        Screen.userFolder(folder);
        image = Screen.show(TestPatterns.imageOfUser());
        frame = Screen.workbench();
        Screen.await(() -> Screen.guide(frame).contains("spots"));
        choose("Copper");
        Screen.type(frame, "kilovolts", "200");
    }

    @AfterEach
    void close() {
        Screen.clear();
    }

    @Test
    void wholeWay_leavesWhatIsTheUsers() {
        Fingerprint before = Fingerprint.of(image);
        Screen.click(frame, "Find spots");
        Screen.await(() -> sitting().measured().isPresent());
        assertTrue(Screen.guide(frame).contains("orientation"), Screen.guide(frame));
        Screen.click(frame, "Find orientation");
        Screen.await(() -> sitting().chosen().isPresent());
        assertTrue(Screen.guide(frame).contains("keep the record"), Screen.guide(frame));
        JTable table = Screen.find(frame, "solutions", JTable.class);
        assertTrue(table.getRowCount() >= 1);
        assertEquals(0, table.getSelectedRow());
        Screen.type(frame, "rotation", "12.5");
        assertEquals(
                12.5,
                Math.toDegrees(sitting().placement().orElseThrow().setting().rotation()),
                1e-9);
        assertTrue(Screen.guide(frame).contains("refine"), Screen.guide(frame));
        Screen.click(frame, "Undo");
        assertTrue(sitting().chosen().isPresent());
        Screen.click(frame, "Refine");
        Screen.await(() -> Screen.guide(frame).contains("keep the record"));
        before.assertSame(image);
        assertTrue(PatternOverlay.count(image) > 5);
    }

    @Test
    void reciprocalCalibration_isTakenForTheScale() {
        JComboBox<?> kind = Screen.find(frame, "scale kind", JComboBox.class);
        assertEquals("image calibration", kind.getSelectedItem());
        assertFalse(Screen.find(frame, "scale", JTextField.class).isEnabled());
    }

    @Test
    void wrongValue_isSaidBesideTheField() {
        Screen.type(frame, "kilovolts", "0");
        assertTrue(Screen.guide(frame).contains("Put right"), Screen.guide(frame));
        assertFalse(Screen.find(frame, "Find orientation", javax.swing.JButton.class)
                .isEnabled());
        Screen.type(frame, "kilovolts", "200");
        assertTrue(Screen.guide(frame).contains("spots"), Screen.guide(frame));
    }

    @Test
    void zoneTyped_laysAPattern() {
        Screen.type(frame, "zone", "1 1 0");
        Placement laid = sitting().placement().orElseThrow();
        assertEquals(TestPatterns.CONSTANT, laid.camera().constant(), 1e-9);
        Screen.type(frame, "lean right", "0.5");
        assertEquals(
                0.5,
                Math.toDegrees(sitting().placement().orElseThrow().setting().leanX()),
                1e-9);
        Screen.click(frame, "rotation up");
        assertEquals(
                1, Math.toDegrees(sitting().placement().orElseThrow().setting().rotation()), 1e-9);
        Screen.click(frame, "Indices");
        assertTrue(sitting().labelled());
    }

    @Test
    void blankImage_claimsNothing() {
        ImagePlus blank = Screen.show(new ImagePlus("blank", new ByteProcessor(64, 64)));
        Screen.await(() -> frame.getTitle().contains("blank"));
        Screen.type(frame, "scale", "120");
        Screen.click(frame, "Find orientation");
        Screen.await(() -> Sitting.of(blank).measured().isPresent()
                && !Screen.find(frame, "Stop", javax.swing.JButton.class).isEnabled());
        assertEquals(0, PatternOverlay.count(blank));
        assertEquals(0, Sitting.of(blank).solutions().size());
    }

    @Test
    void secondImage_hasItsOwnState() {
        Screen.type(frame, "zone", "1 1 0");
        ImagePlus second = Screen.show(TestPatterns.image());
        Screen.await(
                () -> Screen.find(frame, "zone", JTextField.class).getText().isEmpty());
        assertTrue(Sitting.of(second).placement().isEmpty());
        Screen.select(image);
        Screen.await(
                () -> Screen.find(frame, "zone", JTextField.class).getText().equals("1 1 0"));
    }

    @Test
    void slices_haveTheirOwnState() {
        ImageStack stack = new ImageStack(TestPatterns.SIDE, TestPatterns.SIDE);
        stack.addSlice(TestPatterns.image().getProcessor());
        stack.addSlice(TestPatterns.image().getProcessor());
        ImagePlus two = Screen.show(new ImagePlus("two slices", stack));
        Screen.await(() -> frame.getTitle().contains("two slices"));
        Screen.type(frame, "scale", "120");
        Screen.type(frame, "zone", "0 0 1");
        Screen.await(() -> Sitting.of(two).placement().isPresent());
        two.setSlice(2);
        Screen.await(
                () -> Screen.find(frame, "zone", JTextField.class).getText().isEmpty());
        two.setSlice(1);
        Screen.await(
                () -> Screen.find(frame, "zone", JTextField.class).getText().equals("0 0 1"));
    }

    @Test
    void windowClosedDuringASearch_changesNothing() {
        Screen.click(frame, "Find spots");
        Screen.await(() -> sitting().measured().isPresent());
        Fingerprint before = Fingerprint.of(image);
        Sitting spots = sitting();
        Screen.onEventThread(() -> {
            Screen.find(frame, "Find orientation", javax.swing.JButton.class).doClick();
            frame.dispose();
            return null;
        });
        IJ.wait(1500);
        Screen.settle();
        before.assertSame(image);
        assertEquals(spots, sitting());
    }

    @Test
    void imageClosedDuringASearch_isSafe() {
        Screen.click(frame, "Find spots");
        Screen.await(() -> sitting().measured().isPresent());
        Screen.onEventThread(() -> {
            Screen.find(frame, "Find orientation", javax.swing.JButton.class).doClick();
            image.changes = false;
            image.close();
            return null;
        });
        Screen.await(() -> Screen.guide(frame).startsWith("Open"));
        IJ.wait(1500);
        assertTrue(Screen.guide(frame).startsWith("Open"));
    }

    @Test
    void reopened_findsTheStateAgain() {
        Screen.type(frame, "zone", "1 1 0");
        Screen.onEventThread(() -> {
            frame.dispose();
            return null;
        });
        Screen.settle();
        JFrame again = Screen.workbench();
        Screen.await(
                () -> Screen.find(again, "zone", JTextField.class).getText().equals("1 1 0"));
    }

    @Test
    void imagejUndo_bringsTheOverlayBack() {
        Screen.type(frame, "zone", "1 1 0");
        int before = PatternOverlay.count(image);
        double ring = ringX();
        Screen.type(frame, "rotation", "30");
        assertTrue(Math.abs(ring - ringX()) > 1);
        Screen.select(image);
        Screen.onEventThread(() -> {
            Undo.undo();
            return null;
        });
        assertEquals(before, PatternOverlay.count(image));
        assertEquals(ring, ringX(), 1e-3);
        Screen.await(
                () -> Screen.find(frame, "rotation", JTextField.class).getText().equals("0.00"));
    }

    private double ringX() {
        return image.getOverlay().get("002").getFloatBounds().getCenterX();
    }

    private Sitting sitting() {
        return Sitting.of(image);
    }

    private void choose(String crystal) {
        Screen.pick(frame, crystal);
    }
}
