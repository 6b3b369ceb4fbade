package io.github.zonewright.pattern;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertSame;
import static org.junit.jupiter.api.Assertions.assertThrows;

import io.github.zonewright.crystal.AtomSite;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import java.util.List;
import org.junit.jupiter.api.Test;

class PlacementTest {

    private static final Crystal CUBE = Crystal.of("cube", Lattice.cubic(4), "P 1", AtomSite.of("C", 0, 0, 0));
    private static final Beam BEAM = Beam.ofKilovolts(200);
    private static final PixelPoint CENTRE = new PixelPoint(256, 256);
    private static final ZoneSetting SETTING = new ZoneSetting(new Uvw(0, 0, 1), new Hkl(1, 0, 0), 0.1, 0.01, -0.02);
    private static final Placement PLACED = new Placement(CUBE, BEAM, SETTING, Camera.of(CENTRE, 200, false));

    private static PixelPoint position(Placement placement, Hkl hkl) {
        return PatternSimulator.of(CUBE, BEAM, 1).simulate(placement.orientation()).on(placement.camera()).stream()
                .filter(s -> s.spot().hkl().equals(hkl))
                .findFirst()
                .orElseThrow()
                .position();
    }

    private static Placement onZone(double rotation, boolean mirrored) {
        return new Placement(
                CUBE,
                BEAM,
                ZoneSetting.onZone(new Uvw(0, 0, 1), new Hkl(1, 0, 0), rotation),
                Camera.of(CENTRE, 200, mirrored));
    }

    /** 200 of a 4 Å cube at K = 200 px·Å: 100 px from the centre, and 8 in 100,000 further on a flat detector. */
    @Test
    void on_camera_workedNumber() {
        double out = 100 / Math.sqrt(1 - Math.pow(BEAM.wavelength() / 2, 2));
        PixelPoint right = position(onZone(0, false), new Hkl(2, 0, 0));
        assertEquals(0, right.distanceTo(new PixelPoint(256 + out, 256)), 1e-10);
        PixelPoint up = position(onZone(Math.PI / 2, false), new Hkl(2, 0, 0));
        assertEquals(0, up.distanceTo(new PixelPoint(256, 256 - out)), 1e-10);
    }

    @Test
    void on_mirroredCamera_swapsLeftAndRight() {
        for (Hkl hkl : List.of(new Hkl(1, 2, 0), new Hkl(-3, 0, 0), new Hkl(0, 2, 0))) {
            PixelPoint plain = position(onZone(0.4, false), hkl);
            PixelPoint mirrored = position(onZone(0.4, true), hkl);
            assertEquals(512 - plain.x(), mirrored.x(), 1e-10);
            assertEquals(plain.y(), mirrored.y(), 1e-10);
        }
    }

    @Test
    void on_keepsTheOrderOfTheSpots() {
        SpotPattern pattern = PatternSimulator.of(CUBE, BEAM, 1).simulate(PLACED.orientation());
        List<PlacedSpot> placed = pattern.on(PLACED.camera());
        assertEquals(pattern.spots(), placed.stream().map(PlacedSpot::spot).toList());
    }

    @Test
    void turnedBy_turnsCounterClockwiseAndStaysWithinHalfATurn() {
        assertEquals(0.1 + 0.5, PLACED.turnedBy(0.5).setting().rotation(), 1e-15);
        assertEquals(0.1 - 3, PLACED.turnedBy(2 * Math.PI - 3).setting().rotation(), 1e-14);
        assertEquals(SETTING.leanX(), PLACED.turnedBy(1).setting().leanX());
        PixelPoint turned = position(onZone(0, false).turnedBy(Math.PI / 2), new Hkl(1, 0, 0));
        assertEquals(256, turned.x(), 1e-10);
        assertEquals(true, turned.y() < 256, "up on the screen");
    }

    @Test
    void leanedBy_addsToTheLean() {
        ZoneSetting leaned = PLACED.leanedBy(0.005, 0.03).setting();
        assertEquals(0.015, leaned.leanX(), 1e-17);
        assertEquals(0.01, leaned.leanY(), 1e-17);
        assertEquals(SETTING.rotation(), leaned.rotation());
        assertThrows(IllegalArgumentException.class, () -> PLACED.leanedBy(2, 0));
    }

    @Test
    void camera_changesAlone() {
        PixelPoint other = new PixelPoint(10, 20);
        assertEquals(other, PLACED.centredAt(other).camera().centre());
        assertEquals(250, PLACED.scaledBy(1.25).camera().constant());
        assertSame(SETTING, PLACED.scaledBy(1.25).setting());
        assertThrows(IllegalArgumentException.class, () -> PLACED.scaledBy(-1));
    }

    @Test
    void largestG_isThatOfTheFarthestCorner() {
        Placement corner = PLACED.centredAt(new PixelPoint(100, 400));
        double tangent = Math.hypot(412, 400) / 200;
        double expected = tangent / Math.sqrt(1 + Math.pow(tangent * BEAM.wavelength(), 2));
        assertEquals(expected, corner.largestG(512, 512), 1e-12);
        Placement stretched = corner.withCamera(corner.camera().withEllipse(1.1, 0.7));
        double largest = 0;
        for (int i = 0; i <= 512; i++) {
            for (PixelPoint p : List.of(
                    new PixelPoint(i, 0), new PixelPoint(i, 512), new PixelPoint(0, i), new PixelPoint(512, i))) {
                Vector2 g = stretched.camera().toReciprocal(p, BEAM.wavelength());
                largest = Math.max(largest, g.norm());
            }
        }
        assertEquals(largest, stretched.largestG(512, 512), 1e-12);
    }
}
