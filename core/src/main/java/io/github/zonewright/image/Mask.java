package io.github.zonewright.image;

import java.util.BitSet;
import java.util.function.IntPredicate;

/** An immutable set of pixels of a frame, such as those behind the beam stop. */
public final class Mask {

    private final int width;
    private final int height;
    private final BitSet members;

    private Mask(int width, int height, BitSet members) {
        this.width = width;
        this.height = height;
        this.members = members;
    }

    /**
     * The empty set.
     *
     * @param width columns of the frame, at least 1
     * @param height rows of the frame, at least 1
     * @return a mask without members
     * @throws IllegalArgumentException if a side is not positive
     */
    public static Mask none(int width, int height) {
        return of(width, height, index -> false);
    }

    /**
     * The pixels that meet a condition.
     *
     * @param width columns of the frame, at least 1
     * @param height rows of the frame, at least 1
     * @param condition tells for index = row · width + column whether that pixel is a member
     * @return the mask
     * @throws IllegalArgumentException if a side is not positive
     */
    public static Mask of(int width, int height, IntPredicate condition) {
        if (width < 1 || height < 1) {
            throw new IllegalArgumentException(
                    "mask size " + width + " × " + height + ": expected sides of at least 1");
        }
        BitSet members = new BitSet(width * height);
        for (int index = 0; index < width * height; index++) {
            if (condition.test(index)) {
                members.set(index);
            }
        }
        return new Mask(width, height, members);
    }

    /**
     * The columns of the frame.
     *
     * @return the width in pixels
     */
    public int width() {
        return width;
    }

    /**
     * The rows of the frame.
     *
     * @return the height in pixels
     */
    public int height() {
        return height;
    }

    /**
     * Whether a pixel is a member.
     *
     * @param column from 0 at the left
     * @param row from 0 at the top
     * @return false also for pixels outside the frame
     */
    public boolean contains(int column, int row) {
        return column >= 0 && row >= 0 && column < width && row < height && members.get(row * width + column);
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
     * The number of members.
     *
     * @return how many pixels the mask holds
     */
    public int count() {
        return members.cardinality();
    }

    /**
     * The mask and another of the same frame together.
     *
     * @param other the other mask
     * @return the union
     * @throws IllegalArgumentException if the frames differ
     */
    public Mask union(Mask other) {
        if (other.width != width || other.height != height) {
            throw new IllegalArgumentException(
                    "mask size " + other.width + " × " + other.height + ": expected " + width + " × " + height);
        }
        BitSet both = (BitSet) members.clone();
        both.or(other.members);
        return new Mask(width, height, both);
    }

    /**
     * The mask with every pixel within a square neighbourhood of a member added.
     *
     * @param reach half the side of the neighbourhood in pixels, not negative
     * @return the larger mask
     * @throws IllegalArgumentException if the reach is negative
     */
    public Mask dilated(int reach) {
        if (reach < 0) {
            throw new IllegalArgumentException("reach " + reach + ": expected 0 or more pixels");
        }
        BitSet wide = new BitSet(width * height);
        for (int i = members.nextSetBit(0); i >= 0; i = members.nextSetBit(i + 1)) {
            int row = i / width;
            int column = i % width;
            wide.set(row * width + Math.max(0, column - reach), row * width + Math.min(width, column + reach + 1));
        }
        BitSet result = new BitSet(width * height);
        for (int row = 0; row < height; row++) {
            BitSet line = wide.get(row * width, (row + 1) * width);
            if (!line.isEmpty()) {
                for (int other = Math.max(0, row - reach); other <= Math.min(height - 1, row + reach); other++) {
                    int start = other * width;
                    line.stream().forEach(column -> result.set(start + column));
                }
            }
        }
        return new Mask(width, height, result);
    }

    /**
     * The pixels that are not members.
     *
     * @return the complement in the frame
     */
    public Mask inverted() {
        BitSet others = (BitSet) members.clone();
        others.flip(0, width * height);
        return new Mask(width, height, others);
    }
}
