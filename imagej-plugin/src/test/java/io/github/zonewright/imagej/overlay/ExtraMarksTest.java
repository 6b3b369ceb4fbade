package io.github.zonewright.imagej.overlay;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.gui.Roi;
import ij.process.ByteProcessor;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.indexing.ResidualPlot;
import io.github.zonewright.indexing.SpotMatch;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.LaueCircle;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredSpot;
import java.awt.geom.Rectangle2D;
import java.util.Arrays;
import java.util.EnumSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import org.junit.jupiter.api.Test;

class ExtraMarksTest {
    private static final int SIDE = 512;

    private static Placement silicon(double lean) {
        return new Placement(
                CrystalShelf.find("silicon").orElseThrow(),
                Beam.ofKilovolts(200),
                new ZoneSetting(new Uvw(1, 1, 0), new Hkl(1, -1, 1), 0.3, Math.toRadians(lean), 0),
                Camera.of(new PixelPoint(256, 256), 300, false));
    }

    private static List<Roi> marks(Placement laid, Set<ShownMarks> shown) {
        ViewMaker views = new ViewMaker(SIDE, SIDE);
        PatternView view =
                views.withShown(views.ofPlacement(laid, Optional.empty(), 500, false), shown, false, List.of());
        return Marks.of(view, SIDE, SIDE, 1);
    }

    private static List<Roi> named(List<Roi> marks, String name) {
        return marks.stream().filter(roi -> name.equals(roi.getName())).toList();
    }

    @Test
    void nothingChosen_nothingMore() {
        List<Roi> plain = Marks.of(
                new ViewMaker(SIDE, SIDE).ofPlacement(silicon(0.2), Optional.empty(), 500, false), SIDE, SIDE, 1);
        assertEquals(plain.size(), marks(silicon(0.2), Set.of()).size());
    }

    /** Silicon 002 along [110] is the textbook case (Edington; Williams and Carter; from memory). */
    @Test
    void doubled_siliconAlong110_marks002() {
        Placement laid = silicon(0);
        double d002 = 5.431 / 2;
        List<Roi> squares = named(marks(laid, EnumSet.of(ShownMarks.DOUBLED)), "double diffraction");
        assertTrue(
                squares.stream().anyMatch(roi -> {
                    Rectangle2D.Double box = roi.getFloatBounds();
                    return Math.abs(Math.hypot(box.getCenterX() - 256, box.getCenterY() - 256) - 300 / d002) < 1;
                }),
                squares.toString());
    }

    /** None of the squares lies where a computed spot is. */
    @Test
    void doubled_areNotComputed() {
        Placement laid = silicon(0);
        List<PlacedSpot> spots = new ComputedSpots().on(laid, SIDE, SIDE, 500);
        for (PixelPoint p : new ForbiddenSpots().on(laid, SIDE, SIDE)) {
            assertTrue(spots.stream().noneMatch(s -> s.position().distanceTo(p) < 3), p.toString());
        }
    }

    @Test
    void laueCircle_isDrawnWithItsCentre() {
        Placement laid = silicon(0.2);
        List<Roi> marks = marks(laid, EnumSet.of(ShownMarks.LAUE_CIRCLE));
        assertEquals(1, named(marks, "Laue circle").size());
        Rectangle2D.Double box =
                named(marks, "centre of the Laue circle").get(0).getFloatBounds();
        assertEquals(LaueCircle.of(laid).orElseThrow().centre().x(), box.getCenterX(), 0.1);
        assertTrue(named(marks(silicon(0), EnumSet.of(ShownMarks.LAUE_CIRCLE)), "Laue circle")
                .isEmpty());
    }

    /** K = 300 px·Å: 0.2 1/Å is 60 px. */
    @Test
    void scaleBar_isAsLongAsItSays() {
        List<Roi> marks = marks(silicon(0), EnumSet.of(ShownMarks.SCALE_BAR));
        assertEquals(60, named(marks, "scale bar").get(0).getFloatWidth(), 1e-3);
        assertEquals(0.2, ExtraMarks.round(0.3755), 1e-12);
        assertEquals(5, ExtraMarks.round(5), 1e-12);
        assertEquals(10, ExtraMarks.round(19), 1e-12);
        assertEquals(0.005, ExtraMarks.round(0.0099), 1e-12);
    }

    /** The legend names what is on the image and nothing else, and lies within the image. */
    @Test
    void legend_namesWhatIsThere() {
        List<Roi> marks = marks(silicon(0.2), EnumSet.of(ShownMarks.LEGEND, ShownMarks.LAUE_CIRCLE));
        assertFalse(named(marks, "Laue circle").isEmpty());
        assertTrue(named(marks, "double diffraction").isEmpty());
        Rectangle2D box = named(marks, "legend").get(0).getFloatBounds();
        assertTrue(new Rectangle2D.Double(0, 0, SIDE, SIDE).contains(box), box.toString());
    }

    /** Upper layers have a shape of their own; at a steep cone of a long axis they are on the image. */
    @Test
    void upperLayers_haveAShapeOfTheirOwn() {
        Placement laid = silicon(0);
        Placement steep = new Placement(
                laid.crystal(),
                Beam.ofKilovolts(20),
                ZoneSetting.onZone(new Uvw(1, 1, 2), new Hkl(1, -1, 0), 0),
                Camera.of(new PixelPoint(256, 256), 60, false));
        List<Roi> marks = marks(steep, Set.of());
        assertTrue(marks.stream().anyMatch(roi -> isKind(roi, MarkStyle.UPPER)));
        assertTrue(marks(laid, Set.of()).stream().noneMatch(roi -> isKind(roi, MarkStyle.UPPER)));
    }

