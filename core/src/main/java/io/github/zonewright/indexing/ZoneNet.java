package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.ReciprocalLattice;
import io.github.zonewright.lattice.Uvw;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Stream;

/**
 * The reflections of one zone that can be seen, in the plane of the zone: x along the reference reflection, y = z × x, with
 * z along the zone axis towards the source. Absent reflections that double diffraction can reach (the sum of two allowed
 * ones of the zone) are nodes too.
 */
final class ZoneNet {

    /** One node: its place in the plane in 1/Å, |g|, its squared structure factor with the floor of its shell, its family. */
    record Node(Hkl hkl, double x, double y, double g, double strength, boolean allowed, int family) {}

    private final Uvw zone;
    private final Hkl reference;
    private final List<Node> nodes;
    private final int[] grid;
    private final int reach;
    private final Vector2 first;
    private final Vector2 second;
    private final double perArea;
    private final double[] flatX;
    private final double[] flatY;
    private final double shortestTurn;
    private final double[] logLengths;
    private final double[] azimuths;
    private final double nodeArea;
    private final Vector3[] axes;
    private final double wavelength;
    private final ReciprocalLattice reciprocal;

    private ZoneNet(
            Uvw zone, Hkl reference, List<Node> nodes, ZoneBasis basis, Vector3[] axes, ReflectionStrengths source) {
        this.zone = zone;
        this.reference = reference;
        this.nodes = nodes;
        this.axes = axes;
        this.wavelength = source.wavelength();
        this.reciprocal = source.reciprocal();
        this.first = place(basis.first(), source.reciprocal(), axes);
        this.second = place(basis.second(), source.reciprocal(), axes);
        double determinant = first.cross(second);
        this.perArea = 1 / determinant;
        this.shortestTurn = source.shortestTurn(zone);
        this.reach =
                1 + (int) Math.ceil(source.largestG() * Math.max(first.norm(), second.norm()) / Math.abs(determinant));
        this.grid = new int[(2 * reach + 1) * (2 * reach + 1)];
        Arrays.fill(grid, -1);
        for (int i = 0; i < nodes.size(); i++) {
            Vector2 n = coordinates(nodes.get(i).x, nodes.get(i).y);
            grid[((int) Math.rint(n.x()) + reach) * (2 * reach + 1) + (int) Math.rint(n.y()) + reach] = i;
        }
        this.flatX = nodes.stream().mapToDouble(n -> n.x * flatness(n)).toArray();
        this.flatY = nodes.stream().mapToDouble(n -> n.y * flatness(n)).toArray();
        Node[] upper =
                nodes.stream().filter(n -> n.y > 0 || (n.y == 0 && n.x >= 0)).toArray(Node[]::new);
        this.logLengths =
                Stream.of(upper).mapToDouble(n -> Math.log(n.g * flatness(n))).toArray();
        this.azimuths = Stream.of(upper).mapToDouble(n -> Math.atan2(n.y, n.x)).toArray();
        long all = latticePoints().size();
        this.nodeArea = Math.abs(determinant) * all / nodes.size();
    }

    /**
     * The net of a zone.
     *
     * @return the net; empty when fewer than four reflections or only one row of them can be seen
     */
    static Optional<ZoneNet> of(Uvw zone, ReflectionStrengths source) {
        return of(zone, source, Optional.empty());
    }

    /** The same with a given reference reflection. */
    static Optional<ZoneNet> of(Uvw zone, ReflectionStrengths source, Hkl reference) {
        return of(zone, source, Optional.of(reference));
    }

