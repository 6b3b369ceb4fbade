package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.Prefs;
import ij.WindowManager;
import io.github.zonewright.imagej.session.Sitting;
import java.awt.Rectangle;
import java.nio.file.Path;
import java.util.function.Consumer;
import javax.swing.AbstractButton;
import javax.swing.JFrame;
import javax.swing.JLabel;
import javax.swing.JViewport;
import javax.swing.SwingUtilities;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The whole way of the work fits in a window 900 px high, and the next thing to do is seen at every step. */
@Tag("window")
class OneWindowTest {
    private static final String KEPT = "zonewright.open";

    @TempDir
    static Path folder;

    private JFrame frame;

    @BeforeEach
    void open() {
        Screen.start();
        Screen.userFolder(folder);
        Prefs.set(KEPT, null);
        frame = Screen.workbench();
    }

    @AfterEach
    void close() {
        Screen.clear();
        Prefs.set(KEPT, null);
    }

    private void assertSeen(String step) {
        Screen.settle();
        assertTrue(frame.getHeight() <= 900, step + ": " + frame.getHeight());
        boolean seen = Screen.onEventThread(() -> {
            AbstractButton next = frame.getRootPane().getDefaultButton();
            JViewport view = (JViewport) SwingUtilities.getAncestorOfClass(JViewport.class, next);
            Rectangle there = SwingUtilities.convertRectangle(next.getParent(), next.getBounds(), frame.getRootPane());
            return next.isShowing()
                    && new Rectangle(frame.getRootPane().getSize()).contains(there)
                    && (view == null
                            || view.getViewRect()
                                    .contains(SwingUtilities.convertRectangle(
                                            next.getParent(), next.getBounds(), view.getView())));
        });
        assertTrue(seen, step + ": " + frame.getRootPane().getDefaultButton().getText());
    }

    private void assertWhole(String step) {
        assertSeen(step);
        boolean whole = Screen.onEventThread(() -> {
            JViewport view = Screen.find(frame, "sections", SectionStack.class).getViewport();
            return view.getView().getPreferredSize().height <= view.getHeight();
        });
        assertTrue(whole, step + ": nothing to scroll");
    }

    private Section section(String heading) {
        return (Section) SwingUtilities.getAncestorOfClass(
                Section.class, Screen.find(frame, "heading " + heading, JLabel.class));
    }

    @Test
    void wholeWay_isSeenAtEachStep() {
        walk(this::assertWhole);
        assertFalse(section("Solutions").isFolded());
    }

    /** On a small screen there may be something to scroll, but not to what is next. */
    @Test
    void smallWindow_showsTheNextThing() {
        Screen.onEventThread(() -> {
            frame.setSize(frame.getWidth(), 480);
            frame.validate();
            return null;
        });
        walk(this::assertSeen);
    }

    private void walk(Consumer<String> at) {
        at.accept("first run");
        Screen.click(frame, "Open example");
        Screen.await(() -> Screen.guide(frame).contains("Find the spots"));
        ImagePlus example = WindowManager.getCurrentImage();
        at.accept("image open");
        Screen.click(frame, "Find spots");
        Screen.await(() -> Screen.guide(frame).contains("find the orientation"));
        at.accept("spots found");
        Screen.click(frame, "Find orientation");
        Screen.await(() -> Sitting.of(example).chosen().isPresent());
        at.accept("orientation found");
        assertFalse(section("Solutions").isFolded());
        Screen.click(frame, "rotation up");
        Screen.await(() -> Screen.guide(frame).contains("then refine"));
        at.accept("corrected by hand");
        assertFalse(section("By hand").isFolded());
        Screen.click(frame, "Refine");
        Screen.await(() -> Sitting.of(example).chosen().isPresent());
        at.accept("refined");
        assertFalse(section("Solutions").isFolded());
    }

    @Test
    void folded_saysWhatStandsInIt() {
        Screen.click(frame, "Open example");
        Screen.await(() -> Screen.guide(frame).contains("Find the spots"));
        Screen.fold(frame, "Instrument", true);
        JLabel summary = Screen.find(frame, "summary Instrument", JLabel.class);
        assertTrue(summary.isShowing());
        assertTrue(summary.getText().startsWith("200 kV, 113.6 px·Å"), summary.getText());
        assertEquals(
                "Austenite", Screen.find(frame, "summary Crystal", JLabel.class).getText());
    }

    @Test
    void openedByAPerson_isOpenTheNextTime() {
        assertTrue(section("Seeing").isFolded());
        Screen.fold(frame, "Seeing", false);
        assertFalse(section("Seeing").isFolded());
        Screen.fold(frame, "Crystal", true);
        assertTrue(section("Crystal").isFolded());
        Screen.clear();
        frame = Screen.workbench();
        Screen.settle();
        assertTrue(section("Crystal").isFolded());
        Screen.fold(frame, "Instrument", true);
        Screen.clear();
        frame = Screen.workbench();
        Screen.settle();
        assertFalse(section("Seeing").isFolded(), "there is room for it when others are folded");
    }

    /** What changes within a folded part shows when it opens, and not before. */
    @Test
    void foldedPart_staysFoldedWhenItIsFilled() {
        Screen.fold(frame, "Solutions", true);
        SolutionsSection solutions = (SolutionsSection) section("Solutions");
        Screen.onEventThread(() -> {
            solutions.spots("Something was found.");
            return null;
        });
        assertEquals(
                1,
                java.util.Arrays.stream(solutions.getComponents())
                        .filter(java.awt.Component::isVisible)
                        .count());
    }
}
