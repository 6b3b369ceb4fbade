package io.github.zonewright.indexing;

import java.util.BitSet;

/** Looks up the spot nearest to a place among some spots, each within so many of its own deviations, in px. */
final class NearestSpot {

    private final SpotCloud cloud;
    private final int[] spots;
    private final double[] reach2;
    private final double cell;
    private final double left;
    private final double low;
    private final int columns;
    private final int rows;
    private final BitSet near = new BitSet();

    NearestSpot(SpotCloud cloud, int[] spots, double[] deviation, double deviations) {
        this.cloud = cloud;
        this.spots = spots;
        reach2 = new double[spots.length];
        double widest = 1;
        double minX = 0;
        double minY = 0;
        double maxX = 0;
        double maxY = 0;
        for (int n = 0; n < spots.length; n++) {
            double reach = deviations * deviation[n];
            reach2[n] = reach * reach;
            widest = Math.max(widest, reach);
            minX = Math.min(minX, cloud.x(spots[n]));
            minY = Math.min(minY, cloud.y(spots[n]));
            maxX = Math.max(maxX, cloud.x(spots[n]));
            maxY = Math.max(maxY, cloud.y(spots[n]));
        }
        cell = widest;
        left = minX - 2 * cell;
        low = minY - 2 * cell;
        columns = (int) ((maxX - left) / cell) + 3;
        rows = (int) ((maxY - low) / cell) + 3;
        for (int spot : spots) {
            int column = (int) ((cloud.x(spot) - left) / cell);
            int row = (int) ((cloud.y(spot) - low) / cell);
            for (int r = row - 1; r <= row + 1; r++) {
                near.set(r * columns + column - 1, r * columns + column + 2);
            }
        }
    }

    /** The number of the nearest spot among those given, or −1 when none is near enough. */
    int of(double x, double y) {
        double u = (x - left) / cell;
        double v = (y - low) / cell;
        if (!(u >= 0 && v >= 0 && u < columns && v < rows) || !near.get((int) v * columns + (int) u)) {
            return -1;
        }
        int best = -1;
        double least = Double.POSITIVE_INFINITY;
        for (int n = 0; n < spots.length; n++) {
            double dx = cloud.x(spots[n]) - x;
            double dy = cloud.y(spots[n]) - y;
            double d2 = dx * dx + dy * dy;
            if (d2 < least && d2 < reach2[n]) {
                least = d2;
                best = n;
            }
        }
        return best;
    }
}