    private static Optional<ZoneNet> of(Uvw zone, ReflectionStrengths source, Optional<Hkl> given) {
        ReciprocalLattice reciprocal = source.reciprocal();
        ZoneBasis basis = ZoneBasis.of(zone, reciprocal);
        List<Hkl> points = points(basis, source);
        List<Hkl> seen = points.stream().filter(source::isAllowed).toList();
        if (seen.size() < 4) {
            return Optional.empty();
        }
        Hkl shortest = seen.stream()
                .min(Comparator.comparingDouble(
                                (Hkl h) -> Math.rint(1e7 * reciprocal.vector(h).norm()))
                        .thenComparing(Comparator.<Hkl>naturalOrder().reversed()))
                .orElseThrow();
        Hkl reference = given.orElse(shortest);
        Vector3 z = source.lattice().vector(zone).normalize();
        Vector3 x = reciprocal.vector(reference).normalize();
        Vector3[] axes = {x, z.cross(x), z};
        List<Hkl> reachable = points.stream()
                .filter(h -> source.isAllowed(h)
                        || seen.stream().anyMatch(a -> !a.equals(h) && source.isAllowed(h.minus(a))))
                .toList();
        Map<Long, Integer> families = new HashMap<>();
        List<Node> nodes = new ArrayList<>();
        for (Hkl h : reachable) {
            Vector2 p = place(h, reciprocal, axes);
            double amplitude = source.amplitude(h);
            double g = p.norm();
            long key = Math.round(g * 1e6) * 1_000_003L + Math.round(amplitude * 1e4);
            int family = families.computeIfAbsent(key, k -> families.size());
            nodes.add(new Node(h, p.x(), p.y(), g, source.strength(h), source.isAllowed(h), family));
        }
        nodes.sort(Comparator.comparingDouble(Node::g).thenComparing(Node::hkl));
        if (nodes.stream().allMatch(n -> Math.abs(n.y) < 1e-9)) {
            return Optional.empty();
        }
        return Optional.of(new ZoneNet(zone, reference, List.copyOf(nodes), basis, axes, source));
    }

    private static List<Hkl> points(ZoneBasis basis, ReflectionStrengths source) {
        ReciprocalLattice reciprocal = source.reciprocal();
        Vector3 a = reciprocal.vector(basis.first());
        Vector3 b = reciprocal.vector(basis.second());
        double height = a.cross(b).norm();
        int na = (int) Math.ceil(source.largestG() * b.norm() / height);
        int nb = (int) Math.ceil(source.largestG() * a.norm() / height);
        List<Hkl> points = new ArrayList<>();
        for (int i = -na; i <= na; i++) {
            for (int j = -nb; j <= nb; j++) {
                Hkl h = new Hkl(
                        i * basis.first().h() + j * basis.second().h(),
                        i * basis.first().k() + j * basis.second().k(),
                        i * basis.first().l() + j * basis.second().l());
                if (!h.isZero() && reciprocal.vector(h).norm() <= source.largestG()) {
                    points.add(h);
                }
            }
        }
        return points;
    }

    private static Vector2 place(Hkl h, ReciprocalLattice reciprocal, Vector3[] axes) {
        Vector3 g = reciprocal.vector(h);
        return new Vector2(g.dot(axes[0]), g.dot(axes[1]));
    }

    private Vector2 coordinates(double x, double y) {
        return new Vector2((x * second.y() - y * second.x()) * perArea, (first.x() * y - first.y() * x) * perArea);
    }

    private List<Vector2> latticePoints() {
        List<Vector2> found = new ArrayList<>();
        double largest = nodes.get(nodes.size() - 1).g;
        for (int i = -reach; i <= reach; i++) {
            for (int j = -reach; j <= reach; j++) {
                Vector2 p = first.times(i).plus(second.times(j));
                if (p.norm() <= largest + 1e-9 && (i != 0 || j != 0)) {
                    found.add(p);
                }
            }
        }
        return found;
    }

    Uvw zone() {
        return zone;
    }

    Hkl reference() {
        return reference;
    }

    /** The nodes, nearest to the centre first. */
    List<Node> nodes() {
        return nodes;
    }

    /** The least angle by which the crystal can be turned about the zone axis, or half a turn more, and look the same. */
    double shortestTurn() {
        return shortestTurn;
    }

    /** The logarithms of the lengths, in 1/Å on a flat detector, of the nodes at azimuths from 0 to π, ascending. */
    double[] logLengths() {
        return logLengths.clone();
    }

    /** The azimuths of the same nodes, in radians. */
    double[] azimuths() {
        return azimuths.clone();
    }

    /** Area of reciprocal plane per node, in 1/Å². */
    double nodeArea() {
        return nodeArea;
    }

    /** The crystal's Cartesian unit vector along this plane's x (0), y (1) or along the zone axis (2). */
    Vector3 axis(int which) {
        return axes[which];
    }

