package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.gui.Overlay;
import ij.gui.Roi;
import ij.measure.ResultsTable;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.TwinPattern;
import io.github.zonewright.imagej.bridge.LeftoverTable;
import io.github.zonewright.imagej.bridge.RowTable;
import io.github.zonewright.imagej.overlay.MarkStyle;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Comparison;
import io.github.zonewright.imagej.session.Figures;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.Grain;
import io.github.zonewright.indexing.SpotMatch;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.pattern.Placement;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;

/** What can be asked about an answer, as a macro asks it, with no display. */
class AnswerCommandsTest {
    private static final String FIND = "command.FindZoneAxis";
    private static final String OPTIONS = "crystal=Copper kilovolts=200 scalekind=[camera constant, px·Å] scale="
            + TestPatterns.CONSTANT + " tolerance=3";

    /** Copper along [1 1 0] has other zones that fit worse; those of the family 1 1 0 are one by symmetry. */
    @Test
    void limitOfZones_isKept() {
        ImagePlus image = TestPatterns.image();
        assertEquals(Optional.empty(), Launching.macro(image, FIND, OPTIONS + " zones=[<1 1 0>]"));
        Sitting found = Sitting.of(image);
        assertTrue(
                found.solutions().stream()
                        .map(s -> s.placement().setting().zone())
                        .allMatch(z -> sortedAbs(z).equals(List.of(0, 1, 1))),
                found.solutions().toString());
        Optional<String> none = Launching.macro(TestPatterns.image(), FIND, OPTIONS + " zones=[1 1 1]");
        assertTrue(none.orElse("").contains("No orientation of Copper"), none.toString());
        Optional<String> wrong = Launching.macro(TestPatterns.image(), FIND, OPTIONS + " zones=[<0 0 0>]");
        assertTrue(wrong.orElse("").contains("Zone axes searched"), wrong.toString());
    }

    private static List<Integer> sortedAbs(Uvw z) {
        return Arrays.stream(new int[] {z.u(), z.v(), z.w()})
                .map(Math::abs)
                .sorted()
                .boxed()
                .toList();
    }

    /** Textbook: the {1 1 1} twin of a cubic metal is 60° about [1 1 1], which is Σ3. */
    @Test
    void twin_isFoundInWhatIsLeftOver() {
        ImagePlus image = TwinPattern.image();
        assertEquals(Optional.empty(), Launching.macro(image, FIND, OPTIONS));
        Fingerprint before = Fingerprint.of(image);
        assertEquals(Optional.empty(), Launching.macro(image, "command.SearchLeftovers", "table=false"));
        Sitting sitting = Sitting.of(image);
        assertEquals(1, sitting.findings().grains().size());
        Grain twin = sitting.findings().grains().get(0);
        assertEquals(60, Math.toDegrees(twin.misorientation().angle()), 1.5);
        assertTrue(twin.sentence().contains("Σ3"), twin.sentence());
        assertTrue(count(image, MarkStyle.FURTHER) > 8, "marks of the second crystal");
        before.assertSame(image);
        ResultsTable table = LeftoverTable.of(
                sitting.chosen().orElseThrow(), sitting.findings().grains());
        assertEquals(sitting.chosen().orElseThrow().unexplained().size(), table.size());
        assertEquals("1", table.getStringValue("further crystal", 0));
        sitting.withPlacement(sitting.placement().orElseThrow().turnedBy(0.2)).show(image);
        assertEquals(0, count(image, MarkStyle.FURTHER), "they belong to the solution that was shown");
    }

    @Test
    void withoutSolution_everyQuestionSaysWhatIsMissing() {
        for (String line : List.of(
                "command.SearchLeftovers table=false",
                "command.TellApart solution=1",
                "command.RefinePattern rotation")) {
            int space = line.indexOf(' ');
            Optional<String> said =
                    Launching.macro(TestPatterns.image(), line.substring(0, space), line.substring(space + 1));
            assertTrue(said.isPresent() && said.get().matches("(No |Solution).*"), line + ": " + said);
        }
    }

    /** Along a two-fold axis half a turn is a symmetry; [1 1 1] of copper is three-fold, so half a turn stays open. */
    @Test
    void halfTurn_isToldApartByATilt() {
        ImagePlus image = new ImagePlus("copper-111", TestPatterns.pixels(copper(new Uvw(1, 1, 1), new Hkl(2, -2, 0))));
        assertEquals(Optional.empty(), Launching.macro(image, FIND, OPTIONS));
        assertEquals(Optional.empty(), Launching.macro(image, "command.TellApart", "other=[half a turn] draw"));
        Comparison pair = Comparison.named(Sitting.of(image), 1, "");
        var found = pair.discrimination(Sitting.of(image).measured().orElseThrow());
        assertTrue(
                String.join(" ", found.sentences()).contains("Tilt by"),
                found.sentences().toString());
        assertTrue(found.tilt().isPresent());
    }

    private static Placement copper(Uvw zone, Hkl reference) {
        Placement p = TestPatterns.copper110();
        return p.withSetting(io.github.zonewright.orientation.ZoneSetting.onZone(zone, reference, Math.toRadians(20)));
    }

