package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.SyntheticPattern;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.util.Random;
import org.junit.jupiter.api.Test;

/** Placements laid by hand: near the truth, but not on it. */
class RefinementTest {

    private static final Beam BEAM = Beam.ofKilovolts(200);
    private static final PixelPoint CENTRE = new PixelPoint(121.3, 126.8);
    private static final double CONSTANT = 118;

    private static Placement placement(String crystal, Uvw zone, Hkl reference, double rotation, boolean mirrored) {
        Crystal found = CrystalShelf.find(crystal).orElseThrow();
        return new Placement(
                found, BEAM, ZoneSetting.onZone(zone, reference, rotation), Camera.of(CENTRE, CONSTANT, mirrored));
    }

    private static Placement silicon(boolean mirrored) {
        return placement("silicon", new Uvw(0, 1, 1), new Hkl(2, 0, 0), 0.4, mirrored);
    }

    private static MeasuredPattern measured(Placement truth, long seed) {
        DrawnCrystal.Setup setup = new DrawnCrystal.Setup(
                truth.crystal(),
                BEAM.wavelength(),
                truth.orientation().rotation(),
                CENTRE,
                CONSTANT,
                1.004,
                0.5,
                truth.camera().mirrored(),
                250,
                0.015);
        return SpotFinder.measure(DrawnCrystal.image(setup, DrawnCrystal.spots(setup, seed), seed));
    }

    private static void assertAt(Placement truth, Solution found) {
        assertEquals(0, found.placement().camera().centre().distanceTo(CENTRE), 0.1);
        assertEquals(CONSTANT, found.placement().camera().constant(), 0.003 * CONSTANT);
        double off = found.placement().setting().rotation() - truth.setting().rotation();
        assertEquals(0, Math.toDegrees(Math.IEEEremainder(off, 2 * Math.PI)), 0.05);
        assertEquals(truth.setting().zone(), found.placement().setting().zone());
        assertEquals(truth.setting().reference(), found.placement().setting().reference());
        assertEquals(truth.camera().mirrored(), found.placement().camera().mirrored());
        assertTrue(found.unexplained().size() <= 1, found.unexplained() + " left over");
        assertTrue(found.rmsResidual() < 0.3);
    }

    /** One degree and three pixels off, and 1 % in scale, in many directions, on plain and mirrored images. */
    @Test
    void refine_laidByHand_onTheSpots() {
        Random random = new Random(4);
        for (boolean mirrored : new boolean[] {false, true}) {
            Placement truth = silicon(mirrored);
            MeasuredPattern pattern = measured(truth, mirrored ? 1 : 2);
            for (int n = 0; n < 8; n++) {
                double azimuth = 2 * Math.PI * random.nextDouble();
                Placement start = truth.turnedBy(Math.toRadians(n % 2 == 0 ? 1 : -1))
                        .scaledBy(n % 4 < 2 ? 1.01 : 0.99)
                        .centredAt(
                                new PixelPoint(CENTRE.x() + 3 * Math.cos(azimuth), CENTRE.y() + 3 * Math.sin(azimuth)));
                assertAt(truth, Refinement.refine(pattern, start).orElseThrow());
            }
        }
    }

    @Test
    void refine_fromItsOwnAnswer_stays() {
        Placement truth = silicon(false);
        MeasuredPattern pattern = measured(truth, 3);
        Solution once = Refinement.refine(pattern, truth).orElseThrow();
        Solution twice = Refinement.refine(pattern, once.placement()).orElseThrow();
        assertEquals(
                0,
                twice.placement()
                        .camera()
                        .centre()
                        .distanceTo(once.placement().camera().centre()),
                0.01);
        assertEquals(
                once.placement().setting().rotation(),
                twice.placement().setting().rotation(),
                Math.toRadians(0.005));
        assertEquals(once.matches().size(), twice.matches().size());
    }

    /** The zone stays as laid, and so does the reference, even one that is absent. */
    @Test
    void refine_otherReference_kept() {
        Placement truth = silicon(false);
        MeasuredPattern pattern = measured(truth, 4);
        ZoneSetting other =
                ZoneSetting.of(truth.orientation(), truth.crystal().lattice(), new Uvw(0, 1, 1), new Hkl(1, -1, 1));
        Solution found = Refinement.refine(pattern, truth.withSetting(other)).orElseThrow();
        assertEquals(new Hkl(1, -1, 1), found.placement().setting().reference());
        assertEquals(
                0,
                Math.toDegrees(found.placement()
                        .orientation()
                        .rotation()
                        .angleTo(truth.orientation().rotation())),
                1);
    }

    @Test
    void refine_nothingUnderThePlacement_empty() {
        Placement truth = silicon(false);
        MeasuredPattern pattern = measured(truth, 5);
        Placement astray = truth.centredAt(new PixelPoint(-4000, 9000));
        assertTrue(Refinement.refine(pattern, astray).isEmpty());
    }

    /** A person may lay a pattern on an image where the finder saw neither spots nor a centre. */
    @Test
    void refine_imageWithoutSpotsOrCentre_empty() {
        MeasuredPattern blank = SpotFinder.measure(new SyntheticPattern(120, 120, 50).shorts(1, 1));
        assertTrue(Refinement.refine(blank, silicon(false)).isEmpty());
        MeasuredPattern black = SpotFinder.measure(GrayImage.ofFloats(120, 120, new float[120 * 120]));
        assertTrue(black.centres().isEmpty());
        assertTrue(Refinement.refine(black, silicon(false)).isEmpty());
    }

    /** Half a turn about [1 1 1] of silicon is no symmetry: both orientations are told, where upper layers are silent. */
    @Test
    void refine_noTwofoldZone_halfTurnTold() {
        Placement threefold = placement("silicon", new Uvw(1, 1, 1), new Hkl(2, -2, 0), 0.3, false);
        Solution open = Refinement.refine(measured(threefold, 6), threefold).orElseThrow();
        assertTrue(open.halfTurn().isPresent());
        double turn = open.halfTurn()
                .get()
                .rotation()
                .angleTo(open.placement().orientation().rotation());
        assertEquals(Math.PI, turn, 1e-9);
        assertEquals(
                open.placement().setting().lean(),
                open.halfTurn().get().lean(threefold.crystal().lattice(), new Uvw(1, 1, 1)),
                1e-9,
                "about the zone axis, which stays where it is");
        Solution settled =
                Refinement.refine(measured(silicon(false), 7), silicon(false)).orElseThrow();
        assertTrue(settled.halfTurn().isEmpty(), "[0 1 1] is a two-fold axis");
    }
}
