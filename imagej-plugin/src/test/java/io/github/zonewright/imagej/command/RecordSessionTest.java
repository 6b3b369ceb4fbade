package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import ij.ImagePlus;
import ij.ImageStack;
import ij.gui.Roi;
import ij.io.FileSaver;
import ij.io.Opener;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.crystal.CrystalCif;
import io.github.zonewright.document.FitDocument;
import io.github.zonewright.document.ImageReference;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.pattern.Placement;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** A record opened again, and an image that was saved with its marks. */
class RecordSessionTest {
    private static final String OPEN = "command.OpenRecord";
    private static final String FIND = "crystal=copper kilovolts=200 scale=" + TestPatterns.CONSTANT + " table=false ";

    @TempDir
    Path folder;

    private final ImagePlus image = TestPatterns.imageOfUser();

    private Path found() {
        Path record = folder.resolve("record.cif");
        assertEquals(
                Optional.empty(), Launching.macro(image, "command.FindZoneAxis", FIND + "record=[" + record + "]"));
        return record;
    }

    private static Solution solution(ImagePlus of) {
        return Sitting.of(of).chosen().orElseThrow();
    }

    private static ImagePlus throughTiff(ImagePlus saved) {
        return new Opener().deserialize(new FileSaver(saved).serialize());
    }

    @Test
    void record_onItsImage_restoresTheSession() {
        Path record = found();
        Solution kept = solution(image);
        int marks = PatternOverlay.count(image);
        ImagePlus again = TestPatterns.imageOfUser();
        again.setTitle("renamed");
        Fingerprint before = Fingerprint.of(again);
        assertEquals(Optional.empty(), Launching.macro(again, OPEN, "record=[" + record + "]"));
        assertEquals(kept, solution(again));
        assertEquals(Sitting.of(image).solutions(), Sitting.of(again).solutions(), "with what the verdict rests on");
        assertEquals(
                Sitting.of(image).measured().orElseThrow().spots(),
                Sitting.of(again).measured().orElseThrow().spots());
        assertEquals(marks, PatternOverlay.count(again));
        Instrument instrument = Instrument.of(again).orElseThrow();
        assertEquals(200, instrument.kilovolts());
        assertEquals(kept.placement().camera().constant(), instrument.cameraConstant(again));
        assertEquals("Copper", Instrument.crystalOf(again).orElseThrow().name());
        before.assertSame(again);
    }

    @Test
    void record_onAnotherImage_laysThePatternAndSaysSo() throws Exception {
        CifFile file = CifFile.read(found());
        FitDocument record = FitDocument.read(file);
        ImagePlus other = TestPatterns.image();
        other.getProcessor().set(3, 3, 1);
        RecordSession session = RecordSession.of(file, other);
        assertEquals(Optional.of(record.placement()), session.sitting().placement());
        assertEquals(Optional.empty(), session.sitting().chosen());
        assertTrue(session.sentence().contains("another") && session.sentence().contains("copper-110"));
        assertTrue(session.sentence().contains("not fitted"), session.sentence());
    }

    @Test
    void record_onALargerImage_liesAsFarFromTheMiddle() throws Exception {
        CifFile file = CifFile.read(found());
        FitDocument record = FitDocument.read(file);
        ImagePlus larger = IJ.createImage("larger", "16-bit black", 512, 300, 1);
        RecordSession session = RecordSession.of(file, larger);
        PixelPoint was = record.placement().camera().centre();
        PixelPoint is = session.sitting().placement().orElseThrow().camera().centre();
        assertEquals(was.x() - 128, is.x() - 256, 1e-9);
        assertEquals(was.y() - 128, is.y() - 150, 1e-9);
        assertTrue(session.sentence().contains("differ in size"), session.sentence());
    }

    @Test
    void record_withoutDigest_goesByNameAndSize() {
        CifFile record = FitDocument.of(TestPatterns.copper110())
                .withImage(ImageReference.of("copper-110", 256, 256))
                .toCif();
        assertFalse(RecordSession.of(record, TestPatterns.image()).sentence().contains("another"));
        ImagePlus renamed = TestPatterns.image();
        renamed.setTitle("other");
        assertTrue(RecordSession.of(record, renamed).sentence().contains("another"));
    }

    @Test
    void record_noImageOpen_opensTheOneBesideIt() throws Exception {
        FitDocument record = FitDocument.of(TestPatterns.copper110()).withImage(ImageReference.of("a.tif", 256, 256));
        new FileSaver(TestPatterns.image()).saveAsTiff(folder.resolve("a.tif").toString());
        ImagePlus beside = RecordSession.imageBeside(folder.resolve("r.cif").toFile(), record);
        assertEquals("a.tif", beside.getTitle());
    }

