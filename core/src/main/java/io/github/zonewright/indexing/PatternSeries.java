package io.github.zonewright.indexing;

import io.github.zonewright.image.GrayImage;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.io.IOException;
import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.concurrent.CancellationException;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.Future;
import java.util.concurrent.atomic.AtomicBoolean;
import java.util.function.BooleanSupplier;
import java.util.function.Consumer;
import java.util.function.DoubleConsumer;

/**
 * Finds the orientations of many patterns, one answer per frame and in the order of the frames. Several threads share the
 * work and no more than a few frames are in memory at a time, however many there are; the answers do not depend on the
 * number of threads. A frame that cannot be read or explained has an answer that says why, and the others go on.
 *
 * <p>Each frame is searched by itself, or the orientation is followed from frame to frame (tilt, time): then the solutions of
 * the last good frame are refined on the next, which is faster, and only where that gives a worse verdict, or leaves many more spots
 * over, is it searched. Two
 * frames may differ by a degree or so, and by any drift of a centre that can be seen. What is followed is compared with the
 * other solutions that were found when it was last searched, and with no others: a crystal that comes up later beside it is
 * not missed.
 */
public final class PatternSeries {

    private static final int LARGEST_THREADS = 256;

    /** Frames that may wait, looked at, beside those that are being looked at. */
    private static final int WAITING = 2;

    private final FrameSearch search;
    private final int threads;
    private final boolean following;

    private PatternSeries(FrameSearch search, int threads, boolean following) {
        this.search = search;
        this.threads = threads;
        this.following = following;
    }

    /**
     * A series whose frames are searched each by itself, with one thread.
     *
     * @param search the search, such as {@code OrientationSearch.of(…)::find}
     * @return the series
     */
    public static PatternSeries of(FrameSearch search) {
        return new PatternSeries(search, 1, false);
    }

    /**
     * The same with more threads.
     *
     * @param count how many look at frames at once, 1 to 256
     * @return the changed series
     * @throws IllegalArgumentException if it is out of range
     */
    public PatternSeries withThreads(int count) {
        if (count < 1 || count > LARGEST_THREADS) {
            throw new IllegalArgumentException("threads: " + count + ", expected 1 to " + LARGEST_THREADS);
        }
        return new PatternSeries(search, count, following);
    }

    /**
     * The same with the orientation followed, or not, from frame to frame.
     *
     * @param follow whether to follow
     * @return the changed series
     */
    public PatternSeries withFollowing(boolean follow) {
        return new PatternSeries(search, threads, follow);
    }

    /** What can be said of a frame by itself. */
    private record Look(int index, String label, Optional<MeasuredPattern> measured, Optional<SearchResult> result) {}

    /**
     * Looks at all frames. The sink is called on the caller's thread, in the order of the frames; once this returns or
     * throws, no thread of the series lives.
     *
     * @param frames the frames
     * @param sink is given the answer to each frame
     * @param progress gets the share of the frames done, 0 to 1
     * @param cancelled asked now and then, also from other threads; true stops the series
     * @throws CancellationException if it was stopped, or the caller's thread was interrupted; the sink then has the answers
     *     to the first frames
     */
    public void run(
            FrameSource frames, Consumer<FrameAnswer> sink, DoubleConsumer progress, BooleanSupplier cancelled) {
        int size = frames.size();
        AtomicBoolean ended = new AtomicBoolean();
        BooleanSupplier stop = () -> ended.get() || cancelled.getAsBoolean();
        List<Thread> workers = new ArrayList<>();
        ExecutorService pool = Executors.newFixedThreadPool(threads, work -> {
            Thread worker = new Thread(work, "pattern series");
            worker.setDaemon(true);
            workers.add(worker);
            return worker;
        });
        ArrayDeque<Future<Look>> ahead = new ArrayDeque<>();
        Sequence sequence = new Sequence();
        int done = 0;
        try {
            for (int next = 0; done < size; done++) {
                if (cancelled.getAsBoolean()) {
                    throw new CancellationException();
                }
                for (; next < size && ahead.size() < threads + WAITING; next++) {
                    int index = next;
                    ahead.add(pool.submit(() -> look(frames, index, stop)));
                }
                sink.accept(sequence.answer(ahead.remove().get(), stop));
                progress.accept((done + 1.0) / size);
            }
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
            throw stopped(done, size);
        } catch (CancellationException e) {
            throw stopped(done, size);
        } catch (ExecutionException e) {
            if (e.getCause() instanceof CancellationException) {
                throw stopped(done, size);
            }
            throw new IllegalStateException("frame " + (done + 1) + ": " + e.getCause(), e.getCause());
        } finally {
            ended.set(true);
            pool.shutdown();
            await(workers);
        }
    }

