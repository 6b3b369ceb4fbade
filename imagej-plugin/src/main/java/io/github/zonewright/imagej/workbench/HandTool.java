package io.github.zonewright.imagej.workbench;

import ij.IJ;
import ij.ImagePlus;
import ij.gui.ImageCanvas;
import ij.gui.Toolbar;
import ij.plugin.tool.PlugInTool;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.command.Sitting;
import io.github.zonewright.pattern.Placement;
import java.awt.Cursor;
import java.awt.event.MouseEvent;
import java.util.Optional;

/**
 * Takes the computed pattern by hand: dragging turns it about its centre, dragging at the centre moves it. With Shift the
 * pattern moves a tenth as far as the mouse. The events are consumed, so that the user's selection stays as it is.
 */
public final class HandTool extends PlugInTool {
    static final String NAME = "Zonewright Pattern Hand Tool";

    /** Within so many screen px of the centre a drag moves the pattern. */
    private static final double GRIP = 14;

    private static final double FINE = 0.1;

    private static HandTool tool;

    /** A drag: what it holds, whether it has moved yet, and where the mouse was last, in image px. */
    private record Grip(ImagePlus image, boolean moves, boolean begun, PixelPoint last) {}

    private Optional<Grip> grip = Optional.empty();

    /** For ImageJ. */
    public HandTool() {}

    /** Puts the tool into the toolbar, once, and selects it. */
    public static void pickUp() {
        if (Toolbar.getInstance() == null) {
            return;
        }
        if (tool == null || Toolbar.getInstance().getToolId(NAME) < 0) {
            tool = new HandTool();
            Toolbar.addPlugInTool(tool);
        }
        Toolbar.getInstance().setTool(NAME);
    }

    @Override
    public void mousePressed(ImagePlus image, MouseEvent event) {
        event.consume();
        grip = Optional.empty();
        Optional<Placement> laid = Sitting.of(image).placement();
        if (laid.isEmpty()) {
            IJ.showStatus("There is no pattern on this image yet: find an orientation or type a zone axis.");
            return;
        }
        PixelPoint at = place(image, event);
        grip = Optional.of(new Grip(image, isAtCentre(image, laid.get(), at), false, at));
    }

    @Override
    public void mouseDragged(ImagePlus image, MouseEvent event) {
        event.consume();
        Optional<Placement> laid = Sitting.of(image).placement();
        if (grip.isEmpty() || grip.get().image() != image || laid.isEmpty()) {
            return;
        }
        if (!grip.get().begun()) {
            History.of(image).keep(image);
        }
        PixelPoint at = place(image, event);
        double part = event.isShiftDown() ? FINE : 1;
        Placement moved = grip.get().moves() ? moved(laid.get(), at, part) : turned(laid.get(), at, part);
        Sitting.of(image).withPlacement(moved).show(image);
        grip = Optional.of(new Grip(image, grip.get().moves(), true, at));
        IJ.showStatus(says(moved, grip.get().moves()));
    }

    @Override
    public void mouseReleased(ImagePlus image, MouseEvent event) {
        event.consume();
        grip = Optional.empty();
    }

    @Override
    public void mouseMoved(ImagePlus image, MouseEvent event) {
        Optional<Placement> laid = Sitting.of(image).placement();
        ImageCanvas canvas = image.getCanvas();
        if (laid.isPresent() && canvas != null) {
            boolean moves = isAtCentre(image, laid.get(), place(image, event));
            canvas.setCursor(Cursor.getPredefinedCursor(moves ? Cursor.MOVE_CURSOR : Cursor.HAND_CURSOR));
            event.consume();
        }
    }

    @Override
    public String getToolName() {
        return NAME;
    }

    /** Spots about a centre, and the arrow of a turn. */
    @Override
    public String getToolIcon() {
        return "C037V7733V1933Vd533V4133Va b33C000L0c0fL0f3fLdcdfLdfafP2d5fa fdd0".replace(" ", "");
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
        return laid.camera().centre().distanceTo(at) * zoom < GRIP;
    }

    private static PixelPoint place(ImagePlus image, MouseEvent event) {
        ImageCanvas canvas = image.getCanvas();
        return new PixelPoint(canvas.offScreenXD(event.getX()), canvas.offScreenYD(event.getY()));
    }
}
