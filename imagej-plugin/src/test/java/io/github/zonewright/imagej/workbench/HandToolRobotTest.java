package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.gui.ImageCanvas;
import ij.gui.Toolbar;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.pattern.Placement;
import java.awt.AWTException;
import java.awt.Point;
import java.awt.Robot;
import java.awt.event.InputEvent;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;

/** The tool under the real mouse. */
@Tag("window")
@Tag("robot")
class HandToolRobotTest {
    @AfterEach
    void close() {
        Toolbar.getInstance().setTool(Toolbar.RECTANGLE);
        Screen.clear();
    }

    @Test
    void realMouse_turnsThePatternAndLeavesTheSelection() throws AWTException {
        Screen.start();
        ImagePlus image = Screen.show(TestPatterns.imageOfUser());
        Screen.onEventThread(() -> {
            HandTool.pickUp();
            return null;
        });
        Placement before = TestPatterns.copper110();
        Sitting.EMPTY.withPlacement(before).show(image);
        image.getWindow().toFront();
        Screen.await(() -> image.getCanvas().isShowing());
        Fingerprint user = Fingerprint.of(image);
        PixelPoint centre = before.camera().centre();
        Robot robot = new Robot();
        robot.setAutoDelay(30);
        robot.setAutoWaitForIdle(true);
        move(robot, image, centre.x() + 80, centre.y());
        robot.mousePress(InputEvent.BUTTON1_DOWN_MASK);
        for (int i = 1; i <= 10; i++) {
            double angle = i * Math.PI / 20;
            move(robot, image, centre.x() + 80 * Math.cos(angle), centre.y() - 80 * Math.sin(angle));
        }
        robot.mouseRelease(InputEvent.BUTTON1_DOWN_MASK);
        Screen.await(() -> turn(image, before) > 80);
        assertEquals(90, turn(image, before), 3);
        user.assertSame(image);
        assertTrue(History.of(image).back().isPresent());
    }

    private static double turn(ImagePlus image, Placement before) {
        return Math.toDegrees(
                Sitting.of(image).placement().orElseThrow().setting().rotation()
                        - before.setting().rotation());
    }

    private static void move(Robot robot, ImagePlus image, double x, double y) {
        ImageCanvas canvas = image.getCanvas();
        Point corner = canvas.getLocationOnScreen();
        robot.mouseMove(corner.x + canvas.screenXD(x), corner.y + canvas.screenYD(y));
    }
}
