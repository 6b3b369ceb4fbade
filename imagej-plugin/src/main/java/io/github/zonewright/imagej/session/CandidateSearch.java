package io.github.zonewright.imagej.session;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.indexing.KnownCamera;
import io.github.zonewright.indexing.OrientationSearch;
import io.github.zonewright.indexing.SearchResult;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.MeasuredPattern;
import java.util.List;
import java.util.function.BooleanSupplier;
import java.util.function.DoubleConsumer;

/**
 * The search over several crystals: the library searches and compares them.
 *
 * @param crystals the crystals, at least one
 * @param beam the beam
 * @param camera what is known of the camera
 * @param zones the zone axes that are tried
 */
public record CandidateSearch(List<Crystal> crystals, Beam beam, KnownCamera camera, ZoneChoice zones) {

    /**
     * Copies the list.
     *
     * @throws IllegalArgumentException if there is no crystal
     */
    public CandidateSearch {
        crystals = List.copyOf(crystals);
        if (crystals.isEmpty()) {
            throw new IllegalArgumentException("crystals: none, expected at least one to search for");
        }
    }

    /**
     * A search with no more known of the camera than its constant.
     *
     * @param crystals the crystals, at least one
     * @param beam the beam
     * @param cameraConstant camera constant in px·Å, as told
     * @param tolerance how far it may be off, as a part of it: 0.03 for 3 %
     * @param mirrored whether the image is mirrored
     * @throws IllegalArgumentException if there is no crystal, or constant or tolerance is out of range
     */
    public CandidateSearch(
            List<Crystal> crystals, Beam beam, double cameraConstant, double tolerance, boolean mirrored) {
        this(crystals, beam, KnownCamera.of(cameraConstant, tolerance, mirrored), ZoneChoice.ANY);
    }

    /**
     * Searches for orientations of every crystal.
     *
     * @param measured the measured spots
     * @param progress is told how far the search is, 0 to 1
     * @param cancelled is asked whether to stop
     * @return the solutions of all crystals, best first, and a sentence
     */
    public SearchResult run(MeasuredPattern measured, DoubleConsumer progress, BooleanSupplier cancelled) {
        return zones.limit(OrientationSearch.of(crystals, beam, camera)).find(measured, progress, cancelled);
    }
}
