package io.github.zonewright.imagej.session;

import ij.ImagePlus;
import io.github.zonewright.document.FitDocument;
import io.github.zonewright.document.FitFindings;
import io.github.zonewright.document.FitReport;
import io.github.zonewright.document.SpotTable;
import io.github.zonewright.document.ZoneChart;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.overlay.PatternPicture;
import io.github.zonewright.imagej.overlay.PatternView;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.Verdict;
import java.io.File;
import java.io.IOException;
import java.nio.file.FileSystemException;
import java.nio.file.Path;
import java.time.OffsetDateTime;
import java.time.temporal.ChronoUnit;
import java.util.List;
import java.util.Optional;

/** Writes what is kept of a solution: the record as CIF, the spots as CSV, the report as HTML. */
public final class Keep {
    /** Writes to a path. */
    @FunctionalInterface
    private interface Writer {
        void write(Path path) throws IOException;
    }

    private static final String SOFTWARE = software();

    private Keep() {}

    /**
     * Writes the record, with the image's name, size and pixel hash, the time and this program's version, and behind it the
     * other solutions of the search that the image shows.
     *
     * @param solution the solution
     * @param pattern the image it was found on
     * @param file where to, or null for nowhere
     * @throws IOException if it can't be written
     */
    public static void record(Solution solution, ImagePlus pattern, File file) throws IOException {
        FitDocument document = document(solution, pattern);
        List<Solution> others = Sitting.of(pattern).others(solution);
        write(file, path -> document.toCif(others).write(path));
    }

    /**
     * Writes the record of the pattern that lies over an image: that of the solution it shows, or else that of a pattern laid by
     * hand, which says so.
     *
     * @param pattern the image; nothing is written when no pattern lies over it
     * @param file where to, or null for nowhere
     * @throws IOException if it can't be written
     */
    public static void record(ImagePlus pattern, File file) throws IOException {
        Sitting sitting = Sitting.of(pattern);
        if (sitting.chosen().isPresent()) {
            record(sitting.chosen().get(), pattern, file);
        } else if (sitting.placement().isPresent()) {
            FitDocument laid = laid(sitting, pattern);
            write(file, path -> laid.toCif().write(path));
        }
    }

    private static FitDocument document(Solution solution, ImagePlus pattern) {
        return SittingRecord.of(solution, Sitting.of(pattern), pattern, ImagePixels.reference(pattern))
                .createdAt(OffsetDateTime.now().truncatedTo(ChronoUnit.SECONDS))
                .createdBy(SOFTWARE);
    }

    /** The record of a pattern that a person laid. */
    private static FitDocument laid(Sitting sitting, ImagePlus pattern) {
        return SittingRecord.of(sitting, pattern, ImagePixels.reference(pattern))
                .orElseThrow()
                .createdAt(OffsetDateTime.now().truncatedTo(ChronoUnit.SECONDS))
                .createdBy(SOFTWARE);
    }

    private static String software() {
        String version = Keep.class.getPackage().getImplementationVersion();
        return version == null ? "Zonewright" : "Zonewright " + version;
    }

    /**
     * Writes the spot table.
     *
     * @param solution the solution
     * @param file where to, or null for nowhere
     * @throws IOException if it can't be written
     */
    public static void spots(Solution solution, File file) throws IOException {
        write(file, SpotTable.of(solution)::write);
    }

    /**
     * Writes the report: the solution that an image shows, or the pattern that was laid over it by hand, with a picture of the
     * image as it is displayed now and its marks. Where a solution is tied with others, the page says what tells it from the first
     * of them.
     *
     * @param pattern the image; nothing is written when no pattern lies over it
     * @param file where to, or null for nowhere
     * @throws IOException if it can't be written
     */
    public static void report(ImagePlus pattern, File file) throws IOException {
        Sitting sitting = Sitting.of(pattern).withLabels(true);
        if (sitting.placement().isEmpty() || isNowhere(file)) {
            return;
        }
        PatternView view = sitting.view(pattern);
        byte[] picture = PatternPicture.png(pattern, view);
        FitReport report = sitting.chosen().isEmpty()
                ? FitReport.of(laid(sitting, pattern)).withPicture(picture)
                : FitReport.of(told(document(sitting.chosen().get(), pattern), sitting))
                        .withPicture(picture)
                        .withSolutions(sitting.solutions())
                        .withMissing(
                                view.missing().stream().map(s -> s.spot().hkl()).toList());
        write(file, report::write);
    }

    /** A record with what tells its solution from the first that it is tied with, unless that was asked before. */
    private static FitDocument told(FitDocument document, Sitting sitting) {
        if (sitting.findings().apart().isPresent()
                || sitting.measured().isEmpty()
                || !(sitting.verdict() instanceof Verdict.Tied)) {
            return document;
        }
        return Comparison.of(sitting, sitting.chosen().orElseThrow()).stream()
                .findFirst()
                .map(pair -> pair.told(pair.discrimination(sitting.measured().get())))
                .map(apart -> document.withFindings(
                        new FitFindings(document.findings().grains(), Optional.of(apart))))
                .orElse(document);
    }

    /**
     * Writes a zone chart as a sheet.
     *
     * @param chart the chart
     * @param file the file; nothing is written when it is null
     * @throws IOException if it can't be written
     */
    public static void chart(ZoneChart chart, File file) throws IOException {
        write(file, chart::write);
    }

    private static void write(File file, Writer writer) throws IOException {
        if (isNowhere(file)) {
            return;
        }
        try {
            writer.write(file.toPath());
        } catch (FileSystemException e) {
            throw new IOException(
                    "file " + file + " can't be written: is there such a folder, and may you write there?", e);
        }
    }

    private static boolean isNowhere(File file) {
        return file == null || file.getPath().isBlank();
    }
}
