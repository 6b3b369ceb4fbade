package io.github.zonewright.pattern;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.Reflection;
import io.github.zonewright.crystal.ReflectionTable;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.ReciprocalLattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import java.util.TreeSet;

/**
 * Spots that a crystal forbids and that yet are seen, since a beam diffracted by one set of planes is diffracted again by
 * another: where g is the sum of two reflections that are excited.
 *
 * <p>Worked example: 002 of silicon along [110], as 1 −1 1 plus −1 1 1; along [001] no two reflections add up to 200.
 * Reflections that the centring forbids are never reached. Source: Edington, Practical Electron Microscopy in Materials
 * Science; Williams and Carter, Transmission Electron Microscopy (both named from memory).
 *
 * <p>Known limits: once scattered twice, within one crystal; nothing is said about intensities.
 */
public final class DoubleDiffraction {
    /** So many of the shortest reflections are tried with each other. */
    private static final int MOST_EXCITED = 300;

    /** Amplitudes in Å below this are zero but for rounding. */
    private static final double ROUNDING = 1e-7;

    private DoubleDiffraction() {}

    /**
     * The reflections of the zero layer that two excited ones reach together.
     *
     * @param excited the reflections of the zero layer that are seen by themselves
     * @return sums of two of them that are not among them, without the direct beam, in ascending order
     */
    public static List<Hkl> reached(List<Hkl> excited) {
        Set<Hkl> seen = new HashSet<>(excited);
        Set<Hkl> sums = new TreeSet<>(Comparator.<Hkl>naturalOrder());
        for (Hkl first : excited) {
            for (Hkl second : excited) {
                Hkl sum = first.plus(second);
                if (!sum.isZero() && !seen.contains(sum)) {
                    sums.add(sum);
                }
            }
        }
        return List.copyOf(sums);
    }

    /**
     * The reflections of a zone that the crystal forbids and that two others reach together.
     *
     * @param crystal the crystal
     * @param beam the beam
     * @param zone the zone axis
     * @param largestG how far the zero layer is seen, in 1/Å
     * @return the reflections, in ascending order; of a dense zone those that the shortest reflections reach
     * @throws IllegalArgumentException if largestG is not above 0 and below 1/λ
     */
    public static List<Hkl> forbidden(Crystal crystal, Beam beam, Uvw zone, double largestG) {
        ReciprocalLattice reciprocal = crystal.lattice().reciprocal();
        List<Hkl> allowed = ReflectionTable.ofLength(crystal, largestG).reflections().stream()
                .filter(r -> r.amplitude() > ROUNDING
                        && r.hkl().dot(zone) == 0
                        && !r.hkl().isZero())
                .map(Reflection::hkl)
                .sorted(Comparator.comparingDouble(hkl -> reciprocal.vector(hkl).norm()))
                .toList();
        List<Hkl> excited = allowed.subList(0, Math.min(MOST_EXCITED, allowed.size()));
        Set<Hkl> known = new HashSet<>(allowed);
        return reached(excited).stream()
                .filter(hkl -> !known.contains(hkl) && reciprocal.vector(hkl).norm() <= largestG)
                .toList();
    }

    /**
     * Where reflections land on the image, of those that come as near to the Ewald sphere as the simulator shows spots.
     *
     * @param laid the pattern they belong to
     * @param reflections the reflections
     * @return their places, in px
     */
    public static List<PixelPoint> places(Placement laid, List<Hkl> reflections) {
        double wavelength = laid.beam().wavelength();
        double k = 1 / wavelength;
        List<PixelPoint> places = new ArrayList<>();
        for (Hkl hkl : reflections) {
            Vector3 g = laid.orientation().scatteringVector(laid.crystal().lattice(), hkl);
            double across = g.x() * g.x() + g.y() * g.y();
            double height = k - Math.sqrt(Math.max(0, k * k - across));
            if (across < k * k && Math.abs(g.z() - height) <= PatternSimulator.DEFAULT_LARGEST_EXCITATION) {
                places.add(laid.camera().toPixel(new Vector2(g.x(), g.y()), wavelength));
            }
        }
        return places;
    }
}
