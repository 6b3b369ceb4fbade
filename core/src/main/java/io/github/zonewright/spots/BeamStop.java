package io.github.zonewright.spots;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.Quantile;
import java.util.Arrays;
import java.util.Comparator;

/**
 * Finds what a beam stop hides: cells much darker than the median of their ring about the centre, joined together,
 * reaching the border of the image and not just a line of single cells.
 */
final class BeamStop {

    /** A cell is in the shadow when it is less than this part of the way from the darkest level to its ring's. */
    private static final double SHADOW = 0.55;

    private static final double SURE = 4;
    /** Where the light above the dark is less than this many times what a sure cell needs, a shadow may end. */
    private static final double FAINT = 3;

    private static final int LEAST_CELLS = 12;

    private final GrayImage cells;
    private final int columns;
    private final int rows;
    private final double centreX;
    private final double centreY;

    private double[] level;
    private double[] scatter;
    private double dark;

    private BeamStop(GrayImage cells, double centreX, double centreY) {
        this.cells = cells;
        this.columns = cells.width();
        this.rows = cells.height();
        this.centreX = centreX;
        this.centreY = centreY;
    }

    /** The side of a cell in pixels, to which the shadow's edge is known. */
    static int cell(int width, int height) {
        return Math.max(4, Math.max(width, height) / 128);
    }

    /** The hidden pixels of an image whose background is round about the given point. */
    static Mask of(GrayImage image, double centreX, double centreY) {
        return of(image, image.binned(cell(image.width(), image.height())), centreX, centreY);
    }

    /** The same where the means of the image's cells are at hand. */
    static Mask of(GrayImage image, GrayImage cells, double centreX, double centreY) {
        int size = cell(image.width(), image.height());
        if (Math.min(image.width(), image.height()) < 8 * size) {
            return Mask.none(image.width(), image.height());
        }
        BeamStop stop = new BeamStop(cells, centreX / size, centreY / size);
        boolean[] hidden = stop.reachingBorder(stop.opened(stop.shadow()));
        return Mask.of(stop.columns, stop.rows, index -> hidden[index]).enlarged(size, image.width(), image.height());
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
        level = new double[rings];
        scatter = new double[rings];
        for (int k = rings - 1; k >= 0; k--) {
            if (counts[k] >= 4) {
                int middle = counts[k] / 2;
                level[k] = Quantile.select(members[k], 0, counts[k], middle);
                double up = Quantile.select(members[k], middle, counts[k], 3 * counts[k] / 4) - level[k];
                double down = level[k] - Quantile.select(members[k], 0, middle, counts[k] / 4);
                scatter[k] = Math.min(up, down) / 0.6745;
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
        dark = dark(values);
        boolean[] shadow = new boolean[values.length];
        for (int i = 0; i < values.length; i++) {
            int k = ring[i];
            shadow[i] = values[i] < dark + SHADOW * (level[k] - dark) && level[k] - values[i] > SURE * scatter[k];
        }
        return shadow;
    }

    /** The level of the darkest of the cells, but for a few. */
    private static double dark(float[] values) {
        float[] seen = new float[values.length];
        int count = 0;
        for (float value : values) {
            if (value == value) {
                seen[count++] = value;
            }
        }
        return count == 0 ? Double.NaN : Quantile.select(seen, 0, count, Math.min(count - 1, values.length / 200));
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

    /** Keeps what is large and reaches the border, or would if the light did not fade; then continues it to the border. */
    private boolean[] reachingBorder(boolean[] set) {
        boolean[] result = new boolean[set.length];
        boolean[] seen = new boolean[set.length];
        for (int start = 0; start < set.length; start++) {
            if (set[start] && !seen[start]) {
                int[] members = component(set, seen, start);
                if (members.length >= LEAST_CELLS && (touchesBorder(members) || fadesOut(members))) {
                    for (int index : members) {
                        result[index] = true;
                    }
                    if (!touchesBorder(members)) {
                        continueOutward(members, result);
                    }
                }
            }
        }
        return result;
    }

    private int[] component(boolean[] set, boolean[] seen, int start) {
        int[] queue = new int[set.length];
        int count = 0;
        queue[count++] = start;
        seen[start] = true;
        for (int next = 0; next < count; next++) {
            int column = queue[next] % columns;
            int row = queue[next] / columns;
            for (int k = 0; k < 9; k++) {
                int c = column + k % 3 - 1;
                int r = row + k / 3 - 1;
                if (c >= 0 && r >= 0 && c < columns && r < rows && set[r * columns + c] && !seen[r * columns + c]) {
                    seen[r * columns + c] = true;
                    queue[count++] = r * columns + c;
                }
            }
        }
        return Arrays.copyOf(queue, count);
    }

    private boolean touchesBorder(int[] members) {
        return Arrays.stream(members)
                .anyMatch(i ->
                        i % columns < 1 || i / columns < 1 || i % columns >= columns - 1 || i / columns >= rows - 1);
    }

    private double distance(int index) {
        return Math.hypot(index % columns + 0.5 - centreX, index / columns + 0.5 - centreY);
    }

    /** Whether the shadow points away from the centre and ends where a single cell is no longer told from the dark. */
    private boolean fadesOut(int[] members) {
        double far = Arrays.stream(members).mapToDouble(this::distance).max().orElse(0);
        double near = Arrays.stream(members).mapToDouble(this::distance).min().orElse(0);
        int beyond = Math.min(level.length - 1, (int) far + 1);
        boolean faint = level[beyond] - dark < FAINT * scatter[beyond] * SURE;
        double length = far - near;
        return faint && length * length > 2 * members.length;
    }

    /** Continues a shadow straight on, as wide as it is, from its outer quarter to the border. */
    private void continueOutward(int[] members, boolean[] result) {
        Integer[] byDistance = Arrays.stream(members)
                .boxed()
                .sorted(Comparator.comparingDouble(this::distance))
                .toArray(Integer[]::new);
        int quarter = Math.max(1, members.length / 4);
        Vector2 inner = mean(byDistance, 0, quarter);
        Vector2 outer = mean(byDistance, byDistance.length - quarter, byDistance.length);
        Vector2 way = outer.minus(inner);
        if (way.norm() < 1) {
            return;
        }
        Vector2 along = way.times(1 / way.norm());
        double length = distance(byDistance[byDistance.length - 1]) - distance(byDistance[0]) + 1;
        double halfWidth = Math.max(1, members.length / length / 2);
        for (int i = 0; i < result.length; i++) {
            Vector2 place = new Vector2(i % columns + 0.5, i / columns + 0.5).minus(outer);
            if (place.dot(along) > 0 && Math.abs(place.cross(along)) <= halfWidth) {
                result[i] = true;
            }
        }
    }

    private Vector2 mean(Integer[] cellsInOrder, int from, int to) {
        Vector2 sum = Vector2.ZERO;
        for (int i = from; i < to; i++) {
            sum = sum.plus(new Vector2(cellsInOrder[i] % columns + 0.5, cellsInOrder[i] / columns + 0.5));
        }
        return sum.times(1.0 / (to - from));
    }
}
