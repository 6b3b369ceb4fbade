package io.github.zonewright.imagej.session;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import ij.ImagePlus;
import ij.Prefs;
import ij.gui.Roi;
import ij.io.FileSaver;
import ij.io.Opener;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.crystal.AtomSite;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalCif;
import io.github.zonewright.document.FitDocument;
import io.github.zonewright.document.FitHandling;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.TwinPattern;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.command.Launching;
import io.github.zonewright.imagej.command.RecordSession;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.overlay.ShownMarks;
import io.github.zonewright.indexing.Grain;
import io.github.zonewright.indexing.Verdict;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.MeasuredSpot;
import io.github.zonewright.spots.SpotEdit;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.EnumSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** What a record keeps beside the fit: further crystals, what tells apart, what was set by hand. */
class RecordOfSessionTest {
    private static final String FIND = "crystal=copper kilovolts=200 scale=" + TestPatterns.CONSTANT + " table=false ";

    @TempDir
    Path folder;

    @AfterEach
    void forget() {
        Prefs.set("zonewright.shown", "");
    }

    private static void run(ImagePlus image, String command, String options) {
        assertEquals(Optional.empty(), Launching.macro(image, "command." + command, options));
    }

    private Path kept(ImagePlus image) {
        Path record = folder.resolve("record.cif");
        run(image, "KeepSolution", "record=[" + record + "]");
        return record;
    }

    private static ImagePlus throughTiff(ImagePlus saved) {
        return new Opener().deserialize(new FileSaver(saved).serialize());
    }

    /** Where half a turn about the zone axis is left open. */
    private static ImagePlus copper111() {
        ZoneSetting setting = ZoneSetting.onZone(new Uvw(1, 1, 1), new Hkl(2, -2, 0), 0.3);
        return new ImagePlus(
                "copper-111", TestPatterns.pixels(TestPatterns.copper110().withSetting(setting)));
    }

    @Test
    void grains_comeBackFromRecordAndTiff() throws Exception {
        ImagePlus image = TwinPattern.image();
        run(image, "FindZoneAxis", FIND);
        run(image, "SearchLeftovers", "table=false");
        List<Grain> grains = Sitting.of(image).findings().grains();
        assertEquals(1, grains.size());
        int marks = PatternOverlay.count(image);
        ImagePlus again = TwinPattern.image();
        Path record = kept(image);
        run(again, "OpenRecord", "record=[" + record + "]");
        assertEquals(grains, Sitting.of(again).findings().grains());
        assertEquals(marks, PatternOverlay.count(again));
        assertEquals(grains, Sitting.of(throughTiff(image)).findings().grains());
        String text = Files.readString(record);
        assertTrue(text.contains("Sigma 3"), text);
    }

    @Test
    void report_tellsOfGrains() throws Exception {
        ImagePlus image = TwinPattern.image();
        run(image, "FindZoneAxis", FIND);
        run(image, "SearchLeftovers", "table=false");
        Path report = folder.resolve("report.html");
        run(image, "KeepSolution", "report=[" + report + "]");
        String html = Files.readString(report);
        assertTrue(
                html.contains("Further crystals") && html.contains("Σ3") && html.contains("Settled, with a twin"),
                html);
    }

    /** Quartz along a zone that others equal (testdata/patterns, column {@code unique} of truth.csv). */
    @Test
    void reportOfATie_saysWhatTellsApart() throws Exception {
        ImagePlus image = IJ.openImage("../testdata/patterns/clean_008.tif");
        Path report = folder.resolve("tie.html");
        run(
                image,
                "FindZoneAxis",
                "crystal=quartz kilovolts=300 scale=156.956 tolerance=1 table=false report=[" + report + "]");
        assertInstanceOf(Verdict.Tied.class, Sitting.of(image).verdict());
        String html = Files.readString(report);
        assertTrue(html.contains("What tells apart") && html.contains("Tied: "), html);
        assertEquals(Optional.empty(), Sitting.of(image).findings().apart(), "the image shows what it did");
    }

    @Test
    void whatTellsApart_comesBack() throws Exception {
        ImagePlus image = copper111();
        run(image, "FindZoneAxis", FIND);
        run(image, "TellApart", "solution=1");
        var told = Sitting.of(image).findings().apart().orElseThrow();
        assertTrue(told.tilt().isPresent() && told.other().equals("half a turn"), told.toString());
        ImagePlus again = copper111();
        run(again, "OpenRecord", "record=[" + kept(image) + "]");
        assertEquals(told, Sitting.of(again).findings().apart().orElseThrow());
    }

