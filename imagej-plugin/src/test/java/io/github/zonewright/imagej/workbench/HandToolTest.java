package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.gui.Toolbar;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.pattern.Placement;
import java.awt.event.InputEvent;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;

/** The tool on the canvas of a real ImageJ, with events as the system sends them. */
@Tag("window")
class HandToolTest {
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
        Toolbar.getInstance().setTool(Toolbar.RECTANGLE);
        Screen.clear();
    }

    @Test
    void pickUp_selectsTheTool() {
        assertEquals(HandTool.NAME, Toolbar.getToolName());
    }

    /** From straight right of the centre to straight above it is a quarter turn counter-clockwise. */
    @Test
    void drag_turnsAboutTheCentre() {
        Fingerprint user = Fingerprint.of(image);
        Screen.drag(image, centre.x() + 80, centre.y(), centre.x(), centre.y() - 80);
        Placement turned = Sitting.of(image).placement().orElseThrow();
        double turn =
                Math.toDegrees(turned.setting().rotation() - before.setting().rotation());
        assertEquals(90, turn, 1);
        assertEquals(before.camera(), turned.camera());
        user.assertSame(image);
    }

    /** On a mirrored image X points left, so that the same drag turns the other way. */
    @Test
    void drag_mirrored_turnsTheOtherWay() {
        Camera mirrored = Camera.of(centre, TestPatterns.CONSTANT, true);
        Sitting.EMPTY.withPlacement(before.withCamera(mirrored)).show(image);
        Screen.drag(image, centre.x() + 80, centre.y(), centre.x(), centre.y() - 80);
        Placement turned = Sitting.of(image).placement().orElseThrow();
        double turn =
                Math.toDegrees(turned.setting().rotation() - before.setting().rotation());
        assertEquals(-90, turn, 1);
    }

    @Test
    void dragAtTheCentre_moves() {
        Fingerprint user = Fingerprint.of(image);
        Screen.drag(image, centre.x(), centre.y(), centre.x() + 20, centre.y() - 10);
        Placement moved = Sitting.of(image).placement().orElseThrow();
        assertEquals(centre.x() + 20, moved.camera().centre().x(), 1);
        assertEquals(centre.y() - 10, moved.camera().centre().y(), 1);
        assertEquals(before.setting(), moved.setting());
        user.assertSame(image);
    }

    @Test
    void drag_zoomedOut_isInImagePixels() {
        image.getCanvas().zoomOut(0, 0);
        Screen.settle();
        Screen.drag(image, centre.x(), centre.y(), centre.x() + 20, centre.y());
        Placement moved = Sitting.of(image).placement().orElseThrow();
        assertEquals(centre.x() + 20, moved.camera().centre().x(), 2.5);
    }

    @Test
    void drag_canBeTakenBack() {
        Screen.drag(image, centre.x() + 80, centre.y(), centre.x(), centre.y() - 80);
        Sitting kept = Screen.onEventThread(() -> History.of(image).back().orElseThrow());
        assertEquals(before, kept.placement().orElseThrow());
        assertTrue(History.of(image).isEmpty());
    }

    @Test
    void drag_withoutPattern_doesNothing() {
        Sitting.EMPTY.show(image);
        Fingerprint user = Fingerprint.of(image);
        Screen.drag(image, 100, 100, 150, 150);
        user.assertSame(image);
        assertEquals(0, PatternOverlay.count(image));
    }

    /** ImageJ itself makes the overlay element under an Alt-click the selection; not while this tool is in hand. */
    @Test
    void altClick_onAnOverlayElement_selectsNothing() {
        image.deleteRoi();
        Fingerprint user = Fingerprint.of(image);
        Screen.clickAt(image, 103, 103, InputEvent.ALT_DOWN_MASK);
        user.assertSame(image);
        assertTrue(image.getOverlay().isSelectable());
    }

    @Test
    void releaseWithoutPress_isHarmless() {
        HandTool tool = new HandTool();
        var event = new java.awt.event.MouseEvent(
                image.getCanvas(), java.awt.event.MouseEvent.MOUSE_RELEASED, 0, 0, 5, 5, 1, false);
        tool.mouseReleased(image, event);
        tool.mouseDragged(image, event);
        assertEquals(before, Sitting.of(image).placement().orElseThrow());
    }
}
