package io.github.zonewright.document;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.cif.CifBlock;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.cif.CifValue;
import io.github.zonewright.cif.CifVersion;
import io.github.zonewright.crystal.AtomSite;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalCif;
import io.github.zonewright.crystal.Displacement;
import io.github.zonewright.crystal.Element;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.Mask;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.SolutionErrors;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.PatternSimulator;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.OffsetDateTime;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.Set;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class FitDocumentTest {
    private static final String DIGEST = "0123456789abcdef".repeat(4);

    private static FitDocument reread(FitDocument document) {
        return FitDocument.read(CifFile.parse(document.toCif().toText()));
    }

    private static String text(String tag, FitDocument document) {
        return document.toCif().blocks().get(0).value(tag).orElseThrow().text();
    }

    @Test
    void read_everythingSet_isEqual(@TempDir Path folder) throws IOException {
        FitDocument document = FitDocument.of(FitSamples.ordinary())
                .withImage(ImageReference.of("impeller-07.tif", 1024, 768).withSha256(DIGEST))
                .createdAt(OffsetDateTime.parse("2026-03-01T14:05:00+01:00"))
                .createdBy("Zonewright 0.1.0");
        Path file = folder.resolve("impeller-07.cif");
        document.write(file);
        assertEquals(document, FitDocument.read(file));
    }

    /** Other solutions share the record's crystal, so the file holds it once; one of another crystal brings its own. */
    @Test
    void others_areReadBackInEveryBit() {
        Random random = new Random(15);
        Placement placement = FitSamples.placement(FitSamples.NICKEL, random);
        Solution first = FitSamples.solution(placement, 5, 2, random);
        Solution same = FitSamples.solution(FitSamples.placement(FitSamples.NICKEL, random), 4, 3, random);
        Solution other = FitSamples.solution(FitSamples.placement(FitSamples.triclinic(random), random), 4, 3, random);
        CifFile file =
                CifFile.parse(FitDocument.of(first).toCif(List.of(same, other)).toText());
        assertEquals(FitDocument.of(first), FitDocument.read(file));
        assertEquals(List.of(same, other), FitDocument.others(file));
        assertEquals(2, CrystalCif.structures(file).size());
        assertEquals(List.of(), FitDocument.others(FitDocument.of(first).toCif()));
    }

    @Test
    void isIn_tellsRecordsFromOtherFiles() {
        assertTrue(FitDocument.isIn(FitDocument.of(FitSamples.ordinary()).toCif()));
        assertFalse(FitDocument.isIn(CifFile.of(CrystalCif.toBlock(FitSamples.NICKEL))));
    }

    @Test
    void read_nothingSet_isEqual() {
        FitDocument document = FitDocument.of(FitSamples.placement(FitSamples.NICKEL, new Random(1)));
        assertEquals(document, reread(document));
    }

    /** 200 documents, each with 25 numbers of its own and 12 spots of 5 to 7: 19,000 doubles. */
    @Test
    void read_tenThousandRandomNumbers_areTheSameInEveryBit() {
        Random random = new Random(2);
        for (int i = 0; i < 200; i++) {
            Placement placement = FitSamples.placement(FitSamples.triclinic(random), random);
            FitDocument document = FitDocument.of(FitSamples.solution(placement, 6, 6, random));
            assertEquals(document, reread(document));
        }
    }

    @Test
    void read_overlay_isTheSameInEveryBit() {
        Random random = new Random(3);
        for (int i = 0; i < 100; i++) {
            Placement placement = FitSamples.placement(FitSamples.triclinic(random), random);
            Placement read = reread(FitDocument.of(placement)).placement();
            for (Hkl hkl : List.of(new Hkl(1, 1, 0), new Hkl(-1, 1, 1), new Hkl(0, 0, -2), new Hkl(2, 3, 1))) {
                assertEquals(place(placement, hkl), place(read, hkl));
            }
        }
    }

    private static Object place(Placement placement, Hkl hkl) {
        Vector3 g = placement.orientation().scatteringVector(placement.crystal().lattice(), hkl);
        double wavelength = placement.beam().wavelength();
        return placement.camera().toPixel(new Vector2(g.x(), g.y()), wavelength);
    }

    @Test
    void read_simulatedPattern_isTheSameInEveryBit() {
        Random random = new Random(14);
        for (Crystal crystal : List.of(FitSamples.NICKEL, FitSamples.triclinic(random))) {
            Placement placement = FitSamples.placement(crystal, random);
            Placement read = reread(FitDocument.of(placement)).placement();
            assertEquals(overlay(placement), overlay(read));
            assertFalse(overlay(placement).isEmpty());
        }
    }

    private static List<PlacedSpot> overlay(Placement p) {
        return PatternSimulator.of(p.crystal(), p.beam(), 1.5)
                .simulate(p.orientation())
                .on(p.camera());
    }

    @Test
    void read_afterWritingAgain_isTheSameText() {
        String text = FitDocument.of(FitSamples.ordinary()).toCif().toText();
        assertEquals(text, FitDocument.read(CifFile.parse(text)).toCif().toText());
    }

    @Test
    void read_severalSitesAndDisplacements_isEqual() {
        AtomSite silicon = new AtomSite(
                "Si1",
                Element.ofSymbol("Si"),
                new Vector3(0.4697, 0, 0),
                0.875,
                new Displacement.Anisotropic(0.0066, 0.0051, 0.0060, 0.0025, -0.0003, -0.0006));
        AtomSite oxygen = new AtomSite(
                "O1", Element.ofSymbol("O"), new Vector3(0.4133, 0.2672, 0.1188), 1, Displacement.ofB(0.79));
        Crystal quartz = Crystal.of("quartz", Lattice.hexagonal(4.9134, 5.4052), "P 32 2 1", silicon, oxygen);
        FitDocument document = FitDocument.of(FitSamples.placement(quartz, new Random(4)));
        assertEquals(document, reread(document));
    }

    @Test
    void read_coordinatesRoundedToFourDigits_areNotPutRight() {
        AtomSite site = AtomSite.of("Mg", 0.3333, 0.6667, 0.25);
        Crystal magnesium = Crystal.of("magnesium", Lattice.hexagonal(3.2094, 5.2108), "P 63/m m c", site);
        FitDocument document = FitDocument.of(FitSamples.placement(magnesium, new Random(5)));
        assertEquals(document, reread(document));
    }

    @Test
    void read_noticesOfTheCrystal_areKept() {
        Crystal doubtful = new Crystal(
                "doubtful",
                Lattice.cubic(4),
                FitSamples.NICKEL.spaceGroup(),
                FitSamples.NICKEL.sites(),
                List.of("Site X1 has no coordinates and was left out.", "Two lines,\nand a 'quote'."));
        FitDocument document = FitDocument.of(FitSamples.placement(doubtful, new Random(6)));
        assertEquals(document, reread(document));
    }

    @Test
    void read_solutionWithoutSpots_isEqual() {
        FitDocument document = FitDocument.of(
                FitSamples.solution(FitSamples.placement(FitSamples.NICKEL, new Random(7)), 0, 0, new Random(8)));
        assertEquals(document, reread(document));
    }

    @Test
    void read_unknownAndInfiniteNumbers_areKept() {
        Solution s = FitSamples.ordinary();
        SolutionErrors errors =
                new SolutionErrors(Double.NaN, Double.POSITIVE_INFINITY, 0, Double.POSITIVE_INFINITY, Double.NaN, -0.0);
        FitDocument document = FitDocument.of(
                new Solution(s.placement(), s.matches(), s.unexplained(), Double.NaN, 3, errors, Optional.empty()));
        assertEquals(document, reread(document));
        assertEquals("?", text("_zonewright_rotation_su", document));
        assertEquals(".", text("_zonewright_lean_x_su", document));
    }

    @Test
    void toCif_textBeyondAscii_declaresCif2AndIsReadBack() {
        FitDocument plain = FitDocument.of(FitSamples.ordinary());
        assertEquals(CifVersion.CIF_1_1, plain.toCif().version());
        FitDocument document = plain.withImage(ImageReference.of("Lauf­rad 'Größe 3' – \"α\".tif", 10, 10));
        assertEquals(CifVersion.CIF_2_0, document.toCif().version());
        assertEquals(document, reread(document));
    }

    @Test
    void read_textsThatLookLikeSyntax_areEqual() {
        for (String text :
                List.of("?", ".", "1.5(2)", "_x", "#1", "data_x", "loop_", "it's a \"b\" c", "$a", "[1]", ";")) {
            FitDocument document = FitDocument.of(FitSamples.ordinary())
                    .withImage(ImageReference.of(text, 1, 1))
                    .createdBy(text);
            assertEquals(document, reread(document));
        }
    }

    @Test
    void toCif_anglesAreInDegrees_voltageInKilovolts() {
        FitDocument document = FitDocument.of(FitSamples.placement(FitSamples.NICKEL, new Random(9)));
        Placement p = document.placement();
        Placement turned = new Placement(
                p.crystal(),
                Beam.ofKilovolts(200),
                new ZoneSetting(
                        p.setting().zone(), p.setting().reference(), Math.toRadians(30.1), 0, Math.toRadians(-0.5)),
                p.camera());
        document = FitDocument.of(turned);
        assertEquals("30.1", text("_zonewright_rotation", document));
        assertEquals("-0.5", text("_zonewright_lean_y", document));
        assertEquals("200.0", text("_diffrn_source_voltage", document));
        // International Tables C, table 4.3.1.1, has 0.02508 for 200 kV (from memory).
        assertEquals(0.02508, Double.parseDouble(text("_diffrn_radiation_wavelength", document)), 5e-6);
        assertEquals("electron", text("_diffrn_radiation_probe", document));
        assertEquals("90.0", text("_cell_angle_alpha", document));
    }

    /** Cubic, [001] towards the source, 100 to the right: UB is 1/a times the unit matrix, by the conventions. */
    @Test
    void toCif_standardOrientation_hasDiagonalUb() {
        Placement p = FitSamples.placement(FitSamples.NICKEL, new Random(10));
        FitDocument document = FitDocument.of(p.withSetting(ZoneSetting.onZone(new Uvw(0, 0, 1), new Hkl(1, 0, 0), 0)));
        for (int row = 1; row <= 3; row++) {
            for (int column = 1; column <= 3; column++) {
                double element = Double.parseDouble(text("_diffrn_orient_matrix_UB_" + row + column, document));
                assertEquals(row == column ? 1 / 3.524 : 0, element, 1e-15);
            }
        }
    }

    @Test
    void cautions_handAlways_halfTurnWhereThereIsAMate() {
        Solution solution = FitSamples.ordinary();
        assertEquals(
                List.of(Caution.HAND_ASSUMED, Caution.HALF_TURN),
                FitDocument.of(solution).cautions());
        assertEquals(
                List.of(Caution.HAND_ASSUMED),
                FitDocument.of(solution.placement()).cautions());
        assertEquals(
                List.of("hand_assumed", "half_turn"),
                FitDocument.of(solution).toCif().blocks().get(0).values("_zonewright_caution_code").stream()
                        .map(Object::toString)
                        .toList());
    }

    /** The twin by half a turn about the normal of one of {1 1 1} is 60° about [1 1 1], Σ3 (textbook). */
    @Test
    void read_findings_areEqualInEveryBit() {
        FitDocument document = FitDocument.of(FitSamples.ordinary()).withFindings(FitSamples.findings());
        CifFile file = document.toCif(List.of(FitSamples.ordinary()));
        assertEquals(document, FitDocument.read(CifFile.parse(file.toText())));
        assertEquals(1, FitDocument.others(file).size());
        assertTrue(file.toText().chars().allMatch(c -> c < 128));
        CifBlock twin = file.blocks().get(2);
        double angle = twin.value("_zonewright_grain_misorientation_angle")
                .orElseThrow()
                .asNumber()
                .value();
        assertEquals(60, angle, 1e-9);
        assertEquals(
                List.of("twin on (1 1 1)", "Sigma 3"),
                twin.values("_zonewright_grain_relation_name").stream()
                        .map(CifValue::text)
                        .toList());
        assertTrue(twin.value("_cell_length_a").isEmpty(), "its crystal is the fit's");
        assertEquals(2, CrystalCif.structures(file).size());
    }

    @Test
    void read_handling_isEqualInEveryBit() {
        FitDocument document = FitDocument.of(FitSamples.placement(FitSamples.NICKEL, new Random(3)))
                .withImage(ImageReference.of("a.tif", 20, 30))
                .withHandling(FitSamples.handling(20, 30));
        assertEquals(document, reread(document));
        FitHandling nothingHidden = new FitHandling(
                OptionalDouble.empty(), Optional.of(false), Optional.of(Mask.none(20, 30)), List.of(), Set.of());
        assertEquals(document.withHandling(nothingHidden), reread(document.withHandling(nothingHidden)));
    }

    @Test
    void handling_unfitValues_areRefused() {
        FitDocument document = FitDocument.of(FitSamples.ordinary());
        assertThrows(
                IllegalArgumentException.class, () -> document.withHandling(FitSamples.handling(20, 30)), "no image");
        FitDocument ofImage = document.withImage(ImageReference.of("a.tif", 20, 31));
        String said = assertThrows(
                        IllegalArgumentException.class, () -> ofImage.withHandling(FitSamples.handling(20, 30)))
                .getMessage();
        assertTrue(said.contains("20 × 30") && said.contains("20 × 31"), said);
        assertThrows(
                IllegalArgumentException.class,
                () -> new FitHandling(OptionalDouble.of(-1), Optional.empty(), Optional.empty(), List.of(), Set.of()));
        assertThrows(
                IllegalArgumentException.class,
                () -> new FitHandling(
                        OptionalDouble.empty(), Optional.empty(), Optional.empty(), List.of(), Set.of("A B")));
        FitDocument laid = FitDocument.of(FitSamples.ordinary().placement());
        assertThrows(IllegalArgumentException.class, () -> laid.withFindings(FitSamples.findings()));
    }

    @Test
    void constructor_solutionOfAnotherPlacement_isRefused() {
        Placement other = FitSamples.placement(FitSamples.NICKEL, new Random(99));
        assertThrows(
                IllegalArgumentException.class,
                () -> new FitDocument(
                        other, Optional.of(FitSamples.ordinary()), Optional.empty(), Optional.empty(), ""));
    }

    @Test
    void write_characterThatNoCifHolds_leavesTheOldFile(@TempDir Path folder) throws IOException {
        Path file = Files.writeString(folder.resolve("old.cif"), "data_old");
        FitDocument document = FitDocument.of(FitSamples.ordinary()).createdBy("bell\u0007");
        assertThrows(IllegalArgumentException.class, () -> document.write(file));
        assertEquals("data_old", Files.readString(file));
        assertEquals(1, folder.toFile().list().length);
    }

    @Test
    void read_entriesInAnyOrder_isEqual() {
        FitDocument document = FitDocument.of(FitSamples.ordinary());
        var block = document.toCif().blocks().get(0);
        var entries = new ArrayList<>(block.entries());
        Collections.shuffle(entries, new Random(13));
        CifFile shuffled = CifFile.of(new CifBlock("other", entries));
        assertEquals(document, FitDocument.read(shuffled));
    }

    @Test
    void read_blockOfAnotherKindInFront_isPassedOver() {
        FitDocument document = FitDocument.of(FitSamples.ordinary());
        String text = document.toCif().toText();
        CifFile both = CifFile.parse("data_first _cell_length_a 3\n" + text);
        assertEquals(document, FitDocument.read(both));
    }

    @Test
    void imageReference_unfitValues_areRefused() {
        for (String name : Arrays.asList("", " ", "a/b.tif", "a\\b.tif", "a\nb")) {
            assertThrows(IllegalArgumentException.class, () -> ImageReference.of(name, 1, 1), name);
        }
        assertThrows(IllegalArgumentException.class, () -> ImageReference.of("a", 0, 1));
        assertThrows(IllegalArgumentException.class, () -> ImageReference.of("a", 1, -1));
        ImageReference image = ImageReference.of("a", 1, 1);
        assertThrows(IllegalArgumentException.class, () -> image.withSha256("abc"));
        assertEquals(
                DIGEST,
                image.withSha256(DIGEST.toUpperCase(Locale.ROOT)).sha256().orElseThrow());
        assertFalse(image.sha256().isPresent());
        assertTrue(Caution.HALF_TURN.details().chars().allMatch(c -> c < 128));
    }
}
