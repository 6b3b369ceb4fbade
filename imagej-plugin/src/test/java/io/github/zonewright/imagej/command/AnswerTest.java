package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;

import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.SolutionErrors;
import io.github.zonewright.indexing.Verdict;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;

class AnswerTest {
    private final Solution first = of(40);
    private final Solution second = of(34);
    private final Solution third = of(10);
    private final List<Solution> all = List.of(first, second, third);

    private static Solution of(double score) {
        return new Solution(
                TestPatterns.copper110(),
                List.of(),
                List.of(),
                0.1,
                score,
                new SolutionErrors(0, 0, 0, 0, 0, 0),
                Optional.empty());
    }

    private List<String> words(Verdict verdict) {
        return all.stream().map(s -> Answer.verdict(s, all, verdict)).toList();
    }

    /** An answer leads when it is eight nats ahead; where none does, all that come as near are open. */
    @Test
    void verdict_ofEachSolution() {
        assertEquals(List.of("settled", "behind", "behind"), words(new Verdict.Settled(first, List.of())));
        assertEquals(List.of("tied", "tied", "behind"), words(new Verdict.Tied(List.of(first, second), List.of())));
        assertEquals(List.of("open", "open", "behind"), words(new Verdict.Open("too few spots")));
    }
}