    /** Spots added, moved and removed, the centre, the hidden area and the thickness: the same spots as when they were kept. */
    @Test
    void changesByHand_areMadeAgain() throws Exception {
        ImagePlus image = TestPatterns.image();
        image.setRoi(new Roi(0, 0, 40, 30));
        run(image, "HideArea", "area=[Hide the selection alone]");
        image.deleteRoi();
        List<MeasuredSpot> spots = Sitting.of(image).measured().orElseThrow().spots();
        MeasuredSpot gone = spots.get(spots.size() - 1);
        run(image, "EditSpots", "edit=[remove a spot] " + at(gone));
        run(image, "EditSpots", "edit=[remove a spot] " + at(spots.get(3)));
        run(image, "EditSpots", "edit=[add a spot] " + at(gone));
        run(image, "EditSpots", "edit=[set the centre] x=128.4 y=127.1");
        run(image, "FindZoneAxis", FIND);
        Sitting before = Sitting.of(image).withThickness(321);
        before.show(image);
        assertEquals(4, before.measurement().edits().size());
        Path record = kept(image);
        ImagePlus again = TestPatterns.image();
        run(again, "OpenRecord", "record=[" + record + "]");
        Sitting after = Sitting.of(again);
        assertEquals(before.measurement().edits(), after.measurement().edits());
        assertEquals(
                before.measurement().how().hidden(), after.measurement().how().hidden());
        assertEquals(321, after.thickness());
        assertSamePattern(before.measured().orElseThrow(), after.measured().orElseThrow());
        assertTrue(after.measured()
                .orElseThrow()
                .isByHand(after.measured().orElseThrow().spots().stream()
                        .filter(s -> s.position().equals(gone.position()))
                        .findFirst()
                        .orElseThrow()));
        assertEquals(before.chosen(), after.chosen());

        ImagePlus reopened = throughTiff(image);
        Sitting there = Sitting.of(reopened);
        assertEquals(321, there.thickness());
        assertEquals(before.measurement().edits(), there.measurement().edits());
        Sitting measured = Measuring.asNeeded(reopened, there);
        assertSamePattern(before.measured().orElseThrow(), measured.measured().orElseThrow());
    }

    private static String at(MeasuredSpot spot) {
        return "x=" + spot.position().x() + " y=" + spot.position().y();
    }

    private static void assertSamePattern(MeasuredPattern a, MeasuredPattern b) {
        assertEquals(a.spots(), b.spots());
        assertEquals(a.centres(), b.centres());
        assertEquals(a.hidden(), b.hidden());
    }

    /** What cannot be done again is said, and the rest is done. */
    @Test
    void changeThatCannotBeMadeAgain_isSaid() {
        ImagePlus image = TestPatterns.image();
        run(image, "FindZoneAxis", FIND);
        FitDocument document = SittingRecord.of(Sitting.of(image), image, ImagePixels.reference(image))
                .orElseThrow();
        var set = document.handling();
        SpotEdit nowhere = new SpotEdit(SpotEdit.Way.REMOVE, new PixelPoint(3, 3), Optional.empty());
        CifFile file = document.withHandling(
                        new FitHandling(set.thickness(), set.darkSpots(), set.hidden(), List.of(nowhere), set.shown()))
                .toCif();
        RecordSession session = RecordSession.of(file, TestPatterns.image());
        assertTrue(session.sentence().contains("1 of 1 changes"), session.sentence());
        assertTrue(session.sitting().chosen().isPresent());
    }

    /** Each image has its own marks, and a record those of its image. */
    @Test
    void marks_belongToTheImage() throws Exception {
        ImagePlus first = TestPatterns.image();
        run(first, "FindZoneAxis", FIND);
        run(first, "ShowMarks", "indices=true legend=true scalebar=true");
        ImagePlus second = TestPatterns.image();
        run(second, "FindZoneAxis", FIND);
        run(second, "ShowMarks", "lauecircle=true");
        assertEquals(EnumSet.of(ShownMarks.LEGEND, ShownMarks.SCALE_BAR), ShownMarks.of(first));
        assertEquals(EnumSet.of(ShownMarks.LAUE_CIRCLE), ShownMarks.of(second));
        Path record = kept(first);
        assertEquals(
                Set.of("indices", "legend", "scale_bar"),
                FitDocument.read(record).handling().shown());
        run(second, "OpenRecord", "record=[" + record + "]");
        assertEquals(EnumSet.of(ShownMarks.LEGEND, ShownMarks.SCALE_BAR), ShownMarks.of(second));
        assertTrue(Sitting.of(second).labelled());
        ImagePlus reopened = throughTiff(first);
        assertTrue(Sitting.of(reopened).labelled());
        assertEquals(ShownMarks.of(first), ShownMarks.of(reopened));
    }

    /** A crystal that stands nowhere but in a loose CIF file, which is gone when the record is opened. */
    @Test
    void crystalOfALooseFile_standsInTheRecord() throws Exception {
        Crystal odd = Crystal.of(
                "Odd copper",
                Lattice.cubic(3.6149),
                "F m -3 m",
                AtomSite.of("Cu", 0, 0, 0).withOccupancy(0.97));
        Path loose = folder.resolve("odd.cif");
        CifFile.of(CrystalCif.toBlock(odd)).write(loose);
        ImagePlus image = TestPatterns.image();
        Path record = folder.resolve("odd-record.cif");
        run(image, "FindZoneAxis", FIND + "cif=[" + loose + "] record=[" + record + "]");
        Files.delete(loose);
        List<String> tags = CifFile.read(record).blocks().get(0).tags();
        for (String tag : List.of(
                "_cell_length_a",
                "_cell_angle_gamma",
                "_space_group_name_H-M_alt",
                "_space_group_symop_operation_xyz",
                "_atom_site_label",
                "_atom_site_type_symbol",
                "_atom_site_fract_z",
                "_atom_site_occupancy")) {
            assertTrue(tags.contains(tag), tag);
        }
        ImagePlus again = TestPatterns.image();
        run(again, "OpenRecord", "record=[" + record + "]");
        Crystal back = Instrument.crystalOf(again).orElseThrow();
        assertEquals(odd.lattice(), back.lattice());
        assertEquals(odd.sites(), back.sites());
        assertEquals(Sitting.of(image).chosen(), Sitting.of(again).chosen());
        assertFalse(Files.exists(loose));
        run(image, "FindZoneAxis", FIND + "cif=[" + record + "]");
        assertEquals(
                back.sites(),
                Instrument.crystalOf(image).orElseThrow().sites(),
                "the record is a CIF of the crystal too");
    }
}