    private static CancellationException stopped(int done, int size) {
        return new CancellationException("the series was stopped after " + done + " of " + size + " frames");
    }

    /** Waits until the threads are gone, and not only idle: a pool counts as ended a moment earlier. */
    private static void await(List<Thread> workers) {
        boolean interrupted = false;
        for (Thread worker : workers) {
            while (worker.isAlive()) {
                try {
                    worker.join();
                } catch (InterruptedException e) {
                    interrupted = true;
                }
            }
        }
        if (interrupted) {
            Thread.currentThread().interrupt();
        }
    }

    private Look look(FrameSource frames, int index, BooleanSupplier stop) {
        String label = "";
        Optional<MeasuredPattern> measured = Optional.empty();
        try {
            GrayImage image;
            synchronized (frames) {
                if (stop.getAsBoolean()) {
                    throw new CancellationException();
                }
                label = frames.label(index);
                image = frames.read(index);
            }
            measured = Optional.of(SpotFinder.measure(image));
            Optional<SearchResult> result =
                    following ? Optional.empty() : Optional.of(search.find(measured.get(), share -> {}, stop));
            return new Look(index, label, measured, result);
        } catch (CancellationException e) {
            throw e;
        } catch (IOException | RuntimeException e) {
            return new Look(index, label, measured, Optional.of(failure(e)));
        }
    }

    private static SearchResult failure(Exception e) {
        String message = e.getMessage();
        return new SearchResult(List.of(), message == null ? e.toString() : message);
    }

    /** What one frame has to do with those before it; frames come here one by one and in their order. */
    private final class Sequence {

        private final OrientationFollower follower = new OrientationFollower(search);
        private Optional<Solution> before = Optional.empty();

        FrameAnswer answer(Look look, BooleanSupplier stop) {
            OrientationFollower.Found found = look.result
                    .map(r -> new OrientationFollower.Found(r, false))
                    .orElseGet(() -> follow(look.measured.orElseThrow(), stop));
            SearchResult result = near(found.result());
            OptionalDouble turned = OptionalDouble.empty();
            if (OrientationFollower.standing(result) > 0) {
                Solution best = result.best().orElseThrow();
                turned = before.filter(b ->
                                b.placement().crystal().equals(best.placement().crystal()))
                        .map(b -> OptionalDouble.of(HalfTurn.angleBetween(b, best)))
                        .orElse(OptionalDouble.empty());
                before = Optional.of(best);
            }
            return new FrameAnswer(look.index, look.label, look.measured, result, found.followed(), turned);
        }

        private OrientationFollower.Found follow(MeasuredPattern pattern, BooleanSupplier stop) {
            try {
                return follower.next(pattern, stop);
            } catch (CancellationException e) {
                throw e;
            } catch (RuntimeException e) {
                return new OrientationFollower.Found(failure(e), false);
            }
        }

        /** Of orientations half a turn apart the one that is nearer to the frame before comes first. */
        private SearchResult near(SearchResult result) {
            return before.map(b -> new SearchResult(
                            result.solutions().stream()
                                    .map(s -> HalfTurn.near(s, b))
                                    .toList(),
                            result.explanation()))
                    .orElse(result);
        }
    }
}
