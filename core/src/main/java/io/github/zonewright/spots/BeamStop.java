package io.github.zonewright.spots;

import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.Mask;
import java.util.Arrays;

/**
 * Finds what a beam stop hides: cells much darker than the median of their ring about the centre, joined together,
 * reaching the border of the image and not just a line of single cells.
 */
final class BeamStop {

    /** A cell is in the shadow when it is less than this part of the way from the darkest level to its ring's. */
    private static final double SHADOW = 0.55;

    private static final double SURE = 4;
    private static final int LEAST_CELLS = 12;

    private final GrayImage cells;
    private final int columns;
    private final int rows;
    private final double centreX;
    private final double centreY;

    private BeamStop(GrayImage cells, double centreX, double centreY) {
        this.cells = cells;
        this.columns = cells.width();
        this.rows = cells.height();
        this.centreX = centreX;
        this.centreY = centreY;
    }

    /** The hidden pixels of an image whose background is round about the given point. */
    static Mask of(GrayImage image, double centreX, double centreY) {
        int size = Math.max(4, Math.max(image.width(), image.height()) / 128);
        if (Math.min(image.width(), image.height()) < 8 * size) {
            return Mask.none(image.width(), image.height());
        }
        BeamStop stop = new BeamStop(image.binned(size), centreX / size, centreY / size);
        boolean[] hidden = stop.reachingBorder(stop.opened(stop.shadow()));
        int width = image.width();
        int columns = stop.columns;
        int rows = stop.rows;
        return Mask.of(width, image.height(), index -> {
            int column = Math.min(columns - 1, index % width / size);
            int row = Math.min(rows - 1, index / width / size);
            return hidden[row * columns + column];
        });
    }

    private boolean[] shadow() {
        float[] values = cells.values();
        int[] ring = new int[values.length];
        int rings = 0;
        for (int i = 0; i < values.length; i++) {
            ring[i] = (int) Math.hypot(i % columns + 0.5 - centreX, i / columns + 0.5 - centreY);
            rings = Math.max(rings, ring[i] + 1);
        }
        float[][] members = new float[rings][16];
        int[] counts = new int[rings];
        for (int i = 0; i < values.length; i++) {
            if (values[i] == values[i]) {
                int k = ring[i];
                if (counts[k] == members[k].length) {
                    members[k] = Arrays.copyOf(members[k], 2 * counts[k]);
                }
                members[k][counts[k]++] = values[i];
            }
        }
        double[] level = new double[rings];
        double[] scatter = new double[rings];
        for (int k = rings - 1; k >= 0; k--) {
            Arrays.sort(members[k], 0, counts[k]);
            if (counts[k] >= 4) {
                level[k] = members[k][counts[k] / 2];
                scatter[k] = (members[k][3 * counts[k] / 4] - level[k]) / 0.6745;
            } else if (k + 1 < rings) {
                level[k] = level[k + 1];
                scatter[k] = scatter[k + 1];
            }
            boolean near = k < Math.max(columns, rings) / 10;
            if (near && k + 1 < rings && level[k + 1] > level[k]) {
                level[k] = level[k + 1];
                scatter[k] = scatter[k + 1];
            }
        }
        float[] sorted = values.clone();
        Arrays.sort(sorted);
        double dark = sorted[sorted.length / 200];
        boolean[] shadow = new boolean[values.length];
        for (int i = 0; i < values.length; i++) {
            int k = ring[i];
            shadow[i] = values[i] < dark + SHADOW * (level[k] - dark) && level[k] - values[i] > SURE * scatter[k];
        }
        return shadow;
    }

    /** Removes what is narrower than two cells. */
    private boolean[] opened(boolean[] set) {
        boolean[] result = new boolean[set.length];
        for (int row = 0; row + 1 < rows; row++) {
            for (int column = 0; column + 1 < columns; column++) {
                int i = row * columns + column;
                if (set[i] && set[i + 1] && set[i + columns] && set[i + columns + 1]) {
                    result[i] = true;
                    result[i + 1] = true;
                    result[i + columns] = true;
                    result[i + columns + 1] = true;
                }
            }
        }
        return result;
    }

    private boolean[] reachingBorder(boolean[] set) {
        boolean[] result = new boolean[set.length];
        boolean[] seen = new boolean[set.length];
        int[] queue = new int[set.length];
        for (int start = 0; start < set.length; start++) {
            if (!set[start] || seen[start]) {
                continue;
            }
            int count = 0;
            boolean border = false;
            queue[count++] = start;
            seen[start] = true;
            for (int next = 0; next < count; next++) {
                int column = queue[next] % columns;
                int row = queue[next] / columns;
                border |= column == 0 || row == 0 || column == columns - 1 || row == rows - 1;
                for (int k = 0; k < 9; k++) {
                    int c = column + k % 3 - 1;
                    int r = row + k / 3 - 1;
                    if (c >= 0 && r >= 0 && c < columns && r < rows) {
                        int i = r * columns + c;
                        if (set[i] && !seen[i]) {
                            seen[i] = true;
                            queue[count++] = i;
                        }
                    }
                }
            }
            if (border && count >= LEAST_CELLS) {
                for (int i = 0; i < count; i++) {
                    result[queue[i]] = true;
                }
            }
        }
        return result;
    }
}
