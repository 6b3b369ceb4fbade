package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertSame;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import org.junit.jupiter.api.Test;

/** A net that may stand about either of two nodes; whether one is told of the other. */
class OtherCentreTest {

    private static final Solution HERE =
            DrawnPlacement.of("aluminium", "0 0 1", "2 0 0", 0.3).solution(1);

    /** The same net 70 px further right, leaning 2° more to the right, by that many nats worse. */
    private static Solution aside(double worse, double px) {
        Placement p = HERE.placement();
        ZoneSetting s = p.setting();
        Camera c = p.camera();
        Camera moved = new Camera(
                new PixelPoint(c.centre().x() + px, c.centre().y()),
                c.constant(),
                c.ellipseRatio(),
                c.ellipseAzimuth(),
                c.mirrored());
        ZoneSetting leaning =
                new ZoneSetting(s.zone(), s.reference(), s.rotation(), s.leanX() + Math.toRadians(2), s.leanY());
        return new Solution(
                new Placement(p.crystal(), p.beam(), leaning, moved),
                HERE.matches(),
                HERE.unexplained(),
                HERE.rmsResidual(),
                HERE.score() - worse,
                HERE.errors(),
                HERE.halfTurn(),
                HERE.remarks(),
                HERE.ownScore());
    }

    @Test
    void told_aboutAsGood_leanCoversBothAndAWordIsSaid() {
        Solution told = OtherCentre.told(HERE, aside(9, 70));
        assertTrue(told.errors().leanX() >= Math.toRadians(2));
        assertEquals(HERE.errors().leanY(), told.errors().leanY(), 1e-12);
        assertEquals(HERE.remarks().size() + 1, told.remarks().size());
        assertTrue(told.remarks().get(told.remarks().size() - 1).startsWith("The centre may also lie at (221."));
        assertEquals(HERE.placement(), told.placement());
    }

    @Test
    void told_plainlyWorseOrTheSameCentre_nothingChanges() {
        assertSame(HERE, OtherCentre.told(HERE, aside(40, 70)));
        assertSame(HERE, OtherCentre.told(HERE, aside(1, 0.5)));
    }
}
