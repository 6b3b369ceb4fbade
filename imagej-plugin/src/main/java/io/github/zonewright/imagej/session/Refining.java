package io.github.zonewright.imagej.session;

import io.github.zonewright.indexing.KnownCamera;
import io.github.zonewright.indexing.LockedRefinement;
import io.github.zonewright.indexing.LockedRefinement.Lock;
import io.github.zonewright.indexing.Refinement;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import java.util.Optional;
import java.util.Set;

/**
 * Refines the pattern that lies over an image to its measured spots.
 *
 * @param known what a calibration in use holds of the camera
 * @param locks what stays as it is
 */
public record Refining(Optional<KnownCamera> known, Set<Lock> locks) {
    /** What is said when it can't be done. */
    public static final String NONE = "Fewer than three spots lie near the pattern: turn or shift it first.";

    /** Copies the set. */
    public Refining {
        locks = Set.copyOf(locks);
    }

    /**
     * A refinement under an instrument.
     *
     * @param said what is said of the instrument, if anything is
     * @param from the pattern
     * @param locks what stays as it is
     * @return the refinement; a calibration in use holds the ellipse
     */
    public static Refining of(Optional<Instrument> said, Placement from, Set<Lock> locks) {
        return new Refining(
                said.filter(i -> i.calibration().isPresent()
                                && i.mirrored() == from.camera().mirrored())
                        .map(i -> i.knownCamera(null)),
                locks);
    }

    /**
     * Refines. Where the pattern was laid too far off for its spots to be told, it is tried about the measured centre, unless the
     * centre is locked.
     *
     * @param measured the measured spots
     * @param from the pattern
     * @return the solution; empty when too few spots lie near it
     */
    public Optional<Solution> run(MeasuredPattern measured, Placement from) {
        Optional<Solution> near = refined(measured, from);
        return near.isPresent() || locks.contains(Lock.CENTRE)
                ? near
                : measured.centre()
                        .map(centre -> from.withCamera(from.camera().withCentre(centre.position())))
                        .flatMap(moved -> refined(measured, moved));
    }

    private Optional<Solution> refined(MeasuredPattern measured, Placement from) {
        if (!locks.isEmpty()) {
            Set<Lock> all = new java.util.HashSet<>(locks);
            if (known.isPresent()) {
                all.add(Lock.ELLIPSE);
            }
            return LockedRefinement.refine(measured, from, all);
        }
        return known.isPresent() ? Refinement.refine(measured, from, known.get()) : Refinement.refine(measured, from);
    }
}
