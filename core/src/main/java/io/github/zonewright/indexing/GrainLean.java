package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import java.util.ArrayList;
import java.util.List;

/**
 * How a further grain leans: the mean over the leans about its zone axis, weighed by where its spots lie, how intense they
 * are and the habit that small leans are commoner than large ones.
 *
 * @param mean the lean towards X and Y in radians
 * @param error standard uncertainty of either part, in radians
 * @param score the best score, in nats
 */
record GrainLean(Vector2 mean, double error, double score) {

    private static final double STEP = Math.toRadians(0.5);
    private static final int STEPS = 12;

    /** Leans are spread about the zone axis like exp(−lean/2.5°), a habit of people at microscopes. */
    private static final double HABIT = Math.toRadians(2.5);

    /** What the kinematic intensities leave out of the lean, as drawn patterns show. */
    private static final double LEAST_ERROR = Math.toRadians(0.35);

    /** Kinematic intensities are trusted by this much less than their scatter says. */
    private static final double TRUST = 0.6;

    private record Cell(Vector2 lean, double value) {}

    static GrainLean of(GrainModel model, Placement placement) {
        List<Cell> cells = new ArrayList<>();
        double best = Double.NEGATIVE_INFINITY;
        double bestScore = Double.NEGATIVE_INFINITY;
        for (int i = -STEPS; i <= STEPS; i++) {
            for (int j = -STEPS; j <= STEPS; j++) {
                Vector2 lean = new Vector2(i * STEP, j * STEP);
                if (lean.norm() > (STEPS + 0.5) * STEP) {
                    continue;
                }
                List<GrainModel.Node> nodes =
                        model.nodes(leaning(placement, lean).rotation(), GrainSearch.WIDTH);
                double score = model.score(nodes);
                double value = score + TRUST * model.intensityFit(nodes) - lean.norm() / HABIT;
                cells.add(new Cell(lean, value));
                best = Math.max(best, value);
                bestScore = Math.max(bestScore, score);
            }
        }
        double sum = 0;
        Vector2 mean = Vector2.ZERO;
        double squares = 0;
        for (Cell cell : cells) {
            double weight = Math.exp(cell.value - best);
            sum += weight;
            mean = mean.plus(cell.lean.times(weight));
            squares += weight * cell.lean.dot(cell.lean);
        }
        mean = mean.times(1 / sum);
        double variance = Math.max(0, squares / sum - mean.dot(mean)) / 2;
        return new GrainLean(mean, Math.hypot(Math.sqrt(variance), LEAST_ERROR), bestScore);
    }

    static Orientation leaning(Placement placement, Vector2 lean) {
        ZoneSetting s = placement.setting();
        return new ZoneSetting(s.zone(), s.reference(), s.rotation(), lean.x(), lean.y())
                .orientation(placement.crystal().lattice());
    }
}
