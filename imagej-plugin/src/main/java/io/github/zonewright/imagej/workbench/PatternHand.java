package io.github.zonewright.imagej.workbench;

import ij.IJ;
import ij.ImagePlus;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.overlay.SpotNote;
import io.github.zonewright.imagej.session.Figures;
import io.github.zonewright.imagej.session.PatternDrag;
import io.github.zonewright.imagej.session.PatternMove;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.imagej.session.SpotReading;
import io.github.zonewright.pattern.Placement;
import java.awt.Cursor;
import java.awt.event.InputEvent;
import java.awt.event.MouseEvent;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;

/**
 * Turns the pattern about its centre, or moves it when taken there; with Ctrl (or Cmd) stretches it, with Alt tilts the
 * crystal, with Shift a tenth as far as the mouse. A click reads the spot beneath.
 */
final class PatternHand implements Hand {
    /** A press that moved less than so many screen px is a click. */
    private static final double CLICK = 3;

    private static final double PERCENT = 100;

    /** A drag: what it does, the pattern as it was, whether it has moved yet, and where the mouse was last, in image px. */
    private record Grip(ImagePlus image, PatternDrag drag, Placement before, boolean begun, PixelPoint last) {}

    private final PointerNote note = new PointerNote();
    private Optional<Grip> grip = Optional.empty();
    private String hinted = "";

    @Override
    public void press(ImagePlus image, PixelPoint at, MouseEvent event) {
        grip = Optional.empty();
        note.hide();
        Optional<Placement> laid = Sitting.of(image).placement();
        if (laid.isEmpty()) {
            IJ.showStatus("There is no pattern on this image yet: find an orientation or type a zone axis.");
            return;
        }
        grip = Optional.of(new Grip(image, drag(image, laid.get(), at, event), laid.get(), false, at));
    }

    @Override
    public void drag(ImagePlus image, PixelPoint at, MouseEvent event) {
        Optional<Placement> laid = Sitting.of(image).placement();
        if (grip.isEmpty() || grip.get().image() != image || laid.isEmpty()) {
            return;
        }
        Grip held = grip.get();
        if (!held.begun()) {
            if (isClick(held, at)) {
                return;
            }
            History.of(image).keep(image);
        }
        try {
            Placement moved = held.drag()
                    .move(laid.get(), held.last(), at, event.isShiftDown())
                    .on(laid.get());
            Sitting.of(image).withPlacement(moved).sketch(image);
            grip = Optional.of(new Grip(image, held.drag(), held.before(), true, at));
            note.show(held.drag().says(moved), event);
        } catch (IllegalArgumentException e) {
            note.show(e.getMessage(), event);
        }
    }

    @Override
    public void release(ImagePlus image, PixelPoint at, MouseEvent event) {
        Optional<Grip> held = grip.filter(g -> g.image() == image);
        grip = Optional.empty();
        note.hide();
        if (held.isEmpty()) {
            return;
        }
        if (!held.get().begun()) {
            read(image, at);
            return;
        }
        Sitting now = Sitting.of(image);
        now.show(image);
        now.placement().ifPresent(laid -> {
            IJ.showStatus(held.get().drag().says(laid));
            record(PatternMove.between(held.get().before(), laid));
        });
    }

    @Override
    public Integer cursor(ImagePlus image, PixelPoint at, MouseEvent event) {
        Optional<Placement> laid = Sitting.of(image).placement();
        if (laid.isEmpty()) {
            return null;
        }
        PatternDrag drag = drag(image, laid.get(), at, event);
        String hint = hint(drag);
        if (!hint.equals(hinted)) {
            hinted = hint;
            note.show(hint, event);
        }
        return switch (drag) {
            case SHIFT -> Cursor.MOVE_CURSOR;
            case TURN -> Cursor.HAND_CURSOR;
            case STRETCH -> Cursor.NE_RESIZE_CURSOR;
            case TILT -> Cursor.N_RESIZE_CURSOR;
        };
    }

    @Override
    public void leave() {
        note.hide();
        hinted = "";
    }

    /** Writes a change into ImageJ's recorder. */
    static void record(PatternMove move) {
        List<Recording.Option> options = new ArrayList<>();
        option(options, "turn", move.turn());
        option(options, "stretch", PERCENT * (move.stretch() - 1));
        option(options, "leanright", move.lean().x());
        option(options, "leanup", move.lean().y());
        option(options, "shiftright", move.shift().x());
        option(options, "shiftdown", move.shift().y());
        Recording.of("Move Pattern...", options);
    }

    private static void option(List<Recording.Option> options, String name, double value) {
        String text = String.format(Locale.ROOT, "%.5f", value);
        if (!text.matches("-?0\\.0+")) {
            options.add(new Recording.Option(name, text));
        }
    }

    private static void read(ImagePlus image, PixelPoint at) {
        double reach = HandTool.GRIP / image.getCanvas().getMagnification();
        Optional<SpotNote> spot = SpotReading.at(image, at, reach);
        spot.ifPresentOrElse(found -> found.show(image), () -> SpotNote.clear(image));
        IJ.showStatus(spot.map(SpotNote::text).orElse(Figures.place(at.x()) + ", " + Figures.place(at.y()) + " px"));
    }

    private static String hint(PatternDrag drag) {
        return switch (drag) {
            case SHIFT -> "Drag shifts the pattern · Shift: finely";
            case TURN -> "Drag turns · Ctrl: stretches · Alt: tilts · Shift: finely · Click reads a spot";
            case STRETCH -> "Drag stretches the scale · Shift: finely";
            case TILT -> "Drag tilts the crystal, as if by the centre of the Laue circle · Shift: finely";
        };
    }

    private static PatternDrag drag(ImagePlus image, Placement laid, PixelPoint at, InputEvent event) {
        if (event.isControlDown() || event.isMetaDown()) {
            return PatternDrag.STRETCH;
        }
        if (event.isAltDown()) {
            return PatternDrag.TILT;
        }
        double zoom = image.getCanvas().getMagnification();
        return laid.camera().centre().distanceTo(at) * zoom < HandTool.GRIP ? PatternDrag.SHIFT : HandTool.drag();
    }

    private static boolean isClick(Grip held, PixelPoint at) {
        return held.last().distanceTo(at) * held.image().getCanvas().getMagnification() < CLICK;
    }
}
