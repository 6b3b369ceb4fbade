package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.ImageStack;
import ij.Prefs;
import ij.gui.Roi;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Measuring;
import io.github.zonewright.imagej.session.Ruler;
import io.github.zonewright.imagej.session.Search;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.MeasuredSpot;
import io.github.zonewright.spots.PatternCentre;
import io.github.zonewright.spots.SpotNet;
import java.util.Comparator;
import java.util.List;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * Spots by hand, hidden area, ruler and profile as macros call them, with no display. Copper: a = 3.615 Å, so d(111) = 2.0871
 * Å and d(200) = 1.8075 Å.
 */
class MeasuringTest {
    private static final String EDIT = "command.EditSpots";
    private static final String HIDE = "command.HideArea";
    private static final String SPACING = "command.MeasureSpacing";
    private static final String NET = "command.MeasureNet";
    private static final double D111 = 3.615 / Math.sqrt(3);

    private final ImagePlus image = TestPatterns.imageOfUser();
    private final Fingerprint user = Fingerprint.of(image);

    @AfterEach
    void nothingOfTheUsersChanged() {
        Prefs.set("zonewright.lengths", "Å");
        user.assertSame(image);
    }

    @Test
    void remove_andAdd_isTheSameSpotAgain() {
        run(NET, "draw=true table=false");
        MeasuredSpot spot = spots().get(4);
        int count = spots().size();
        run(EDIT, "edit=[remove a spot] " + at("x", "y", spot.position()));
        assertEquals(count - 1, spots().size());
        assertTrue(spots().stream().noneMatch(s -> s.position().equals(spot.position())));
        PixelPoint near =
                new PixelPoint(spot.position().x() + 2, spot.position().y() - 1.5);
        run(EDIT, "edit=[add a spot] " + at("x", "y", near));
        assertEquals(count, spots().size());
        MeasuredSpot again = nearest(spot.position());
        assertEquals(0, again.position().distanceTo(spot.position()), 0.02);
        assertTrue(measured().isByHand(again));
        assertTrue(Sitting.of(image).measurement().edited());
    }

    @Test
    void move_comesToRestOnTheOtherPeak() {
        run(NET, "draw=true table=false");
        PixelPoint from = spots().get(2).position();
        PixelPoint to = spots().get(7).position();
        run(EDIT, "edit=[remove a spot] " + at("x", "y", to));
        run(
                EDIT,
                "edit=[move a spot] " + at("x", "y", from) + " "
                        + at("tox", "toy", new PixelPoint(to.x() + 1.5, to.y() + 1)));
        assertEquals(0, nearest(to).position().distanceTo(to), 0.02);
        assertTrue(nearest(from).position().distanceTo(from) > 10);
    }

    @Test
    void centre_setOffTheBeam_isThere_andIsFoundAgain() {
        run(EDIT, "edit=[set the centre] x=90.5 y=60.25");
        PatternCentre centre = measured().centre().orElseThrow();
        assertEquals(PatternCentre.Source.BY_HAND, centre.source());
        assertEquals(new PixelPoint(90.5, 60.25), centre.position());
        run(EDIT, "edit=[find the centre again]");
        PixelPoint truth = TestPatterns.copper110().camera().centre();
        assertEquals(0, measured().centre().orElseThrow().position().distanceTo(truth), 0.1);
        run(EDIT, "edit=[set the centre] " + at("x", "y", new PixelPoint(truth.x() + 2, truth.y() + 2)));
        assertEquals(0, measured().centre().orElseThrow().position().distanceTo(truth), 0.1);
    }

    @ParameterizedTest
    @CsvSource({
        "edit=[remove a spot] x=3 y=3, o spot within",
        "edit=[add a spot] x=3 y=3, o spot rises",
        "edit=[jump] x=3 y=3, Edit",
        "edit=[add a spot] x=here y=3, Spot x"
    })
    void edit_badInput_isSaid(String options, String named) {
        String said = Launching.macro(image, EDIT, options).orElse("");
        assertTrue(said.contains(named), said);
        assertEquals(0, PatternOverlay.count(image));
    }

    @Test
    void findZoneAxis_takesTheSpotsByHand() {
        run(NET, "draw=true table=false");
        PixelPoint gone = spots().get(3).position();
        run(EDIT, "edit=[remove a spot] " + at("x", "y", gone));
        int left = spots().size();
        run("command.FindZoneAxis", "crystal=copper kilovolts=200 scale=120 table=false");
        assertEquals(left, spots().size());
        assertTrue(Sitting.of(image).chosen().isPresent());
    }