    /** The factor by which a flat detector stretches |g|: 1/√(1 − λ²g²). */
    double flatness(Node node) {
        double sine = wavelength * node.g;
        return 1 / Math.sqrt(1 - sine * sine);
    }

    /** Where a node lies on a flat detector, x in 1/Å, by its number. */
    double flatX(int number) {
        return flatX[number];
    }

    /** The same for y. */
    double flatY(int number) {
        return flatY[number];
    }

    /**
     * The node nearest to a place on a flat detector, given in 1/Å (pixels over camera constant).
     *
     * @return the node, or null when the nearest lattice point is the direct beam or no node
     */
    Node nearest(double px, double py) {
        int number = nearestNumber(px, py);
        return number < 0 ? null : nodes.get(number);
    }

    /** The same by its number among the nodes, or −1. */
    int nearestNumber(double px, double py) {
        double t = wavelength * wavelength * (px * px + py * py);
        double shrink = 1 / Math.sqrt(1 + t);
        double x = px * shrink;
        double y = py * shrink;
        double x1 = first.x();
        double y1 = first.y();
        double x2 = second.x();
        double y2 = second.y();
        double low1 = Math.floor((x * y2 - y * x2) * perArea);
        double low2 = Math.floor((x1 * y - y1 * x) * perArea);
        double dx = low1 * x1 + low2 * x2 - x;
        double dy = low1 * y1 + low2 * y2 - y;
        double d00 = dx * dx + dy * dy;
        double d10 = (dx + x1) * (dx + x1) + (dy + y1) * (dy + y1);
        double d01 = (dx + x2) * (dx + x2) + (dy + y2) * (dy + y2);
        double d11 = (dx + x1 + x2) * (dx + x1 + x2) + (dy + y1 + y2) * (dy + y1 + y2);
        double least = Math.min(Math.min(d00, d01), Math.min(d10, d11));
        double i = least == d00 || least == d01 ? low1 : low1 + 1;
        double j = least == d00 || (least == d10 && least != d01) ? low2 : low2 + 1;
        return Math.abs(i) > reach || Math.abs(j) > reach
                ? -1
                : grid[((int) i + reach) * (2 * reach + 1) + (int) j + reach];
    }

    /**
     * A reduced basis of the lattice that reflections of the zone span: the shorter vector first, the second at 60° to 120°
     * from it.
     *
     * @return two vectors in 1/Å; none when they lie on one row
     */
    List<Vector2> basisOf(List<Hkl> spanning) {
        long[] upper = {0, 0};
        long lower = 0;
        for (Hkl hkl : spanning) {
            Vector2 p = place(hkl, reciprocal, axes);
            Vector2 n = coordinates(p.x(), p.y());
            long[] row = {Math.round(n.x()), Math.round(n.y())};
            while (row[0] != 0) {
                long times = Math.floorDiv(upper[0], row[0]);
                long[] rest = {upper[0] - times * row[0], upper[1] - times * row[1]};
                upper = row;
                row = rest;
            }
            lower = gcd(lower, Math.abs(row[1]));
        }
        if (upper[0] == 0 || lower == 0) {
            return List.of();
        }
        Vector2 a = first.times(upper[0]).plus(second.times(upper[1]));
        Vector2 b = second.times(lower);
        while (true) {
            if (b.norm() < a.norm() * (1 - 1e-12)) {
                Vector2 swap = a;
                a = b;
                b = swap;
            }
            double times = Math.rint(a.dot(b) / a.dot(a) * (1 - 1e-12));
            if (times == 0) {
                return List.of(a, b);
            }
            b = b.minus(a.times(times));
        }
    }

    private static long gcd(long a, long b) {
        return b == 0 ? a : gcd(b, a % b);
    }

    /** The length of the shortest node vector in 1/Å. */
    double shortest() {
        return nodes.get(0).g;
    }

    /**
     * The shortest lattice vector of the plane, in 1/Å, whether or not it is a node: neighbouring nodes are at least as far
     * apart, in a centred lattice up to twice as far.
     */
    double spacing() {
        return Math.min(first.norm(), second.norm());
    }
}
