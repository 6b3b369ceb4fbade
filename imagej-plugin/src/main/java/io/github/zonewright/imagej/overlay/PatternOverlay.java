package io.github.zonewright.imagej.overlay;

import ij.ImagePlus;
import ij.Undo;
import ij.gui.ImageCanvas;
import ij.gui.Overlay;
import ij.gui.Roi;
import java.awt.Rectangle;
import java.util.List;
import java.util.Optional;
import java.util.function.Predicate;

/**
 * Our marks in the overlay of an image: ordinary named ROIs which carry a property, by which they are found again, also
 * after the image was saved as TIFF and reopened. Elements without it are the user's; they keep their place and order.
 */
public final class PatternOverlay {
    /** Name of the ROI property that our marks carry; its value is the kind of mark. */
    public static final String PROPERTY = "zonewright";

    private static final String STATE = "zonewright-state";
    private static final String RECORD = "zonewright-record";

    private PatternOverlay() {}

    /**
     * What the marks of the current slice show.
     *
     * @param image the image
     * @return the name that {@link #show} was given; empty when there are no marks on this slice
     */
    public static Optional<String> state(ImagePlus image) {
        return property(image, STATE);
    }

    /**
     * Lets the marks of the current slice keep a text about the pattern they show, also in a TIFF file.
     *
     * @param image the image; nothing is kept when there are no marks on this slice
     * @param record the text, without line ends
     */
    public static void keep(ImagePlus image, String record) {
        mark(image, roi -> true).ifPresent(roi -> roi.setProperty(RECORD, record));
    }

    /**
     * What the marks of the current slice keep.
     *
     * @param image the image
     * @return the text that {@link #keep} was given; empty when there is none on this slice
     */
    public static Optional<String> record(ImagePlus image) {
        return property(image, RECORD);
    }

    /**
     * Whether indices are drawn on the current slice.
     *
     * @param image the image
     * @return true if one of our marks there is an index
     */
    public static boolean isLabelled(ImagePlus image) {
        return mark(image, roi -> MarkStyle.LABEL.key().equals(roi.getProperty(PROPERTY)))
                .isPresent();
    }

    private static Optional<String> property(ImagePlus image, String key) {
        return mark(image, roi -> roi.getProperty(key) != null).map(roi -> roi.getProperty(key));
    }

    /** The last drawn of our marks on this slice, other than those apart, for which something holds. */
    private static Optional<Roi> mark(ImagePlus image, Predicate<Roi> wanted) {
        Overlay overlay = image.getOverlay();
        int slice = slice(image);
        for (int i = overlay == null ? -1 : overlay.size() - 1; i >= 0; i--) {
            Roi roi = overlay.get(i);
            if (isOurs(roi) && !isApart(roi) && roi.getPosition() == slice && wanted.test(roi)) {
                return Optional.of(roi);
            }
        }
        return Optional.empty();
    }

    /**
     * Draws a view in place of what we drew on this slice before, sized for the present zoom, without
     * repainting more than the canvas.
     *
     * @param image the image
     * @param view what to draw
     * @param state a name for what is drawn, by which {@link #state} tells it after ImageJ's own undo
     * @return whether there was anything to draw
     */
    public static boolean show(ImagePlus image, PatternView view, String state) {
        ImageCanvas canvas = image.getCanvas();
        double zoom = canvas == null ? 1 : canvas.getMagnification();
        Rectangle seen = canvas == null
                ? new Rectangle(image.getWidth(), image.getHeight())
                : new Rectangle(canvas.getSrcRect());
        List<Roi> marks = Marks.of(view, image.getWidth(), image.getHeight(), zoom, seen);
        int slice = slice(image);
        for (Roi roi : marks) {
            roi.setPosition(slice);
            roi.setProperty(STATE, state);
        }
        replace(image, marks, roi -> roi.getPosition() == slice && !isApart(roi));
        return !marks.isEmpty();
    }

