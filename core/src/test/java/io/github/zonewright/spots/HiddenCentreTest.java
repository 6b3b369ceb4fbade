package io.github.zonewright.spots;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.SyntheticPattern;
import io.github.zonewright.image.PixelPoint;
import org.junit.jupiter.api.Test;

/** Centres off the frame, on its edge and behind a stop, on drawn patterns. */
class HiddenCentreTest {

    private static final int SIDE = 256;
    private static final double STEP = 36;

    private static MeasuredPattern measured(PixelPoint centre, double glow) {
        DrawnNet net = DrawnNet.of(SIDE, SIDE, centre, STEP, 0.4);
        SyntheticPattern drawn = net.glow(20, glow).spot(centre.x(), centre.y(), 1.8, 6000);
        for (PixelPoint node : net.nodes()) {
            drawn.spot(node.x(), node.y(), 1.8, 300 * Math.exp(-node.distanceTo(centre) / 150));
        }
        return SpotFinder.measure(drawn.floats(1));
    }

    private static void assertCentre(PixelPoint truth, PatternCentre centre, String what) {
        assertEquals(0, centre.position().distanceTo(truth), 3 * centre.error(), what + ": " + centre);
    }

    @Test
    void measure_centreUpToHalfANetVectorOffTheFrame_isThatOfTheGlowAndRefinedByTheNet() {
        for (PixelPoint truth : new PixelPoint[] {
            new PixelPoint(-5, 130), new PixelPoint(-18, 100), new PixelPoint(270, 200), new PixelPoint(140, -11)
        }) {
            MeasuredPattern pattern = measured(truth, 400);
            PatternCentre centre = pattern.centre().orElseThrow();
            assertEquals(PatternCentre.Source.BACKGROUND, centre.source());
            assertCentre(truth, centre, "centre " + truth);
            assertTrue(centre.error() < 5 && pattern.isHidden(centre.position()));
            assertTrue(pattern.directBeam().isEmpty());
            PatternCentre refined = SpotNetFinder.find(pattern).refinedCentre().orElseThrow();
            assertEquals(0, refined.position().distanceTo(truth), 0.1, "net " + truth);
        }
    }

    @Test
    void measure_weakGlowOffTheFrame_isTheFirstCandidateWithALargerError() {
        for (PixelPoint truth : new PixelPoint[] {new PixelPoint(-18, 100), new PixelPoint(270, 200)}) {
            MeasuredPattern pattern = measured(truth, 100);
            assertEquals(
                    PatternCentre.Source.BACKGROUND,
                    pattern.centre().orElseThrow().source());
            assertCentre(truth, pattern.centre().orElseThrow(), "centre " + truth);
            assertTrue(pattern.centres().size() > 4);
            PatternCentre refined = SpotNetFinder.find(pattern).refinedCentre().orElseThrow();
            assertEquals(0, refined.position().distanceTo(truth), 0.1, "net " + truth);
        }
        PixelPoint corner = new PixelPoint(-18, -12);
        assertTrue(measured(corner, 100).centres().stream()
                .map(CentreCandidate::centre)
                .anyMatch(c -> c.source() == PatternCentre.Source.BACKGROUND
                        && c.position().distanceTo(corner) < c.error()));
    }

    @Test
    void measure_directBeamClippedByTheFrame_isTheCentre() {
        for (PixelPoint truth : new PixelPoint[] {
            new PixelPoint(2, 128), new PixelPoint(4, 3), new PixelPoint(0, 128), new PixelPoint(-1, 120)
        }) {
            MeasuredPattern pattern = measured(truth, 400);
            assertCentre(truth, pattern.centre().orElseThrow(), "centre " + truth);
        }
    }

    @Test
    void withCentre_aPersonsOffTheFrame_isRefinedByTheNet() {
        PixelPoint truth = new PixelPoint(-18, -12);
        MeasuredPattern pattern = measured(truth, 100).withCentre(new PixelPoint(-15, -14), 3);
        PatternCentre refined = SpotNetFinder.find(pattern).refinedCentre().orElseThrow();
        assertEquals(0, refined.position().distanceTo(truth), 0.1);
        assertEquals(PatternCentre.Source.BY_HAND, refined.source());
    }

    /** The lean brightens one side: a spot and its partner opposite differ up to fivefold. */
    @Test
    void measure_stopOverTheBeamAndUnequalPairs_centreFromPairs() {
        for (int seed = 0; seed < 8; seed++) {
            PixelPoint truth = new PixelPoint(125 + seed, 131 - seed);
            DrawnNet net = DrawnNet.of(SIDE, SIDE, truth, STEP, 0.2 * seed);
            SyntheticPattern drawn = net.glow(20, 300).spot(truth.x(), truth.y(), 1.8, 20000);
            for (PixelPoint node : net.nodes()) {
                double lean = 0.008 * (node.x() - truth.x());
                drawn.spot(node.x(), node.y(), 1.8, 400 * Math.exp(lean - node.distanceTo(truth) / 90));
            }
            drawn.times((x, y) -> y > truth.y() - 12 && Math.abs(x - truth.x()) < 11 ? 0.01 : 1);
            PatternCentre centre =
                    SpotFinder.measure(drawn.shorts(seed, 4)).centre().orElseThrow();
            assertEquals(0, centre.position().distanceTo(truth), 0.15, "pattern " + seed + ": " + centre);
        }
    }
}
