package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Reflection;
import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.ReciprocalLattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;

/**
 * Says of every spot of a pattern where it may come from, in the frame of a solution: a reflection, double diffraction into
 * an extinct one, an upper layer, a fraction of the lattice, a twin; and gives its indices, whole or not.
 *
 * <p>A fraction or an upper layer is told only where fewer than one in ten places would do as well by chance. Known limits:
 * fractions are sought in the zero layer; one spot alone at a fraction proves no superlattice. Several of them may be a
 * superlattice's or a twin's, and where a twin explains as many spots it is told beside.
 */
public final class SpotOrigins {

    private static final double NEAR = 3;
    static final double LARGEST_CHANCE = 0.1;
    private static final int[] DENOMINATORS = {2, 3, 4, 6};

    /** Reflections of upper layers this near the Ewald sphere may show, in 1/Å. */
    static final double UPPER_LAYER_REACH = 0.05;

    /** Excitation error at which the intensity has fallen to a half, in 1/Å: that of a foil of some 60 Å. */
    private static final double EXCITED = 0.015;

    /** A way of double diffraction counts when it is this strong against the strongest that could be. */
    private static final double LEAST_WAY = 1e-3;

    private final Solution solution;
    private final Placement placement;
    private final ReflectionStrengths strengths;
    private final Matrix3 rotation;
    private final Matrix3 toIndices;
    private final Vector3 axis;
    private final double layerArea;
    private final double waveNumber;
    private final double frameArea;

    private SpotOrigins(Solution solution) {
        this.solution = solution;
        this.placement = solution.placement();
        this.waveNumber = 1 / placement.beam().wavelength();
        double reach = Stream.concat(
                        solution.matches().stream().map(SpotMatch::measured), solution.unexplained().stream())
                .mapToDouble(s -> place(s).norm())
                .max()
                .orElse(0);
        this.strengths = new ReflectionStrengths(
                placement.crystal(), placement.beam(), Math.min(0.99 * waveNumber, 1.05 * reach + 0.1));
        this.rotation = placement.orientation().rotation().matrix();
        ReciprocalLattice reciprocal = strengths.reciprocal();
        this.toIndices = reciprocal.basis().inverse().times(rotation.transpose());
        Uvw zone = placement.setting().zone();
        this.axis = rotation.times(strengths.lattice().vector(zone));
        ZoneBasis basis = ZoneBasis.of(zone, reciprocal);
        this.layerArea = reciprocal
                .vector(basis.first())
                .cross(reciprocal.vector(basis.second()))
                .norm();
        this.frameArea = Math.PI * reach * reach;
    }

    /**
     * Looks at every spot of a pattern.
     *
     * @param solution the solution in whose frame they are read
     * @return the explained spots, in their order, and then the unexplained ones
     */
    public static List<SpotOrigin> of(Solution solution) {
        SpotOrigins origins = new SpotOrigins(solution);
        List<SpotOrigin> all = new ArrayList<>();
        solution.matches().forEach(m -> all.add(origins.explained(m)));
        solution.unexplained().forEach(s -> all.add(origins.unexplained(s)));
        return List.copyOf(TwinSpots.beside(all, origins, solution, origins.strengths));
    }

    Vector2 place(MeasuredSpot spot) {
        return placement.camera().toReciprocal(spot.position(), placement.beam().wavelength());
    }

    /** Standard deviation of a spot's place in 1/Å, with what the solution does not know. */
    private double error(MeasuredSpot spot) {
        double g = place(spot).norm();
        SolutionErrors e = solution.errors();
        double own = LeftSpots.error(spot, placement.camera());
        double turned = e.rotation() * g;
        double stretched = e.constant() / placement.camera().constant() * g;
        double shifted = Math.max(e.centreX(), e.centreY()) / placement.camera().constant();
        return Math.sqrt(own * own + turned * turned + stretched * stretched + shifted * shifted);
    }

    /** How near a spot must be to where it is expected, in 1/Å. */
    double tolerance(MeasuredSpot spot) {
        return NEAR * error(spot);
    }

    /** How likely a spot anywhere in the frame is as near to one of so many places. */
    double chance(int places, double tolerance) {
        return places * Math.PI * tolerance * tolerance / frameArea;
    }

    private FractionalIndices indices(MeasuredSpot spot) {
        Vector2 g = place(spot);
        Vector3 h = toIndices.times(inLayer(g));
        Vector3 perX = toIndices.times(inLayer(new Vector2(1, 0)));
        Vector3 perY = toIndices.times(inLayer(new Vector2(0, 1)));
        double e = error(spot);
        Vector3 errors = new Vector3(
                e * Math.hypot(perX.x(), perY.x()),
                e * Math.hypot(perX.y(), perY.y()),
                e * Math.hypot(perX.z(), perY.z()));
        double depth = waveNumber - Math.sqrt(waveNumber * waveNumber - g.dot(g));
        return new FractionalIndices(h, errors, new Vector3(g.x(), g.y(), depth).dot(axis));
    }

