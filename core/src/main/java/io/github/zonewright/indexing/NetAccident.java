package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.OptionalDouble;
import java.util.Set;

/**
 * How many nets of a crystal are to be expected by accident to lie as near to a measured net as the one that was found.
 *
 * <p>Spots that lie on a net tell, however many they are, three things of the crystal: the net's size and the two numbers of
 * its shape (ratio and angle of its short vectors). The nets of the crystal that lie in a wide range about the measured one
 * give how densely they lie there, the found one counted among them; the expectation is that density over the range within
 * which the found one lies, or would have been taken.
 */
final class NetAccident {

    /** How much the shape may differ in the wide range, as half the difference of the axes' stretches. */
    private static final double WIDE_SHAPE = 0.06;

    /** Least range of the logarithm of the size to either side. */
    private static final double WIDE_SIZE = 0.06;

    /** How far a spot may lie off beyond its measured error, in px. */
    private static final double MODEL_ERROR = 0.05;

    private final List<ZoneNet> nets;
    private final KnownCamera camera;
    private final SpotCloud cloud;

    NetAccident(List<ZoneNet> nets, KnownCamera camera, SpotCloud cloud) {
        this.nets = nets;
        this.camera = camera;
        this.cloud = cloud;
    }

    /** The solution with what speaks for its crystal rather than for an accident. */
    Solution weigh(Solution s) {
        double intensities = s.ownScore().orElse(0);
        return s.withOwnScore(OptionalDouble.of(intensities - Math.log(expected(s))));
    }

    /** How many nets are expected by accident to lie as near to the solution's spots as its own. */
    double expected(Solution s) {
        Uvw zone = s.placement().setting().zone();
        ZoneNet net =
                nets.stream().filter(n -> n.zone().equals(zone)).findFirst().orElseThrow();
        List<Hkl> spanning = s.matches().stream()
                .map(SpotMatch::hkl)
                .filter(h -> h.dot(zone) == 0)
                .toList();
        List<Vector2> basis = net.basisOf(spanning);
        if (basis.isEmpty()) {
            return 1; // a row of the zero layer fits any crystal
        }
        NetPose pose = Refinement.pose(s.placement(), cloud);
        NetPose told = camera.pose(new Vector2(pose.centreX(), pose.centreY()), 0);
        Vector2 a = seen(basis.get(0), pose, told);
        Vector2 b = seen(basis.get(1), pose, told);
        double size = Math.max(WIDE_SIZE, 2 * Math.log1p(camera.tolerance()));
        Set<Long> shapes = new HashSet<>();
        for (ZoneNet other : nets) {
            count(other, a, b, size, shapes);
        }
        double off = Math.hypot(pose.e1() - told.e1(), pose.e2() - told.e2());
        double shape = Math.hypot(off, shapeError(s));
        double sizeError = Math.log1p(camera.tolerance()) + shapeError(s);
        return Math.max(1, shapes.size()) * sizeError / size * Math.pow(shape / WIDE_SHAPE, 2);
    }

    /** Standard uncertainty of the shape of the measured net: that of a fit to spots of these errors and radii. */
    private static double shapeError(Solution s) {
        double information = 0;
        for (SpotMatch m : s.matches()) {
            double r = m.measured().position().distanceTo(s.placement().camera().centre());
            information += r * r / (Math.pow(m.measured().positionError(), 2) + MODEL_ERROR * MODEL_ERROR);
        }
        return Math.sqrt(2 / information);
    }

    /** A vector of the net as it was seen, in 1/Å by the camera as it was told. */
    private static Vector2 seen(Vector2 q, NetPose pose, NetPose told) {
        return told.toNet(pose.x(q.x(), q.y()), pose.y(q.x(), q.y()));
    }

    /** Adds what shapes of a net lie in the wide range, equal ones once. */
    private static void count(ZoneNet net, Vector2 a, Vector2 b, double size, Set<Long> shapes) {
        List<Vector2> likeA = ofLength(net, a.norm(), size);
        List<Vector2> likeB = likeA.isEmpty() ? List.of() : ofLength(net, b.norm(), size);
        double det = a.cross(b);
        for (Vector2 p : likeA) {
            for (Vector2 q : likeB) {
                double ratio = p.cross(q) / det;
                if (!(Math.abs(Math.log(ratio)) < 2 * size)) {
                    continue;
                }
                // The deformation that carries a, b to p, q, as two complex numbers: turned size and shape.
                double xx = (p.x() * b.y() - q.x() * a.y()) / det;
                double xy = (q.x() * a.x() - p.x() * b.x()) / det;
                double yx = (p.y() * b.y() - q.y() * a.y()) / det;
                double yy = (q.y() * a.x() - p.y() * b.x()) / det;
                double shape = Math.hypot(xx - yy, yx + xy) / Math.hypot(xx + yy, yx - xy);
                if (shape < WIDE_SHAPE) {
                    shapes.add(Math.round(1e4 * shape) * 100_000 + Math.round(1e4 * Math.log(ratio)));
                }
            }
        }
    }

    private static List<Vector2> ofLength(ZoneNet net, double length, double size) {
        List<Vector2> found = new ArrayList<>();
        double reach = size + WIDE_SHAPE;
        for (ZoneNet.Node node : net.nodes()) {
            double off = Math.log(node.g() / length);
            if (off > reach) {
                break;
            }
            if (off > -reach) {
                found.add(new Vector2(node.x(), node.y()));
            }
        }
        return found;
    }
}
