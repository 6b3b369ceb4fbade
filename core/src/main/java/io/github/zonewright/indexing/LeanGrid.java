package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Vector2;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/** Leans of a grid, none worked out further than it takes to see that it lies far below the best. */
final class LeanGrid {

    /** Nats below the best at a lean beyond which a hypothesis does not count there. */
    private static final double HYPOTHESIS_DEPTH = 16;

    private final ExpectedLevels expected;
    private final List<LeanFit.Hypothesis> hypotheses;
    private final int count;
    private final double depth;
    private final Map<Long, LeanFit.Cell> cells = new LinkedHashMap<>();
    private double floor;

    /** Of so many hypotheses in all those given matter; what lies below the floor or the depth below the best does not. */
    LeanGrid(ExpectedLevels expected, List<LeanFit.Hypothesis> hypotheses, int count, double depth, double floor) {
        this.expected = expected;
        this.hypotheses = hypotheses;
        this.count = count;
        this.depth = depth;
        this.floor = floor;
    }

    void add(int row, int column) {
        if (!cells.containsKey(row * 100_000L + column)) {
            LeanFit.Cell cell = cell(new Vector2(row * LeanFit.STEP, column * LeanFit.STEP));
            cells.put(row * 100_000L + column, cell);
            floor = Math.max(floor, cell.value() - depth);
        }
    }

    void addAround(LeanFit.Cell cell, int step) {
        int row = (int) Math.rint(cell.lean().x() / LeanFit.STEP);
        int column = (int) Math.rint(cell.lean().y() / LeanFit.STEP);
        for (int i = -step; i <= step; i += step) {
            for (int j = -step; j <= step; j += step) {
                add(row + i, column + j);
            }
        }
    }

    /** All that were added. */
    Collection<LeanFit.Cell> cells() {
        return cells.values();
    }

    private LeanFit.Cell cell(Vector2 lean) {
        double prior = LeanFit.logPrior(lean.norm());
        double least = (floor - prior) / LeanFit.TRUST + Math.log((double) count / hypotheses.size());
        double sum = 0;
        double top = Double.NEGATIVE_INFINITY;
        EnvelopeShape last = null;
        for (LeanFit.Hypothesis h : hypotheses) {
            if (h.shape() != last) {
                expected.at(lean, h.shape());
                last = h.shape();
            }
            double value = h.likelihood().of(expected, Math.max(least, top - HYPOTHESIS_DEPTH));
            if (value > top) {
                sum = sum * Math.exp(top - value) + 1;
                top = value;
            } else if (value > Double.NEGATIVE_INFINITY) {
                sum += Math.exp(value - top);
            }
        }
        return new LeanFit.Cell(lean, top + Math.log(sum / count), prior);
    }

    /** Those that come near the best, best first. */
    List<LeanFit.Cell> best(double within, int most) {
        return LeanFit.best(cells.values(), within, most);
    }
}