    @Test
    void hidden_selection_coversItsSpots_andIsTakenBack() {
        ImagePlus own = TestPatterns.image();
        done(Launching.macro(own, NET, "draw=true table=false"));
        MeasuredPattern before = Sitting.of(own).measured().orElseThrow();
        PixelPoint covered = before.spots().get(1).position();
        own.setRoi(new Roi(covered.x() - 12, covered.y() - 12, 24, 24));
        Fingerprint with = Fingerprint.of(own);
        done(Launching.macro(own, HIDE, "area=[Hide the selection too]"));
        MeasuredPattern after = Sitting.of(own).measured().orElseThrow();
        assertTrue(after.isHidden(covered));
        assertEquals(24 * 24 + before.hidden().count(), after.hidden().count());
        assertTrue(after.spots().stream().noneMatch(s -> s.position().distanceTo(covered) < 5));
        assertTrue(names(own).contains("hidden area"), names(own).toString());
        with.assertSame(own);
        own.setRoi(new Roi(covered.x() - 12, covered.y() - 12, 12, 24));
        done(Launching.macro(own, HIDE, "area=[Uncover the selection]"));
        assertEquals(
                12 * 24 + before.hidden().count(),
                Sitting.of(own).measured().orElseThrow().hidden().count());
        done(Launching.macro(own, HIDE, "area=[Select the hidden area]"));
        assertEquals(12 * 24 + before.hidden().count(), own.getRoi().getContainedPoints().length);
        done(Launching.macro(own, HIDE, "area=[As found by itself]"));
        assertEquals(
                before.hidden().count(),
                Sitting.of(own).measured().orElseThrow().hidden().count());
    }

    @Test
    void hidden_withoutSelection_isRefused() {
        ImagePlus own = TestPatterns.image();
        String said =
                Launching.macro(own, HIDE, "area=[Hide the selection alone]").orElse("");
        assertTrue(said.contains("Selection: none"), said);
    }

    @Test
    void negative_isMeasuredByItsInverse_andStaysAsItIs() {
        ImagePlus negative = TestPatterns.image();
        negative.getProcessor().invert();
        Fingerprint before = Fingerprint.of(negative);
        done(Launching.macro(negative, NET, "draw=true table=false"));
        assertTrue(Sitting.of(negative).measurement().how().isDark());
        SpotNet.Net net = (SpotNet.Net) Sitting.of(negative).measurement().net().orElseThrow();
        assertEquals(TestPatterns.CONSTANT / D111, net.lengthA().value(), 0.1);
        String said = Launching.macro(negative, NET, "ground=[dark, spots bright] table=false")
                .orElse("");
        assertTrue(said.startsWith("Spots: 0."), said);
        done(Launching.macro(
                negative,
                "command.FindZoneAxis",
                "crystal=copper kilovolts=200 scale=120 table=false ground=[bright, spots dark]"));
        assertTrue(Sitting.of(negative).chosen().isPresent());
        before.assertSame(negative);
    }

    @Test
    void spacing_ofASpot_isD111() {
        PixelPoint spot = innermost().get(0).position();
        String said = run(SPACING, at("x1", "y1", spot) + " crystals=copper within=2 table=false");
        double d = Double.parseDouble(said.replaceAll("(?s).*?d ([\\d.]+) ± .*", "$1"));
        assertEquals(D111, d, 0.002 * D111);
        assertTrue(said.contains("{111} "), said);
        assertTrue(names(image).contains("ruler"));
    }

    @Test
    void spacing_secondOrderAndPair_areTheSame() {
        MeasuredSpot first = innermost().get(0);
        PixelPoint centre = measured().centre().orElseThrow().position();
        PixelPoint opposite = centre.plus(centre.minus(first.position()));
        String pair = run(SPACING, at("x1", "y1", first.position()) + " " + at("x2", "y2", opposite) + " constant=120");
        double d = Double.parseDouble(pair.replaceAll("(?s).*?d ([\\d.]+) ± .*", "$1"));
        assertEquals(D111, d, 0.001 * D111);
        PixelPoint second = centre.plus(first.position().minus(centre).times(2));
        String said = run(SPACING, at("x1", "y1", second) + " order=2 lengths=nm constant=120");
        double nm = Double.parseDouble(said.replaceAll("(?s).*?d ([\\d.]+) ± .*", "$1"));
        assertEquals(D111 / 10, nm, 0.001 * D111);
        assertTrue(said.contains("for one of 2 orders"), said);
    }

    /** The angle between 1 −1 1 and 1 −1 −1 is acos(1/3), or its supplement for their opposites. */
    @Test
    void spacing_toTheOneBefore_hasRatioAndAngle() {
        List<MeasuredSpot> four = innermost();
        run(SPACING, at("x1", "y1", four.get(0).position()));
        String said = run(SPACING, at("x1", "y1", four.get(1).position()));
        double ratio = Double.parseDouble(said.replaceAll("(?s).*ratio ([\\d.]+) ± .*", "$1"));
        double angle = Double.parseDouble(said.replaceAll("(?s).*angle ([\\d.]+) ± .*", "$1"));
        double known = Math.toDegrees(Math.acos(1.0 / 3));
        assertEquals(1, ratio, 0.002);
        assertEquals(0, Math.min(Math.min(Math.abs(angle - known), Math.abs(180 - known - angle)), 180 - angle), 0.1);
    }

