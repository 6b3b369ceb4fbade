package io.github.zonewright.spots;

import io.github.zonewright.image.Mask;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.BitSet;
import java.util.List;
import java.util.stream.IntStream;

/**
 * Touching pixels at the detector's limit: the core of an overexposed direct beam, with the streak it blooms into.
 *
 * @param x middle in pixels from the left edge; rows weigh by the fourth power of their length, so that a streak counts
 *     little beside the core it came from
 * @param y middle from the upper edge
 * @param area number of pixels
 * @param width of the bounding box
 * @param height of the bounding box
 * @param inner number of pixels whose four neighbours belong to it too
 * @param core radius about the middle of what is no streak
 * @param members indices of its pixels
 */
record SaturatedRegion(double x, double y, int area, int width, int height, int inner, double core, int[] members) {

    /** Part of a region that is surrounded by its own; where a noisy glow reaches the limit, hardly any is. */
    private static final double SOLID = 0.25;

    /** How many radii of the core its edge may be away. */
    private static final double CORE = 1.3;

    /** Whether it is one piece and not the chance meeting of single pixels. */
    boolean isSolid() {
        return isBloomed() || inner > SOLID * area;
    }

    /** Whether it is drawn out along the columns or rows. */
    boolean isBloomed() {
        return height > 1.5 * width || width > 1.5 * height;
    }

    double radius() {
        return Math.sqrt(area / Math.PI);
    }

    /** Half the longer side of the bounding box. */
    double halfLength() {
        return Math.max(width, height) / 2.0;
    }

    /** The pixels of the streak that a bloomed core runs out into; none where nothing bloomed. */
    IntStream streak(int frameWidth) {
        return Arrays.stream(isBloomed() ? members : new int[0])
                .filter(index -> Math.hypot(index % frameWidth + 0.5 - x, index / frameWidth + 0.5 - y) > CORE * core);
    }

    /** All regions of at least so many pixels. */
    static List<SaturatedRegion> of(Mask saturated, int leastArea) {
        List<SaturatedRegion> regions = new ArrayList<>();
        int width = saturated.width();
        BitSet seen = new BitSet();
        int[] members = saturated.members().toArray();
        int[] queue = new int[members.length];
        for (int start : members) {
            if (seen.get(start)) {
                continue;
            }
            int count = 0;
            int next = 0;
            seen.set(start);
            queue[count++] = start;
            while (next < count) {
                int column = queue[next] % width;
                int row = queue[next++] / width;
                for (int k = 0; k < 9; k++) {
                    int c = column + k % 3 - 1;
                    int r = row + k / 3 - 1;
                    if (saturated.contains(c, r) && !seen.get(r * width + c)) {
                        seen.set(r * width + c);
                        queue[count++] = r * width + c;
                    }
                }
            }
            if (count >= leastArea) {
                regions.add(measure(Arrays.copyOf(queue, count), saturated));
            }
        }
        return regions;
    }

    private static SaturatedRegion measure(int[] members, Mask saturated) {
        int frameWidth = saturated.width();
        int inner = 0;
        int left = Integer.MAX_VALUE;
        int right = 0;
        int top = Integer.MAX_VALUE;
        int bottom = 0;
        for (int index : members) {
            left = Math.min(left, index % frameWidth);
            right = Math.max(right, index % frameWidth);
            top = Math.min(top, index / frameWidth);
            bottom = Math.max(bottom, index / frameWidth);
            inner += isInner(index % frameWidth, index / frameWidth, saturated) ? 1 : 0;
        }
        int[] inColumn = new int[right - left + 1];
        int[] inRow = new int[bottom - top + 1];
        for (int index : members) {
            inColumn[index % frameWidth - left]++;
            inRow[index / frameWidth - top]++;
        }
        boolean tall = inRow.length > 1.5 * inColumn.length;
        boolean wide = inColumn.length > 1.5 * inRow.length;
        int[] across = wide ? inColumn : inRow;
        return new SaturatedRegion(
                left + middle(inColumn, wide ? 4 : 1),
                top + middle(inRow, tall ? 4 : 1),
                members.length,
                inColumn.length,
                inRow.length,
                inner,
                Arrays.stream(across).max().orElse(0) / 2.0,
                members);
    }

    private static boolean isInner(int column, int row, Mask saturated) {
        return saturated.contains(column - 1, row)
                && saturated.contains(column + 1, row)
                && saturated.contains(column, row - 1)
                && saturated.contains(column, row + 1);
    }

    private static double middle(int[] lengths, int power) {
        double sum = 0;
        double weights = 0;
        for (int i = 0; i < lengths.length; i++) {
            double weight = Math.pow(lengths[i], power);
            sum += weight * (i + 0.5);
            weights += weight;
        }
        return sum / weights;
    }
}