    /** The point of the zero layer under a place. */
    private Vector3 inLayer(Vector2 g) {
        return new Vector3(g.x(), g.y(), -(axis.x() * g.x() + axis.y() * g.y()) / axis.z());
    }

    private SpotOrigin explained(SpotMatch match) {
        MeasuredSpot spot = match.measured();
        Hkl hkl = match.hkl();
        int layer = hkl.dot(placement.setting().zone());
        if (layer != 0) {
            return new SpotOrigin.UpperLayer(spot, indices(spot), hkl, layer, excitation(hkl));
        }
        return ofZeroLayer(spot, hkl);
    }

    private SpotOrigin ofZeroLayer(MeasuredSpot spot, Hkl hkl) {
        FractionalIndices at = indices(spot);
        if (strengths.isAllowed(hkl)) {
            return new SpotOrigin.Reflected(spot, at, hkl);
        }
        return way(hkl).<SpotOrigin>map(
                        first -> new SpotOrigin.DoubleDiffraction(spot, at, hkl, first, hkl.minus(first)))
                .orElseGet(() -> new SpotOrigin.Extinct(spot, at, hkl));
    }

    /** The first reflection of the strongest way into an extinct one. */
    private Optional<Hkl> way(Hkl hkl) {
        Hkl best = null;
        double most = 0;
        double strongest = 0;
        for (Reflection r : strengths.reflections()) {
            strongest = Math.max(strongest, r.amplitude());
            double second = strengths.amplitude(hkl.minus(r.hkl()));
            double off = excitation(r.hkl());
            if (second > 0 && Math.abs(off) < UPPER_LAYER_REACH) {
                double s = off / EXCITED;
                double strength = r.amplitude() * second / (1 + s * s);
                if (strength > most * (1 + 1e-9)) {
                    most = strength;
                    best = r.hkl();
                }
            }
        }
        return most > LEAST_WAY * strongest * strongest ? Optional.of(best) : Optional.empty();
    }

    private double excitation(Hkl hkl) {
        return excitation(rotation.times(strengths.reciprocal().vector(hkl)));
    }

    /** How far a vector in the microscope frame ends off the Ewald sphere. */
    double excitation(Vector3 g) {
        double across = g.x() * g.x() + g.y() * g.y();
        return g.z() - (waveNumber - Math.sqrt(waveNumber * waveNumber - across));
    }

    private SpotOrigin unexplained(MeasuredSpot spot) {
        FractionalIndices at = indices(spot);
        double tolerance = tolerance(spot);
        Optional<Hkl> whole = nearMultiple(spot, at, 1, tolerance);
        if (whole.isPresent() && !whole.get().isZero()) {
            return ofZeroLayer(spot, whole.get());
        }
        Optional<SpotOrigin.UpperLayer> upper = upperLayer(spot, at, tolerance);
        if (upper.isPresent()) {
            return upper.get();
        }
        for (int n : DENOMINATORS) {
            double chance = -Math.expm1(-Math.PI * tolerance * tolerance * n * n / layerArea);
            Optional<Hkl> multiple = nearMultiple(spot, at, n, tolerance);
            if (chance < LARGEST_CHANCE
                    && multiple.isPresent()
                    && !multiple.get().isZero()) {
                return new SpotOrigin.Fraction(spot, at, multiple.get(), n, chance);
            }
        }
        return new SpotOrigin.Unknown(spot, at);
    }

    /** Whole indices of the zero layer that are so many times those of a spot, when near enough. */
    private Optional<Hkl> nearMultiple(MeasuredSpot spot, FractionalIndices at, int n, double tolerance) {
        Vector3 h = at.indices().times(n);
        Hkl rounded = new Hkl((int) Math.rint(h.x()), (int) Math.rint(h.y()), (int) Math.rint(h.z()));
        if (rounded.dot(placement.setting().zone()) != 0) {
            return Optional.empty();
        }
        Vector3 g = rotation.times(strengths.reciprocal().vector(rounded)).times(1.0 / n);
        return new Vector2(g.x(), g.y()).minus(place(spot)).norm() < tolerance
                ? Optional.of(rounded)
                : Optional.empty();
    }

    private Optional<SpotOrigin.UpperLayer> upperLayer(MeasuredSpot spot, FractionalIndices at, double tolerance) {
        Uvw zone = placement.setting().zone();
        Vector2 place = place(spot);
        Hkl best = null;
        double least = UPPER_LAYER_REACH;
        int candidates = 0;
        for (Reflection r : strengths.reflections()) {
            double s = r.hkl().dot(zone) == 0 ? Double.POSITIVE_INFINITY : Math.abs(excitation(r.hkl()));
            if (s < UPPER_LAYER_REACH) {
                candidates++;
                Vector3 g = rotation.times(r.g());
                if (s < least && new Vector2(g.x(), g.y()).minus(place).norm() < tolerance) {
                    least = s;
                    best = r.hkl();
                }
            }
        }
        boolean chance = chance(candidates, tolerance) > LARGEST_CHANCE;
        return best == null || chance
                ? Optional.empty()
                : Optional.of(new SpotOrigin.UpperLayer(spot, at, best, best.dot(zone), excitation(best)));
    }
}
