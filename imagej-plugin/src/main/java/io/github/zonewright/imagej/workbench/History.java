package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import io.github.zonewright.imagej.command.Sitting;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import java.util.ArrayDeque;
import java.util.Deque;
import java.util.Optional;

/** What the pattern on one image, or one slice, was before each change; kept with the image. */
final class History {
    private static final String KEY = "zonewright.history.";
    private static final int MOST = 200;

    private final Deque<Sitting> before = new ArrayDeque<>();

    private History() {}

    /** The history of an image's current slice. */
    static History of(ImagePlus image) {
        String key = KEY + PatternOverlay.slice(image);
        if (image.getProperty(key) instanceof History kept) {
            return kept;
        }
        History fresh = new History();
        image.setProperty(key, fresh);
        return fresh;
    }

    /** Keeps the present state, for undo here and in ImageJ's Edit menu. */
    void keep(ImagePlus image) {
        PatternOverlay.saveForUndo(image);
        before.push(Sitting.of(image));
        if (before.size() > MOST) {
            before.removeLast();
        }
    }

    /** Takes back the last change. */
    Optional<Sitting> back() {
        return Optional.ofNullable(before.poll());
    }

    boolean isEmpty() {
        return before.isEmpty();
    }
}
