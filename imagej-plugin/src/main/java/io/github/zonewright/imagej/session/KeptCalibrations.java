package io.github.zonewright.imagej.session;

import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.document.CalibrationFolder;
import java.io.IOException;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;

/** The calibrations in the user's folder. None is ever written in the place of another. */
public final class KeptCalibrations {
    /** Style of a {@code @Parameter} that names one: the dialog of plain ImageJ then offers what there is. */
    public static final String STYLE = "calibration";

    private KeptCalibrations() {}

    /**
     * What is in the folder.
     *
     * @return the calibrations by name, and what could not be read
     * @throws IOException if the folder can't be read
     */
    public static CalibrationFolder.Contents list() throws IOException {
        return UserFolder.calibrations().list();
    }

    /**
     * The names, for a dialog.
     *
     * @return the names in order; none when the folder can't be read
     */
    public static List<String> names() {
        try {
            return list().calibrations().stream()
                    .map(k -> k.calibration().name())
                    .distinct()
                    .toList();
        } catch (IOException e) {
            return List.of();
        }
    }

    /**
     * The calibration of a name, for a name that may be outdated.
     *
     * @param name the name, in any case
     * @return the calibration; empty when there is none or the folder can't be read
     */
    public static Optional<Calibration> named(String name) {
        try {
            return find(list(), name);
        } catch (IOException e) {
            return Optional.empty();
        }
    }

    /**
     * The calibration that a person names.
     *
     * @param name the name, in any case
     * @return the calibration
     * @throws IOException if the folder can't be read
     * @throws IllegalArgumentException if there is none of that name; the message lists those there are
     */
    public static Calibration of(String name) throws IOException {
        CalibrationFolder.Contents contents = list();
        return find(contents, name).orElseThrow(() -> {
            List<String> names = contents.calibrations().stream()
                    .map(k -> "\"" + k.calibration().name() + "\"")
                    .toList();
            return new IllegalArgumentException("calibration: \"" + name.strip() + "\", expected "
                    + (names.isEmpty()
                            ? "one that is kept, and none is kept in "
                                    + UserFolder.calibrations().path()
                            : "one of " + String.join(", ", names)));
        });
    }

    private static Optional<Calibration> find(CalibrationFolder.Contents contents, String name) {
        return contents.find(name.strip())
                .or(() -> contents.calibrations().stream()
                        .map(CalibrationFolder.Kept::calibration)
                        .filter(c -> c.name().equalsIgnoreCase(name.strip()))
                        .findFirst());
    }

    /**
     * Checks that a calibration may be kept under a name.
     *
     * @param name the name
     * @return the name without spaces about it
     * @throws IOException if the folder can't be read
     * @throws IllegalArgumentException if it is blank or another is kept under it
     */
    public static String free(String name) throws IOException {
        String plain = name.strip();
        if (plain.isEmpty()) {
            throw new IllegalArgumentException("name of the calibration: blank, expected at least one character");
        }
        for (CalibrationFolder.Kept kept : list().calibrations()) {
            if (kept.calibration().name().equalsIgnoreCase(plain)) {
                throw new IllegalArgumentException("name \"" + plain + "\": another calibration is kept in "
                        + kept.file() + ", expected another name");
            }
        }
        return plain;
    }

    /**
     * Keeps a calibration.
     *
     * @param calibration the calibration
     * @return a sentence that tells where
     * @throws IOException if it can't be written
     * @throws IllegalArgumentException if another of its name is kept
     */
    public static String keep(Calibration calibration) throws IOException {
        free(calibration.name());
        Path file = UserFolder.calibrations().add(calibration);
        return "The calibration \"" + calibration.name() + "\" is kept in " + file + ".";
    }

    /**
     * Gives a calibration another name.
     *
     * @param name the name it has
     * @param other the name it is to have
     * @return the calibration under its new name
     * @throws IOException if it can't be written
     * @throws IllegalArgumentException if there is none of that name, or the new one is blank or taken
     */
    public static Calibration rename(String name, String other) throws IOException {
        return UserFolder.calibrations().rename(of(name).name(), free(other));
    }

    /**
     * Deletes a calibration.
     *
     * @param name its name
     * @return a sentence
     * @throws IOException if its file can't be deleted
     * @throws IllegalArgumentException if there is none of that name
     */
    public static String delete(String name) throws IOException {
        String exact = of(name).name();
        UserFolder.calibrations().remove(exact);
        return "The calibration \"" + exact + "\" is deleted.";
    }
}
