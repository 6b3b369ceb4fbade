package io.github.zonewright.imagej.bridge;

import ij.ImagePlus;
import ij.ImageStack;
import ij.VirtualStack;
import ij.process.ImageProcessor;
import java.io.File;
import java.io.IOException;

/** Slices of a stack; those of a virtual stack are read from its files one at a time. */
public final class StackFrames extends ImageFrames {
    private final String title;
    private final ImageStack stack;
    private final int first;
    private final int last;

    private StackFrames(String title, ImageStack stack, int first, int last) {
        this.title = title;
        this.stack = stack;
        this.first = first;
        this.last = last;
    }

    /**
     * A range of slices.
     *
     * @param image the stack; it is not changed, nor is its current slice
     * @param first the first slice, from 1
     * @param last the last slice, or 0 for the end of the stack
     * @return the frames
     * @throws IllegalArgumentException if the stack has no such slices
     */
    public static StackFrames of(ImagePlus image, int first, int last) {
        int size = image.getStackSize();
        if (first < 1 || first > size) {
            throw new IllegalArgumentException("first slice: " + first + ", expected 1 to " + size);
        }
        if (last != 0 && (last < first || last > size)) {
            throw new IllegalArgumentException(
                    "last slice: " + last + ", expected " + first + " to " + size + ", or 0 for the end of the stack");
        }
        return new StackFrames(image.getTitle(), image.getStack(), first, last == 0 ? size : last);
    }

    @Override
    public int size() {
        return last - first + 1;
    }

    @Override
    public int number(int index) {
        return first + index;
    }

    @Override
    public String label(int index) {
        String label = stack.getShortSliceLabel(number(index));
        return label == null ? "" : label;
    }

    @Override
    protected ImagePlus open(int index) throws IOException {
        int slice = number(index);
        if (stack instanceof VirtualStack files && files.getDirectory() != null && files.getFileName(slice) != null) {
            File file = new File(files.getDirectory(), files.getFileName(slice));
            if (!file.isFile()) {
                throw new IOException("file " + file + " of slice " + slice + " is not there any more");
            }
        }
        ImageProcessor pixels;
        synchronized (stack) {
            pixels = stack.getProcessor(slice);
        }
        if (pixels == null) {
            throw new IOException("slice " + slice + " can't be read");
        }
        return new ImagePlus(title + ", slice " + slice, pixels);
    }
}
