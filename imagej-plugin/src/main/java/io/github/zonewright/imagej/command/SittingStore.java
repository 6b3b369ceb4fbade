package io.github.zonewright.imagej.command;

import ij.ImagePlus;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.overlay.PatternView;
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
        String state = System.identityHashCode(this) + "-" + count++;
        boolean marked = PatternOverlay.show(image, view, state);
        MarkRecord.keep(sitting, image);
        lastBySlice.put(PatternOverlay.slice(image), new Shown(sitting, state, marked));
        byState.put(state, sitting);
    }
}
