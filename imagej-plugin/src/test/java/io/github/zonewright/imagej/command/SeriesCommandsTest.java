package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import ij.ImagePlus;
import ij.Prefs;
import ij.io.FileSaver;
import ij.measure.ResultsTable;
import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.calibration.MicroscopeSetting;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.SeriesPatterns;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.AppliedCalibration;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.spots.MeasuredValue;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.Stream;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Whole stacks and folders as a macro runs them, with no display. */
class SeriesCommandsTest {
    private static final String STACK = "command.FindInStack";
    private static final String FOLDER = "command.FindInFolder";
    private static final String COPPER = "crystal=copper kilovolts=200 scale=" + TestPatterns.CONSTANT + " ";

    private static final String KEPT = "crystal=copper kilovolts=200 scalekind=[kept calibration]";

    private final int threads = Prefs.getThreads();

    @TempDir
    private Path folder;

    @AfterEach
    void threadsAsBefore() {
        Prefs.setThreads(threads);
    }

    private ResultsTable run(ImagePlus image, String command, String options) throws IOException {
        Path rows = folder.resolve("rows.csv");
        assertEquals(Optional.empty(), Launching.macro(image, command, COPPER + options + " rows=[" + rows + "]"));
        return ResultsTable.open(rows.toString());
    }

    private static List<String> column(ResultsTable table, String name) {
        return Arrays.asList(table.getColumnAsStrings(name));
    }

    @Test
    void stack_oneRowPerSlice_andTheUsersThingsStay() throws IOException {
        for (String follow : new String[] {"", " follow"}) {
            ImagePlus image = SeriesPatterns.stack();
            image.setSlice(2);
            image.setRoi(10, 20, 30, 40);
            Fingerprint before = Fingerprint.of(image);
            ResultsTable table = run(image, STACK, follow);
            before.assertSame(image);
            assertEquals(2, image.getCurrentSlice());
            assertEquals(List.of("1", "2", "3", "4", "5", "6"), column(table, "frame"));
            assertEquals("t = 4 s", column(table, "label").get(4));
            for (int slice = 1; slice <= SeriesPatterns.SLICES; slice++) {
                int row = slice - 1;
                if (slice == SeriesPatterns.BLANK) {
                    assertEquals("open", column(table, "verdict").get(row));
                    assertEquals("", column(table, "zone axis").get(row));
                    assertTrue(column(table, "reason").get(row).contains("0 diffraction spots"));
                    continue;
                }
                assertEquals("settled", column(table, "verdict").get(row), "slice " + slice);
                double x = SeriesPatterns.placement(slice).camera().centre().x();
                assertEquals(x, table.getValue("x centre (px)", row), 0.3);
                assertEquals("Copper", column(table, "crystal").get(row));
                boolean followed = !follow.isEmpty() && slice > 1;
                assertEquals(followed ? "yes" : "no", column(table, "followed").get(row));
                if (slice > 1 && slice != SeriesPatterns.BLANK + 1) {
                    // Turned in the image by the step; leans are uncertain by some tenths of a degree.
                    assertEquals(SeriesPatterns.STEP, table.getValue("turned (°)", row), 0.6);
                }
            }
        }
    }

    @Test
    void stack_eachSliceKeepsItsAnswer() throws IOException {
        ImagePlus image = SeriesPatterns.stack();
        run(image, STACK, "first=2 last=5 follow indices");
        assertEquals(Sitting.EMPTY, Sitting.of(image));
        for (int slice = 2; slice <= 5; slice++) {
            image.setSlice(slice);
            Sitting sitting = Sitting.of(image);
            assertTrue(sitting.measured().isPresent());
            assertTrue(sitting.labelled());
            assertEquals(slice != SeriesPatterns.BLANK, sitting.chosen().isPresent());
            if (slice != SeriesPatterns.BLANK) {
                Solution solution = sitting.chosen().get();
                double off = solution.placement()
                        .camera()
                        .centre()
                        .distanceTo(SeriesPatterns.placement(slice).camera().centre());
                assertTrue(off < 0.3, "slice " + slice + ": centre off by " + off + " px");
                sitting.show(image);
                assertTrue(PatternOverlay.count(image) > 10);
                assertEquals(sitting, Sitting.of(image));
            }
        }
        Launching.macro(image, "command.RemoveMarks", "");
        for (int slice = 1; slice <= SeriesPatterns.SLICES; slice++) {
            image.setSlice(slice);
            assertTrue(Sitting.of(image).placement().isEmpty());
        }
    }

