package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.util.ArrayList;
import java.util.List;

/** A crystal of the shelf on a zone axis, drawn and measured, with further spots at fractions of its lattice. */
record DrawnPlacement(Placement truth, List<DrawnCrystal.Spot> extra) {

    static final Beam BEAM = Beam.ofKilovolts(200);
    static final PixelPoint CENTRE = new PixelPoint(151.3, 146.8);
    static final double CONSTANT = 140;
    private static final int SIZE = 300;

    static DrawnPlacement of(String crystal, String zone, String reference, double rotation) {
        Crystal found = CrystalShelf.find(crystal).orElseThrow();
        ZoneSetting setting = ZoneSetting.onZone(Uvw.parse(zone), Hkl.parse(reference), rotation);
        return new DrawnPlacement(new Placement(found, BEAM, setting, Camera.of(CENTRE, CONSTANT, false)), List.of());
    }

    /** With a spot at (h k l)/n, laid by the flat formula R = K|g|/√(1 − λ²g²). */
    DrawnPlacement with(String hkl, double n, double peak) {
        Vector3 g = truth.orientation()
                .scatteringVector(truth.crystal().lattice(), Hkl.parse(hkl))
                .times(1 / n);
        double sine2 = BEAM.wavelength() * BEAM.wavelength() * (g.x() * g.x() + g.y() * g.y());
        double k = CONSTANT / Math.sqrt(1 - sine2);
        List<DrawnCrystal.Spot> more = new ArrayList<>(extra);
        more.add(new DrawnCrystal.Spot(null, CENTRE.x() + k * g.x(), CENTRE.y() - k * g.y(), peak));
        return new DrawnPlacement(truth, more);
    }

    MeasuredPattern measured(long seed) {
        DrawnCrystal.Setup setup = new DrawnCrystal.Setup(
                truth.crystal(),
                BEAM.wavelength(),
                truth.orientation().rotation(),
                CENTRE,
                CONSTANT,
                1,
                0,
                false,
                SIZE,
                0.015);
        List<DrawnCrystal.Spot> spots = new ArrayList<>(DrawnCrystal.spots(setup, seed));
        spots.addAll(extra);
        return SpotFinder.measure(DrawnCrystal.image(setup, spots, seed));
    }

    Solution solution(long seed) {
        return Refinement.refine(measured(seed), truth).orElseThrow();
    }
}
