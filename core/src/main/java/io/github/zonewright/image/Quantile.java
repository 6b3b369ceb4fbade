package io.github.zonewright.image;

/** The value at a rank of a sample, found by parting the sample again and again (Hoare's selection, Lomuto's parting) and not by sorting. */
public final class Quantile {

    private Quantile() {}

    /**
     * The value that would stand at a place if a part of an array were sorted. The part is rearranged: what stands before
     * that place afterwards is no greater, what stands after it no less.
     *
     * @param values the array, without NaN
     * @param from first place of the part
     * @param to place after the last
     * @param rank a place from {@code from} to before {@code to}
     * @return the value at that place
     */
    public static float select(float[] values, int from, int to, int rank) {
        int low = from;
        int high = to;
        while (high - low > 1) {
            float pivot = middle(values[low], values[(low + high) >>> 1], values[high - 1]);
            int less = parted(values, low, high, pivot);
            if (rank < less) {
                high = less;
            } else if (less > low) {
                low = less;
            } else {
                int more = parted(values, low, high, Math.nextUp(pivot));
                if (rank < more) {
                    return pivot;
                }
                low = more;
            }
        }
        return values[rank];
    }

    /** Brings what is below a limit to the front and tells where the rest begins; without branches, for speed. */
    private static int parted(float[] values, int from, int to, float limit) {
        int rest = from;
        for (int i = from; i < to; i++) {
            float value = values[i];
            values[i] = values[rest];
            values[rest] = value;
            rest += value < limit ? 1 : 0;
        }
        return rest;
    }

    private static float middle(float a, float b, float c) {
        return Math.max(Math.min(a, b), Math.min(Math.max(a, b), c));
    }
}
