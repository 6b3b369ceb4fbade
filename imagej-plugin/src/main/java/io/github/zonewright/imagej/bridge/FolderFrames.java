package io.github.zonewright.imagej.bridge;

import ij.IJ;
import ij.ImagePlus;
import ij.io.Opener;
import ij.util.StringSorter;
import java.io.File;
import java.io.IOException;

/** The files of a folder, in the order of their names with numbers in them counted; of a file with a stack the first slice. */
public final class FolderFrames extends ImageFrames {
    private final File folder;
    private final String[] names;

    private FolderFrames(File folder, String[] names) {
        this.folder = folder;
        this.names = names;
    }

    /**
     * All files of a folder, but for hidden ones and folders in it.
     *
     * @param folder the folder
     * @return the frames
     * @throws IllegalArgumentException if there is no such folder, or no file in it
     */
    public static FolderFrames of(File folder) {
        String[] names = folder.list((f, name) -> !name.startsWith(".") && new File(f, name).isFile());
        if (names == null) {
            throw new IllegalArgumentException(
                    "folder of images: \"" + folder + "\", expected a folder that can be read");
        }
        if (names.length == 0) {
            throw new IllegalArgumentException(
                    "folder of images: \"" + folder + "\" is empty, expected image files in it");
        }
        return new FolderFrames(folder, StringSorter.sortNumerically(names));
    }

    @Override
    public int size() {
        return names.length;
    }

    @Override
    public int number(int index) {
        return index + 1;
    }

    @Override
    public String label(int index) {
        return names[index];
    }

    @Override
    protected ImagePlus open(int index) throws IOException {
        boolean redirecting = IJ.redirectingErrorMessages();
        IJ.redirectErrorMessages(true);
        try {
            Opener opener = new Opener();
            opener.setSilentMode(true);
            ImagePlus frame = opener.openImage(new File(folder, names[index]).getPath());
            if (frame == null || frame.getProcessor() == null) {
                throw new IOException("no image that ImageJ can read");
            }
            return frame;
        } catch (RuntimeException e) {
            throw new IOException("no image that ImageJ can read: " + e, e);
        } finally {
            IJ.redirectErrorMessages(redirecting);
        }
    }
}
