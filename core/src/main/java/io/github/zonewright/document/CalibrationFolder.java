package io.github.zonewright.document;

import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.cif.CifException;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.NotDirectoryException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.stream.Stream;

/**
 * A folder in which calibrations are kept, one CIF each. Files of other kinds are left alone.
 *
 * @param path the folder; it is made when a calibration is first added
 */
public record CalibrationFolder(Path path) {

    private static final String ENDING = ".cif";
    private static final int LONGEST_NAME = 60;

    /**
     * A calibration and its file.
     *
     * @param file the file
     * @param calibration what it holds
     */
    public record Kept(Path file, Calibration calibration) {}

    /**
     * A CIF of the folder that holds no calibration or cannot be read.
     *
     * @param file the file
     * @param reason a sentence for the user
     */
    public record Unreadable(Path file, String reason) {}

    /**
     * What is in the folder.
     *
     * @param calibrations by name, then by date
     * @param unreadable by file name
     */
    public record Contents(List<Kept> calibrations, List<Unreadable> unreadable) {

        /** Copies the lists. */
        public Contents {
            calibrations = List.copyOf(calibrations);
            unreadable = List.copyOf(unreadable);
        }

        /**
         * The calibration of a name.
         *
         * @param name the user's name for it
         * @return the latest of that name; empty when there is none
         */
        public Optional<Calibration> find(String name) {
            return calibrations.stream()
                    .map(Kept::calibration)
                    .filter(c -> c.name().equals(name))
                    .max(Comparator.comparing(Calibration::date));
        }
    }

    /**
     * Reads the folder.
     *
     * @return its contents; empty when there is no such folder yet
     * @throws IOException if the folder cannot be listed or is none; a file that cannot be read is reported instead
     */
    public Contents list() throws IOException {
        if (!Files.exists(path)) {
            return new Contents(List.of(), List.of());
        }
        if (!Files.isDirectory(path)) {
            throw new NotDirectoryException(path.toString());
        }
        List<Path> files;
        try (Stream<Path> all = Files.list(path)) {
            files = all.filter(f -> name(f).toLowerCase(Locale.ROOT).endsWith(ENDING) && !name(f).startsWith("."))
                    .sorted()
                    .toList();
        }
        List<Kept> kept = new ArrayList<>();
        List<Unreadable> unreadable = new ArrayList<>();
        for (Path file : files) {
            try {
                kept.add(new Kept(file, CalibrationDocument.read(file).calibration()));
            } catch (CifException | IOException e) {
                unreadable.add(new Unreadable(file, e.getMessage() == null ? e.toString() : e.getMessage()));
            }
        }
        kept.sort(Comparator.comparing((Kept k) -> k.calibration().name())
                .thenComparing(k -> k.calibration().date())
                .thenComparing(Kept::file));
        return new Contents(kept, unreadable);
    }

    /**
     * Keeps a calibration. Another of the same name is replaced.
     *
     * @param calibration the calibration
     * @return its file, named after it
     * @throws IOException if it cannot be written
     */
    public Path add(Calibration calibration) throws IOException {
        Files.createDirectories(path);
        List<Path> old = list().calibrations().stream()
                .filter(k -> k.calibration().name().equals(calibration.name()))
                .map(Kept::file)
                .toList();
        Path file = old.isEmpty() ? free(calibration.name()) : old.get(0);
        new CalibrationDocument(calibration).write(file);
        for (Path other : old) {
            if (!other.equals(file)) {
                Files.deleteIfExists(other);
            }
        }
        return file;
    }

    /**
     * Deletes the files of a calibration.
     *
     * @param name the user's name for it
     * @return whether there was one
     * @throws IOException if a file cannot be deleted
     */
    public boolean remove(String name) throws IOException {
        boolean any = false;
        for (Kept kept : list().calibrations()) {
            if (kept.calibration().name().equals(name)) {
                Files.deleteIfExists(kept.file());
                any = true;
            }
        }
        return any;
    }

    /**
     * Gives a calibration another name. The one of the new name is written before the old file goes, so that nothing is lost
     * when either fails.
     *
     * @param name the user's name for it
     * @param other its new name
     * @return the calibration under its new name
     * @throws IOException if a file cannot be written or deleted
     * @throws IllegalArgumentException if there is none of that name, or the new name is blank or taken
     */
    public Calibration rename(String name, String other) throws IOException {
        Contents contents = list();
        Calibration old = contents.find(name)
                .orElseThrow(() ->
                        new IllegalArgumentException("name \"" + name + "\": expected that of a kept calibration"));
        if (contents.find(other).isPresent()) {
            throw new IllegalArgumentException(
                    "name \"" + other + "\": another calibration has it, expected another name");
        }
        Calibration renamed = old.withName(other);
        add(renamed);
        remove(name);
        return renamed;
    }

    /** A file name of letters, digits and hyphens that no file has yet. */
    private Path free(String name) {
        String plain = name.replaceAll("[^A-Za-z0-9]+", "-").replaceAll("^-|-$", "");
        String cut = plain.length() > LONGEST_NAME ? plain.substring(0, LONGEST_NAME) : plain;
        String stem = cut.isEmpty() ? "calibration" : cut;
        Path file = path.resolve(stem + ENDING);
        for (int i = 2; Files.exists(file); i++) {
            file = path.resolve(stem + "-" + i + ENDING);
        }
        return file;
    }

    private static String name(Path file) {
        return file.getFileName().toString();
    }
}
