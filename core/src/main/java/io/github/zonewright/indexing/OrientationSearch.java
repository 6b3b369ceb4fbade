package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.MeasuredPattern;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.concurrent.CancellationException;
import java.util.function.BooleanSupplier;
import java.util.function.DoubleConsumer;
import java.util.stream.Collectors;

/**
 * Finds the orientations of one crystal, or of any of several, that explain measured spots. No zone has to be given; the
 * search can be limited to one, to a family, or to a range of rotations.
 *
 * <p>Method: for every zone axis with small indices and every likely centre the spots vote for camera constant and rotation
 * (Hough transform); the best places are fitted with centre, scale and ellipse free within what is known of them, and
 * scored by positions and by the envelope of the intensities, which also tells the lean. The search is deterministic and an
 * instance may be shared between threads.
 *
 * <p>Known limits: zone axes have indices up to the largest index; crystals that lean further than 10° from the nearest of
 * them are not found. Of a lean above some 2° the direction is surer than the amount, whose stated error may be
 * too small. A single row of spots gets no solution but a {@link RowAnswer}. Kinematic strengths are compared, so a thick crystal loses confidence
 * and may lose the lean.
 */
public final class OrientationSearch {

    /** Largest zone index tried where the caller does not say. */
    public static final int DEFAULT_LARGEST_INDEX = 5;

    /** A solution with a lower score is not shown: it could be chance. */
    public static final double LEAST_SCORE = 8;

    private static final int LEAST_SPOTS = 3;

    private final List<Crystal> crystals;
    private final Beam beam;
    private final KnownCamera camera;
    private final ZoneLimit limit;
    private final Optional<RotationLock> lock;
    private final List<CrystalSearch> searches;

    private OrientationSearch(
            List<Crystal> crystals, Beam beam, KnownCamera camera, ZoneLimit limit, Optional<RotationLock> lock) {
        this.crystals = crystals;
        this.beam = beam;
        this.camera = camera;
        this.limit = limit;
        this.lock = lock;
        this.searches = crystals.stream()
                .map(c -> new CrystalSearch(c, beam, camera, limit.zones(c), lock))
                .toList();
    }

    /**
     * A search for one crystal.
     *
     * @param crystal the crystal
     * @param beam the beam
     * @param constant camera constant in px·Å, as far as it is known
     * @param tolerance how far it may be off, as a share of it, 0.001 to 0.2
     * @param mirrored whether the image is mirrored left to right
     * @return the search
     * @throws IllegalArgumentException if constant or tolerance is out of range
     */
    public static OrientationSearch of(
            Crystal crystal, Beam beam, double constant, double tolerance, boolean mirrored) {
        if (!(tolerance >= 0.001)) {
            throw new IllegalArgumentException(
                    "tolerance of the camera constant: " + tolerance + ", expected a share from 0.001 to 0.2");
        }
        return of(List.of(crystal), beam, KnownCamera.of(constant, tolerance, mirrored));
    }

    /**
     * A search for one or several crystals. Crystals of different cells are compared fairly: every solution is worth what
     * it explains better than chance would, and a large cell explains much by chance.
     *
     * @param crystals the crystals, at least one
     * @param beam the beam
     * @param camera what is known of the camera
     * @return the search
     * @throws IllegalArgumentException if there is no crystal
     */
    public static OrientationSearch of(List<Crystal> crystals, Beam beam, KnownCamera camera) {
        if (crystals.isEmpty()) {
            throw new IllegalArgumentException("crystals: none, expected at least one to search for");
        }
        return new OrientationSearch(
                List.copyOf(crystals), beam, camera, ZoneLimit.ofIndex(DEFAULT_LARGEST_INDEX), Optional.empty());
    }

