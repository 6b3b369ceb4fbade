package io.github.zonewright.indexing;

import io.github.zonewright.calibration.SpacingList;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.MeasuredSpot;
import io.github.zonewright.spots.MeasuredValue;
import io.github.zonewright.spots.SpotNet;
import io.github.zonewright.spots.SpotNetFinder;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.stream.Collectors;

/**
 * What one systematic row of spots, or a pair of spots opposite each other, tells: g, its spacing and the families of planes
 * that have it. It names no zone axis: the beam may have run along any of the circle of zones perpendicular to g.
 *
 * @param spots how many spots lie on the row
 * @param g the distance of neighbouring spots in 1/Å; its uncertainty is mostly that of the camera constant
 * @param d the spacing in Å
 * @param azimuth of the row in radians, counter-clockwise from the right of the screen, from −π/2 to π/2
 * @param candidates the families that have this spacing, nearest first, allowed ones before forbidden ones
 */
public record RowAnswer(int spots, MeasuredValue g, MeasuredValue d, double azimuth, List<Candidate> candidates) {

    private static final int NAMED = 4;
    private static final int LARGEST_INDEX = 2;

    /** Spots off the row, as a share of those on it, that are forgiven. */
    private static final double STRAYS = 0.25;

    /** A quick look takes so many directions, and spots this far apart across one, in px, for near enough to a row. */
    private static final int DIRECTIONS = 90;

    private static final double LOOSE = 20;

    /** Copies the list. */
    public RowAnswer {
        candidates = List.copyOf(candidates);
    }

    /**
     * A family of planes that the row may belong to.
     *
     * @param crystal the crystal
     * @param hkl the member with the largest h, then k, then l
     * @param d its spacing in Å
     * @param absent whether the space group forbids it, so that only double diffraction would show it
     */
    public record Candidate(Crystal crystal, Hkl hkl, double d, boolean absent) {

        /**
         * The circle of zones: the zone axes perpendicular to g, by the zone equation h·u + k·v + l·w = 0.
         *
         * @param largestIndex the largest index, at least 1
         * @return the zone axes, smallest indices first, one of each pair of opposite ones
         */
        public List<Uvw> zones(int largestIndex) {
            List<Uvw> found = new ArrayList<>();
            for (int u = -largestIndex; u <= largestIndex; u++) {
                for (int v = -largestIndex; v <= largestIndex; v++) {
                    for (int w = -largestIndex; w <= largestIndex; w++) {
                        Uvw zone = new Uvw(u, v, w);
                        boolean first = zone.compareTo(zone.negate()) > 0;
                        if (first && hkl.dot(zone) == 0 && zone.reduced().equals(zone)) {
                            found.add(zone);
                        }
                    }
                }
            }
            found.sort(Comparator.comparingInt(Uvw::largestIndex)
                    .thenComparingInt(z -> Math.abs(z.u()) + Math.abs(z.v()) + Math.abs(z.w()))
                    .thenComparing(Comparator.<Uvw>naturalOrder().reversed()));
            return found;
        }
    }

    /** Reads the spots as a row, if they are one. */
    static Optional<RowAnswer> of(Sighting seen, List<Crystal> crystals, Beam beam, KnownCamera camera) {
        List<MeasuredSpot> spots = seen.pattern().spots();
        if (spots.size() == 2) {
            MeasuredSpot a = spots.get(0);
            MeasuredSpot b = spots.get(1);
            Vector2 half = b.position().minus(a.position()).times(0.5);
            boolean opposite = seen.centres().stream()
                    .anyMatch(c -> a.position().plus(half).distanceTo(c.centre().position())
                            < 2 + 3 * c.centre().error());
            double error = Math.hypot(a.positionError(), b.positionError()) / 2;
            return opposite ? Optional.of(of(2, half, error, crystals, beam, camera)) : Optional.empty();
        }
        if (spots.size() > 2
                && !seen.centres().isEmpty()
                && mayBeRow(spots)
                && SpotNetFinder.find(spots, seen.centres().get(0).centre()) instanceof SpotNet.SystematicRow row
                && row.strays().size() <= STRAYS * row.nodes().size()) {
            return Optional.of(of(row.nodes().size(), row.step(), row.stepError(), crystals, beam, camera));
        }
        return Optional.empty();
    }

    /** Whether all spots but forgivable strays lie in a band in some direction; a quick look, before the row is sought. */
    private static boolean mayBeRow(List<MeasuredSpot> spots) {
        int on = (int) Math.ceil(spots.size() / (1 + STRAYS));
        double length = spots.stream()
                .mapToDouble(s -> s.position().distanceTo(spots.get(0).position()))
                .max()
                .orElse(0);
        double band = LOOSE + length * Math.PI / DIRECTIONS;
        double[] across = new double[spots.size()];
        for (int k = 0; k < DIRECTIONS; k++) {
            double x = Math.cos(k * Math.PI / DIRECTIONS);
            double y = Math.sin(k * Math.PI / DIRECTIONS);
            Arrays.setAll(
                    across,
                    i -> x * spots.get(i).position().x()
                            + y * spots.get(i).position().y());
            Arrays.sort(across);
            for (int i = 0; i + on <= across.length; i++) {
                if (across[i + on - 1] - across[i] <= band) {
                    return true;
                }
            }
        }
        return false;
    }

    private static RowAnswer of(
            int spots, Vector2 step, double stepError, List<Crystal> crystals, Beam beam, KnownCamera camera) {
        double flat = step.norm() / camera.constant();
        double sine = beam.wavelength() * flat;
        double length = flat / Math.sqrt(1 + sine * sine);
        double share = Math.hypot(stepError / step.norm(), camera.tolerance() / 2);
        MeasuredValue d = new MeasuredValue(1 / length, share / length);
        double tolerance = camera.tolerance() + 3 * stepError / step.norm();
        List<Candidate> candidates =
                SpacingList.of(crystals, d.value() * (1 - tolerance) * 0.999).within(d.value(), tolerance).stream()
                        .map(c -> new Candidate(c.crystal(), c.hkl(), c.d(), c.absent()))
                        .toList();
        double azimuth = Math.atan2(-step.y(), step.x());
        double folded =
                azimuth > Math.PI / 2 ? azimuth - Math.PI : azimuth <= -Math.PI / 2 ? azimuth + Math.PI : azimuth;
        return new RowAnswer(spots, new MeasuredValue(length, share * length), d, folded, candidates);
    }

    /**
     * One or two sentences for a person.
     *
     * @return what the row tells, and that it names no zone axis
     */
    public String sentence() {
        String measured = String.format(
                Locale.ROOT,
                "The %d spots lie on one row: g = %.4f ± %.4f 1/Å, d = %.3f ± %.3f Å",
                spots,
                g.value(),
                g.error(),
                d.value(),
                d.error());
        if (candidates.isEmpty()) {
            return measured + ", which no crystal searched has.";
        }
        String families = candidates.stream()
                .limit(NAMED)
                .map(c -> "{" + c.hkl + "} of " + c.crystal.name() + (c.absent ? " (forbidden)" : ""))
                .collect(Collectors.joining(" or "));
        String zones = candidates.get(0).zones(LARGEST_INDEX).stream()
                .limit(NAMED)
                .map(z -> "[" + z + "]")
                .collect(Collectors.joining(", "));
        return measured + ", as " + families + ". A row names no zone axis: for " + candidates.get(0).hkl
                + " any perpendicular to it will do, such as " + zones + ".";
    }
}
