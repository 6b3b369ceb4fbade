package io.github.zonewright.image;

import java.util.Arrays;
import java.util.stream.IntStream;

/** A mask in little memory, for keeping: only the places where membership changes along the rows are held. */
public final class PackedMask {

    private final int width;
    private final int height;
    private final int[] changes;

    private PackedMask(int width, int height, int[] changes) {
        this.width = width;
        this.height = height;
        this.changes = changes;
    }

    /**
     * Packs a mask.
     *
     * @param mask the mask
     * @return the same members
     */
    public static PackedMask of(Mask mask) {
        int width = mask.width();
        int[] changes = IntStream.range(0, width * mask.height())
                .filter(i -> mask.contains(i % width, i / width)
                        != (i > 0 && mask.contains((i - 1) % width, (i - 1) / width)))
                .toArray();
        return new PackedMask(width, mask.height(), changes);
    }

    /**
     * Whether a pixel is a member.
     *
     * @param column from 0 at the left
     * @param row from 0 at the top
     * @return false also for pixels outside the frame
     */
    public boolean contains(int column, int row) {
        if (column < 0 || row < 0 || column >= width || row >= height) {
            return false;
        }
        int found = Arrays.binarySearch(changes, row * width + column);
        int before = found >= 0 ? found + 1 : -found - 1;
        return before % 2 == 1;
    }

    /**
     * Whether the pixel that covers a point is a member.
     *
     * @param point any point
     * @return false also outside the frame
     */
    public boolean contains(PixelPoint point) {
        return contains((int) Math.floor(point.x()), (int) Math.floor(point.y()));
    }
}
