package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.util.List;
import org.junit.jupiter.api.Test;

/** Crystals along axes that are not two-fold, with and without the spots of their upper layers. */
class UpperLayersTest {

    private static final Beam BEAM = Beam.ofKilovolts(80);

    private record Case(Crystal crystal, Uvw zone) {
        static Case of(String crystal, int u, int v, int w) {
            return new Case(CrystalShelf.find(crystal).orElseThrow(), new Uvw(u, v, w));
        }

        DrawnCrystal.Setup setup(double lean) {
            Rotation upright = Rotation.between(crystal.lattice().vector(zone), Vector3.Z);
            Rotation tilt = Rotation.ofVector(new Vector3(Math.toRadians(lean), Math.toRadians(lean / 2), 0));
            Rotation orientation =
                    tilt.after(Rotation.ofAxisAngle(Vector3.Z, 1)).after(upright);
            return new DrawnCrystal.Setup(
                    crystal, BEAM.wavelength(), orientation, new PixelPoint(150, 146), 100, 1, 0, false, 300, 0.02);
        }

        Solution best(DrawnCrystal.Setup setup, List<DrawnCrystal.Spot> spots, long seed) {
            MeasuredPattern pattern = SpotFinder.measure(DrawnCrystal.image(setup, spots, seed));
            return OrientationSearch.of(crystal, BEAM, 100.4, 0.01, false)
                    .find(pattern)
                    .best()
                    .orElseThrow();
        }

        /** The angle to the truth in degrees, the half turn about the zone axis not forgiven. */
        double off(DrawnCrystal.Setup setup, Rotation found) {
            return crystal.spaceGroup().properLaueRotations(crystal.lattice()).stream()
                    .mapToDouble(m ->
                            Math.toDegrees(found.angleTo(setup.orientation().after(Rotation.ofMatrix(m)))))
                    .min()
                    .orElseThrow();
        }
    }

    private static long upper(Solution s) {
        Uvw zone = s.placement().setting().zone();
        return s.matches().stream().filter(m -> m.hkl().dot(zone) != 0).count();
    }

    @Test
    void find_upperLayerSpots_decideTheHalfTurn() {
        for (Case c : List.of(
                Case.of("calcite", -2, 2, 1),
                Case.of("cassiterite", 2, 1, 1),
                Case.of("aluminium nitride", 1, -2, 2))) {
            DrawnCrystal.Setup setup = c.setup(0.4);
            List<DrawnCrystal.Spot> spots = DrawnCrystal.spots(setup, 1);
            long drawn = spots.stream().filter(s -> s.hkl().dot(c.zone) != 0).count();
            assertTrue(drawn >= 6, c + ": upper-layer spots drawn: " + drawn);
            Solution best = c.best(setup, spots, 1);
            double off = c.off(setup, best.placement().orientation().rotation());
            assertTrue(off < 1.5, c + ": off by " + off + "°");
            assertTrue(best.halfTurn().isEmpty(), c + ": decided");
            assertTrue(
                    upper(best) > drawn / 2, c + ": " + upper(best) + " of " + drawn + " upper-layer spots explained");
        }
    }

    /** With nothing of the upper layers to be seen, both orientations are named and the truth is one of them. */
    @Test
    void find_zeroLayerAlone_bothOrientations() {
        for (Case c :
                List.of(Case.of("silicon", 1, 1, 1), Case.of("copper", 2, 1, 1), Case.of("magnesium", 1, -2, 2))) {
            DrawnCrystal.Setup setup = c.setup(0.2);
            List<DrawnCrystal.Spot> spots = DrawnCrystal.spots(setup, 2).stream()
                    .filter(s -> s.hkl().dot(c.zone) == 0)
                    .toList();
            Solution best = c.best(setup, spots, 2);
            double own = c.off(setup, best.placement().orientation().rotation());
            double turned = c.off(setup, best.halfTurn().orElseThrow().rotation());
            assertTrue(Math.min(own, turned) < 1.5, c + ": " + own + "°, turned " + turned + "°");
            assertTrue(upper(best) == 0, c + ": no spot is given to an upper layer");
        }
    }
}
