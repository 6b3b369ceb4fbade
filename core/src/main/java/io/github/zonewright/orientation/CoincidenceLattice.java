package io.github.zonewright.orientation;

import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.symmetry.SpaceGroup;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.TreeMap;

/**
 * A coincidence-site lattice of cubic crystals: one site in Σ belongs to both.
 *
 * <p>A rotation whose quaternion is proportional to integers without common divisor has Σ equal to the odd part of the sum
 * of their squares; letters tell rotations of one Σ apart, by ascending angle. Source: Grimmer, Bollmann & Warrington, Acta
 * Cryst. A30 (1974) 197, from memory.
 *
 * @param sigma Σ, odd
 * @param letter a, b … where several rotations have this Σ, else empty
 * @param angle the smallest angle in radians
 * @param axis the axis of that angle
 */
public record CoincidenceLattice(int sigma, String letter, double angle, Uvw axis) {

    /** The largest Σ of the table. */
    public static final int LARGEST_SIGMA = 29;

    private static final SpaceGroup CUBIC = SpaceGroup.ofHall("-P 4 2 3");
    private static final Lattice CUBE = Lattice.cubic(1);
    private static final OrientedLattice UPRIGHT = oriented(Rotation.IDENTITY);
    private static final List<CoincidenceLattice> TABLE = makeTable();

    /**
     * All from Σ3 to Σ{@value #LARGEST_SIGMA}.
     *
     * @return by ascending Σ and angle
     */
    public static List<CoincidenceLattice> table() {
        return TABLE;
    }

    private static OrientedLattice oriented(Rotation r) {
        return new OrientedLattice(CUBE, CUBIC, new Orientation(r));
    }

    private static List<CoincidenceLattice> makeTable() {
        TreeMap<Integer, List<CoincidenceLattice>> found = new TreeMap<>();
        int most = (int) Math.sqrt(4 * LARGEST_SIGMA);
        for (int m = 0; m <= most; m++) {
            for (int u = 0; u <= most; u++) {
                for (int v = 0; v <= u; v++) {
                    for (int w = 0; w <= v; w++) {
                        int squares = m * m + u * u + v * v + w * w;
                        int sigma = squares == 0 ? 0 : squares / Integer.lowestOneBit(squares);
                        boolean divisible = m % 2 == 0 && u % 2 == 0 && v % 2 == 0 && w % 2 == 0;
                        if (sigma < 3 || sigma > LARGEST_SIGMA || divisible || isMultiple(m, u, v, w)) {
                            continue;
                        }
                        add(found.computeIfAbsent(sigma, s -> new ArrayList<>()), sigma, m, u, v, w);
                    }
                }
            }
        }
        List<CoincidenceLattice> table = new ArrayList<>();
        found.values().forEach(same -> {
            same.sort(Comparator.comparingDouble(CoincidenceLattice::angle));
            for (int i = 0; i < same.size(); i++) {
                CoincidenceLattice c = same.get(i);
                String letter = same.size() == 1 ? "" : Character.toString('a' + i);
                table.add(new CoincidenceLattice(c.sigma, letter, c.angle, c.axis));
            }
        });
        return List.copyOf(table);
    }

    private static boolean isMultiple(int m, int u, int v, int w) {
        for (int d = 3; d <= 9; d += 2) {
            if (m % d == 0 && u % d == 0 && v % d == 0 && w % d == 0) {
                return true;
            }
        }
        return false;
    }

    private static void add(List<CoincidenceLattice> same, int sigma, int m, int u, int v, int w) {
        Misorientation least = Misorientation.between(UPRIGHT, oriented(Rotation.ofQuaternion(m, u, v, w)));
        if (same.stream().noneMatch(c -> Math.abs(c.angle - least.angle()) < 1e-7)) {
            same.add(new CoincidenceLattice(
                    sigma, "", least.angle(), least.nearestDirection().uvw()));
        }
    }

    /**
     * The largest deviation at which two crystals still count as being in this relation.
     *
     * @return 15°/√Σ in radians (Brandon, Acta Metallurgica 14 (1966) 1479, from memory)
     */
    public double brandonLimit() {
        return Math.toRadians(15) / Math.sqrt(sigma);
    }

    /**
     * How far a misorientation of cubic crystals is off this relation.
     *
     * @param misorientation between two cubic crystals
     * @return the smallest angle in radians over all that symmetry cannot tell apart
     */
    public double deviation(Misorientation misorientation) {
        Rotation exact = Rotation.ofAxisAngle(CUBE.vector(axis), angle);
        Rotation own = misorientation.rotation();
        List<Rotation> turns = UPRIGHT.symmetry();
        return turns.stream()
                .flatMap(a -> turns.stream().map(b -> a.after(own).after(b)))
                .mapToDouble(r -> Math.min(r.angleTo(exact), r.inverse().angleTo(exact)))
                .min()
                .orElseThrow();
    }

    /**
     * The usual name.
     *
     * @return for example {@code Σ13a}
     */
    public String name() {
        return "Σ" + sigma + letter;
    }
}
