package io.github.zonewright.imagej.bridge;

import ij.ImagePlus;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.indexing.FrameSource;
import java.io.IOException;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.ConcurrentHashMap;

/** Frames that are images of ImageJ; each is read when it is wanted and not before. */
public abstract class ImageFrames implements FrameSource {
    private final Map<Integer, ImagePlus> read = new ConcurrentHashMap<>();
    private volatile boolean keeping;

    /** For the kinds of frames there are. */
    protected ImageFrames() {}

    /**
     * Opens a frame.
     *
     * @param index the frame, from 0
     * @return the frame as an image of its own, without a window
     * @throws IOException if it can't be read; the message says why
     */
    protected abstract ImagePlus open(int index) throws IOException;

    /**
     * The number by which a person knows a frame.
     *
     * @param index the frame, from 0
     * @return the slice of a stack, the place of a file
     */
    public abstract int number(int index);

    @Override
    public final GrayImage read(int index) throws IOException {
        ImagePlus frame = open(index);
        if (keeping) {
            read.put(index, frame);
        }
        return ImagePixels.of(frame);
    }

    /** Keeps from now on each frame that is read until it is taken. */
    public void keep() {
        keeping = true;
    }

    /**
     * Takes a frame that was read, and forgets it.
     *
     * @param index the frame, from 0
     * @return the frame; empty when it was not read or not kept
     */
    public Optional<ImagePlus> take(int index) {
        return Optional.ofNullable(read.remove(index));
    }
}
