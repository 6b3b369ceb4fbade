package io.github.zonewright.cif;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.file.FileAlreadyExistsException;
import java.nio.file.FileSystemException;
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
        Path fresh = freshBeside(target);
        try {
            writeThrough(fresh, bytes);
            Files.move(fresh, target, StandardCopyOption.ATOMIC_MOVE, StandardCopyOption.REPLACE_EXISTING);
        } finally {
            Files.deleteIfExists(fresh);
        }
    }

    /**
     * Writes a file that is not there yet; no other file is ever overwritten, not even one that appears meanwhile where
     * the file system has hard links.
     *
     * @param path the file
     * @param bytes all it is to hold
     * @throws java.nio.file.FileAlreadyExistsException if there is a file of that name
     * @throws IOException if it cannot be written; there is then no such file
     */
    public static void create(Path path, byte[] bytes) throws IOException {
        Path target = path.toAbsolutePath();
        Path fresh = freshBeside(target);
        try {
            writeThrough(fresh, bytes);
            try {
                Files.createLink(target, fresh);
            } catch (FileAlreadyExistsException e) {
                throw e;
            } catch (UnsupportedOperationException | FileSystemException e) {
                Files.move(fresh, target);
            }
        } finally {
            Files.deleteIfExists(fresh);
        }
    }

    private static Path freshBeside(Path target) {
        return target.resolveSibling("." + target.getFileName() + "." + UUID.randomUUID() + ".tmp");
    }

    private static void writeThrough(Path fresh, byte[] bytes) throws IOException {
        try (FileChannel channel = FileChannel.open(fresh, StandardOpenOption.WRITE, StandardOpenOption.CREATE_NEW)) {
            ByteBuffer rest = ByteBuffer.wrap(bytes);
            while (rest.hasRemaining()) {
                channel.write(rest);
            }
            channel.force(true);
        }
    }
}
