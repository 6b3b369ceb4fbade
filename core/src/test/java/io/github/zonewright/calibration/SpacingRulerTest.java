package io.github.zonewright.calibration;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;

class SpacingRulerTest {
    private static final PixelPoint CENTRE = new PixelPoint(1000, 1000);
    /** At 3 MV the sphere is flat to 1e-5 at these angles. */
    private static final Beam FLAT = Beam.ofKilovolts(3000);

    private static SpacingRuler ruler(double constantError, double centreError) {
        return SpacingRuler.of(Camera.of(CENTRE, 500, false), constantError, centreError, FLAT);
    }

    @Test
    void spot_thirdOrder_isThreeTimesNearer() {
        Spacing spacing = ruler(0, 0).spot(new PixelPoint(1600, 1000), 0, 3);
        assertEquals(200, spacing.length().value(), 1e-12);
        assertEquals(2.5, spacing.d().value(), 1e-4);
        assertEquals(0, spacing.d().error(), 0);
    }

    @Test
    void spot_errors_addInSquares() {
        // 0.6 px and 0.8 px make 1 px of 500 px, 0.2 %; 0.15 % of the constant besides: 0.25 %.
        Spacing spacing = ruler(0.75, 0.8).spot(new PixelPoint(1000, 500), 0.6, 1);
        assertEquals(0.0025, spacing.d().relativeError(), 1e-9);
        assertEquals(0.002, spacing.placeError(), 1e-9);
    }

    @Test
    void pair_needsNoCentre() {
        Spacing spacing = ruler(0, 50).pair(new PixelPoint(1310, 980), new PixelPoint(710, 980), 0.3, 1);
        assertEquals(300, spacing.length().value(), 1e-9);
        assertEquals(500.0 / 300, spacing.d().value(), 1e-4);
        assertEquals(0.3 / Math.sqrt(2), spacing.length().error(), 1e-12);
    }

    @Test
    void spot_ellipse_isTakenOff() {
        Camera camera = new Camera(CENTRE, 500, 1.0404, 0, false);
        SpacingRuler ruler = SpacingRuler.of(camera, 0, 0, FLAT);
        // √1.0404 = 1.02.
        assertEquals(2.5, ruler.spot(new PixelPoint(1204, 1000), 0, 1).d().value(), 1e-4);
        assertEquals(
                2.5,
                ruler.spot(new PixelPoint(1000, 1000 - 200 / 1.02), 0, 1).d().value(),
                1e-4);
    }

    /** At 20 kV λ = 0.0859 Å (common tables); the tangent makes the spot of d = 1 Å lie 0.28 % farther out than K/d. */
    @Test
    void spot_wideAngle_countsTheTangent() {
        SpacingRuler ruler = SpacingRuler.of(Camera.of(CENTRE, 500, false), 0, 0, Beam.ofKilovolts(20));
        double theta = Math.asin(0.08588 / 2);
        double radius = 500 / 0.08588 * Math.tan(2 * theta);
        double flat = ruler.spot(new PixelPoint(1000 + radius, 1000), 0, 1).d().value();
        // The ruler gives g across the beam, sin 2θ/λ.
        assertEquals(0.08588 / Math.sin(2 * theta), flat, 1e-4);
    }

    @Test
    void to_cubicNet_givesRatioAndAngle() {
        SpacingRuler ruler = ruler(5, 0);
        Spacing first = ruler.spot(new PixelPoint(1300, 1000), 0.3, 1);
        Spacing second = ruler.spot(new PixelPoint(1300, 700), 0.3, 1);
        Spacing.Relation relation = second.to(first);
        assertEquals(Math.sqrt(2), relation.ratio().value(), 1e-4);
        assertEquals(Math.PI / 4, relation.angle().value(), 1e-9);
        // The constant's 1 % drops out: √(0.001² + 0.00071²).
        assertEquals(0.0012247, relation.angle().error(), 1e-6);
    }

    @Test
    void d_manyNoisySpots_coversTheTruthAsStated() {
        Random random = new Random(5);
        int covered = 0;
        for (int i = 0; i < 2000; i++) {
            double constant = 500 + random.nextGaussian();
            Camera camera = Camera.of(
                    new PixelPoint(1000 + 0.4 * random.nextGaussian(), 1000 + 0.4 * random.nextGaussian()),
                    constant,
                    false);
            PixelPoint place = new PixelPoint(1400 + 0.3 * random.nextGaussian(), 1300 + 0.3 * random.nextGaussian());
            Spacing spacing = SpacingRuler.of(camera, 1, 0.4, FLAT).spot(place, 0.3, 1);
            covered += Math.abs(spacing.d().value() - 1) < spacing.d().error() ? 1 : 0;
        }
        assertTrue(covered > 1300 && covered < 1430, covered + " of 2000");
    }

    @Test
    void spot_nonsense_isRefused() {
        SpacingRuler ruler = ruler(0, 0);
        assertThrows(IllegalArgumentException.class, () -> ruler.spot(CENTRE, 0, 1));
        assertThrows(IllegalArgumentException.class, () -> ruler.spot(new PixelPoint(1, 1), 0, 0));
        assertThrows(IllegalArgumentException.class, () -> ruler(-1, 0));
    }

    /** Spacings of gold and silicon from the powder tables (from memory): Au 111 2.355 Å, Si 220 1.920 Å. */
    @Test
    void within_spacing_listsFamiliesNearestFirst() {
        SpacingList list = SpacingList.of(
                List.of(
                        CrystalShelf.find("gold").orElseThrow(),
                        CrystalShelf.find("silicon").orElseThrow()),
                0.8);
        SpacingList.Candidate gold = list.within(2.36, 0.01).get(0);
        assertEquals(new Hkl(1, 1, 1), gold.hkl());
        assertEquals(8, gold.multiplicity());
        assertEquals(0.0023, gold.deviation(2.36), 2e-4);
        assertEquals(new Hkl(2, 2, 0), list.within(1.92, 0.005).get(0).hkl());
        List<SpacingList.Candidate> wide = list.within(2.7, 0.02);
        assertTrue(wide.stream().anyMatch(c -> c.absent() && c.hkl().equals(new Hkl(2, 0, 0))));
        assertFalse(list.within(2.36, 0.01).stream().anyMatch(SpacingList.Candidate::absent));
        assertThrows(IllegalArgumentException.class, () -> list.within(-1, 0.1));
    }
}
