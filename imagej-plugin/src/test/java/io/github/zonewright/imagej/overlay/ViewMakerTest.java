package io.github.zonewright.imagej.overlay;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.gui.Roi;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.SolutionErrors;
import io.github.zonewright.indexing.SpotMatch;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.MeasuredSpot;
import io.github.zonewright.spots.SpotFinder;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;

class ViewMakerTest {
    private final ViewMaker views = new ViewMaker(TestPatterns.SIDE, TestPatterns.SIDE);
    private final Placement placement = TestPatterns.copper110();

    @Test
    void ofPlacement_spotsAreInsideAndStrongestFirst() {
        List<PlacedSpot> spots =
                views.ofPlacement(placement, Optional.empty(), 500, false).computed();
        assertFalse(spots.isEmpty());
        for (int i = 0; i < spots.size(); i++) {
            var p = spots.get(i).position();
            assertTrue(p.x() >= 0 && p.y() >= 0 && p.x() < TestPatterns.SIDE && p.y() < TestPatterns.SIDE);
            assertTrue(i == 0
                    || spots.get(i).spot().intensity()
                            <= spots.get(i - 1).spot().intensity());
        }
    }

    @Test
    void ofPlacement_measuredSpotsUnderRings_areNotMarked() {
        MeasuredPattern measured = SpotFinder.measure(ImagePixels.of(TestPatterns.image()));
        assertTrue(measured.spots().size() >= 6, "spots " + measured.spots().size());
        PatternView right = views.ofPlacement(placement, Optional.of(measured), 500, false);
        PatternView wrong =
                views.ofPlacement(placement.turnedBy(Math.toRadians(17)), Optional.of(measured), 500, false);
        assertEquals(List.of(), right.unexplained());
        assertTrue(wrong.unexplained().size() > measured.spots().size() / 2);
    }

    /** Spots that a fit explains turn with a pattern that is moved by hand, however faint they are computed. */
    @Test
    void ofMoved_keepsWhatTheFitExplains() {
        PlacedSpot first = views.ofPlacement(placement, Optional.empty(), 500, false)
                .computed()
                .get(0);
        Hkl forbidden = new Hkl(1, -1, 0);
        PixelPoint centre = placement.camera().centre();
        PixelPoint there = placement
                .camera()
                .toPixel(across(placement, forbidden), placement.beam().wavelength());
        MeasuredSpot seen = new MeasuredSpot(there, 0.1, 100, 20, false);
        Solution fit = new Solution(
                placement,
                List.of(new SpotMatch(seen, forbidden, there)),
                List.of(),
                0,
                50,
                new SolutionErrors(0, 0, 0, 0, 0, 0),
                Optional.empty());
        double turn = Math.toRadians(17);
        PatternView moved = views.ofMoved(placement.turnedBy(turn), fit, Optional.empty(), 500, false);
        assertTrue(moved.computed().stream()
                .anyMatch(s -> s.spot().hkl().equals(first.spot().hkl())));
        PlacedSpot turned = moved.computed().stream()
                .filter(s -> s.spot().hkl().equals(forbidden))
                .findFirst()
                .orElseThrow();
        double x = there.x() - centre.x();
        double y = there.y() - centre.y();
        assertEquals(
                centre.x() + x * Math.cos(turn) + y * Math.sin(turn),
                turned.position().x(),
                0.01);
        assertEquals(
                centre.y() - x * Math.sin(turn) + y * Math.cos(turn),
                turned.position().y(),
                0.01);
        assertTrue(views.ofPlacement(placement.turnedBy(turn), Optional.empty(), 500, false).computed().stream()
                .noneMatch(s -> s.spot().hkl().equals(forbidden)));
    }

    private static Vector2 across(Placement laid, Hkl hkl) {
        Vector3 g = laid.orientation().scatteringVector(laid.crystal().lattice(), hkl);
        return new Vector2(g.x(), g.y());
    }

    @Test
    void marks_kindsDifferInShape() {
        PlacedSpot missing = views.ofPlacement(placement, Optional.empty(), 500, false)
                .computed()
                .get(0);
        MeasuredPattern measured = SpotFinder.measure(ImagePixels.of(TestPatterns.image()));
        PatternView view = new PatternView(
                Optional.of(placement),
                views.ofPlacement(placement, Optional.empty(), 500, false).computed(),
                measured.spots(),
                List.of(missing),
                false);
        List<Roi> marks = Marks.of(view, TestPatterns.SIDE, TestPatterns.SIDE, 1);
        assertEquals(3, corners(marks, MarkStyle.MISSING));
        assertEquals(4, corners(marks, MarkStyle.UNEXPLAINED));
        assertEquals(12, corners(marks, MarkStyle.CENTRE));
        assertEquals(Roi.OVAL, first(marks, MarkStyle.COMPUTED).getType());
        assertEquals(Roi.LINE, first(marks, MarkStyle.ROTATION).getType());
    }

    @Test
    void markSize_areaGrowsWithTheLogarithm() {
        List<PlacedSpot> spots =
                views.ofPlacement(placement, Optional.empty(), 500, false).computed();
        MarkSize size = new MarkSize(20, spots.get(0).spot().intensity(), 9);
        double largest = size.of(spots.get(0));
        double smallest = size.of(spots.get(spots.size() - 1));
        assertEquals(20, largest, 1e-12);
        assertTrue(smallest >= 0.3 * 20 && smallest < largest);
    }

    private static int corners(List<Roi> marks, MarkStyle style) {
        return first(marks, style).getFloatPolygon().npoints;
    }

    private static Roi first(List<Roi> marks, MarkStyle style) {
        return marks.stream()
                .filter(r -> style.key().equals(r.getProperty(PatternOverlay.PROPERTY)))
                .findFirst()
                .orElseThrow();
    }
}
