package io.github.zonewright.reference;

import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.ReciprocalLattice;
import io.github.zonewright.lattice.Uvw;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.function.Predicate;

/**
 * The two shortest spots of a zone's zero layer, found from the lattice and the rules of absence that every textbook gives
 * for four simple structures.
 */
record ZoneNet(Hkl first, Hkl second, double ratio, double shortDiagonal, double longDiagonal, double degrees) {

    private static final int LARGEST = 8;

    static Lattice lattice(String structure) {
        return switch (structure) {
            case "fcc", "bcc", "diamond" -> Lattice.cubic(4);
            case "hcp-ideal" -> Lattice.hexagonal(3, 3 * Math.sqrt(8.0 / 3));
            case "hcp-Ti" -> Lattice.hexagonal(2.9505, 4.6826);
            case "hcp-Mg" -> Lattice.hexagonal(3.2094, 5.2112);
            default -> throw new IllegalArgumentException(structure);
        };
    }

    static Predicate<Hkl> present(String structure) {
        return switch (structure) {
            case "fcc" -> ZoneNet::unmixed;
            case "bcc" -> g -> (g.h() + g.k() + g.l()) % 2 == 0;
            case "diamond" -> g -> unmixed(g) && (g.h() % 2 != 0 || (g.h() + g.k() + g.l()) % 4 == 0);
            default -> g -> (g.h() + 2 * g.k()) % 3 != 0 || g.l() % 2 == 0;
        };
    }

    static ZoneNet of(String structure, Uvw zone) {
        ReciprocalLattice lattice = lattice(structure).reciprocal();
        List<Hkl> layer = new ArrayList<>();
        for (int h = -LARGEST; h <= LARGEST; h++) {
            for (int k = -LARGEST; k <= LARGEST; k++) {
                for (int l = -LARGEST; l <= LARGEST; l++) {
                    Hkl g = new Hkl(h, k, l);
                    if (!g.isZero() && g.dot(zone) == 0 && present(structure).test(g)) {
                        layer.add(g);
                    }
                }
            }
        }
        layer.sort(Comparator.comparingDouble(g -> lattice.vector(g).norm()));
        Hkl first = layer.get(0);
        Hkl second = layer.stream()
                .filter(g -> lattice.vector(g).cross(lattice.vector(first)).norm() > 1e-9)
                .findFirst()
                .orElseThrow();
        return of(structure, first, second);
    }

    /** The figures of two given spots, of which the second is turned over if the angle between them is obtuse. */
    static ZoneNet of(String structure, Hkl first, Hkl g) {
        ReciprocalLattice lattice = lattice(structure).reciprocal();
        Hkl second = lattice.angle(first, g) > Math.PI / 2 + 1e-9 ? g.negate() : g;
        double unit = lattice.vector(first).norm();
        return new ZoneNet(
                first,
                second,
                lattice.vector(second).norm() / unit,
                lattice.vector(second.minus(first)).norm() / unit,
                lattice.vector(second.plus(first)).norm() / unit,
                Math.toDegrees(lattice.angle(first, second)));
    }

    private static boolean unmixed(Hkl g) {
        return (g.h() - g.k()) % 2 == 0 && (g.k() - g.l()) % 2 == 0;
    }
}
