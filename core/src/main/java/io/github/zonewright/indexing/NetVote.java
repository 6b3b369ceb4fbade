package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Vector2;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;

/**
 * Where a zone's net could lie: a Hough vote of every spot for every node over the logarithm of the camera constant and the
 * rotation modulo half a turn. A spot's vote weighs what a hit in that net is worth: next to nothing in a dense one.
 *
 * <p>Method: generalised Hough transform (Ballard, Pattern Recognition 13 (1981) 111).
 */
final class NetVote {

    /** A place where votes meet. */
    record Peak(ZoneNet net, NetPose pose, int centre, double votes) {}

    private static final double CONSTANT_STEP = 0.01;
    private static final int ROTATION_CELLS = 200;
    private static final int PEAKS_PER_NET = 4;

    private final SpotCloud cloud;
    private final KnownCamera camera;
    private final double told;
    private final double tolerance;
    private final double spotWidth;
    private final Optional<RotationLock> lock;

    NetVote(SpotCloud cloud, KnownCamera camera, double spotWidth, Optional<RotationLock> lock) {
        this.cloud = cloud;
        this.camera = camera;
        this.told = camera.constant();
        this.tolerance = camera.tolerance();
        this.spotWidth = spotWidth;
        this.lock = lock;
    }

    /** The best places of a net about a centre (microscope frame, px), most votes first. */
    List<Peak> peaks(ZoneNet net, Vector2 centre, int centreNumber) {
        double[] logLengths = net.logLengths();
        double[] azimuths = net.azimuths();
        int half = (int) Math.ceil(Math.log1p(tolerance) / CONSTANT_STEP);
        int rows = 2 * half + 1;
        double[][] votes = new double[rows][ROTATION_CELLS];
        double slack = Math.log1p(tolerance) + 0.006;
        NetPose upright = camera.pose(centre, 0);
        for (int i = 0; i < cloud.size(); i++) {
            Vector2 q = upright.toNet(cloud.x(i), cloud.y(i));
            double dx = told * q.x();
            double dy = told * q.y();
            double r = Math.sqrt(dx * dx + dy * dy);
            double width = Math.max(Math.max(1.2, 0.5 * spotWidth), 0.012 * r);
            double weight = -Math.log(Math.PI * width * width / (told * told * net.nodeArea()));
            if (r < 3 * width || weight <= 0) {
                continue;
            }
            double azimuth = Math.atan2(dy, dx);
            double length = Math.log(r / told);
            int first = Arrays.binarySearch(logLengths, length - slack);
            for (int k = first < 0 ? -first - 1 : first; k < logLengths.length; k++) {
                double offset = length - logLengths[k];
                if (offset < -slack) {
                    break;
                }
                int row = Math.min(rows - 1, Math.max(0, (int) Math.rint(offset / CONSTANT_STEP) + half));
                double turn = (azimuth - azimuths[k]) / Math.PI;
                int column = (int) ((turn - Math.floor(turn)) * ROTATION_CELLS) % ROTATION_CELLS;
                votes[row][column] += weight;
            }
        }
        return best(votes, half, net, centre, centreNumber);
    }

    private List<Peak> best(double[][] votes, int half, ZoneNet net, Vector2 centre, int centreNumber) {
        int rows = votes.length;
        double[][] sums = new double[rows][ROTATION_CELLS];
        for (int r = 0; r < rows; r++) {
            for (int c = 0; c < ROTATION_CELLS; c++) {
                double own = votes[r][c];
                if (own > 0) {
                    for (int dr = Math.max(0, r - 1); dr <= Math.min(rows - 1, r + 1); dr++) {
                        sums[dr][c] += own;
                        sums[dr][c == 0 ? ROTATION_CELLS - 1 : c - 1] += own;
                        sums[dr][c == ROTATION_CELLS - 1 ? 0 : c + 1] += own;
                    }
                }
            }
        }
        List<Meeting> found = new ArrayList<>();
        for (int r = 0; r < rows; r++) {
            for (int c = 0; c < ROTATION_CELLS; c++) {
                if (sums[r][c] > 0 && isPeak(sums, r, c) && isAllowed(rotation(c))) {
                    found.add(new Meeting(r, c, sums[r][c]));
                }
            }
        }
        found.sort(Comparator.comparingDouble(Meeting::votes).reversed());
        double period = ROTATION_CELLS * net.shortestTurn() / Math.PI;
        List<Meeting> kept = new ArrayList<>();
        for (int i = 0; i < found.size() && kept.size() < PEAKS_PER_NET; i++) {
            Meeting next = found.get(i);
            if (kept.stream().noneMatch(k -> k.isLike(next, period))) {
                kept.add(next);
            }
        }
        return kept.stream()
                .map(m -> {
                    NetPose pose = camera.pose(centre, rotation(m.column));
                    double constant = pose.constant() * Math.exp((m.row - half) * CONSTANT_STEP);
                    return new Peak(net, pose.with(constant, pose.rotation()), centreNumber, m.votes);
                })
                .toList();
    }

    /** A cell where votes meet. */
    private record Meeting(int row, int column, double votes) {

        /** Whether the crystal looks the same there, turned by a multiple of so many cells. */
        boolean isLike(Meeting other, double period) {
            return Math.abs(row - other.row) <= 1 && Math.abs(Math.IEEEremainder(column - other.column, period)) <= 1;
        }
    }

    private static double rotation(int column) {
        return (column + 0.5) * Math.PI / ROTATION_CELLS;
    }

    private boolean isAllowed(double rotation) {
        return lock.isEmpty() || lock.get().allowsModuloHalfTurn(rotation, Math.PI / ROTATION_CELLS);
    }

    private static boolean isPeak(double[][] sums, int r, int c) {
        double own = sums[r][c];
        for (int dr = -1; dr <= 1; dr++) {
            for (int dc = -1; dc <= 1; dc++) {
                int row = r + dr;
                int column = (c + dc + ROTATION_CELLS) % ROTATION_CELLS;
                boolean earlier = dr < 0 || (dr == 0 && dc < 0);
                if (row >= 0
                        && row < sums.length
                        && (dr != 0 || dc != 0)
                        && (sums[row][column] > own || (earlier && sums[row][column] == own))) {
                    return false;
                }
            }
        }
        return true;
    }
}
