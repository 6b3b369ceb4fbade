package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.AtomSite;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.indexing.Discrimination.Kind;
import io.github.zonewright.indexing.Discrimination.Sight;
import io.github.zonewright.indexing.Discrimination.TellingSpot;
import io.github.zonewright.indexing.Discrimination.Tilt;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.PatternSimulator;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.pattern.SpotPattern;
import java.util.List;
import org.junit.jupiter.api.Test;

class WhatTellsApartTest {

    private static Placement withSetting(Placement p, String zone, String reference, double rotation) {
        return p.withSetting(ZoneSetting.onZone(Uvw.parse(zone), Hkl.parse(reference), rotation));
    }

    /**
     * Pyrite's class m−3 lacks the cube's four-fold axes (textbook merohedry). Its group P a −3 has 2 1 0 and lacks 1 2 0: hk0 needs
     * even h (International Tables A), so {2 1 0} in [0 0 1] tells a crystal from one turned by 90°.
     */
    @Test
    void between_pyriteAndItsQuarterTurn_merohedralTold210() {
        DrawnPlacement drawn = DrawnPlacement.of("pyrite", "0 0 1", "2 0 0", 0.3);
        Placement turned = withSetting(drawn.truth(), "0 0 1", "2 0 0", 0.3 + Math.PI / 2);
        Discrimination d = WhatTellsApart.between(drawn.measured(3), drawn.truth(), turned);
        assertEquals(Kind.MEROHEDRAL, d.kind());
        List<TellingSpot> ofFirst =
                d.spots().stream().filter(TellingSpot::ofFirst).toList();
        assertTrue(
                ofFirst.stream()
                        .anyMatch(s ->
                                Math.abs(s.hkl().h()) == 2 && Math.abs(s.hkl().k()) == 1),
                d.spots().toString());
        assertTrue(d.spots().stream().allMatch(s -> s.otherStrength() < s.strength() / 5));
        // The image is the first crystal's.
        assertTrue(
                ofFirst.stream().filter(s -> s.sight() != Sight.OUTSIDE).allMatch(s -> s.sight() == Sight.SEEN),
                ofFirst.toString());
        assertTrue(d.spots().stream()
                .filter(s -> !s.ofFirst() && s.sight() != Sight.OUTSIDE)
                .allMatch(s -> s.sight() == Sight.NOT_SEEN));
        assertTrue(d.sentences().get(1).startsWith("Look for "), d.sentences().toString());
        assertTrue(d.sentences().get(0).contains("merohedral"));
    }

    /** One atom at the corner of a cube has all of its symmetry, whatever the group that is written down. */
    @Test
    void between_twinThatNoIntensityShows_saysSo() {
        Crystal corner = Crystal.of("corner", Lattice.cubic(3.2), "P m -3", AtomSite.of("Po", 0, 0, 0));
        DrawnPlacement drawn = DrawnPlacement.of("copper", "0 0 1", "2 0 0", 0.3);
        Placement first = new Placement(
                corner,
                DrawnPlacement.BEAM,
                ZoneSetting.onZone(new Uvw(0, 1, 2), new Hkl(1, 0, 0), 0.3),
                drawn.truth().camera());
        Placement second = withSetting(first, "1 0 2", "0 1 0", 0.3 + Math.PI);
        Discrimination d = WhatTellsApart.between(drawn.measured(1), first, second);
        assertEquals(Kind.INDISTINGUISHABLE, d.kind());
        assertTrue(d.spots().isEmpty(), d.spots().toString());
        assertTrue(d.tilt().isEmpty());
        assertTrue(d.sentences().get(0).contains("no pattern of single scattering tells them apart"));
    }

