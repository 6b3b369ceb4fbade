package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.document.FitDocument;
import io.github.zonewright.document.ImageReference;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.overlay.ShownMarks;
import io.github.zonewright.imagej.session.Measuring;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.imagej.session.SittingRecord;
import io.github.zonewright.pattern.Placement;
import java.io.File;
import java.io.IOException;
import java.nio.file.Files;
import java.util.Locale;
import java.util.Optional;
import java.util.Set;

/**
 * What a record brings to an image. On its own image it is the session as it was: spots, solution, pattern. On another it is
 * the pattern alone, at the same place, for the other image was not what it was fitted to.
 *
 * @param sitting what is to be shown
 * @param marks what is to be drawn beside the spots, if the record says so
 * @param sentence what a person should know of it
 */
public record RecordSession(Sitting sitting, Optional<Set<ShownMarks>> marks, String sentence) {

    /**
     * Whether a file holds the record of a fit.
     *
     * @param file any file
     * @return false too if it can't be read or is no CIF
     */
    public static boolean isRecord(File file) {
        try {
            return FitDocument.isIn(CifFile.read(file.toPath()));
        } catch (IOException | IllegalArgumentException e) {
            return false;
        }
    }

    /**
     * Reads the file of a record.
     *
     * @param file the file
     * @return its content, in which there is a readable record
     * @throws IOException if the file can't be read
     * @throws IllegalArgumentException if it holds no record of a fit; the message names the file and what is wrong
     */
    public static CifFile read(File file) throws IOException {
        if (file == null || !Files.isReadable(file.toPath()) || Files.isDirectory(file.toPath())) {
            throw new IllegalArgumentException(
                    "record " + (file == null ? "" : file) + ": it can't be read, expected the CIF file of a record");
        }
        try {
            CifFile cif = CifFile.read(file.toPath());
            FitDocument.read(cif);
            return cif;
        } catch (IllegalArgumentException e) {
            throw new IllegalArgumentException("record " + file + ": " + e.getMessage(), e);
        }
    }

    /** Opens the image that a record names, from the record's folder. */
    static ImagePlus imageBeside(File file, FitDocument record) {
        String name = record.image().map(ImageReference::fileName).orElse("");
        File beside = new File(file.getAbsoluteFile().getParentFile(), name);
        ImagePlus opened = name.isEmpty() || !beside.isFile() ? null : IJ.openImage(beside.getPath());
        if (opened == null) {
            throw new IllegalArgumentException(
                    "no image is open, and the record's image \"" + name + "\" is not beside it: open an image first");
        }
        return opened;
    }

    /**
     * What a record brings to an image's current slice.
     *
     * @param file the file of the record
     * @param image the image; it is measured anew if it is the record's own
     * @return the session
     */
    public static RecordSession of(CifFile file, ImagePlus image) {
        FitDocument record = FitDocument.read(file);
        Sitting before = Sitting.of(image);
        ImageReference here = ImagePixels.reference(image);
        Placement placement = record.placement();
        String pattern =
                "[" + placement.setting().zone() + "] of " + placement.crystal().name();
        if (record.image().filter(r -> isSame(r, here)).isEmpty()) {
            return new RecordSession(
                    before.withPlacement(moved(placement, record, here)),
                    Optional.empty(),
                    pattern + " is laid over this image, which is another than the record's" + whose(record, here));
        }
        Sitting opened = SittingRecord.opened(before, record);
        Sitting measured = record.solution().isPresent()
                ? Measuring.unlessEdited(image, opened)
                : opened.measurement().edited() ? Measuring.asNeeded(image, opened) : opened;
        String said = record.solution()
                .map(solution -> Answer.line(solution) + ": as the record has it.")
                .orElse(pattern + " lies as the record has it.");
        return new RecordSession(
                SittingRecord.found(measured, record, FitDocument.others(file)),
                SittingRecord.marks(record),
                said + lost(measured, record));
    }

    private static String lost(Sitting measured, FitDocument record) {
        int all = record.handling().edits().size();
        int lost = all - measured.measurement().edits().size();
        return lost <= 0
                ? ""
                : " " + lost + " of " + all + " changes of the spots by hand could not be made again:"
                        + " these spots are measured in another way now.";
    }

    /**
     * Draws from now on what the record says is to be drawn beside the spots.
     *
     * @param image the image; it is not drawn yet
     */
    public void mark(ImagePlus image) {
        marks.ifPresent(shown -> ShownMarks.keep(shown, image));
    }

    /** By the digest of the pixels where the record has one. */
    private static boolean isSame(ImageReference recorded, ImageReference here) {
        return recorded.sha256().isPresent()
                ? recorded.sha256().equals(here.sha256())
                : recorded.equals(new ImageReference(here.fileName(), here.width(), here.height(), recorded.sha256()));
    }

    /** The same place in px; where the images differ in size, the same distance from the middle. */
    private static Placement moved(Placement placement, FitDocument record, ImageReference here) {
        PixelPoint centre = placement.camera().centre();
        int width = record.image().map(ImageReference::width).orElse(here.width());
        int height = record.image().map(ImageReference::height).orElse(here.height());
        return placement.centredAt(
                new PixelPoint(centre.x() + (here.width() - width) / 2.0, centre.y() + (here.height() - height) / 2.0));
    }

    private static String whose(FitDocument record, ImageReference here) {
        if (record.image().isEmpty()) {
            return ", of which the record says nothing. It was not fitted to it.";
        }
        ImageReference own = record.image().get();
        boolean sameSize = own.width() == here.width() && own.height() == here.height();
        return String.format(
                Locale.ROOT,
                " (%s, %d × %d px). It was not fitted to it%s.",
                own.fileName(),
                own.width(),
                own.height(),
                sameSize ? "" : "; the images differ in size, so it lies as far from the middle as on its own");
    }
}
