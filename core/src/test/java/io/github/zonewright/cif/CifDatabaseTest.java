package io.github.zonewright.cif;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import java.util.stream.Stream;
import org.junit.jupiter.api.Assumptions;
import org.junit.jupiter.api.Test;

/**
 * The 510 files of the Debian package libavogadro-data 1.97.0, run where it is installed. Two other readers, gemmi
 * 0.5.7 and cod-tools 3.7.0, refuse the same four of them, which are spoiled at the end, and read the rest.
 */
class CifDatabaseTest {
    private static final Path FOLDER = Path.of("/usr/share/avogadro2/crystals");
    /** The line given is the first value that is out of place, or the first of the incomplete row. */
    private static final Map<String, Integer> REFUSED =
            Map.of("Er-Erbium.cif", 82, "Eu-Europium.cif", 153, "Se-Selenium.cif", 67, "Bi2S3-Bismuthinite.cif", 70);

    @Test
    void everyFile_isReadOrRefusedWithItsLine() throws IOException {
        Assumptions.assumeTrue(Files.isDirectory(FOLDER), "the Debian package libavogadro-data is not installed");
        Map<String, Integer> refused = new TreeMap<>();
        int read = 0;
        try (Stream<Path> paths = Files.walk(FOLDER)) {
            for (Path path : paths.filter(p -> p.toString().endsWith(".cif")).toList()) {
                try {
                    CifFile file = CifFile.read(path);
                    assertEquals(List.of(), file.notices(), path.toString());
                    assertEquals(file, CifFile.parse(file.toText()), path.toString());
                    read++;
                } catch (CifSyntaxException e) {
                    refused.put(path.getFileName().toString(), e.line());
                }
            }
        }
        assertEquals(new TreeMap<>(REFUSED), refused);
        assertEquals(506, read);
    }
}
