package io.github.zonewright.imagej.workbench;

import ij.IJ;
import ij.ImagePlus;
import ij.gui.ImageCanvas;
import ij.gui.ImageWindow;
import ij.gui.Toolbar;
import io.github.zonewright.imagej.session.PatternDrag;
import io.github.zonewright.imagej.session.PatternMove;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.pattern.Placement;
import java.awt.Component;
import java.awt.KeyEventDispatcher;
import java.awt.event.KeyEvent;
import java.util.Optional;

/**
 * The keys of the hand tool on an image window: arrows shift the pattern, with Ctrl they turn and stretch it, with Alt they
 * tilt the crystal, with Shift finely; Home goes back to the fit. While another tool is chosen, the hand takes spots or ruler,
 * or there is no pattern on the image, all keys are ImageJ's.
 */
final class HandKeys implements KeyEventDispatcher {
    @Override
    public boolean dispatchKeyEvent(KeyEvent event) {
        Optional<ImagePlus> image = image(event.getComponent());
        if (image.isEmpty() || !isOurs(event.getKeyCode()) || !isHandChosen()) {
            return false;
        }
        Sitting sitting = Sitting.of(image.get());
        if (sitting.placement().isEmpty()) {
            return false;
        }
        if (event.getID() == KeyEvent.KEY_PRESSED) {
            pressed(image.get(), sitting, event);
        }
        return true;
    }

    private static void pressed(ImagePlus image, Sitting sitting, KeyEvent event) {
        if (event.getKeyCode() == KeyEvent.VK_HOME) {
            goBack(image);
            return;
        }
        int right = side(event, KeyEvent.VK_RIGHT, KeyEvent.VK_LEFT);
        int up = side(event, KeyEvent.VK_UP, KeyEvent.VK_DOWN);
        PatternDrag drag = event.isControlDown() || event.isMetaDown()
                ? up == 0 ? PatternDrag.TURN : PatternDrag.STRETCH
                : event.isAltDown() ? PatternDrag.TILT : PatternDrag.SHIFT;
        Placement laid = sitting.placement().orElseThrow();
        try {
            PatternMove move = drag.step(laid, right, up, event.isShiftDown());
            Placement moved = move.on(laid);
            History.of(image).keepBefore(image, moved);
            sitting.withPlacement(moved).show(image);
            PatternHand.record(move);
            IJ.showStatus(drag.says(moved));
        } catch (IllegalArgumentException e) {
            IJ.showStatus(e.getMessage());
        }
    }

    /** Lays the fitted pattern over the image again, if there is one. */
    static void goBack(ImagePlus image) {
        Sitting sitting = Sitting.of(image);
        sitting.fit()
                .ifPresentOrElse(
                        fit -> {
                            History.of(image).keep(image);
                            sitting.withChosen(fit).show(image);
                            Recording.flag("Move Pattern...", "back");
                        },
                        () -> IJ.showStatus("There is no fit to go back to: find the orientation, or refine."));
    }

    private static int side(KeyEvent event, int plus, int minus) {
        return event.getKeyCode() == plus ? 1 : event.getKeyCode() == minus ? -1 : 0;
    }

    private static boolean isOurs(int code) {
        return switch (code) {
            case KeyEvent.VK_LEFT, KeyEvent.VK_RIGHT, KeyEvent.VK_UP, KeyEvent.VK_DOWN, KeyEvent.VK_HOME -> true;
            default -> false;
        };
    }

    private static boolean isHandChosen() {
        return HandTool.mode() == HandMode.PATTERN
                && Toolbar.getInstance() != null
                && HandTool.NAME.equals(Toolbar.getToolName());
    }

    /** The image whose canvas or window has the keys. */
    private static Optional<ImagePlus> image(Component component) {
        if (component instanceof ImageCanvas canvas) {
            return Optional.ofNullable(canvas.getImage());
        }
        return component instanceof ImageWindow window ? Optional.ofNullable(window.getImagePlus()) : Optional.empty();
    }
}
