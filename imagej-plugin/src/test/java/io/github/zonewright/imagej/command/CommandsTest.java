package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.gui.Overlay;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.pattern.Placement;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The commands as a macro runs them, with no display. */
class CommandsTest {
    private static final String LAY = "command.LayPattern";
    private static final String FIND = "command.FindZoneAxis";
    private static final String COPPER = "crystal=copper kilovolts=200 scale=" + TestPatterns.CONSTANT + " ";

    private final ImagePlus image = TestPatterns.imageOfUser();

    @Test
    void layPattern_liesWhereItWasTold() {
        Fingerprint before = Fingerprint.of(image);
        String options = COPPER + "zone=[1 1 0] reference=[1 -1 1] rotation=-40 centre=[130.3, 125.8]";
        assertEquals(Optional.empty(), Launching.macro(image, LAY, options));
        Placement expected = TestPatterns.copper110();
        Placement laid = Sitting.of(image).placement().orElseThrow();
        assertEquals(expected.setting(), laid.setting());
        assertEquals(expected.camera(), laid.camera());
        assertTrue(PatternOverlay.count(image) > 10);
        before.assertSame(image);
    }

    @Test
    void layPattern_scaleFromTheImage() {
        String options = "crystal=copper kilovolts=200 scalekind=[image calibration] zone=[0 0 1]";
        assertEquals(Optional.empty(), Launching.macro(image, LAY, options));
        double constant = Sitting.of(image).placement().orElseThrow().camera().constant();
        assertEquals(TestPatterns.CONSTANT, constant, 1e-9);
    }

    /** K = λL/p: 200 kV (0.025079 Å), 500 mm, 24 µm pixels give 522.5 px·Å; with binning 2 half of it. */
    @Test
    void layPattern_scaleFromTheCameraLength() {
        String options = "crystal=copper kilovolts=200 scalekind=[camera length] scale=500 pixelsize=24 binning=2";
        assertEquals(Optional.empty(), Launching.macro(image, LAY, options));
        double constant = Sitting.of(image).placement().orElseThrow().camera().constant();
        assertEquals(522.5 / 2, constant, 0.05);
    }

    @Test
    void layPattern_newImage_needsNoneOpen() {
        LayPattern command = new LayPattern();
        CommandParameter.of(command).stream()
                .filter(CommandParameter::isAsked)
                .forEach(p -> p.readMacro(COPPER + "target=[new image] side=128 "));
        command.run();
        assertTrue(!command.isCanceled(), command.getCancelReason());
    }

    @Test
    void layPattern_indices_addLabels() {
        Launching.macro(image, LAY, COPPER + "zone=[1 1 0]");
        int without = PatternOverlay.count(image);
        Launching.macro(image, LAY, COPPER + "zone=[1 1 0] indices");
        assertTrue(PatternOverlay.count(image) > without);
    }

    @Test
    void removeMarks_leavesTheUsersElements() {
        Fingerprint before = Fingerprint.of(image);
        Launching.macro(image, LAY, COPPER);
        assertEquals(Optional.empty(), Launching.macro(image, "command.RemoveMarks", ""));
        before.assertSame(image);
        assertEquals(0, PatternOverlay.count(image));
        assertEquals(Optional.empty(), Sitting.of(image).placement());
    }

    @Test
    void findZoneAxis_findsWhatWasMade(@TempDir Path folder) {
        Fingerprint before = Fingerprint.of(image);
        Path record = folder.resolve("record.cif");
        Path spots = folder.resolve("spots.csv");
        Path report = folder.resolve("report.html");
        String files = "record=[" + record + "] spots=[" + spots + "] report=[" + report + "]";
        String options = COPPER + "table=false " + files;
        assertEquals(Optional.empty(), Launching.macro(image, FIND, options));
        before.assertSame(image);
        // The workbench, opened afterwards, shows what the command was told.
        assertEquals(TestPatterns.CONSTANT, Instrument.of(image).orElseThrow().scale(), 1e-9);
        assertEquals("Copper", Instrument.crystalOf(image).orElseThrow().name());
        Placement found = Sitting.of(image).placement().orElseThrow();
        double between = found.camera()
                .centre()
                .distanceTo(TestPatterns.copper110().camera().centre());
        assertTrue(between < 0.5, "centre off by " + between + " px");
        assertEquals(
                1,
                Math.abs(found.setting().zone().largestIndex()),
                "zone " + found.setting().zone());
        assertTrue(Files.exists(record) && Files.exists(spots) && Files.exists(report));
    }

    @Test
    void findZoneAxis_missingFolder_saysWhichFile(@TempDir Path folder) {
        Path record = folder.resolve("no such folder").resolve("record.cif");
        Optional<String> said = Launching.macro(image, FIND, COPPER + "table=false record=[" + record + "]");
        assertTrue(said.orElse("").contains("record.cif"), said.toString());
    }

    @Test
    void sitting_isKeptBySlice() {
        Launching.macro(image, LAY, COPPER);
        assertTrue(Sitting.of(image).placement().isPresent());
        assertEquals(Sitting.EMPTY, Sitting.of(TestPatterns.image()));
    }

    @Test
    void hiddenOverlay_staysHidden() {
        Overlay before = image.getOverlay();
        image.setHideOverlay(true);
        Launching.macro(image, LAY, COPPER);
        assertTrue(image.getHideOverlay());
        assertEquals(before, image.getOverlay());
    }
}
