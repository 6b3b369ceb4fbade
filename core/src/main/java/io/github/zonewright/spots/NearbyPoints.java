package io.github.zonewright.spots;

import java.util.ArrayList;
import java.util.List;

/** Points of a frame, filed by place so that those within one fixed reach are found at once. */
final class NearbyPoints {

    private final double reach;
    private final int columns;
    private final int rows;
    private final List<List<double[]>> cells;

    NearbyPoints(int width, int height, double reach) {
        this.reach = reach;
        this.columns = (int) (width / reach) + 1;
        this.rows = (int) (height / reach) + 1;
        this.cells = new ArrayList<>(columns * rows);
        for (int i = 0; i < columns * rows; i++) {
            cells.add(List.of());
        }
    }

    void add(double x, double y) {
        int index = cell(y, rows) * columns + cell(x, columns);
        if (cells.get(index).isEmpty()) {
            cells.set(index, new ArrayList<>());
        }
        cells.get(index).add(new double[] {x, y});
    }

    boolean anyWithin(double x, double y) {
        int column = cell(x, columns);
        int row = cell(y, rows);
        for (int r = Math.max(0, row - 1); r <= Math.min(rows - 1, row + 1); r++) {
            for (int c = Math.max(0, column - 1); c <= Math.min(columns - 1, column + 1); c++) {
                for (double[] point : cells.get(r * columns + c)) {
                    if (Math.hypot(point[0] - x, point[1] - y) < reach) {
                        return true;
                    }
                }
            }
        }
        return false;
    }

    private int cell(double coordinate, int count) {
        return Math.max(0, Math.min(count - 1, (int) (coordinate / reach)));
    }
}