    /**
     * Draws a view while a drag goes on: on the screen at once where that is possible, one element of the overlay standing for
     * all marks, until {@link #show} draws them.
     *
     * @param image the image
     * @param view what to draw
     * @param state a name for what is drawn, as for {@link #show}
     * @return whether there was anything to draw
     */
    public static boolean sketch(ImagePlus image, PatternView view, String state) {
        ImageCanvas canvas = image.getCanvas();
        if (image.getHideOverlay() || !Sketch.isPossible(canvas, view)) {
            return show(image, view, state);
        }
        int slice = slice(image);
        SketchRoi sketch = mark(image, SketchRoi.class::isInstance)
                .map(SketchRoi.class::cast)
                .filter(roi -> roi.isOn(canvas))
                .orElseGet(() -> {
                    SketchRoi fresh = new SketchRoi(canvas, image.getWidth(), image.getHeight());
                    fresh.setPosition(slice);
                    replace(image, List.of(fresh), roi -> roi.getPosition() == slice && !isApart(roi));
                    return fresh;
                });
        sketch.setProperty(STATE, state);
        sketch.draw(view);
        return true;
    }

    /** Draws rings in place of the rings on this slice before; other marks stay. */
    static void showRings(ImagePlus image, List<Roi> rings) {
        int slice = slice(image);
        rings.forEach(roi -> roi.setPosition(slice));
        replace(image, rings, roi -> roi.getPosition() == slice && isRing(roi));
    }

    /** Draws a note in place of the note on this slice before; other marks stay. */
    static void showNote(ImagePlus image, List<Roi> note) {
        int slice = slice(image);
        note.forEach(roi -> roi.setPosition(slice));
        replace(image, note, roi -> roi.getPosition() == slice && isNote(roi));
    }

    /**
     * Takes our marks away from every slice.
     *
     * @param image the image
     */
    public static void clear(ImagePlus image) {
        replace(image, List.of(), roi -> true);
    }

    /**
     * Takes our marks, other than rings, away from one slice.
     *
     * @param image the image
     * @param slice the slice as {@link #slice} counts
     */
    public static void clear(ImagePlus image, int slice) {
        replace(image, List.of(), roi -> roi.getPosition() == slice && !isRing(roi));
    }

    /**
     * The slice whose marks are drawn now.
     *
     * @param image the image
     * @return the current slice of a stack, 0 for a single image
     */
    public static int slice(ImagePlus image) {
        return image.getStackSize() > 1 ? image.getCurrentSlice() : 0;
    }

    /**
     * Whether an overlay element is one of ours.
     *
     * @param roi the element
     * @return true if it carries our property
     */
    public static boolean isOurs(Roi roi) {
        return roi.getProperty(PROPERTY) != null;
    }

    /**
     * How many of our marks an image has, halos included.
     *
     * @param image the image
     * @return the number of elements that carry our property
     */
    public static int count(ImagePlus image) {
        Overlay overlay = image.getOverlay();
        int ours = 0;
        for (int i = 0; overlay != null && i < overlay.size(); i++) {
            ours += isOurs(overlay.get(i)) ? 1 : 0;
        }
        return ours;
    }

    /**
     * Lets Edit ▸ Undo bring back the overlay as it is now.
     *
     * @param image the image
     */
    public static void saveForUndo(ImagePlus image) {
        Undo.saveOverlay(image);
        Undo.setup(Undo.OVERLAY, image);
    }

    /** Whether a mark is drawn by itself and stays while a pattern's marks are drawn anew. */
    private static boolean isApart(Roi roi) {
        return isRing(roi) || MarkStyle.DOUBLED.key().equals(roi.getProperty(PROPERTY));
    }

    private static boolean isRing(Roi roi) {
        return MarkStyle.RING.key().equals(roi.getProperty(PROPERTY));
    }

    private static boolean isNote(Roi roi) {
        return MarkStyle.NOTE.key().equals(roi.getProperty(PROPERTY));
    }

    private static void replace(ImagePlus image, List<Roi> marks, Predicate<Roi> old) {
        Overlay overlay = image.getOverlay();
        if (overlay == null) {
            if (!marks.isEmpty()) {
                Overlay fresh = new Overlay();
                marks.forEach(fresh::add);
                image.setOverlay(fresh);
            }
            return;
        }
        Roi[] before = overlay.toArray();
        overlay.clear();
        for (Roi roi : before) {
            if (!isOurs(roi) || !old.test(roi)) {
                overlay.add(roi);
            }
        }
        marks.forEach(overlay::add);
        if (overlay.size() == 0) {
            image.setOverlay(null);
        }
        ImageCanvas canvas = image.getCanvas();
        if (canvas != null) {
            canvas.repaint();
        }
    }
}
