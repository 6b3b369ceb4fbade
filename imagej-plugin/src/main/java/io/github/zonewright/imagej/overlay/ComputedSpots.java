package io.github.zonewright.imagej.overlay;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.pattern.IntensityModel;
import io.github.zonewright.pattern.PatternSimulator;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import java.util.List;

/**
 * The computed spots that fall on an image. Keeps the simulator of the crystal, beam and thickness it was last asked for,
 * and the reflections that come near the Ewald sphere about the
 * last orientation, so that dragging a pattern does not work them out again.
 */
public final class ComputedSpots {
    /** Half width in excitation error of a usual, slightly bent foil, in 1/Å: keeps spots off the exact Bragg position. */
    private static final double HALF_WIDTH = 0.004;

    /** Spots weaker than this part of the strongest are left out. */
    private static final double FAINTEST = 1e-4;

    private static final int MOST = 1500;

    /** While a crystal is tilted by less than this, in radians, the same few reflections are looked at. */
    private static final double NEAR = Math.toRadians(0.5);

    private record Key(Crystal crystal, Beam beam, double largestG, double thickness) {}

    private Key key = new Key(null, null, 0, 0);
    private PatternSimulator simulator;
    private PatternSimulator near;
    private Vector3 nearTo;

    /** Nothing worked out yet. */
    public ComputedSpots() {}

    /**
     * The spots of a placement that fall on an image.
     *
     * @param placement the placement
     * @param width image width in px
     * @param height image height in px
     * @param thickness foil thickness in Å
     * @return the spots, strongest first
     * @throws IllegalArgumentException if the thickness is not finite and above 0
     */
    public synchronized List<PlacedSpot> on(Placement placement, int width, int height, double thickness) {
        Orientation orientation = placement.orientation();
        List<PlacedSpot> all = near(simulator(placement, width, height, thickness), orientation.towardsSource())
                .simulate(orientation)
                .on(placement.camera());
        double faintest = all.isEmpty() ? 0 : FAINTEST * all.get(0).spot().intensity();
        return all.stream()
                .filter(s -> s.spot().intensity() > faintest && inside(s.position(), width, height))
                .limit(MOST)
                .toList();
    }

    private PatternSimulator near(PatternSimulator all, Vector3 source) {
        if (near == null || nearTo.angleTo(source) > NEAR) {
            near = all.near(source, NEAR);
            nearTo = source;
        }
        return near;
    }

    private PatternSimulator simulator(Placement placement, int width, int height, double thickness) {
        double wanted = Math.min(
                placement.largestG(width, height), 0.9 / placement.beam().wavelength());
        boolean same = key.crystal == placement.crystal()
                && placement.beam().equals(key.beam)
                && key.thickness == thickness
                && key.largestG >= wanted
                && key.largestG <= 1.5 * wanted;
        if (!same) {
            double largestG = Math.min(1.15 * wanted, 0.95 / placement.beam().wavelength());
            simulator = PatternSimulator.of(placement.crystal(), placement.beam(), largestG)
                    .withModel(new IntensityModel.Smoothed(thickness, HALF_WIDTH));
            near = null;
            key = new Key(placement.crystal(), placement.beam(), largestG, thickness);
        }
        return simulator;
    }

    private static boolean inside(PixelPoint p, int width, int height) {
        return p.x() >= 0 && p.y() >= 0 && p.x() < width && p.y() < height;
    }
}
