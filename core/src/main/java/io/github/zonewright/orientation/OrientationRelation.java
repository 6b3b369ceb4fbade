package io.github.zonewright.orientation;

import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.symmetry.LaueClass;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Optional;

/**
 * A relation with a name between two crystals of one kind: a twin by half a turn about the normal of a plane or about a
 * lattice direction, or a coincidence-site lattice of cubic crystals. Where there is a centre of symmetry, half a turn about
 * the normal of a plane is the mirror image in it.
 *
 * <p>Known limits: relations between two different crystals have no name here. Two orientations taken from the same pattern
 * may come near a relation by accident; how far they are off is told with it.
 *
 * @param name the relation in words, for example {@code twin on (1 1 1)} or {@code Σ3}
 * @param deviation how far the crystals are off it, in radians
 */
public record OrientationRelation(String name, double deviation) {

    private static final String TWIN = "twin ";

    /** How far two crystals may be off an exact twin: twice the usual error of a lean. */
    public static final double TWIN_TOLERANCE = Math.toRadians(2);

    /** Twin planes and axes have indices up to this one. */
    private static final int LARGEST_INDEX = 3;

    /** An element that is off by the tolerance has to have a sum of indices this much lower than an exact one. */
    private static final double TOLERANCE_IN_INDICES = 12;

    /**
     * The relations with a name that two crystals are in.
     *
     * @param misorientation the two crystals
     * @return the twin, if any: of several the one with low indices that fits well, and then the coincidence-site lattice that the deviation suits best
     */
    public static List<OrientationRelation> of(Misorientation misorientation) {
        if (!misorientation.isOfOneKind()) {
            return List.of();
        }
        List<OrientationRelation> found = new ArrayList<>();
        twin(misorientation).ifPresent(found::add);
        coincidence(misorientation).ifPresent(found::add);
        return List.copyOf(found);
    }

    private static Optional<OrientationRelation> coincidence(Misorientation m) {
        LaueClass laue = m.first().spaceGroup().laueClass();
        if (laue != LaueClass.CUBIC_LOW && laue != LaueClass.CUBIC_HIGH) {
            return Optional.empty();
        }
        record Near(CoincidenceLattice lattice, double share) {}
        return CoincidenceLattice.table().stream()
                .map(c -> new Near(c, c.deviation(m) / c.brandonLimit()))
                .filter(n -> n.share <= 1)
                .min(Comparator.comparingDouble(Near::share))
                .map(n -> new OrientationRelation(n.lattice.name(), n.share * n.lattice.brandonLimit()));
    }

    /** An axis of a half turn and what it is called; the sum of its indices and the number of its equivalents order them. */
    private record Element(Vector3 axis, String name, int size, int multiplicity) {}

    private static Optional<OrientationRelation> twin(Misorientation m) {
        if (m.angle() < TWIN_TOLERANCE) {
            return Optional.empty();
        }
        List<Rotation> halfTurns = m.equivalents().stream()
                .filter(r -> Math.PI - r.angle() < TWIN_TOLERANCE)
                .toList();
        if (halfTurns.isEmpty()) {
            return Optional.empty();
        }
        record Near(Element element, double off) {
            double cost() {
                return element.size + Math.rint(1e6 * TOLERANCE_IN_INDICES * off / TWIN_TOLERANCE) / 1e6;
            }
        }
        return elements(m.first()).stream()
                .flatMap(e -> {
                    Rotation exact = Rotation.ofAxisAngle(e.axis, Math.PI);
                    return halfTurns.stream().map(h -> new Near(e, h.angleTo(exact)));
                })
                .filter(n -> n.off < TWIN_TOLERANCE)
                .min(Comparator.comparingDouble(Near::cost).thenComparingInt(n -> n.element.multiplicity))
                .map(n -> new OrientationRelation(TWIN + n.element.name, n.off));
    }

    /**
     * Planes and directions of low indices; a direction along the normal of such a plane is left out, and planes go first,
     * since many a twin can be said by either.
     */
    private static List<Element> elements(OrientedLattice crystal) {
        List<Element> found = new ArrayList<>();
        for (Uvw i : indices()) {
            Hkl plane = new Hkl(i.u(), i.v(), i.w());
            Vector3 normal = crystal.lattice().reciprocal().vector(plane);
            found.add(new Element(
                    normal,
                    "on (" + i + ")",
                    size(i),
                    crystal.spaceGroup().equivalents(plane).size()));
        }
        List<Element> planes = List.copyOf(found);
        for (Uvw i : indices()) {
            Vector3 direction = crystal.lattice().vector(i);
            if (planes.stream()
                    .noneMatch(p -> p.axis.cross(direction).norm() < 1e-6 * p.axis.norm() * direction.norm())) {
                found.add(new Element(
                        direction,
                        "about [" + i + "]",
                        size(i) + LARGEST_INDEX,
                        crystal.spaceGroup().equivalents(i).size()));
            }
        }
        return found;
    }

    private static int size(Uvw i) {
        return Math.abs(i.u()) + Math.abs(i.v()) + Math.abs(i.w());
    }

    /** One of each pair of opposite indices, those with few negative ones first. */
    private static List<Uvw> indices() {
        List<Uvw> all = new ArrayList<>();
        for (int u = LARGEST_INDEX; u >= -LARGEST_INDEX; u--) {
            for (int v = LARGEST_INDEX; v >= -LARGEST_INDEX; v--) {
                for (int w = LARGEST_INDEX; w >= -LARGEST_INDEX; w--) {
                    Uvw i = new Uvw(u, v, w);
                    if (i.compareTo(new Uvw(0, 0, 0)) > 0 && i.reduced().equals(i)) {
                        all.add(i);
                    }
                }
            }
        }
        all.sort(Comparator.comparingInt((Uvw i) -> (i.v() < 0 ? 1 : 0) + (i.w() < 0 ? 1 : 0)));
        return all;
    }

    /**
     * Whether it is a twin law.
     *
     * @return false for a coincidence-site lattice, of which twins may be one
     */
    public boolean isTwin() {
        return name.startsWith(TWIN);
    }

    /**
     * The relation for a person.
     *
     * @return its name and how far the crystals are off it
     */
    public String text() {
        return String.format(Locale.ROOT, "%s, %.2f° off", name, Math.toDegrees(deviation));
    }
}