    /** A calibration in use holds scale and ellipse for every frame. */
    @Test
    void keptCalibration_holdsScaleAndEllipse() throws IOException {
        double ratio = 1.0004;
        Calibration calibration = new Calibration(
                "Bench",
                new MicroscopeSetting("", 200, OptionalDouble.empty(), OptionalDouble.empty(), 1),
                LocalDate.now(),
                "Gold",
                new MeasuredValue(TestPatterns.CONSTANT, 0.01 * TestPatterns.CONSTANT),
                new MeasuredValue(ratio, 1e-9),
                new MeasuredValue(0.5, 1e-9),
                false,
                Optional.empty());
        ImagePlus image = SeriesPatterns.stack();
        Optional<String> none = Launching.macro(image, STACK, KEPT);
        assertTrue(none.orElse("").contains("no calibration is in use"), none.toString());
        Instrument.last().with(AppliedCalibration.of(calibration), 1).keepWith(image);
        assertEquals(Optional.empty(), Launching.macro(image, STACK, KEPT + " last=1"));
        image.setSlice(1);
        Solution first = Sitting.of(image).chosen().orElseThrow();
        assertEquals(ratio, first.placement().camera().ellipseRatio(), 1e-6);
        assertEquals(
                Optional.of("Bench"),
                Instrument.of(image).orElseThrow().calibration().map(Calibration::name));
    }

    /** What the light form of a slice has forgotten is measured again when somebody refines there. */
    @Test
    void stack_keptAnswer_canBeRefined() throws IOException {
        ImagePlus image = SeriesPatterns.stack();
        run(image, STACK, "first=3 last=3");
        image.setSlice(3);
        Sitting sitting = Sitting.of(image);
        Solution again = io.github.zonewright.indexing.Refinement.refine(
                        sitting.measured().orElseThrow(), sitting.placement().orElseThrow())
                .orElseThrow();
        assertEquals(
                sitting.chosen().orElseThrow().matches().size(), again.matches().size());
    }

    @Test
    void virtualStack_readsOneSliceAtATime_eachOnce() throws IOException {
        SeriesPatterns.Counting slices = new SeriesPatterns.Counting(5);
        ImagePlus image = new ImagePlus("virtual", slices);
        int before = slices.all();
        Prefs.setThreads(4);
        ResultsTable table = run(image, STACK, "");
        assertEquals(1, slices.most());
        assertEquals(SeriesPatterns.SLICES, slices.all() - before);
        assertEquals(List.of("settled", "settled", "settled", "open", "open", "settled"), column(table, "verdict"));
        assertTrue(
                column(table, "reason").get(4).contains("no such sector"),
                column(table, "reason").get(4));
    }

    @Test
    void stack_sameRowsWhateverTheThreads() throws IOException {
        for (String follow : new String[] {"", "follow"}) {
            Prefs.setThreads(1);
            run(SeriesPatterns.stack(), STACK, follow);
            String one = Files.readString(folder.resolve("rows.csv"), StandardCharsets.UTF_8);
            Prefs.setThreads(3);
            run(SeriesPatterns.stack(), STACK, follow);
            assertEquals(one, Files.readString(folder.resolve("rows.csv"), StandardCharsets.UTF_8));
        }
    }

