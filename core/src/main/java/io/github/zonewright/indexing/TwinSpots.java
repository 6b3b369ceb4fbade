package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.Reflection;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.orientation.Misorientation;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.OrientationRelation;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.Collectors;

/**
 * Offers a twin for spots at fractions of the lattice, where one explains as many of the spots left over as the superlattice
 * does: half turns about low planes bring many a twin's spots to thirds or fifths.
 */
final class TwinSpots {
    /** One spot alone proves neither. */
    private static final int LEAST_SPOTS = 2;

    private final Solution solution;
    private final ReflectionStrengths strengths;
    private final List<Twin> twins;

    /** A law with the spots that the twin by it explains. */
    private record Twin(Rotation law, Map<MeasuredSpot, Hkl> spots) {
        long among(List<SpotOrigin.Fraction> fractions) {
            return fractions.stream().filter(f -> spots.containsKey(f.spot())).count();
        }
    }

    private TwinSpots(SpotOrigins frame, Solution solution, ReflectionStrengths strengths) {
        this.solution = solution;
        this.strengths = strengths;
        Placement placement = solution.placement();
        twins = TwinLaws.of(placement.crystal()).stream()
                .map(law -> new Twin(law, explained(frame, law)))
                .toList();
    }

    /** The origins, with twins beside the superlattices. */
    static List<SpotOrigin> beside(
            List<SpotOrigin> origins, SpotOrigins frame, Solution solution, ReflectionStrengths strengths) {
        Map<Integer, List<SpotOrigin.Fraction>> superlattices = origins.stream()
                .filter(SpotOrigin.Fraction.class::isInstance)
                .map(SpotOrigin.Fraction.class::cast)
                .collect(Collectors.groupingBy(SpotOrigin.Fraction::denominator));
        superlattices.values().removeIf(spots -> spots.size() < LEAST_SPOTS);
        if (superlattices.isEmpty()) {
            return origins;
        }
        TwinSpots offered = new TwinSpots(frame, solution, strengths);
        Map<SpotOrigin, SpotOrigin> instead = new HashMap<>();
        superlattices.values().forEach(spots -> instead.putAll(offered.instead(spots)));
        List<SpotOrigin> all = new ArrayList<>(origins);
        all.replaceAll(o -> instead.getOrDefault(o, o));
        return all;
    }

    private Map<SpotOrigin, SpotOrigin> instead(List<SpotOrigin.Fraction> superlattice) {
        Map<SpotOrigin, SpotOrigin> instead = new HashMap<>();
        Twin best = null;
        for (Twin twin : twins) {
            boolean asGood = twin.spots.size() >= superlattice.size() && twin.among(superlattice) >= LEAST_SPOTS;
            if (asGood && (best == null || twin.among(superlattice) > best.among(superlattice))) {
                best = twin;
            }
        }
        if (best != null) {
            String name = name(best.law);
            for (SpotOrigin.Fraction f : superlattice) {
                Hkl hkl = best.spots.get(f.spot());
                if (hkl != null) {
                    instead.put(f, new SpotOrigin.Twin(f, hkl, name, best.spots.size(), superlattice.size()));
                }
            }
        }
        return instead;
    }

    private String name(Rotation law) {
        Placement first = solution.placement();
        Misorientation m = Misorientation.between(
                HalfTurn.lattice(first, first.orientation()), HalfTurn.lattice(first, turned(law)));
        return OrientationRelation.of(m).stream().map(OrientationRelation::name).collect(Collectors.joining(", "));
    }

    private Orientation turned(Rotation law) {
        return new Orientation(solution.placement().orientation().rotation().after(law));
    }

    /** The spots left over that are near reflections of the twin, where few places would be so by chance. */
    private Map<MeasuredSpot, Hkl> explained(SpotOrigins frame, Rotation law) {
        Rotation rotation = turned(law).rotation();
        Crystal crystal = solution.placement().crystal();
        List<Hkl> excited = new ArrayList<>();
        List<Vector2> places = new ArrayList<>();
        for (Reflection r : strengths.reflections()) {
            Vector3 g = rotation.apply(crystal.lattice().reciprocal().vector(r.hkl()));
            if (Math.abs(frame.excitation(g)) < SpotOrigins.UPPER_LAYER_REACH) {
                excited.add(r.hkl());
                places.add(new Vector2(g.x(), g.y()));
            }
        }
        Map<MeasuredSpot, Hkl> found = new HashMap<>();
        for (MeasuredSpot spot : solution.unexplained()) {
            double tolerance = frame.tolerance(spot);
            if (frame.chance(excited.size(), tolerance) > SpotOrigins.LARGEST_CHANCE) {
                continue;
            }
            Vector2 place = frame.place(spot);
            double least = tolerance;
            for (int i = 0; i < places.size(); i++) {
                double off = places.get(i).minus(place).norm();
                if (off < least) {
                    least = off;
                    found.put(spot, excited.get(i));
                }
            }
        }
        return found;
    }
}
