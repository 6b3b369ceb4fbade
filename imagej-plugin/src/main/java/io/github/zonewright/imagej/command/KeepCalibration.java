package io.github.zonewright.imagej.command;

import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.calibration.MicroscopeSetting;
import io.github.zonewright.calibration.RingCalibration.Fitted;
import io.github.zonewright.document.CalibrationFolder;
import java.io.IOException;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.Optional;
import java.util.OptionalDouble;

/** Keeps calibrations in the user's folder, never in the place of another. */
final class KeepCalibration {
    private final String name;
    private final MicroscopeSetting setting;

    private KeepCalibration(String name, MicroscopeSetting setting) {
        this.name = name;
        this.setting = setting;
    }

    /**
     * What is to be kept, checked before anything is measured.
     *
     * @param name its name; blank for not to keep it
     * @throws IOException if the folder can't be read
     * @throws IllegalArgumentException if a calibration of that name is kept already
     */
    static Optional<KeepCalibration> as(String name, MicroscopeSetting setting) throws IOException {
        if (name == null || name.isBlank()) {
            return Optional.empty();
        }
        String plain = name.strip();
        for (CalibrationFolder.Kept kept : UserFolder.calibrations().list().calibrations()) {
            if (kept.calibration().name().equalsIgnoreCase(plain)) {
                throw new IllegalArgumentException("name \"" + plain + "\": another calibration is kept in "
                        + kept.file() + ", expected another name");
            }
        }
        return Optional.of(new KeepCalibration(plain, setting));
    }

    /** Keeps it; a sentence tells where, or why not. */
    String keep(Fitted fitted) throws IOException {
        if (!fitted.standardFits()) {
            return "The calibration was not kept, since the rings do not fit the standard.";
        }
        Path file = UserFolder.calibrations().add(Calibration.of(name, setting, LocalDate.now(), fitted));
        return "The calibration \"" + name + "\" is kept in " + file + ".";
    }

    /** A length that may be left blank. */
    static OptionalDouble optional(String label, String text) {
        if (text == null || text.isBlank()) {
            return OptionalDouble.empty();
        }
        double number;
        try {
            number = Double.parseDouble(text.strip());
        } catch (NumberFormatException e) {
            throw wrong(label, text);
        }
        if (!(number > 0) || Double.isInfinite(number)) {
            throw wrong(label, text);
        }
        return OptionalDouble.of(number);
    }

    private static IllegalArgumentException wrong(String label, String text) {
        return new IllegalArgumentException(
                label + ": \"" + text.strip() + "\", expected a number above 0, or nothing where it is not known");
    }
}
