package io.github.zonewright.imagej.workbench;

import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.Leftovers;
import io.github.zonewright.indexing.Verdict;
import io.github.zonewright.spots.MeasuredPattern;
import java.util.Optional;

/** Says the one thing to do next. */
final class Guide {
    private static final int FEW = 4;
    private static final String MUCH_LEFT =
            "Not settled, and spots are left over: search them with Left over…, or keep the record as it is.";

    /** What the next thing is, so that Enter can do it. */
    enum Step {
        OPEN("Open a diffraction pattern, or drop it on ImageJ; or take the example."),
        PUT_RIGHT(""),
        FIND_SPOTS("Find the spots of this image."),
        LAY("Few spots to go by: type a zone axis and turn the pattern by hand."),
        FIND_ORIENTATION("Check voltage, scale and crystal, then find the orientation."),
        WAIT("Searching. Esc stops it."),
        REFINE("Turn and shift the pattern until it sits on the spots, then refine."),
        KEEP("Compare the solutions with the image, then keep the record.");

        private final String sentence;

        Step(String sentence) {
            this.sentence = sentence;
        }
    }

    private final Step step;
    private final String sentence;

    private Guide(Step step, String sentence) {
        this.step = step;
        this.sentence = sentence;
    }

    static Guide of(boolean imageOpen, boolean searching, Optional<String> wrong, Sitting sitting) {
        Step step;
        if (!imageOpen) {
            step = Step.OPEN;
        } else if (searching) {
            step = Step.WAIT;
        } else if (wrong.isPresent()) {
            step = Step.PUT_RIGHT;
        } else if (sitting.chosen().isPresent()) {
            step = Step.KEEP;
        } else if (sitting.measured().isEmpty()) {
            step = Step.FIND_SPOTS;
        } else if (sitting.placement().isPresent()) {
            step = Step.REFINE;
        } else if (few(sitting.measured().get())) {
            step = Step.LAY;
        } else {
            step = Step.FIND_ORIENTATION;
        }
        return new Guide(step, sentence(step, wrong, sitting));
    }

    private static String sentence(Step step, Optional<String> wrong, Sitting sitting) {
        if (step == Step.PUT_RIGHT) {
            return wrong.orElseThrow();
        }
        return step == Step.KEEP && leavesMuch(sitting) ? MUCH_LEFT : step.sentence;
    }

    /** Whether a further crystal might settle what is open. */
    private static boolean leavesMuch(Sitting sitting) {
        int left = sitting.chosen().map(s -> s.unexplained().size()).orElse(0);
        return left >= Leftovers.LEAST_SPOTS
                && sitting.findings().grains().isEmpty()
                && sitting.verdict() instanceof Verdict.Open;
    }

    Step step() {
        return step;
    }

    String sentence() {
        return sentence;
    }

    private static boolean few(MeasuredPattern pattern) {
        return pattern.spots().size() < FEW;
    }
}
