package io.github.zonewright.imagej.command;

import io.github.zonewright.document.FitDocument;
import io.github.zonewright.document.SpotTable;
import io.github.zonewright.indexing.Solution;
import java.io.File;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;

/** Writes what is kept of a solution: the record as CIF, the spots as CSV. */
public final class Keep {
    private Keep() {}

    /**
     * Writes the record.
     *
     * @param solution the solution
     * @param file where to, or null for nowhere
     * @throws IOException if it can't be written
     */
    public static void record(Solution solution, File file) throws IOException {
        write(file, FitDocument.write(solution));
    }

    /**
     * Writes the spot table.
     *
     * @param solution the solution
     * @param file where to, or null for nowhere
     * @throws IOException if it can't be written
     */
    public static void spots(Solution solution, File file) throws IOException {
        write(file, SpotTable.csv(solution));
    }

    private static void write(File file, String text) throws IOException {
        if (file == null || file.getPath().isBlank()) {
            return;
        }
        try {
            Files.writeString(file.toPath(), text, StandardCharsets.UTF_8);
        } catch (IOException e) {
            throw new IOException(
                    "file " + file + " can't be written: " + e.getClass().getSimpleName(), e);
        }
    }
}
