package io.github.zonewright.indexing;

import io.github.zonewright.spots.MeasuredSpot;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * How sure an answer is. It speaks of the crystal, the zone axis and the rotation; the lean carries its own uncertainty. Two
 * orientations half a turn apart about the zone axis count as one answer.
 *
 * <p>An answer is <em>settled</em> when enough spots are explained, most of the intensity is, no other answer comes near and
 * none puts the same spots plainly nearer; <em>tied</em> when other answers place the same spots as well, even if intensities
 * favour one, since intensities are compared with kinematic ones; <em>open</em> otherwise.
 *
 * <p>Where the spots that the best answer leaves over were searched for further crystals, the whole is judged: their spots
 * count as explained, and an answer that explains their spots is no rival of the best.
 *
 * <p>Known limits: only the crystals and zone axes that were searched can tie. A phase that was never offered is not missed.
 */
public sealed interface Verdict {

    /** Nats by which the first answer must lead all that place other spots. */
    double LEAD = 8;

    /** Least score of a settled answer, in nats. */
    double LEAST_SCORE = 20;

    /** Share of the spots below which an answer that explains no more of them needs a higher score. */
    double MOST_SPOTS = 0.5;

    /** Least score of a settled answer that leaves over most of the spots, in nats: what it explains may be of chance. */
    double LEAST_SCORE_OF_FEW = 60;

    /** Least number of explained spots of a settled answer. */
    int LEAST_MATCHES = 6;

    /** Least share of the first answer's score that another crystal's answer needs for a tie. */
    double LEAST_SHARE = 0.6;

    /**
     * Least share of the first answer's score that another zone axis of the same crystal needs for a tie. Intensities make up
     * some half of a score, and many beams may make them wrong; one that is worse than that has far too much missing.
     */
    double LEAST_SHARE_OF_ZONE = 0.4;

    /** Least {@linkplain Solution#ownScore() nats for the crystal} of a settled answer. */
    double LEAST_OWN_SCORE = 0;

    /** Least share of the spots' intensity that a settled answer explains. */
    double LEAST_EXPLAINED = 0.6;

    /**
     * One sentence for a person.
     *
     * @return what the verdict says and why
     */
    String sentence();

    /**
     * One answer, and no other near it.
     *
     * @param solution the answer
     * @param grains further crystals that explain what it leaves over, without which it would not be settled or not whole
     */
    record Settled(Solution solution, List<Grain> grains) implements Verdict {

        /** Copies the list. */
        public Settled {
            grains = List.copyOf(grains);
        }

        @Override
        public String sentence() {
            return "Settled" + Grain.with(grains) + ": ["
                    + solution.placement().setting().zone() + "] of "
                    + solution.placement().crystal().name() + ".";
        }
    }

    /**
     * Several answers that explain the same spots.
     *
     * @param solutions the answers, best first, at least two
     * @param grains further crystals that explain what the best of them leaves over
     */
    record Tied(List<Solution> solutions, List<Grain> grains) implements Verdict {

        /** Copies the lists. */
        public Tied {
            solutions = List.copyOf(solutions);
            grains = List.copyOf(grains);
        }

        @Override
        public String sentence() {
            return "Tied" + Grain.with(grains) + ": "
                    + String.join(
                            " or ",
                            solutions.stream()
                                    .map(s -> "[" + s.placement().setting().zone() + "] of "
                                            + s.placement().crystal().name())
                                    .toList())
                    + " explain the same spots.";
        }
    }

    /**
     * No answer to rely on.
     *
     * @param reason why not
     */
    record Open(String reason) implements Verdict {

        @Override
        public String sentence() {
            return "Open: " + reason;
        }
    }

    /**
     * Judges what a search has found.
     *
     * @param result the solutions, best first
     * @return the verdict
     */
    static Verdict of(SearchResult result) {
        return of(result, List.of());
    }

    /**
     * Judges what a search has found together with the further crystals in what its best solution leaves over.
     *
     * @param result the solutions, best first
     * @param grains further crystals among the spots that the best solution leaves over, none perhaps
     * @return the verdict
     */
    static Verdict of(SearchResult result, List<Grain> grains) {
        if (result.best().isEmpty()) {
            return new Open(result.explanation());
        }
        Solution best = result.best().get();
        List<Solution> tied = result.solutions().stream()
                .filter(s -> s == best || (placesSameSpots(best, s) && isNotPlainlyWrong(best, s)))
                .toList();
        ExplainedSpots whole = new ExplainedSpots(best, grains);
        double next = result.solutions().stream()
                .filter(s -> !tied.contains(s) && !whole.isOfGrains(s))
                .mapToDouble(Solution::score)
                .max()
                .orElse(0);
        int explained = best.matches().size();
        if (explained < LEAST_MATCHES) {
            return new Open("only " + explained + " spots are explained; " + LEAST_MATCHES + " are needed.");
        }
        if (whole.intensity() < LEAST_EXPLAINED) {
            return new Open(String.format(
                    java.util.Locale.ROOT,
                    "only %.0f %% of the spots' intensity is explained; %.0f %% is needed.",
                    100 * whole.intensity(),
                    100 * LEAST_EXPLAINED));
        }
        double least = whole.fraction() < MOST_SPOTS ? LEAST_SCORE_OF_FEW : LEAST_SCORE;
        if (best.score() < least || best.score() - next < LEAD) {
            return new Open(String.format(
                    java.util.Locale.ROOT,
                    "the best answer has a score of %.1f and the next different one %.1f; at least %.0f and a lead of"
                            + " %.0f are needed.",
                    best.score(),
                    next,
                    least,
                    LEAD));
        }
        if (tied.size() > 1) {
            return new Tied(tied, grains);
        }
        Optional<String> nearer = result.solutions().stream()
                .filter(s -> s != best && !whole.isOfGrains(s))
                .flatMap(s -> PlainlyNearer.than(best, s).stream())
                .findFirst();
        if (nearer.isPresent()) {
            return new Open(nearer.get());
        }
        if (best.ownScore().orElse(0) < LEAST_OWN_SCORE) {
            return new Open(
                    "the spots lie on a net of [" + best.placement().setting().zone() + "] of "
                            + best.placement().crystal().name()
                            + ", but it has so many nets that one as near is likely by accident, and the intensities do not fit.");
        }
        return new Settled(best, grains);
    }

    /**
     * Whether another answer's intensities are not plainly wrong. A large cell has a node wherever a spot is, and far more
     * where none is; one crystal's zones are compared by their places above all.
     */
    private static boolean isNotPlainlyWrong(Solution first, Solution other) {
        boolean same = first.placement().crystal().equals(other.placement().crystal());
        return other.score() >= (same ? LEAST_SHARE_OF_ZONE : LEAST_SHARE) * first.score();
    }

    /** Whether another solution explains all but a tenth of the spots that the first does, with residuals as small. */
    private static boolean placesSameSpots(Solution first, Solution other) {
        Map<MeasuredSpot, Double> residuals = new HashMap<>();
        other.matches().forEach(m -> residuals.put(m.measured(), m.residual()));
        double own = 0;
        double others = 0;
        int common = 0;
        for (SpotMatch m : first.matches()) {
            Double residual = residuals.get(m.measured());
            if (residual != null) {
                double error2 = Math.pow(m.measured().positionError(), 2) + 0.1 * 0.1;
                own += m.residual() * m.residual() / error2;
                others += residual * residual / error2;
                common++;
            }
        }
        int missed = first.matches().size() - common;
        return missed <= first.matches().size() / 10 && others / 2 < 1.5 * own / 2 + LEAD;
    }
}
