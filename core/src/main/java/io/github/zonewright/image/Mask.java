package io.github.zonewright.image;

import java.util.BitSet;
import java.util.function.IntPredicate;
import java.util.stream.IntStream;

/** An immutable set of pixels of a frame, such as those behind the beam stop. */
public final class Mask {

    private final int width;
    private final int height;
    private final BitSet members;

    /** Takes a set that the caller gives away. */
    Mask(int width, int height, BitSet members) {
        if (width < 1 || height < 1) {
            throw new IllegalArgumentException(
                    "mask size " + width + " × " + height + ": expected sides of at least 1");
        }
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
        return new Mask(width, height, new BitSet());
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
        BitSet members = new BitSet();
        for (int index = 0; index < width * height; index++) {
            if (condition.test(index)) {
                members.set(index);
            }
        }
        return new Mask(width, height, members);
    }

    /**
     * The pixels of a set.
     *
     * @param width columns of the frame, at least 1
     * @param height rows of the frame, at least 1
     * @param indices index = row · width + column of each member; copied
     * @return the mask
     * @throws IllegalArgumentException if a side is not positive or an index is outside the frame
     */
    public static Mask of(int width, int height, BitSet indices) {
        if (indices.length() > (long) width * height) {
            throw new IllegalArgumentException(
                    "index of a pixel " + (indices.length() - 1) + ": expected inside " + width + " × " + height);
        }
        return new Mask(width, height, (BitSet) indices.clone());
    }

    /**
     * The pixels of an image that reach a level.
     *
     * @param image the image
     * @param level the least value of a member
     * @return the mask of the image's frame; pixels without data are no members
     */
    public static Mask atLeast(GrayImage image, double level) {
        float[] values = image.array();
        BitSet members = new BitSet();
        for (int index = 0; index < values.length; index++) {
            if (values[index] >= level) {
                members.set(index);
            }
        }
        return new Mask(image.width(), image.height(), members);
    }

    /**
     * The pixels of an image that have no value.
     *
     * @param image the image
     * @return those that are NaN
     */
    public static Mask missing(GrayImage image) {
        float[] values = image.array();
        BitSet members = new BitSet();
        for (int index = 0; index < values.length && !image.isComplete(); index++) {
            if (Float.isNaN(values[index])) {
                members.set(index);
            }
        }
        return new Mask(image.width(), image.height(), members);
    }

    /**
     * The pixels around some points.
     *
     * @param width columns of the frame, at least 1
     * @param height rows of the frame, at least 1
     * @param points any points, in the frame or not
     * @param reach how far the centre of a member may be from the nearest point, in pixels
     * @return the union of the discs, cut at the frame
     * @throws IllegalArgumentException if a side is not positive
     */
    public static Mask around(int width, int height, Iterable<PixelPoint> points, double reach) {
        BitSet members = new BitSet();
        for (PixelPoint point : points) {
            int last = (int) Math.min(height - 1.0, Math.floor(point.y() + reach - 0.5));
            for (int row = (int) Math.max(0, Math.ceil(point.y() - reach - 0.5)); row <= last; row++) {
                double away = row + 0.5 - point.y();
                double half = Math.sqrt(Math.max(0, reach * reach - away * away));
                int from = (int) Math.max(0, Math.ceil(point.x() - half - 0.5));
                int to = (int) Math.min(width, Math.floor(point.x() + half - 0.5) + 1);
                if (from < to) {
                    members.set(row * width + from, row * width + to);
                }
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
     * Whether any pixel of a rectangle is a member; those outside the frame are none.
     *
     * @param left first column
     * @param top first row
     * @param right column after the last
     * @param bottom row after the last
     * @return true if one is
     */
    public boolean containsAny(int left, int top, int right, int bottom) {
        int from = Math.max(0, left);
        int to = Math.min(width, right);
        int last = Math.min(height, bottom) - 1;
        if (from >= to || members.isEmpty()) {
            return false;
        }
        for (int row = Math.max(0, top); row <= last; row++) {
            int next = members.nextSetBit(row * width + from);
            if (next < 0 || next >= (last + 1) * width) {
                return false;
            }
            if (next < row * width + to) {
                return true;
            }
        }
        return false;
    }

    /** Whether the pixel of an index = row · width + column is a member. */
    boolean contains(int index) {
        return members.get(index);
    }

    boolean isEmpty() {
        return members.isEmpty();
    }

    /**
     * The members one by one.
     *
     * @return index = row · width + column of each, in rising order
     */
    public IntStream members() {
        return members.stream();
    }

    /** Where membership changes along the rows, read one after the other. */
    int[] changes() {
        IntStream.Builder places = IntStream.builder();
        int end;
        for (int start = members.nextSetBit(0); start >= 0; start = members.nextSetBit(end)) {
            end = members.nextClearBit(start);
            places.add(start);
            if (end < width * height) {
                places.add(end);
            }
        }
        return places.build().toArray();
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
        BitSet result = new BitSet();
        int end;
        for (int start = members.nextSetBit(0); start >= 0; start = members.nextSetBit(end)) {
            int row = start / width;
            end = Math.min(members.nextClearBit(start), (row + 1) * width);
            int from = Math.max(0, start - row * width - reach);
            int to = Math.min(width, end - row * width + reach);
            for (int other = Math.max(0, row - reach); other <= Math.min(height - 1, row + reach); other++) {
                result.set(other * width + from, other * width + to);
            }
        }
        return new Mask(width, height, result);
    }

    /**
     * The mask of a larger frame, of which each pixel here is a square group.
     *
     * @param factor pixels per side of a group, at least 1
     * @param largeWidth columns of the larger frame
     * @param largeHeight rows of the larger frame
     * @return the members' groups; columns and rows left over at the right and the bottom go with the last group
     * @throws IllegalArgumentException if the factor is below 1 or a side is not positive
     */
    public Mask enlarged(int factor, int largeWidth, int largeHeight) {
        if (factor < 1) {
            throw new IllegalArgumentException("factor " + factor + ": expected at least 1");
        }
        BitSet large = new BitSet();
        members.stream().forEach(index -> {
            int row = index / width;
            int column = index % width;
            int right = column == width - 1 ? largeWidth : (column + 1) * factor;
            int bottom = row == height - 1 ? largeHeight : (row + 1) * factor;
            for (int line = row * factor; line < bottom; line++) {
                large.set(line * largeWidth + column * factor, line * largeWidth + right);
            }
        });
        return new Mask(largeWidth, largeHeight, large);
    }

    /**
     * The mask of the binned frame.
     *
     * @param factor pixels per side of a group, from 1 to the shorter side
     * @return the groups that hold a member; columns and rows left over at the right and the bottom are dropped
     * @throws IllegalArgumentException if the factor is out of range
     */
    public Mask shrunk(int factor) {
        if (factor < 1 || factor > Math.min(width, height)) {
            throw new IllegalArgumentException("factor " + factor + ": expected 1 to " + Math.min(width, height));
        }
        int columns = width / factor;
        int rows = height / factor;
        BitSet small = new BitSet();
        members.stream().forEach(index -> {
            int row = index / width / factor;
            int column = index % width / factor;
            if (row < rows && column < columns) {
                small.set(row * columns + column);
            }
        });
        return new Mask(columns, rows, small);
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

    @Override
    public boolean equals(Object o) {
        return o instanceof Mask other
                && width == other.width
                && height == other.height
                && members.equals(other.members);
    }

    @Override
    public int hashCode() {
        return members.hashCode();
    }

    @Override
    public String toString() {
        return count() + " of " + width + " × " + height + " px";
    }
}
