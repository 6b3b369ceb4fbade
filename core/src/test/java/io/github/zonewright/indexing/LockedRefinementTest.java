package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.indexing.LockedRefinement.Lock;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import java.util.EnumSet;
import java.util.Set;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;

class LockedRefinementTest {

    private static final DrawnPlacement DRAWN = DrawnPlacement.of("silicon", "0 1 1", "2 0 0", 0.4);
    private static final MeasuredPattern PATTERN = DRAWN.measured(11);
    private static final PixelPoint CENTRE = DrawnPlacement.CENTRE;

    private static Placement start() {
        return DRAWN.truth()
                .turnedBy(Math.toRadians(0.4))
                .scaledBy(1.006)
                .leanedBy(0.01, -0.004)
                .centredAt(new PixelPoint(CENTRE.x() + 0.8, CENTRE.y() - 0.5));
    }

    @Test
    void refine_nothingLocked_onTheTruth() {
        Placement found = LockedRefinement.refine(PATTERN, start(), Set.of())
                .orElseThrow()
                .placement();
        assertEquals(0, found.camera().centre().distanceTo(CENTRE), 0.1);
        assertEquals(DrawnPlacement.CONSTANT, found.camera().constant(), 0.003 * DrawnPlacement.CONSTANT);
        assertEquals(0.4, found.setting().rotation(), Math.toRadians(0.05));
        assertEquals(DRAWN.truth().setting().zone(), found.setting().zone());
        assertTrue(
                found.setting().lean() < Math.toRadians(1),
                Math.toDegrees(found.setting().lean()) + "°");
    }

    /** What is locked comes out bit for bit; the zone always does, and what is free moves. */
    @ParameterizedTest
    @EnumSource(Lock.class)
    void refine_oneLocked_bitForBit(Lock lock) {
        Placement start = start();
        Solution solution =
                LockedRefinement.refine(PATTERN, start, EnumSet.of(lock)).orElseThrow();
        Placement found = solution.placement();
        assertEquals(start.setting().zone(), found.setting().zone());
        assertEquals(start.setting().reference(), found.setting().reference());
        assertEquals(
                lock == Lock.ROTATION,
                start.setting().rotation() == found.setting().rotation());
        assertEquals(
                lock == Lock.LEAN, start.setting().leanX() == found.setting().leanX());
        assertEquals(
                lock == Lock.LEAN, start.setting().leanY() == found.setting().leanY());
        assertEquals(
                lock == Lock.CENTRE,
                start.camera().centre().equals(found.camera().centre()));
        assertEquals(
                lock == Lock.CAMERA_CONSTANT,
                start.camera().constant() == found.camera().constant());
        assertEquals(
                lock == Lock.ELLIPSE,
                start.camera().ellipseRatio() == found.camera().ellipseRatio());
        assertEquals(lock == Lock.ROTATION, solution.errors().rotation() == 0);
        assertEquals(lock == Lock.CENTRE, solution.errors().centreX() == 0);
        assertEquals(lock == Lock.CAMERA_CONSTANT, solution.errors().constant() == 0);
    }

    @Test
    void refine_allLocked_theStartItself() {
        Placement start = start();
        Solution solution = LockedRefinement.refine(PATTERN, start, EnumSet.allOf(Lock.class))
                .orElseThrow();
        assertEquals(start, solution.placement());
        assertTrue(solution.rmsResidual() > 0.5, "residuals of the start: " + solution.rmsResidual());
    }

    @Test
    void refine_nothingUnderThePlacement_empty() {
        Placement astray = start().centredAt(new PixelPoint(-4000, 9000));
        assertTrue(LockedRefinement.refine(PATTERN, astray, Set.of()).isEmpty());
    }
}
