package io.github.zonewright.cif;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.io.IOException;
import java.nio.file.FileAlreadyExistsException;
import java.nio.file.Files;
import java.nio.file.Path;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class AtomicFileTest {

    private static final byte[] ONE = {1};
    private static final byte[] TWO = {2, 2};

    @TempDir
    private Path temp;

    private long files() throws IOException {
        try (var entries = Files.list(temp)) {
            return entries.count();
        }
    }

    @Test
    void write_takesThePlaceOfTheOld() throws IOException {
        Path file = temp.resolve("a");
        AtomicFile.write(file, ONE);
        AtomicFile.write(file, TWO);
        assertArrayEquals(TWO, Files.readAllBytes(file));
        assertEquals(1, files());
    }

    @Test
    void create_neverTakesThePlaceOfAnother() throws IOException {
        Path file = temp.resolve("a");
        AtomicFile.create(file, ONE);
        assertThrows(FileAlreadyExistsException.class, () -> AtomicFile.create(file, TWO));
        assertArrayEquals(ONE, Files.readAllBytes(file));
        Path folder = Files.createDirectory(temp.resolve("folder"));
        assertThrows(FileAlreadyExistsException.class, () -> AtomicFile.create(folder, TWO));
        assertThrows(IOException.class, () -> AtomicFile.create(temp.resolve("none/a"), ONE));
        assertEquals(2, files());
    }

    @Test
    void cifFile_create() throws IOException {
        CifFile cif = CifFile.of(CifBlock.builder("x").add("_a", "1").build());
        Path file = temp.resolve("x.cif");
        cif.create(file);
        assertEquals(cif.blocks(), CifFile.read(file).blocks());
        assertThrows(FileAlreadyExistsException.class, () -> cif.create(file));
    }
}