    /**
     * Half a turn about [1 1 1] of a face-centred cube: the zero layer is two-fold, the crystal three-fold. The tilt told brings its
     * zone to the beam, turned as the test turns it, and the other answer's zone is half a turn away.
     */
    @Test
    void between_halfTurnAbout111_tiltToAZoneThatDiffers() {
        DrawnPlacement drawn = DrawnPlacement.of("copper", "1 1 1", "2 -2 0", 0.3);
        Placement other = WhatTellsApart.halfTurned(drawn.truth());
        Discrimination d = WhatTellsApart.between(drawn.measured(2), drawn.truth(), other);
        assertEquals(Kind.HALF_TURN, d.kind());
        assertEquals(60, Math.toDegrees(d.misorientation().angle()), 1e-4);
        Tilt tilt = d.tilt().orElseThrow();
        assertEquals(0, tilt.rotation().z());
        assertTrue(tilt.angle() > Math.toRadians(2) && tilt.angle() <= Math.toRadians(30));
        Vector3 zone = drawn.truth()
                .orientation()
                .rotation()
                .apply(new Vector3(
                        tilt.firstZone().u(),
                        tilt.firstZone().v(),
                        tilt.firstZone().w()));
        Vector3 after = Rotation.ofVector(tilt.rotation()).apply(zone).normalize();
        assertEquals(0, after.minus(Vector3.Z).norm(), 1e-9, "the zone is along the beam");
        Vector3 n = new Vector3(1, 1, 1).normalize();
        Vector3 v = new Vector3(
                tilt.firstZone().u(), tilt.firstZone().v(), tilt.firstZone().w());
        Vector3 mate = n.times(2 * v.dot(n)).minus(v);
        Vector3 told = new Vector3(
                tilt.secondZone().u(), tilt.secondZone().v(), tilt.secondZone().w());
        assertTrue(mate.angleTo(told) < Math.toRadians(6), told + " for " + mate);
        assertEquals(
                new Orientation(Rotation.ofVector(tilt.rotation())
                                .after(drawn.truth().orientation().rotation()))
                        .nearestZone(drawn.truth().crystal().lattice(), 4),
                tilt.firstZone());
        assertEquals(
                tilt.firstZone(),
                tilt.first().orientation().nearestZone(drawn.truth().crystal().lattice(), 4));
        assertTrue(tilt.difference() > 0.4 && tilt.difference() <= 1);
        assertTrue(d.sentences().get(2).contains("pole piece"), "cautions belong to the tilt");
        assertEquals(3, d.sentences().size());
    }

    /** Copper and nearly as large austenite differ in nothing but the scale, which the camera constant takes up. */
    @Test
    void between_twoCrystalsAlike_accidentalWithoutTilt() {
        DrawnPlacement drawn = DrawnPlacement.of("copper", "0 0 1", "2 0 0", 0.3);
        Crystal austenite = CrystalShelf.find("austenite").orElseThrow();
        Placement other = new Placement(
                austenite,
                DrawnPlacement.BEAM,
                drawn.truth().setting(),
                drawn.truth()
                        .camera()
                        .withConstant(DrawnPlacement.CONSTANT
                                * austenite.lattice().a()
                                / drawn.truth().crystal().lattice().a()));
        Discrimination d = WhatTellsApart.between(drawn.measured(4), drawn.truth(), other);
        assertEquals(Kind.TWO_CRYSTALS, d.kind());
        assertTrue(d.tilt().isEmpty(), d.sentences().toString());
        assertTrue(d.spots().isEmpty(), d.spots().toString());
    }

    /** A pattern is like itself, and unlike itself turned by an eighth of a turn. */
    @Test
    void difference_ofAPatternWithItselfAndAnother() {
        DrawnPlacement drawn = DrawnPlacement.of("copper", "0 0 1", "2 0 0", 0.3);
        PatternSimulator simulator = PatternSimulator.of(drawn.truth().crystal(), DrawnPlacement.BEAM, 1.2);
        SpotPattern own = simulator.simulate(drawn.truth().orientation());
        SpotPattern turned = simulator.simulate(
                withSetting(drawn.truth(), "0 0 1", "2 0 0", 0.3 + Math.PI / 4).orientation());
        assertEquals(0, PatternDifference.of(own, own), 1e-12);
        assertTrue(PatternDifference.of(own, turned) > 0.8, "" + PatternDifference.of(own, turned));
        assertEquals(PatternDifference.of(own, turned), PatternDifference.of(turned, own), 1e-9);
    }
}
