package io.github.zonewright.symmetry;

import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;

/** New coordinates x′ = P·x + p; an operation S becomes V·S·V⁻¹ (International Tables B, A1.4.2.4). */
final class ChangeOfBasis {

    private static final int UNIT = AffineTriplet.DENOMINATOR;

    private final AffineTriplet map;
    private final long determinant;
    private final long[][] adjugate;

    private ChangeOfBasis(AffineTriplet map) {
        this.map = map;
        long[][] m = map.matrix();
        adjugate = new long[3][3];
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                int r1 = (j + 1) % 3;
                int r2 = (j + 2) % 3;
                int c1 = (i + 1) % 3;
                int c2 = (i + 2) % 3;
                adjugate[i][j] = m[r1][c1] * m[r2][c2] - m[r1][c2] * m[r2][c1];
            }
        }
        determinant = m[0][0] * adjugate[0][0] + m[0][1] * adjugate[1][0] + m[0][2] * adjugate[2][0];
    }

    /** Reads what stands between the parentheses of a Hall symbol: {@code x-y,x+y,z} or {@code 0 0 1} in twelfths. */
    static ChangeOfBasis parse(String text, String symbol) {
        AffineTriplet map;
        if (text.matches("\\s*-?\\d{1,2}\\s+-?\\d{1,2}\\s+-?\\d{1,2}\\s*")) {
            String[] twelfths = text.trim().split("\\s+");
            long[] shift = new long[3];
            for (int i = 0; i < 3; i++) {
                shift[i] = Long.parseLong(twelfths[i]) * (UNIT / 12);
            }
            map = new AffineTriplet(new long[][] {{UNIT, 0, 0}, {0, UNIT, 0}, {0, 0, UNIT}}, shift);
        } else {
            map = AffineTriplet.parse(text);
        }
        for (long[] row : map.matrix()) {
            for (long element : row) {
                if (Math.abs(element) > 12L * UNIT) {
                    throw new IllegalArgumentException("Hall symbol \"" + symbol + "\": change of basis (" + text
                            + ") has a factor above 12, expected a smaller one");
                }
            }
        }
        ChangeOfBasis made = new ChangeOfBasis(map);
        if (made.determinant == 0) {
            throw new IllegalArgumentException("Hall symbol \"" + symbol + "\": change of basis (" + text
                    + ") has determinant 0, expected an invertible one");
        }
        return made;
    }

    /** Every operation of a group in the new basis, with the translations of the old cell that the new one holds. */
    List<SymmetryOperation> apply(List<SymmetryOperation> group) {
        Set<SymmetryOperation> known = new LinkedHashSet<>(group);
        for (int axis = 0; axis < 3; axis++) {
            int[] edge = new int[3];
            for (int i = 0; i < 3; i++) {
                edge[i] = exact(adjugate[i][axis] * UNIT * UNIT, determinant);
            }
            if (!known.contains(
                    SymmetryOperation.ofTranslation(edge[0], edge[1], edge[2]).reduced())) {
                throw new IllegalArgumentException("change of basis: axis " + "abc".charAt(axis)
                        + " of the new cell is no lattice translation of the group, expected one");
            }
        }
        List<SymmetryOperation> changed = new ArrayList<>();
        for (int axis = 0; axis < 3; axis++) {
            long[][] m = map.matrix();
            changed.add(SymmetryOperation.ofTranslation((int) m[0][axis], (int) m[1][axis], (int) m[2][axis]));
        }
        group.forEach(operation -> changed.add(apply(operation)));
        return changed;
    }

    private SymmetryOperation apply(SymmetryOperation operation) {
        long[][] m = map.matrix();
        int[] rotation = new int[9];
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                long sum = 0;
                for (int a = 0; a < 3; a++) {
                    for (int b = 0; b < 3; b++) {
                        sum += m[i][a] * operation.rotation(a, b) * adjugate[b][j];
                    }
                }
                rotation[3 * i + j] = exact(sum, determinant);
            }
        }
        int[] translation = new int[3];
        for (int i = 0; i < 3; i++) {
            long moved = 0;
            long turnedShift = 0;
            for (int a = 0; a < 3; a++) {
                moved += m[i][a] * operation.translation(a);
                turnedShift += rotation[3 * i + a] * map.shift()[a];
            }
            translation[i] = Math.toIntExact(exact(moved, UNIT) + map.shift()[i] - turnedShift);
        }
        return SymmetryOperation.of(rotation, translation);
    }

    private static int exact(long numerator, long denominator) {
        if (numerator % denominator != 0) {
            throw new IllegalArgumentException("change of basis: an operation of the group has fractional elements in"
                    + " the new cell, expected a cell that the group's lattice holds");
        }
        return Math.toIntExact(numerator / denominator);
    }
}
