package io.github.zonewright.imagej.session;

import io.github.zonewright.document.ToldApart;
import io.github.zonewright.imagej.overlay.IndexLabel;
import io.github.zonewright.indexing.Discrimination;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.Verdict;
import io.github.zonewright.indexing.WhatTellsApart;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import java.util.ArrayList;
import java.util.List;

/**
 * Two answers of one image that are to be told apart.
 *
 * @param first the first
 * @param second the other
 * @param label what the other is called
 */
public record Comparison(Solution first, Placement second, String label) {
    /** The answer half a turn about the zone axis away. */
    public static final String HALF_TURN_LABEL = "half a turn";

    /**
     * The answers that stand against one: those it is tied with, and half a turn where its spots leave that open.
     *
     * @param sitting what is known of the image
     * @param first one of its solutions
     * @return the pairs; none when nothing stands against it
     */
    public static List<Comparison> of(Sitting sitting, Solution first) {
        List<Comparison> pairs = new ArrayList<>();
        if (sitting.verdict() instanceof Verdict.Tied tied && tied.solutions().contains(first)) {
            tied.solutions().stream()
                    .filter(s -> !s.equals(first))
                    .forEach(s -> pairs.add(with(first, s, sitting.solutions().indexOf(s) + 1)));
        }
        if (first.halfTurn().isPresent()) {
            pairs.add(new Comparison(first, WhatTellsApart.halfTurned(first.placement()), HALF_TURN_LABEL));
        }
        return pairs;
    }

    /**
     * The pair that a person names.
     *
     * @param sitting what is known of the image
     * @param number the first answer's place among its solutions, from 1
     * @param against the other's place, or half a turn; blank for the first that stands against it
     * @return the pair
     * @throws IllegalArgumentException if there is no such solution, or nothing stands against the first
     */
    public static Comparison named(Sitting sitting, int number, String against) {
        Solution first = solution(sitting, number);
        String other = against == null ? "" : against.strip();
        if (other.isEmpty()) {
            return of(sitting, first).stream()
                    .findFirst()
                    .orElseThrow(() -> new IllegalArgumentException("solution " + number
                            + ": nothing is tied with it and no half turn is open; name another solution"));
        }
        if (other.matches("\\d{1,4}")) {
            int second = Integer.parseInt(other);
            if (second == number) {
                throw new IllegalArgumentException(
                        "the other solution: " + second + ", expected another one than the first");
            }
            return with(first, solution(sitting, second), second);
        }
        Choice.pick("the other solution", other, List.of(HALF_TURN_LABEL));
        return new Comparison(first, WhatTellsApart.halfTurned(first.placement()), HALF_TURN_LABEL);
    }

    private static Comparison with(Solution first, Solution second, int number) {
        Placement p = second.placement();
        return new Comparison(
                first,
                p,
                number + ": " + p.crystal().name() + " "
                        + IndexLabel.of(p.setting().zone()));
    }

    private static Solution solution(Sitting sitting, int number) {
        int count = sitting.solutions().size();
        if (number < 1 || number > count) {
            throw new IllegalArgumentException("solution: " + number + ", expected "
                    + (count == 0 ? "a search on this image first" : "1 to " + count));
        }
        return sitting.solutions().get(number - 1);
    }

    /**
     * What of that is kept.
     *
     * @param found what tells them apart
     * @return the same, with the other answer's name
     */
    public ToldApart told(Discrimination found) {
        String other = label.equals(HALF_TURN_LABEL)
                ? label
                : "[" + second.setting().zone() + "] of " + second.crystal().name();
        return ToldApart.of(other, found);
    }

    /**
     * What tells them apart.
     *
     * @param measured the measured spots
     * @return the kind of likeness, spots to look for, and a tilt
     */
    public Discrimination discrimination(MeasuredPattern measured) {
        return WhatTellsApart.between(measured, first.placement(), second);
    }
}
