package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import java.util.ArrayDeque;
import java.util.Deque;
import java.util.Optional;

/** What the pattern on one image, or one slice, was before each change; kept with the image. */
final class History {
    private static final String KEY = "zonewright.history.";
    private static final int MOST = 200;

    private static final long RUN_NANOSECONDS = 1_500_000_000L;

    private final Deque<Sitting> before = new ArrayDeque<>();
    private String run = "";
    private long runAt;

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
        run = "";
        PatternOverlay.saveForUndo(image);
        before.push(Sitting.of(image));
        if (before.size() > MOST) {
            before.removeLast();
        }
    }

    /**
     * The same before a change by hand. Changes of one quantity in quick succession, as while a number is typed, are one
     * change to whoever takes it back.
     */
    void keepBefore(ImagePlus image, Placement next) {
        String quantity =
                Sitting.of(image).placement().map(now -> quantity(now, next)).orElse("new");
        long now = System.nanoTime();
        if (!quantity.equals(run) || now - runAt > RUN_NANOSECONDS) {
            keep(image);
        }
        run = quantity;
        runAt = now;
    }

    private static String quantity(Placement a, Placement b) {
        ZoneSetting from = a.setting();
        ZoneSetting to = b.setting();
        if (!from.zone().equals(to.zone()) || !from.reference().equals(to.reference())) {
            return "zone";
        }
        if (from.rotation() != to.rotation()) {
            return "rotation";
        }
        if (!from.equals(to)) {
            return "lean";
        }
        return a.camera().centre().equals(b.camera().centre()) ? "scale" : "centre";
    }

    /** Takes back the last change. */
    Optional<Sitting> back() {
        run = "";
        return Optional.ofNullable(before.poll());
    }

    boolean isEmpty() {
        return before.isEmpty();
    }
}
