package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Reflection;
import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import java.util.ArrayList;
import java.util.List;

/**
 * Where a crystal in some orientation puts spots that could be left over, and how much better that tells where they lie than
 * chance does.
 *
 * <p>A share of the left spots belongs to the crystal; each of them lies about one of its reflections, the likelier the
 * stronger; the others lie anywhere. The score is the log-likelihood ratio of this mixture against nothing but chance. A
 * strong reflection without its spot lowers it, since the likelihood is spent there, and a dense net earns nothing.
 */
final class GrainModel {

    /** A reflection that could be seen: its place in 1/Å, its share of the crystal's spots, its kinematic ln intensity. */
    record Node(Hkl hkl, Vector2 place, double share, double lnIntensity) {}

    /** Scatter of ln intensity about the kinematic one, and where a stray intensity counts no more. */
    private static final double LN_SCATTER = 1.2;

    private static final double LARGEST_MISFIT = 3;

    private static final double LARGEST_EXCITATION = 0.08;
    private static final double[] SHARES = {0.15, 0.3, 0.45, 0.6, 0.75, 0.9};

    private final ReflectionStrengths strengths;
    private final LeftSpots left;
    private final double largestG;

    GrainModel(ReflectionStrengths strengths, LeftSpots left) {
        this.strengths = strengths;
        this.left = left;
        this.largestG = left.largestG();
    }

    LeftSpots left() {
        return left;
    }

    ReflectionStrengths strengths() {
        return strengths;
    }

    /** The reflections near the Ewald sphere within some width; weak and distant ones count little. */
    List<Node> nodes(Rotation orientation, double width) {
        Matrix3 r = orientation.matrix();
        double k = 1 / left.wavelength();
        List<Node> nodes = new ArrayList<>();
        double sum = 0;
        for (Reflection reflection : strengths.reflections()) {
            Vector3 g = r.times(reflection.g());
            double across = g.x() * g.x() + g.y() * g.y();
            if (across > largestG * largestG) {
                continue;
            }
            double s = g.z() - (k - Math.sqrt(k * k - across));
            Vector2 place = new Vector2(g.x(), g.y());
            if (Math.abs(s) > LARGEST_EXCITATION || !left.couldBeLeft(place)) {
                continue;
            }
            double strength = strengths.strength(reflection.hkl());
            double envelope = 1 / (1 + s * s / (width * width));
            double share = Math.sqrt(strength) * envelope;
            sum += share;
            nodes.add(new Node(reflection.hkl(), place, share, Math.log(strength * envelope)));
        }
        double total = sum;
        return nodes.stream()
                .map(n -> new Node(n.hkl, n.place, n.share / total, n.lnIntensity))
                .toList();
    }

    /** The score of the nodes in nats, the best over the shares of spots that may be theirs. */
    double score(List<Node> nodes) {
        double[] ratios = new double[left.size()];
        for (int i = 0; i < ratios.length; i++) {
            double e = left.error(i);
            double density = 0;
            for (Node n : nodes) {
                double dx = n.place.x() - left.place(i).x();
                double dy = n.place.y() - left.place(i).y();
                double d2 = (dx * dx + dy * dy) / (e * e);
                if (d2 < 16) {
                    density += n.share * Math.exp(-0.5 * d2) / (2 * Math.PI * e * e);
                }
            }
            ratios[i] = density * left.area();
        }
        double best = Double.NEGATIVE_INFINITY;
        for (double share : SHARES) {
            double sum = 0;
            for (double ratio : ratios) {
                sum += Math.log(1 - share + share * ratio);
            }
            best = Math.max(best, sum);
        }
        return best;
    }

    /** How well the intensities of the spots near nodes follow the kinematic ones, in nats; the scale is free. */
    double intensityFit(List<Node> nodes) {
        List<Double> ratios = new ArrayList<>();
        for (int i = 0; i < left.size(); i++) {
            Node node = nearest(nodes, i);
            if (node != null) {
                ratios.add(Math.log(Math.max(left.spot(i).intensity(), 1e-12)) - node.lnIntensity);
            }
        }
        ratios.sort(null);
        double middle = ratios.isEmpty() ? 0 : ratios.get(ratios.size() / 2);
        double sum = -0.5 * LARGEST_MISFIT * LARGEST_MISFIT * (left.size() - ratios.size());
        for (double ratio : ratios) {
            double misfit = Math.min(LARGEST_MISFIT, Math.abs(ratio - middle) / LN_SCATTER);
            sum -= 0.5 * misfit * misfit;
        }
        return sum;
    }

    /** The reflection nearest to a left spot within four standard deviations; null where there is none. */
    Node nearest(List<Node> nodes, int spot) {
        Node best = null;
        double least = 4 * left.error(spot);
        for (Node n : nodes) {
            double d = n.place.minus(left.place(spot)).norm();
            if (d < least) {
                least = d;
                best = n;
            }
        }
        return best;
    }
}
