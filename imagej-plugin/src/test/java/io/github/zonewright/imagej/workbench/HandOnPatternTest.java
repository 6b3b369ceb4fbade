package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.gui.Roi;
import ij.gui.Toolbar;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.PatternDrag;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.Refinement;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.awt.event.InputEvent;
import java.awt.event.KeyEvent;
import java.util.Arrays;
import java.util.List;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;

/** Stretching, tilting, stepping and reading a pattern with the hand tool, with events as the system sends them. */
@Tag("window")
class HandOnPatternTest {
    private ImagePlus image;
    private Placement before;
    private PixelPoint centre;

    @BeforeEach
    void open() {
        Screen.start();
        image = Screen.show(TestPatterns.imageOfUser());
        Screen.onEventThread(() -> {
            HandTool.pickUp();
            return null;
        });
        before = TestPatterns.copper110();
        centre = before.camera().centre();
        Sitting.EMPTY.withPlacement(before).show(image);
        Screen.settle();
    }

    @AfterEach
    void close() {
        HandTool.use(PatternDrag.TURN);
        Toolbar.getInstance().setTool(Toolbar.RECTANGLE);
        Screen.clear();
    }

    private Placement now() {
        return Sitting.of(image).placement().orElseThrow();
    }

    @Test
    void ctrlDrag_stretches() {
        Fingerprint user = Fingerprint.of(image);
        Screen.drag(
                image,
                new PixelPoint(centre.x() + 40, centre.y()),
                new PixelPoint(centre.x() + 80, centre.y()),
                InputEvent.CTRL_DOWN_MASK);
        assertEquals(2, now().camera().constant() / TestPatterns.CONSTANT, 0.05);
        assertEquals(before.setting(), now().setting());
        user.assertSame(image);
    }

    @Test
    void altDrag_tilts() {
        Fingerprint user = Fingerprint.of(image);
        Screen.drag(
                image,
                new PixelPoint(centre.x() + 40, centre.y()),
                new PixelPoint(centre.x() + 60, centre.y()),
                InputEvent.ALT_DOWN_MASK);
        assertTrue(now().setting().leanX() < 0);
        assertEquals(before.camera(), now().camera());
        user.assertSame(image);
    }

    @Test
    void chosenDrag_isWhatADragDoes() {
        HandTool.use(PatternDrag.STRETCH);
        Screen.drag(image, centre.x() + 40, centre.y(), centre.x() + 60, centre.y());
        assertEquals(1.5, now().camera().constant() / TestPatterns.CONSTANT, 0.05);
    }

    /** While the hand drags the record is not written; at the end it is, for a TIFF file. */
    @Test
    void drag_keepsTheRecordAtItsEnd() {
        Screen.drag(image, centre.x() + 80, centre.y(), centre.x(), centre.y() - 80);
        assertTrue(PatternOverlay.record(image).isPresent());
    }

    @Test
    void clickOnSpot_readsIt_andElsewhereTakesItAway() {
        Fingerprint user = Fingerprint.of(image);
        PlacedSpot spot = spot();
        Screen.clickAt(image, spot.position().x(), spot.position().y(), 0);
        assertEquals(2, notes());
        assertEquals(before, now());
        Screen.clickAt(image, 3, 3, 0);
        assertEquals(0, notes());
        user.assertSame(image);
    }

    @Test
    void arrows_shiftTurnStretchAndTilt() {
        Roi selection = (Roi) image.getRoi().clone();
        key(KeyEvent.VK_RIGHT, 0);
        assertEquals(centre.x() + 1, now().camera().centre().x(), 1e-9);
        key(KeyEvent.VK_UP, InputEvent.SHIFT_DOWN_MASK);
        assertEquals(centre.y() - 0.1, now().camera().centre().y(), 1e-9);
        key(KeyEvent.VK_LEFT, InputEvent.CTRL_DOWN_MASK);
        assertEquals(TestPatterns.ROTATION + 0.5, Math.toDegrees(now().setting().rotation()), 1e-9);
        key(KeyEvent.VK_UP, InputEvent.CTRL_DOWN_MASK);
        assertEquals(1.002, now().camera().constant() / TestPatterns.CONSTANT, 1e-9);
        key(KeyEvent.VK_UP, InputEvent.ALT_DOWN_MASK);
        assertEquals(-0.1, Math.toDegrees(now().setting().leanY()), 1e-9);
        assertEquals(selection.getBounds(), image.getRoi().getBounds());
        assertFalse(History.of(image).isEmpty());
    }

    /** With another tool the arrows are ImageJ's: they move the selection. */
    @Test
    void arrows_anotherTool_areImageJs() {
        Toolbar.getInstance().setTool(Toolbar.OVAL);
        int x = image.getRoi().getBounds().x;
        key(KeyEvent.VK_RIGHT, 0);
        assertEquals(before, now());
        assertEquals(x + 1, image.getRoi().getBounds().x);
    }

    @Test
    void home_goesBackToTheFit() {
        MeasuredPattern measured = SpotFinder.measure(ImagePixels.of(image));
        Solution fit = Refinement.refine(measured, before).orElseThrow();
        Sitting.EMPTY.withMeasured(measured).withRefined(fit).show(image);
        Screen.drag(image, centre.x() + 80, centre.y(), centre.x(), centre.y() - 80);
        assertTrue(Sitting.of(image).chosen().isEmpty());
        key(KeyEvent.VK_HOME, 0);
        assertEquals(fit, Sitting.of(image).chosen().orElseThrow());
        assertEquals(fit.placement(), now());
    }

    private PlacedSpot spot() {
        return new io.github.zonewright.imagej.overlay.ComputedSpots()
                .on(before, TestPatterns.SIDE, TestPatterns.SIDE, 500).stream()
                        .filter(s -> s.position().distanceTo(centre) > 30)
                        .findFirst()
                        .orElseThrow();
    }

    private long notes() {
        List<Roi> all = Arrays.asList(image.getOverlay().toArray());
        return all.stream()
                .filter(roi -> "note".equals(roi.getProperty(PatternOverlay.PROPERTY)))
                .count();
    }

    private void key(int code, int modifiers) {
        Screen.press(image.getCanvas(), code, modifiers);
    }
}
