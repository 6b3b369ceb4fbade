package io.github.zonewright.imagej.overlay;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.pattern.IntensityModel;
import io.github.zonewright.pattern.PatternSimulator;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import java.util.List;

/**
 * The computed spots that fall on an image. Keeps the simulator of the crystal, beam and thickness it was last asked for,
 * so that dragging a pattern does not work out the reflections again.
 */
public final class ComputedSpots {
    /** Half width in excitation error of a usual, slightly bent foil, in 1/Å: keeps spots off the exact Bragg position. */
    private static final double HALF_WIDTH = 0.004;

    /** Spots weaker than this part of the strongest are left out. */
    private static final double FAINTEST = 1e-4;

    private static final int MOST = 1500;

    private record Key(Crystal crystal, Beam beam, double largestG, double thickness) {}

    private Key key = new Key(null, null, 0, 0);
    private PatternSimulator simulator;

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
        List<PlacedSpot> all = simulator(placement, width, height, thickness)
                .simulate(placement.orientation())
                .on(placement.camera());
        double faintest = all.isEmpty() ? 0 : FAINTEST * all.get(0).spot().intensity();
        return all.stream()
                .filter(s -> s.spot().intensity() > faintest && inside(s.position(), width, height))
                .limit(MOST)
                .toList();
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
            key = new Key(placement.crystal(), placement.beam(), largestG, thickness);
        }
        return simulator;
    }

    private static boolean inside(PixelPoint p, int width, int height) {
        return p.x() >= 0 && p.y() >= 0 && p.x() < width && p.y() < height;
    }
}
