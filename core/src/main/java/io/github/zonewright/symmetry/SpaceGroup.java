package io.github.zonewright.symmetry;

import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import java.util.ArrayList;
import java.util.Collection;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;
import java.util.TreeSet;

/**
 * A space group in one setting: every operation modulo lattice translations, centring included. Two groups are equal
 * when they hold the same operations, so the same type in another setting is another group here.
 *
 * <p>The group knows neither its number nor its symbol; {@link SpaceGroups#identify(SpaceGroup)} finds them. Known
 * limit: at most 1536 operations, more than any usual cell has.
 */
public final class SpaceGroup {

    private static final int SNAPPING_ROUNDS = 8;
    private static final double SNAPPED = 1e-12;

    private final List<SymmetryOperation> operations;
    private final List<SymmetryOperation> rotations;
    private final List<SymmetryOperation> properLaueRotations;
    private final PointGroup pointGroup;

    private SpaceGroup(List<SymmetryOperation> operations) {
        this.operations = operations;
        rotations =
                operations.stream().map(SymmetryOperation::pointPart).distinct().toList();
        pointGroup = PointGroup.of(rotations);
        properLaueRotations = rotations.stream()
                .map(r -> r.determinant() > 0 ? r : r.after(SymmetryOperation.INVERSION))
                .distinct()
                .toList();
    }

    /**
     * The group of a Hall symbol.
     *
     * @param symbol the Hall symbol, for example {@code -P 2ybc}
     * @return the group
     * @throws IllegalArgumentException if the text is no Hall symbol
     */
    public static SpaceGroup ofHall(String symbol) {
        return generatedBy(HallSymbol.parse(symbol).generators());
    }

    /**
     * The group of a complete list of operations.
     *
     * @param operations every operation, centring included; a repeated one counts once
     * @return the group
     * @throws IllegalArgumentException if the list is empty or not closed; the message names what is missing
     */
    public static SpaceGroup ofOperations(Collection<SymmetryOperation> operations) {
        Set<SymmetryOperation> given = new LinkedHashSet<>();
        operations.forEach(o -> given.add(o.reduced()));
        if (given.isEmpty()) {
            throw new IllegalArgumentException("symmetry operations: none given, expected at least x,y,z");
        }
        SpaceGroup group = generatedBy(given);
        if (group.order() != given.size()) {
            SymmetryOperation missing = group.operations.stream()
                    .filter(o -> !given.contains(o))
                    .findFirst()
                    .orElseThrow();
            throw new IllegalArgumentException("symmetry operations: " + given.size() + " given that make a group of "
                    + group.order() + "; " + missing + " is missing");
        }
        return group;
    }

    /**
     * The smallest group that holds some operations.
     *
     * @param generators the operations; none gives P 1
     * @return the group
     * @throws IllegalArgumentException if the operations generate no space group
     */
    public static SpaceGroup generatedBy(Collection<SymmetryOperation> generators) {
        return new SpaceGroup(GroupClosure.of(generators));
    }

    /**
     * Every operation modulo lattice translations, the identity first.
     *
     * @return the operations, translations in [0, 1)
     */
    public List<SymmetryOperation> operations() {
        return operations;
    }

    /**
     * The number of operations modulo lattice translations: the multiplicity of a general site.
     *
     * @return the order
     */
    public int order() {
        return operations.size();
    }

    /**
     * The pure translations inside the cell, (0, 0, 0) first.
     *
     * @return the centring vectors in fractional coordinates
     */
    public List<Vector3> centringVectors() {
        return operations.stream()
                .filter(SymmetryOperation::isTranslation)
                .map(o -> o.apply(Vector3.ZERO))
                .toList();
    }

    /**
     * The letter of the centring.
     *
     * @return P, A, B, C, I, F, R (obverse hexagonal axes), or X for any other set of translations
     */
    public char centring() {
        Set<SymmetryOperation> mine = translations(operations);
        for (char letter : "PABCIFR".toCharArray()) {
            if (mine.equals(
                    translations(GroupClosure.of(HallSymbol.parse(letter + " 1").generators())))) {
                return letter;
            }
        }
        return 'X';
    }

    private static Set<SymmetryOperation> translations(List<SymmetryOperation> operations) {
        Set<SymmetryOperation> found = new LinkedHashSet<>(operations);
        found.removeIf(o -> !o.isTranslation());
        return found;
    }

    /**
     * The rotation parts, each once.
     *
     * @return the point group's operations without translation
     */
    public List<SymmetryOperation> rotations() {
        return rotations;
    }

    /**
     * The proper rotations of the Laue class, in the setting of this group: those that turn a kinematic pattern into an
     * equivalent one. They act on direct-space fractional coordinates.
     *
     * @return the rotations (W, 0), the identity first
     */
    public List<SymmetryOperation> properLaueRotations() {
        return properLaueRotations;
    }

    /**
     * The proper rotations of the Laue class in the Cartesian frame of a crystal.
     *
     * @param lattice the cell that the group belongs to
     * @return the rotation matrices A·W·A⁻¹, the identity first
     */
    public List<Matrix3> properLaueRotations(Lattice lattice) {
        return cartesian(properLaueRotations, lattice);
    }

