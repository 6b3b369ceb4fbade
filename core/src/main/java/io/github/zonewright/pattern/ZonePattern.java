package io.github.zonewright.pattern;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.ZoneSetting;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;

/**
 * The zero layer of a crystal exactly on zone, turned so that its shortest reflection points to the right.
 *
 * @param setting zone axis, and the first basis spot as reference, at rotation 0
 * @param second the shortest spot off the row of the first; of equally short ones the first counter-clockwise
 * @param spots the spots, strongest first, without the direct beam
 * @param doubled (gX, gY) in 1/Å of the spots that only double diffraction lights
 */
public record ZonePattern(ZoneSetting setting, Hkl second, List<PredictedSpot> spots, List<Vector2> doubled) {
    /** In 1/Å, the excitation error at which a spot of a usual, slightly bent foil has fallen to half. */
    private static final double HALF_WIDTH = 0.004;

    /** In 1/Å; shorter differences between lengths are rounding. */
    private static final double SAME = 1e-7;

    /** Copies the lists. */
    public ZonePattern {
        spots = List.copyOf(spots);
        doubled = List.copyOf(doubled);
    }

    /**
     * Computes the pattern of a zone.
     *
     * @param crystal the crystal
     * @param beam the beam
     * @param zone the zone axis
     * @param largestG the largest |g| to be seen, in 1/Å
     * @return the pattern; empty when fewer than two rows of reflections lie within largestG
     * @throws IllegalArgumentException if largestG is not above 0 and below 1/λ, or makes too many reflections
     */
    public static Optional<ZonePattern> of(Crystal crystal, Beam beam, Uvw zone, double largestG) {
        PatternSimulator simulator = PatternSimulator.of(crystal, beam, largestG)
                .withModel(new IntensityModel.Smoothed(PatternSimulator.DEFAULT_THICKNESS, HALF_WIDTH))
                .withLargestExcitation(Math.min(1, beam.wavelength() * largestG * largestG));
        Hkl any = anyOf(zone);
        List<PredictedSpot> first = zeroLayer(simulator, crystal, ZoneSetting.onZone(zone, any, 0));
        Optional<Hkl> shortest = first.stream()
                .min(Comparator.<PredictedSpot>comparingDouble(s -> Math.rint(s.g().norm() / SAME))
                        .thenComparing(PredictedSpot::hkl, Comparator.reverseOrder()))
                .map(PredictedSpot::hkl);
        if (shortest.isEmpty()) {
            return Optional.empty();
        }
        ZoneSetting setting = ZoneSetting.onZone(zone, shortest.get(), 0);
        List<PredictedSpot> spots = zeroLayer(simulator, crystal, setting);
        Orientation orientation = setting.orientation(crystal.lattice());
        return spots.stream()
                .filter(s -> s.g().y() > SAME)
                .min(Comparator.<PredictedSpot>comparingDouble(s -> Math.rint(s.g().norm() / SAME))
                        .thenComparingDouble(s -> s.g().azimuth()))
                .map(second -> new ZonePattern(
                        setting,
                        second.hkl(),
                        spots,
                        DoubleDiffraction.reached(
                                        spots.stream().map(PredictedSpot::hkl).toList())
                                .stream()
                                .map(hkl -> across(orientation.scatteringVector(crystal.lattice(), hkl)))
                                .filter(g -> g.norm() <= largestG)
                                .toList()));
    }

    /**
     * The zone axis.
     *
     * @return the zone axis of the setting
     */
    public Uvw zone() {
        return setting.zone();
    }

    /**
     * The first basis spot.
     *
     * @return the reference reflection of the setting, a shortest one of the zone
     */
    public Hkl first() {
        return setting.reference();
    }

    private static List<PredictedSpot> zeroLayer(PatternSimulator simulator, Crystal crystal, ZoneSetting setting) {
        return simulator.simulate(setting.orientation(crystal.lattice())).spots().stream()
                .filter(s -> s.hkl().dot(setting.zone()) == 0)
                .toList();
    }

    private static Vector2 across(Vector3 g) {
        return new Vector2(g.x(), g.y());
    }

    /** Some reflection of the zone, seen or not. */
    private static Hkl anyOf(Uvw z) {
        return z.u() == 0 && z.v() == 0 ? new Hkl(1, 0, 0) : new Hkl(z.v(), -z.u(), 0);
    }
}
