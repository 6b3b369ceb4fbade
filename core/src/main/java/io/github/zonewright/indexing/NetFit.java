package io.github.zonewright.indexing;

import java.util.Arrays;
import org.ejml.data.DMatrixRMaj;
import org.ejml.dense.row.CommonOps_DDRM;

/**
 * Fits the place of a zone's net to the spots: maximum a posteriori least squares for centre, camera constant, rotation and
 * ellipse, matching spots to nodes in rounds that grow outward from the centre. The ellipse is always fitted, under a
 * prior, since a net pinned to a circle loses the outer spots of a distorted image.
 */
final class NetFit {

    /** What is known beforehand: values with their standard deviations; the rotation modulo half a turn. */
    record Prior(
            double centreX,
            double centreY,
            double centreError,
            double logConstant,
            double logConstantError,
            double e1,
            double e2,
            double ellipseError,
            double rotation,
            double rotationError) {

        /** Of the rotation nothing is known. */
        static Prior ofCamera(
                double centreX,
                double centreY,
                double centreError,
                double logConstant,
                double logConstantError,
                double e1,
                double e2,
                double ellipseError) {
            return new Prior(
                    centreX,
                    centreY,
                    centreError,
                    logConstant,
                    logConstantError,
                    e1,
                    e2,
                    ellipseError,
                    0,
                    Double.POSITIVE_INFINITY);
        }

        Prior withRotation(double value, double error) {
            return new Prior(
                    centreX, centreY, centreError, logConstant, logConstantError, e1, e2, ellipseError, value, error);
        }

        Prior withCentre(double x, double y, double error) {
            return new Prior(x, y, error, logConstant, logConstantError, e1, e2, ellipseError, rotation, rotationError);
        }

        /** How far the rotation of a pose is off, in radians. */
        double offRotation(double actual) {
            return Math.IEEEremainder(rotation - actual, Math.PI);
        }
    }

    /** A fit: the pose, the node of each spot (null where none) and the distances in px. */
    record Fit(NetPose pose, ZoneNet.Node[] nodes, double[] distances, int matched) {}

    private static final double[] ROUND_SHARE = {0.5, 0.75, 1, 1, 1};
    private static final double[] ROUND_TOLERANCE = {0.022, 0.016, 0.012, 0.007, 0.004};
    private static final double[] TIE_CONSTANT = {0.006, 0.01, 0.02};
    private static final double[] TIE_ROTATION = {0.01, 0.015, 0.03};
    private static final double LARGEST_SHARE_OF_SPACING = 0.33;
    private static final int PARAMETERS = 6;

    private final SpotCloud cloud;
    private final Prior prior;
    private final double spotWidth;

    NetFit(SpotCloud cloud, Prior prior, double spotWidth) {
        this.cloud = cloud;
        this.prior = prior;
        this.spotWidth = spotWidth;
    }

    Prior prior() {
        return prior;
    }

    /** Fits from a rough place; the last rounds match all spots tightly. */
    Fit fit(ZoneNet net, NetPose start) {
        NetPose pose = start;
        double[] radii = new double[cloud.size()];
        for (int i = 0; i < radii.length; i++) {
            radii[i] = radius(start, i);
        }
        double[] sorted = radii.clone();
        Arrays.sort(sorted);
        for (int round = 0; round < ROUND_SHARE.length; round++) {
            int reach = (int) Math.ceil(ROUND_SHARE[round] * sorted.length) - 1;
            double outer = sorted[Math.max(0, Math.max(Math.min(3, sorted.length - 1), reach))];
            Fit matched = match(net, pose, ROUND_TOLERANCE[round], outer, round == 0);
            if (matched.matched >= 2) {
                pose = solve(net, pose, start, matched, round);
            }
        }
        return match(net, pose, ROUND_TOLERANCE[ROUND_TOLERANCE.length - 1], Double.POSITIVE_INFINITY, false);
    }

    /** Matches each spot to its nearest node, one spot to a node, within a tolerance that grows with the radius. */
    Fit match(ZoneNet net, NetPose pose, double relative, double outer, boolean centreOpen) {
        int n = cloud.size();
        ZoneNet.Node[] nodes = new ZoneNet.Node[n];
        double[] distances = new double[n];
        double cap = LARGEST_SHARE_OF_SPACING * net.spacing() * pose.constant();
        Arrays.fill(distances, Double.POSITIVE_INFINITY);
        int[] owner = new int[net.nodes().size()];
        Arrays.fill(owner, -1);
        NetMap map = NetMap.of(pose);
        int matched = 0;
        for (int i = 0; i < n; i++) {
            double r = radius(pose, i);
            if (r > outer) {
                continue;
            }
            int number = net.nearestNumber(map.netX(cloud.x(i), cloud.y(i)), map.netY(cloud.x(i), cloud.y(i)));
            if (number < 0) {
                continue;
            }
            double d = distance(net, number, map, i);
            double floor = Math.max(1.0, 0.4 * spotWidth) + (centreOpen ? Math.min(prior.centreError, 6) : 0);
            double tolerance = Math.min(cap, Math.max(floor, relative * r) + 3 * cloud.error(i));
            int before = owner[number];
            if (d <= tolerance && (before < 0 || d < distances[before])) {
                if (before >= 0) {
                    nodes[before] = null;
                    distances[before] = Double.POSITIVE_INFINITY;
                } else {
                    matched++;
                }
                owner[number] = i;
                nodes[i] = net.nodes().get(number);
                distances[i] = d;
            }
        }
        return new Fit(pose, nodes, distances, matched);
    }

