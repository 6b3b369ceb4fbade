package io.github.zonewright.document;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.TestData;
import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.calibration.MicroscopeSetting;
import io.github.zonewright.cif.CifException;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.cif.CoreDictionary;
import io.github.zonewright.spots.MeasuredValue;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.Set;
import java.util.TreeSet;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class CalibrationDocumentTest {
    private static final CoreDictionary DICTIONARY = CoreDictionary.load();

    private static Calibration calibration(String name) {
        return new Calibration(
                name,
                new MicroscopeSetting("Workshop 200", 200, OptionalDouble.of(520), OptionalDouble.of(14), 2),
                LocalDate.of(2026, 3, 1),
                "Gold",
                new MeasuredValue(931.2345678901234, 0.1 + 0.2),
                new MeasuredValue(1.0171, 3e-4),
                new MeasuredValue(0.7123456789, 0.0123),
                true,
                Optional.of(new MeasuredValue(-1.234567, 0.004)));
    }

    private static Calibration reread(Calibration calibration) {
        String text = new CalibrationDocument(calibration).toCif().toText();
        return CalibrationDocument.read(CifFile.parse(text)).calibration();
    }

    @Test
    void read_whatWasWritten_isEqual(@TempDir Path folder) throws IOException {
        Path file = folder.resolve("gold.cif");
        new CalibrationDocument(calibration("Gold, 520 mm")).write(file);
        assertEquals(calibration("Gold, 520 mm"), CalibrationDocument.read(file).calibration());
    }

    @Test
    void read_randomNumbers_areTheSameInEveryBit() {
        Random random = new Random(4);
        for (int i = 0; i < 500; i++) {
            Calibration c = new Calibration(
                    "n",
                    new MicroscopeSetting(
                            "",
                            80 + 220 * random.nextDouble(),
                            OptionalDouble.of(1000 * random.nextDouble() + 1e-9),
                            OptionalDouble.empty(),
                            1 + random.nextInt(8)),
                    LocalDate.ofEpochDay(random.nextInt(40000)),
                    "",
                    new MeasuredValue(1e4 * random.nextDouble() + 1e-9, random.nextDouble()),
                    new MeasuredValue(1 + random.nextDouble(), random.nextDouble() * 1e-3),
                    new MeasuredValue(10 * random.nextDouble() - 5, random.nextDouble()),
                    random.nextBoolean(),
                    random.nextBoolean()
                            ? Optional.empty()
                            : Optional.of(new MeasuredValue(7 * random.nextDouble() - 3, random.nextDouble())));
            assertEquals(c, reread(c));
        }
    }

    @Test
    void read_awkwardTexts_areTheSame() {
        for (String name : List.of("Größe α", "a 'b' \"c\"", "?", ".", "data_x", "line\nbreak", "#1", "_loop")) {
            assertEquals(calibration(name), reread(calibration(name)), name);
        }
    }

    @Test
    void read_faults_nameTheItem() {
        String good = new CalibrationDocument(calibration("x")).toCif().toText();
        for (String[] change : new String[][] {
            {"_zonewright_record_type", "calibration", "fit"},
            {"_audit_creation_date", "2026-03-01", "yesterday"},
            {"_zonewright_detector_binning", "2", "0"},
            {"_zonewright_camera_mirrored", "yes", "perhaps"},
            {"_diffrn_radiation_probe", "electron", "neutron"}
        }) {
            String bad = good.replaceFirst("(?m)^(" + change[0] + "\\s+)" + change[1] + "$", "$1" + change[2]);
            assertFalse(bad.equals(good), change[0]);
            CifException e =
                    assertThrows(CifException.class, () -> CalibrationDocument.read(CifFile.parse(bad)), change[0]);
            assertTrue(e.getMessage().contains(change[0]), e.getMessage());
        }
    }

    @Test
    void tags_areOfTheDictionaryOrDescribed() throws IOException {
        List<String> tags = new CalibrationDocument(calibration("x"))
                .toCif()
                .blocks()
                .get(0)
                .tags();
        Path source = TestData.path("../core/src/main/java/io/github/zonewright/document/package-info.java");
        Matcher rows =
                Pattern.compile("<tr><td>\\{@code (\\w+)}").matcher(Files.readString(source, StandardCharsets.UTF_8));
        Set<String> described = new TreeSet<>();
        while (rows.find()) {
            described.add(rows.group(1));
        }
        for (String tag : tags) {
            if (tag.startsWith("_zonewright_")) {
                assertTrue(described.contains(tag), tag);
            } else {
                assertTrue(DICTIONARY.contains(tag), tag);
            }
        }
    }

    @Test
    void folder_addListRemove(@TempDir Path parent) throws IOException {
        CalibrationFolder folder = new CalibrationFolder(parent.resolve("calibrations"));
        assertTrue(folder.list().calibrations().isEmpty());
        Path first = folder.add(calibration("Gold / 520"));
        Path second = folder.add(calibration("Gold: 520"));
        assertEquals("Gold-520.cif", first.getFileName().toString());
        assertEquals("Gold-520-2.cif", second.getFileName().toString());
        assertEquals(
                List.of("Gold / 520", "Gold: 520"),
                folder.list().calibrations().stream()
                        .map(k -> k.calibration().name())
                        .toList());
        Calibration newer = calibration("Gold / 520").forBinning(1);
        assertEquals(first, folder.add(newer));
        assertEquals(Optional.of(newer), folder.list().find("Gold / 520"));
        assertEquals(2, folder.list().calibrations().size());
        assertTrue(folder.remove("Gold / 520"));
        assertFalse(folder.remove("Gold / 520"));
        assertFalse(Files.exists(first));
        assertTrue(Files.exists(second));
    }

    @Test
    void folder_rename(@TempDir Path parent) throws IOException {
        CalibrationFolder folder = new CalibrationFolder(parent);
        folder.add(calibration("Gold"));
        folder.add(calibration("Evening"));
        assertThrows(IllegalArgumentException.class, () -> folder.rename("Silver", "Morning"));
        assertThrows(IllegalArgumentException.class, () -> folder.rename("Gold", "Evening"));
        assertThrows(IllegalArgumentException.class, () -> folder.rename("Gold", " "));
        assertEquals(calibration("Morning"), folder.rename("Gold", "Morning"));
        assertEquals(
                List.of(calibration("Evening"), calibration("Morning")),
                folder.list().calibrations().stream()
                        .map(CalibrationFolder.Kept::calibration)
                        .toList());
    }

    @Test
    void folder_unreadableFiles_areReportedAndLeftAlone(@TempDir Path path) throws IOException {
        Files.writeString(path.resolve("broken.cif"), "data_x\nloop_\n", StandardCharsets.UTF_8);
        Files.writeString(path.resolve("other.cif"), "data_x\n_cell_length_a 4\n", StandardCharsets.UTF_8);
        Files.writeString(path.resolve("notes.txt"), "gold", StandardCharsets.UTF_8);
        CalibrationFolder folder = new CalibrationFolder(path);
        folder.add(calibration("good"));
        CalibrationFolder.Contents contents = folder.list();
        assertEquals(1, contents.calibrations().size());
        assertEquals(
                List.of("broken.cif", "other.cif"),
                contents.unreadable().stream()
                        .map(u -> u.file().getFileName().toString())
                        .toList());
        assertTrue(contents.unreadable().stream().noneMatch(u -> u.reason().isBlank()));
        assertThrows(IOException.class, () -> new CalibrationFolder(path.resolve("notes.txt")).list());
    }
}
