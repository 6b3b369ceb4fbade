package io.github.zonewright.indexing;

import io.github.zonewright.spots.MeasuredPattern;
import java.util.concurrent.CancellationException;
import java.util.function.BooleanSupplier;
import java.util.function.DoubleConsumer;

/** How the orientation of a frame is searched; {@link OrientationSearch} does it. It is shared between threads. */
@FunctionalInterface
public interface FrameSearch {

    /**
     * Searches.
     *
     * @param pattern the measured spots
     * @param progress gets the share done, 0 to 1
     * @param cancelled asked now and then; true stops the search
     * @return the solutions, or why there is none
     * @throws CancellationException if it was stopped
     */
    SearchResult find(MeasuredPattern pattern, DoubleConsumer progress, BooleanSupplier cancelled);
}