    /**
     * The proper rotations of the point group in the Cartesian frame of a crystal: those that turn a dynamical pattern
     * into an equivalent one.
     *
     * @param lattice the cell that the group belongs to
     * @return the rotation matrices A·W·A⁻¹, the identity first
     */
    public List<Matrix3> properRotations(Lattice lattice) {
        return cartesian(rotations.stream().filter(r -> r.determinant() > 0).toList(), lattice);
    }

    private static List<Matrix3> cartesian(List<SymmetryOperation> rotations, Lattice lattice) {
        Matrix3 a = lattice.basis();
        Matrix3 inverse = a.inverse();
        return rotations.stream()
                .map(r -> a.times(r.rotationMatrix()).times(inverse))
                .toList();
    }

    /**
     * The point group.
     *
     * @return one of 32
     */
    public PointGroup pointGroup() {
        return pointGroup;
    }

    /**
     * The Laue class.
     *
     * @return one of 11
     */
    public LaueClass laueClass() {
        return pointGroup.laueClass();
    }

    /**
     * Whether the group has a centre of symmetry, at the origin or elsewhere.
     *
     * @return true if −1 is among the rotations
     */
    public boolean isCentrosymmetric() {
        return rotations.contains(SymmetryOperation.INVERSION);
    }

    /**
     * Whether a cell has the symmetry that the group asks for.
     *
     * @param lattice the cell
     * @param tolerance the largest strain of an edge or angle that passes, as a fraction
     * @return true if every rotation leaves the metric as it is
     */
    public boolean fits(Lattice lattice, double tolerance) {
        return properLaueRotations(lattice).stream()
                .allMatch(r -> r.times(r.transpose()).distanceTo(Matrix3.IDENTITY) <= 2 * tolerance);
    }

    /**
     * Whether a reflection is absent by the group's centring, screw axes or glide planes, whatever the atoms.
     *
     * @param hkl the reflection
     * @return true if some operation leaves h where it is and shifts its phase
     */
    public boolean isSystematicallyAbsent(Hkl hkl) {
        for (SymmetryOperation operation : operations) {
            if (operation.phaseUnits(hkl) != 0 && operation.apply(hkl).equals(hkl)) {
                return true;
            }
        }
        return false;
    }

    /**
     * The reflections with the same d and |F| by the Laue class: its Friedel mates too.
     *
     * @param hkl the reflection
     * @return the distinct reflections ±h·W, in ascending order
     */
    public List<Hkl> equivalents(Hkl hkl) {
        Set<Hkl> found = new TreeSet<>();
        for (SymmetryOperation rotation : rotations) {
            Hkl image = rotation.apply(hkl);
            found.add(image);
            found.add(image.negate());
        }
        return List.copyOf(found);
    }

    /**
     * The directions equivalent by the Laue class, opposite ones too.
     *
     * @param direction the direction
     * @return the distinct directions ±W·u, in ascending order
     */
    public List<Uvw> equivalents(Uvw direction) {
        Set<Uvw> found = new TreeSet<>();
        for (SymmetryOperation rotation : rotations) {
            Uvw image = rotation.apply(direction);
            found.add(image);
            found.add(image.negate());
        }
        return List.copyOf(found);
    }

    /**
     * The sites equivalent to one in the cell.
     *
     * @param site fractional coordinates
     * @param tolerance how near two images count as one site: the largest difference of a fractional coordinate
     * @return the distinct images, coordinates in [0, 1), each with the operation that made it; the identity's first
     */
    public List<SiteImage> orbit(Vector3 site, double tolerance) {
        List<SiteImage> orbit = new ArrayList<>();
        for (SymmetryOperation operation : operations) {
            SiteImage image = SiteImage.of(operation, site);
            if (orbit.stream().noneMatch(o -> SiteImage.separation(o.position(), image.position()) <= tolerance)) {
                orbit.add(image);
            }
        }
        return List.copyOf(orbit);
    }

    /**
     * Moves a site that lies almost on a special position onto it: the mean of its images that are near it, again until
     * it rests.
     *
     * @param site fractional coordinates, for example (0.3333, 0.6667, 0.25)
     * @param tolerance how near an image counts: the largest difference of a fractional coordinate
     * @return the site, moved by some tolerances at most; the very same coordinates if it lies on no special position
     */
    public Vector3 snap(Vector3 site, double tolerance) {
        Vector3 at = site;
        for (int round = 0; round < SNAPPING_ROUNDS; round++) {
            Vector3 mean = meanOfNearImages(at, tolerance);
            if (mean.minus(at).norm() < SNAPPED) {
                return mean.minus(site).norm() < SNAPPED ? site : mean;
            }
            at = mean;
        }
        return at;
    }

    private Vector3 meanOfNearImages(Vector3 site, double tolerance) {
        Vector3 sum = Vector3.ZERO;
        int near = 0;
        for (SymmetryOperation operation : operations) {
            Vector3 offset = SiteImage.nearestOffset(site, operation.apply(site));
            if (SiteImage.largest(offset) <= tolerance) {
                sum = sum.plus(offset);
                near++;
            }
        }
        return site.plus(sum.times(1.0 / near));
    }

    @Override
    public boolean equals(Object other) {
        return other instanceof SpaceGroup that && operations.equals(that.operations);
    }

    @Override
    public int hashCode() {
        return operations.hashCode();
    }

    /**
     * A short description.
     *
     * @return point group and order
     */
    @Override
    public String toString() {
        return "space group of class " + pointGroup + " with " + order() + " operations";
    }
}
