package io.github.zonewright.indexing;

import io.github.zonewright.image.GrayImage;
import java.io.IOException;

/**
 * Where the patterns of a series come from: the slices of a stack, the files of a folder. A series reads one frame at a time
 * and never two at once, though from several threads one after the other.
 */
public interface FrameSource {

    /**
     * The number of frames.
     *
     * @return how many there are, 0 or more
     */
    int size();

    /**
     * What a person calls a frame.
     *
     * @param index the frame, from 0
     * @return a slice's label, a file's name
     */
    String label(int index);

    /**
     * Reads a frame.
     *
     * @param index the frame, from 0
     * @return its pixels
     * @throws IOException if it can't be read; the message says why
     */
    GrayImage read(int index) throws IOException;
}
