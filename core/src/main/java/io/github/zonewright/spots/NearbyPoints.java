package io.github.zonewright.spots;

import java.util.Arrays;

/** Points of a frame, filed by place so that those within one fixed reach are found at once. */
final class NearbyPoints {

    private static final int NONE = -1;

    private final double reach;
    private final int columns;
    private final int rows;
    /** The last point filed in each cell, and the one filed there before each point. */
    private final int[] last;

    private int[] before = new int[16];
    private double[] xs = new double[16];
    private double[] ys = new double[16];
    private int count;

    NearbyPoints(int width, int height, double reach) {
        this.reach = reach;
        this.columns = (int) (width / reach) + 1;
        this.rows = (int) (height / reach) + 1;
        this.last = new int[columns * rows];
        Arrays.fill(last, NONE);
    }

    void add(double x, double y) {
        if (count == xs.length) {
            before = Arrays.copyOf(before, 2 * count);
            xs = Arrays.copyOf(xs, 2 * count);
            ys = Arrays.copyOf(ys, 2 * count);
        }
        int cell = cell(y, rows) * columns + cell(x, columns);
        xs[count] = x;
        ys[count] = y;
        before[count] = last[cell];
        last[cell] = count++;
    }

    boolean anyWithin(double x, double y) {
        return nearest(x, y) != NONE;
    }

    /** Which point, counted as they were added, is the nearest within the reach; negative when none is. */
    int nearest(double x, double y) {
        int column = cell(x, columns);
        int row = cell(y, rows);
        int nearest = NONE;
        double least = reach * reach;
        for (int r = Math.max(0, row - 1); r <= Math.min(rows - 1, row + 1); r++) {
            for (int c = Math.max(0, column - 1); c <= Math.min(columns - 1, column + 1); c++) {
                for (int i = last[r * columns + c]; i != NONE; i = before[i]) {
                    double square = (xs[i] - x) * (xs[i] - x) + (ys[i] - y) * (ys[i] - y);
                    if (square < least) {
                        least = square;
                        nearest = i;
                    }
                }
            }
        }
        return nearest;
    }

    private int cell(double coordinate, int cells) {
        return Math.max(0, Math.min(cells - 1, (int) (coordinate / reach)));
    }
}