    private double radius(NetPose pose, int spot) {
        double dx = cloud.x(spot) - pose.centreX();
        double dy = cloud.y(spot) - pose.centreY();
        return Math.sqrt(dx * dx + dy * dy);
    }

    private double distance(ZoneNet net, int number, NetMap map, int spot) {
        double dx = map.x(net.flatX(number), net.flatY(number)) - cloud.x(spot);
        double dy = map.y(net.flatX(number), net.flatY(number)) - cloud.y(spot);
        return Math.sqrt(dx * dx + dy * dy);
    }

    private NetPose solve(ZoneNet net, NetPose pose, NetPose start, Fit matched, int round) {
        DMatrixRMaj normal = new DMatrixRMaj(PARAMETERS, PARAMETERS);
        DMatrixRMaj right = new DMatrixRMaj(PARAMETERS, 1);
        NetMap map = NetMap.of(pose);
        for (int i = 0; i < cloud.size(); i++) {
            ZoneNet.Node node = matched.nodes[i];
            if (node == null) {
                continue;
            }
            double f = net.flatness(node);
            double px = map.x(node.x() * f, node.y() * f);
            double py = map.y(node.x() * f, node.y() * f);
            double ox = px - pose.centreX();
            double oy = py - pose.centreY();
            double sd = spotError(i, Math.sqrt(ox * ox + oy * oy), round);
            double weight = 1 / (sd * sd);
            if (round >= 3) {
                double d = matched.distances[i] / sd;
                weight /= 1 + d * d / 6;
            }
            add(normal, right, new double[] {1, 0, ox, -oy, ox, oy}, cloud.x(i) - px, weight);
            add(normal, right, new double[] {0, 1, oy, ox, -oy, ox}, cloud.y(i) - py, weight);
        }
        addPriors(normal, right, pose, start, round);
        DMatrixRMaj delta = new DMatrixRMaj(PARAMETERS, 1);
        if (!CommonOps_DDRM.solve(normal, right, delta)) {
            return pose;
        }
        return new NetPose(
                pose.centreX() + delta.get(0),
                pose.centreY() + delta.get(1),
                pose.constant() * Math.exp(Math.max(-0.1, Math.min(0.1, delta.get(2)))),
                pose.rotation() + delta.get(3),
                clip(pose.e1() + delta.get(4), prior.e1),
                clip(pose.e2() + delta.get(5), prior.e2));
    }

    private static double clip(double e, double expected) {
        return Math.max(expected - 0.05, Math.min(expected + 0.05, e));
    }

    /** How far a spot may lie from its place by measurement and by what the model leaves out, in px. */
    private double spotError(int i, double r, int round) {
        double model = round < 3 ? Math.max(0.35, 0.2 * spotWidth) : 0.05;
        double lens = (round < 3 ? 0.004 : 0.0004) * r;
        return Math.sqrt(cloud.error(i) * cloud.error(i) + model * model + lens * lens);
    }

    private static void add(DMatrixRMaj normal, DMatrixRMaj right, double[] row, double residual, double weight) {
        for (int a = 0; a < PARAMETERS; a++) {
            right.data[a] += weight * row[a] * residual;
            for (int b = 0; b < PARAMETERS; b++) {
                normal.data[a * PARAMETERS + b] += weight * row[a] * row[b];
            }
        }
    }

    private void addPriors(DMatrixRMaj normal, DMatrixRMaj right, NetPose pose, NetPose start, int round) {
        tie(normal, right, 0, prior.centreX - pose.centreX(), prior.centreError);
        tie(normal, right, 1, prior.centreY - pose.centreY(), prior.centreError);
        tie(normal, right, 2, prior.logConstant - Math.log(pose.constant()), prior.logConstantError);
        tie(normal, right, 3, prior.offRotation(pose.rotation()), prior.rotationError);
        tie(normal, right, 4, prior.e1 - pose.e1(), prior.ellipseError);
        tie(normal, right, 5, prior.e2 - pose.e2(), prior.ellipseError);
        if (round < TIE_CONSTANT.length) {
            tie(normal, right, 2, Math.log(start.constant() / pose.constant()), TIE_CONSTANT[round]);
            tie(normal, right, 3, start.rotation() - pose.rotation(), TIE_ROTATION[round]);
        }
    }

    private static void tie(DMatrixRMaj normal, DMatrixRMaj right, int parameter, double off, double error) {
        normal.add(parameter, parameter, 1 / (error * error));
        right.add(parameter, 0, off / (error * error));
    }
}
