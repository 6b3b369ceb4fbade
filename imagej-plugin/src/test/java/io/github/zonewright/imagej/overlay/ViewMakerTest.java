package io.github.zonewright.imagej.overlay;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.gui.Roi;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
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