    @Test
    void isRecord_tellsRecordsFromCrystals() throws Exception {
        assertTrue(RecordSession.isRecord(found().toFile()));
        Path crystal = folder.resolve("crystal.cif");
        CifFile.of(CrystalCif.toBlock(TestPatterns.copper110().crystal())).write(crystal);
        assertFalse(RecordSession.isRecord(crystal.toFile()));
        assertFalse(RecordSession.isRecord(folder.toFile()));
        Optional<String> said = Launching.macro(image, OPEN, "record=[" + crystal + "]");
        assertTrue(said.orElse("").contains("crystal.cif") && said.orElse("").contains("fit"), said.toString());
    }

    @Test
    void record_missingFile_saysWhich() {
        Optional<String> said = Launching.macro(image, OPEN, "record=[" + folder.resolve("none.cif") + "]");
        assertTrue(said.orElse("").contains("none.cif"), said.toString());
    }

    @Test
    void tiff_reopened_restoresTheSession() {
        found();
        Sitting.of(image).withLabels(true).show(image);
        Fingerprint before = Fingerprint.of(image);
        int marks = PatternOverlay.count(image);
        ImagePlus again = throughTiff(image);
        before.assertSame(again);
        assertEquals(solution(image), solution(again));
        assertEquals(Sitting.of(image).solutions(), Sitting.of(again).solutions());
        assertTrue(Sitting.of(again).labelled());
        assertEquals("Copper", Instrument.crystalOf(again).orElseThrow().name());
        assertEquals(200, Instrument.of(again).orElseThrow().kilovolts());
        Sitting.of(again).show(again);
        before.assertSame(again);
        assertEquals(marks, PatternOverlay.count(again));
        assertEquals(solution(image), solution(throughTiff(again)));
    }

    @Test
    void tiff_patternLaidByHand_isRestored() {
        Placement laid = TestPatterns.copper110().turnedBy(0.2);
        Sitting.EMPTY.withPlacement(laid).show(image);
        assertEquals(Optional.of(laid), Sitting.of(throughTiff(image)).placement());
        assertEquals(Optional.of(laid), Sitting.of(image.duplicate()).placement(), "a copy of the image");
    }

    @Test
    void tiff_slices_areRestoredApart() {
        ImageStack stack = new ImageStack(TestPatterns.SIDE, TestPatterns.SIDE);
        stack.addSlice(TestPatterns.image().getProcessor());
        stack.addSlice(TestPatterns.image().getProcessor());
        ImagePlus two = new ImagePlus("two", stack);
        Placement laid = TestPatterns.copper110();
        for (int slice = 1; slice <= 2; slice++) {
            two.setSlice(slice);
            Sitting.EMPTY.withPlacement(laid.turnedBy(slice)).show(two);
        }
        ImagePlus again = throughTiff(two);
        for (int slice = 1; slice <= 2; slice++) {
            again.setSlice(slice);
            assertEquals(Optional.of(laid.turnedBy(slice)), Sitting.of(again).placement());
        }
    }

    /** The pattern's place on a cropped copy is another than that of its record. */
    @Test
    void copy_cropped_isNotClaimedToBeKnown() {
        Sitting.EMPTY.withPlacement(TestPatterns.copper110()).show(image);
        image.setRoi(new Roi(20, 20, 100, 100));
        assertEquals(Sitting.EMPTY, Sitting.of(image.crop()));
    }

    @Test
    void tiff_spoiltRecord_isNoSession() {
        Sitting.EMPTY.withPlacement(TestPatterns.copper110()).show(image);
        PatternOverlay.keep(image, "eJxLTEpOAQAE/gHNnotours");
        ImagePlus again = throughTiff(image);
        assertEquals(Sitting.EMPTY, Sitting.of(again));
        assertTrue(PatternOverlay.count(again) > 0);
    }

    @Test
    void tiff_usersInfoAndProperties_stay() throws Exception {
        image.setProperty("Info", "mine");
        image.setProp("key", "value");
        found();
        Path file = folder.resolve("saved.tif");
        assertTrue(new FileSaver(image).saveAsTiff(file.toString()) && Files.exists(file));
        ImagePlus again = IJ.openImage(file.toString());
        assertEquals("mine", again.getInfoProperty());
        assertEquals("value", again.getProp("key"));
        assertEquals(1, again.getImageProperties().size());
    }
}
