package io.github.zonewright.imagej.workbench;

import ij.ImageListener;
import ij.ImagePlus;
import ij.WindowManager;
import ij.gui.ImageCanvas;
import ij.gui.PlotWindow;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.overlay.ShownMarks;
import java.awt.Rectangle;
import java.util.Optional;
import java.util.function.Consumer;
import javax.swing.SwingUtilities;
import javax.swing.Timer;

/**
 * Tells which image is current, on the event thread, whenever that or its slice changes. ImageJ tells of images opened,
 * changed and closed, but not of a window that comes to the front, so a timer looks too. A plot is no pattern: while one is in
 * front, the image before it stays current.
 */
final class ImageFollower implements ImageListener {
    private static final int MILLISECONDS = 300;

    private final Consumer<Optional<ImagePlus>> onChange;
    private final Consumer<ImagePlus> onMarks;
    private final Consumer<ImagePlus> onZoom;
    private final Timer timer = new Timer(MILLISECONDS, e -> look());
    private Optional<ImagePlus> current = Optional.empty();
    private int slice;
    private double zoom = 1;
    private Rectangle seen = new Rectangle();
    private Optional<String> state = Optional.empty();

    /**
     * A follower.
     *
     * @param onChange is given the image that is current now
     * @param onMarks is given the current image when its marks are others, as after ImageJ's own undo
     * @param onZoom is given the current image when its zoom has changed, or the part of it that is seen
     *     while marks stand at the corners of that part
     */
    ImageFollower(Consumer<Optional<ImagePlus>> onChange, Consumer<ImagePlus> onMarks, Consumer<ImagePlus> onZoom) {
        this.onChange = onChange;
        this.onMarks = onMarks;
        this.onZoom = onZoom;
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
        if (now.isPresent() && now.get().getWindow() instanceof PlotWindow) {
            now = current();
        }
        int nowSlice = now.map(PatternOverlay::slice).orElse(0);
        boolean same = now.isPresent() == current.isPresent()
                && (now.isEmpty() || now.get() == current.get())
                && nowSlice == slice;
        if (!same) {
            current = now;
            slice = nowSlice;
            onChange.accept(now);
        }
        Optional<String> nowState = now.flatMap(PatternOverlay::state);
        if (!nowState.equals(state)) {
            state = nowState;
            now.ifPresent(onMarks);
        }
        Optional<ImageCanvas> canvas = now.map(ImagePlus::getCanvas);
        double nowZoom = canvas.map(ImageCanvas::getMagnification).orElse(zoom);
        Rectangle nowSeen =
                canvas.map(ImageCanvas::getSrcRect).map(Rectangle::new).orElse(seen);
        boolean moved =
                !nowSeen.equals(seen) && now.filter(ShownMarks::haveCorner).isPresent();
        seen = nowSeen;
        if (nowZoom != zoom || moved) {
            zoom = nowZoom;
            now.ifPresent(onZoom);
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
