package io.github.zonewright.spots;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.SyntheticPattern;
import io.github.zonewright.image.Background;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.image.PointFilter;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;

class SearchPartsTest {

    @Test
    void frameEdge_cutGaussian_isPutBack() {
        double sigma = 2.5;
        for (double truth : new double[] {1.2, 2, 3, 4.5, 8}) {
            SyntheticPattern drawn = new SyntheticPattern(80, 80, 0).spot(truth, 40.2, sigma, 1e6);
            GrayImage response = PointFilter.ofSigma(sigma).apply(GrayImage.ofFloats(80, 80, drawn.counted(1, 1, 0)));
            Background flat = Background.of(response, 40, Mask.none(80, 80));
            List<PeakSearch.Peak> peaks =
                    new PeakSearch(response, sigma).find(flat.noise().atLeast(1), 5);
            assertEquals(truth, peaks.get(0).x(), 0.12 * sigma);
            assertEquals(40.2, peaks.get(0).y(), 0.03);
        }
    }

    @Test
    void frameEdge_rightSide_mirrorsTheLeft() {
        assertEquals(100 - FrameEdge.corrected(1.3, 100, 2), FrameEdge.corrected(98.7, 100, 2), 1e-12);
        assertEquals(50, FrameEdge.corrected(50, 100, 2));
        assertEquals(0, FrameEdge.error(50, 100, 2));
        assertTrue(FrameEdge.error(1, 100, 2) > 0.2);
        assertFalse(FrameEdge.isInside(-0.1, 100, 2));
    }

    @Test
    void peaks_ridgeAndBroadBump_areNoSpots() {
        SyntheticPattern drawn = new SyntheticPattern(200, 200, 50)
                .add((x, y) -> 300 * Math.exp(-0.5 * Math.pow((Math.hypot(x - 100, y - 100) - 60) / 4, 2)))
                .add((x, y) -> 80 * Math.exp(-0.5 * (Math.pow(x - 100, 2) + Math.pow(y - 100, 2)) / 100));
        assertTrue(SpotFinder.measure(drawn.floats(3)).spots().size() <= 1);
    }

    @Test
    void nearbyPoints_reach_isExact() {
        NearbyPoints points = new NearbyPoints(100, 50, 3);
        points.add(40, 20);
        assertTrue(points.anyWithin(42.9, 20));
        assertFalse(points.anyWithin(43.1, 20));
        assertFalse(points.anyWithin(-5, 70));
    }

    @Test
    void saturatedRegion_discWithStreak_middleIsTheDisc() {
        Mask mask = Mask.of(100, 100, i -> {
            int dx = i % 100 - 50;
            int dy = i / 100 - 40;
            return dx * dx + dy * dy <= 64 || Math.abs(dx) <= 2 && dy > 0 && dy < 40;
        });
        SaturatedRegion region = SaturatedRegion.of(mask, 6).get(0);
        assertTrue(region.isBloomed());
        assertEquals(50.5, region.x(), 0.01);
        assertEquals(40.5, region.y(), 2.5);
        assertTrue(SaturatedRegion.of(mask, 1000).isEmpty());
        assertTrue(SaturatedRegion.of(Mask.none(5, 5), 1).isEmpty());
    }

    @Test
    void glowCentre_roundFall_isFound() {
        for (double[] truth : new double[][] {{80, 60}, {30, 110}, {10, 75}}) {
            SyntheticPattern drawn = new SyntheticPattern(160, 160, 10)
                    .add((x, y) -> 3000 / (1 + Math.pow(Math.hypot(x - truth[0], y - truth[1]) / 40, 2)));
            Background level = Background.unsmoothed(drawn.floats(5), 8, Mask.none(160, 160));
            GlowCentre glow =
                    GlowCentre.of(level.level(), 1, (column, row) -> false).orElseThrow();
            assertEquals(truth[0], glow.x(), 2.5);
            assertEquals(truth[1], glow.y(), 2.5);
            assertTrue(glow.logWeight(glow.x(), glow.y()) > glow.logWeight(glow.x() + 20, glow.y()));
        }
    }

    @Test
    void glowCentre_evenImage_saysNothingOrLittle() {
        GrayImage even = GrayImage.ofFloats(100, 100, new float[10_000]);
        Background level = Background.unsmoothed(even, 8, Mask.none(100, 100));
        assertEquals(Optional.empty(), GlowCentre.of(level.level(), 1, (column, row) -> false));
    }

    @Test
    void beamStop_wedgeOnAGlow_isHiddenWithoutTheRest() {
        SyntheticPattern drawn = new SyntheticPattern(256, 256, 30)
                .add((x, y) -> 800 * Math.exp(-Math.hypot(x - 128, y - 120) / 60))
                .times((x, y) -> x > 115 && Math.abs(y - 120) < 8 + (x - 115) / 20 ? 0.03 : 1);
        Mask hidden = BeamStop.of(drawn.floats(6), 128, 120);
        assertTrue(hidden.contains(130, 120) && hidden.contains(200, 120) && hidden.contains(254, 120));
        assertFalse(hidden.contains(100, 120) || hidden.contains(200, 160) || hidden.contains(20, 20));
        assertEquals(
                0,
                BeamStop.of(new SyntheticPattern(256, 256, 100).floats(1), 128, 128)
                        .count());
        assertEquals(
                0, BeamStop.of(GrayImage.ofFloats(8, 8, new float[64]), 4, 4).count());
    }

    private static MeasuredSpot spot(double x, double y, double intensity) {
        return new MeasuredSpot(new PixelPoint(x, y), 0.05, intensity, 100, false);
    }

    @Test
    void centreSearch_pairsWithoutDirectBeam_meetInTheMiddle() {
        List<MeasuredSpot> spots = new ArrayList<>();
        double[][] shifts = {{40, 5}, {-7, 38}, {33, 43}, {47, -33}, {80, 10}};
        for (int i = 0; i < shifts.length; i++) {
            spots.add(spot(100 + shifts[i][0], 90 + shifts[i][1], 1000 + 300 * i));
            spots.add(spot(100 - shifts[i][0], 90 - shifts[i][1], 1100 + 300 * i));
        }
        GlowCentre glow = new GlowCentre(101, 89, 2, -7);
        List<CentreCandidate> found = new CentreSearch(spots, Optional.of(glow), 2).candidates();
        PatternCentre best = found.get(0).centre();
        assertEquals(0, best.position().distanceTo(new PixelPoint(100, 90)), 1e-6);
        assertEquals(PatternCentre.Source.SPOT_PAIRS, best.source());
        assertTrue(best.error() < 0.1);
        assertEquals(0, found.get(0).logWeight());
        assertTrue(found.size() > 1 && found.get(1).logWeight() < 0, "other centres are offered too");
    }

    @Test
    void centreSearch_nothing_noCandidate() {
        assertTrue(new CentreSearch(List.of(), Optional.empty(), 2).candidates().isEmpty());
    }

    @Test
    void centreSearch_loneSpot_isTheDirectBeam() {
        CentreCandidate only = new CentreSearch(List.of(spot(30, 40, 500)), Optional.empty(), 2)
                .candidates()
                .get(0);
        assertEquals(PatternCentre.Source.DIRECT_BEAM, only.centre().source());
        assertEquals(new PixelPoint(30, 40), only.centre().position());
    }
}