    /** The computed half has discs on dark ground and no rings. */
    @Test
    void split_coversTheRightHalfAlone() {
        List<Roi> marks = marks(silicon(0), EnumSet.of(ShownMarks.SPLIT));
        assertEquals(256, named(marks, "computed half").get(0).getFloatBounds().getX(), 0.01);
        assertTrue(marks.stream()
                .filter(roi -> isKind(roi, MarkStyle.COMPUTED))
                .allMatch(roi -> roi.getFloatBounds().getCenterX() < 256));
    }

    /** Spots whose measured places lie a tenth of a pixel right of the computed ones. */
    private static List<SpotMatch> matches(Placement laid) {
        return new ComputedSpots()
                .on(laid, SIDE, SIDE, 500).stream()
                        .map(s -> new SpotMatch(
                                new MeasuredSpot(s.position().plus(new Vector2(0.1, 0)), 0.1, 100, 20, false),
                                s.spot().hkl(),
                                s.position()))
                        .toList();
    }

    private static List<Roi> withResiduals(Set<ShownMarks> shown, List<SpotMatch> matches) {
        ViewMaker views = new ViewMaker(SIDE, SIDE);
        PatternView laid = views.ofPlacement(silicon(0), Optional.empty(), 500, false);
        return Marks.of(views.withShown(laid, shown, false, matches), SIDE, SIDE, 1);
    }

    /** Each arrow begins at its computed spot, points to the right as the residual does, and is as long as the scale says. */
    @Test
    void residuals_areArrowsOfOneScale() {
        List<SpotMatch> matches = matches(silicon(0));
        double factor = ResidualPlot.of(matches).orElseThrow().factor();
        List<Roi> marks = withResiduals(EnumSet.of(ShownMarks.RESIDUALS), matches);
        List<Roi> arrows = named(marks, "residual");
        assertEquals(matches.size(), arrows.size());
        for (int i = 0; i < arrows.size(); i++) {
            Rectangle2D box = arrows.get(i).getFloatBounds();
            assertEquals(matches.get(i).computed().x() - 0.5, box.getX(), 0.01);
            assertEquals(0.1 * factor, box.getWidth(), 0.01);
        }
        Roi bar = named(marks, "bar of the residuals").get(0);
        assertEquals(
                ResidualPlot.of(matches).orElseThrow().barLength(),
                bar.getFloatBounds().getWidth(),
                0.01);
        assertEquals(1, named(marks, "scale of the residuals").size());
        assertTrue(withResiduals(Set.of(), matches).stream().noneMatch(roi -> isKind(roi, MarkStyle.RESIDUAL)));
    }

    /** What is drawn is ours, goes with the other marks, and stays out of the half that shows no image. */
    @Test
    void residuals_areNotDrawnWhereThereAreNone() {
        assertTrue(withResiduals(EnumSet.of(ShownMarks.RESIDUALS), List.of()).stream()
                .noneMatch(roi -> isKind(roi, MarkStyle.RESIDUAL)));
        List<Roi> half = withResiduals(EnumSet.of(ShownMarks.RESIDUALS, ShownMarks.SPLIT), matches(silicon(0)));
        assertFalse(named(half, "residual").isEmpty());
        assertTrue(named(half, "residual").stream()
                .allMatch(roi -> roi.getFloatBounds().getX() < 256));
    }

    @Test
    void extras_areNoIndices() {
        ImagePlus image = new ImagePlus("grey", new ByteProcessor(SIDE, SIDE));
        ViewMaker views = new ViewMaker(SIDE, SIDE);
        PatternView view = views.withShown(
                views.ofPlacement(silicon(0.2), Optional.empty(), 500, false),
                EnumSet.allOf(ShownMarks.class),
                true,
                List.of());
        PatternOverlay.show(image, view, "state");
        assertFalse(PatternOverlay.isLabelled(image));
        new SpotNote(new PixelPoint(500, 10), new int[] {1, -1, 1}, List.of("d 3.135 Å")).show(image);
        assertFalse(PatternOverlay.isLabelled(image));
        assertEquals(Optional.of("state"), PatternOverlay.state(image));
        long notes = Arrays.stream(image.getOverlay().toArray())
                .filter(roi -> isKind(roi, MarkStyle.NOTE))
                .filter(roi -> new Rectangle2D.Double(0, 0, SIDE, SIDE).contains(roi.getFloatBounds()))
                .count();
        assertEquals(2, notes);
        SpotNote.clear(image);
        assertTrue(Arrays.stream(image.getOverlay().toArray()).noneMatch(roi -> isKind(roi, MarkStyle.NOTE)));
    }

    private static boolean isKind(Roi roi, MarkStyle style) {
        return style.key().equals(roi.getProperty(PatternOverlay.PROPERTY));
    }

    /** Of Al2O3-like hexagonal axes (1 0 −1 0) is read with four indices; of a cubic crystal with three. */
    @Test
    void indices_areFourInHexagonalAxes() {
        Hkl hkl = new Hkl(1, 0, 0);
        assertEquals(3, IndexLabel.shown(hkl, TestPatterns.copper110().crystal()).length);
        assertEquals(
                "101\u03050", IndexLabel.of(hkl, CrystalShelf.find("corundum").orElseThrow()));
    }
}
