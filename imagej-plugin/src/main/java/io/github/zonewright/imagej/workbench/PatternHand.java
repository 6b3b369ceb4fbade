package io.github.zonewright.imagej.workbench;

import ij.IJ;
import ij.ImagePlus;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.command.Sitting;
import io.github.zonewright.pattern.Placement;
import java.awt.Cursor;
import java.awt.event.MouseEvent;
import java.util.Optional;

/** Turns the pattern about its centre, or moves it when taken there; with Shift a tenth as far as the mouse. */
final class PatternHand implements Hand {
    private static final double FINE = 0.1;

    /** A drag: what it holds, whether it has moved yet, and where the mouse was last, in image px. */
    private record Grip(ImagePlus image, boolean moves, boolean begun, PixelPoint last) {}

    private Optional<Grip> grip = Optional.empty();

    @Override
    public void press(ImagePlus image, PixelPoint at, MouseEvent event) {
        grip = Optional.empty();
        Optional<Placement> laid = Sitting.of(image).placement();
        if (laid.isEmpty()) {
            IJ.showStatus("There is no pattern on this image yet: find an orientation or type a zone axis.");
            return;
        }
        grip = Optional.of(new Grip(image, isAtCentre(image, laid.get(), at), false, at));
    }

    @Override
    public void drag(ImagePlus image, PixelPoint at, MouseEvent event) {
        Optional<Placement> laid = Sitting.of(image).placement();
        if (grip.isEmpty() || grip.get().image() != image || laid.isEmpty()) {
            return;
        }
        if (!grip.get().begun()) {
            History.of(image).keep(image);
        }
        double part = event.isShiftDown() ? FINE : 1;
        Placement moved = grip.get().moves() ? moved(laid.get(), at, part) : turned(laid.get(), at, part);
        Sitting.of(image).withPlacement(moved).show(image);
        grip = Optional.of(new Grip(image, grip.get().moves(), true, at));
        IJ.showStatus(says(moved, grip.get().moves()));
    }

    @Override
    public void release(ImagePlus image, PixelPoint at, MouseEvent event) {
        grip = Optional.empty();
    }

    @Override
    public Integer cursor(ImagePlus image, PixelPoint at) {
        return Sitting.of(image)
                .placement()
                .map(p -> isAtCentre(image, p, at) ? Cursor.MOVE_CURSOR : Cursor.HAND_CURSOR)
                .orElse(null);
    }

    private Placement turned(Placement laid, PixelPoint at, double part) {
        double wavelength = laid.beam().wavelength();
        Vector2 from = laid.camera().toReciprocal(grip.get().last(), wavelength);
        Vector2 to = laid.camera().toReciprocal(at, wavelength);
        if (from.norm() == 0 || to.norm() == 0) {
            return laid;
        }
        double angle = Math.IEEEremainder(to.azimuth() - from.azimuth(), 2 * Math.PI);
        return laid.turnedBy(part * angle);
    }

    private Placement moved(Placement laid, PixelPoint at, double part) {
        PixelPoint centre = laid.camera().centre();
        PixelPoint last = grip.get().last();
        return laid.centredAt(
                new PixelPoint(centre.x() + part * (at.x() - last.x()), centre.y() + part * (at.y() - last.y())));
    }

    private static String says(Placement laid, boolean moves) {
        PixelPoint centre = laid.camera().centre();
        return moves
                ? "Centre " + Reading.fixed(centre.x(), 2) + ", " + Reading.fixed(centre.y(), 2) + " px"
                : "Rotation " + Reading.fixed(Math.toDegrees(laid.setting().rotation()), 2) + "°";
    }

    private static boolean isAtCentre(ImagePlus image, Placement laid, PixelPoint at) {
        double zoom = image.getCanvas().getMagnification();
        return laid.camera().centre().distanceTo(at) * zoom < HandTool.GRIP;
    }
}