    /** Spots 0 0 2n alone: the spacing of (0 0 2) of copper is a/2 = 1.8075 Å, and a row names no zone. */
    @Test
    void oneRow_isAnAnswerWithoutAZone() {
        ij.process.ShortProcessor pixels = new ij.process.ShortProcessor(256, 256);
        java.util.Random noise = new java.util.Random(7);
        double step = TestPatterns.CONSTANT / 1.8075;
        for (int y = 0; y < 256; y++) {
            for (int x = 0; x < 256; x++) {
                double grey = 200 + 14 * noise.nextGaussian();
                for (int n = -1; n <= 1; n++) {
                    double r = Math.hypot(x + 0.5 - 128 - n * step, y + 0.5 - 128) / 1.8;
                    grey += (n == 0 ? 20000 : 6000) * Math.exp(-r * r / 2);
                }
                pixels.set(x, y, (int) Math.max(0, grey));
            }
        }
        ImagePlus image = new ImagePlus("row", pixels);
        assertEquals(Optional.empty(), Launching.macro(image, FIND, OPTIONS + " table=false"));
        var row = Sitting.of(image).findings().row().orElseThrow();
        assertEquals(1.8075, row.d().value(), 0.01);
        ResultsTable table = RowTable.of(row);
        assertEquals("{2 0 0}", table.getStringValue("{hkl}", 0));
        assertTrue(
                table.getStringValue("circle of zones", 0).contains("[0 1 0]"),
                table.getStringValue("circle of zones", 0));
        assertTrue(Sitting.of(image).solutions().isEmpty());
    }

    @Test
    void twoSpotsByHand_nameTheZone() {
        ImagePlus image = TestPatterns.image();
        Placement truth = TestPatterns.copper110();
        String spots = place(truth, new Hkl(1, -1, 1)) + "; " + place(truth, new Hkl(1, -1, -1));
        String options = "crystal=Copper spots=[" + spots + "] constant=" + TestPatterns.CONSTANT + " table=false";
        assertEquals(Optional.empty(), Launching.macro(image, "command.IndexByHand", options));
        Placement laid = Sitting.of(image).placement().orElseThrow();
        assertEquals(List.of(0, 1, 1), sortedAbs(laid.setting().zone()));
        assertEquals(Optional.empty(), Launching.macro(image, "command.RefinePattern", "rotation"));
        Placement refined = Sitting.of(image).chosen().orElseThrow().placement();
        assertEquals(laid.setting().rotation(), refined.setting().rotation(), 0, "held");
        List<SpotMatch> matches = Sitting.of(image).chosen().orElseThrow().matches();
        assertTrue(matches.size() > 10, "explained " + matches.size());
    }

    @Test
    void refine_aPatternLaidFarBesideItsSpots_goesAboutTheMeasuredCentre() {
        ImagePlus image = TestPatterns.image();
        assertEquals(Optional.empty(), Launching.macro(image, FIND, OPTIONS));
        PixelPoint centre =
                Sitting.of(image).chosen().orElseThrow().placement().camera().centre();
        assertEquals(Optional.empty(), Launching.macro(image, "command.MovePattern", "shiftright=11 shiftdown=-4"));
        Placement moved = Sitting.of(image).placement().orElseThrow();
        assertEquals(Math.hypot(11, 4), moved.camera().centre().distanceTo(centre), 1e-6);
        assertEquals(Optional.empty(), Launching.macro(image, "command.RefinePattern", "rotation"));
        Placement refined = Sitting.of(image).chosen().orElseThrow().placement();
        assertEquals(0, refined.camera().centre().distanceTo(centre), 0.05);
    }

    @Test
    void indicesTyped_areKept() {
        ImagePlus image = TestPatterns.image();
        Placement truth = TestPatterns.copper110();
        String spots = place(truth, new Hkl(1, -1, 1)) + "; " + place(truth, new Hkl(0, 0, 2));
        String options = "crystal=Copper spots=[" + spots + "] hkl=[1 -1 1; 0 0 2] constant=" + TestPatterns.CONSTANT;
        assertEquals(Optional.empty(), Launching.macro(image, "command.IndexByHand", options));
        Placement laid = Sitting.of(image).placement().orElseThrow();
        assertEquals(new Uvw(1, 1, 0), laid.setting().zone());
        assertEquals(TestPatterns.ROTATION, Math.toDegrees(laid.setting().rotation()), 1);
        Optional<String> wrong =
                Launching.macro(image, "command.IndexByHand", options.replace("0 0 2;", "") + " lay=50");
        assertTrue(wrong.orElse("").contains("expected 0 to"), wrong.toString());
        Optional<String> bad = Launching.macro(image, "command.IndexByHand", "crystal=Copper spots=[12 a]");
        assertTrue(bad.orElse("").contains("expected x and y"), bad.toString());
    }

    private static String place(Placement placement, Hkl hkl) {
        PixelPoint p = new io.github.zonewright.imagej.overlay.ComputedSpots()
                .on(placement, TestPatterns.SIDE, TestPatterns.SIDE, 500).stream()
                        .filter(s -> s.spot().hkl().equals(hkl))
                        .findFirst()
                        .orElseThrow()
                        .position();
        return Figures.place(p.x()) + " " + Figures.place(p.y());
    }

    private static int count(ImagePlus image, MarkStyle style) {
        Overlay overlay = image.getOverlay();
        int count = 0;
        for (Roi roi : overlay.toArray()) {
            count += style.key().equals(roi.getProperty(PatternOverlay.PROPERTY)) ? 1 : 0;
        }
        return count;
    }
}
