package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import ij.gui.ImageCanvas;
import ij.gui.Overlay;
import ij.gui.Toolbar;
import ij.plugin.tool.PlugInTool;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.session.PatternDrag;
import java.awt.Cursor;
import java.awt.KeyboardFocusManager;
import java.awt.event.MouseEvent;
import java.util.Optional;

/**
 * Takes what is drawn on the image by hand: the computed pattern, the measured spots or a ruler. The events are consumed, so
 * that the user's selection stays as it is.
 */
public final class HandTool extends PlugInTool {
    static final String NAME = "Zonewright Pattern Hand Tool";

    /** Within so many screen px of a centre or spot a press takes hold of it. */
    static final double GRIP = 14;

    private static final PatternHand PATTERN = new PatternHand();
    private static final SpotsHand SPOTS = new SpotsHand();
    private static final RulerHand RULER = new RulerHand();
    private static final HandKeys KEYS = new HandKeys();

    private static HandTool tool;
    private static HandMode mode = HandMode.PATTERN;
    private static PatternDrag drag = PatternDrag.TURN;

    private Optional<Overlay> guarded = Optional.empty();

    /** For ImageJ. */
    public HandTool() {}

    /**
     * Keeps ImageJ from making the overlay element under the pointer the selection, as it does when a click with Alt or Ctrl
     * is released, before it asks the tool.
     */
    private void guard(ImagePlus image) {
        guarded = Optional.ofNullable(image.getOverlay()).filter(Overlay::isSelectable);
        guarded.ifPresent(overlay -> overlay.selectable(false));
    }

    private void free() {
        guarded.ifPresent(overlay -> overlay.selectable(true));
        guarded = Optional.empty();
    }

    /** Puts the tool into the toolbar, once, and selects it. */
    public static void pickUp() {
        if (Toolbar.getInstance() == null) {
            return;
        }
        if (tool == null || Toolbar.getInstance().getToolId(NAME) < 0) {
            tool = new HandTool();
            Toolbar.addPlugInTool(tool);
            KeyboardFocusManager.getCurrentKeyboardFocusManager().removeKeyEventDispatcher(KEYS);
            KeyboardFocusManager.getCurrentKeyboardFocusManager().addKeyEventDispatcher(KEYS);
        }
        Toolbar.getInstance().setTool(NAME);
    }

    /** Chooses what the tool takes hold of. */
    static void use(HandMode chosen) {
        mode = chosen;
    }

    /** What the tool takes hold of. */
    static HandMode mode() {
        return mode;
    }

    /** Chooses what a drag of the pattern does, away from its centre and without Ctrl or Alt. */
    static void use(PatternDrag chosen) {
        drag = chosen;
    }

    /** What a drag of the pattern does. */
    static PatternDrag drag() {
        return drag;
    }

    /** The hand that lays the ruler. */
    static RulerHand ruler() {
        return RULER;
    }

    @Override
    public void mousePressed(ImagePlus image, MouseEvent event) {
        event.consume();
        free();
        hand().press(image, place(image, event), event);
        guard(image);
    }

    @Override
    public void mouseDragged(ImagePlus image, MouseEvent event) {
        event.consume();
        hand().drag(image, place(image, event), event);
    }

    @Override
    public void mouseReleased(ImagePlus image, MouseEvent event) {
        event.consume();
        hand().release(image, place(image, event), event);
        free();
    }

    @Override
    public void mouseMoved(ImagePlus image, MouseEvent event) {
        free();
        ImageCanvas canvas = image.getCanvas();
        Integer cursor = canvas == null ? null : hand().cursor(image, place(image, event), event);
        if (cursor != null) {
            canvas.setCursor(Cursor.getPredefinedCursor(cursor));
            event.consume();
        }
    }

    @Override
    public void mouseExited(ImagePlus image, MouseEvent event) {
        hand().leave();
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

    private static Hand hand() {
        return switch (mode) {
            case PATTERN -> PATTERN;
            case SPOTS -> SPOTS;
            case RULER -> RULER;
        };
    }

    private static PixelPoint place(ImagePlus image, MouseEvent event) {
        ImageCanvas canvas = image.getCanvas();
        return new PixelPoint(canvas.offScreenXD(event.getX()), canvas.offScreenYD(event.getY()));
    }
}