    @Test
    void stack_esc_keepsTheRowsSoFar() throws IOException {
        Prefs.setThreads(1);
        SeriesPatterns.Counting slices = new SeriesPatterns.Counting(0) {
            @Override
            public ij.process.ImageProcessor getProcessor(int n) {
                if (n == 4) {
                    IJ.setKeyDown(java.awt.event.KeyEvent.VK_ESCAPE);
                }
                return super.getProcessor(n);
            }
        };
        ImagePlus image = new ImagePlus("virtual", slices);
        ResultsTable table = run(image, STACK, "");
        assertTrue(table.size() >= 1 && table.size() < SeriesPatterns.SLICES, table.size() + " rows");
        IJ.resetEscape();
        image.setSlice(1);
        assertTrue(Sitting.of(image).chosen().isPresent());
        image.setSlice(6);
        assertTrue(Sitting.of(image).chosen().isEmpty());
    }

    @Test
    void stack_noSuchSlices_isRefused() {
        ImagePlus image = SeriesPatterns.stack();
        assertTrue(Launching.macro(image, STACK, COPPER + "first=7").orElse("").contains("7, expected 1 to 6"));
        assertTrue(Launching.macro(image, STACK, COPPER + "first=3 last=2")
                .orElse("")
                .contains("2, expected 3 to 6"));
        assertTrue(Launching.macro(null, STACK, COPPER).orElse("").contains("o image is open"));
    }

    @Test
    void records_oneForEachAnswer() throws IOException {
        Path records = folder.resolve("of/records");
        run(SeriesPatterns.stack(), STACK, "records=[" + records + "]");
        try (Stream<Path> files = Files.list(records)) {
            List<Path> found = files.sorted().toList();
            assertEquals(5, found.size(), found.toString());
            assertEquals("00001-t_0_s.cif", found.get(0).getFileName().toString());
            String text = Files.readString(found.get(1), StandardCharsets.UTF_8);
            assertTrue(text.contains("drifting, slice 2"), text);
        }
    }

    @Test
    void folder_oneRowPerFile_alsoForWhatIsNoImage() throws IOException {
        Path images = Files.createDirectory(folder.resolve("images"));
        for (int slice : new int[] {1, 2, 10}) {
            ImagePlus image = new ImagePlus("", TestPatterns.pixels(SeriesPatterns.placement(slice)));
            assertTrue(new FileSaver(image)
                    .saveAsTiff(images.resolve("frame " + slice + ".tif").toString()));
        }
        byte[] whole = Files.readAllBytes(images.resolve("frame 2.tif"));
        Files.write(images.resolve("frame 3.tif"), Arrays.copyOf(whole, 300));
        Files.writeString(images.resolve("notes.txt"), "tilted by hand\n");
        Files.createDirectory(images.resolve("older"));
        Path records = folder.resolve("records");
        ResultsTable table = run(null, FOLDER, "folder=[" + images + "] records=[" + records + "]");
        assertEquals(
                List.of("frame 1.tif", "frame 2.tif", "frame 3.tif", "frame 10.tif", "notes.txt"),
                column(table, "label"));
        assertEquals(List.of("settled", "settled", "open", "settled", "open"), column(table, "verdict"));
        List<String> reasons = column(table, "reason");
        assertTrue(
                reasons.get(2).contains("cut short: it has 300 bytes, expected at least 131072"), reasons.toString());
        assertTrue(reasons.get(4).contains("no image that ImageJ can read"), reasons.toString());
        assertTrue(Files.exists(records.resolve("00004-frame_10.tif.cif")));
    }

    @Test
    void folder_thatIsNone_isRefused() throws IOException {
        Path none = folder.resolve("none");
        assertTrue(Launching.macro(null, FOLDER, COPPER + "folder=[" + none + "]")
                .orElse("")
                .contains("expected a folder that can be read"));
        Path empty = Files.createDirectory(folder.resolve("empty"));
        assertTrue(Launching.macro(null, FOLDER, COPPER + "folder=[" + empty + "]")
                .orElse("")
                .contains("is empty"));
        Files.writeString(empty.resolve("notes.txt"), "tilted by hand\n");
        assertTrue(Launching.macro(null, FOLDER, COPPER + "folder=[" + empty + "] scalekind=[image calibration]")
                .orElse("")
                .contains("no image to take it from"));
    }
}
