package io.github.zonewright.image;

import java.util.Arrays;
import java.util.BitSet;

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
        int[] changes = mask.changes();
        return new PackedMask(mask.width(), mask.height(), changes);
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

    /**
     * Unpacks the mask.
     *
     * @return the same members
     */
    public Mask unpacked() {
        BitSet members = new BitSet();
        for (int i = 0; i < changes.length; i += 2) {
            members.set(changes[i], i + 1 < changes.length ? changes[i + 1] : width * height);
        }
        return new Mask(width, height, members);
    }
}