    @Test
    void spacing_badInput_isSaid() {
        PixelPoint centre = TestPatterns.copper110().camera().centre();
        assertTrue(Launching.macro(image, SPACING, "x1=20 y1=20 x2=abc y2=3")
                .orElse("")
                .contains("Opposite spot x"));
        assertTrue(Launching.macro(image, SPACING, "x1=20 y1=20 order=0")
                .orElse("")
                .contains("Order"));
        assertTrue(Launching.macro(image, SPACING, "x1=20 y1=20 crystals=unobtainium")
                .orElse("")
                .contains("unobtainium"));
        run(EDIT, "edit=[set the centre] x=150 y=150");
        assertTrue(
                Launching.macro(image, SPACING, "x1=150 y1=150").orElse("").contains("off the centre"),
                centre.toString());
    }

    @Test
    void slices_haveTheirOwnSpotsAndReadings() {
        ImageStack stack = new ImageStack(TestPatterns.SIDE, TestPatterns.SIDE);
        stack.addSlice(TestPatterns.image().getProcessor());
        stack.addSlice(TestPatterns.image().getProcessor());
        ImagePlus two = new ImagePlus("two", stack);
        two.setSlice(2);
        done(Launching.macro(two, SPACING, "x1=100 y1=100"));
        two.setSlice(1);
        assertTrue(Sitting.of(two).measured().isEmpty());
        done(Launching.macro(two, EDIT, "edit=[set the centre] x=100 y=90"));
        two.setSlice(2);
        assertEquals(1, Sitting.of(two).measurement().ruler().size());
        assertTrue(!Sitting.of(two).measured().orElseThrow().isCentreByHand());
    }

    /** On the row through 1 −1 1 the maxima are at multiples of 1/d(111) from the centre. */
    @Test
    void profile_alongARow_hasItsSpots() {
        Sitting sitting = Measuring.asNeeded(image, Sitting.of(image));
        sitting.show(image);
        Ruler ruler = Ruler.of(image, sitting);
        float[][] points = points(IntensityPlot.along(
                "row",
                Search.pixels(image, sitting.measurement().how()),
                measured(),
                ruler,
                innermost().get(0).position()));
        assertEquals(1 / D111, peak(points, 0.7 / D111, 1.3 / D111), 0.01 / D111);
        assertEquals(0, peak(points, -0.3 / D111, 0.3 / D111), 0.01 / D111);
        float[][] radial = points(IntensityPlot.about(
                "about", Search.pixels(image, sitting.measurement().how()), measured(), ruler));
        assertEquals(1 / D111, peak(radial, 0.8 / D111, 1.08 / D111), 0.02 / D111);
    }

    private static float[][] points(ij.gui.Plot plot) {
        return new float[][] {plot.getXValues(), plot.getYValues()};
    }

    private static double peak(float[][] points, double from, double to) {
        int best = -1;
        for (int i = 0; i < points[0].length; i++) {
            if (points[0][i] >= from && points[0][i] <= to && (best < 0 || points[1][i] > points[1][best])) {
                best = i;
            }
        }
        return points[0][best];
    }

    /** Runs a command as a macro does; gives its answer. */
    private String run(String name, String options) {
        PatternCommand command;
        try {
            command = (PatternCommand) Class.forName("io.github.zonewright.imagej." + name)
                    .getConstructor()
                    .newInstance();
        } catch (ReflectiveOperationException e) {
            throw new IllegalStateException(e);
        }
        List<CommandParameter> parameters = CommandParameter.of(command);
        parameters.forEach(p -> p.fillImage(image));
        parameters.stream().filter(CommandParameter::isAsked).forEach(p -> p.readMacro(options + " "));
        command.run();
        assertFalse(command.isCanceled(), command.getCancelReason());
        return parameters.stream()
                .filter(p -> p.name().equals("answer"))
                .findFirst()
                .orElseThrow()
                .text();
    }

    private static void done(java.util.Optional<String> refused) {
        assertTrue(refused.isEmpty(), refused.orElse(""));
    }

    private MeasuredPattern measured() {
        return Sitting.of(image).measured().orElseThrow();
    }

    private List<MeasuredSpot> spots() {
        return measured().spots();
    }

    private MeasuredSpot nearest(PixelPoint place) {
        return spots().stream()
                .min(Comparator.comparingDouble(s -> s.position().distanceTo(place)))
                .orElseThrow();
    }

    /** The four spots 111 next to the centre. */
    private List<MeasuredSpot> innermost() {
        if (Sitting.of(image).measured().isEmpty()) {
            run(NET, "draw=true table=false");
        }
        PixelPoint centre = measured().centre().orElseThrow().position();
        return spots().stream()
                .sorted(Comparator.comparingDouble(s -> s.position().distanceTo(centre)))
                .limit(4)
                .toList();
    }

    private static List<String> names(ImagePlus of) {
        return java.util.Arrays.stream(of.getOverlay().toArray())
                .map(Roi::getName)
                .toList();
    }

    private static String at(String x, String y, PixelPoint p) {
        return x + "=" + p.x() + " " + y + "=" + p.y();
    }
}
