package io.github.zonewright.crystal;

import java.io.IOException;
import java.nio.file.Path;

/**
 * A file of the user's folder that could not be read, or a structure of it.
 *
 * @param file the file
 * @param reason why, with line and item where there is one
 */
public record UnreadableFile(Path file, String reason) {

    static UnreadableFile of(Path file, Exception cause) {
        return new UnreadableFile(file, cause instanceof IOException ? "cannot be read: " + cause : cause.getMessage());
    }

    /**
     * Name and reason, for a list.
     *
     * @return for example {@code steel.cif: line 3, …}
     */
    @Override
    public String toString() {
        return file.getFileName() + ": " + reason;
    }
}
