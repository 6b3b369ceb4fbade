package io.github.zonewright.imagej.session;

import ij.Prefs;
import io.github.zonewright.crystal.CandidateFolder;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalFolder;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.crystal.KeptCrystal;
import io.github.zonewright.crystal.ShelfEntry;
import io.github.zonewright.document.CalibrationFolder;
import java.io.IOException;
import java.nio.file.FileAlreadyExistsException;
import java.nio.file.Path;

/**
 * The folder with the crystals, lists of candidates and calibrations that a person keeps: {@code zonewright} in the folder of ImageJ's
 * preferences, or the one that the preference {@code zonewright.folder} names. It is made when the first thing is kept.
 */
public final class UserFolder {
    /** The preference that names another folder. */
    public static final String KEY = "zonewright.folder";

    private static final String NAME = "zonewright";

    private UserFolder() {}

    /**
     * The crystals.
     *
     * @return the folder
     */
    public static CrystalFolder crystals() {
        return CrystalFolder.at(path());
    }

    /**
     * The lists of candidates.
     *
     * @return the lists that are kept with the crystals
     */
    public static CandidateFolder lists() {
        return CandidateFolder.in(crystals());
    }

    /**
     * The calibrations.
     *
     * @return the folder {@code calibrations} beside the crystals
     */
    public static CalibrationFolder calibrations() {
        return new CalibrationFolder(path().resolve("calibrations"));
    }

    /**
     * Keeps a crystal, whole or not at all, and never in the place of another.
     *
     * @param crystal the crystal
     * @param name what it is to be called
     * @return the crystal as kept
     * @throws IllegalArgumentException if the name is blank, or that of a crystal on the shelf or of another kept one
     * @throws IOException if it can't be written; the folder is then as it was
     */
    public static KeptCrystal keep(Crystal crystal, String name) throws IOException {
        checkName(name);
        try {
            return crystals().add(crystal.withName(name.strip()));
        } catch (FileAlreadyExistsException e) {
            throw new IllegalArgumentException(
                    "name \"" + name + "\": another crystal is kept in " + e.getFile() + ", expected another name", e);
        }
    }

    /**
     * Checks that a crystal of the user's may have a name.
     *
     * @param name the name
     * @throws IllegalArgumentException if it is blank, or the shelf has it
     */
    public static void checkName(String name) {
        if (name.isBlank()) {
            throw new IllegalArgumentException("name: blank, expected at least one character");
        }
        if (CrystalShelf.entries().stream().map(ShelfEntry::name).anyMatch(n -> n.equalsIgnoreCase(name.strip()))) {
            throw new IllegalArgumentException(
                    "name \"" + name.strip() + "\": the shelf has it already, expected another name");
        }
    }

    private static Path path() {
        String chosen = Prefs.get(KEY, "");
        if (!chosen.isBlank()) {
            return Path.of(chosen);
        }
        String preferences = Prefs.getPrefsDir();
        return Path.of(
                preferences == null || preferences.isBlank() ? System.getProperty("user.home") : preferences, NAME);
    }
}
