package io.github.zonewright.imagej.workbench;

import java.util.Optional;
import java.util.function.Consumer;

/** Runs one piece of work at a time for the current image, with its progress in the section of the solutions. */
final class Runner {
    private final SolutionsSection section;
    private final Bench bench;
    private Optional<Background<?>> running = Optional.empty();

    Runner(SolutionsSection section, Bench bench) {
        this.section = section;
        this.bench = bench;
    }

    /** Whether nothing runs. */
    boolean isFree() {
        return running.isEmpty();
    }

    /** Runs work in place of what runs; what comes of it is dropped when it is stopped before. */
    <T> void start(Background.Work<T> work, Consumer<T> onDone) {
        stop("");
        section.spots("");
        Background<T> background = new Background<>(
                work,
                section::progress,
                result -> {
                    ended();
                    onDone.accept(result);
                    bench.refresh();
                },
                message -> {
                    ended();
                    bench.refresh();
                    bench.say(message);
                });
        running = Optional.of(background);
        section.searching(true);
        bench.refresh();
        background.execute();
    }

    /** Stops what runs, if anything does, and says so. */
    void stop(String sentence) {
        if (running.isPresent()) {
            running.get().stop();
            ended();
            bench.refresh();
            section.spots(sentence);
        }
    }

    private void ended() {
        running = Optional.empty();
        section.searching(false);
    }
}
