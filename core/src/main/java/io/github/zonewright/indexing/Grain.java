package io.github.zonewright.indexing;

import io.github.zonewright.orientation.Misorientation;
import io.github.zonewright.orientation.OrientationRelation;
import io.github.zonewright.orientation.OrientedLattice;
import io.github.zonewright.pattern.Placement;
import java.util.List;
import java.util.Optional;
import java.util.stream.Collectors;

/**
 * A further crystal in a pattern: a second grain, a twin or a second phase.
 *
 * @param solution how it stands, with the camera of the first solution; its matches are all the spots it explains, those
 *     that another solution explains too among them, and its unexplained spots are those that no solution explains
 * @param shared those of its matches whose spot another solution of the pattern explains too
 * @param misorientation how it stands to the first solution's crystal, axis in the first crystal's frame
 * @param relations the twin and coincidence relations with a name, if any
 * @param halfTurned the same for the grain after half a turn about its zone axis, where its spots leave that open
 */
public record Grain(
        Solution solution,
        List<SpotMatch> shared,
        Misorientation misorientation,
        List<OrientationRelation> relations,
        Optional<Misorientation> halfTurned) {

    /** Two answers nearer than this are one: some times the usual error of a lean. */
    private static final double SAME = Math.toRadians(3);

    /**
     * A further crystal, with how it stands to the first.
     *
     * @param solution how it stands in the microscope, with the half turn that its spots leave open
     * @param shared those of its matches whose spot another solution of the pattern explains too
     * @param first how the first crystal stands
     * @return the grain
     */
    public static Grain of(Solution solution, List<SpotMatch> shared, Placement first) {
        OrientedLattice known = HalfTurn.lattice(first, first.orientation());
        Placement own = solution.placement();
        Misorientation misorientation = Misorientation.between(known, HalfTurn.lattice(own, own.orientation()));
        return new Grain(
                solution,
                shared,
                misorientation,
                OrientationRelation.of(misorientation),
                solution.halfTurn().map(o -> Misorientation.between(known, HalfTurn.lattice(own, o))));
    }

    /** Copies the lists. */
    public Grain {
        shared = List.copyOf(shared);
        relations = List.copyOf(relations);
    }

    /**
     * One sentence for a person.
     *
     * @return crystal, zone, the spots it explains, and how it stands to the first
     */
    public String sentence() {
        return solution.placement().crystal().name() + ", ["
                + solution.placement().setting().zone() + "]: explains "
                + solution.matches().size() + " spots, " + shared.size() + " of them shared; " + standing() + ".";
    }

    /**
     * How it stands to the first crystal, for a person.
     *
     * @return angle, axis and named relations, those after half a turn too where its spots leave that open; no full stop
     */
    public String standing() {
        return "turned by "
                + text(misorientation, relations) + " from the first"
                + halfTurned
                        .map(m -> ", or after half a turn about its zone axis, which its spots leave open, by "
                                + text(m, OrientationRelation.of(m)))
                        .orElse("");
    }

    /**
     * What it is to the first crystal, for a person.
     *
     * @return a twin, a second grain, or a second phase
     */
    public String kind() {
        if (relations.stream().anyMatch(OrientationRelation::isTwin)) {
            return "a twin";
        }
        return misorientation.isOfOneKind() ? "a second grain" : "a second phase";
    }

    /**
     * Whether a solution that a search found by itself is this crystal.
     *
     * @param found the solution
     * @return true if it is the same crystal in the same orientation, undecided half turns allowed
     */
    public boolean isFoundAs(Solution found) {
        return found.placement().crystal().equals(solution.placement().crystal())
                && HalfTurn.angleBetween(found, solution) < SAME;
    }

    /** The end of a sentence: with what it is, if with anything. */
    static String with(List<Grain> grains) {
        return switch (grains.size()) {
            case 0 -> "";
            case 1 -> ", with " + grains.get(0).kind();
            default -> ", with " + grains.size() + " further crystals";
        };
    }

    private static String text(Misorientation m, List<OrientationRelation> relations) {
        String names = relations.stream().map(OrientationRelation::text).collect(Collectors.joining("; "));
        return m.text() + (names.isEmpty() ? "" : " (" + names + ")");
    }
}
