package io.github.zonewright.reference;

import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import java.util.ArrayList;
import java.util.List;
import java.util.stream.IntStream;

/** Angles of twins and of published orientation relationships, by trying every pair of symmetry rotations. */
final class OrientationRelations {

    private static final Lattice CUBE = Lattice.cubic(1);
    private static final Lattice HEXAGONAL = Lattice.hexagonal(1, 1.6);

    private static final List<Rotation> CUBIC = generate(
            Rotation.ofAxisAngle(Vector3.Z, Math.PI / 2), Rotation.ofAxisAngle(new Vector3(1, 1, 1), 2 * Math.PI / 3));
    private static final List<Rotation> HEXAGONAL_GROUP =
            generate(Rotation.ofAxisAngle(Vector3.Z, Math.PI / 3), Rotation.ofAxisAngle(Vector3.X, Math.PI));

    private OrientationRelations() {}

    static double[] answer(CheckValue row) {
        return switch (row.id()) {
            case "OR-01" -> degrees(least(kurdjumovSachs(), CUBIC, CUBIC));
            case "OR-02" -> degrees(least(nishiyamaWassermann(), CUBIC, CUBIC));
            case "OR-03" -> degrees(leastBetweenVariants());
            case "OR-05", "OR-08", "OR-09", "OR-10" -> degrees(least(coincidence(row), CUBIC, CUBIC));
            case "OR-11" -> degrees(Rotation.ofQuaternion(2, 1, 1, 0).angle());
            case "OR-12" -> degrees(least(Rotation.ofAxisAngle(new Vector3(1, 1, 1), Math.PI), CUBIC, CUBIC));
            case "OR-13" -> burgersVariants();
            default -> degrees(hexagonalTwin(row));
        };
    }

    private static double[] degrees(double radians) {
        return new double[] {Math.toDegrees(radians)};
    }

    private static List<Rotation> generate(Rotation... generators) {
        List<Rotation> group = new ArrayList<>(List.of(Rotation.IDENTITY));
        for (int i = 0; i < group.size(); i++) {
            for (Rotation g : generators) {
                Rotation next = g.after(group.get(i));
                if (group.stream().noneMatch(r -> r.angleTo(next) < 1e-6)) {
                    group.add(next);
                }
            }
        }
        return group;
    }

    /** The smallest angle of B·R·A over the symmetry rotations A of the first crystal and B of the second. */
    private static double least(Rotation r, List<Rotation> first, List<Rotation> second) {
        return first.stream()
                .flatMap(a -> second.stream().map(b -> b.after(r).after(a)))
                .mapToDouble(Rotation::angle)
                .min()
                .orElseThrow();
    }

    /** Takes vectors of the first crystal to the second, such that planes and directions lie on each other. */
    private static Rotation parallel(Vector3 n1, Vector3 d1, Vector3 n2, Vector3 d2) {
        return axes(n2, d2).inverse().after(axes(n1, d1));
    }

    private static Rotation axes(Vector3 normal, Vector3 direction) {
        Vector3 z = normal.normalize();
        Vector3 x = direction.normalize();
        return Rotation.ofMatrix(Matrix3.ofRows(x, z.cross(x), z));
    }

    private static Vector3 plane(String hkl) {
        return CUBE.reciprocal().vector(Hkl.parse(hkl));
    }

    private static Vector3 direction(String uvw) {
        return CUBE.vector(Uvw.parse(uvw));
    }

    private static Rotation kurdjumovSachs() {
        return parallel(plane("111"), direction("-101"), plane("011"), direction("-1-11"));
    }

    private static Rotation nishiyamaWassermann() {
        return parallel(plane("111"), direction("1-10"), plane("011"), direction("100"));
    }

    private static double leastBetweenVariants() {
        Rotation back = nishiyamaWassermann().inverse();
        return CUBIC.stream()
                .mapToDouble(s -> least(kurdjumovSachs().after(s).after(back), CUBIC, CUBIC))
                .min()
                .orElseThrow();
    }

    /** Σ is the odd part of m² + N for the rotation with tan(θ/2) = √N/m about an axis whose indices have the squares' sum N. */
    private static Rotation coincidence(CheckValue row) {
        int sigma = (int) row.number("Sigma(\\d+)");
        Uvw axis = Uvw.parse(row.group("<(\\d+)>"));
        int n = axis.u() * axis.u() + axis.v() * axis.v() + axis.w() * axis.w();
        int m = IntStream.range(1, 20)
                .filter(i -> oddPart(i * i + n) == sigma)
                .findFirst()
                .orElseThrow();
        return Rotation.ofQuaternion(m, axis.u(), axis.v(), axis.w());
    }

    private static int oddPart(int i) {
        return i / Integer.lowestOneBit(i);
    }

    /** (110) ∥ (0001), [1 −1 1] ∥ [1 1 −2 0] (Burgers 1934): the angles between two hexagonal crystals of one cubic parent. */
    private static double[] burgersVariants() {
        Rotation burgers = parallel(plane("110"), direction("1-11"), Vector3.Z, HEXAGONAL.vector(Uvw.parse("11-20")));
        return CUBIC.stream()
                .mapToDouble(s -> least(burgers.after(s).after(burgers.inverse()), HEXAGONAL_GROUP, HEXAGONAL_GROUP))
                .map(a -> Math.rint(100 * Math.toDegrees(a)) / 100)
                .filter(a -> a > 0)
                .distinct()
                .sorted()
                .toArray();
    }

    /** A twin is half a turn about the normal of its plane. */
    private static double hexagonalTwin(CheckValue row) {
        Lattice lattice = ZoneNet.lattice("hcp-" + row.group("^(\\w+)"));
        Vector3 normal = lattice.reciprocal().vector(Hkl.parse(row.group("\\{([-\\d]+)\\}")));
        return least(Rotation.ofAxisAngle(normal, Math.PI), HEXAGONAL_GROUP, HEXAGONAL_GROUP);
    }
}
