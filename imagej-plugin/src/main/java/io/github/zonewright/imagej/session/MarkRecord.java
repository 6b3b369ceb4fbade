package io.github.zonewright.imagej.session;

import ij.ImagePlus;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.document.FitDocument;
import io.github.zonewright.document.ImageReference;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.overlay.ShownMarks;
import io.github.zonewright.indexing.Solution;
import java.io.ByteArrayInputStream;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.util.Base64;
import java.util.List;
import java.util.Optional;
import java.util.zip.DeflaterOutputStream;
import java.util.zip.InflaterInputStream;

/**
 * The record of a sitting as its marks carry it: the CIF, deflated (RFC 1950) and in Base64 (RFC 4648), since a property of
 * a ROI holds one line. ImageJ saves it with the overlay in a TIFF file.
 */
final class MarkRecord {
    /** No record of ours comes near; a file that claims more is none of ours. */
    private static final int MOST_BYTES = 50_000_000;

    private MarkRecord() {}

    /** Lets the marks on the current slice carry the record of a sitting, where it has a pattern. */
    static void keep(Sitting sitting, ImagePlus image) {
        List<Solution> others = sitting.chosen().map(sitting::others).orElse(List.of());
        SittingRecord.of(sitting, image, ImagePixels.named(image))
                .ifPresent(document ->
                        PatternOverlay.keep(image, pack(document.toCif(others).toText())));
    }

    /** What the marks on the current slice keep; empty when they keep nothing that fits the image. */
    static Optional<Sitting> sitting(ImagePlus image) {
        try {
            Optional<String> line = PatternOverlay.record(image);
            return line.isEmpty() ? Optional.empty() : sitting(unpack(line.get()), image);
        } catch (IOException | IllegalArgumentException e) {
            return Optional.empty();
        }
    }

    private static Optional<Sitting> sitting(CifFile file, ImagePlus image) {
        FitDocument document = FitDocument.read(file);
        if (document.image().filter(r -> fits(r, image)).isEmpty()) {
            return Optional.empty();
        }
        SittingRecord.marks(document).ifPresent(marks -> ShownMarks.keep(marks, image));
        Sitting opened = SittingRecord.opened(Sitting.EMPTY, document);
        return Optional.of(SittingRecord.found(opened, document, FitDocument.others(file))
                .withLabels(PatternOverlay.isLabelled(image)));
    }

    private static boolean fits(ImageReference reference, ImagePlus image) {
        return reference.width() == image.getWidth() && reference.height() == image.getHeight();
    }

    private static String pack(String text) {
        ByteArrayOutputStream bytes = new ByteArrayOutputStream();
        try (DeflaterOutputStream deflater = new DeflaterOutputStream(bytes)) {
            deflater.write(text.getBytes(StandardCharsets.UTF_8));
        } catch (IOException e) {
            throw new IllegalStateException("a record in memory can't be written", e);
        }
        return Base64.getEncoder().encodeToString(bytes.toByteArray());
    }

    private static CifFile unpack(String line) throws IOException {
        try (InflaterInputStream inflater = new InflaterInputStream(
                new ByteArrayInputStream(Base64.getDecoder().decode(line)))) {
            return CifFile.parse(new String(inflater.readNBytes(MOST_BYTES), StandardCharsets.UTF_8));
        }
    }
}
