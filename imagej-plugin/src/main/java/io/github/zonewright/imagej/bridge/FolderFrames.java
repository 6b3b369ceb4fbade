package io.github.zonewright.imagej.bridge;

import ij.IJ;
import ij.ImagePlus;
import ij.io.FileInfo;
import ij.io.Opener;
import ij.util.StringSorter;
import java.io.File;
import java.io.IOException;
import java.util.Set;

/** The files of a folder, in the order of their names with numbers in them counted; of a file with a stack the first slice. */
public final class FolderFrames extends ImageFrames {
    private static final String UNREADABLE = "no image that ImageJ can read";
    private static final Set<Integer> TEXTS = Set.of(Opener.TEXT, Opener.JAVA_OR_TEXT, Opener.TABLE);

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
        File file = new File(folder, names[index]);
        boolean redirecting = IJ.redirectingErrorMessages();
        IJ.redirectErrorMessages(true);
        try {
            return checked(file);
        } catch (RuntimeException e) {
            throw new IOException(UNREADABLE + ": " + e, e);
        } finally {
            IJ.redirectErrorMessages(redirecting);
        }
    }

    private static ImagePlus checked(File file) throws IOException {
        Opener opener = new Opener();
        opener.setSilentMode(true);
        ImagePlus frame = TEXTS.contains(opener.getFileType(file.getPath())) ? null : opener.openImage(file.getPath());
        if (frame == null || frame.getWidth() * frame.getHeight() == 0) {
            throw new IOException(UNREADABLE);
        }
        FileInfo info = frame.getOriginalFileInfo();
        if (info != null && info.fileFormat == FileInfo.TIFF && info.compression == FileInfo.COMPRESSION_NONE) {
            long least = (long) info.width * info.height * info.getBytesPerPixel();
            if (file.length() < least) {
                throw new IOException(
                        "the file is cut short: it has " + file.length() + " bytes, expected at least " + least);
            }
        }
        return frame;
    }
}
