package io.github.zonewright.cif;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.nio.file.StandardOpenOption;
import java.util.UUID;

/** Writes a file whole or not at all. */
public final class AtomicFile {
    private AtomicFile() {}

    /**
     * Writes into a new file in the same folder, which then takes the place of the old.
     *
     * @param path the file
     * @param bytes all it is to hold
     * @throws IOException if it cannot be written; an older file is then as it was
     */
    public static void write(Path path, byte[] bytes) throws IOException {
        Path target = Files.exists(path) ? path.toRealPath() : path.toAbsolutePath();
        if (Files.isDirectory(target)) {
            throw new IOException("a file was expected, but this is a folder: " + path);
        }
        Path fresh = target.resolveSibling("." + target.getFileName() + "." + UUID.randomUUID() + ".tmp");
        try {
            try (FileChannel channel =
                    FileChannel.open(fresh, StandardOpenOption.WRITE, StandardOpenOption.CREATE_NEW)) {
                ByteBuffer rest = ByteBuffer.wrap(bytes);
                while (rest.hasRemaining()) {
                    channel.write(rest);
                }
                channel.force(true);
            }
            Files.move(fresh, target, StandardCopyOption.ATOMIC_MOVE, StandardCopyOption.REPLACE_EXISTING);
        } finally {
            Files.deleteIfExists(fresh);
        }
    }
}
