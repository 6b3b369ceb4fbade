package io.github.zonewright.imagej.session;

import ij.ImageListener;
import ij.ImagePlus;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import java.awt.EventQueue;
import java.lang.reflect.InvocationTargetException;
import java.util.LinkedHashMap;
import java.util.Map;

/**
 * Keeps a sitting for each slice of a stack, thousands of them, and draws one when its slice is seen. No more than a few
 * hundred slices carry marks at a time; those seen longest ago lose them until they are seen again.
 */
public final class SliceMarks implements ImageListener {
    private static final String KEY = "zonewright.slices";
    private static final int MOST_MARKED = 200;

    private final ImagePlus image;
    private final Map<Integer, Sitting> marked = new LinkedHashMap<>(16, 0.75f, true);

    private SliceMarks(ImagePlus image) {
        this.image = image;
    }

    /**
     * That of an image; as long as the image has a window, it follows its slices.
     *
     * @param image the image
     * @return the one that the image has, or else a fresh one
     */
    public static SliceMarks of(ImagePlus image) {
        SliceMarks marks = image.getProperty(KEY) instanceof SliceMarks there ? there : new SliceMarks(image);
        image.setProperty(KEY, marks);
        ImagePlus.removeImageListener(marks);
        if (image.getWindow() != null) {
            ImagePlus.addImageListener(marks);
        }
        return marks;
    }

    /**
     * Keeps a sitting for a slice in place of what it showed, and draws it if it is the current one.
     *
     * @param slice the slice, from 1
     * @param sitting what is known of it
     */
    public void keep(int slice, Sitting sitting) {
        onEventThread(() -> {
            SittingStore.of(image).keep(image, slice, sitting);
            marked.remove(slice);
            draw();
        });
    }

    /**
     * Forgets the sittings of slices that were never seen.
     *
     * @param image the image
     */
    public static void forget(ImagePlus image) {
        SittingStore.of(image).forgetUnseen();
    }

    private void draw() {
        int slice = PatternOverlay.slice(image);
        if (!SittingStore.of(image).isUnseen(image)) {
            marked.get(slice);
            return;
        }
        Sitting sitting = Sitting.of(image);
        sitting.show(image);
        marked.put(slice, sitting);
        if (marked.size() > MOST_MARKED) {
            Map.Entry<Integer, Sitting> eldest = marked.entrySet().iterator().next();
            marked.remove(eldest.getKey());
            SittingStore.of(image).forgetMarks(image, eldest.getKey(), eldest.getValue());
        }
    }

    /** The overlay belongs to the event thread while a window shows it. */
    private void onEventThread(Runnable work) {
        if (image.getWindow() == null || EventQueue.isDispatchThread()) {
            work.run();
            return;
        }
        try {
            EventQueue.invokeAndWait(work);
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
        } catch (InvocationTargetException e) {
            throw new IllegalStateException(e.getCause());
        }
    }

    @Override
    public void imageOpened(ImagePlus opened) {
        // Nothing of it is kept here.
    }

    @Override
    public void imageUpdated(ImagePlus updated) {
        if (updated == image) {
            onEventThread(this::draw);
        }
    }

    @Override
    public void imageClosed(ImagePlus closed) {
        if (closed == image) {
            ImagePlus.removeImageListener(this);
        }
    }
}