    /**
     * The same with another bound on the zone indices, and no other limit to the zones.
     *
     * @param other the largest index, 1 to 12
     * @return the changed search
     * @throws IllegalArgumentException if it is out of range
     */
    public OrientationSearch withLargestIndex(int other) {
        if (other < 1 || other > 12) {
            throw new IllegalArgumentException("largest zone index: " + other + ", expected 1 to 12");
        }
        return new OrientationSearch(crystals, beam, camera, ZoneLimit.ofIndex(other), Optional.empty());
    }

    /**
     * The same for one zone axis alone.
     *
     * @param zone the zone axis; a common factor of its indices is dropped
     * @return the changed search
     * @throws IllegalArgumentException if the indices are all 0
     */
    public OrientationSearch withZone(Uvw zone) {
        return new OrientationSearch(crystals, beam, camera, ZoneLimit.ofZone(zone), Optional.empty());
    }

    /**
     * The same for a family of zone axes alone: those that are equivalent by the Laue class of a crystal.
     *
     * @param zone any of the family
     * @return the changed search
     * @throws IllegalArgumentException if the indices are all 0
     */
    public OrientationSearch withZoneFamily(Uvw zone) {
        return new OrientationSearch(crystals, beam, camera, ZoneLimit.ofFamily(zone), Optional.empty());
    }

    /**
     * The same for one zone axis and a range of rotations in the image plane.
     *
     * @param zone the zone axis
     * @param reference the reflection of that zone whose azimuth is the rotation
     * @param from the smallest rotation in radians, counter-clockwise from the right of the screen
     * @param to the largest rotation in radians, from {@code from} to {@code from} + 2π; the same as {@code from} holds it
     * @return the changed search
     * @throws IllegalArgumentException if the reference is not of the zone, or the range is none
     */
    public OrientationSearch withRotation(Uvw zone, Hkl reference, double from, double to) {
        if (reference.isZero() || reference.dot(zone) != 0) {
            throw new IllegalArgumentException(
                    "reference: " + reference + ", expected a reflection of zone [" + zone + "]");
        }
        if (!(to >= from && to <= from + 2 * Math.PI + 1e-9)) {
            throw new IllegalArgumentException("rotation: from " + Math.toDegrees(from) + "° to " + Math.toDegrees(to)
                    + "°, expected a range upwards of 360° at most");
        }
        RotationLock range = new RotationLock(reference, (from + to) / 2, (to - from) / 2);
        return new OrientationSearch(crystals, beam, camera, ZoneLimit.ofZone(zone), Optional.of(range));
    }

    /**
     * Searches.
     *
     * @param pattern the measured spots
     * @return the solutions, or why there is none
     */
    public SearchResult find(MeasuredPattern pattern) {
        return find(pattern, share -> {}, () -> false);
    }

    /**
     * Searches, telling how far it is and listening for a stop.
     *
     * @param pattern the measured spots
     * @param progress gets the share done, 0 to 1
     * @param cancelled asked now and then; true stops the search
     * @return the solutions, or why there is none
     * @throws CancellationException if it was stopped
     */
    public SearchResult find(MeasuredPattern pattern, DoubleConsumer progress, BooleanSupplier cancelled) {
        int spots = pattern.spots().size();
        Sighting seen = Sighting.of(pattern, camera.mirrored(), camera.centre());
        if (spots < LEAST_SPOTS) {
            return none(
                    seen,
                    "Only " + spots + " diffraction spot" + (spots == 1 ? " was" : "s were") + " found; at least "
                            + LEAST_SPOTS + " are needed for a zone axis.");
        }
        if (seen.centres().isEmpty()) {
            return none(seen, "No centre of the pattern could be found.");
        }
        double largestG = largestG(
                pattern, seen.centres().get(0).centre().position(), camera.constant() / (1 + camera.tolerance()));
        List<Solution> solutions = new ArrayList<>();
        List<String> without = new ArrayList<>();
        int count = searches.size();
        int fewestZones =
                searches.stream().mapToInt(CrystalSearch::zoneCount).min().orElse(1);
        for (int i = 0; i < count; i++) {
            int done = i;
            CrystalSearch search = searches.get(i);
            CrystalSearch.Found found;
            try {
                found = search.find(seen, largestG, p -> progress.accept((done + p) / count), cancelled);
            } catch (IllegalArgumentException e) {
                if (count == 1) {
                    throw e;
                }
                without.add(search.crystal().name() + ": " + e.getMessage());
                continue;
            }
            // The more zone axes are tried, the likelier one of them fits by accident.
            double chance = Math.log((double) search.zoneCount() / fewestZones);
            found.within().forEach(s -> solutions.add(s.withScore(s.score() - chance)));
            if (found.within().isEmpty()) {
                without.add("No orientation of " + search.crystal().name() + " explains the " + spots
                        + " spots better than chance would" + otherScale(found.beyond()));
            }
        }
        solutions.sort(Comparator.comparingDouble(Solution::score).reversed());
        String explanation = explanation(solutions, without, spots);
        return solutions.isEmpty() ? none(seen, explanation) : new SearchResult(solutions, explanation);
    }

