package io.github.zonewright.imagej.workbench;

import ij.ImageListener;
import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import java.util.Optional;
import java.util.function.Consumer;
import javax.swing.SwingUtilities;
import javax.swing.Timer;

/**
 * Tells which image is current, on the event thread, whenever that or its slice changes. ImageJ tells of images opened,
 * changed and closed, but not of a window that comes to the front, so a timer looks too.
 */
final class ImageFollower implements ImageListener {
    private static final int MILLISECONDS = 300;

    private final Consumer<Optional<ImagePlus>> onChange;
    private final Timer timer = new Timer(MILLISECONDS, e -> look());
    private Optional<ImagePlus> current = Optional.empty();
    private int slice;

    ImageFollower(Consumer<Optional<ImagePlus>> onChange) {
        this.onChange = onChange;
    }

    void start() {
        ImagePlus.addImageListener(this);
        timer.start();
        look();
    }

    void end() {
        timer.stop();
        ImagePlus.removeImageListener(this);
    }

    /** The current image, as long as its window is open. */
    Optional<ImagePlus> current() {
        return current.filter(image -> image.getWindow() != null);
    }

    private void look() {
        Optional<ImagePlus> now =
                Optional.ofNullable(WindowManager.getCurrentImage()).filter(image -> image.getWindow() != null);
        int nowSlice = now.map(PatternOverlay::slice).orElse(0);
        boolean same = now.isPresent() == current.isPresent()
                && (now.isEmpty() || now.get() == current.get())
                && nowSlice == slice;
        if (!same) {
            current = now;
            slice = nowSlice;
            onChange.accept(now);
        }
    }

    @Override
    public void imageOpened(ImagePlus image) {
        SwingUtilities.invokeLater(this::look);
    }

    @Override
    public void imageClosed(ImagePlus image) {
        SwingUtilities.invokeLater(this::look);
    }

    @Override
    public void imageUpdated(ImagePlus image) {
        SwingUtilities.invokeLater(this::look);
    }
}
