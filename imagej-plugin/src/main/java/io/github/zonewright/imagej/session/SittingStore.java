package io.github.zonewright.imagej.session;

import ij.ImagePlus;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.overlay.PatternView;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Optional;

/**
 * The sittings of one image. The marks in the overlay carry the name of the sitting that they show: when ImageJ's undo
 * brings back marks of before, or a person takes ours away, the sitting goes with them. The marks carry the pattern's record
 * too, so that a TIFF file with them, opened again, or a copy of the image, is known as well. When the image changes its size,
 * what was known of its places holds no longer.
 */
final class SittingStore {
    private static final String KEY = "zonewright.sittings";
    private static final int MOST = 300;

    /** A sitting as it was shown. */
    private record Shown(Sitting sitting, String state, boolean marked) {}

    private final int width;
    private final int height;
    private final Map<Integer, Shown> lastBySlice = new LinkedHashMap<>();
    private final Map<String, Sitting> byState = new LinkedHashMap<>() {
        private static final long serialVersionUID = 1L;

        @Override
        protected boolean removeEldestEntry(Map.Entry<String, Sitting> eldest) {
            return size() > MOST;
        }
    };
    private final Map<Integer, Sitting> unseen = new HashMap<>();
    private int count;

    private SittingStore(int width, int height) {
        this.width = width;
        this.height = height;
    }

    /** The store of an image; a fresh one for a new image, and for one that was cropped or scaled. */
    static SittingStore of(ImagePlus image) {
        if (image.getProperty(KEY) instanceof SittingStore kept
                && kept.width == image.getWidth()
                && kept.height == image.getHeight()) {
            return kept;
        }
        SittingStore fresh = new SittingStore(image.getWidth(), image.getHeight());
        image.setProperty(KEY, fresh);
        return fresh;
    }

    /** What the current slice shows now. */
    synchronized Sitting current(ImagePlus image) {
        Sitting kept = unseen.get(PatternOverlay.slice(image));
        if (kept != null) {
            return kept;
        }
        Shown last = lastBySlice.get(PatternOverlay.slice(image));
        Optional<String> state = PatternOverlay.state(image);
        if (state.isEmpty()) {
            return last == null || last.marked ? Sitting.EMPTY : last.sitting;
        }
        if (last != null && last.state.equals(state.get())) {
            return last.sitting;
        }
        return byState.computeIfAbsent(
                state.get(), s -> MarkRecord.sitting(image).orElse(Sitting.EMPTY));
    }

    /** Keeps a sitting as what the current slice shows, and draws it. */
    synchronized void show(ImagePlus image, Sitting sitting, PatternView view) {
        String state = nextState();
        keep(image, sitting, state, PatternOverlay.show(image, view, state));
        MarkRecord.keep(sitting, image);
    }

    /** The same while a drag goes on: no marks yet and no record, which takes longer to write than the marks to draw. */
    synchronized void sketch(ImagePlus image, Sitting sitting, PatternView view) {
        String state = nextState();
        keep(image, sitting, state, PatternOverlay.sketch(image, view, state));
    }

    private String nextState() {
        return System.identityHashCode(this) + "-" + count++;
    }

    private void keep(ImagePlus image, Sitting sitting, String state, boolean marked) {
        unseen.remove(PatternOverlay.slice(image));
        lastBySlice.put(PatternOverlay.slice(image), new Shown(sitting, state, marked));
        byState.put(state, sitting);
    }

    /** Keeps a sitting for a slice without drawing it; what the slice showed before goes. */
    synchronized void keep(ImagePlus image, int slice, Sitting sitting) {
        PatternOverlay.clear(image, slice);
        lastBySlice.remove(slice);
        unseen.put(slice, sitting);
    }

    /** Whether the current slice has a sitting that was never drawn. */
    synchronized boolean isUnseen(ImagePlus image) {
        return unseen.containsKey(PatternOverlay.slice(image));
    }

    /** Forgets all sittings that were never drawn. */
    synchronized void forgetUnseen() {
        unseen.clear();
    }

    /** Takes the marks of a slice away and keeps its sitting, if they still show what the slice was given last. */
    synchronized void forgetMarks(ImagePlus image, int slice, Sitting drawn) {
        Shown last = lastBySlice.get(slice);
        if (last != null && last.sitting == drawn && last.marked) {
            keep(image, slice, drawn);
        }
    }
}
