package io.github.zonewright.spots;

import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.Mask;
import java.util.Arrays;
import java.util.HashMap;
import java.util.Map;

/**
 * Finds where a detector has no pixels: bands of rows or columns right across the frame, its border too, that hold one value
 * throughout. A row or column counts when nearly all of its pixels outside the bands of the other direction hold one
 * value, and when that is no chance in view of how often, elsewhere in the image, the neighbour of a pixel of that value
 * has it too; where a background is cut off at black, it often does. Bands of one or two lines are left to be mended.
 */
final class DetectorGaps {

    /** Part of a line that one value must fill. */
    private static final double FILLED = 0.97;
    /** Chance, as a natural logarithm, below which a line of one value is none. */
    private static final double CHANCE = -20;

    private static final int NARROWEST = 3;
    /** A gap is less than this part of the image; more is a detector that saw nothing. */
    private static final double MOST = 0.5;

    /** Pixels of a line looked at first, and how many of them must be alike. */
    private static final int SAMPLES = 16;

    private static final int ALIKE = 9;

    private final GrayImage image;
    /** The dead lines, with the value that fills each, else NaN. */
    private float[] columns;

    private float[] rows;

    private DetectorGaps(GrayImage image) {
        this.image = image;
        this.columns = new float[image.width()];
        this.rows = new float[image.height()];
        Arrays.fill(columns, Float.NaN);
        Arrays.fill(rows, Float.NaN);
    }

    /** The pixels of all gaps. */
    static Mask of(GrayImage image) {
        int width = image.width();
        DetectorGaps gaps = new DetectorGaps(image);
        gaps.find();
        if (!gaps.hasAny()) {
            return Mask.none(width, image.height());
        }
        Mask mask = Mask.of(width, image.height(), index -> gaps.isDead(index % width, index / width));
        return mask.count() < MOST * width * image.height() ? mask : Mask.none(width, image.height());
    }

    private boolean hasAny() {
        boolean any = false;
        for (float[] lines : new float[][] {columns, rows}) {
            for (float value : lines) {
                any |= !Float.isNaN(value);
            }
        }
        return any;
    }

    private boolean isDead(int column, int row) {
        return !Float.isNaN(columns[column]) || !Float.isNaN(rows[row]);
    }

    private void find() {
        for (int round = 0; round == 0 || round == 1 && hasAny(); round++) {
            float[] fillingColumns = filling(true, columns.length, rows);
            float[] fillingRows = filling(false, rows.length, columns);
            columns = fillingColumns;
            rows = fillingRows;
        }
        boolean[] noChanceColumns = noChance(true, columns, rows.length);
        boolean[] noChanceRows = noChance(false, rows, columns.length);
        keepBands(columns, noChanceColumns);
        keepBands(rows, noChanceRows);
    }

    private float value(boolean upright, int line, int place) {
        return upright ? image.value(line, place) : image.value(place, line);
    }

    /** The value that fills each line, or NaN. */
    private float[] filling(boolean upright, int lines, float[] across) {
        float[] found = new float[lines];
        int live = 0;
        for (float value : across) {
            live += Float.isNaN(value) ? 1 : 0;
        }
        for (int line = 0; line < lines; line++) {
            float likely = likely(upright, line, across.length);
            found[line] = fills(likely, upright, line, across, live) ? likely : Float.NaN;
        }
        return found;
    }

    /** The only value that may fill a line: that of most of some pixels along it (Boyer and Moore's vote), or NaN. */
    private float likely(boolean upright, int line, int length) {
        int samples = Math.min(SAMPLES, length);
        float favourite = Float.NaN;
        int lead = 0;
        for (int i = 0; i < samples; i++) {
            float value = sample(upright, line, length, i, samples);
            favourite = lead == 0 ? value : favourite;
            lead += value == favourite ? 1 : lead > 0 ? -1 : 0;
        }
        int alike = 0;
        for (int i = 0; i < samples; i++) {
            alike += sample(upright, line, length, i, samples) == favourite ? 1 : 0;
        }
        return alike >= Math.min(ALIKE, samples) ? favourite : Float.NaN;
    }

    private float sample(boolean upright, int line, int length, int index, int samples) {
        return value(upright, line, (int) ((index + 0.5) * length / samples));
    }

    /** Whether nearly all pixels of a line outside the lines across have a value; looks no further than it must. */
    private boolean fills(float value, boolean upright, int line, float[] across, int live) {
        double others = (1 - FILLED) * live;
        for (int place = 0; place < across.length && others >= 0; place++) {
            if (Float.isNaN(across[place]) && value(upright, line, place) != value) {
                others--;
            }
        }
        return others >= 0 && live > 0 && !Float.isNaN(value);
    }

    private boolean[] noChance(boolean upright, float[] filling, int length) {
        boolean[] result = new boolean[filling.length];
        Map<Float, Double> chances = new HashMap<>();
        for (int line = 0; line < filling.length; line++) {
            if (!Float.isNaN(filling[line])) {
                result[line] =
                        chances.computeIfAbsent(filling[line], value -> chance(upright, value)) * length < CHANCE;
            }
        }
        return result;
    }

    /** Logarithm of how often, outside filled lines, the next pixel in a direction has a value too that this one has. */
    private double chance(boolean downward, float value) {
        long pairs = 0;
        long alike = 0;
        int right = downward ? 0 : 1;
        int down = downward ? 1 : 0;
        for (int row = 0; row + down < rows.length; row++) {
            for (int column = 0; column + right < columns.length; column++) {
                if (image.value(column, row) == value && !isDead(column, row) && !isDead(column + right, row + down)) {
                    pairs++;
                    alike += image.value(column + right, row + down) == value ? 1 : 0;
                }
            }
        }
        return Math.log((alike + 1.0) / (pairs + 2.0));
    }

    private static void keepBands(float[] lines, boolean[] sure) {
        for (int start = 0; start < lines.length; ) {
            int end = start;
            while (end < lines.length && sure[end]) {
                end++;
            }
            int dropped = end - start < NARROWEST ? start : end;
            Arrays.fill(lines, dropped, Math.min(lines.length, end + 1), Float.NaN);
            start = end + 1;
        }
    }
}
