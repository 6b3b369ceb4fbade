package io.github.zonewright.imagej.workbench;

import java.util.List;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.atomic.AtomicBoolean;
import java.util.function.BooleanSupplier;
import java.util.function.Consumer;
import java.util.function.DoubleConsumer;
import javax.swing.SwingWorker;

/**
 * Work away from the event thread, one piece at a time. What comes of it is told on the event thread, unless it was
 * stopped before.
 *
 * @param <T> what comes of it
 */
final class Background<T> extends SwingWorker<T, Double> {
    /** The work. */
    @FunctionalInterface
    interface Work<T> {
        /** Does it, tells its progress from 0 to 1 and asks whether to stop. */
        T run(DoubleConsumer progress, BooleanSupplier stopped);
    }

    private final Work<T> work;
    private final DoubleConsumer progress;
    private final Consumer<T> onDone;
    private final Consumer<String> onFailure;
    private final AtomicBoolean stopped = new AtomicBoolean();

    Background(Work<T> work, DoubleConsumer progress, Consumer<T> onDone, Consumer<String> onFailure) {
        this.work = work;
        this.progress = progress;
        this.onDone = onDone;
        this.onFailure = onFailure;
    }

    /** Asks the work to stop and forgets what comes of it. */
    void stop() {
        stopped.set(true);
    }

    @Override
    protected T doInBackground() {
        return work.run(this::publish, stopped::get);
    }

    @Override
    protected void process(List<Double> parts) {
        if (!stopped.get()) {
            progress.accept(parts.get(parts.size() - 1));
        }
    }

    @Override
    protected void done() {
        if (stopped.get()) {
            return;
        }
        try {
            onDone.accept(get());
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
        } catch (ExecutionException e) {
            String message = e.getCause().getMessage();
            onFailure.accept(message == null ? e.getCause().toString() : message);
        }
    }
}
