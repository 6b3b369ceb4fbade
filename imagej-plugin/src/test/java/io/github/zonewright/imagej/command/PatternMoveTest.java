package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.session.PatternDrag;
import io.github.zonewright.imagej.session.PatternMove;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.pattern.LaueCircle;
import io.github.zonewright.pattern.Placement;
import org.junit.jupiter.api.Test;

/** The geometry of drags and arrow keys, against elementary plane geometry. */
class PatternMoveTest {
    private final Placement laid = TestPatterns.copper110();
    private final PixelPoint centre = laid.camera().centre();

    private PixelPoint away(double right, double up) {
        return new PixelPoint(centre.x() + right, centre.y() - up);
    }

    private Placement dragged(PatternDrag drag, PixelPoint from, PixelPoint to, boolean fine) {
        return drag.move(laid, from, to, fine).on(laid);
    }

    /** Twice as far from the centre is twice the camera constant; the sphere's curvature is below 1e-3 here. */
    @Test
    void stretch_followsTheDistance() {
        Placement p = dragged(PatternDrag.STRETCH, away(30, 40), away(60, 80), false);
        assertEquals(2, p.camera().constant() / TestPatterns.CONSTANT, 2e-3);
        assertEquals(laid.setting(), p.setting());
        assertEquals(centre, p.camera().centre());
    }

    @Test
    void fine_isATenthOfTheWay() {
        assertEquals(
                9, PatternDrag.TURN.move(laid, away(50, 0), away(0, 50), true).turn(), 1e-9);
        assertEquals(
                0.3,
                PatternDrag.SHIFT
                        .move(laid, away(5, 5), away(8, 5), true)
                        .shift()
                        .x(),
                1e-9);
    }

    /** What the hand holds follows it: the centre of the Laue circle, also where the image is mirrored. */
    @Test
    void tilt_carriesTheLaueCircle() {
        for (boolean mirrored : new boolean[] {false, true}) {
            Placement leaning = laid.withCamera(Camera.of(centre, TestPatterns.CONSTANT, mirrored))
                    .leanedBy(0.004, 0.002);
            PixelPoint before = LaueCircle.of(leaning).orElseThrow().centre();
            PatternMove move = PatternDrag.TILT.move(leaning, away(0, 0), away(12, -7), false);
            PixelPoint after = LaueCircle.of(move.on(leaning)).orElseThrow().centre();
            assertEquals(12, after.x() - before.x(), 0.1);
            assertEquals(7, after.y() - before.y(), 0.1);
        }
    }

    /** An arrow key moves on the screen as it points, on a mirrored image too. */
    @Test
    void step_goesAsTheArrowPoints() {
        for (boolean mirrored : new boolean[] {false, true}) {
            Placement leaning = laid.withCamera(Camera.of(centre, TestPatterns.CONSTANT, mirrored))
                    .leanedBy(0.004, 0.002);
            PixelPoint before = LaueCircle.of(leaning).orElseThrow().centre();
            Placement after = PatternDrag.TILT.step(leaning, 1, 0, false).on(leaning);
            assertTrue(LaueCircle.of(after).orElseThrow().centre().x() > before.x());
            after = PatternDrag.TILT.step(leaning, 0, 1, false).on(leaning);
            assertTrue(LaueCircle.of(after).orElseThrow().centre().y() < before.y());
        }
        assertEquals(-1, PatternDrag.SHIFT.step(laid, -1, 0, false).shift().x());
        assertEquals(0.5, PatternDrag.TURN.step(laid, -1, 0, false).turn());
        assertEquals(1.002, PatternDrag.STRETCH.step(laid, 0, 1, false).stretch());
    }

    @Test
    void upwards_letsTheReflectionPointUp() {
        Placement leaning = laid.leanedBy(0.03, -0.02);
        for (Hkl hkl : new Hkl[] {new Hkl(1, -1, 1), new Hkl(0, 0, 2), new Hkl(-2, 2, 0)}) {
            Placement up = PatternMove.upwards(leaning, hkl).on(leaning);
            Vector3 g = up.orientation().scatteringVector(up.crystal().lattice(), hkl);
            assertEquals(90, Math.toDegrees(new Vector2(g.x(), g.y()).azimuth()), 1e-6);
            assertEquals(leaning.setting().leanX(), up.setting().leanX());
        }
        String message = assertThrows(IllegalArgumentException.class, () -> PatternMove.upwards(laid, new Hkl(2, 2, 0)))
                .getMessage();
        assertTrue(message.contains("2 2 0") && message.contains("across the beam"), message);
    }

    @Test
    void between_findsTheChange() {
        PatternMove move = new PatternMove(3, 1.02, new Vector2(0.2, -0.1), new Vector2(4, 5));
        PatternMove found = PatternMove.between(laid, move.on(laid));
        assertEquals(3, found.turn(), 1e-9);
        assertEquals(1.02, found.stretch(), 1e-12);
        assertEquals(-0.1, found.lean().y(), 1e-12);
        assertEquals(5, found.shift().y(), 1e-12);
        assertEquals(PatternMove.NONE, PatternMove.between(laid, laid));
    }

    @Test
    void command_movesAndLeavesTheRest() {
        ImagePlus image = TestPatterns.imageOfUser();
        Sitting.EMPTY.withPlacement(laid).show(image);
        Fingerprint user = Fingerprint.of(image);
        MovePattern command = new MovePattern();
        CommandParameter.of(command).forEach(p -> p.fillImage(image));
        CommandParameter.of(command).stream()
                .filter(CommandParameter::isAsked)
                .forEach(p -> p.readMacro("turn=2 stretch=1 leanright=0.1 shiftdown=-3"));
        command.run();
        assertFalse(command.isCanceled(), command.getCancelReason());
        PatternMove found =
                PatternMove.between(laid, Sitting.of(image).placement().orElseThrow());
        assertEquals(2, found.turn(), 1e-9);
        assertEquals(1.01, found.stretch(), 1e-9);
        assertEquals(0.1, found.lean().x(), 1e-9);
        assertEquals(-3, found.shift().y(), 1e-9);
        user.assertSame(image);
    }

    @Test
    void command_nothingToGoBackTo_saysSo() {
        ImagePlus image = TestPatterns.imageOfUser();
        Sitting.EMPTY.withPlacement(laid).show(image);
        MovePattern command = new MovePattern();
        CommandParameter.of(command).forEach(p -> p.fillImage(image));
        CommandParameter.of(command).stream()
                .filter(p -> p.name().equals("back"))
                .forEach(p -> p.setText("true"));
        command.run();
        assertTrue(command.getCancelReason().contains("no fit"), command.getCancelReason());
    }
}