    /** The end of the sentence, with a hint where another camera constant would give an answer. */
    private String otherScale(List<Solution> beyond) {
        if (beyond.isEmpty()) {
            return ".";
        }
        double constant = beyond.get(0).placement().camera().constant();
        return String.format(
                Locale.ROOT,
                ", with the camera constant told; %.2f px·Å, which is %.1f %% off, would give [%s].",
                constant,
                100 * Math.abs(constant / camera.constant() - 1),
                beyond.get(0).placement().setting().zone());
    }

    /** No zone axis; a single row tells something nevertheless. */
    private SearchResult none(Sighting seen, String why) {
        Optional<RowAnswer> row = RowAnswer.of(seen, crystals, beam, camera);
        return new SearchResult(
                List.of(), row.map(r -> why + " " + r.sentence()).orElse(why), row);
    }

    private String explanation(List<Solution> solutions, List<String> without, int spots) {
        if (solutions.isEmpty()) {
            String reasons = String.join(" ", without);
            return crystals.size() == 1
                    ? reasons
                    : "None of the " + crystals.size() + " crystals explains the " + spots + " spots. " + reasons;
        }
        String names = solutions.stream()
                .map(s -> s.placement().crystal().name())
                .distinct()
                .collect(Collectors.joining(", "));
        return solutions.size() + (solutions.size() == 1 ? " solution" : " solutions") + " for " + names + " from "
                + spots + " spots" + (crystals.size() == 1 ? "." : "; " + crystals.size() + " crystals were tried.")
                + otherSize(solutions.get(0));
    }

    /** A word where the camera constant comes out beyond its uncertainty: a cell of another size would explain it. */
    private String otherSize(Solution best) {
        double off = best.placement().camera().constant() / camera.constant() - 1;
        double told = camera.constantError();
        if (Math.abs(off) <= told) {
            return "";
        }
        return String.format(
                Locale.ROOT,
                " The camera constant comes out %.1f %% %s than told, where %.1f %% is its standard uncertainty: the same net"
                        + " would fit any crystal of this structure whose cell is %.1f %% %s.",
                100 * Math.abs(off),
                off > 0 ? "higher" : "lower",
                100 * told,
                100 * Math.abs(1 / (1 + off) - 1),
                off > 0 ? "smaller" : "larger");
    }

    /** The largest |g| worth looking at: that of the outermost spot and a little more, however far off the centre. */
    static double largestG(MeasuredPattern pattern, PixelPoint centre, double constant) {
        double farthest = pattern.spots().stream()
                .mapToDouble(s -> s.position().distanceTo(centre))
                .max()
                .orElse(0);
        double reach = Math.min(1.1 * farthest, 2 * Math.hypot(pattern.width(), pattern.height()));
        return Math.max(reach, 0.1 * Math.min(pattern.width(), pattern.height())) / constant;
    }
}
