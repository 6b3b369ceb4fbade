package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import ij.ImagePlus;
import ij.io.FileSaver;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.TwinPattern;
import io.github.zonewright.imagej.session.Keep;
import io.github.zonewright.imagej.session.Search;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.Leftovers;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.MeasuredPattern;
import java.io.IOException;
import java.nio.file.Path;
import java.util.List;
import javax.swing.JEditorPane;
import javax.swing.JFrame;
import javax.swing.JTable;
import javax.swing.JTextField;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The session restored in the workbench on a real ImageJ: from a record that is dropped, from an image saved with its marks. */
@Tag("window")
class RecordDropTest {
    @TempDir
    Path folder;

    private final ImagePlus own = TestPatterns.imageOfUser();
    private final MeasuredPattern measured = Search.measure(own);
    private final Solution solution = new Search(
                    CrystalShelf.find("copper").orElseThrow(),
                    Beam.ofKilovolts(200),
                    TestPatterns.CONSTANT,
                    0.03,
                    false)
            .run(measured, part -> {}, () -> false)
            .best()
            .orElseThrow();
    private Path record;

    @BeforeEach
    void start() throws IOException {
        Screen.start();
        Screen.userFolder(folder);
        record = folder.resolve("record.cif");
        Keep.record(solution, own, record.toFile());
    }

    @AfterEach
    void close() {
        Screen.clear();
    }

    @Test
    void dropped_onItsImage_restoresTheSession() {
        Fingerprint before = Fingerprint.of(own);
        Screen.show(own);
        JFrame frame = Screen.workbench();
        Screen.drop(frame, record);
        Screen.await(() -> Sitting.of(own).chosen().isPresent());
        Screen.await(() -> Screen.guide(frame).contains("keep the record"));
        assertEquals(solution, Sitting.of(own).chosen().orElseThrow());
        assertEquals(1, Screen.find(frame, "solutions", JTable.class).getRowCount());
        assertEquals("200", Screen.find(frame, "kilovolts", JTextField.class).getText());
        before.assertSame(own);
        Screen.click(frame, "Refine");
        Screen.await(() -> Screen.guide(frame).contains("keep the record"));
        Screen.click(frame, "Undo");
        Screen.click(frame, "Undo");
        assertTrue(Sitting.of(own).chosen().isEmpty());
    }

    /** Further crystals, thickness and a hand-made hidden area come back with the record; the window tells of the crystals. */
    @Test
    void dropped_withFurtherCrystals_showsThem() throws IOException {
        ImagePlus twins = TwinPattern.image();
        MeasuredPattern spots = Search.measure(twins);
        Solution first = new Search(
                        CrystalShelf.find("copper").orElseThrow(),
                        Beam.ofKilovolts(200),
                        TestPatterns.CONSTANT,
                        0.03,
                        false)
                .run(spots, part -> {}, () -> false)
                .best()
                .orElseThrow();
        Leftovers.Result found =
                Leftovers.of(List.of(first.placement().crystal())).search(spots, first);
        Sitting kept =
                Sitting.EMPTY.withMeasured(spots).withSolutions(List.of(first)).withThickness(250);
        kept.withFindings(kept.findings().withGrains(found.grains())).show(twins);
        Keep.record(first, twins, record.toFile());
        ImagePlus again = Screen.show(TwinPattern.image());
        JFrame frame = Screen.workbench();
        Screen.drop(frame, record);
        Screen.await(() -> !Sitting.of(again).findings().grains().isEmpty());
        assertEquals(found.grains(), Sitting.of(again).findings().grains());
        assertEquals(250, Sitting.of(again).thickness());
        Screen.click(frame, "Left over…");
        JFrame window = Screen.window("questions window");
        Screen.await(() ->
                Screen.find(window, "left over", JEditorPane.class).getText().contains("twin on ("));
    }

    @Test
    void dropped_onAnotherImage_laysThePattern() {
        ImagePlus other = TestPatterns.image();
        other.getProcessor().set(0, 0, 17);
        Screen.show(other);
        JFrame frame = Screen.workbench();
        Screen.drop(frame, record);
        Screen.await(() -> Sitting.of(other).placement().isPresent());
        assertEquals(solution.placement(), Sitting.of(other).placement().orElseThrow());
        assertTrue(Sitting.of(other).chosen().isEmpty());
    }

    @Test
    void tiff_reopened_showsTheSession() {
        Sitting.EMPTY.withMeasured(measured).withSolutions(List.of(solution)).show(own);
        Path file = folder.resolve("kept.tif");
        assertTrue(new FileSaver(own).saveAsTiff(file.toString()));
        ImagePlus again = Screen.show(IJ.openImage(file.toString()));
        JFrame frame = Screen.workbench();
        Screen.await(() -> Screen.guide(frame).contains("keep the record"));
        assertEquals(solution, Sitting.of(again).chosen().orElseThrow());
        assertEquals(
                solution.placement().setting().zone().toString(),
                Screen.find(frame, "zone", JTextField.class).getText());
    }
}
